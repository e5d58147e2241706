import { describe, expect, it } from 'vitest';
import { firstBorn } from '#server/physics/methods/born1.ts';
import { partialWaves } from '#server/physics/methods/partial-waves/partial-waves.ts';
import type { PartialWaves, Wave } from '#server/physics/methods/amplitude.ts';
import type { FormValues, Term } from '#server/physics/potentials/types.ts';
import { readReference } from '#tests/physics/numerics/reference-table.ts';
import { build } from '#tests/physics/potentials/build-term.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

type Pair = readonly [re: number, im: number];
interface Row {
  name: string;
  terms: { form: string; values: FormValues }[];
  twoMuOverHbar2: number;
  k: number;
  /** Sommerfeld parameter of a point charge beside the terms. */
  eta?: number;
  /** Between two settings of the reference. */
  difference: number;
  /** Between Coulomb functions of mpmath and of the GNU Scientific Library. */
  gsl?: number;
  T: Pair[];
  f?: (readonly [q: number, re: number, im: number])[];
}
interface SpinRow extends Omit<Row, 'T' | 'f'> {
  /** T_l of j = l + 1/2 and of j = l - 1/2. */
  up: Pair[];
  down: Pair[];
  f: (readonly [q: number, re: number, im: number, flip: number])[];
}
const { rows, spinOrbit } = readReference<{ rows: Row[]; spinOrbit: SpinRow[] }>(
  'methods/phase-shifts.json',
);
const find = (name: string) => {
  const row = rows.find((entry) => entry.name === name);
  if (!row) throw new Error(`no reference called ${name}`);
  return row;
};

type Problem = Pick<Row, 'terms' | 'eta' | 'k' | 'twoMuOverHbar2'>;

function termsOf({ terms, eta, k, twoMuOverHbar2 }: Problem): Term[] {
  const list = terms.map(({ form, values }) => build(form, values));
  if (eta === undefined) return list;
  // U = 2 eta k/r exactly, not by way of alpha and hbar c.
  const charge = build('coulomb', { chargeProduct: Math.sign(eta) });
  return [{ ...charge, strength: { re: (2 * eta * k) / twoMuOverHbar2, im: 0 } }, ...list];
}

function solved(row: Problem): PartialWaves {
  const { k, twoMuOverHbar2 } = row;
  const terms = termsOf(row);
  const born = firstBorn(terms, twoMuOverHbar2);
  const found = partialWaves({ terms, born, k, twoMuOverHbar2, projectileSpin: 0.5 });
  if ('unavailable' in found) throw new Error(found.unavailable);
  return found;
}

/** (S - 1)/2i */
function transition({ delta, eta }: Wave): Pair {
  const cosine = 1 - 2 * Math.sin(delta) ** 2;
  return [(eta * Math.sin(2 * delta)) / 2, (1 - eta * cosine) / 2];
}

const distance = ([a, b]: Pair, [c, d]: Pair) => Math.hypot(a - c, b - d);

/** Phase of S = 1 + 2iT over two. */
const phaseOf = ([re, im]: Pair) => Math.atan2(2 * re, 1 - 2 * im) / 2;

describe('the reference itself', () => {
  it('agrees with itself at two settings to 1e-15, and with the GNU Scientific Library to 1e-13', () => {
    for (const { difference } of rows) expect(difference).toBeLessThan(1e-15);
    const charged = rows.filter(({ gsl }) => gsl !== undefined);
    expect(charged.length).toBeGreaterThan(2);
    for (const { gsl } of charged) expect(gsl ?? NaN).toBeLessThan(1e-13);
  });
});

describe.each(rows)('partial waves, $name', (row) => {
  const found = solved(row);

  it('every wave lies within its error of 17 digits, and phases within 1e-9', () => {
    // Where T is resolved no better than its rounding, the table holds it to 1e-17.
    for (const wave of found.waves) {
      const exact = row.T[wave.l];
      if (!exact) continue;
      expect(distance(transition(wave), exact), `l = ${wave.l}`).toBeLessThanOrEqual(
        wave.error + row.difference + 2e-16,
      );
      const gap = Math.abs(wave.delta - phaseOf(exact));
      expect(Math.min(gap, Math.abs(Math.PI - gap)), `l = ${wave.l}`).toBeLessThan(1e-9);
      expect(wave.error).toBeLessThan(1e-9);
    }
    const followed = found.waves.filter(({ l }) => l < row.T.length).length;
    expect(followed).toBeGreaterThan(Math.min(3, row.T.length - 1));
  });
});

