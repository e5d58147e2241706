import fc from 'fast-check';
import { expect, test } from 'vitest';
import { DomainError } from '#shared/errors.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { estimateSchema } from '#shared/contracts/estimates.ts';
import { Q, answer, born1, errorOf } from './bodies.ts';

/** A number spread evenly over the decades between two powers of ten. */
const decades = (low: number, high: number) =>
  fc.double({ min: low, max: high, noNaN: true }).map((x) => Number((10 ** x).toPrecision(6)));
const signed = (low: number, high: number) =>
  fc.tuple(decades(low, high), fc.boolean()).map(([x, negative]) => (negative ? -x : x));

/** Lengths as multiples of 1/k, strengths in eV: what is drawn covers slow and fast, weak and strong alike. */
const size = decades(-2, 2);
const depth = signed(-3, 4);
const absorbing = decades(-3, 3).map((x) => -x);
const charges = fc.integer({ min: -80, max: 80 });
const term = fc.oneof(
  fc.record({ form: fc.constantFrom('yukawa', 'exponential'), V0: depth, a: size }),
  fc.record({ form: fc.constant('gaussian'), V0: depth, W0: absorbing, a: size }),
  fc.record({ form: fc.constant('squareWell'), V0: depth, R: size }),
  fc.record({ form: fc.constant('woodsSaxon'), V0: depth, W0: absorbing, R: size, a: size }),
  fc.record({ form: fc.constant('screenedCoulomb'), a: size, chargeProduct: charges }),
  fc.record({ form: fc.constant('coulomb'), chargeProduct: charges }),
  fc.record({ form: fc.constant('deltaShell'), g: depth, R: size }),
  fc.record({ form: fc.constant('contact'), b: signed(-6, -3) }),
  fc.record({ form: fc.constant('hulthen'), V0: depth, a: size }),
  fc.record({ form: fc.constant('polarization'), alpha: decades(-3, 3), d: size }),
  fc.record({ form: fc.constant('moliere'), Z: fc.integer({ min: 1, max: 90 }) }),
  fc.record({
    form: fc.constantFrom('krc', 'universalIon'),
    Z1: fc.integer({ min: 1, max: 90 }),
    Z2: fc.integer({ min: 1, max: 90 }),
  }),
  fc.record({
    form: fc.constant('extendedCharge'),
    kind: fc.constantFrom('uniformSphere', 'gaussian', 'dipole'),
    radius: size,
    chargeProduct: charges,
  }),
  fc.record({
    form: fc.constant('extendedCharge'),
    kind: fc.constantFrom('fermi', 'helm'),
    radius: size,
    diffuseness: size,
    chargeProduct: charges,
  }),
  fc.record({ form: fc.constant('atomicElectron'), element: fc.constantFrom('H', 'C', 'Au') }),
  fc.record({
    form: fc.constant('expression'),
    formula: fc.constantFrom(
      'V0*exp(-r/a)/(1 + r/a)',
      'V0*cos(3*r/a)*exp(-(r/a)^2)',
      'r < a ? V0*(1 - r/a) : 0',
      'V0/(1 + (r/a)^2)^3',
      'V0*a/r*(1 - exp(-r/a))',
    ),
    V0: depth,
    a: size,
  }),
  fc.record({
    form: fc.constant('tabulated'),
    tail: fc.constantFrom('zero', 'exponential', 'coulomb'),
    V0: depth,
    a: size,
  }),
);
type Sent = Record<string, string | number>;

/** Twenty rows of a falling potential. */
function rows(V0: number, a: number): [number, number][] {
  return Array.from({ length: 20 }, (_, i) => [(i * a) / 4, V0 * Math.exp(-i / 4)]);
}

const PLAIN = ['chargeProduct', 'Z', 'Z1', 'Z2'];

interface Scale {
  energy: string;
  perEnergy: number;
  length: string;
  perLength: number;
}
const ATOMIC: Scale = { energy: 'eV', perEnergy: 1, length: 'angstrom', perLength: 1 };
const NUCLEAR: Scale = { energy: 'MeV', perEnergy: 1e-6, length: 'fm', perLength: 1e5 };

