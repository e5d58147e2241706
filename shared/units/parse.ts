import { DomainError } from '#shared/errors.ts';
import { fullDigits, unitSymbol } from './format.ts';
import { fromInternal, toInternal, unitMessage } from './quantity.ts';
import type { Quantity } from './quantity.ts';
import { readNumber } from './read-number.ts';
import { readUnit, spellsUnitOf } from './unit-words.ts';
import { DIMENSIONS, UNITS } from './vocabulary.ts';
import type { Dimension } from './vocabulary.ts';

/** What a field knows that the text does not say. */
export interface ParseContext {
  /** Unit of a plain number: the one the field shows now. */
  unit?: string;
  /** Turns a wavelength (angstrom) into the beam's kinetic energy (eV); given for the energy of a beam only. */
  wavelengthToEnergy?: (wavelength: number) => number;
  /** Mass number of the projectile, for energies per nucleon. */
  massNumber?: number;
  /** Charge number of the projectile, for accelerating voltages. */
  charge?: number;
}

export type ParsedQuantity =
  { ok: true; quantity: Quantity; note?: string } | { ok: false; message: string };

const PER_NUCLEON =
  /^([mkMG]?eV)\s*\/\s*(?:u|A|nucleon|amu)$|^A\s*([mkMG]?eV)$|^([mkMG]?eV)\s+per\s+nucleon$/;
const VOLTAGE = /^([mkMG]?)V$/;

/** Six digits without trailing zeros: notes repeat what was typed, they do not claim precision. */
function short(value: number): string {
  return fullDigits(Number(value.toPrecision(6)));
}

function words(quantity: Quantity): string {
  return `${short(quantity.value)} ${unitSymbol(quantity.unit)}`;
}

/** The field's unit where the energy reads well in it, else the largest of meV to GeV that keeps the number at one or above. */
function fittingEnergy(energy: number, preferred: string | undefined): Quantity {
  if (preferred !== undefined) {
    const quantity = fromInternal(energy, preferred, 'energy');
    if (quantity.value >= 1e-3 && quantity.value < 1e6) return quantity;
  }
  const fitting = ['GeV', 'MeV', 'keV', 'eV'].find((unit) => energy >= (UNITS.energy[unit] ?? 1));
  return fromInternal(energy, fitting ?? 'meV', 'energy');
}

function accept(quantity: Quantity, ...notes: (string | undefined)[]): ParsedQuantity {
  if (!Number.isFinite(quantity.value)) {
    return { ok: false, message: 'The value is too large for a double-precision number.' };
  }
  const note = notes.filter((text) => text !== undefined).join(' ');
  return note === '' ? { ok: true, quantity } : { ok: true, quantity, note };
}

function perNucleon(value: number, unit: string, context: ParseContext): ParsedQuantity {
  const { massNumber } = context;
  if (massNumber === undefined || !(massNumber >= 1)) {
    return {
      ok: false,
      message: `An energy per nucleon needs a projectile that is a nucleus; give the total energy in ${unit}.`,
    };
  }
  const quantity = { value: value * massNumber, unit };
  return accept(
    quantity,
    `${short(value)} ${unit} per nucleon times mass number ${massNumber} is ${words(quantity)}.`,
  );
}

function fromVoltage(value: number, prefix: string, context: ParseContext): ParsedQuantity {
  const charge = Math.abs(context.charge ?? 0);
  if (!(charge > 0)) {
    return {
      ok: false,
      message: `${prefix}V is a voltage; it gives an energy only to a charged projectile. Give the energy in ${prefix}eV.`,
    };
  }
  const quantity = { value: value * charge, unit: `${prefix}eV` };
  return accept(
    quantity,
    `Accelerated through ${short(value)} ${prefix}V at charge ${charge}: ${words(quantity)}.`,
  );
}

function fromWavelength(length: Quantity, context: ParseContext): ParsedQuantity {
  if (context.wavelengthToEnergy === undefined) {
    return { ok: false, message: unitMessage(length.unit, 'energy') };
  }
  if (!(length.value > 0)) return { ok: false, message: 'A wavelength must be above zero.' };
  const energy = context.wavelengthToEnergy(toInternal(length, 'length'));
  if (!(energy >= 0)) {
    return { ok: false, message: 'This wavelength gives no energy for the chosen projectile.' };
  }
  const quantity = fittingEnergy(energy, context.unit);
  return accept(
    quantity,
    `A wavelength of ${words(length)} is a kinetic energy of ${words(quantity)}.`,
  );
}

/** Readings of a beam's energy that are not written as an energy; null when the text is none of them. */
function otherEnergy(value: number, rest: string, context: ParseContext): ParsedQuantity | null {
  const nucleon = PER_NUCLEON.exec(rest);
  if (nucleon) return perNucleon(value, nucleon[1] ?? nucleon[2] ?? nucleon[3] ?? '', context);
  const volts = VOLTAGE.exec(rest);
  if (volts) return fromVoltage(value, volts[1] ?? '', context);
  const length = readUnit(rest, 'length');
  return length ? fromWavelength({ value, unit: length.unit }, context) : null;
}

function refuseUnit(rest: string, dimension: Dimension): ParsedQuantity {
  const others = spellsUnitOf(rest, DIMENSIONS).filter((other) => other !== dimension);
  const message = unitMessage(rest, dimension);
  const foreign = others.length > 0 && !message.includes('it is a unit of');
  return {
    ok: false,
    message: foreign ? `${message} (That is a unit of another kind.)` : message,
  };
}

/**
 * Reads what a person typed into a field of this dimension: "10 keV", "1e4 eV", "10keV", "1,5 keV" (with a note; refused where ambiguous),
 * symbols such as Å, µm, fm², °. For an energy also "1.8 angstrom" (a wavelength), "25 MeV/u" and "200 kV", when the context allows.
 * A plain number takes the field's unit. A note tells what was understood wherever it is not what was written.
 */
export function parseQuantity(
  text: string,
  dimension: Dimension,
  context: ParseContext = {},
): ParsedQuantity {
  const number = readNumber(text);
  if (!number.ok) return number;
  const { value, rest, note } = number;
  if (rest === '') {
    return context.unit === undefined
      ? { ok: false, message: unitMessage('', dimension) }
      : accept({ value, unit: context.unit }, note);
  }
  if (dimension === 'temperature' && /^°\s*C$/.test(rest)) {
    const quantity = { value: value + 273.15, unit: 'K' };
    return accept(quantity, note, `${short(value)} °C is ${words(quantity)}.`);
  }
  const unit = readUnit(rest, dimension);
  if (unit) return accept({ value, unit: unit.unit }, note, unit.note);
  const other = dimension === 'energy' ? otherEnergy(value, rest, context) : null;
  if (!other) return refuseUnit(rest, dimension);
  return other.ok ? accept(other.quantity, note, other.note) : other;
}

/** The same, throwing DomainError('invalidInput') instead of answering a refusal. */
export function requireQuantity(
  text: string,
  dimension: Dimension,
  context?: ParseContext,
): Quantity {
  const parsed = parseQuantity(text, dimension, context);
  if (!parsed.ok) throw new DomainError('invalidInput', parsed.message);
  return parsed.quantity;
}
