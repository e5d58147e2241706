import { formatNumber } from '#shared/units/format.ts';
import type { PhaseShift } from '#shared/contracts/estimates.ts';
import { breaksUnitarity } from './model/waves.ts';

/** Which waves first order makes scatter more than there is of them. */
export function UnitarityNote({ waves }: { waves: readonly PhaseShift[] }) {
  const known = waves.filter(({ born }) => born !== undefined);
  if (known.length === 0) {
    return (
      <p className="max-w-prose text-sm">
        First order has no phases here, so unitarity cannot be asked of it wave by wave.
      </p>
    );
  }
  const broken = [...new Set(known.filter(breaksUnitarity).map(({ l }) => l))];
  const largest = known.reduce((a, b) => (Math.abs(b.born ?? 0) > Math.abs(a.born ?? 0) ? b : a));
  const number = `${formatNumber(Math.abs(largest.born ?? 0), 3)} at l = ${largest.l}`;
  return (
    <p className="max-w-prose text-sm">
      {broken.length === 0
        ? `Unitarity, wave by wave: |T| ≤ 1 holds for every wave of first order; the largest is ${number}.`
        : `Unitarity, wave by wave: first order breaks |T| ≤ 1 for l = ${listed(broken)}; the largest |T| is ${number}.`}
    </p>
  );
}

/** 0, 1, 2, 5 as `0 to 2, 5`. */
function listed(numbers: readonly number[]): string {
  const runs: [number, number][] = [];
  for (const n of numbers) {
    const last = runs.at(-1);
    if (last && n === last[1] + 1) last[1] = n;
    else runs.push([n, n]);
  }
  return runs
    .map(([a, b]) => (a === b ? String(a) : b === a + 1 ? `${a}, ${b}` : `${a} to ${b}`))
    .join(', ');
}