/** The same term in the units of a scale; `wave` is 1/k in angstrom. */
function write(sent: Sent, wave: number, scale: Scale): Record<string, unknown> {
  const energy = (x: number) => Q(x * scale.perEnergy, scale.energy);
  const length = (x: number) => Q(x * wave * scale.perLength, scale.length);
  if (sent['form'] === 'expression') {
    const { form, formula, V0, a } = sent;
    return { form, formula, parameters: { V0: energy(Number(V0)), a: length(Number(a)) } };
  }
  if (sent['form'] === 'tabulated') {
    const { form, tail, V0, a } = sent;
    const points = rows(energy(Number(V0)).value, length(Number(a)).value);
    return { form, tail, points, lengthUnit: scale.length, energyUnit: scale.energy };
  }
  return Object.fromEntries(
    Object.entries(sent).map(([key, value]): [string, unknown] => {
      if (typeof value === 'string' || PLAIN.includes(key)) return [key, value];
      if (key === 'alpha') {
        const unit = scale === ATOMIC ? 'angstrom3' : 'fm3';
        return [key, Q(value * (wave * scale.perLength) ** 3, unit)];
      }
      if (key === 'g') {
        const unit = scale === ATOMIC ? 'eV angstrom' : 'MeV fm';
        return [key, Q(value * wave * scale.perEnergy * scale.perLength, unit)];
      }
      return [key, key === 'V0' || key === 'W0' ? energy(value) : length(value)];
    }),
  );
}

const MASS: Record<string, number> = {
  electron: 5.11e5,
  positron: 5.11e5,
  'muon-': 1.0566e8,
  proton: 9.3827e8,
  neutron: 9.3957e8,
  alpha: 3.7274e9,
};
const collision = fc.record({
  projectile: fc.constantFrom(...Object.keys(MASS)).map((species) => ({ species })),
  target: fc.constantFrom(
    { kind: 'fixed', charge: 3 },
    { kind: 'nuclide', nuclide: 'C-12' },
    { kind: 'nuclide', nuclide: 'He-4' },
    { kind: 'species', species: 'proton' },
    { kind: 'species', species: 'electron' },
  ),
  energy: decades(-2, 7),
  kinematics: fc.constantFrom('nonrelativistic', 'relativistic'),
  frame: fc.constantFrom('cm', 'lab'),
  terms: fc.array(term, { minLength: 1, maxLength: 3 }),
});
type Collision = typeof collision extends fc.Arbitrary<infer T> ? T : never;

function bodyOf({ energy, terms, ...rest }: Collision, scale: Scale) {
  const wave = 1973.27 / Math.sqrt(2 * (MASS[rest.projectile.species] ?? NaN) * energy);
  return {
    ...rest,
    energy: Q(energy * scale.perEnergy, scale.energy),
    interaction: { terms: terms.map((sent) => write(sent, wave, scale)) },
    methods: ['born1'],
    angles: { from: 0, to: 180, count: 25 },
  };
}

/** The answer, or null where the engine refuses in words. */
function attempt(body: object): Estimate | null {
  try {
    return answer(body);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    expect(['tooMuchWork', 'invalidInput']).toContain(error.code);
    expect(error.message.length).toBeGreaterThan(30);
    return null;
  }
}

function everyNumber(value: unknown, visit: (x: number) => void): void {
  if (typeof value === 'number') visit(value);
  else if (typeof value === 'object' && value !== null) {
    for (const inner of Object.values(value)) everyNumber(inner, visit);
  }
}

const RUNS = { numRuns: 150, seed: 20260101 };

test('whatever is asked, the answer keeps its contract, or refuses', () => {
  let answered = 0;
  fc.assert(
    fc.property(collision, (drawn) => {
      const estimate = attempt(bodyOf(drawn, ATOMIC));
      if (!estimate) return;
      answered += 1;
      estimateSchema.parse(estimate);
      everyNumber(estimate, (x) => expect(Number.isFinite(x)).toBe(true));
      for (const point of born1(estimate).differential) {
        if (point.dcs === null) {
          expect(point.reason?.length).toBeGreaterThan(20);
          expect(drawn.frame === 'lab' || point.theta === 0 || point.theta === 180).toBe(true);
          continue;
        }
        expect(point.reason).toBeUndefined();
        expect(point.dcs).toBeGreaterThanOrEqual(0);
        expect(errorOf(point.dcs, point)).toBeGreaterThanOrEqual(0);
        if (point.relativeError !== undefined) expect(point.relativeError).toBeLessThan(1e-5);
      }
    }),
    RUNS,
  );
  expect(answered).toBeGreaterThan(100);
});

