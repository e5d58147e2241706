import { Button } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import { MAX_ORIGINAL, MAX_POINTS } from '#shared/contracts/terms.ts';
import { unitSymbol } from '#shared/units/format.ts';
import { digits } from '../model/words.ts';
import type { LineFault } from './model/read-table.ts';
import type { TableReading } from './use-table-reading.ts';

const MOST_FAULTS = 6;
const AHEAD = 4;
const BEHIND = 2;

function Lines({ faults }: { faults: readonly LineFault[] }) {
  const more = faults.length - MOST_FAULTS;
  return (
    <ul>
      {faults.slice(0, MOST_FAULTS).map(({ line, message }) => (
        <li key={line}>
          Line {line}: {message}
        </li>
      ))}
      {more > 0 && <li>And {more} more.</li>}
    </ul>
  );
}

/** A tick that passes over the lines that are no row, and says which. */
function LeaveOut({ reading }: { reading: TableReading }) {
  const { read, leftOut, decide } = reading;
  const count = read.leavable.length;
  if (count === 0) return null;
  return (
    <label className="mt-1.5 flex items-baseline gap-2">
      <input
        type="checkbox"
        className="size-4 shrink-0 translate-y-0.5 accent-barn"
        checked={leftOut}
        onChange={(event) => decide({ leftOut: event.target.checked })}
      />
      <span>
        {count === 1 ? 'Leave this line out' : `Leave these ${count} lines out`}
        <span className="block text-sm text-muted">
          {reading.kept
            ? 'The text is kept with the case as it is, every line of it.'
            : 'What you pasted or chose stays as it is.'}
        </span>
      </span>
    </label>
  );
}

/** What is wrong, line by line, and the mend that is at hand. */
function Faults({ reading }: { reading: TableReading }) {
  const { raw, read, refusal, leftOut, decide, cut } = reading;
  const out = leftOut ? read.leavable.length : 0;
  const count = read.faults.length;
  return (
    <>
      {refusal !== null && <Notice tone="fault">{refusal}</Notice>}
      {refusal === null && raw.ambiguous !== null && (
        <Notice
          tone="fault"
          title={`“${raw.ambiguous}” may be ${raw.ambiguous.replace(',', '.')} or ${raw.ambiguous.replace(',', '')}.`}
          actions={
            <Button size="small" onClick={() => cut({ decimal: 'comma' })}>
              The comma is a decimal sign
            </Button>
          }
        >
          Every number with a comma has three digits behind it. If it separates thousands, remove it
          from the text.
        </Notice>
      )}
      {refusal === null && count > 0 && (
        <Notice
          tone="fault"
          title={`${count} ${count === 1 ? 'line needs' : 'lines need'} mending.`}
          actions={
            read.unsorted && (
              <Button size="small" onClick={() => decide({ sorted: true })}>
                Sort the rows by r
              </Button>
            )
          }
        >
          <Lines faults={read.faults} />
          {!leftOut && <LeaveOut reading={reading} />}
        </Notice>
      )}
      {raw.refused === null && out > 0 && (
        <Notice tone="attention" title={`${out} ${out === 1 ? 'line is' : 'lines are'} left out.`}>
          <Lines faults={read.leavable} />
          <LeaveOut reading={reading} />
        </Notice>
      )}
    </>
  );
}

function Remarks({ reading }: { reading: TableReading }) {
  const { raw, read, rows, kept, sorted, sound } = reading;
  const said = [
    `${read.rows.length} rows read.`,
    raw.header && 'A line of names stands above them.',
    raw.remarks > 0 && `${raw.remarks} lines of remarks are passed over.`,
    sorted && 'The rows are sorted by r.',
    rows.length < read.rows.length &&
      `At most ${MAX_POINTS} rows are taken: ${rows.length} are kept, evenly through the table, first and last among them.`,
    sound &&
      !kept &&
      `The text is longer than ${MAX_ORIGINAL} characters, so the case keeps the rows and not the original.`,
  ].filter((text) => typeof text === 'string');
  return <p className="text-sm text-muted">{said.join(' ')}</p>;
}

/** The first and last rows as they are understood. */
function Rows({ reading }: { reading: TableReading }) {
  const { rows, lengthUnit, energyUnit } = reading;
  if (rows.length === 0) return null;
  const whole = rows.length <= AHEAD + BEHIND + 1;
  const shown = whole ? rows : [...rows.slice(0, AHEAD), null, ...rows.slice(-BEHIND)];
  return (
    <table className="w-full text-sm">
      <caption className="text-left text-muted">Rows as they are read</caption>
      <thead>
        <tr className="border-b border-line text-left">
          <th scope="col" className="py-0.5 pr-3 font-normal">
            r ({unitSymbol(lengthUnit)})
          </th>
          <th scope="col" className="py-0.5 font-normal">
            V ({unitSymbol(energyUnit)})
          </th>
        </tr>
      </thead>
      <tbody className="font-mono">
        {shown.map((row, i) =>
          row === null ? (
            <tr key="between">
              <td colSpan={2} className="text-muted">
                … {rows.length - AHEAD - BEHIND} rows …
              </td>
            </tr>
          ) : (
            <tr key={i}>
              <td className="pr-3">{digits(row[0])}</td>
              <td>{digits(row[1])}</td>
            </tr>
          ),
        )}
      </tbody>
    </table>
  );
}

/** What came of the text: faults, remarks, rows. */
export function TableFindings({ reading }: { reading: TableReading }) {
  if (reading.source.text.trim() === '') {
    return <p className="text-sm text-muted">Paste rows of r and V, or choose a file.</p>;
  }
  return (
    <div className="flex flex-col gap-2" role="status">
      <Faults reading={reading} />
      <Remarks reading={reading} />
      <Rows reading={reading} />
    </div>
  );
}
