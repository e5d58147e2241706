import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { deviation, readReference, type Split } from '#tests/physics/numerics/reference-table.ts';
import { firstBorn } from '#server/physics/methods/born1.ts';
import { CHARGE_KINDS, extendedCharge } from '#server/physics/potentials/extended-charge.ts';
import { bracketedRoot } from '#server/physics/numerics/root.ts';
import { DomainError } from '#shared/errors.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { build, CONTEXT, transform } from './build-term.ts';

type Kind = (typeof CHARGE_KINDS)[number];
interface Shape {
  kind: Kind;
  radius: number;
  diffuseness?: number;
}
interface Tables {
  transforms: (Split & Shape & { q: number; quadrature: boolean })[];
  potentials: (Split & Shape & { r: number })[];
}
const tables = readReference<Tables>('potentials/extendedCharge.json');

const termOf = ({ kind, radius, diffuseness }: Shape, chargeProduct = 1) =>
  extendedCharge.build(
    { kind, radius, ...(diffuseness !== undefined && { diffuseness }), chargeProduct },
    CONTEXT,
  );

const SHAPES: Shape[] = [
  { kind: 'uniformSphere', radius: 1 },
  { kind: 'gaussian', radius: 1 },
  { kind: 'dipole', radius: 1 },
  { kind: 'fermi', radius: 1, diffuseness: 0.1 },
  { kind: 'fermi', radius: 0.01, diffuseness: 1 },
  { kind: 'helm', radius: 1, diffuseness: 0.1 },
  { kind: 'helm', radius: 0.3, diffuseness: 1 },
];

/** F(q) = q² S(q) of a term. */
const formFactor = (shape: Shape) => {
  const term = termOf(shape);
  return (q: number) => q * q * transform(term, 'closed', q).value;
};

/** rms radius from F = 1 - q²<r²>/6 + …, the next order taken out with two values of q. */
function rmsRadius(shape: Shape): number {
  const F = formFactor(shape);
  const curvature = (q: number) => (6 * (1 - F(q))) / q ** 2;
  const q = 0.02 / Math.max(shape.radius, shape.diffuseness ?? 0);
  return Math.sqrt((4 * curvature(q / 2) - curvature(q)) / 3);
}

describe('extended charges against 30 digits', () => {
  it('closed and quadrature lie within their errors', () => {
    for (const row of tables.transforms) {
      const term = termOf(row);
      for (const route of ['closed', 'quadrature'] as const) {
        const { value, error, status } = transform(term, route, row.q);
        expect(deviation(value, row), `${route} ${JSON.stringify(row)}`).toBeLessThanOrEqual(error);
        expect(status).toBe('converged');
        const point = 2e-14 / row.q ** 2;
        expect(error, route).toBeLessThanOrEqual(Math.max(5e-14 * term.norm, point));
      }
    }
  });

  it('V(r) is that of the charge density', () => {
    for (const row of tables.potentials) {
      const value = termOf(row).v?.(row.r) ?? NaN;
      expect(deviation(value, row), JSON.stringify(row)).toBeLessThanOrEqual(3e-12 * row.high);
    }
  });
});

