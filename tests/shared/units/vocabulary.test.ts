import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { convertComposed } from '#shared/units/composed.ts';
import {
  arealMassToInternal,
  fromInternal,
  quantitySchema,
  toInternal,
} from '#shared/units/quantity.ts';
import { DIMENSIONS, INTERNAL_UNITS, UNITS, isUnit, unitsOf } from '#shared/units/vocabulary.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

function refusal(dimension: Parameters<typeof quantitySchema>[0], input: unknown): string {
  const result = quantitySchema(dimension).safeParse(input);
  if (result.success) throw new Error('Nothing was refused.');
  return result.error.issues.map(({ message }) => message).join(' | ');
}

describe('the vocabulary', () => {
  it('has exactly the units of the contract', () => {
    const words = DIMENSIONS.map((dimension) => `${dimension}: ${unitsOf(dimension).join(', ')}`);
    expect(words).toEqual([
      'energy: meV, eV, keV, MeV, GeV, J, hartree',
      'length: angstrom, pm, fm, nm, um, mm, cm, m, bohr',
      'mass: u, eV, keV, MeV, GeV, kg',
      'angle: deg, rad, mrad',
      'solidAngle: sr, msr',
      'area: angstrom2, nm2, fm2, bohr2, barn, millibarn, microbarn, cm2, m2',
      'volume: angstrom3, fm3, bohr3',
      'energyLength: eV angstrom, MeV fm',
      'time: s, ms, us, ns, min, h',
      'rate: 1/s',
      'current: A, mA, uA, nA, pA',
      'density: g/cm3, kg/m3',
      'arealDensity: 1/cm2, 1/m2, 1/angstrom2, ug/cm2, mg/cm2, g/cm2',
      'pressure: Pa, mbar, bar',
      'temperature: K',
    ]);
  });

  it('is case-sensitive and knows no inherited names', () => {
    expect(isUnit('eV', 'energy')).toBe(true);
    expect(isUnit('ev', 'energy')).toBe(false);
    expect(isUnit('toString', 'energy')).toBe(false);
    expect(() => toInternal({ value: 1, unit: 'constructor' }, 'energy')).toThrow(
      /not an energy unit/,
    );
  });

  it('gives the internal unit of each dimension the factor one', () => {
    for (const dimension of DIMENSIONS) {
      expect(UNITS[dimension][INTERNAL_UNITS[dimension]], dimension).toBe(1);
    }
  });

  // Each factor by another way than the table: powers of ten of the prefixes and of lengths, and CODATA 2022 figures.
  it.each([
    ['energy', 'J', 1 / 1.602176634e-19],
    ['energy', 'hartree', 27.211386245981],
    ['length', 'pm', 0.01],
    ['length', 'bohr', 0.529177210544],
    ['mass', 'u', 931494103.72],
    ['mass', 'kg', 5.609588603804452e35],
    ['angle', 'deg', 0.017453292519943295],
    // Check value 9: 1 b = 1e-28 m², 1 angstrom² = 1e8 b, 1 fm² = 10 mb.
    ['area', 'barn', 1e-28 / 1e-20],
    ['area', 'millibarn', 1e-31 / 1e-20],
    ['area', 'microbarn', 1e-34 / 1e-20],
    ['area', 'fm2', 10 * 1e-11],
    ['area', 'bohr2', 0.529177210544 * 0.529177210544],
    ['area', 'm2', 1e20],
    ['volume', 'fm3', 1e-15],
    ['energyLength', 'MeV fm', 1e6 * 1e-5],
    ['time', 'h', 3600],
    ['current', 'nA', 1e-9],
    ['density', 'kg/m3', 1000 / 1e6],
    ['arealDensity', '1/m2', 1e-4],
    ['arealDensity', '1/angstrom2', 1e16],
    ['pressure', 'mbar', 100],
  ] as const)('%s: 1 %s', (dimension, unit, factor) => {
    expectRelative(toInternal({ value: 1, unit }, dimension), factor, 4e-16);
  });

  it('a0² is 2.800285e7 barn and π a0² 0.8797355 angstrom² (check value 9)', () => {
    const area = { value: 1, unit: 'bohr2' };
    expectRelative(fromInternal(toInternal(area, 'area'), 'barn', 'area').value, 2.800285e7, 2e-7);
    expectRelative(Math.PI * toInternal(area, 'area'), 0.8797355, 5e-8);
  });

  it('1 nA of singly charged particles is 6.241509074e9 per second, doubly 3.120754537e9 (check value 8)', () => {
    const charge = toInternal({ value: 1, unit: 'nA' }, 'current') / 1.602176634e-19;
    expectRelative(charge, 6.241509074e9, 1e-10);
    expectRelative(charge / 2, 3.120754537e9, 1e-10);
  });

  it('every unit leads there and back', () => {
    // Below 1e-250 a product with a small factor would lose digits to the bottom of double precision.
    const numbers = fc
      .double({ min: -1e20, max: 1e20, noNaN: true })
      .map((value) => (Math.abs(value) < 1e-250 ? 0 : value));
    for (const dimension of DIMENSIONS) {
      for (const unit of Object.keys(UNITS[dimension])) {
        fc.assert(
          fc.property(numbers, (value) => {
            const back = fromInternal(toInternal({ value, unit }, dimension), unit, dimension);
            expect(Math.abs(back.value - value)).toBeLessThanOrEqual(3e-16 * Math.abs(value));
          }),
          { numRuns: 20 },
        );
      }
    }
  });

  it('keeps areal densities by mass apart, to be divided by a molar mass', () => {
    expectRelative(arealMassToInternal({ value: 20, unit: 'ug/cm2' }), 20e-6, 1e-15);
    expect(() => arealMassToInternal({ value: 1, unit: '1/cm2' })).toThrow(
      /not an areal density by mass/,
    );
    expect(() => toInternal({ value: 1, unit: 'ug/cm2' }, 'arealDensity')).toThrow(
      /needs the formula/,
    );
  });
});

