import type { RunPlan } from '#shared/contracts/run-plans.ts';

/** How a run is divided, seconds. */
export interface SheetRules {
  shift: number;
  /** Lost at the begin of every shift: handover, tuning of the beam. */
  lostInShift: number;
  /** Moving and setting up at each position, once. */
  setUp: number;
}

export interface SheetLine {
  name: string;
  angle: number;
  what: 'sample' | 'blank';
  /** Seconds of the clock from the begin of the run. */
  start: number;
  /** Seconds of counting. */
  time: number;
  /** Expected counts; absent where none are expected to be known. */
  counts: number | null;
  /** From 1: the shift it begins in, and the one it ends in. */
  shifts: readonly [number, number];
}

export interface Sheet {
  lines: SheetLine[];
  /** Relative standard uncertainty that every position reaches. */
  precision: number;
  /** Seconds by the clock, overheads among them. */
  whole: number;
  counting: number;
  shifts: number;
}

export type SheetOrReason = Sheet | { reason: string };

interface Position {
  name: string;
  angle: number;
  signal: number;
  blank: number;
  /** Counts a second: sample, blank. */
  rates: { gross: number; blank: number };
}

const EDGE = 1e-9;

/** The clock after some usable time, where every shift begins with time that is lost. */
function clock(usable: number, { shift, lostInShift }: SheetRules): number {
  const each = shift - lostInShift;
  const full = Math.floor(usable / each + EDGE);
  return full * shift + lostInShift + Math.max(0, usable - full * each);
}

/** Usable time until the clock reads `time`. */
export function usableIn(time: number, { shift, lostInShift }: SheetRules): number {
  const full = Math.floor(time / shift + EDGE);
  return full * (shift - lostInShift) + Math.max(0, time - full * shift - lostInShift);
}

function positionsOf({ detectors }: RunPlan): Position[] | { reason: string } {
  const found: Position[] = [];
  for (const { name, angle, timeForPrecision: time, expectedCounts: counts } of detectors) {
    if ('unavailable' in time) return { reason: `${name}: ${time.reason}` };
    const signal = time.signal.value;
    const blank = time.blank.value;
    const rates = {
      gross: counts && signal > 0 ? counts.gross / signal : 0,
      blank: counts && blank > 0 ? counts.blank / blank : 0,
    };
    found.push({ name, angle, signal, blank, rates });
  }
  // One sweep from one side to the other is the shortest way past all of them.
  return found.sort((a, b) => a.angle - b.angle);
}

/** Lines one after the other, sample then blank at each stop. */
function lay(positions: readonly Position[], precision: number, rules: SheetRules): Sheet {
  const each = rules.shift - rules.lostInShift;
  const lines: SheetLine[] = [];
  let used = 0;
  let counting = 0;
  const shiftAt = (usable: number) => Math.floor(usable / each + EDGE) + 1;
  for (const { name, angle, signal, blank, rates } of positions) {
    used += rules.setUp;
    for (const [what, time, rate] of [
      ['sample', signal, rates.gross],
      ['blank', blank, rates.blank],
    ] as const) {
      if (!(time > 0)) continue;
      const end = used + time;
      const last = Math.max(shiftAt(used), Math.ceil(end / each - EDGE));
      lines.push({
        name,
        angle,
        what,
        start: clock(used, rules),
        time,
        counts: rate > 0 ? rate * time : null,
        shifts: [shiftAt(used), last],
      });
      used = end;
      counting += time;
    }
  }
  const shifts = Math.max(1, Math.ceil(used / each - EDGE));
  const rest = used - (shifts - 1) * each;
  const whole = (shifts - 1) * rules.shift + rules.lostInShift + rest;
  return { lines, precision, whole, counting, shifts };
}

/** Positions in turn until each has the precision aimed at, however long it takes. */
export function sheetToAim(plan: RunPlan, rules: SheetRules): SheetOrReason {
  const positions = positionsOf(plan);
  return 'reason' in positions ? positions : lay(positions, plan.aim.relativePrecision, rules);
}

/**
 * A given beam time shared so that every position reaches one precision: what is left after all overheads, in the ratio of the times that
 * the aim takes, for times go as the inverse square of the precision.
 */
export function sheetInTime(plan: RunPlan, rules: SheetRules): SheetOrReason {
  const { beamTime, relativePrecision } = plan.aim;
  if (!beamTime) return { reason: 'No beam time is stated.' };
  const positions = positionsOf(plan);
  if ('reason' in positions) return positions;
  const left = usableIn(beamTime.value, rules) - positions.length * rules.setUp;
  if (!(left > 0)) {
    return { reason: 'Setting up takes all of the beam time: take fewer positions or more time.' };
  }
  const aimed = positions.reduce((sum, { signal, blank }) => sum + signal + blank, 0);
  const scale = left / aimed;
  const scaled = positions.map((one) => ({
    ...one,
    signal: scale * one.signal,
    blank: scale * one.blank,
  }));
  return lay(scaled, relativePrecision / Math.sqrt(scale), rules);
}
