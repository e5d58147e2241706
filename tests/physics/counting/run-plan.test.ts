import { describe, expect, test } from 'vitest';
import { generator } from '#server/physics/counting/statistics/generator.ts';
import { answer, born1, dcsAt, integral } from '#tests/physics/observables/bodies.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import {
  ALPHA_ON_GOLD,
  ONE_BARN,
  Q,
  SAID,
  YUKAWA,
  faultsOf,
  only,
  plan,
  thinPlan,
  valueOf,
} from './plans.ts';

function totalOf(answered: ReturnType<typeof plan>): number {
  const { timeForPrecision } = only(answered);
  return 'total' in timeForPrecision ? timeForPrecision.total.value : NaN;
}
const codes = (answered: ReturnType<typeof plan>) => answered.warnings.map(({ code }) => code);

describe('the cross section of a plan', () => {
  test('at the central ray is that of the estimate, in its unit of area', () => {
    const dcs = dcsAt(answer({ ...YUKAWA, angles: { values: [40] } }), 40);
    expectRelative(valueOf(only(plan(thinPlan())).pointDcs), dcs, 1e-12);
    const nm = { ...YUKAWA, units: { area: 'nm2' } };
    const other = only(plan(thinPlan({ estimate: nm }))).pointDcs;
    expect(other?.unit).toBe('nm2/sr');
    expectRelative(valueOf(other), dcs / 100, 1e-12);
  });

  test.each(['partialWaves', 'eikonal', 'born2'] as const)('by %s too', (method) => {
    const estimate = { ...YUKAWA, methods: [method], angles: { values: [40] } };
    const found = answer(estimate).methods[method];
    if (!found || 'unavailable' in found) throw new Error(`${method} did not answer`);
    const one = only(plan(thinPlan({ method })));
    expectRelative(valueOf(one.pointDcs), found.differential[0]?.dcs ?? NaN, 1e-12);
    expect(one.trueRate.value).not.toBe(only(plan(thinPlan())).trueRate.value);
  });

  test('what a method does not allow is refused at its place', () => {
    const bare = { ...ALPHA_ON_GOLD, methods: ['born2'] };
    const foil = { formula: 'CH2', scatterer: 'C', arealDensity: Q(1e-10, 'g/cm2') };
    const alpha = {
      ...bare,
      interaction: { terms: [{ form: 'yukawa', V0: Q(1, 'eV'), a: Q(1, 'pm') }] },
    };
    const other = { scatterer: 'H', estimate: bare, method: 'born2' };
    const sent = thinPlan({ estimate: alpha, foil, method: 'born1', contributions: [other] });
    expect(faultsOf(sent).map(({ path }) => path)).toEqual(['/contributions/0/method']);
  });

  test('both branches of a heavy projectile count', () => {
    const estimate = {
      projectile: { species: 'alpha' },
      target: { kind: 'species', species: 'proton' },
      energy: Q(5, 'MeV'),
      interaction: { terms: [{ form: 'coulomb' }] },
      methods: ['born1'],
      units: { area: 'barn' },
    };
    const lab = answer({ ...estimate, frame: 'lab', angles: { values: [10] } });
    const one = only(plan(thinPlan({ estimate }, { angle: 10, solidAngle: 1e-4 })));
    expectRelative(valueOf(one.pointDcs), dcsAt(lab, 10), 1e-12);
    expect(valueOf(one.averagedDcs)).toBeGreaterThan(0);
  });

  test('outside the cone there is no particle, and the plan says so', () => {
    const estimate = {
      ...ALPHA_ON_GOLD,
      target: { kind: 'species', species: 'proton' },
      interaction: { terms: [{ form: 'coulomb' }] },
    };
    const found = plan(thinPlan({ estimate }, { angle: 40 }));
    const one = only(found);
    expect(one.pointDcs).toBeNull();
    expect(one.trueRate.value).toBe(0);
    expect(one.reason).toMatch(/cone/);
    expect(found.verdict).toBe('notFeasible');
    expect(found.decidedBy.factor).toBe('noSignal');
    expect(found.totalTime).toMatchObject({ unavailable: true });
    expect(codes(found)).toContain('outOfReach');
  });

  test('a divergence inside an acceptance is no rate', () => {
    const found = plan(thinPlan({ estimate: ALPHA_ON_GOLD }, { angle: 2, solidAngle: 0.01 }));
    expect(only(found).averagedDcs).toBeNull();
    expect(only(found).timeForPrecision).toMatchObject({ unavailable: true });
    expect(codes(found)).toContain('divergesInAcceptance');
  });
});

