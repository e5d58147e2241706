import { describe, expect, test } from 'vitest';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import { limitsOf } from '#src/features/case/aids/model/limits-of-case.ts';
import { judgeSides, readSide } from '#src/features/case/aids/model/limit-sides.ts';
import type { Limit } from '#src/features/case/aids/model/limit-sides.ts';

const Q = (value: number, unit: string) => ({ value, unit });
type Terms = CaseDocument['interaction']['terms'];
const withTerms = (terms: Terms, change: Partial<CaseDocument> = {}): CaseDocument => ({
  ...DEFAULT_DOCUMENT,
  interaction: { terms },
  goldenRule: {},
  ...change,
});

const V0 = Q(-10, 'eV');
const a = Q(1, 'angstrom');
const NUCLEAR: Partial<CaseDocument> = {
  projectile: { species: 'neutron' },
  target: { kind: 'nuclide', nuclide: 'Ca-40' },
  energy: Q(14, 'MeV'),
  units: { length: 'fm', area: 'barn', energy: 'MeV' },
};
const PROTONS: Partial<CaseDocument> = {
  projectile: { species: 'proton' },
  target: { kind: 'species', species: 'proton' },
};
const COPPER: Partial<CaseDocument> = {
  energy: Q(100, 'keV'),
  kinematics: 'relativistic',
  target: { kind: 'fixed', charge: 29 },
};
const LEAD: Partial<CaseDocument> = {
  energy: Q(200, 'MeV'),
  kinematics: 'relativistic',
  target: { kind: 'fixed', charge: 82 },
};
const WELL = { form: 'woodsSaxon', V0: Q(-50, 'MeV'), W0: Q(-8, 'MeV'), R: Q(4.3, 'fm') };
const FERMI = { form: 'extendedCharge', kind: 'fermi', radius: Q(6.6, 'fm') };
const GENERAL = ['strength', 'isotropic', 'four pi', 'forward'];
const CASES: [string, CaseDocument, string[]][] = [
  ['yukawa', withTerms([{ form: 'yukawa', V0, a }]), ['unscreened', ...GENERAL]],
  ['hulthen', withTerms([{ form: 'hulthen', V0, a }]), ['unscreened', ...GENERAL]],
  ['gaussian', withTerms([{ form: 'gaussian', V0, W0: Q(-2, 'eV'), a }]), GENERAL],
  ['exponential', withTerms([{ form: 'exponential', V0, a }]), GENERAL],
  ['squareWell', withTerms([{ form: 'squareWell', V0, R: a }]), GENERAL],
  ['deltaShell', withTerms([{ form: 'deltaShell', g: Q(-3, 'eV angstrom'), R: a }]), GENERAL],
  [
    'woodsSaxon on a nuclide',
    withTerms([{ ...WELL, a: Q(0.6, 'fm') }], NUCLEAR),
    ['sharp edge', ...GENERAL, 'heavy target'],
  ],
  [
    'screenedCoulomb, relativistic',
    withTerms([{ form: 'screenedCoulomb', chargeProduct: -29, a: Q(0.15, 'angstrom') }], COPPER),
    ['unscreened', ...GENERAL, 'slow particle'],
  ],
  [
    'coulomb of alpha particles',
    withTerms([{ form: 'coulomb' }], {
      projectile: { species: 'alpha' },
      target: { kind: 'nuclide', nuclide: 'Au-197' },
      energy: Q(5.486, 'MeV'),
    }),
    ['energy'],
  ],
  [
    'extendedCharge',
    withTerms([{ ...FERMI, diffuseness: Q(0.535, 'fm') }], LEAD),
    ['point charge', 'slow particle'],
  ],
  [
    'contact',
    withTerms([{ form: 'contact', b: Q(6.6, 'fm') }], NUCLEAR),
    ['strength', 'isotropic', 'four pi'],
  ],
  [
    'a sum, on identical particles',
    withTerms(
      [
        { form: 'yukawa', V0, a },
        { form: 'gaussian', V0, a },
      ],
      PROTONS,
    ),
    [...GENERAL, 'heavy target', 'symmetric'],
  ],
  ['a form with nothing to take to a limit', withTerms([{ form: 'moliere', Z: 6 }]), []],
];

function shown({ expected, obtained, within }: Limit) {
  const wanted = readSide(computeEstimate(expected.body), expected);
  const found = readSide(computeEstimate(obtained.body), obtained);
  if (typeof wanted === 'string' || typeof found === 'string') return [wanted, found];
  return judgeSides(wanted, found, within);
}

describe('the limits of a case', () => {
  test.each(CASES)('%s: those that apply, and each of them holds', (_, document, keys) => {
    const limits = limitsOf(document, computeEstimate(document));
    expect(limits.map(({ key }) => key)).toEqual(keys);
    for (const limit of limits) {
      expect([limit.key, shown(limit)]).toMatchObject([limit.key, { verdict: 'holds' }]);
      // A bound that lets a per cent pass would show nothing.
      expect(limit.within).toBeLessThan(1e-3);
    }
  });

  test.each(CASES)('%s: a tenth of a per cent off is seen', (_, document) => {
    for (const limit of limitsOf(document, computeEstimate(document))) {
      const off = {
        ...limit,
        expected: { ...limit.expected, factor: limit.expected.factor * 1.001 },
      };
      expect([limit.key, shown(off)]).toMatchObject([limit.key, { verdict: 'departs' }]);
    }
  });

  test('where there is no number the reason is handed on', () => {
    const body = withTerms([{ form: 'coulomb', chargeProduct: -1 }]);
    const reading = readSide(computeEstimate(body), { body, read: 'elastic', factor: 1 });
    expect(reading).toEqual(expect.stringMatching(/Coulomb|grows|diverg|without/i));
  });
});

describe('what is judged', () => {
  const reading = (value: number, error = 0) => ({ value, error, unit: 'barn' });
  test('counts stated errors as allowed', () => {
    expect(judgeSides(reading(1), reading(1.01), 0)?.verdict).toBe('departs');
    expect(judgeSides(reading(1), reading(1.01, 0.02), 0)?.verdict).toBe('holds');
    expect(judgeSides(reading(1), reading(1.01), 0.02)?.verdict).toBe('holds');
  });
  test('NaN never holds, and zero is no measure', () => {
    expect(judgeSides(reading(1), reading(NaN), 1)?.verdict).toBe('departs');
    expect(judgeSides(reading(0), reading(0), 1)).toBeNull();
  });
});
