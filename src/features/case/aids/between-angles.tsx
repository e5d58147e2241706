import { useState } from 'react';
import { Field, TextInput } from '#src/components/field.tsx';
import { AreaUnitMenu, Figure } from '#src/components/figure.tsx';
import { classNames } from '#src/lib/class-names.ts';
import type { ElasticBetween } from '#shared/contracts/aids.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { formatNumber, fullDigits } from '#shared/units/format.ts';
import { useEditing } from '../editing/editor-context.ts';
import { anglesOf } from '../model/table.ts';
import { numericsText } from '../model/verdict.ts';
import { FRAME_NAMES } from '../model/words.ts';
import { useAidsState } from './aids-context.ts';
import type { AngleRange } from './aids-context.ts';
import { angleWithUnit } from './model/angle-words.ts';
import { rangeOver, readEnd } from './model/angle-range.ts';
import { useLiveAids } from './use-aids.ts';

interface EndFieldProps {
  label: string;
  value: number;
  unit: string;
  /** Why this end does not go with the other one. */
  clash: string | null;
  onValue: (value: number) => void;
}

/** One end of the range; arrow keys move it by a degree, or by ten with Shift. */
function EndField({ label, value, unit, clash, onValue }: EndFieldProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const step = unit === 'deg' ? 1 : unit === 'mrad' ? 10 : 0.01;
  const reading = typed === null ? null : readEnd(typed, label, unit);
  // What was typed stands until the range is moved by other means.
  const current = reading && ('problem' in reading || reading.value === value) ? reading : null;
  function take(text: string): void {
    setTyped(text);
    const next = readEnd(text, label, unit);
    if ('value' in next) onValue(next.value);
  }
  const problem = current && 'problem' in current ? current.problem : clash;
  return (
    <Field label={`${label} (${unit === 'deg' ? '°' : unit})`} error={problem}>
      {(control) => (
        <TextInput
          {...control}
          inputMode="decimal"
          autoComplete="off"
          className="font-mono"
          value={current ? (typed ?? '') : fullDigits(value)}
          onChange={(event) => take(event.target.value)}
          onKeyDown={(event) => {
            const way = event.key === 'ArrowUp' ? 1 : event.key === 'ArrowDown' ? -1 : 0;
            if (way === 0) return;
            event.preventDefault();
            const moved = value + way * step * (event.shiftKey ? 10 : 1);
            take(fullDigits(Number(moved.toPrecision(12))));
          }}
        />
      )}
    </Field>
  );
}

function Halved({
  found,
  unit,
}: {
  found: Extract<ElasticBetween, { value: number }>;
  unit: string;
}) {
  if (!found.fromHalf) return null;
  const { from, ratio } = found.fromHalf;
  return (
    <p>
      The cross section grows without limit towards smaller angles: from {angleWithUnit(from, unit)}{' '}
      in place of {angleWithUnit(found.from, unit)} this is {formatNumber(ratio, 4)} times as much.
      Halving a small lowest angle about quadruples it for a bare Coulomb potential, so quote the
      angle with the number.
    </p>
  );
}

function Answer({ found, estimate }: { found: ElasticBetween; estimate: Estimate }) {
  const { areaUnit, setAreaUnit } = useEditing();
  const { angle } = estimate.units;
  const where = `elastic between ${angleWithUnit(found.from, angle)} and ${angleWithUnit(found.to, angle)}, ${FRAME_NAMES[estimate.frame]}`;
  if ('divergent' in found) {
    return (
      <div>
        <p className="text-sm text-muted">{where}</p>
        <p className="text-lg font-semibold">divergent</p>
        <p className="text-sm">{found.reason} Begin above zero for the finite part.</p>
      </div>
    );
  }
  const factor = composedFactor(found.unit, areaUnit);
  const { relativeError, absoluteError } = found;
  return (
    <div className="flex flex-col gap-1.5">
      <div>
        <p className="text-sm text-muted">{where}</p>
        <Figure
          size="large"
          label="Elastic between the two angles"
          value={found.value * factor}
          unit={areaUnit}
          unitMenu={
            <AreaUnitMenu
              unit={areaUnit}
              onChange={setAreaUnit}
              label="Unit of the elastic cross section between two angles"
            />
          }
        />
        <span className="block text-xs text-muted">
          first Born ·{' '}
          {numericsText({
            relativeError,
            absoluteError: absoluteError === undefined ? undefined : absoluteError * factor,
          })}
        </span>
      </div>
      <div className="flex max-w-prose flex-col gap-1 text-sm">
        <Share found={found} estimate={estimate} />
        <Halved found={found} unit={angle} />
        {found.remarks.map((remark) => (
          <p key={remark}>{remark}</p>
        ))}
      </div>
    </div>
  );
}

/** What part of all elastic scattering it is, where that has a value. */
function Share({
  found,
  estimate,
}: {
  found: Extract<ElasticBetween, { value: number }>;
  estimate: Estimate;
}) {
  const born = estimate.methods.born1;
  if (!born || 'unavailable' in born || 'divergent' in born.elastic || estimate.identical)
    return null;
  const share = (100 * found.value) / born.elastic.value;
  if (!Number.isFinite(share)) return null;
  return <p>{formatNumber(share, 3)} % of the elastic total.</p>;
}

/** How much scatters between two angles: marked on the plot by dragging, or typed. */
export function BetweenAngles() {
  const { draft } = useEditing();
  const { range, setRange } = useAidsState();
  const angles = anglesOf(draft.document);
  const { unit } = angles;
  const shown = rangeOver(angles, range);
  const { from, to } = shown;
  const clash = to > from ? null : 'The range must end above where it begins.';
  const { aids, estimate, stale, failure } = useLiveAids(
    { angleRange: { from, to } },
    {
      enabled: clash === null,
      change: (document) => ({ ...document, angles: { unit, values: [to] } }),
    },
  );
  const found = aids?.elasticBetween;
  const put = (end: Partial<AngleRange>) => setRange({ ...shown, ...end });
  return (
    <div className="grid gap-x-6 gap-y-3 @2xl:grid-cols-[17rem_minmax(0,1fr)]">
      <div className="flex flex-col gap-2">
        <div className="grid grid-cols-2 gap-3">
          <EndField
            label="From"
            value={from}
            unit={unit}
            clash={null}
            onValue={(end) => put({ from: end })}
          />
          <EndField
            label="To"
            value={to}
            unit={unit}
            clash={clash}
            onValue={(end) => put({ to: end })}
          />
        </div>
        <p className="text-xs text-muted">
          Drag over the plot to mark a range, or type it; arrow keys move an end.
        </p>
      </div>
      <div
        aria-busy={stale || undefined}
        aria-live="polite"
        className={classNames(stale && 'stale')}
      >
        {failure !== null && <p className="text-sm text-fault">{failure}</p>}
        {found && estimate && failure === null && 'unavailable' in found && (
          <p className="text-sm">{found.reason}</p>
        )}
        {found && estimate && failure === null && !('unavailable' in found) && (
          <Answer found={found} estimate={estimate} />
        )}
      </div>
    </div>
  );
}
