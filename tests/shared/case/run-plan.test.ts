import { describe, expect, test } from 'vitest';
import { runPlanBodySchema } from '#shared/contracts/run-plans.ts';
import type { RunPlanBody } from '#shared/contracts/run-plans.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import type { Draft } from '#src/features/case/model/editor.ts';
import { stationOf, summarise } from '#src/features/case/model/stations.ts';
import {
  addDetector,
  allLike,
  putIn,
  putInDetector,
  removeDetector,
  startPlan,
  withSeries,
} from '#src/features/case/run-plan/model/plan.ts';
import { isotopesText, readIsotopes } from '#src/features/case/run-plan/model/isotopes.ts';
import { OPENINGS, openingOf, withOpening } from '#src/features/case/run-plan/model/openings.ts';
import { timeText } from '#src/features/case/run-plan/model/numbers.ts';
import { withoutDetectorTexts, withoutTexts } from '#src/features/case/run-plan/model/texts.ts';
import { putKind, putUncertainty } from '#src/features/case/run-plan/model/uncertainties.ts';

const PLAN = startPlan(DEFAULT_DOCUMENT, null);
const WITH_PLAN: CaseDocument = { ...DEFAULT_DOCUMENT, runPlan: PLAN };
const detectorsOf = (plan: RunPlanBody) => plan.detectors.map(({ name, angle }) => [name, angle]);

describe('a plan to begin with', () => {
  test.each([
    [{ species: 'electron' } as const, -1],
    [{ species: 'alpha' } as const, 2],
    [{ nuclide: 'C-12' } as const, 6],
  ])('%o comes as a current of its charge', (projectile, charge) => {
    const { beam } = startPlan({ ...DEFAULT_DOCUMENT, projectile }, null);
    expect(beam).toEqual({ current: { value: 1, unit: 'nA' }, chargeState: charge });
  });

  test('what has no charge comes as a rate', () => {
    const { beam } = startPlan({ ...DEFAULT_DOCUMENT, projectile: { species: 'neutron' } }, null);
    expect(beam).toEqual({ particlesPerSecond: 1e6 });
  });

  test.each([
    [{ value: 8.17, unit: 'angstrom2' }, 1e-16],
    [{ value: 1, unit: 'barn' }, 1e-24],
    [{ value: 1e9, unit: 'angstrom2' }, 1e-16],
  ])(
    'a total of %o makes the first target thin: collisions between 0.001 and 0.01',
    (total, cm2) => {
      const { foil } = startPlan(DEFAULT_DOCUMENT, total);
      const collisions = (foil?.arealDensity?.value ?? NaN) * total.value * cm2;
      expect(collisions).toBeLessThanOrEqual(0.01 * (1 + 1e-12));
      const thin = total.unit === 'barn' ? 1e-5 : 0.001 * (1 - 1e-12);
      expect(collisions).toBeGreaterThan(thin);
    },
  );

  test('is what the contract takes', () => {
    expect(runPlanBodySchema.parse(PLAN)).toEqual(PLAN);
  });
});

describe('detectors', () => {
  const three = withSeries(PLAN, { from: 20, to: 60, step: 20 });

  test('a series stands at even steps, its last angle among them', () => {
    expect(detectorsOf(three)).toEqual([
      ['D1', 20],
      ['D2', 40],
      ['D3', 60],
    ]);
    // 0.1 is no binary fraction: ten steps of it reach 1 all the same.
    const fine = withSeries(PLAN, { from: 0, to: 1, step: 0.1 });
    expect(fine.detectors.map(({ angle }) => angle)).toEqual([
      0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1,
    ]);
  });

  test('one more never takes a name that is there, nor an angle beyond 180°', () => {
    const gap = removeDetector(three, 0);
    const more = addDetector(addDetector(gap));
    expect(new Set(more.detectors.map(({ name }) => name)).size).toBe(4);
    const far = withSeries(PLAN, { from: 175, to: 175, step: 1 });
    expect(addDetector(far).detectors.at(-1)?.angle).toBe(180);
  });

  test('a monitor that goes is a monitor no more; another stays', () => {
    const watched: RunPlanBody = { ...three, monitor: 'D2' };
    expect(removeDetector(watched, 1)).not.toHaveProperty('monitor');
    expect(removeDetector(watched, 0).monitor).toBe('D2');
    expect(withSeries(watched, { from: 10, to: 10, step: 1 })).not.toHaveProperty('monitor');
  });

  test('all like one keep their names and angles', () => {
    const [first, ...rest] = three.detectors;
    if (!first) expect.fail('The series has a first detector.');
    const changed = { ...three, detectors: [{ ...first, efficiency: 0.5 }, ...rest] };
    const same = allLike(changed, 0);
    expect(detectorsOf(same)).toEqual(detectorsOf(three));
    expect(same.detectors.map(({ efficiency }) => efficiency)).toEqual([0.5, 0.5, 0.5]);
  });

  test('a value is put in its own detector and taken out again', () => {
    const document = { ...WITH_PLAN, runPlan: three };
    const put = putInDetector(1, 'efficiency')(document, 0.9);
    expect(put.runPlan?.detectors.map(({ efficiency }) => efficiency)).toEqual([
      undefined,
      0.9,
      undefined,
    ]);
    expect(putInDetector(1, 'efficiency')(put, undefined).runPlan).toEqual(three);
  });
});

