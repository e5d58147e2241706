import { describe, expect, test } from 'vitest';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { sphericalBesselArray } from '#server/physics/numerics/spherical-bessel.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { CONTRACT_BODY, NUCLEAR_UNITS, Q, answer, born1, integral } from './bodies.ts';

const K = 5.1231672231530565;
/** 2m/ħ² of an electron, 1/(eV angstrom²). */
const FACTOR = (2 * 510998.95069) / 1973.2698045930247 ** 2;

const verdictOf = (term: object, more: object = {}) =>
  answer({ ...CONTRACT_BODY, interaction: { terms: [term] }, ...more }).validity;

function criterion(term: object, name: string, more: object = {}): number {
  const found = verdictOf(term, more).criteria.find((entry) => entry.name === name);
  if (!found) throw new Error(`${name} was not judged`);
  return found.value;
}

describe('unitarity against radial integrals of j_l²', () => {
  // max_l k ∫ j_l(kr)² U r² dr, by a route that knows no amplitude.
  function largest(v: (r: number) => number, reach: number, breakpoints: number[] = []): number {
    const lMax = Math.ceil(1.3 * K * reach) + 5;
    let most = 0;
    for (const l of [0, 1, 2, 3, 5, 8, 13, 21, 34, 55, 89].filter((n) => n <= lMax)) {
      const f = (r: number) => (sphericalBesselArray(l + 1, K * r)[l] ?? 0) ** 2 * v(r) * r * r;
      const cuts = [
        ...Array.from({ length: 40 }, (_, i) => (reach * (i + 1)) / 40),
        ...breakpoints,
      ];
      most = Math.max(
        most,
        Math.abs(integrate(f, 0, reach, { breakpoints: cuts, relative: 1e-8 }).value),
      );
    }
    return K * FACTOR * most;
  }

  test.each([
    [
      'yukawa',
      { form: 'yukawa', V0: Q(-10, 'eV'), a: Q(1, 'angstrom') },
      (r: number) => (10 * Math.exp(-r)) / r,
      30,
    ],
    [
      'gaussian',
      { form: 'gaussian', V0: Q(3, 'eV'), a: Q(2, 'angstrom') },
      (r: number) => 3 * Math.exp(-((r / 2) ** 2)),
      12,
    ],
    [
      'squareWell',
      { form: 'squareWell', V0: Q(-2, 'eV'), R: Q(4, 'angstrom') },
      (r: number) => (r < 4 ? 2 : 0),
      4,
    ],
  ])('%s', (_, term, v, reach) => {
    expectRelative(criterion(term, 'unitarity'), largest(v, reach), 2e-3);
  });

  test.each([3, 30, 195.2])('a shell of %s angstrom, where the largest wave grazes it', (R) => {
    const lMax = Math.ceil(1.2 * K * R) + 10;
    const waves = sphericalBesselArray(lMax, K * R).map((j) => FACTOR * K * 2 * R * R * j * j);
    const term = { form: 'deltaShell', g: Q(2, 'eV angstrom'), R: Q(R, 'angstrom') };
    expectRelative(criterion(term, 'unitarity'), Math.max(...waves), 5e-3);
  });
});

test('the second order is k sigma/(4 pi |f(0)|) of the answer', () => {
  const term = { form: 'exponential', V0: Q(-4, 'eV'), a: Q(0.8, 'angstrom') };
  const result = born1(answer({ ...CONTRACT_BODY, interaction: { terms: [term] } }));
  const forward = result.differential[0]?.amplitude?.re ?? NaN;
  const expected = (K * integral(result.elastic).value) / (4 * Math.PI * forward);
  expectRelative(criterion(term, 'secondOrder'), expected, 1e-12);
});

