import { classNames } from '#src/lib/class-names.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import { sketchOf } from './potential-shape.ts';
import type { Sketch } from './potential-shape.ts';

const W = 320;
const H = 150;
const LEFT = 12;
const RIGHT = 308;
const TOP = 20;
const BOTTOM = 132;
/** Marks beyond this number would only be a broad line. */
const MOST_MARKS = 120;

type Potential = Extract<Estimate['potential'], { r: number[] }>;
type Row = readonly [number, number];

interface PotentialPreviewProps {
  potential: Estimate['potential'] | undefined;
  /** Rows of a table, in the units of the potential: marked on the curve; beyond the last the tail begins. */
  rows?: readonly Row[];
  dimmed: boolean;
  /** What is drawn, for those who do not see it. */
  name: string;
}

function scales({ r, v }: Sketch) {
  const span = v[1] - v[0] || 1;
  return {
    x: (radius: number) => LEFT + ((RIGHT - LEFT) * radius) / (r[1] || 1),
    y: (value: number) => TOP + ((BOTTOM - TOP) * (v[1] - value)) / span,
  };
}

function shownRows(rows: readonly Row[], { r, v }: Sketch): Row[] {
  const inside = rows.filter(([radius, value]) => radius <= r[1] && value >= v[0] && value <= v[1]);
  const step = Math.ceil(inside.length / MOST_MARKS);
  return inside.filter((_, i) => i % step === 0);
}

function Drawing({ sketch, rows }: { sketch: Sketch; rows: readonly Row[] }) {
  const { x, y } = scales(sketch);
  const last = rows.at(-1)?.[0];
  const tailFrom = last !== undefined && last < sketch.r[1] ? x(last) : null;
  return (
    <>
      <path
        d={`M${LEFT},${TOP - 8}V${BOTTOM}M${LEFT},${y(0)}H${RIGHT}`}
        className="fill-none stroke-edge"
      />
      {tailFrom !== null && (
        <>
          <path
            d={`M${tailFrom},${TOP - 8}V${BOTTOM}`}
            className="fill-none stroke-slate"
            strokeDasharray="3 4"
          />
          <text x={Math.min(tailFrom + 4, RIGHT - 24)} y={TOP} className="fill-muted text-[12px]">
            tail
          </text>
        </>
      )}
      {sketch.curves.map((curve, i) => (
        <path
          key={curve.name}
          d={curve.points
            .map((p, j) => `${j === 0 ? 'M' : 'L'}${x(p.x).toFixed(1)},${y(p.y).toFixed(1)}`)
            .join('')}
          className={classNames('fill-none', i === 0 ? 'stroke-barn' : 'stroke-slate')}
          strokeWidth="2"
          strokeLinejoin="round"
        />
      ))}
      {shownRows(rows, sketch).map(([radius, value]) => (
        <circle
          key={radius}
          cx={x(radius).toFixed(1)}
          cy={y(value).toFixed(1)}
          r="2.4"
          className="fill-sheet stroke-ink"
        />
      ))}
    </>
  );
}

function spoken({ r, v }: Sketch, { unit }: Potential, rows: readonly Row[], name: string): string {
  const marks = rows.length > 0 ? `, with the ${rows.length} rows marked` : '';
  return `${name}: V from ${formatNumber(v[0], 3)} to ${formatNumber(v[1], 3)} ${unit.v} up to r = ${formatNumber(r[1], 3)} ${unit.r}${marks}`;
}

/** V(r) as the server answers it: curve, rows and tail of a table. */
export function PotentialPreview({ potential, rows = [], dimmed, name }: PotentialPreviewProps) {
  if (!potential) return null;
  if ('unavailable' in potential) {
    return <p className="text-sm text-muted">No sketch of V(r): {potential.reason}</p>;
  }
  const sketch = sketchOf(potential);
  const { unit } = potential;
  return (
    <svg
      viewBox={`0 0 ${W} ${H}`}
      role="img"
      aria-label={spoken(sketch, potential, rows, name)}
      className={classNames('w-full max-w-md font-sans', dimmed && 'stale')}
    >
      <text x={LEFT + 6} y={TOP - 9} className="fill-muted text-[12px]">
        V(r), {formatNumber(sketch.v[0], 3)} to {formatNumber(sketch.v[1], 3)} {unitSymbol(unit.v)}
        {sketch.cut && ', cut off'}
      </text>
      <Drawing sketch={sketch} rows={rows} />
      <text x={RIGHT} y={H - 4} textAnchor="end" className="fill-muted text-[12px]">
        r to {formatNumber(sketch.r[1], 3)} {unitSymbol(unit.r)}
      </text>
    </svg>
  );
}