describe('rates', () => {
  test('scale with everything they should', () => {
    const rate = (changes: object, detector: object = {}) =>
      only(plan(thinPlan(changes, detector))).trueRate.value;
    const one = rate({});
    expectRelative(rate({ beam: { particlesPerSecond: Q(2e6, '1/s') } }), 2 * one, 1e-12);
    expectRelative(rate({ foil: { arealDensity: Q(3e13, '1/cm2') } }), 3 * one, 1e-2);
    expectRelative(rate({}, { efficiency: 0.25 }), one / 4, 1e-12);
    expectRelative(rate({}, { solidAngle: 1e-4 }), one / 100, 2e-2);
    expectRelative(rate({}, { angle: -40 }), one, 1e-12);
  });

  test('a tilted foil has 1/cos of its nuclei along the beam', () => {
    const foil = { arealDensity: Q(1e11, '1/cm2') };
    const flat = only(plan(thinPlan({ foil }))).trueRate.value;
    const tilted = only(plan(thinPlan({ foil: { ...foil, tilt: 60 } })));
    expectRelative(tilted.trueRate.value, 2 * flat, 1e-4);
    expectRelative(tilted.factors.find(({ name }) => name === 'slant')?.value ?? NaN, 2, 1e-12);
    const product = tilted.factors.reduce((all, { value }) => all * value, 1e-16);
    expectRelative(valueOf(tilted.product), product, 1e-12);
  });

  test('a mirrored plan with the tilt turned round is the same plan', () => {
    const estimate = { ...YUKAWA, energy: Q(30, 'eV') };
    const rate = (angle: number, tilt: number) =>
      only(plan(thinPlan({ estimate, foil: { arealDensity: Q(2e15, '1/cm2'), tilt } }, { angle })))
        .trueRate.value;
    expectRelative(rate(50, 30), rate(-50, -30), 1e-12);
    expect(rate(50, 30)).toBeGreaterThan(1.01 * rate(50, -30));
  });

  test('a gas: molecules by pressure and temperature, two atoms each', () => {
    const gas = {
      formula: 'N2',
      pressure: Q(10, 'mbar'),
      temperature: Q(293.15, 'K'),
      length: Q(5, 'cm'),
    };
    const found = plan({ ...thinPlan(), foil: undefined, gas });
    expectRelative(found.arealDensity.value, 2 * 2.470739e17 * 5, 2e-7);
    expect(found.scatterer).toBe('N');
  });

  test('energy spread and loss: energies thrown at random, by the estimate itself', () => {
    const energy = 8;
    const spread = 0.4;
    const at = (value: number) => ({ ...ALPHA_ON_GOLD, energy: Q(value, 'MeV') });
    const found = plan(
      thinPlan(
        {
          estimate: at(energy),
          beam: { particlesPerSecond: 1e6, dutyFactor: 1, energySpread: Q(spread, 'MeV') },
          foil: { formula: 'Au', scatterer: 'Au', arealDensity: Q(5, 'mg/cm2') },
        },
        { angle: 90, solidAngle: 1e-6 },
      ),
    );
    const lost = valueOf(found.target.energyLoss) / 1e6;
    expect(lost).toBeGreaterThan(0.8);
    const { normal, uniform } = generator(3);
    let sum = 0;
    let square = 0;
    const trials = 200_000;
    for (let i = 0; i < trials; i++) {
      // Nearly straight: the loss grows by a few per cent along the way.
      const value = (energy / (energy + spread * normal() - lost * uniform())) ** 2;
      sum += value;
      square += value * value;
    }
    const mean = sum / trials;
    const error = Math.sqrt((square / trials - mean * mean) / trials);
    const { energies } = only(found).averaging;
    expect(Math.abs(energies - mean)).toBeLessThan(4 * error + 3e-3);
    expect(codes(found)).toContain('energyLossMatters');
  });

  test('dead time acts on signal and background at the rate while the beam is on', () => {
    const detector = {
      deadTime: Q(2, 'us'),
      deadTimeModel: 'paralysable',
      backgroundRate: Q(500, '1/s'),
    };
    const beam = { particlesPerSecond: 1e12, dutyFactor: 0.1 };
    const one = only(plan(thinPlan({ beam, foil: { arealDensity: Q(1e9, '1/cm2') } }, detector)));
    const instantaneous = (one.trueRate.value + 500) / 0.1;
    expectRelative(one.instantaneousRate.value, instantaneous, 1e-12);
    const observed = 0.1 * instantaneous * Math.exp(-instantaneous * 2e-6);
    expectRelative(one.observedRate.value, observed, 1e-12);
    expectRelative(one.deadTimeFraction, 1 - observed / (one.trueRate.value + 500), 1e-9);
  });

  test('contributions of other elements are background, each with its own number of nuclei', () => {
    const hydrogen = {
      ...YUKAWA,
      interaction: { terms: [{ form: 'yukawa', V0: Q(-2, 'eV'), a: Q(1, 'angstrom') }] },
    };
    const foil = { formula: 'CH2', scatterer: 'C', arealDensity: Q(1e-10, 'g/cm2') };
    const alone = plan(thinPlan({ foil }));
    const both = plan(thinPlan({ foil, contributions: [{ scatterer: 'H', estimate: hydrogen }] }));
    expect(codes(alone)).toContain('otherElements');
    expect(codes(both)).not.toContain('otherElements');
    const [other] = only(both).contributions;
    // Five times weaker and twice as many: 2/25 of the signal.
    expectRelative(valueOf(other?.rate ?? null), (2 / 25) * only(both).trueRate.value, 1e-3);
    expectRelative(only(both).backgroundRate.value, valueOf(other?.rate ?? null), 1e-12);
    expect(totalOf(both)).toBeGreaterThan(totalOf(alone));
  });
});

