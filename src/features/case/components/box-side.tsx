import { useId, useState } from 'react';
import { convertQuantity } from '#src/components/convert-quantity.ts';
import { PlotHandle } from '#src/components/plot-handle.tsx';
import type { Estimate, GoldenRule } from '#shared/contracts/estimates.ts';
import { formatComposed } from '#shared/units/format.ts';
import { useEditing } from '../editing/editor-context.ts';
import { same } from '#src/lib/same.ts';
import { withGoldenRule } from '../model/table.ts';
import { takeValue } from '../model/typing.ts';
import { brief as briefError } from '../model/verdict.ts';
import { brief, briefQuantity } from '../model/words.ts';
import { NumberField, QuantityField } from './typed-fields.tsx';

interface Seen {
  /** Everything but the box that the last line depends on. */
  rest: unknown;
  boxSide: { value: number; unit: string };
  dcs: number;
}

const seenOf = (rule: GoldenRule, estimate: Estimate): Seen => ({
  rest: [estimate.kinematics, estimate.potential, rule.theta, estimate.units, estimate.frame],
  boxSide: rule.boxSide,
  dcs: rule.dcs.value,
});

/** The last result with another box and all else equal, against which the last line is held. */
function useOtherBox(now: Seen): Seen | null {
  const [pair, setPair] = useState<{ now: Seen; before: Seen | null }>({ now, before: null });
  const boxChanged = !same(pair.now.boxSide, now.boxSide);
  const restChanged = !same(pair.now.rest, now.rest);
  if (boxChanged || restChanged) {
    setPair({ now, before: restChanged ? null : pair.now });
  }
  return pair.before;
}

/** The side of the box: matrix element, density, rate and flux follow it, the last line must not. */
export function BoxSide({ rule, estimate }: { rule: GoldenRule; estimate: Estimate }) {
  const { draft, edit, readOnly } = useEditing();
  const sliderId = useId();
  const unit = estimate.units.angle;
  const before = useOtherBox(seenOf(rule, estimate));
  const asked = draft.document.goldenRule?.boxSide;
  const shown = asked ?? rule.boxSide;
  const inShown = (side: { value: number; unit: string }) =>
    briefQuantity(convertQuantity(side, shown.unit, 'length'), 4);
  const exponent = Math.log10(shown.value);
  const change = before ? Math.abs(rule.dcs.value - before.dcs) / Math.abs(before.dcs || 1) : null;
  return (
    <section aria-label="Box" className="rounded border border-line bg-sheet px-4.5 py-4">
      <div className="grid items-start gap-x-6 gap-y-3 sm:grid-cols-2 @3xl:grid-cols-[13rem_13rem_1fr]">
        <NumberField
          optional
          pointer="/goldenRule/theta"
          label={`Angle θ (${unit === 'deg' ? '°' : unit}, centre of mass)`}
          value={draft.document.goldenRule?.theta}
          rules={{ minimum: 0, what: 'The angle' }}
          put={(document, theta) => withGoldenRule(document, { theta })}
          hint={
            draft.document.goldenRule?.theta === undefined
              ? `The middle angle: ${brief(rule.theta)}.`
              : undefined
          }
        />
        <QuantityField
          optional
          pointer="/goldenRule/boxSide"
          label="Box side L"
          name="the box side, golden rule"
          dimension="length"
          value={asked}
          fallbackUnit={rule.boxSide.unit}
          rules={{ minimum: 0, exclusiveMinimum: true, what: 'The box side', unit: 'angstrom' }}
          put={(document, boxSide) => withGoldenRule(document, { boxSide })}
          hint={
            asked
              ? undefined
              : `Chosen by the engine: ${formatComposed(rule.boxSide.value, rule.boxSide.unit, 4)}.`
          }
        />
        <div>
          <label htmlFor={sliderId} className="text-sm text-muted">
            Move the walls
          </label>
          <PlotHandle
            id={sliderId}
            min={-3}
            max={7}
            step={0.05}
            value={Math.min(7, Math.max(-3, exponent))}
            disabled={readOnly}
            aria-valuetext={formatComposed(shown.value, shown.unit, 4)}
            onChange={(event) => {
              const value = Number((10 ** Number(event.target.value)).toPrecision(3));
              edit('/goldenRule/boxSide slider', (draftBefore) =>
                takeValue(draftBefore, '/goldenRule/boxSide', (document) =>
                  withGoldenRule(document, { boxSide: { value, unit: shown.unit } }),
                ),
              );
            }}
            className="my-2"
          />
          <p role="status" className="min-h-5 text-sm">
            {before && change !== null ? (
              <>
                {inShown(before.boxSide)} → {inShown(rule.boxSide)}: the last line{' '}
                {change === 0
                  ? 'did not change by a digit.'
                  : `changed by ${briefError(change)} of itself.`}
              </>
            ) : (
              <span className="text-muted">
                Lines 2 to 5 follow the box; the last line must not.
              </span>
            )}
          </p>
        </div>
      </div>
    </section>
  );
}
