/** Seconds per call: the best and the median of `repeats` runs, after as many to warm up. */
export interface Timing {
  best: number;
  median: number;
}

export function measure(run: () => void, repeats: number): Timing {
  for (let i = 0; i < repeats; i++) run();
  const times: number[] = [];
  for (let i = 0; i < repeats; i++) {
    const begun = process.hrtime.bigint();
    run();
    times.push(Number(process.hrtime.bigint() - begun) / 1e9);
  }
  return summary(times);
}

export function summary(times: number[]): Timing {
  const sorted = [...times].sort((x, y) => x - y);
  const at = (share: number) => sorted[Math.floor(share * (sorted.length - 1))] ?? NaN;
  return { best: at(0), median: at(0.5) };
}

export function shown(seconds: number): string {
  return seconds < 1e-3 ? `${(seconds * 1e6).toFixed(1)} µs` : `${(seconds * 1e3).toFixed(2)} ms`;
}