describe('nuclei', () => {
  const foil = { formula: 'LiF', density: Q(2.635, 'g/cm3'), thickness: Q(1, 'um') };
  const density = (changes: object) =>
    plan(thinPlan({ foil: { ...foil, ...changes } })).arealDensity.value;

  test('an isotope is its share of the element', () => {
    const isotopes = { 'Li-6': 0.95, 'Li-7': 0.05 };
    const six = density({ scatterer: 'Li-6', isotopes });
    expectRelative(six / density({ scatterer: 'Li', isotopes }), 0.95, 1e-12);
    expectRelative(
      density({ scatterer: 'F', isotopes }),
      density({ scatterer: 'Li', isotopes }),
      1e-12,
    );
    // Enriched lithium is lighter, so that a gram holds more of it.
    const molar = 18.998403162 + 0.95 * 6.0151228874 + 0.05 * 7.0160034366;
    expectRelative(six, (0.95 * 2.635e-4 * 6.02214076e23) / molar, 1e-6);
  });

  test('without isotopes the natural share is taken', () => {
    expectRelative(density({ scatterer: 'Li-7' }) / density({ scatterer: 'Li' }), 0.9241, 1e-3);
  });

  test('by number the areal density is that of the scatterers themselves', () => {
    const found = plan(
      thinPlan({ foil: { formula: 'LiF', scatterer: 'F', arealDensity: Q(1e13, '1/cm2') } }),
    );
    expectRelative(found.arealDensity.value, 1e13, 1e-13);
    expect(found.atoms.map(({ name }) => name)).toEqual(['Li', 'F']);
    expectRelative(found.atoms[0]?.arealDensity.value ?? NaN, 1e13, 1e-13);
  });

  test('refusals name their field', () => {
    const paths = (changes: object) => faultsOf(thinPlan(changes)).map(({ path }) => path);
    expect(paths({ foil: { ...foil } })).toEqual(['/foil/scatterer']);
    expect(paths({ foil: { ...foil, scatterer: 'Li', isotopes: { 'Li-6': 0.5 } } })).toEqual([
      '/foil/isotopes',
    ]);
    expect(paths({ foil: { ...foil, scatterer: 'Li', isotopes: { 'C-12': 1 } } })).toEqual([
      '/foil/isotopes/C-12',
    ]);
    expect(paths({ foil: { ...foil, scatterer: 'Li', arealDensity: Q(1, 'mg/cm2') } })).toEqual([
      '/foil/thickness',
    ]);
    expect(
      paths({
        gas: { formula: 'N2', pressure: Q(1, 'bar'), temperature: Q(300, 'K'), length: Q(1, 'm') },
      }),
    ).toEqual(['/gas']);
    expect(paths({ beam: { current: Q(1, 'nA') } })).toEqual(['/beam/chargeState']);
    const neutrons = { ...YUKAWA, projectile: { species: 'neutron' } };
    expect(paths({ estimate: neutrons, beam: { current: Q(1, 'nA'), chargeState: 1 } })).toEqual([
      '/beam/current',
    ]);
    const hard = {
      ...YUKAWA,
      interaction: { terms: [{ form: 'hardSphere', R: Q(1, 'angstrom') }] },
    };
    expect(paths({ estimate: hard })).toEqual(['/method']);
  });
});

