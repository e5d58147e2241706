import type { CaseDocument } from '#shared/contracts/cases.ts';
import { DEFAULT_ANGLES } from '#shared/contracts/estimates.ts';
import { tidy } from '#src/components/convert-quantity.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import { without } from './without.ts';

export type Angles = NonNullable<CaseDocument['angles']>;

export function anglesOf(document: CaseDocument): Angles {
  return document.angles ?? DEFAULT_ANGLES;
}

function converter(from: string, to: string): (angle: number) => number {
  const factor = (UNITS.angle[from] ?? 1) / (UNITS.angle[to] ?? 1);
  return (angle) => tidy(angle * factor);
}

/** The table in another unit of angle; the angle of the golden rule goes with it. */
export function withAngleUnit(document: CaseDocument, unit: string): CaseDocument {
  const angles = anglesOf(document);
  const convert = converter(angles.unit, unit);
  const table: Angles =
    'values' in angles
      ? { unit, values: angles.values.map(convert) }
      : { unit, from: convert(angles.from), to: convert(angles.to), count: angles.count };
  const theta = document.goldenRule?.theta;
  return {
    ...document,
    angles: table,
    ...(theta === undefined
      ? {}
      : { goldenRule: { ...document.goldenRule, theta: convert(theta) } }),
  };
}

/** The angles written out, as the engine spaces them. */
export function angleValues(angles: Angles): number[] {
  if ('values' in angles) return angles.values;
  const { from, to, count } = angles;
  return Array.from({ length: count }, (_, i) => from + ((to - from) * i) / (count - 1));
}

/** Even steps as a list and back; a long list shortens to its ends. */
export function withAngleKind(document: CaseDocument, kind: 'steps' | 'list'): CaseDocument {
  const angles = anglesOf(document);
  if (kind === 'list') {
    if ('values' in angles) return document;
    const { unit } = angles;
    const count = Math.min(angles.count, 13);
    const values = angleValues({ ...angles, count }).map((v) => Number(v.toPrecision(12)));
    return { ...document, angles: { unit, values } };
  }
  if (!('values' in angles)) return document;
  const from = Math.min(...angles.values);
  const to = Math.max(...angles.values);
  const convert = converter('deg', angles.unit);
  return {
    ...document,
    angles:
      to > from
        ? { unit: angles.unit, from, to, count: 181 }
        : { unit: angles.unit, from: 0, to: convert(180), count: 181 },
  };
}

export function withGoldenRule(
  document: CaseDocument,
  change: { theta?: number | undefined; boxSide?: { value: number; unit: string } | undefined },
): CaseDocument {
  const merged = { ...document.goldenRule, ...change };
  const goldenRule = {
    ...(merged.theta === undefined ? {} : { theta: merged.theta }),
    ...(merged.boxSide === undefined ? {} : { boxSide: merged.boxSide }),
  };
  const rest = without(document, 'goldenRule');
  return Object.keys(goldenRule).length === 0 ? rest : { ...rest, goldenRule };
}

/** 180° in a unit of angle: where angles end. */
export function straightAngle(unit: string): number {
  return tidy(Math.PI / (UNITS.angle[unit] ?? 1));
}
