const W = 96;
const H = 56;

/** V(r) as a small picture: zero as a line, r to the right. Pure decoration beside a name; null where V is no function. */
export function Sketch({ points }: { points: ReadonlyArray<readonly [number, number]> | null }) {
  const middle = H / 2;
  const y = (v: number) => (middle - v * (middle - 4)).toFixed(1);
  return (
    <svg viewBox={`0 0 ${W} ${H}`} className="h-14 w-24 shrink-0" aria-hidden="true">
      <path
        d={`M4,4V${H - 4}M4,${middle}H${W - 2}`}
        className="fill-none stroke-edge"
        strokeWidth="1"
      />
      {points === null ? (
        <text x={W / 2 + 2} y={middle - 8} textAnchor="middle" className="fill-muted text-[11px]">
          no curve
        </text>
      ) : (
        <path
          d={points
            .map(([r, v], i) => `${i === 0 ? 'M' : 'L'}${(4 + r * (W - 8)).toFixed(1)},${y(v)}`)
            .join('')}
          className="fill-none stroke-barn"
          strokeWidth="1.8"
          strokeLinejoin="round"
        />
      )}
    </svg>
  );
}