describe('what a plan says beside the rates', () => {
  test('n t sigma: a tenth warns, one is not valid, and both are answered', () => {
    const thin = plan(thinPlan());
    const sigma = integral(born1(answer(YUKAWA)).total).value;
    expectRelative(thin.target.collisions, 1e13 * 1e-16 * sigma, 1e-9);
    const at = (collisions: number) =>
      plan(thinPlan({ foil: { arealDensity: Q((collisions / sigma) * 1e16, '1/cm2') } }));
    expect(codes(at(0.09))).not.toContain('multipleScattering');
    expect(codes(at(0.11))).toContain('multipleScattering');
    expect(at(0.9).verdict).not.toBe('singleScatteringNotValid');
    expect(at(1.1).verdict).toBe('singleScatteringNotValid');
    expect(only(at(1.1)).trueRate.value).toBeGreaterThan(0);
  });

  test('where the total diverges it is counted beyond a stated angle', () => {
    const found = plan(
      thinPlan(
        {
          estimate: ALPHA_ON_GOLD,
          foil: { formula: 'Au', scatterer: 'Au', arealDensity: Q(1, 'mg/cm2') },
        },
        { angle: 60 },
      ),
    );
    expectRelative(found.target.collisionsBeyond ?? NaN, 12, 1e-12);
    // π (d/2)² cot²(θ/2) with d = 41.472 fm.
    const sigma = (Math.PI * 20.736 ** 2) / Math.tan(6 * (Math.PI / 180)) ** 2;
    expectRelative(found.target.collisions, 3.057443e18 * sigma * 1e-26, 1e-4);
    expect(codes(found)).toContain('totalBeyondAngle');
  });

  test('a detector in the plane of the foil warns, tilting the foil mends it', () => {
    expect(codes(plan(thinPlan({}, { angle: 90.5 })))).toContain('inPlaneOfFoil');
    expect(codes(plan(thinPlan({}, { angle: 92 })))).not.toContain('inPlaneOfFoil');
    const tilted = { foil: { arealDensity: Q(1e13, '1/cm2'), tilt: 45 } };
    expect(codes(plan(thinPlan(tilted, { angle: 90 })))).not.toContain('inPlaneOfFoil');
    expect(codes(plan(thinPlan(tilted, { angle: 135 })))).toContain('inPlaneOfFoil');
    expect(codes(plan(thinPlan(tilted, { angle: -45 })))).toContain('inPlaneOfFoil');
  });

  test('an offset of 0.1 degrees costs 4.0 % at 10°, 2.0 % at 20° and 1.3 % at 30° (Rutherford)', () => {
    const found = plan({
      ...thinPlan({ estimate: ALPHA_ON_GOLD }),
      detectors: [10, 20, 30].map((angle) => ({
        name: `${angle}`,
        angle,
        solidAngle: 1e-6,
        ...SAID,
      })),
      uncertainties: { angle: 0.1 },
    });
    const percent = found.detectors.map(({ angleSensitivity }) =>
      Number((-10 * (angleSensitivity ?? NaN)).toFixed(1)),
    );
    expect(percent).toEqual([4, 2, 1.3]);
    const [line] = found.detectors[1]?.uncertaintyBudget ?? [];
    expect(line).toMatchObject({ input: 'angle', relativeStandardUncertainty: 0.1 });
    expectRelative(
      line?.contribution ?? NaN,
      0.1 * Math.abs(found.detectors[1]?.angleSensitivity ?? NaN),
      1e-12,
    );
  });

  test('the budget: sensitivities, their sum, and the time past which more beam is useless', () => {
    const uncertainties = {
      current: 0.02,
      thickness: 0.05,
      efficiency: 0.03,
      energy: 0.01,
      background: 0.2,
    };
    const found = plan(
      thinPlan(
        {
          estimate: ALPHA_ON_GOLD,
          foil: { arealDensity: Q(1e16, '1/cm2') },
          beam: { particlesPerSecond: 1e11 },
          uncertainties,
        },
        { backgroundRate: Q(1, '1/s'), solidAngle: 1e-5 },
      ),
    );
    const one = only(found);
    const of = (input: string) => one.uncertaintyBudget.find((line) => line.input === input);
    expectRelative(of('energy')?.sensitivity ?? NaN, -2, 1e-5);
    expect(of('current')?.sensitivity).toBe(1);
    expectRelative(of('background')?.sensitivity ?? NaN, -1 / one.trueRate.value, 1e-9);
    expectRelative(
      one.combined,
      Math.hypot(...one.uncertaintyBudget.map(({ contribution }) => contribution)),
      1e-14,
    );
    expectRelative(one.combinedWithCounting, Math.hypot(one.combined, 0.01), 1e-14);
    expectRelative(valueOf(one.usefulTime), totalOf(found) * (0.01 / one.combined) ** 2, 1e-12);
  });

  test('a thickness that also takes away counts for less', () => {
    const thick = { foil: { arealDensity: Q(5e15, '1/cm2') }, uncertainties: { thickness: 0.05 } };
    const [line] = only(plan(thinPlan(thick))).uncertaintyBudget;
    const rate = (n: number) =>
      only(plan(thinPlan({ foil: { arealDensity: Q(n, '1/cm2') } }))).trueRate.value;
    const slope = (rate(5.05e15) - rate(4.95e15)) / (0.02 * rate(5e15));
    expectRelative(line?.sensitivity ?? NaN, slope, 2e-2);
    expect(slope).toBeLessThan(0.95);
  });

  test('with a beam time: shares of equal precision and what would be needed', () => {
    const detectors = [30, 90].map((angle) => ({
      name: `${angle}`,
      angle,
      solidAngle: 0.001,
      ...SAID,
      backgroundRate: Q(2, '1/s'),
    }));
    const aim = { relativePrecision: 0.02, beamTime: Q(1, 'h') };
    const found = plan({ ...thinPlan({ aim }), detectors });
    const shares = found.equalPrecision;
    if (!shares || 'unavailable' in shares) throw new Error('shares were asked for');
    const all = shares.shares.reduce(
      (sum, { signal, blank }) => sum + signal.value + blank.value,
      0,
    );
    expectRelative(all, 3600, 1e-12);
    const needed = found.detectors[1]?.needed;
    if (!needed || 'unavailable' in needed) throw new Error('a factor was asked for');
    const more = plan({
      ...thinPlan({ aim, beam: { particlesPerSecond: needed.particlesPerSecond.value } }),
      detectors,
    });
    const [, slowest] = more.detectors;
    if (!slowest) throw new Error('two detectors were sent');
    expectRelative(totalOf({ ...more, detectors: [slowest] }), 3600, 1e-9);
  });

  test('nuclear forces: protons of 20 MeV on carbon, but not alpha particles of 5 MeV on gold', () => {
    const carbon = {
      projectile: { species: 'proton' },
      target: { kind: 'nuclide', nuclide: 'C-12' },
      energy: Q(20, 'MeV'),
      interaction: { terms: [{ form: 'coulomb' }] },
      methods: ['born1'],
    };
    expect(codes(plan(thinPlan({ estimate: carbon })))).toContain('nuclearForces');
    const gold = { ...ALPHA_ON_GOLD, target: { kind: 'nuclide', nuclide: 'Au-197' } };
    expect(codes(plan(thinPlan({ estimate: gold })))).not.toContain('nuclearForces');
  });

  test('which elements arrive with which energy: kinematic factors at 170° (Chu, Mayer and Nicolet 1978, as printed)', () => {
    const estimate = { ...ALPHA_ON_GOLD, energy: Q(1, 'MeV'), units: { energy: 'MeV' } };
    const foil = { formula: 'AuCuSiAlOC', scatterer: 'Au', arealDensity: Q(1, 'ug/cm2') };
    const { sameAngle } = only(plan(thinPlan({ estimate, foil }, { angle: 170 })));
    // Printed for average atomic masses, 4.0026 and 12.011; a bare alpha particle is lighter by two electrons.
    const printed = { Au: 0.9225, Cu: 0.7785, Si: 0.5657, Al: 0.5525, O: 0.3625, C: 0.2526 };
    for (const [name, kept] of Object.entries(printed)) {
      const found = sameAngle.find(({ scatterer }) => scatterer === name);
      expectRelative(found?.energy?.value ?? NaN, kept, 1e-3);
    }
    expect(sameAngle.find(({ scatterer }) => scatterer === 'Au')?.separation).toBe(0);
  });

  test('power of the beam: 1 nA of 5.486 MeV alpha particles of charge 1 is 5.5 mW, 1 uA of 3 MeV protons 3 W', () => {
    const power = (changes: object) => plan(thinPlan(changes)).target.beamPower.value;
    expectRelative(
      power({ estimate: ALPHA_ON_GOLD, beam: { current: Q(1, 'nA'), chargeState: 1 } }),
      5.486e-3,
      1e-12,
    );
    const protons = { ...ONE_BARN, energy: Q(3, 'MeV') };
    expectRelative(
      power({ estimate: protons, beam: { current: Q(1, 'uA'), chargeState: 1 } }),
      3,
      1e-12,
    );
  });

  test('a plan where everything is said assumes nothing', () => {
    expect(codes(plan(thinPlan())).filter((code) => code.endsWith('Assumed'))).toEqual([]);
  });

  test('every number of an answer is finite', () => {
    const text = JSON.stringify(plan(thinPlan({ estimate: ALPHA_ON_GOLD })));
    expect(text).not.toMatch(/:null,"unit"/);
    expect(JSON.parse(text)).toEqual(plan(thinPlan({ estimate: ALPHA_ON_GOLD })));
  });
});