describe.each(rows.filter(({ f }) => f !== undefined))('amplitudes, $name', (row) => {
  const found = solved(row);

  it('lie within their errors, and within 1e-11 of the forward one', () => {
    const weights = row.T.map(([re, im], l) => ((2 * l + 1) * Math.hypot(re, im)) / row.k);
    const forward =
      row.eta === undefined
        ? Math.hypot(row.f?.[0]?.[1] ?? NaN, row.f?.[0]?.[2] ?? NaN)
        : weights.reduce((a, b) => a + b);
    for (const [q, re, im] of row.f ?? []) {
      const { re: x, im: y, error } = found.amplitude(q) ?? { re: NaN, im: NaN, error: NaN };
      const off = distance([x, y], [re, im]);
      expect(off, `q = ${q}`).toBeLessThanOrEqual(error + 4e-16 * Math.hypot(re, im));
      expect(off, `q = ${q}`).toBeLessThan(1e-11 * Math.max(forward, Math.hypot(re, im)));
    }
  });
});

describe.each(spinOrbit)('$name', (row) => {
  const found = solved(row);

  it('both waves of every l lie within their errors', () => {
    expect(row.difference).toBeLessThan(1e-15);
    for (const wave of found.waves) {
      const exact = ((wave.j ?? NaN) > wave.l ? row.up : row.down)[wave.l];
      if (!exact) continue;
      const off = distance(transition(wave), exact);
      expect(off, `l = ${wave.l}, j = ${wave.j}`).toBeLessThanOrEqual(wave.error + 2e-16);
      expect(wave.error).toBeLessThan(1e-9);
    }
    expect(found.waves.length).toBeGreaterThan(row.up.length);
  });

  it('so do both amplitudes, to 1e-11 of the forward one', () => {
    const forward = Math.hypot(row.f[0]?.[1] ?? NaN, row.f[0]?.[2] ?? NaN);
    for (const [q, re, im, flip] of row.f) {
      const f = found.amplitude(q);
      const g = found.flip?.(q);
      if (!f || !g) throw new Error('no amplitude');
      const off = distance([f.re, f.im], [re, im]);
      const flipOff = Math.abs(Math.hypot(g.re, g.im) - flip);
      expect(off).toBeLessThanOrEqual(f.error + 4e-16 * forward);
      expect(flipOff).toBeLessThanOrEqual(g.error + 4e-16 * forward);
      expect(Math.max(off, flipOff)).toBeLessThan(1e-11 * forward);
    }
  });
});

describe('values by name', () => {
  // Check value 49: elastic and momentum-transfer cross section of the hard sphere over πa², recomputed with mpmath.
  it.each([
    ['hardSphere, kR = 0.1', 3.98681618, null],
    ['hardSphere, kR = 1', 3.38243785, 2.31102925],
    ['hardSphere, kR = 5', 2.6023764, null],
    ['hardSphere, kR = 10', 2.39722856, 1.10772449],
    ['hardSphere, kR = 50', 2.14296505, null],
  ])('%s: %d πa², transport %d πa²', (name, elastic, transport) => {
    const row = find(name);
    const { waves } = solved(row);
    const delta = (l: number) => waves.find((wave) => wave.l === l)?.delta ?? 0;
    let [sum, moved] = [0, 0];
    for (let l = 0; l <= row.T.length; l++) {
      sum += (2 * l + 1) * Math.sin(delta(l)) ** 2;
      moved += (l + 1) * Math.sin(delta(l) - delta(l + 1)) ** 2;
    }
    expectRelative((4 * sum) / row.k ** 2, elastic, 2e-9);
    if (transport !== null) expectRelative((4 * moved) / row.k ** 2, transport, 5e-9);
  });
});
