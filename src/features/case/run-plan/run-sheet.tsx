import { useState } from 'react';
import { Segmented } from '#src/components/segmented.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import type { RunPlan, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { formatNumber } from '#shared/units/format.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import { Power } from '#src/components/figure.tsx';
import { TakeRows } from '../aids/take-rows.tsx';
import { QuantityField } from '../components/typed-fields.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { readPlainNumber } from '../model/typing.ts';
import type { NumberRules } from '../model/typing.ts';
import { Panel, TableBox } from '../validity/panel.tsx';
import { Time } from './amount.tsx';
import { putIn } from './model/plan.ts';
import { percentText, timeText } from './model/numbers.ts';
import { sheetInTime, sheetToAim } from './model/run-sheet.ts';
import type { Sheet } from './model/run-sheet.ts';
import { clockText, sheetRows, shiftText } from './model/sheet-rows.ts';
import { Cell, HeadCells, NameCell } from './table-cells.tsx';

const LOST: NumberRules = { minimum: 0, what: 'The time lost' };
const DEFAULT_SHIFT = 8 * 3600;

const secondsOf = (q: Quantity | undefined): number | undefined =>
  q && q.value * (UNITS.time[q.unit] ?? 1);

/** Shifts and set-up of the plan, saved with it, and what each shift loses, for this sheet alone. */
function readLost(text: string, shift: number): { seconds: number } | { problem: string } {
  const reading = readPlainNumber(text, LOST);
  if (!('value' in reading)) return { problem: 'problem' in reading ? reading.problem : '' };
  const seconds = 60 * reading.value;
  return seconds < shift ? { seconds } : { problem: 'More is lost than a shift has.' };
}

function Overheads({ plan }: { plan: RunPlanBody }) {
  const above = { minimum: 0, unit: 's' };
  return (
    <>
      <QuantityField
        optional
        pointer="/runPlan/aim/shift"
        label="Length of a shift"
        name="the shift"
        dimension="time"
        value={plan.aim?.shift}
        fallbackUnit="h"
        rules={{ ...above, exclusiveMinimum: true, what: 'The shift' }}
        put={putIn('aim', 'shift')}
        hint="8 h where it is left empty."
      />
      <QuantityField
        optional
        pointer="/runPlan/aim/setupTime"
        label="Set-up at each position"
        name="the set-up"
        dimension="time"
        value={plan.aim?.setupTime}
        fallbackUnit="min"
        rules={{ ...above, what: 'The set-up' }}
        put={putIn('aim', 'setupTime')}
        hint="Moving, pumping, checking."
      />
    </>
  );
}

function Lines({ sheet }: { sheet: Sheet }) {
  return (
    <TableBox label="Table of the run sheet">
      <table className="w-full text-sm">
        <caption className="sr-only">Positions in the order they are measured</caption>
        <HeadCells
          heads={[
            ['position'],
            ['angle', 'lab'],
            ['target'],
            ['start', 'h:min'],
            ['count for'],
            ['counts', 'expected'],
            ['shift'],
          ]}
        />
        <tbody>
          {sheet.lines.map(({ name, angle, what, start, time, counts, shifts }) => (
            <tr key={`${name} ${what}`} className="even:bg-soft/60">
              <NameCell>{name}</NameCell>
              <Cell>{formatNumber(angle, 5)}°</Cell>
              <Cell>{what}</Cell>
              <Cell>{clockText(start)}</Cell>
              <Cell>
                <Power text={timeText(time)} />
              </Cell>
              <Cell>{counts === null ? '—' : <Power text={formatNumber(counts, 4)} />}</Cell>
              <Cell>{shiftText(shifts)}</Cell>
            </tr>
          ))}
        </tbody>
      </table>
    </TableBox>
  );
}

function SheetBody({ sheet, fileName }: { sheet: Sheet; fileName: string }) {
  const { precision, whole, counting, shifts } = sheet;
  return (
    <div className="flex flex-col gap-2">
      <p>
        Every position reaches <span className="font-mono">{percentText(precision)}</span> in{' '}
        <span className="font-mono">
          <Time seconds={whole} />
        </span>{' '}
        by the clock, <span className="font-mono">{shifts}</span>{' '}
        {shifts === 1 ? 'shift' : 'shifts'}; the beam is used for{' '}
        <span className="font-mono">
          <Time seconds={counting} />
        </span>
        .
      </p>
      <Lines sheet={sheet} />
      <div className="flex justify-end" data-screen-only>
        <TakeRows fileName={`${fileName}-run-sheet`} rows={() => sheetRows(sheet)} />
      </div>
    </div>
  );
}

interface RunSheetProps {
  plan: RunPlanBody;
  answer: RunPlan;
  fileName: string;
}

/** Positions in the order of the shortest way, when each begins, and in which shift. */
export function RunSheet({ plan, answer, fileName }: RunSheetProps) {
  const { readOnly } = useEditing();
  const [lostText, setLostText] = useState('0');
  const [wish, setWish] = useState<'time' | 'aim'>('time');
  const shift = secondsOf(plan.aim?.shift) ?? DEFAULT_SHIFT;
  const lost = readLost(lostText, shift);
  const inTime = answer.aim.beamTime !== undefined && wish === 'time';
  const lay = inTime ? sheetInTime : sheetToAim;
  const setUp = secondsOf(plan.aim?.setupTime) ?? 0;
  const sheet = 'problem' in lost ? null : lay(answer, { shift, lostInShift: lost.seconds, setUp });
  return (
    <Panel
      title="Run sheet"
      says="One position after the other, in one sweep of the angle; sample and blank at each stop."
    >
      <div className="flex flex-col gap-3">
        {answer.aim.beamTime && (
          <div data-screen-only>
            <Segmented
              label="What the sheet is for"
              value={wish}
              choices={[
                { value: 'time', label: 'the time there is' },
                { value: 'aim', label: 'the precision' },
              ]}
              onChange={setWish}
            />
          </div>
        )}
        <div className="grid items-start gap-3 @lg:grid-cols-3" data-screen-only>
          <Overheads plan={plan} />
          <Field
            label="Lost in each shift (min)"
            hint={readOnly ? undefined : 'For this sheet alone, not saved.'}
            error={'problem' in lost ? lost.problem : undefined}
          >
            {(control) => (
              <TextInput
                {...control}
                inputMode="decimal"
                autoComplete="off"
                className="font-mono"
                value={lostText}
                onChange={(event) => setLostText(event.target.value)}
              />
            )}
          </Field>
        </div>
        {sheet &&
          ('reason' in sheet ? (
            <p>{sheet.reason}</p>
          ) : (
            <SheetBody sheet={sheet} fileName={fileName} />
          ))}
      </div>
    </Panel>
  );
}
