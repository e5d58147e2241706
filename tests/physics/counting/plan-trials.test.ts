import { describe, expect, test } from 'vitest';
import {
  mergeTrials,
  runTrials,
  seedOfPart,
  summaryOf,
} from '#server/physics/counting/statistics/trials.ts';
import { trialModel } from '#server/physics/plan-trials.ts';
import { runPlan } from '#server/physics/run-plan.ts';
import { toPlan } from '#server/modules/run-plans/to-plan.ts';
import { runPlanRequestSchema } from '#shared/contracts/run-plans.ts';
import { refusal } from '#tests/physics/tables/refusal.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { ALPHA_ON_GOLD, Q, SAID, faultsOf, only, plan, thinPlan, valueOf } from './plans.ts';

const planned = (body: object) => runPlan(toPlan(runPlanRequestSchema.parse(body)));
const gold = { formula: 'Au', scatterer: 'Au', arealDensity: Q(20, 'ug/cm2') };
const body = (uncertainties: object, changes: object = {}, detector: object = {}) =>
  thinPlan({ estimate: ALPHA_ON_GOLD, foil: gold, uncertainties, ...changes }, detector);

function drawn(sent: object, trials = 100_000, seed = 3) {
  const result = planned(sent);
  const model = trialModel(result, 0);
  const found = summaryOf(runTrials(model.draw, trials, seed, model.range), 0.95);
  return { ...found, combined: result.detectors[0]?.combined ?? NaN, rate: model.rate };
}

describe('Monte Carlo of a plan', () => {
  test('agrees with its budget where the rate is nearly straight in its inputs', () => {
    const found = drawn(
      body({ current: 0.02, thickness: 0.01, efficiency: 0.015, energy: 0.003, angle: 0.03 }),
    );
    expectRelative(found.deviation, found.combined, 1.2e-2);
    expectRelative(found.mean, 1, 1e-3);
    expectRelative(found.interval[1] - found.interval[0], 2 * 1.96 * found.combined, 2e-2);
  });

  test('and leaves it where the rate bends: the mean of 1/E² with E uncertain by 5 %', () => {
    const found = drawn(body({ energy: 0.05 }));
    // <(1 + ε)^-2> = 1 + 3u² + 15u⁴ + …
    expectRelative(found.mean, 1 + 3 * 0.0025 + 15 * 0.05 ** 4, 1e-3);
    expect(found.deviation).toBeGreaterThan(1.005 * found.combined);
    expect(found.interval[1] - 1).toBeGreaterThan(1.05 * (1 - found.interval[0]));
  });

  test('a rectangular input has a rectangular distribution', () => {
    const kinds = { uncertaintyKinds: { current: { distribution: 'rectangular' } } };
    const { interval } = drawn(body({ current: 0.1 }, kinds));
    expectRelative(interval[1], 1 + 0.95 * 0.1 * Math.sqrt(3), 3e-3);
  });

  test('a thickness that takes away what it gives', () => {
    const thick = { estimate: thinPlan().estimate, foil: { arealDensity: Q(5e15, '1/cm2') } };
    const found = drawn(body({ thickness: 0.02 }, thick));
    expectRelative(found.deviation, found.combined, 2e-2);
    expect(found.combined).toBeLessThan(0.019);
  });

  test('background that is believed wrongly is taken off wrongly', () => {
    const found = drawn(body({ background: 0.2 }, {}, { backgroundRate: Q(1, '1/s') }));
    expectRelative(found.deviation, 0.2 / found.rate, 2e-2);
  });

  test('parts of a run add up to the run, in any division', () => {
    const model = trialModel(planned(body({ current: 0.1 })), 0);
    const part = (n: number) => runTrials(model.draw, 5000, seedOfPart(9, n), model.range);
    const all = mergeTrials([part(0), part(1), part(2), part(3)]);
    const halves = mergeTrials([mergeTrials([part(0), part(1)]), mergeTrials([part(2), part(3)])]);
    expect(all.count).toBe(20_000);
    expectRelative(halves.mean, all.mean, 1e-14);
    expectRelative(halves.square, all.square, 1e-12);
    expect(halves.counts).toEqual(all.counts);
    expect(all.counts.reduce((sum, n) => sum + n, 0)).toBe(20_000);
    expect(new Set(Array.from({ length: 1000 }, (_, n) => seedOfPart(9, n))).size).toBe(1000);
  });

  test('refusals', () => {
    expect(refusal(() => trialModel(planned(thinPlan()), 0))).toMatch(/uncertainties/);
    const near = body({ angle: 2 }, {}, { angle: 8, solidAngle: 1e-3 });
    expect(refusal(() => trialModel(planned(near), 0))).toMatch(/unbounded/);
  });
});

describe('the budget beyond its sum', () => {
  test('coverage: Student with the degrees of freedom of Welch and Satterthwaite, counting among it', () => {
    const few = { uncertaintyKinds: { current: { type: 'A', freedom: 4 } } };
    const one = only(plan(body({ current: 0.05 }, few)));
    const freedom = (0.0025 + 0.0001) ** 2 / (0.05 ** 4 / 4);
    expectRelative(one.expanded.freedom ?? NaN, freedom, 1e-9);
    expect(one.expanded.coverageFactor.toFixed(2)).toBe('2.78');
    expectRelative(
      one.expanded.relative,
      one.expanded.coverageFactor * Math.hypot(0.05, 0.01),
      1e-12,
    );
    expect(one.uncertaintyBudget[0]).toMatchObject({ type: 'A', freedom: 4, shared: true });
    const known = only(plan(body({ current: 0.05 })));
    expect(known.expanded.freedom).toBeNull();
    expect(known.expanded.coverageFactor.toFixed(2)).toBe('1.96');
  });

  test('a monitor takes current, thickness and density away, and brings its own', () => {
    const detectors = [30, 60].map((angle) => ({
      name: `${angle}`,
      angle,
      solidAngle: 1e-3,
      ...SAID,
    }));
    const uncertainties = { current: 0.1, thickness: 0.2, density: 0.05, efficiency: 0.03 };
    const found = plan({ ...body(uncertainties), detectors, monitor: '30' });
    const [monitor, other] = found.detectors;
    expect(monitor?.combinedOfRatio).toBeUndefined();
    expect(other?.combined).toBeGreaterThan(0.2);
    expectRelative(other?.combinedOfRatio ?? NaN, 0.03 * Math.SQRT2, 1e-3);
  });

  test('a monitor that is none, and a kind without its uncertainty, are refused', () => {
    expect(faultsOf(body({}, { monitor: 'M' })).map(({ path }) => path)).toEqual(['/monitor']);
    const kinds = { uncertaintyKinds: { energy: { freedom: 3 } } };
    expect(faultsOf(body({}, kinds)).map(({ path }) => path)).toEqual(['/uncertaintyKinds/energy']);
  });

  test('energy loss makes the energy a shared input of the thickness', () => {
    const thick = { foil: { ...gold, arealDensity: Q(1, 'mg/cm2') } };
    const [line] = only(plan(body({ thickness: 0.05 }, thick))).uncertaintyBudget;
    const rate = (mg: number) =>
      valueOf(only(plan(body({}, { foil: { ...gold, arealDensity: Q(mg, 'mg/cm2') } }))).trueRate);
    const slope = (rate(1.01) - rate(0.99)) / (0.02 * rate(1));
    expectRelative(line?.sensitivity ?? NaN, slope, 1e-2);
  });
});