test('the same collision in MeV and fm is the same collision', () => {
  fc.assert(
    fc.property(collision, (drawn) => {
      const one = attempt(bodyOf(drawn, ATOMIC));
      const other = attempt({ ...bodyOf(drawn, NUCLEAR) });
      if (!one || !other) return;
      expect(other.validity.verdict).toBe(one.validity.verdict);
      const forward = Math.max(...born1(one).differential.map(({ dcs }) => dcs ?? 0));
      for (const [i, point] of born1(one).differential.entries()) {
        const twin = born1(other).differential[i];
        expect(twin?.dcs === null).toBe(point.dcs === null);
        if (typeof point.dcs !== 'number' || typeof twin?.dcs !== 'number') continue;
        // The last digit of a typed number is another one in another unit, as an error of q is.
        const allowed = 4 * (errorOf(point.dcs, point) + errorOf(twin.dcs, twin));
        expect(Math.abs(point.dcs - twin.dcs)).toBeLessThanOrEqual(allowed + 1e-28 * forward);
      }
    }),
    RUNS,
  );
});

test('strength scales amplitudes by itself and cross sections by its square', () => {
  const single = fc.record({ V0: signed(-3, 4), a: decades(-2, 1.5), factor: decades(-1, 1) });
  fc.assert(
    fc.property(single, ({ V0, a, factor }) => {
      const body = (strength: number) => ({
        projectile: { species: 'electron' },
        target: { kind: 'fixed', charge: 0 },
        energy: Q(50, 'eV'),
        interaction: {
          terms: [{ form: 'exponential', V0: Q(strength, 'eV'), a: Q(a, 'angstrom') }],
        },
        methods: ['born1'],
        angles: { values: [0, 77] },
      });
      const [one, other] = [answer(body(V0)), answer(body(V0 * factor))];
      for (const [i, point] of born1(one).differential.entries()) {
        const twin = born1(other).differential[i];
        const expected = (point.dcs ?? NaN) * factor ** 2;
        expect(Math.abs((twin?.dcs ?? NaN) / expected - 1)).toBeLessThan(1e-14);
      }
    }),
    { ...RUNS, numRuns: 50 },
  );
});

const well = (R: number) => [{ form: 'squareWell', V0: Q(-1, 'eV'), R: Q(R, 'angstrom') }];
const custom = (eV: number) => ({ species: 'custom', mass: Q(eV, 'eV'), charge: 1, spin: 0 });
test.each([
  ['an energy of 1e25 eV', { energy: Q(1e25, 'eV') }],
  ['an energy of 1e-300 eV', { energy: Q(1e-300, 'eV') }],
  ['a particle of 1e-20 eV', { projectile: custom(1e-20) }],
  ['a particle of 1e30 eV', { projectile: custom(1e30), kinematics: 'relativistic' }],
  [
    'a target of 1e-20 eV',
    { target: { kind: 'custom', mass: Q(1e-20, 'eV'), charge: 1, spin: 0 } },
  ],
  ['a sphere of 1e-12 angstrom', { interaction: { terms: well(1e-12) } }],
  ['a sphere of 100 m', { interaction: { terms: well(1e12) } }],
  ['a sphere of kR = 1e5', { interaction: { terms: well(19_519) } }],
  [
    'a strength of 1e15 eV',
    { interaction: { terms: [{ form: 'yukawa', V0: Q(1e15, 'eV'), a: Q(1, 'm') }] } },
  ],
  ['a box of 1e-100 m', { goldenRule: { boxSide: Q(1e-100, 'm') } }],
  ['a box of 1e200 m', { goldenRule: { boxSide: Q(1e200, 'm') } }],
  [
    'subnormal numbers',
    { energy: Q(5e-324, 'eV'), interaction: { terms: [{ form: 'contact', b: Q(5e-324, 'fm') }] } },
  ],
])('%s is answered with finite numbers or refused in words', (_, extreme) => {
  const estimate = attempt({
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 1 },
    energy: Q(100, 'eV'),
    interaction: { terms: well(1) },
    methods: ['born1'],
    ...extreme,
  });
  everyNumber(estimate, (x) => expect(Number.isFinite(x)).toBe(true));
});