describe('extended charges', () => {
  it.each(SHAPES)('$kind $radius $diffuseness: closed form and quadrature agree', (shape) => {
    const term = termOf(shape);
    for (const x of [1e-3, 0.02, 0.5, 1, 2, 4.4934094579, 9, 30, 200]) {
      const q = x / (term.range ?? NaN);
      const [closed, quadrature] = [transform(term, 'closed', q), transform(term, 'quadrature', q)];
      const apart = Math.abs(closed.value - quadrature.value);
      expect(apart).toBeLessThanOrEqual(closed.error + quadrature.error);
      expect(apart).toBeLessThanOrEqual(Math.max(1e-9 * Math.abs(closed.value), 1e-14 * term.norm));
    }
  });

  it.each(SHAPES)(
    '$kind $radius $diffuseness: the error covers a q known to eight roundings',
    (shape) => {
      const term = termOf(shape);
      const size = (q: number) => term.norm + 1 / q ** 2;
      for (let i = 0; i < 200; i++) {
        const q = 10 ** (-2 + i / 50) / (term.range ?? NaN);
        const step = 1e-6 / (1 + q);
        const above = transform(term, 'closed', q * (1 + step)).value;
        const below = transform(term, 'closed', q * (1 - step)).value;
        const slope = Math.abs(above - below) / (2 * step);
        const { error } = transform(term, 'closed', q);
        const noise = (1e-15 * size(q)) / step;
        expect(8 * 2 ** -53 * slope).toBeLessThanOrEqual(error + 8 * 2 ** -53 * noise);
      }
    },
  );

  it.each(SHAPES)('$kind $radius $diffuseness: outside a point charge, norm = <r²>/6', (shape) => {
    const term = termOf(shape);
    const far = 60 * (term.range ?? NaN);
    expectRelative((term.v?.(far) ?? NaN) * far, 1, 1e-15);
    expectRelative(rmsRadius(shape) ** 2 / 6, term.norm, 2e-6);
    expect(term).toMatchObject({ coulombTail: 1, tail: 'coulomb', reach: null });
    expect(transform(term, 'closed', 0).value).toBe(Infinity);
    // The potential is flat at the origin, and joins where its two ways of computing meet.
    const edge = (term.range ?? NaN) / 1000;
    const [inner, outer] = [term.v?.(edge * (1 - 1e-9)) ?? NaN, term.v?.(edge * (1 + 1e-9)) ?? NaN];
    expectRelative(inner, outer, 1e-11);
    expectRelative(term.v?.(edge / 1e6) ?? NaN, outer, 1e-5);
  });

  it('lengths times lambda, q over lambda: S times lambda²', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...CHARGE_KINDS),
        fc.double({ min: 0.01, max: 50, noNaN: true }),
        fc.double({ min: 1e-6, max: 1e4, noNaN: true }),
        fc.double({ min: 1e-3, max: 100, noNaN: true }),
        (kind, diffuseness, lambda, q) => {
          const soft = kind === 'fermi' || kind === 'helm';
          const shape = (scale: number): Shape => ({
            kind,
            radius: scale,
            ...(soft && { diffuseness: diffuseness * scale }),
          });
          const one = transform(termOf(shape(1)), 'closed', q);
          const other = transform(termOf(shape(lambda)), 'closed', q / lambda);
          const reach = q * (1 + (soft ? diffuseness : 0));
          const rounding = (2 ** -49 * (1 + reach)) / q ** 2;
          expect(Math.abs(other.value / lambda ** 2 - one.value)).toBeLessThanOrEqual(
            one.error + other.error / lambda ** 2 + rounding,
          );
        },
      ),
      { numRuns: 300 },
    );
  });

  it('limits: no diffuseness is a uniform sphere, no sphere is a Gaussian, a point is coulomb', () => {
    for (const q of [0.3, 2, 7]) {
      const sphere = formFactor({ kind: 'uniformSphere', radius: 1 })(q);
      for (const kind of ['fermi', 'helm'] as const) {
        const soft = (diffuseness: number) => formFactor({ kind, radius: 1, diffuseness })(q);
        expectRelative((soft(1e-4) - sphere) / (soft(1e-3) - sphere), 1e-2, 1e-3);
      }
      const bell = formFactor({ kind: 'gaussian', radius: Math.sqrt(3) })(q);
      expectRelative(formFactor({ kind: 'helm', radius: 1e-6, diffuseness: 1 })(q), bell, 1e-11);
      const point = transform(build('coulomb', { chargeProduct: 1 }), 'closed', q).value;
      const small = transform(termOf({ kind: 'dipole', radius: 1e-9 }), 'closed', q).value;
      expectRelative(small, point, 1e-14);
    }
  });

  it('without charge nothing is left', () => {
    const term = termOf({ kind: 'gaussian', radius: 1 }, 0);
    expect(Math.abs(term.strength.re)).toBe(0);
    expect(term.coulombTail).toBe(0);
    expect(transform(term, 'closed', 0).value).toBe(0);
    expect(transform(term, 'quadrature', 1).value).toBe(0);
  });

  it('its tail is a Coulomb tail for the first Born amplitude', () => {
    const born = firstBorn([termOf({ kind: 'gaussian', radius: 1 })], CONTEXT.twoMuOverHbar2);
    expect(born.amplitude(0)).toBeNull();
    expectRelative(born.tail.re, CONTEXT.twoMuOverHbar2 * 14.3996454686, 1e-9);
    // -(F - 1)/q² at q = 0 is <r²>/6.
    expectRelative(born.shortRange(0).re, (born.tail.re * 1) / 6, 1e-6);
  });
});

