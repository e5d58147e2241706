import { useRef, useState } from 'react';
import type { KeyboardEvent, PointerEvent } from 'react';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import type { PlannedDetector, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { useEditing } from '../editing/editor-context.ts';
import { putInDetector } from './model/plan.ts';
import { takeValue } from '../model/typing.ts';

const SIZE = 320;
const CENTRE = SIZE / 2;
/** Detectors without a distance stand here, as a fraction of the largest radius drawn. */
const UNPLACED = 0.8;
const EDGE = 34;
const KEY_STEPS: Record<string, number> = {
  ArrowLeft: 1,
  ArrowUp: 1,
  ArrowRight: -1,
  ArrowDown: -1,
};

const lengthOf = ({ value, unit }: Quantity): number => value * (UNITS.length[unit] ?? 1);
const DEGREE = Math.PI / 180;

interface Placed {
  index: number;
  name: string;
  angle: number;
  /** Fraction of the largest distance. */
  radius: number;
  halfAngle: number;
}

function place(plan: RunPlanBody, answered: readonly PlannedDetector[]): Placed[] {
  const distances = plan.detectors.map(({ distance }) => (distance ? lengthOf(distance) : null));
  const largest = Math.max(0, ...distances.map((distance) => distance ?? 0));
  return plan.detectors.map(({ name, angle }, index) => {
    const distance = distances[index];
    const half = answered[index]?.name === name ? (answered[index]?.halfAngle ?? 1) : 1;
    const radius = distance && largest > 0 ? distance / largest : UNPLACED;
    return { index, name, angle, radius, halfAngle: half };
  });
}

/** A point at a lab angle: the beam runs to the right, positive angles upwards. */
function point(angle: number, radius: number): [number, number] {
  const r = radius * (CENTRE - EDGE);
  return [CENTRE + r * Math.cos(angle * DEGREE), CENTRE - r * Math.sin(angle * DEGREE)];
}

function Scale({ plan }: { plan: RunPlanBody }) {
  const longest = plan.detectors
    .flatMap(({ distance }) => (distance ? [distance] : []))
    .sort((a, b) => lengthOf(b) - lengthOf(a))[0];
  if (!longest) return null;
  const width = (CENTRE - EDGE) / 2;
  const text = `${formatNumber(longest.value / 2, 3)} ${unitSymbol(longest.unit)}`;
  return (
    <g aria-hidden="true" className="stroke-muted">
      <path d={`M10,${SIZE - 12}v-5h${width}v5`} fill="none" />
      <text
        x={10 + width / 2}
        y={SIZE - 22}
        className="fill-muted stroke-none text-xs"
        textAnchor="middle"
      >
        {text}
      </text>
    </g>
  );
}

interface MarkProps {
  placed: Placed;
  chosen: boolean;
  onChoose: () => void;
  onTurn: (angle: number) => void;
  readOnly: boolean;
}

/** One detector: its cone, and a slider along the circle. */
function Mark({ placed, chosen, onChoose, onTurn, readOnly }: MarkProps) {
  const { index, name, angle, radius, halfAngle } = placed;
  const [x, y] = point(angle, radius);
  const half = Math.min(89, Math.max(halfAngle, 0.6));
  const edges = [angle - half, angle + half].map((at) =>
    point(at, radius / Math.cos(half * DEGREE)),
  );
  const [lower = [x, y], upper = [x, y]] = edges;
  const [nameX, nameY] = point(angle, radius + 0.12);
  function onKey(event: KeyboardEvent): void {
    const step = KEY_STEPS[event.key];
    if (step === undefined) return;
    event.preventDefault();
    const size = event.shiftKey ? 0.1 : 1;
    onTurn(Math.min(180, Math.max(-180, Number((angle + step * size).toFixed(3)))));
  }
  return (
    <g
      role="slider"
      tabIndex={0}
      aria-label={`Angle of ${name}`}
      aria-valuemin={-180}
      aria-valuemax={180}
      aria-valuenow={angle}
      aria-valuetext={`${formatNumber(angle, 6)} degrees`}
      aria-disabled={readOnly || undefined}
      data-detector={index}
      onFocus={onChoose}
      onKeyDown={readOnly ? undefined : onKey}
      className={readOnly ? '' : 'cursor-grab'}
    >
      <path
        d={`M${CENTRE},${CENTRE}L${lower.join(',')}L${upper.join(',')}Z`}
        className={chosen ? 'fill-barn/20' : 'fill-slate/15'}
      />
      <path
        d={`M${lower.join(',')}L${upper.join(',')}`}
        strokeWidth={chosen ? 6 : 4}
        className={chosen ? 'stroke-barn' : 'stroke-slate'}
      />
      <circle cx={x} cy={y} r={14} className="fill-transparent" />
      <text
        x={nameX}
        y={nameY + 4}
        textAnchor="middle"
        className={`text-xs ${chosen ? 'fill-ink font-semibold' : 'fill-muted'}`}
      >
        {name}
      </text>
    </g>
  );
}

interface TopViewProps {
  plan: RunPlanBody;
  answered: readonly PlannedDetector[];
  chosen: number;
  onChoose: (index: number) => void;
}

/** Beam, target and detectors from above, to scale; detectors move along their circle by pointer and by keyboard. */
export function TopView({ plan, answered, chosen, onChoose }: TopViewProps) {
  const { edit, readOnly } = useEditing();
  const svg = useRef<SVGSVGElement>(null);
  const [dragged, setDragged] = useState<number | null>(null);
  const placed = place(plan, answered);
  const tilt = plan.foil?.tilt ?? 0;

  const turn = (index: number, angle: number) =>
    edit(`/runPlan/detectors/${index}/angle`, (before) =>
      takeValue(before, `/runPlan/detectors/${index}/angle`, (document) =>
        putInDetector(index, 'angle')(document, angle),
      ),
    );
  function angleAt(event: PointerEvent): number {
    const box = svg.current?.getBoundingClientRect();
    if (!box) return 0;
    const scale = SIZE / box.width;
    const x = (event.clientX - box.left) * scale - CENTRE;
    const y = CENTRE - (event.clientY - box.top) * scale;
    return Number((Math.atan2(y, x) / DEGREE).toFixed(1));
  }
  function onDown(event: PointerEvent): void {
    const mark = event.target instanceof Element ? event.target.closest('[data-detector]') : null;
    const found = placed[Number(mark?.getAttribute('data-detector') ?? -1)];
    if (!found) return;
    onChoose(found.index);
    if (readOnly) return;
    svg.current?.setPointerCapture(event.pointerId);
    setDragged(found.index);
  }
  return (
    <figure className="flex flex-col items-center">
      <svg
        ref={svg}
        viewBox={`0 0 ${SIZE} ${SIZE}`}
        className="w-full max-w-90 touch-none select-none"
        role="group"
        aria-label="Top view of beam, target and detectors"
        onPointerDown={onDown}
        onPointerMove={(event) => dragged !== null && turn(dragged, angleAt(event))}
        onPointerUp={() => setDragged(null)}
        onPointerCancel={() => setDragged(null)}
      >
        <circle
          cx={CENTRE}
          cy={CENTRE}
          r={CENTRE - EDGE}
          className="fill-none stroke-line"
          strokeDasharray="3 4"
        />
        <path d={`M6,${CENTRE}H${CENTRE - 8}`} className="stroke-barn" strokeWidth="2.5" />
        <path d={`M${CENTRE - 8},${CENTRE}l-7,-4v8z`} className="fill-barn" />
        <path
          d={`M${CENTRE + 8},${CENTRE}H${SIZE - 6}`}
          className="stroke-barn"
          strokeDasharray="2 5"
        />
        {plan.gas ? (
          <rect
            x={CENTRE - 12}
            y={CENTRE - 6}
            width="24"
            height="12"
            rx="3"
            className="fill-soft stroke-ink"
          />
        ) : (
          <path
            d={`M${CENTRE},${CENTRE - 16}V${CENTRE + 16}`}
            strokeWidth="4"
            className="stroke-ink"
            transform={`rotate(${-tilt} ${CENTRE} ${CENTRE})`}
          />
        )}
        {placed.map((one) => (
          <Mark
            key={one.index}
            placed={one}
            chosen={one.index === chosen}
            readOnly={readOnly}
            onChoose={() => onChoose(one.index)}
            onTurn={(angle) => turn(one.index, angle)}
          />
        ))}
        <Scale plan={plan} />
      </svg>
      <figcaption className="text-center text-xs text-muted">
        From above, to scale; the beam comes from the left.{' '}
        {!readOnly && (
          <span data-screen-only>
            Drag a detector, or move it with the arrow keys (with Shift by 0.1°).
          </span>
        )}
      </figcaption>
    </figure>
  );
}
