import { describe, expect, it } from 'vitest';
import { ENGINE } from '#server/compute/engine-kinds.ts';
import { DEMO_INTERACTIONS } from '#server/db/seeders/demo/library-demo.ts';
import { DEMO_CASES } from '#server/db/seeders/demo/seed-demo.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

/** Notes of worked cases are read as truth: what they say in figures is held against what the engine answers. */

const estimates = new Map<string, Estimate>();
function versionOf(title: string, n: number) {
  const version = DEMO_CASES.find((demo) => demo.title === title)?.versions[n - 1];
  if (!version) throw new Error(`${title}, version ${n}, is not in the demo`);
  return version;
}
function estimateOf(title: string, n = 1): Estimate {
  const key = `${title} ${n}`;
  const known = estimates.get(key) ?? ENGINE.estimate(versionOf(title, n).document);
  estimates.set(key, known);
  return known;
}

function bornOf({ methods: { born1 } }: Estimate) {
  if (!born1 || 'unavailable' in born1) throw new Error('first order is not there');
  return born1;
}
const pointAt = (estimate: Estimate, theta: number) => {
  const point = bornOf(estimate).differential.find((candidate) => candidate.theta === theta);
  if (!point) throw new Error(`no point at ${theta}`);
  return point;
};
/** The example of a version of the library's carbon atom, computed as a case would be. */
function publishedCarbon(n: number): Estimate {
  const { example, terms } = DEMO_INTERACTIONS[0]?.versions[n - 1] ?? {};
  if (!example || !terms) throw new Error(`the carbon atom has no version ${n}`);
  return ENGINE.estimate({ ...example, interaction: { terms }, methods: ['born1'] });
}
const dcs = (theta: number) => (estimate: Estimate) => pointAt(estimate, theta).dcs ?? NaN;
const amplitude = (theta: number) => (estimate: Estimate) =>
  pointAt(estimate, theta).amplitude?.re ?? NaN;
const integral = (name: 'elastic' | 'momentumTransfer') => (estimate: Estimate) => {
  const found = bornOf(estimate)[name];
  return 'divergent' in found ? Infinity : found.value;
};
const elastic = integral('elastic');
const criterion = (name: string) => (estimate: Estimate) =>
  estimate.validity.criteria.find((entry) => entry.name === name)?.value ?? NaN;

const CARBON = 'Carbon film at the top of the gun: Molière against the tabulated atom';
const BACKINGS = 'Backings for the carbon film: aluminium and gold';
const HYDROGEN = 'Electrons of 200 eV on atomic hydrogen: the static field';
const ARGON = 'The polarisation of argon felt by slow electrons';
const COPPER = 'Backscattering of 1 MeV alphas from copper';
const GOLD = '500 keV alphas on gold: the electrons of the atoms';
const PROTONS = 'Protons on hydrogen: identical fermions';
const VANADIUM = 'Vanadium, the standard of the thermal port';
const NICKEL = 'Nickel by element and by isotope';
const NEUTRONS = 'Hydrogen, bound and free';
const MOTT = '1 MeV electrons on aluminium: the spin of the electron';
const CALCIUM = '250 MeV electrons on Ca-40: the shape of its charge';
const FORMULA = 'Electrons on helium: the static field as a formula';
const TABLE = 'Electrons on helium: the static field as a table';
const GAUSSIANS = 'Alphas on helium with a nuclear force in two Gaussians';
const HULTHEN = 'Neutrons on protons in a Hulthén well';
const LIBRARY = 'Electrons on carbon, as the library had it';
const ALPHAS = 'Alphas on helium: an interference first order has wrong';
const SPHERE = 'Fast neutrons on a hard sphere: the shadow';
const WELL = 'Slow neutrons on a well near its first bound state';
const LEAD = '100 MeV neutrons on lead: straight paths with absorption';
const POLARISED = 'Protons polarised by Ca-40';
const SHIFT = 'A shift of alphas on a gold foil, four positions';

function methodOf({ methods }: Estimate, name: 'eikonal' | 'partialWaves') {
  const found = methods[name];
  if (!found || 'unavailable' in found) throw new Error(`${name} is not there`);
  return found;
}
const exactDcs = (theta: number) => (estimate: Estimate) =>
  methodOf(estimate, 'partialWaves').differential.find((point) => point.theta === theta)?.dcs ??
  NaN;
const elasticBy = (name: 'eikonal' | 'partialWaves') => (estimate: Estimate) => {
  const found = methodOf(estimate, name).elastic;
  return 'divergent' in found ? Infinity : found.value;
};
const exactElastic = elasticBy('partialWaves');
const length = (estimate: Estimate) =>
  methodOf(estimate, 'partialWaves').lowEnergy?.scatteringLength?.value ?? NaN;
