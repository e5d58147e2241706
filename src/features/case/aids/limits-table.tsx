import { classNames } from '#src/lib/class-names.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { formatNumber, fullDigits, unitSymbol } from '#shared/units/format.ts';
import { brief } from '../model/verdict.ts';
import { judgeSides, readSide } from './model/limit-sides.ts';
import type { Limit, Reading } from './model/limit-sides.ts';

export interface LimitLine {
  limit: Limit;
  /** Expected and obtained; null where one of them was refused. */
  answers: readonly [Estimate, Estimate] | null;
  failure: string | null;
}

const cell = 'px-3 py-1.5 align-top';
const number = `${cell} text-right font-mono whitespace-nowrap`;

function Value({ reading }: { reading: Reading }) {
  return (
    <span title={fullDigits(reading.value)}>
      {formatNumber(reading.value, 8)}
      <span className="block font-sans text-xs text-muted">{unitSymbol(reading.unit)}</span>
    </span>
  );
}

function Cannot({ why }: { why: string }) {
  return (
    <td colSpan={4} className={cell}>
      <span className="font-semibold">Not shown.</span> {why}
    </td>
  );
}

function Compared({ line: { limit, answers, failure } }: { line: LimitLine }) {
  if (!answers) return <Cannot why={failure ?? 'There was no answer.'} />;
  const expected = readSide(answers[0], limit.expected);
  const obtained = readSide(answers[1], limit.obtained);
  if (typeof expected === 'string') return <Cannot why={expected} />;
  if (typeof obtained === 'string') return <Cannot why={obtained} />;
  const shown = judgeSides(expected, obtained, limit.within);
  if (!shown) return <Cannot why="The expected value is zero, so no deviation can be stated." />;
  const holds = shown.verdict === 'holds';
  return (
    <>
      <td
        className={classNames(
          cell,
          'font-semibold whitespace-nowrap',
          holds ? 'text-field' : 'text-fault',
        )}
      >
        {holds ? '● holds' : '○ departs'}
      </td>
      <td className={number}>
        <Value reading={expected} />
      </td>
      <td className={number}>
        <Value reading={obtained} />
      </td>
      <td className={number}>
        {brief(shown.deviation)}
        <span className="block font-sans text-xs text-muted">
          of {brief(shown.allowed)} allowed
        </span>
      </td>
    </>
  );
}

/** The verdict stands beside the limit, so that it is in sight on a narrow screen; the numbers follow. */
export function LimitsTable({ lines }: { lines: readonly LimitLine[] }) {
  return (
    <div
      className="overflow-x-auto rounded border border-line"
      tabIndex={0}
      role="region"
      aria-label="Limits of the case"
    >
      <table className="w-full min-w-[44rem] text-sm">
        <caption className="sr-only">
          Limiting forms: expected and obtained values, relative deviation, verdict
        </caption>
        <thead>
          <tr>
            <th scope="col" className={classNames(cell, 'text-left')}>
              Limit, and what must hold
            </th>
            <th scope="col" className={classNames(cell, 'text-left')}>
              Verdict
            </th>
            <th scope="col" className={classNames(cell, 'text-right')}>
              Expected
            </th>
            <th scope="col" className={classNames(cell, 'text-right')}>
              Obtained
            </th>
            <th scope="col" className={classNames(cell, 'text-right')}>
              Deviation
            </th>
          </tr>
        </thead>
        <tbody>
          {lines.map((line) => (
            <tr key={line.limit.key} className="border-t border-line">
              <th scope="row" className={classNames(cell, 'min-w-52 text-left font-normal')}>
                <span className="block font-semibold first-letter:uppercase">
                  {line.limit.limit}
                </span>
                <span className="block text-muted">{line.limit.holds}</span>
              </th>
              <Compared line={line} />
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