describe('slow and fast', () => {
  test('below k times the range of one, the moment ∫ r V dr', () => {
    const well = { form: 'squareWell', V0: Q(-2, 'eV'), R: Q(0.15, 'angstrom') };
    expectRelative(criterion(well, 'slow'), (FACTOR * 2 * 0.15 ** 2) / 2, 1e-12);
    expect(() => criterion(well, 'fast')).toThrow();
  });

  test('above it, ∫ V dr/(ħv) from 1/k outwards', () => {
    const well = { form: 'squareWell', V0: Q(-2, 'eV'), R: Q(3, 'angstrom') };
    const hbarV = (2 * K) / FACTOR;
    expectRelative(criterion(well, 'fast'), (2 * (3 - 1 / K)) / hbarV, 1e-12);
    expect(() => criterion(well, 'slow')).toThrow();
  });
});

describe("Sommerfeld's parameter", () => {
  // eta = Z1 Z2 alpha c/v; values recomputed outside this project from CODATA 2018.
  const alphas = (target: object, energy: number, term: object = { form: 'coulomb' }) =>
    answer({
      projectile: { species: 'alpha' },
      target,
      energy: Q(energy, 'MeV'),
      interaction: { terms: [term] },
      methods: ['born1'],
      units: NUCLEAR_UNITS,
    });

  test('of alpha particles on alpha particles at 1 MeV in the centre of mass', () => {
    const { criteria } = alphas({ kind: 'nuclide', nuclide: 'He-4' }, 2).validity;
    expectRelative(criteria[0]?.value ?? NaN, 0.8910399, 2e-7);
  });

  test('of gold rules the verdict', () => {
    const { verdict, criteria } = alphas({ kind: 'fixed', charge: 79 }, 5.486).validity;
    expect(verdict).toBe('notValid');
    expect(criteria.map(({ name, decides }) => [name, decides])).toEqual([['eta', true]]);
    expect(criteria[0]?.value.toFixed(1)).toBe('21.3');
  });

  test('stands beside the criteria of what the tail leaves', () => {
    const both = answer({
      ...CONTRACT_BODY,
      interaction: {
        terms: [{ form: 'coulomb', chargeProduct: 1 }, CONTRACT_BODY.interaction.terms[0]],
      },
    }).validity.criteria;
    const alone = answer(CONTRACT_BODY).validity.criteria;
    expect(both.map(({ name }) => name)).toEqual(['eta', ...alone.map(({ name }) => name)]);
    both.slice(1).forEach(({ value }, i) => expectRelative(value, alone[i]?.value ?? NaN, 1e-12));
  });
});

describe('verdicts', () => {
  const yukawa = (eV: number) => ({ form: 'yukawa', V0: Q(eV, 'eV'), a: Q(1, 'angstrom') });

  test('sound, usable and not valid by the worst number, whatever the sign', () => {
    expect(verdictOf(yukawa(-0.5)).verdict).toBe('sound');
    expect(verdictOf(yukawa(10)).verdict).toBe('usable');
    expect(verdictOf(yukawa(-100)).verdict).toBe('notValid');
  });

  test('one number decides: the largest', () => {
    for (const strength of [0.5, 10, 100]) {
      const { criteria } = verdictOf(yukawa(strength));
      const deciding = criteria.filter(({ decides }) => decides);
      expect(deciding).toHaveLength(1);
      expect(deciding[0]?.value).toBe(Math.max(...criteria.map(({ value }) => value)));
    }
  });

  test('without strength nothing is left out; a contact term is judged by k b', () => {
    expect(verdictOf(yukawa(0))).toMatchObject({ verdict: 'sound' });
    const b = { form: 'contact', b: Q(0.01, 'angstrom') };
    expect(verdictOf(b).criteria.map(({ name }) => name)).toEqual(['unitarity', 'secondOrder']);
    expectRelative(criterion(b, 'unitarity'), K * 0.01, 1e-12);
    expectRelative(criterion(b, 'secondOrder'), K * 0.01, 1e-12);
  });

  test('every criterion says in words what it is', () => {
    for (const { meaning } of verdictOf(yukawa(1)).criteria)
      expect(meaning.length).toBeGreaterThan(40);
  });
});