/** What a run plan of a worked case answers at one of its detectors. */
function planned(title: string, index: number) {
  const { runPlan, ...estimate } = versionOf(title, 1).document;
  if (!runPlan) throw new Error(`${title} has no run plan`);
  const detector = ENGINE.runPlan({ ...runPlan, estimate }).detectors[index];
  if (!detector) throw new Error(`no detector ${index}`);
  return detector;
}
const timeAt = (title: string, index: number) => {
  const { timeForPrecision: time } = planned(title, index);
  return 'unavailable' in time ? Infinity : time.total.value;
};
const strongest = (estimate: Estimate) =>
  methodOf(estimate, 'partialWaves').differential.reduce((best, point) =>
    (point.analysingPower ?? 0) > (best.analysingPower ?? 0) ? point : best,
  );

/** A figure as a note prints it, and the value it stands for. */
const FIGURES: [string, number, string, (estimate: Estimate) => number][] = [
  [CARBON, 1, '6.57', amplitude(0)],
  [CARBON, 2, '0.0642', elastic],
  [CARBON, 2, '0.1003', () => elastic(estimateOf(CARBON, 1))],
  [BACKINGS, 1, '0.204', elastic],
  [BACKINGS, 2, '2.32', elastic],
  [HYDROGEN, 1, '0.484', elastic],
  [ARGON, 2, '55', elastic],
  [ARGON, 2, '0.57', () => elastic(estimateOf(ARGON, 1))],
  [COPPER, 1, '4.392', dcs(170)],
  [COPPER, 1, '18', criterion('eta')],
  [PROTONS, 1, '0.0207', dcs(90)],
  [VANADIUM, 1, '5.10', elastic],
  [NICKEL, 2, '26.06', elastic],
  [NICKEL, 3, '9.51', elastic],
  [NICKEL, 3, '-8.7', (estimate) => -1 * amplitude(90)(estimate)],
  [NEUTRONS, 1, '82.0', elastic],
  [NEUTRONS, 2, '20.5', elastic],
  [MOTT, 1, '1.0903', dcs(90)],
  [MOTT, 1, '1.957', (estimate) => amplitude(90)(estimate) ** 2 / 100],
  [HULTHEN, 1, '0.98', elastic],
  [FORMULA, 1, '0.2709', elastic],
  [GAUSSIANS, 1, '14.9', dcs(90)],
  [LIBRARY, 1, '0.0420', elastic],
  [LIBRARY, 1, '0.0700', () => elastic(publishedCarbon(2))],
  [LIBRARY, 1, '0.0642', () => elastic(estimateOf(CARBON, 2))],
  [ALPHAS, 1, '0.4920', exactDcs(60)],
  [ALPHAS, 1, '0.5898', dcs(60)],
  [ALPHAS, 1, '0.3318', exactDcs(90)],
  [SPHERE, 1, '2.67', (estimate) => (exactElastic(estimate) * 100) / (Math.PI * 25)],
  [WELL, 1, '4.8', (estimate) => exactElastic(estimate) / elastic(estimate)],
  [WELL, 2, '-71.9', length],
  [WELL, 2, '36', (estimate) => length(estimate) / -2],
  [LEAD, 1, '6.7', (estimate) => elastic(estimate) / exactElastic(estimate)],
  [
    LEAD,
    1,
    '5',
    (estimate) => 100 - (100 * elasticBy('eikonal')(estimate)) / exactElastic(estimate),
  ],
  [SHIFT, 1, '1.8', () => timeAt(SHIFT, 0)],
  [SHIFT, 1, '324', () => timeAt(SHIFT, 3)],
  [SHIFT, 1, '32.4', () => planned(SHIFT, 3).trueRate.value],
  [POLARISED, 1, '38.5', (estimate) => strongest(estimate).theta],
  [POLARISED, 1, '1', (estimate) => strongest(estimate).analysingPower ?? NaN],
];

describe('the figures in the notes', () => {
  it.each(FIGURES)('%s, version %i: %s', (title, n, printed, value) => {
    expect(versionOf(title, n).note).toContain(printed);
    const digits = printed.replace('-', '').replace(/^0\./, '').replace('.', '').replace(/^0+/, '');
    const shown = Number(value(estimateOf(title, n)).toPrecision(digits.length));
    expect(shown).toBe(Number(printed));
  });

  it('nothing is said of an interaction without first order but the exact limit', () => {
    const { methods, validity } = estimateOf('A hard sphere under slow neutrons: no first order');
    expect(methods.born1).toMatchObject({ unavailable: true });
    expect(validity.verdict).toBe('unassessed');
    const typed = elastic(estimateOf('Thermal neutrons on bound nickel'));
    expectRelative(4 * Math.PI * 10.3 ** 2, typed * 100, 1e-12);
    expectRelative(typed, 13.3, 3e-3);
  });
});

