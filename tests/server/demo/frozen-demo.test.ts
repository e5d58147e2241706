import { describe, expect, it } from 'vitest';
import { ENGINE } from '#server/compute/engine-kinds.ts';
import { DEMO_CASES } from '#server/db/seeders/demo/seed-demo.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { keyDigits, movedDigits } from './key-digits.ts';
import type { KeyDigits } from './key-digits.ts';
import frozen from './frozen-0.1.0.json' with { type: 'json' };

/** Rounding of sin, exp and log may differ between machines. Criteria come from quadratures that are not asked for more. */
const toleranceOf = (name: string): number => (name.startsWith('criterion') ? 1e-8 : 1e-12);

/** What moved on purpose since the records were frozen: the spin of the electron, in wide angles and the integrals alone. */
const MOVED: Record<string, { why: string; figures: string[] }> = {
  '100 keV electrons on carbon, relativistic, version 1': {
    why: 'the Mott factor of relativistic leptons is applied',
    figures: [
      'elastic',
      'total',
      'momentumTransfer',
      'viscosity',
      'dcs at 45',
      'dcs at 90',
      'dcs at 135',
      'dcs at 180',
      'warnings',
    ],
  },
};

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
    const moved = movedDigits(records[name] ?? {}, now, toleranceOf);
    const { figures, why } = MOVED[name] ?? { figures: [], why: 'nothing moved on purpose' };
    expect(
      moved.map((line) => line.split(':')[0]),
      `${why}; now: ${moved.join('; ')}`,
    ).toEqual(figures);
  });

  it('the curve of the electrons moved by the Mott factor and by nothing else', () => {
    const [name = ''] = Object.keys(MOVED);
    const document = versions.find((version) => version.name === name)?.document;
    if (!document) throw new Error(`${name} is not there`);
    const now = keyDigits(ENGINE.estimate(document));
    for (const theta of [45, 90, 135, 180]) {
      const [was, is] = [records[name], now].map((digits) => Number(digits?.[`dcs at ${theta}`]));
      const factor = 1 - Number(now['beta']) ** 2 * Math.sin((theta * Math.PI) / 360) ** 2;
      expectRelative(is ?? NaN, (was ?? NaN) * factor, 1e-12);
    }
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