describe('openings', () => {
  const [detector] = PLAN.detectors;
  if (!detector) throw new Error('A plan to begin with has a detector.');
  const far = { ...detector, distance: { value: 2, unit: 'm' }, efficiency: 0.5 };

  test.each(OPENINGS)('%s: known by its sides, a distance is kept, the counter stays', (kind) => {
    const changed = withOpening(far, kind);
    expect(openingOf(changed)).toBe(kind);
    expect(changed.efficiency).toBe(0.5);
    expect(changed.distance).toEqual(kind === 'solidAngle' ? undefined : far.distance);
    expect(runPlanBodySchema.safeParse({ ...PLAN, detectors: [changed] }).success).toBe(true);
  });

  test('there and back leaves no side of another kind', () => {
    const back = withOpening(withOpening(withOpening(far, 'annular'), 'rectangle'), 'round');
    expect(Object.keys(back).sort()).toEqual(Object.keys(far).sort());
  });
});

describe('texts follow their fields', () => {
  const draft: Draft = {
    title: 'A',
    tags: [],
    document: {
      ...WITH_PLAN,
      entered: {
        '/energy': '100 eV',
        '/runPlan/detectors/0/distance': '10 cm',
        '/runPlan/detectors/2/distance': '30 cm',
      },
    },
    open: {
      '/runPlan/detectors/1/efficiency': { text: '2', problem: 'too much' },
      '/runPlan/detectors/2/efficiency': { text: '3', problem: 'too much' },
      '/runPlan/foil/thickness': { text: 'x', problem: 'no number' },
    },
  };

  test('those behind a removed detector move up, its own go', () => {
    const { document, open } = withoutDetectorTexts(draft, 1);
    expect(document.entered).toEqual({
      '/energy': '100 eV',
      '/runPlan/detectors/0/distance': '10 cm',
      '/runPlan/detectors/1/distance': '30 cm',
    });
    expect(Object.keys(open).sort()).toEqual([
      '/runPlan/detectors/1/efficiency',
      '/runPlan/foil/thickness',
    ]);
    expect(open['/runPlan/detectors/1/efficiency']?.text).toBe('3');
  });

  test('a plan that is left out leaves no fault behind', () => {
    const { document, open } = withoutTexts(draft, /^\/runPlan(\/|$)/);
    expect(open).toEqual({});
    expect(document.entered).toEqual({ '/energy': '100 eV' });
  });
});

describe('members that may be empty', () => {
  test('an aim or an uncertainty taken back leaves no empty member', () => {
    const aimed = putIn('aim', 'relativePrecision')(WITH_PLAN, undefined);
    expect(aimed.runPlan).not.toHaveProperty('aim');
    const known = putUncertainty('current')(WITH_PLAN, 0.02);
    const typed = putKind('current', 'type')(known, 'A');
    expect(typed.runPlan?.uncertaintyKinds).toEqual({ current: { type: 'A' } });
    expect(runPlanBodySchema.safeParse(typed.runPlan).success).toBe(true);
    expect(putUncertainty('current')(typed, undefined).runPlan).toEqual(PLAN);
  });
});

describe('isotopes', () => {
  test('are read as a list, fractions or per cent, and written back as they are read', () => {
    const reading = readIsotopes('li6 0.95; 7Li 5 %');
    expect(reading).toEqual({ value: { 'Li-6': 0.95, 'Li-7': 0.05 } });
    expect(readIsotopes(isotopesText({ 'Li-6': 0.95, 'Li-7': 0.05 }))).toEqual(reading);
    expect(readIsotopes('  ')).toEqual({ value: undefined });
  });

  test.each(['Li-6', 'Li-6 much', 'Li-6 1.2', 'Li-6 0.5, Li-6 0.5', '6 0.5'])(
    '`%s` is refused in words',
    (text) => {
      expect(readIsotopes(text)).toHaveProperty('problem');
    },
  );
});

describe('on the beam line', () => {
  test('a fault of the plan belongs to the station it is about', () => {
    expect(stationOf('/runPlan/beam/current')).toBe('beam');
    expect(stationOf('/runPlan/foil/thickness')).toBe('target');
    expect(stationOf('/runPlan/detectors/3/efficiency')).toBe('detectors');
  });

  test('the detectors of the plan are said beside the angles of the table', () => {
    const one = summarise(WITH_PLAN, [], undefined).detectors.detail;
    expect(one).toBe('centre of mass · run: D1 at 30°');
    const plan = withSeries(PLAN, { from: -20, to: 40, step: 20 });
    const many = summarise({ ...WITH_PLAN, runPlan: plan }, [], undefined).detectors.detail;
    expect(many).toBe('centre of mass · run: 4 detectors, −20° to 40°');
  });
});

test.each([
  [1.5e-4, '1.50 × 10⁻⁴\u00a0s'],
  [119, '119\u00a0s'],
  [120, '2.00\u00a0min'],
  [7200, '2.00\u00a0h'],
  [3 * 86_400, '3.00\u00a0d'],
])('%d seconds are planned as %s', (seconds, text) => {
  expect(timeText(seconds)).toBe(text);
});
