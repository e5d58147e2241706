import { classNames } from '#src/lib/class-names.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { formatComposed, formatNumber, unitSymbol } from '#shared/units/format.ts';
import { sketchOf } from '#src/components/potential-shape.ts';
import type { Sketch } from '#src/components/potential-shape.ts';

const W = 320;
const H = 226;
const LEFT = 14;
const RIGHT = 306;
const TOP = 22;
const BOTTOM = 168;

const STROKES = ['stroke-barn', 'stroke-slate'];

function pathOf(points: Sketch['curves'][number]['points'], sketch: Sketch): string {
  const x = (r: number) => LEFT + ((RIGHT - LEFT) * r) / sketch.r[1];
  const y = yOf(sketch);
  return points
    .map((p, i) => `${i === 0 ? 'M' : 'L'}${x(p.x).toFixed(1)},${y(p.y).toFixed(1)}`)
    .join('');
}

function yOf(sketch: Sketch): (v: number) => number {
  const [low, high] = sketch.v;
  const span = high - low;
  return (v) => (span > 0 ? TOP + ((BOTTOM - TOP) * (high - v)) / span : BOTTOM);
}

/** The wavelength as a bar on the scale of r, or in words where it does not fit the picture. */
function Wavelength({ length, end, unit }: { length: number; end: number; unit: string }) {
  const width = ((RIGHT - LEFT) * length) / end;
  const words = formatComposed(length, unit, 3);
  const y = 196;
  const bars = width < 6 ? 10 ** Math.ceil(Math.log10(6 / width)) : 1;
  if (width > RIGHT - LEFT) {
    return (
      <g>
        <path
          d={`M${LEFT},${y}H${RIGHT - 2}m-6,-4l6,4l-6,4`}
          className="fill-none stroke-slate"
          strokeWidth="1.6"
        />
        <text x={LEFT} y={y + 17} className="fill-muted text-[12px]">
          λ = {words}, {formatNumber(length / end, 2)} times the width of this picture
        </text>
      </g>
    );
  }
  const drawn = Math.min(width * bars, RIGHT - LEFT);
  return (
    <g>
      <path
        d={`M${LEFT},${y - 5}v10M${LEFT},${y}h${drawn.toFixed(1)}m0,-5v10`}
        className="fill-none stroke-slate"
        strokeWidth="1.6"
      />
      <text x={LEFT} y={y + 18} className="fill-muted text-[12px]">
        {bars > 1 ? `${bars} λ, to scale; λ = ${words}` : `λ = ${words}, to scale`}
      </text>
    </g>
  );
}

function Axes({ sketch, rUnit, vUnit }: { sketch: Sketch; rUnit: string; vUnit: string }) {
  const zero = yOf(sketch)(0);
  const [low, high] = sketch.v;
  const deep = Math.abs(low) > Math.abs(high) ? low : high;
  const y = yOf(sketch)(deep);
  return (
    <g>
      <path
        d={`M${LEFT},${TOP - 8}V${BOTTOM + 6}M${LEFT},${zero}H${RIGHT}`}
        className="fill-none stroke-edge"
      />
      <text x={LEFT + 6} y={TOP - 9} className="fill-muted text-[12px]">
        V(r)
      </text>
      <text
        x={RIGHT}
        y={zero < (TOP + BOTTOM) / 2 ? zero - 7 : zero + 15}
        textAnchor="end"
        className="fill-muted text-[12px]"
      >
        r to {formatNumber(sketch.r[1], 3)} {unitSymbol(rUnit)}
      </text>
      {deep !== 0 && (
        <>
          <path d={`M${LEFT - 4},${y}h8`} className="stroke-edge" />
          <text
            x={RIGHT}
            y={deep < 0 ? BOTTOM + 3 : TOP + 3}
            textAnchor="end"
            className="fill-muted text-[12px]"
          >
            {sketch.cut ? 'cut off at' : deep < 0 ? 'deepest' : 'highest'} {formatNumber(deep, 3)}{' '}
            {unitSymbol(vUnit)}
          </text>
        </>
      )}
    </g>
  );
}

/** Where V is infinite: hatched up to the wall. */
function Wall({ radius, end, unit }: { radius: number; end: number; unit: string }) {
  const width = ((RIGHT - LEFT) * radius) / end;
  const height = BOTTOM - TOP;
  const step = 14;
  const strokes = Array.from({ length: Math.ceil((width + height) / step) }, (_, i) => {
    const at = step * (i + 1);
    const [x1, y1] = [Math.max(0, at - height), Math.min(at, height)];
    const [x2, y2] = [Math.min(at, width), Math.max(0, at - width)];
    return `M${LEFT + x1},${TOP + y1}L${LEFT + x2},${TOP + y2}`;
  });
  return (
    <g>
      <path d={strokes.join('')} className="fill-none stroke-line" />
      <path
        d={`M${LEFT + width},${TOP}V${BOTTOM}`}
        className="fill-none stroke-barn"
        strokeWidth="2.2"
      />
      <rect x={LEFT + 8} y={TOP + 34} width="176" height="22" className="fill-sheet" />
      <text x={LEFT + 14} y={TOP + 49} className="fill-ink text-[12px]">
        V = ∞ within r = {formatNumber(radius, 4)} {unitSymbol(unit)}
      </text>
    </g>
  );
}

interface PotentialSketchProps {
  estimate: Estimate;
  dimmed: boolean;
}

/** V(r) with the de Broglie wavelength on the same scale. */
export function PotentialSketch({ estimate, dimmed }: PotentialSketchProps) {
  const { potential, kinematics } = estimate;
  if ('unavailable' in potential) {
    return <p className="text-sm text-muted">No sketch of V(r): {potential.reason}</p>;
  }
  const sketch = sketchOf(potential);
  const { wavelength } = kinematics;
  const length = wavelength.value * composedFactor(wavelength.unit, potential.unit.r);
  const wall =
    sketch.wall === null
      ? ''
      : `V is infinite within r = ${formatNumber(sketch.wall, 4)} ${potential.unit.r}; beyond, `;
  const spoken = `${wall}V(r) from ${formatNumber(sketch.v[0], 3)} to ${formatNumber(sketch.v[1], 3)} ${potential.unit.v} up to r = ${formatNumber(sketch.r[1], 3)} ${potential.unit.r}; the wavelength is ${formatNumber(length, 3)} ${potential.unit.r}.`;
  return (
    <figure className={classNames(dimmed && 'stale')}>
      <svg
        viewBox={`0 0 ${W} ${H}`}
        role="img"
        aria-label={spoken}
        className="w-full max-w-md font-sans"
      >
        {sketch.wall !== null && (
          <Wall radius={sketch.wall} end={sketch.r[1]} unit={potential.unit.r} />
        )}
        <Axes sketch={sketch} rUnit={potential.unit.r} vUnit={potential.unit.v} />
        {sketch.curves.map((curve, i) => (
          <path
            key={curve.name}
            d={pathOf(curve.points, sketch)}
            className={classNames('fill-none', STROKES[i])}
            strokeWidth="2.2"
            strokeLinejoin="round"
            {...(i > 0 ? { strokeDasharray: '8 4' } : {})}
          />
        ))}
        <Wavelength length={length} end={sketch.r[1]} unit={potential.unit.r} />
      </svg>
      {sketch.curves.length > 1 && (
        <figcaption className="text-xs text-muted">
          Solid: real part. Dashed: imaginary part.
        </figcaption>
      )}
    </figure>
  );
}
