import { useState } from 'react';
import { Button } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import { MAX_DETECTORS } from '#shared/contracts/run-plans.ts';
import type { RunPlanBody } from '#shared/contracts/run-plans.ts';
import { readPlainNumber } from '../model/typing.ts';
import { withSeries } from './model/plan.ts';

type Key = 'from' | 'to' | 'step';
const LABELS: Record<Key, string> = { from: 'From', to: 'To', step: 'Step' };
const KEYS: readonly Key[] = ['from', 'to', 'step'];

interface SeriesDialogProps {
  onClose: () => void;
  onMake: (change: (plan: RunPlanBody) => RunPlanBody) => void;
}

function read(key: Key, text: string): { value: number } | { problem: string } {
  const what = key === 'step' ? 'The step' : 'The angle';
  const rules =
    key === 'step'
      ? { minimum: 0, exclusiveMinimum: true, maximum: 180, what }
      : { minimum: -180, maximum: 180, what };
  const reading = readPlainNumber(text, rules);
  return 'waiting' in reading ? { problem: 'Type a number.' } : reading;
}

/** Positions of one detector at even steps. */
export function SeriesDialog({ onClose, onMake }: SeriesDialogProps) {
  const [texts, setTexts] = useState<Record<Key, string>>({ from: '20', to: '160', step: '20' });
  const found = {
    from: read('from', texts.from),
    to: read('to', texts.to),
    step: read('step', texts.step),
  };
  const { from, to, step } = found;
  const series =
    'value' in from && 'value' in to && 'value' in step
      ? { from: from.value, to: to.value, step: step.value }
      : null;
  const count = series ? Math.floor((series.to - series.from) / series.step + 1e-9) + 1 : 0;
  const wrong =
    series && count < 1
      ? 'The last angle must not lie before the first.'
      : count > MAX_DETECTORS
        ? `At most ${MAX_DETECTORS} detectors in one plan; take a larger step.`
        : null;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Angle series"
      description="One detector at even steps of the lab angle, in place of all detectors of this plan. Opening, efficiency, dead time and background are those of the first one."
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button
            look="primary"
            disabled={!series || wrong !== null}
            onClick={() => series && onMake((plan) => withSeries(plan, series))}
          >
            Make {count > 0 && wrong === null ? `${count} positions` : 'positions'}
          </Button>
        </>
      }
    >
      <div className="grid grid-cols-3 gap-3">
        {KEYS.map((key) => {
          const entry = found[key];
          return (
            <Field
              key={key}
              label={`${LABELS[key]} (°)`}
              error={'problem' in entry ? entry.problem : undefined}
            >
              {(control) => (
                <TextInput
                  {...control}
                  inputMode="decimal"
                  className="font-mono"
                  value={texts[key]}
                  onChange={(event) => setTexts({ ...texts, [key]: event.target.value })}
                />
              )}
            </Field>
          );
        })}
      </div>
      {wrong !== null && <p className="text-sm text-fault">{wrong}</p>}
    </Dialog>
  );
}
