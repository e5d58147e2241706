import { describe, expect, test } from 'vitest';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { estimateRequestSchema } from '#shared/contracts/estimates.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';
import { chainRows } from '#src/features/case/aids/model/chain-rows.ts';
import { kinematicsLines, kinematicsRows } from '#src/features/case/aids/model/kinematics-rows.ts';
import { potentialPicture, potentialRows } from '#src/features/case/aids/model/potential-export.ts';
import { ratioRows, ratioSeries } from '#src/features/case/aids/model/ratio.ts';
import { curvesOf } from '#src/features/case/model/curves.ts';

const Q = (value: number, unit: string) => ({ value, unit });
const answer = (body: object): Estimate => computeEstimate(estimateRequestSchema.parse(body));

const ALPHA = {
  projectile: { species: 'alpha' },
  target: { kind: 'species', species: 'proton' },
  energy: Q(1, 'MeV'),
  interaction: { terms: [{ form: 'screenedCoulomb', a: Q(0.1, 'angstrom') }] },
  methods: ['born1'],
  angles: { values: [10, 20] },
  frame: 'lab',
  units: { length: 'fm', area: 'barn', energy: 'MeV' },
};
const WELL = {
  projectile: { species: 'neutron' },
  target: { kind: 'fixed', charge: 0 },
  energy: Q(14, 'MeV'),
  interaction: {
    terms: [{ form: 'squareWell', V0: Q(-40, 'MeV'), W0: Q(-5, 'MeV'), R: Q(4, 'fm') }],
  },
  methods: ['born1'],
  units: { length: 'fm', area: 'barn', energy: 'MeV' },
};

describe('kinematics', () => {
  const table = answer({ ...ALPHA, aids: { kinematics: true } }).aids?.kinematics;
  if (!table) throw new Error('no table');
  test('two branches are two lines, the smaller angle first, and an angle out of reach keeps its line', () => {
    expect(kinematicsLines(table).map(({ theta, way }) => [theta, way !== null])).toEqual([
      [10, true],
      [10, true],
      [20, false],
    ]);
    const rows = kinematicsRows(table);
    expect(rows[0]?.[0]).toBe('asked angle');
    expect(rows[1]?.slice(0, 4)).toEqual(['deg', 'deg', 'deg', 'deg']);
    expectRelative(Number(rows[2]?.[1]), 53.61703, 2e-6);
    expectRelative(Number(rows[3]?.[1]), 146.38297, 2e-6);
    expect(rows[4]).toEqual(['20', '', '', '', '', '', '', '']);
  });
  test('a fixed centre has no columns of a partner', () => {
    const fixed = answer({ ...WELL, aids: { kinematics: true } }).aids?.kinematics;
    expect(fixed && kinematicsRows(fixed)[0]).toEqual([
      'asked angle',
      'theta cm',
      'theta lab',
      'projectile energy',
      'K',
      'dOmega cm per dOmega lab',
    ]);
  });
});

test('the ratio: both cross sections in the unit shown, and their quotient', () => {
  const estimate = answer({ ...ALPHA, frame: 'cm', aids: { reference: true } });
  const reference = estimate.aids?.reference;
  const [curve] = curvesOf(estimate, 'fm2');
  if (!curve || !reference || 'unavailable' in reference) throw new Error('no ratio');
  const rows = ratioRows(curve, reference, {
    angle: 'deg',
    wavenumber: '1/fm',
    dcs: 'fm2/sr',
    frame: 'cm',
  });
  expect(rows[1]).toEqual(['deg (cm)', '1/fm (cm)', 'fm2/sr (cm)', 'fm2/sr (cm)', '1']);
  for (const row of rows.slice(2)) {
    expectRelative(Number(row[2]) / Number(row[3]), Number(row[4]), 1e-14);
  }
  expect(ratioSeries(curve, reference, 'q')[0]?.[1]).toBe(Number(rows[2]?.[4]));
});

test('V(r): every point with both parts and units, and a picture of the same', () => {
  const { potential } = answer(WELL);
  if ('unavailable' in potential) throw new Error('no V(r)');
  const rows = potentialRows(potential);
  expect(rows.slice(0, 2)).toEqual([
    ['r', 'Re V', 'Im V'],
    ['fm', 'MeV', 'MeV'],
  ]);
  expect(rows).toHaveLength(potential.r.length + 2);
  expect(rows[2]?.slice(1)).toEqual(['-40', '-5']);
  const picture = potentialPicture(potential);
  expect(picture.series.map(({ name }) => name)).toEqual(['Re V(r)', 'Im V(r)']);
  expect(picture.x.title).toBe('r (fm)');
});

test('the golden-rule sheet: every line of the chain, whose last follows from the others', () => {
  const estimate = answer({ ...WELL, goldenRule: { theta: 60, boxSide: Q(1, 'pm') } });
  const rule = estimate.goldenRule;
  if ('unavailable' in rule) throw new Error('no sheet');
  const rows = chainRows(rule, estimate);
  const value = (name: string) => Number(rows.find(([what]) => what?.startsWith(name))?.[1]);
  expectRelative(
    value('Transition rate') / value('Incoming flux'),
    value('Differential cross section'),
    1e-13,
  );
  expect(rows.every((row) => row.length === 5)).toBe(true);
  expect(rows.find(([what]) => what?.startsWith('Matrix element'))?.[2]).not.toBe('');
});
