import { describe, expect, test } from 'vitest';
import { expectRelative } from '#tests/support/expect-relative.ts';
import type { DifferentialPoint, Estimate } from '#shared/contracts/estimates.ts';
import { massFromSpeed } from '#src/features/case/model/beam-context.ts';
import { curvesCsv } from '#src/features/case/model/csv.ts';
import { abscissaOf, curvesOf } from '#src/features/case/model/curves.ts';
import { texNumber, texUnit } from '#src/features/case/model/tex.ts';

const zero = { value: 0, unit: 'angstrom2', absoluteError: 0 };

function estimateOf(points: DifferentialPoint[], frame: 'cm' | 'lab' = 'cm'): Estimate {
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
    methods: {
      born1: {
        differential: points,
        elastic: zero,
        absorption: zero,
        total: zero,
        momentumTransfer: zero,
        viscosity: zero,
      },
      born2: { unavailable: true, reason: 'later' },
    },
    goldenRule: { unavailable: true, reason: '' },
    validity: { verdict: 'unassessed', basis: 'criteria', criteria: [] },
    warnings: [],
    units: { length: 'angstrom', area: 'angstrom2', energy: 'eV', angle: 'deg' },
    frame,
  };
}

describe('curves', () => {
  test('convert areas and absolute errors, and leave relative errors alone', () => {
    const [curve] = curvesOf(
      estimateOf([
        { theta: 60, q: 2, dcs: 3, relativeError: 1e-12 },
        { theta: 90, q: 2.5, dcs: 0, absoluteError: 1e-20 },
      ]),
      'barn',
    );
    expect(curve?.points[0]).toMatchObject({ dcs: 3 * 1e8, relativeError: 1e-12 });
    expectRelative(curve?.points[1]?.absoluteError ?? NaN, 1e-12, 1e-14);
    expect(curve?.points[1]?.cos).toBe(0);
  });

  test('two branches are two curves beside their sum, whatever order they come in', () => {
    const high = { thetaCm: 150, q: 9, dcs: 2, amplitude: null };
    const low = { thetaCm: 20, q: 1, dcs: 5, amplitude: null };
    const point = { theta: 10, dcs: 7 };
    const curves = curvesOf(
      estimateOf(
        [
          { ...point, branches: [high, low] },
          { ...point, branches: [low, high] },
          { theta: 40, dcs: null, reason: 'outside the cone' },
        ],
        'lab',
      ),
      'angstrom2',
    );
    expect(curves.map(({ points }) => points.map(({ dcs }) => dcs))).toEqual([
      [7, 7, null],
      [5, 5, null],
      [2, 2, null],
    ]);
    expect(curves.map(({ points }) => abscissaOf(points[0]!, 'q'))).toEqual([null, 1, 9]);
    expect(curves[0]?.points[2]?.reason).toBe('outside the cone');
  });
});

test('the file has a row of names, one of units and frames, all digits, and nothing where there is no value', () => {
  const curves = curvesOf(
    estimateOf([
      { theta: 0, q: 0, dcs: null, reason: 'diverges' },
      { theta: 60, q: 5.123167219534328, dcs: 0.009279437 },
    ]),
    'angstrom2',
  );
  const text = curvesCsv(curves, {
    angle: 'deg',
    wavenumber: '1/angstrom',
    dcs: 'angstrom2/sr',
    frame: 'cm',
  });
  expect(text.split('\r\n')).toEqual([
    'theta,q,cos theta,dcs first Born',
    'deg (cm),1/angstrom (cm),1,angstrom2/sr (cm)',
    '0,0,1,',
    `60,5.123167219534328,${Math.cos(Math.PI / 3)},0.009279437`,
    '',
  ]);
});

test('a mass comes back from a speed: 100 eV electrons of 510998.95 eV', () => {
  const mass = 510998.95069;
  const beta = Math.sqrt((2 * 1e6) / mass);
  expect(Math.abs(massFromSpeed(1e6, beta) / mass - 1)).toBeLessThan(1e-15);
});

describe('TeX', () => {
  test.each([
    [0, '0'],
    [100, '100'],
    [-4.612046575, '-4.612'],
    [5.1e-7, '5.1000\\times 10^{-7}'],
    [510998.95, '5.1100\\times 10^{5}'],
  ])('%d', (value, tex) => expect(texNumber(value)).toBe(tex));
  test('units below the line get negative powers', () => {
    expect(texUnit('1/(angstrom2 s)')).toBe('\\text{Å}^{-2}\\,\\text{s}^{-1}');
    expect(texUnit('eV angstrom3')).toBe('\\text{eV}\\,\\text{Å}^{3}');
  });
});
