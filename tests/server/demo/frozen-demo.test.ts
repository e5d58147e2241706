import { describe, expect, it } from 'vitest';
import { ENGINE } from '#server/compute/engine-kinds.ts';
import { DEMO_CASES } from '#server/db/seeders/demo/seed-demo.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { keyDigits, movedDigits } from './key-digits.ts';
import type { KeyDigits } from './key-digits.ts';
import first from './frozen-0.1.0.json' with { type: 'json' };
import second from './frozen-0.2.0.json' with { type: 'json' };
import third from './frozen-0.3.0.json' with { type: 'json' };

/**
 * Rounding of sin, exp and log may differ between machines. Criteria come from quadratures that are not asked for more; what
 * partial waves add up to at a wide angle is small against its terms, whose floor is 1e-11 of the forward value.
 */
const toleranceOf = (name: string): number => {
  if (name.startsWith('criterion')) return 1e-8;
  return /^(born2|eikonal|partialWaves):/.test(name) ? 1e-7 : 1e-12;
};

interface Moved {
  why: string;
  figures: string[];
}
/** What moved on purpose since 0.1.0: the spin of the electron, in wide angles and the integrals alone. */
const SINCE_0_1_0: Record<string, Moved> = {
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
/** What moved on purpose since 0.2.0 was frozen: digits 7 and 8 of a criterion, and what is said of tables. */
const FORWARD: Moved = {
  why: 'the forward value of what a Coulomb tail leaves is exact, not read close by',
  figures: ['criterion secondOrder'],
};
const ABSORPTION: Moved = {
  why: 'a length from the table says what absorption it leaves out',
  figures: ['warnings'],
};
const SINCE_0_2_0: Record<string, Moved> = {
  'Vanadium, the standard of the thermal port, version 1': ABSORPTION,
  'Nickel by element and by isotope, version 1': ABSORPTION,
  'Nickel by element and by isotope, version 2': ABSORPTION,
  'Nickel by element and by isotope, version 3': ABSORPTION,
  'Electrons on helium: the static field as a table, version 1': {
    why: 'a table says what another reading between its rows would change',
    figures: ['warnings'],
  },
  '250 MeV electrons on Ca-40: the shape of its charge, version 1': FORWARD,
  '250 MeV electrons on Ca-40: the shape of its charge, version 2': FORWARD,
};

/** Cautions that later versions know, left out where an older one is compared. */
const KNOWN_SINCE_0_3_0 = ['signUnseen', 'spinlessBeyondFirstOrder'];

function without(codes: readonly string[], digits: KeyDigits): KeyDigits {
  const kept = String(digits['warnings'])
    .split(' ')
    .filter((code) => !codes.includes(code));
  return { ...digits, warnings: kept.join(' ') };
}

interface Frozen {
  version: string;
  records: Record<string, KeyDigits>;
  moved: Record<string, Moved>;
  knownSince: readonly string[];
}
const FROZEN: readonly Frozen[] = [
  {
    version: first.engine.version,
    records: first.records,
    moved: SINCE_0_1_0,
    knownSince: KNOWN_SINCE_0_3_0,
  },
  {
    version: second.engine.version,
    records: second.records,
    moved: SINCE_0_2_0,
    knownSince: KNOWN_SINCE_0_3_0,
  },
  { version: third.engine.version, records: third.records, moved: {}, knownSince: [] },
];
const versions = DEMO_CASES.flatMap(({ title, versions }) =>
  versions.map(({ document }, index) => ({ name: `${title}, version ${index + 1}`, document })),
);

describe.each(FROZEN)(
  'the demo as it was computed by version $version',
  ({ records, moved, knownSince }) => {
    const kept = versions.filter(({ name }) => name in records);

    it('keeps its cases, in their places before those that came later', () => {
      expect(kept.map(({ name }) => name).sort()).toEqual(Object.keys(records).sort());
      expect(versions.slice(0, kept.length)).toEqual(kept);
    });

    it.each(kept)('$name keeps its digits', ({ name, document }) => {
      const now = without(knownSince, keyDigits(ENGINE.estimate(document)));
      const found = movedDigits(records[name] ?? {}, now, toleranceOf);
      const { figures, why } = moved[name] ?? { figures: [], why: 'nothing moved on purpose' };
      expect(
        found.map((line) => line.split(':')[0]),
        `${why}; now: ${found.join('; ')}`,
      ).toEqual(figures);
    });
  },
);

it('every worked case is frozen in the newest file', () => {
  expect(Object.keys(third.records)).toEqual(versions.map(({ name }) => name));
});

it('the curve of the electrons moved by the Mott factor and by nothing else', () => {
  const [name = ''] = Object.keys(SINCE_0_1_0);
  const records: Record<string, KeyDigits> = first.records;
  const document = versions.find((version) => version.name === name)?.document;
  if (!document) throw new Error(`${name} is not there`);
  const now = keyDigits(ENGINE.estimate(document));
  for (const theta of [45, 90, 135, 180]) {
    const [was, is] = [records[name], now].map((digits) => Number(digits?.[`dcs at ${theta}`]));
    const factor = 1 - Number(now['beta']) ** 2 * Math.sin((theta * Math.PI) / 360) ** 2;
    expectRelative(is ?? NaN, (was ?? NaN) * factor, 1e-12);
  }
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
