import { classNames } from '#src/lib/class-names.ts';
import type { KinematicsTable as Table } from '#shared/contracts/aids.ts';
import { formatNumber, fullDigits } from '#shared/units/format.ts';
import { useEditing } from '../editing/editor-context.ts';
import { angleWithUnit } from './model/angle-words.ts';
import { kinematicsColumns, kinematicsLines, kinematicsRows } from './model/kinematics-rows.ts';
import { TakeRows } from './take-rows.tsx';
import { useLiveAids } from './use-aids.ts';

const head = 'sticky top-0 bg-sheet px-3 py-1.5 text-right font-semibold whitespace-nowrap';
const cell = 'px-3 py-0.5 text-right whitespace-nowrap';

function Lines({ table }: { table: Table }) {
  const columns = kinematicsColumns(table);
  return (
    <div
      className="max-h-80 overflow-auto rounded border border-line"
      tabIndex={0}
      role="region"
      aria-label="Table of kinematics"
    >
      <table className="w-full font-mono text-sm">
        <caption className="sr-only">
          Angles and kinetic energies of both particles; energies in the lab
        </caption>
        <thead>
          <tr className="font-sans">
            {columns.map(({ key, name }) => (
              <th key={key} scope="col" className={head}>
                {name}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {kinematicsLines(table).map(({ key, way, theta }) => (
            <tr key={key} className="even:bg-soft/60">
              {way === null ? (
                <td colSpan={columns.length} className="px-3 py-0.5 font-sans text-muted">
                  {angleWithUnit(theta, table.unit.angle)} cannot be reached in the lab.
                </td>
              ) : (
                columns.map((column) => {
                  const value = column.value(way);
                  return (
                    <td
                      key={column.key}
                      className={cell}
                      title={value === null ? undefined : fullDigits(value)}
                    >
                      {value === null ? '∞' : formatNumber(value, 6)}
                    </td>
                  );
                })
              )}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** Angles and energies of both partners at the angles of the case: where to put a detector, and what it sees. */
export function KinematicsTable({ fileName }: { fileName: string }) {
  const { draft } = useEditing();
  const { aids, stale, failure } = useLiveAids({ kinematics: true });
  const table = aids?.kinematics;
  if (failure !== null) return <p className="text-sm text-fault">{failure}</p>;
  if (!table) return <p className="text-muted">Computing …</p>;
  const fixed = draft.document.target.kind === 'fixed';
  return (
    <div
      aria-busy={stale || undefined}
      className={classNames('flex flex-col gap-2', stale && 'stale')}
    >
      <p className="max-w-prose text-sm">
        {fixed
          ? 'A fixed centre takes no energy and does not move: lab and centre of mass are one frame.'
          : 'Energies are kinetic, in the lab; K is the share the projectile keeps. An angle of the lab that two branches lead to has two lines.'}{' '}
        {table.largestLabAngle !== null &&
          `The projectile never leaves ${angleWithUnit(table.largestLabAngle, table.unit.angle)} in the lab.`}
      </p>
      <TakeRows fileName={`${fileName}-kinematics`} rows={() => kinematicsRows(table)} />
      <Lines table={table} />
    </div>
  );
}
