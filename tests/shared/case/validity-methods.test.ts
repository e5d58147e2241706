import { describe, expect, test } from 'vitest';
import type { DifferentialPoint, Estimate, Method } from '#shared/contracts/estimates.ts';
import { planeAxes } from '#src/components/plot-plane.ts';
import { curvesOf } from '#src/features/case/model/curves.ts';
import { without } from '#src/features/case/model/without.ts';
import { amplitudeCurves, amplitudeRows } from '#src/features/case/validity/model/amplitudes.ts';
import { deviationFigures, offBy } from '#src/features/case/validity/model/deviations.ts';
import { referenceOf } from '#src/features/case/validity/model/methods.ts';
import {
  leavesPicture,
  overlayRows,
  ratioPanel,
  ratiosOf,
} from '#src/features/case/validity/model/overlay.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const area = (value: number) => ({ value, unit: 'angstrom2', relativeError: 1e-12 });

function methodOf(points: DifferentialPoint[], elastic = 1) {
  const sigma = area(elastic);
  return {
    differential: points,
    elastic: sigma,
    absorption: area(0),
    total: sigma,
    momentumTransfer: sigma,
    viscosity: sigma,
  };
}

const at = (theta: number, dcs: number | null, re = 0, im = 0): DifferentialPoint => ({
  theta,
  q: theta / 10,
  dcs,
  relativeError: 1e-12,
  amplitude: dcs === null ? null : { re, im },
});

function estimateOf(
  methods: Estimate['methods'],
  validity: Partial<Estimate['validity']> = {},
): Estimate {
  const quantity = { value: 1, unit: 'eV' };
  return {
    engine: { name: 'tallybarn', version: '0' },
    kinematics: {
      k: quantity,
      wavelength: quantity,
      speed: quantity,
      reducedMass: quantity,
      energyCm: quantity,
      beta: 0.1,
    },
    identical: false,
    potential: { unavailable: true, reason: '' },
    methods,
    goldenRule: { unavailable: true, reason: '' },
    validity: { verdict: 'unassessed', basis: 'criteria', criteria: [], ...validity },
    warnings: [],
    units: { length: 'angstrom', area: 'angstrom2', energy: 'eV', angle: 'deg' },
    frame: 'cm',
  };
}

const none = { unavailable: true as const, reason: 'not here' };

describe('what the methods are held against', () => {
  const born = methodOf([at(0, 1)]);
  test.each<[Estimate['methods'], Method | undefined]>([
    [{ born1: born, partialWaves: born }, 'partialWaves'],
    [{ born1: born, born2: born, partialWaves: none }, 'born1'],
    [{ born1: none, eikonal: born, partialWaves: none }, 'eikonal'],
    [{ born1: none }, undefined],
  ])('%#', (methods, expected) => {
    expect(referenceOf(estimateOf(methods))?.method).toBe(expected);
  });
});

describe('ratios', () => {
  const estimate = estimateOf({
    born1: methodOf([at(0, null), at(30, 2), at(60, 3), at(90, 5)]),
    eikonal: methodOf([at(0, 1), at(30, 1), at(60, 1), at(90, 1)]),
    partialWaves: methodOf([at(0, 4), at(30, 4), at(60, 0), at(90, 4)]),
  });
  const curves = curvesOf(estimate, 'angstrom2', { sums: true });
  const ratios = ratiosOf(estimate, curves);

  test('divide every other method by the exact one, and nothing by nothing', () => {
    expect(ratios?.reference).toBe('partialWaves');
    expect(ratios?.curves.map(({ key, values }) => [key, values])).toEqual([
      ['born1', [null, 0.5, null, 1.25]],
      ['eikonal', [0.25, 0.25, null, 0.25]],
    ]);
  });

  test('keep the look of their method, and stand over the abscissa of the curves', () => {
    const panel = ratioPanel(ratios, curves, 'q');
    expect(panel?.series.map(({ style }) => style)).toEqual([0, 3]);
    expect(panel?.series[0]?.points.map(([x]) => x)).toEqual([0, 3, 6, 9]);
    expect(panel?.level).toBe(1);
    expect(panel?.yScale).toBe('linear');
    expect(panel?.y.min).toBeLessThanOrEqual(0.25);
    expect(panel?.y.max).toBeGreaterThanOrEqual(1.25);
  });

  test('stand in the file behind the curves, empty where there is none', () => {
    const units = { angle: 'deg', wavenumber: '1/angstrom', dcs: 'angstrom2/sr', frame: 'cm' };
    const [names, unitRow, ...rows] = overlayRows(curves, ratios, { ...units, frame: 'cm' });
    expect(names?.slice(-2)).toEqual(['ratio first Born to exact', 'ratio eikonal to exact']);
    expect(unitRow?.slice(-2)).toEqual(['1', '1']);
    expect(rows.map((row) => row.at(-2))).toEqual(['', '0.5', '', '1.25']);
    expect(rows.map((row) => row.at(-5))).toEqual(['', '2e-12', '3e-12', '5e-12']);
    for (const row of rows) expect(row).toHaveLength(names?.length ?? 0);
  });

  test('over more than a decade the panel is logarithmic, and a pole is drawn at its edge', () => {
    const wild = estimateOf({
      born1: methodOf([at(30, 1), at(60, 1), at(90, 1)]),
      partialWaves: methodOf([at(30, 1), at(60, 1e-9), at(90, 50)]),
    });
    const own = curvesOf(wild, 'angstrom2', { sums: true });
    const parted = ratiosOf(wild, own);
    expect(parted && leavesPicture(parted)).toBe(true);
    expect(ratios && leavesPicture(ratios)).toBe(false);
    const panel = ratioPanel(parted, own, 'theta');
    expect(panel?.yScale).toBe('log');
    expect(panel?.series[0]?.points.map(([, y]) => y)).toEqual([1, 1000, 0.02]);
  });

  test('with one method alone there is nothing to divide', () => {
    const alone = estimateOf({ born1: methodOf([at(0, 1)]) });
    expect(ratiosOf(alone, curvesOf(alone, 'angstrom2'))).toBeNull();
  });
});