describe('the schema of a quantity', () => {
  it('accepts what the contract shows', () => {
    expect(quantitySchema('energy').parse({ value: 10, unit: 'keV' })).toEqual({
      value: 10,
      unit: 'keV',
    });
    expect(quantitySchema('arealDensity').parse({ value: 2, unit: 'mg/cm2' }).unit).toBe('mg/cm2');
  });

  it('names the likely mend of a slip of case', () => {
    expect(refusal('energy', { value: 1, unit: 'ev' })).toMatch(
      /^`ev` is not an energy unit; did you mean eV\?/,
    );
    expect(refusal('energy', { value: 1, unit: 'mev' })).toContain('did you mean meV or MeV?');
    expect(refusal('length', { value: 1, unit: 'NM' })).toContain(
      '`NM` is not a length unit; did you mean nm?',
    );
  });

  it('says what the unit measures instead, and which are allowed', () => {
    const message = refusal('energy', { value: 1, unit: 'angstrom' });
    expect(message).toContain('it is a unit of length');
    expect(message).toContain('Units of energy: meV, eV, keV, MeV, GeV, J, hartree.');
    expect(refusal('length', { value: 1, unit: 'furlong' })).toContain('Units of length: angstrom');
    expect(refusal('length', { value: 1 })).toContain('Give a unit');
  });

  it.each([
    ['1e400 of JSON', '{"value":1e400,"unit":"eV"}', /too large for a double-precision number/],
    [
      'a number as text',
      '{"value":"10","unit":"eV"}',
      /Give a number, not text: 10 without quotation marks/,
    ],
    ['no value', '{"unit":"eV"}', /Give a number as the value/],
    ['null', '{"value":null,"unit":"eV"}', /Give a number as the value/],
    ['an object', '{"value":{},"unit":"eV"}', /must be a number/],
    ['a plain number', '10', /Give a quantity of energy such as \{"value": 1, "unit": "meV"\}/],
    ['another key', '{"value":1,"unit":"eV","sigma":2}', /remove sigma/],
  ])('refuses %s in words', (_, json, message) => {
    expect(refusal('energy', JSON.parse(json))).toMatch(message);
  });

  it('refuses NaN', () => {
    expect(refusal('energy', { value: NaN, unit: 'eV' })).toContain('finite number');
  });
});

describe('composed units', () => {
  it.each([
    ['angstrom2/sr', 'millibarn/sr', 1e11],
    ['angstrom2/sr', 'barn/sr', 1e8],
    ['barn/sr', 'fm2/sr', 100],
    ['1/(eV sr)', '1/(MeV sr)', 1e6],
    ['eV angstrom3', 'MeV fm3', 1e-6 * 1e15],
    ['1/(angstrom2 s)', '1/(cm2 s)', 1e16],
    ['m/s', 'angstrom/s', 1e10],
    ['1/angstrom', '1/fm', 1e-5],
    ['1/angstrom', '1/nm', 10],
    ['1/(s sr)', '1/(h sr)', 3600],
    ['g/cm3', 'kg/m3', 1000],
    ['angstrom2/sr', 'angstrom2/msr', 1e-3],
  ])('1 %s in %s', (from, to, factor) => {
    expectRelative(convertComposed(1, from, to), factor, 1e-15);
    expectRelative(convertComposed(convertComposed(0.3, from, to), to, from), 0.3, 1e-15);
  });

  it('refuses to turn one kind into another, and what is no unit', () => {
    expect(() => convertComposed(1, 'angstrom2/sr', 'angstrom2')).toThrow(
      /do not measure the same thing/,
    );
    expect(() => convertComposed(1, 'angstrom2/sr', 'furlong2/sr')).toThrow(
      /`furlong2` in `furlong2\/sr` is not a unit/,
    );
    expect(() => convertComposed(1, '1/eV/sr', '1/(eV sr)')).toThrow(/one line/);
    expect(() => convertComposed(1, '1/eV sr', '1/(eV sr)')).toThrow(/one line/);
    expect(() => convertComposed(1, 'eV/', 'eV')).toThrow(/one line/);
  });
});
