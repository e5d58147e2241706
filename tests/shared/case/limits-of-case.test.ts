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
const SHORT = ['isotropic', 'four pi', 'forward'];
const GENERAL = ['strength', ...SHORT];
const ROUND = [...GENERAL, 'mean square radius'];
const FAST_ION: Partial<CaseDocument> = {
  projectile: { nuclide: 'Ar-40' },
  target: { kind: 'nuclide', nuclide: 'Cu-63' },
  energy: Q(20, 'keV'),
};
const ATOMS: Partial<CaseDocument> = { energy: Q(100, 'keV'), kinematics: 'relativistic' };
const ROWS = Array.from({ length: 21 }, (_, i): [number, number] => [
  i / 5,
  -10 / Math.cosh(i / 5),
]);
const table = (tail: string) => ({
  ...{ form: 'tabulated', lengthUnit: 'angstrom', energyUnit: 'eV', points: ROWS, tail },
  original: { name: 'rows.csv', text: 'kept, never computed with' },
});
const formula = (text: string, parameters: Record<string, ReturnType<typeof Q> | number>) => ({
  ...{ form: 'expression', formula: text, parameters },
});
const SLOW_NEUTRONS: Partial<CaseDocument> = {
  projectile: { species: 'neutron' },
  energy: Q(25, 'meV'),
};
const CASES: [string, CaseDocument, string[]][] = [
  ['yukawa', withTerms([{ form: 'yukawa', V0, a }]), ['unscreened', ...ROUND]],
  ['hulthen', withTerms([{ form: 'hulthen', V0, a }]), ['unscreened', ...ROUND]],
  ['gaussian', withTerms([{ form: 'gaussian', V0, W0: Q(-2, 'eV'), a }]), ROUND],
  ['exponential', withTerms([{ form: 'exponential', V0, a }]), ROUND],
  ['squareWell', withTerms([{ form: 'squareWell', V0, R: a }]), ROUND],
  ['deltaShell', withTerms([{ form: 'deltaShell', g: Q(-3, 'eV angstrom'), R: a }]), ROUND],
  [
    'woodsSaxon on a nuclide',
    withTerms([{ ...WELL, a: Q(0.6, 'fm') }], NUCLEAR),
    ['sharp edge', ...ROUND, 'heavy target'],
  ],
  [
    'screenedCoulomb, relativistic',
    withTerms([{ form: 'screenedCoulomb', chargeProduct: -29, a: Q(0.15, 'angstrom') }], COPPER),
    ['unscreened', ...ROUND, 'slow particle'],
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
  [
    'moliere, on the charge of the target',
    withTerms([{ form: 'moliere' }], COPPER),
    ['bare charges', 'exponentials', ...SHORT, 'mean square radius', 'slow particle'],
  ],
  [
    'moliere with a charge of its own',
    withTerms([{ form: 'moliere', Z: 6 }]),
    ['bare charges', 'exponentials', ...SHORT, 'mean square radius'],
  ],
  [
    'krc',
    withTerms([{ form: 'krc', Z1: 18, Z2: 29 }], FAST_ION),
    ['bare charges', 'exponentials', ...SHORT, 'mean square radius'],
  ],
  [
    'universalIon',
    withTerms([{ form: 'universalIon', Z1: 18, Z2: 29 }], FAST_ION),
    ['bare charges', 'exponentials', ...SHORT, 'mean square radius'],
  ],
  ...['C', 'Cs', 'Au'].map((element): [string, CaseDocument, string[]] => [
    `atomicElectron on ${element}, relativistic`,
    withTerms([{ form: 'atomicElectron', element }], ATOMS),
    ['bare nucleus', 'antiparticle', ...SHORT, 'mean square radius', 'slow particle'],
  ]),
  [
    'atomicElectron of positrons',
    withTerms([{ form: 'atomicElectron', element: 'Si' }], {
      projectile: { species: 'positron' },
      energy: Q(1, 'keV'),
    }),
    ['bare nucleus', 'antiparticle', ...SHORT, 'mean square radius'],
  ],
  ['a table', withTerms([table('zero')]), ['similar', ...ROUND]],
  ['a table with an exponential tail', withTerms([table('exponential')]), ['similar', ...ROUND]],
  ['a table with a Coulomb tail', withTerms([table('coulomb')]), ['similar', 'strength']],
  [
    'a formula that dies out',
    withTerms([formula('V0*exp(-(r/a)^2)*(1 - r/a)', { V0, a })]),
    ['similar', ...GENERAL],
  ],
  [
    'a formula with an edge and composed units',
    withTerms([
      formula('r < R ? -c/(r + d) : -c*exp(-m*(r - R))/(R + d)*w', {
        c: Q(12, 'eV angstrom'),
        R: Q(1.5, 'angstrom'),
        d: Q(20, 'pm'),
        m: Q(1.8, '1/angstrom'),
        w: 1,
      }),
    ]),
    ['similar', ...GENERAL],
  ],
  [
    'a formula that falls like a power of r has no range',
    withTerms([formula('V0/(1 + (r/a)^2)^2', { V0, a })]),
    ['similar', 'strength'],
  ],
  [
    'contact by nuclide, on a nucleus that recoils',
    withTerms([{ form: 'contact', nuclide: 'V-51' }], {
      ...SLOW_NEUTRONS,
      target: { kind: 'nuclide', nuclide: 'V-51' },
    }),
    ['bound', 'isotropic', 'four pi'],
  ],
  [
    'contact by element, on a fixed centre',
    withTerms([{ form: 'contact', element: 'Ni' }], SLOW_NEUTRONS),
    ['isotropic', 'four pi'],
  ],
  [
    'a form with nothing to take to a limit',
    withTerms([{ form: 'hardSphere', R: a }], { methods: ['born1'] }),
    [],
  ],
];

function shown({ expected, obtained, within }: Limit) {
  const wanted = readSide(computeEstimate(expected.body), expected);
  const found = readSide(computeEstimate(obtained.body), obtained);
  if (typeof wanted === 'string' || typeof found === 'string') return [wanted, found];
  expect(found.unit).toBe(wanted.unit);
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