describe('extended charges against published values', () => {
  it('uniform sphere: F(1) = 0.9035060368, F(2) = 0.6530966625, zeros at 4.4934094579 and 7.7252518369', () => {
    const F = formFactor({ kind: 'uniformSphere', radius: 1 });
    expectRelative(F(1), 0.9035060368, 1e-10);
    expectRelative(F(2), 0.6530966625, 1e-10);
    // Abramowitz and Stegun, table 10.6: tan x = x.
    expectRelative(bracketedRoot(F, 4, 5).value, 4.4934094579, 2e-11);
    expectRelative(bracketedRoot(F, 7, 8).value, 7.7252518369, 2e-11);
  });

  // H. de Vries, C. W. de Jager and C. de Vries, At. Data Nucl. Data Tables 36 (1987) 495.
  it.each([
    { nucleus: 'Au', radius: 6.38, diffuseness: 0.535, computed: 5.3271, printed: 5.33 },
    { nucleus: 'Pb', radius: 6.624, diffuseness: 0.549, computed: 5.5219, printed: 5.521 },
  ])(
    'fermi: rms radius of $nucleus is $printed fm',
    ({ radius, diffuseness, computed, printed }) => {
      const { norm } = termOf({ kind: 'fermi', radius, diffuseness });
      expectRelative(Math.sqrt(6 * norm), computed, 1e-5);
      expectRelative(Math.sqrt(6 * norm), printed, 6e-4);
    },
  );

  it('helm: r_n of Xe-131 is 5.8365 fm (J. D. Lewin and P. F. Smith, Astropart. Phys. 6 (1996) 87)', () => {
    const [c, a, s] = [1.23 * Math.cbrt(131) - 0.6, 0.52, 0.9];
    const radius = Math.sqrt(c * c + (7 / 3) * Math.PI ** 2 * a * a - 5 * s * s);
    expectRelative(radius, 5.8365, 1e-5);
    // 3 j1(x)/x at the first zero, whatever the smearing.
    const F = formFactor({ kind: 'helm', radius, diffuseness: s });
    expectRelative(bracketedRoot(F, 4 / radius, 5 / radius).value * radius, 4.4934094579, 2e-11);
    const { norm } = termOf({ kind: 'helm', radius, diffuseness: s });
    expectRelative(6 * norm, 0.6 * radius ** 2 + 3 * s * s, 1e-15);
  });

  it('dipole: Q² = 0.71 GeV² belongs to 0.81124 fm; G(0.71) = 1/4, G(1) = 0.1723949', () => {
    const hbarC = 0.1973269804;
    const rms = Math.sqrt(12 / 0.71) * hbarC;
    expectRelative(rms, 0.81124, 1e-5);
    const G = formFactor({ kind: 'dipole', radius: rms });
    expectRelative(G(Math.sqrt(0.71) / hbarC), 0.25, 1e-14);
    expectRelative(G(1 / hbarC), 0.1723949, 2e-7);
  });
});

describe('extendedCharge refuses', () => {
  const message = (values: Record<string, number | string>): string => {
    try {
      extendedCharge.build(values, CONTEXT);
    } catch (error) {
      if (error instanceof DomainError)
        return `${error.details.errors?.[0]?.path}: ${error.message}`;
      throw error;
    }
    return 'taken';
  };

  it('in words, naming the parameter', () => {
    expect(message({ kind: 'shell', radius: 1 })).toMatch(
      /^\/kind: kind must be one of uniformSphere/,
    );
    expect(message({ kind: 3, radius: 1 })).toMatch(/^\/kind: kind must be a name/);
    expect(message({ radius: 1 })).toBe('/kind: kind is missing');
    expect(message({ kind: 'gaussian' })).toBe('/radius: radius is missing');
    expect(message({ kind: 'gaussian', radius: 0 })).toMatch(/^\/radius: radius must be at least/);
    expect(message({ kind: 'gaussian', radius: 'wide' })).toBe('/radius: radius must be a number');
    expect(message({ kind: 'fermi', radius: 1 })).toMatch(/^\/diffuseness: diffuseness is missing/);
    expect(message({ kind: 'dipole', radius: 1, diffuseness: 1 })).toMatch(/leave it out/);
    expect(message({ kind: 'gaussian', radius: 1, R: 2 })).toMatch(/^\/R: R is no parameter/);
  });
});
