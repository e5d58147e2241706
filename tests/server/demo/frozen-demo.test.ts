import { describe, expect, it } from 'vitest';
import { ENGINE } from '#server/compute/engine-kinds.ts';
import { DEMO_CASES } from '#server/db/seeders/demo/seed-demo.ts';
import { keyDigits, movedDigits } from './key-digits.ts';
import type { KeyDigits } from './key-digits.ts';
import frozen from './frozen-0.1.0.json' with { type: 'json' };

/** Rounding of sin, exp and log may differ between machines. Criteria come from quadratures that are not asked for more. */
const toleranceOf = (name: string): number => (name.startsWith('criterion') ? 1e-8 : 1e-12);

const records: Record<string, KeyDigits> = frozen.records;
const versions = DEMO_CASES.flatMap(({ title, versions }) =>
  versions.map(({ document }, index) => ({ name: `${title}, version ${index + 1}`, document })),
);

describe(`the demo as it was computed by version ${frozen.engine.version}`, () => {
  it('holds the same cases', () => {
    expect(versions.map(({ name }) => name).sort()).toEqual(Object.keys(records).sort());
  });

  it.each(versions)('$name keeps its digits', ({ name, document }) => {
    const now = keyDigits(ENGINE.estimate(document));
    expect(movedDigits(records[name] ?? {}, now, toleranceOf)).toEqual([]);
  });
});

describe('movedDigits', () => {
  it('names what moved and from which digit on', () => {
    const was = { k: 5.12316722, total: 'divergent', zero: 0, gone: 1 };
    const now = { k: 5.12316733, total: 3, zero: 1e-300, new: 2 };
    expect(movedDigits(was, now, () => 1e-9)).toEqual([
      'k: 5.12316722 is now 5.12316733 (moved in digit 8)',
      'total: divergent is now 3',
      'zero: 0 is now 1e-300 (moved in digit 1)',
      'gone: 1 is now absent',
      'new: absent is now 2',
    ]);
    expect(movedDigits({ k: 1 }, { k: 1 + 1e-13 }, () => 1e-12)).toEqual([]);
    expect(movedDigits({ k: 1 }, { k: NaN }, () => 1e-12)).toHaveLength(1);
  });
});
