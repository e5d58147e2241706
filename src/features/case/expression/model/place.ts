const AROUND = 22;

export interface Place {
  before: string;
  at: string;
  after: string;
}

/** The stretch of a formula a fault speaks of, if it names a character that still stands there. */
export function placeOf(message: string, formula: string): Place | null {
  const match = /^Character (\d+):/.exec(message);
  const index = Number(match?.[1] ?? 0) - 1;
  if (!match || index >= formula.length) return null;
  const start = Math.max(0, index - AROUND);
  const end = Math.min(formula.length, index + 1 + AROUND);
  return {
    before: `${start > 0 ? '…' : ''}${formula.slice(start, index)}`,
    at: formula.slice(index, index + 1),
    after: `${formula.slice(index + 1, end)}${end < formula.length ? '…' : ''}`,
  };
}
