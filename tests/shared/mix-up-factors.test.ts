import { expect, test } from 'vitest';
import { slipsOfCase } from '#shared/mix-up-factors.ts';
import { judgeMixUp, usualSlips } from '#shared/mix-ups.ts';

const NEUTRON_ON_HYDROGEN = { massShare: 0.4997, gamma: 1, charge: 1 };
const ELECTRON_ON_CARBON = { massShare: null, gamma: 1.19569, charge: 6 };

function keys(facts: Parameters<typeof slipsOfCase>[0], ratio: number): string[] {
  const judged = judgeMixUp(ratio, 1, slipsOfCase(facts));
  return judged.verdict === 'explained' ? judged.by.map(({ key }) => key) : [judged.verdict];
}

// Bound 82.03 b against free 20.49 b: hydrogen in the tables of neutron cross sections (from memory); 1.4297 is γ² at 100 keV.
test.each([
  ['bound hydrogen', NEUTRON_ON_HYDROGEN, 82.03 / 20.49, 'bound'],
  ['free hydrogen', NEUTRON_ON_HYDROGEN, 20.49 / 82.03, 'bound inverse'],
  ['γ²', ELECTRON_ON_CARBON, 1.4297, 'gamma'],
  ['1/γ²', ELECTRON_ON_CARBON, 1 / 1.4297, 'gamma inverse'],
  ['charge left out', ELECTRON_ON_CARBON, 1 / 36, 'charge inverse'],
  ['per molecule of three', ELECTRON_ON_CARBON, 3, 'count 3'],
])('%s', (_, facts, ratio, key) => {
  expect(keys(facts, ratio)).toEqual([key]);
});

test('what does not apply is not offered', () => {
  const still = { massShare: 0, gamma: 1, charge: null };
  for (const ratio of [1.4297, 36, 4, 1.1]) expect(keys(still, ratio)).toEqual(['unexplained']);
});

test('where several explain a ratio, all are named', () => {
  const slips = [...usualSlips('dcs', 'barn', 1), ...slipsOfCase(NEUTRON_ON_HYDROGEN)];
  const judged = judgeMixUp(4, 1, slips);
  expect(judged.verdict === 'explained' && judged.by.map(({ key }) => key).sort()).toEqual([
    'bound',
    'exchange',
  ]);
});