describe('deviations', () => {
  const deviations = {
    largest: 0.48,
    largestAt: 124.3,
    weighted: 0.061,
    elastic: 0.2,
    decides: 'elastic' as const,
    limits: { sound: 0.02, usable: 0.2 },
  };

  test('the elastic total has the sign of the totals where it is their deviation', () => {
    const below = estimateOf(
      { born1: methodOf([], 0.8), partialWaves: methodOf([], 1) },
      { basis: 'exact', deviation: 0.2, deviations },
    );
    const [elastic, weighted, largest] = deviationFigures(below);
    expect(elastic).toMatchObject({ text: '−20.0\u00a0%', decides: true });
    expect(elastic?.detail).toContain('below');
    expect(weighted?.text).toBe('6.10\u00a0%');
    expect(largest).toMatchObject({ text: '48.0\u00a0%', decides: false });
    expect(largest?.detail).toContain('124.3°');
  });

  test('and no sign where a factor of the first-order curve is in the totals and not in the deviation', () => {
    const spin = estimateOf(
      { born1: methodOf([], 0.9), partialWaves: methodOf([], 1) },
      { basis: 'exact', deviation: 0.2, deviations },
    );
    expect(deviationFigures(spin)[0]?.text).toBe('20.0\u00a0%');
  });

  test('a divergent total is said, and the weighted deviation decides', () => {
    const rest = without(deviations, 'elastic');
    const coulomb = estimateOf(
      {},
      { basis: 'exact', deviation: 0.061, deviations: { ...rest, decides: 'weighted' } },
    );
    const [elastic, weighted] = deviationFigures(coulomb);
    expect(elastic).toMatchObject({ text: 'divergent', decides: false });
    expect(weighted?.decides).toBe(true);
    expect(offBy({ divergent: true, reason: '' }, area(1))).toBeNull();
    expectRelative(offBy(area(1.139), area(1)) ?? NaN, 0.139, 1e-12);
  });
});

describe('amplitudes in their plane', () => {
  test('two branches are one walk along the angle of the centre of mass', () => {
    const branch = (thetaCm: number, re: number) => ({
      thetaCm,
      q: 1,
      dcs: 1,
      amplitude: { re, im: 0 },
    });
    const estimate = estimateOf({
      born1: methodOf([
        { theta: 10, dcs: 2, branches: [branch(160, 4), branch(20, 1)] },
        { theta: 14, dcs: 2, branches: [branch(50, 2), branch(120, 3)] },
        { theta: 40, dcs: null, reason: 'outside' },
      ]),
    });
    const [curve] = amplitudeCurves(estimate);
    expect(curve?.points.map(({ theta, f }) => [theta, f?.re])).toEqual([
      [10, 1],
      [14, 2],
      [14, 3],
      [10, 4],
    ]);
    const [names, units, ...rows] = amplitudeRows(amplitudeCurves(estimate), {
      angle: 'deg',
      length: 'angstrom',
      frame: 'lab',
    });
    expect(names).toEqual(['theta', 'theta cm', 'Re f first Born', 'Im f first Born']);
    expect(units).toEqual(['deg (lab)', 'deg', 'angstrom', 'angstrom']);
    expect(rows[3]).toEqual(['10', '160', '4', '0']);
  });

  test('both axes are of one length with ends on ticks, and hold what is drawn and the origin', () => {
    const drawn = [
      [
        [3, 0.2],
        [0.5, 0.4],
      ],
    ] as const;
    const { x, y } = planeAxes({ x: { title: 'Re' }, y: { title: 'Im' } }, drawn, 1, null);
    const span = (axis: typeof x) => (axis.max ?? NaN) - (axis.min ?? NaN);
    expectRelative(span(x), span(y), 1e-12);
    expect(x.interval).toBe(y.interval);
    expect(x.min).toBeLessThanOrEqual(0);
    expect(x.max).toBeGreaterThanOrEqual(3);
    const close = planeAxes({ x: { title: 'Re' }, y: { title: 'Im' } }, drawn, 8, [3, 0.2]);
    expect(span(close.x)).toBeLessThan(span(x) / 4);
    expect(close.x.min).toBeLessThan(3);
    expect(close.x.max).toBeGreaterThan(3);
    expect(close.y.min).toBeLessThan(0.2);
    expect(close.y.max).toBeGreaterThan(0.2);
  });
});
