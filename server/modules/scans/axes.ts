import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import type { ScanAxis, ScanValue } from '#shared/contracts/scans.ts';
import { DomainError } from '#shared/errors.ts';
import { composedFactor } from '#shared/units/composed.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import { valueAt } from './pointer.ts';

/** Values of one input in their order, in one unit; null for a plain number. */
export interface Axis {
  path: string;
  unit: string | null;
  values: number[];
}

/** What is no input of the physics, or is no number. */
const NO_INPUT = /^\/(angles|aids|entered|format|goldenRule|methods|runPlan|units)(\/|$)/;

function refuse(pointer: string, message: string): never {
  throw new DomainError('invalidInput', `${pointer}: ${message}`, {
    errors: [{ path: pointer, message }],
  });
}

const isQuantity = (value: unknown): value is Quantity =>
  typeof value === 'object' && value !== null && 'value' in value && 'unit' in value;

/** Masses have units that are no energies (u, kg); every other unit is composed of the base ones. */
function factor(from: string, to: string): number {
  const { mass } = UNITS;
  if (Object.hasOwn(mass, from) && Object.hasOwn(mass, to)) {
    return (mass[from] ?? NaN) / (mass[to] ?? NaN);
  }
  return composedFactor(from, to);
}

/** Throws DomainError('invalidInput') for units of two kinds. */
const requireSameKind = (one: string, other: string): number => factor(one, other);

/** Reads values in the unit of the first one, and checks that they are of the kind that stands in the estimate. */
function reader(axis: ScanAxis, present: unknown, at: string) {
  const first = 'values' in axis ? axis.values[0] : axis.from;
  const unit = isQuantity(first) ? first.unit : null;
  return {
    unit,
    read: (value: ScanValue, member: string): number => {
      if (!isQuantity(present)) {
        if (typeof value === 'number') return value;
        return refuse(
          `${at}/${member}`,
          `${axis.path} is a plain number; give one without a unit.`,
        );
      }
      if (!isQuantity(value)) {
        return refuse(`${at}/${member}`, `${axis.path} has a unit; give {"value", "unit"}.`);
      }
      try {
        requireSameKind(value.unit, present.unit);
        return value.value * factor(value.unit, unit ?? value.unit);
      } catch (fault) {
        if (!(fault instanceof DomainError)) throw fault;
        return refuse(`${at}/${member}/unit`, fault.message);
      }
    },
  };
}

function steps(from: number, to: number, count: number, scale: 'lin' | 'log'): number[] {
  const last = count - 1;
  const step =
    scale === 'lin'
      ? (i: number) => from + ((to - from) * i) / last
      : (i: number) => from * Math.exp((Math.log(to / from) * i) / last);
  return Array.from({ length: count }, (_, i) => {
    if (i === 0) return from;
    return i === last ? to : step(i);
  });
}

/** The values of an axis; refuses what points at no number of the estimate, or has units of another kind. */
export function readAxis(axis: ScanAxis, index: number, estimate: EstimateRequest): Axis {
  const at = `/axes/${index}`;
  const { path } = axis;
  const present = valueAt(estimate, path);
  if (NO_INPUT.test(path)) {
    return refuse(`${at}/path`, `${path} is no input that can be scanned.`);
  }
  if (typeof present !== 'number' && !isQuantity(present)) {
    const what =
      present === undefined
        ? 'points at nothing in the estimate'
        : 'is neither a number nor a quantity';
    return refuse(`${at}/path`, `${path} ${what}; point at one such as /energy.`);
  }
  const { unit, read } = reader(axis, present, at);
  if ('values' in axis) {
    return { path, unit, values: axis.values.map((value, i) => read(value, `values/${i}`)) };
  }
  const { count, scale } = axis;
  const from = read(axis.from, 'from');
  const to = read(axis.to, 'to');
  if (scale === 'log' && !(from * to > 0)) {
    return refuse(`${at}/scale`, 'Logarithmic steps need from and to of one sign, neither zero.');
  }
  return { path, unit, values: steps(from, to, count, scale) };
}
