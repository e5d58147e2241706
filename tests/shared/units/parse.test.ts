import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseQuantity, requireQuantity } from '#shared/units/parse.ts';
import type { ParseContext } from '#shared/units/parse.ts';
import { energyFromWavelength } from '#shared/units/de-broglie.ts';
import { DIMENSIONS, UNITS } from '#shared/units/vocabulary.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const NEUTRON = 939565421.94;

function read(text: string, dimension: Dimension = 'energy', context?: ParseContext) {
  const parsed = parseQuantity(text, dimension, context);
  if (!parsed.ok) throw new Error(`Refused: ${parsed.message}`);
  return parsed;
}

function refused(text: string, dimension: Dimension = 'energy', context?: ParseContext): string {
  const parsed = parseQuantity(text, dimension, context);
  if (parsed.ok) throw new Error(`Read as ${JSON.stringify(parsed.quantity)}`);
  return parsed.message;
}

describe('typed quantities', () => {
  it.each([
    ['10 keV', 10, 'keV'],
    ['1e4 eV', 1e4, 'eV'],
    ['10keV', 10, 'keV'],
    ['  10   keV ', 10, 'keV'],
    ['1.5E-3 MeV', 1.5e-3, 'MeV'],
    ['-10 eV', -10, 'eV'],
    ['−10 eV', -10, 'eV'],
    ['+3 eV', 3, 'eV'],
    ['.5 eV', 0.5, 'eV'],
    ['5. eV', 5, 'eV'],
    ['2×10⁴ eV', 2e4, 'eV'],
    ['2 x 10^4 eV', 2e4, 'eV'],
    ['2·10⁻³ eV', 2e-3, 'eV'],
    ['10⁴ eV', 1e4, 'eV'],
    ['10^-3 eV', 1e-3, 'eV'],
    ['2 Ha', 2, 'hartree'],
  ])('%s', (text, value, unit) => {
    expect(read(text)).toEqual({ ok: true, quantity: { value, unit } });
  });

  it.each([
    ['5 Å', 'length', 5, 'angstrom'],
    ['5 Å', 'length', 5, 'angstrom'],
    ['5 µm', 'length', 5, 'um'],
    ['5 μm', 'length', 5, 'um'],
    ['2 a₀', 'length', 2, 'bohr'],
    ['5 fm²', 'area', 5, 'fm2'],
    ['5 fm^2', 'area', 5, 'fm2'],
    ['5 mb', 'area', 5, 'millibarn'],
    ['30°', 'angle', 30, 'deg'],
    ['30 degrees', 'angle', 30, 'deg'],
    ['2 MeV·fm', 'energyLength', 2, 'MeV fm'],
    ['2 µg/cm²', 'arealDensity', 2, 'ug/cm2'],
    ['2 µg cm⁻²', 'arealDensity', 2, 'ug/cm2'],
    ['5e15 cm⁻²', 'arealDensity', 5e15, '1/cm2'],
    ['100 s⁻¹', 'rate', 100, '1/s'],
    ['100 Hz', 'rate', 100, '1/s'],
    ['2.7 g/cm³', 'density', 2.7, 'g/cm3'],
    ['938 MeV/c²', 'mass', 938, 'MeV'],
    ['2 µs', 'time', 2, 'us'],
    ['10 A', 'current', 10, 'A'],
    ['10 A', 'length', 10, 'angstrom'],
  ] as const)('%s as %s', (text, dimension, value, unit) => {
    expect(read(text, dimension).quantity).toEqual({ value, unit });
  });

  it('takes the unit of the field for a plain number, and asks where there is none', () => {
    expect(read('10', 'energy', { unit: 'keV' }).quantity).toEqual({ value: 10, unit: 'keV' });
    expect(refused('10')).toMatch(/^Give a unit/);
  });

  it('reads back every unit of the vocabulary written in full', () => {
    const numbers = fc.double({ noNaN: true, noDefaultInfinity: true });
    for (const dimension of DIMENSIONS) {
      for (const unit of Object.keys(UNITS[dimension])) {
        fc.assert(
          fc.property(numbers, (value) => {
            expect(read(`${value} ${unit}`, dimension).quantity).toEqual({
              value: value + 0,
              unit,
            });
          }),
          { numRuns: 10 },
        );
      }
    }
  });
});