describe('what the notes say of two curves', () => {
  const ratios = (title: string, one: number, other: number) =>
    bornOf(estimateOf(title, one)).differential.map(({ theta, dcs: value }) => ({
      theta,
      ratio: (value ?? NaN) / dcs(theta)(estimateOf(title, other)),
    }));

  it('the library: one length against the tabulated atom, forward, at 10 degrees and beyond 25', () => {
    const [first, second, table] = [publishedCarbon(1), publishedCarbon(2), estimateOf(CARBON, 2)];
    expectRelative(amplitude(0)(second), amplitude(0)(table), 1e-3);
    expectRelative(amplitude(0)(first) / amplitude(0)(table), 3 / 5, 0.01);
    expectRelative(dcs(10)(second) / dcs(10)(table), 1.4, 0.02);
    for (const version of [first, second]) {
      for (const theta of [26, 90, 180]) {
        expect(Math.abs(dcs(theta)(version) / dcs(theta)(table) - 1)).toBeLessThan(0.12);
      }
    }
  });

  it('Molière and the tabulated atom part in the forward cone', () => {
    const [moliere, table] = [estimateOf(CARBON, 1), estimateOf(CARBON, 2)];
    const transport = integral('momentumTransfer');
    expectRelative(transport(moliere) / transport(table), 1.005, 1e-3);
    expectRelative(amplitude(0)(moliere) / amplitude(0)(table), 2.5, 0.05);
    const beyond = ratios(CARBON, 1, 2).filter(({ theta }) => theta >= 22);
    for (const { ratio } of beyond) expect(Math.abs(ratio - 1)).toBeLessThan(0.04);
    expect(ratios(CARBON, 1, 2)[0]?.ratio).toBeGreaterThan(6);
  });

  it('helium: the formula is its closed form, the printed table is not quite', () => {
    const hartree = (value: number) => ({ value, unit: 'hartree' });
    const a = { value: 1 / 3.375, unit: 'bohr' };
    const terms = [
      { form: 'yukawa', V0: hartree(-6.75), a },
      { form: 'exponential', V0: hartree(-3.375), a },
    ];
    const { document } = versionOf(FORMULA, 1);
    const closed = ENGINE.estimate({ ...document, interaction: { terms } });
    const [formula, table] = [estimateOf(FORMULA), estimateOf(TABLE)];
    // The e² of the formula is typed with eight digits.
    expectRelative(elastic(formula), elastic(closed), 2e-7);
    expectRelative(1 - elastic(table) / elastic(closed), 6e-4, 0.05);
    expectRelative(1 - dcs(180)(table) / dcs(180)(closed), 5e-3, 0.05);
    const last = 0.01 * 1.1 ** 60;
    expectRelative(last, 3.04, 2e-3);
  });

  it('a nuclear force in two Gaussians overdraws a partial wave eightfold', () => {
    const { document, note } = versionOf(GAUSSIANS, 1);
    const charges = ENGINE.estimate({ ...document, interaction: { terms: [{ form: 'coulomb' }] } });
    expectRelative(dcs(90)(charges), 0.053, 0.01);
    expectRelative(criterion('unitarity')(estimateOf(GAUSSIANS)), 8, 0.1);
    expect(note).toContain('0.053');
  });

  it('backings: three and 36 times carbon, one partial wave beyond what comes in', () => {
    const carbon = elastic(estimateOf(CARBON, 2));
    const [aluminium, gold] = [estimateOf(BACKINGS, 1), estimateOf(BACKINGS, 2)];
    expectRelative(elastic(aluminium) / carbon, 3, 0.1);
    expectRelative(elastic(gold) / carbon, 36, 0.01);
    expect(criterion('unitarity')(aluminium)).toBeGreaterThan(1);
    expectRelative(criterion('unitarity')(gold), 7, 0.1);
  });

  it('positrons scatter as electrons do, with the sign of the amplitude turned', () => {
    const positrons = estimateOf('Positrons on carbon: a sign that first order cannot see');
    const electrons = estimateOf(CARBON, 2);
    expect(bornOf(positrons).elastic).toEqual(bornOf(electrons).elastic);
    for (const { theta } of bornOf(positrons).differential) {
      expect(dcs(theta)(positrons)).toBe(dcs(theta)(electrons));
      expect(amplitude(theta)(positrons)).toBe(-amplitude(theta)(electrons));
    }
  });

  it('hydrogen has its closed form', () => {
    const x = 200 / 13.605693122994;
    const closed = (Math.PI * (7 * x ** 2 + 18 * x + 12)) / (3 * (1 + x) ** 3);
    expectRelative(elastic(estimateOf(HYDROGEN)), closed, 1e-10);
    expectRelative(amplitude(0)(estimateOf(HYDROGEN)), 1, 1e-10);
  });

  it('the electrons of the atoms count at small angles alone', () => {
    const { document } = versionOf(GOLD, 1);
    const bare = ENGINE.estimate({ ...document, interaction: { terms: [{ form: 'coulomb' }] } });
    const kept = (theta: number) => dcs(theta)(estimateOf(GOLD)) / dcs(theta)(bare);
    expectRelative(kept(0.01), 0.16, 0.01);
    for (const theta of [1, 10, 90, 170]) expect(Math.abs(kept(theta) - 1)).toBeLessThan(1e-3);
    const lecuyer = (0.049 * 2 * Math.cbrt(79) ** 4) / 500;
    expectRelative(lecuyer, 0.07, 0.06);
  });

  it('recoil and the correction of McKinley and Feshbach change what they say', () => {
    for (const { ratio } of ratios(MOTT, 2, 1)) expect(Math.abs(ratio - 1)).toBeLessThan(1.2e-4);
    const corrected = (theta: number) =>
      dcs(theta)(estimateOf(MOTT, 3)) / dcs(theta)(estimateOf(MOTT, 2));
    expectRelative(corrected(90), 1.1, 0.01);
    expectRelative(corrected(180), 1, 1e-12);
    expectRelative(
      dcs(180)(estimateOf(MOTT)) / (amplitude(180)(estimateOf(MOTT)) ** 2 / 100),
      1 / 9,
      0.04,
    );
  });

  it('minima of the charge of Ca-40 lie where the notes say', () => {
    const extremes = (n: number, sign: 1 | -1) => {
      const points = bornOf(estimateOf(CALCIUM, n)).differential;
      const value = (i: number) => sign * (points[i]?.dcs ?? NaN);
      return points.filter((_, i) => value(i) < value(i - 1) && value(i) < value(i + 1));
    };
    const minima = (n: number) => extremes(n, 1).map(({ theta }) => theta);
    expect(minima(1)).toEqual([46.5, 85.5]);
    expect(minima(2)).toEqual([55, 107.5]);
    const [sharp, diffuse] = [1, 2].map((n) => extremes(n, -1)[0]?.dcs ?? NaN);
    expectRelative((sharp ?? NaN) / (diffuse ?? NaN), 11, 0.05);
    const q = (theta: number) => pointAt(estimateOf(CALCIUM, 1), theta).q ?? NaN;
    expectRelative(q(46.5) * 4.4896, 4.4934094579, 1e-2);
    expectRelative(q(85.5) * 4.4896, 7.7252518369, 1e-2);
  });

  it('the sharp and the diffuse charge have the same rms radius', () => {
    const rms = (density: (r: number) => number) => {
      let [second, fourth] = [0, 0];
      for (let r = 0.0005; r < 25; r += 0.001) {
        second += r ** 2 * density(r);
        fourth += r ** 4 * density(r);
      }
      return Math.sqrt(fourth / second);
    };
    expectRelative(
      rms((r) => (r < 4.4896 ? 1 : 0)),
      3.4776,
      1e-4,
    );
    expectRelative(
      rms((r) => 1 / (1 + Math.exp((r - 3.6318) / 0.55))),
      3.4776,
      1e-4,
    );
  });

  it('the Hulthén well holds the deuteron', () => {
    // lambda = 2 mu |V0| a²/hbar² gives one bound state, kappa = (lambda - 1)/2a.
    const unit = 41.47105958686056;
    const lambda = (79.05 * 0.8559 ** 2) / unit;
    expectRelative(unit * ((lambda - 1) / (2 * 0.8559)) ** 2, 2.224, 1e-3);
  });

  it('and scatters 2.9 barn by its exact s-wave phase', () => {
    const k = estimateOf(HULTHEN).kinematics.k.value;
    // Phase equation: d delta/dr = -(U/k) sin²(kr + delta), by fourth-order Runge-Kutta.
    const slope = (r: number, delta: number) => {
      const U = -79.05 / 41.47105958686056 / Math.expm1(r / 0.8559);
      return -(U / k) * Math.sin(k * r + delta) ** 2;
    };
    const h = 1e-3;
    let delta = 0;
    for (let r = 1e-9; r < 25; r += h) {
      const one = slope(r, delta);
      const two = slope(r + h / 2, delta + (h / 2) * one);
      const three = slope(r + h / 2, delta + (h / 2) * two);
      const four = slope(r + h, delta + h * three);
      delta += (h / 6) * (one + 2 * two + 2 * three + four);
    }
    expectRelative((((4 * Math.PI) / k ** 2) * Math.sin(delta) ** 2) / 100, 2.9, 0.01);
  });
});
