import { useState } from 'react';
import { Segmented } from '#src/components/segmented.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import { formatNumber } from '#shared/units/format.ts';
import { Power } from '#src/components/figure.tsx';
import { TakeRows } from '../aids/take-rows.tsx';
import { readPlainNumber } from '../model/typing.ts';
import type { NumberRules } from '../model/typing.ts';
import { Panel, TableBox } from '../validity/panel.tsx';
import { Time } from './amount.tsx';
import { percentText, timeText } from './model/numbers.ts';
import { sheetInTime, sheetToAim } from './model/run-sheet.ts';
import type { Sheet, SheetRules } from './model/run-sheet.ts';
import { clockText, sheetRows, shiftText } from './model/sheet-rows.ts';
import { Cell, HeadCells, NameCell } from './table-cells.tsx';

type Key = 'shift' | 'lostInShift' | 'setUp';

const FIELDS: readonly { key: Key; label: string; rules: NumberRules; seconds: number }[] = [
  {
    key: 'shift',
    label: 'Length of a shift (h)',
    rules: { minimum: 0, exclusiveMinimum: true, maximum: 168, what: 'The shift' },
    seconds: 3600,
  },
  {
    key: 'lostInShift',
    label: 'Lost in each shift (min)',
    rules: { minimum: 0, what: 'The time lost' },
    seconds: 60,
  },
  {
    key: 'setUp',
    label: 'Set-up at each position (min)',
    rules: { minimum: 0, what: 'The set-up' },
    seconds: 60,
  },
];

type Texts = Record<Key, string>;

/** The rules typed, and what is wrong with each; null rules until all of them hold. */
function readRules(texts: Texts): { rules: SheetRules | null; problems: Partial<Texts> } {
  const problems: Partial<Texts> = {};
  const values: Partial<Record<Key, number>> = {};
  for (const { key, rules, seconds } of FIELDS) {
    const reading = readPlainNumber(texts[key], rules);
    if ('value' in reading) values[key] = reading.value * seconds;
    else if ('problem' in reading) problems[key] = reading.problem;
  }
  const { shift, lostInShift, setUp } = values;
  if (shift !== undefined && lostInShift !== undefined && !(lostInShift < shift)) {
    problems.lostInShift = 'More is lost than a shift has.';
  }
  const sound = Object.keys(problems).length === 0;
  return sound && shift !== undefined && lostInShift !== undefined && setUp !== undefined
    ? { rules: { shift, lostInShift, setUp }, problems }
    : { rules: null, problems };
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

/** Positions in the order of the shortest way, when each begins, and in which shift. */
export function RunSheet({ plan, fileName }: { plan: RunPlan; fileName: string }) {
  const [texts, setTexts] = useState<Texts>({ shift: '8', lostInShift: '30', setUp: '10' });
  const [wish, setWish] = useState<'time' | 'aim'>('time');
  const { rules, problems } = readRules(texts);
  const inTime = plan.aim.beamTime !== undefined && wish === 'time';
  const sheet = rules && (inTime ? sheetInTime(plan, rules) : sheetToAim(plan, rules));
  return (
    <Panel
      title="Run sheet"
      says="One position after the other, in one sweep of the angle; sample and blank at each stop. The overheads are for this sheet alone and are not saved."
    >
      <div className="flex flex-col gap-3">
        {plan.aim.beamTime && (
          <div data-screen-only>
            <Segmented
              label="What the sheet is for"
              value={wish}
              choices={[
                { value: 'time', label: 'equal precision in the beam time' },
                { value: 'aim', label: 'the precision aimed at' },
              ]}
              onChange={setWish}
            />
          </div>
        )}
        <div className="grid items-start gap-3 @xs:grid-cols-3" data-screen-only>
          {FIELDS.map(({ key, label }) => (
            <Field key={key} label={label} error={problems[key]}>
              {(control) => (
                <TextInput
                  {...control}
                  inputMode="decimal"
                  autoComplete="off"
                  className="font-mono"
                  value={texts[key]}
                  onChange={(event) => setTexts({ ...texts, [key]: event.target.value })}
                />
              )}
            </Field>
          ))}
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