describe('what is not what was meant', () => {
  it('reads a decimal comma where it can only be one, with a note, and never as thousands', () => {
    expect(read('1,5 keV')).toEqual({
      ok: true,
      quantity: { value: 1.5, unit: 'keV' },
      note: 'The comma is read as a decimal point: 1.5.',
    });
    expect(read('0,125 eV').quantity.value).toBe(0.125);
    expect(read('1234,5 eV').quantity.value).toBe(1234.5);
    expect(refused('1,500 keV')).toContain('may mean 1.500 or 1500');
    for (const text of ['1,234.5 eV', '1.234,5 eV', '1,234,567 eV', '1.5.2 eV']) {
      expect(refused(text)).toContain('is not one number');
    }
    expect(refused('1 000 eV')).toContain('spaces inside the number');
  });

  it('mends a slip of case where one unit can be meant, and asks where m or M decides', () => {
    expect(read('10 kev')).toMatchObject({
      quantity: { unit: 'keV' },
      note: '`kev` is read as keV.',
    });
    expect(refused('10 mev')).toContain('did you mean meV or MeV?');
    expect(refused('10 MM', 'length')).toContain('did you mean mm?');
  });

  it('says in words what is wrong', () => {
    expect(refused('')).toContain('Begin with a number');
    expect(refused('keV')).toContain('Begin with a number');
    expect(refused('1e400 eV')).toContain('too large');
    expect(refused('10 furlongs')).toContain('Units of energy: meV');
    expect(refused('3 K')).toContain('it is a unit of temperature');
    expect(refused('3 eV', 'length')).toContain('it is a unit of energy or mass');
    expect(refused('3 °', 'length')).toContain('of another kind');
    expect(refused('5 toString')).toContain('is not an energy unit');
    expect(() => requireQuantity('x', 'energy')).toThrow(/Begin with a number/);
    expect(requireQuantity('2 eV', 'energy')).toEqual({ value: 2, unit: 'eV' });
  });

  it('never throws and never gives a number that is none, whatever is typed', () => {
    const text = fc.oneof(
      fc.string(),
      fc.stringMatching(/^[-+]?[0-9.,]{0,6}(e[0-9]{1,4})?( ?[a-zA-Z/°Å²]{0,6})$/),
    );
    fc.assert(
      fc.property(text, fc.constantFrom(...DIMENSIONS), (typed, dimension) => {
        const parsed = parseQuantity(typed, dimension, {
          unit: Object.keys(UNITS[dimension])[0] ?? '',
        });
        if (parsed.ok) expect(Number.isFinite(parsed.quantity.value)).toBe(true);
        else expect(parsed.message).not.toBe('');
      }),
      { numRuns: 500 },
    );
  });
});

describe('the energy of a beam', () => {
  const neutron: ParseContext = {
    unit: 'meV',
    wavelengthToEnergy: (wavelength) =>
      energyFromWavelength(wavelength, NEUTRON, 'nonrelativistic'),
    massNumber: 1,
    charge: 0,
  };

  it('is read from a wavelength, with a note', () => {
    for (const text of ['1.8 angstrom', '1.8 Å', '0.18 nm', '180 pm']) {
      const parsed = read(text, 'energy', neutron);
      expect(parsed.quantity.unit).toBe('meV');
      expectRelative(parsed.quantity.value, 81.80421 / 1.8 ** 2, 1e-7);
    }
    expect(read('1.8 Å', 'energy', neutron).note).toBe(
      'A wavelength of 1.8 Å is a kinetic energy of 25.2482 meV.',
    );
    expect(refused('1.8 Å')).toContain('not an energy unit');
    expect(refused('0 Å', 'energy', neutron)).toContain('above zero');
    expect(refused('1e-300 Å', 'energy', neutron)).toContain('too large');
  });

  it('is shown in a unit that suits it when the field has another', () => {
    const parsed = read('1.8 Å', 'energy', { ...neutron, unit: 'MeV' });
    expect(parsed.quantity.unit).toBe('meV');
    expectRelative(parsed.quantity.value, 25.2482, 1e-5);
  });

  it.each([
    '25 MeV/u',
    '25 MeV/A',
    '25 MeV / u',
    '25 A MeV',
    '25 AMeV',
    '25 MeV/nucleon',
    '25 MeV per nucleon',
  ])('%s is per nucleon', (text) => {
    const parsed = read(text, 'energy', { massNumber: 12 });
    expect(parsed.quantity).toEqual({ value: 300, unit: 'MeV' });
    expect(parsed.note).toBe('25 MeV per nucleon times mass number 12 is 300 MeV.');
    expect(refused(text)).toContain('needs a projectile that is a nucleus');
  });

  it('is read from a voltage when the projectile is charged', () => {
    expect(read('200 kV', 'energy', { charge: -1 }).quantity).toEqual({ value: 200, unit: 'keV' });
    expect(read('2 MV', 'energy', { charge: 2 }).quantity).toEqual({ value: 4, unit: 'MeV' });
    expect(refused('200 kV', 'energy', neutron)).toContain('is a voltage');
  });

  it('keeps both notes when a comma was typed too', () => {
    expect(read('2,5 MeV/u', 'energy', { massNumber: 4 }).note).toBe(
      'The comma is read as a decimal point: 2.5. 2.5 MeV per nucleon times mass number 4 is 10 MeV.',
    );
  });

  it('a temperature in degrees Celsius becomes kelvin', () => {
    expect(read('20 °C', 'temperature')).toEqual({
      ok: true,
      quantity: { value: 293.15, unit: 'K' },
      note: '20 °C is 293.15 K.',
    });
  });
});
