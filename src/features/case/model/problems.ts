import type { FieldError } from '#shared/errors.ts';
import { isAtOrBelow } from './entered.ts';
import type { OpenText } from './editor.ts';
import { STATIONS, stationOf } from './stations.ts';
import type { StationKey } from './stations.ts';

/** Faults of what was typed come first: the server has not seen those texts. */
export function allProblems(
  open: Readonly<Record<string, OpenText>>,
  errors: readonly FieldError[],
): FieldError[] {
  const typed = Object.entries(open).flatMap(([path, { problem }]) =>
    problem === null ? [] : [{ path, message: problem }],
  );
  const answered = errors.filter(
    ({ path }) => !typed.some((fault) => isAtOrBelow(path, fault.path)),
  );
  return [...typed, ...answered];
}

/** What is wrong at a field or inside it, in one text. */
export function problemAt(problems: readonly FieldError[], pointer: string): string | undefined {
  const found = problems.filter(({ path }) => isAtOrBelow(path, pointer));
  return found.length === 0 ? undefined : found.map(({ message }) => message).join(' ');
}

export function problemsByStation(
  problems: readonly FieldError[],
): Record<StationKey, FieldError[]> {
  const entries = STATIONS.map((station) => [
    station,
    problems.filter(({ path }) => stationOf(path) === station),
  ]);
  return Object.fromEntries(entries) as Record<StationKey, FieldError[]>;
}
