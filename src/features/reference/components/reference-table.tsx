import { Fragment, type ReactNode } from 'react';
import { ArrowDown, ArrowUp, ChevronsUpDown } from 'lucide-react';
import { Link } from 'react-router-dom';
import { classNames } from '#src/lib/class-names.ts';
import type { ReferenceStart } from '#src/lib/reference-start.ts';
import type { TableAddress } from '../address.ts';
import { aligned } from '../model/align.ts';
import { headingOf, lineOf, textOf, type Column } from '../model/columns.ts';
import { RowActions } from './row-actions.tsx';

function Heading<T>({ column, address }: { column: Column<T>; address: TableAddress }) {
  const { key, number, sortable, firstFalls = false, wide, names, spoken } = column;
  const sort = address.query['sort'];
  const rising = sort === key;
  const falling = sort === `-${key}`;
  const next = rising || (firstFalls && !falling) ? `-${key}` : key;
  const Arrow = rising ? ArrowUp : falling ? ArrowDown : ChevronsUpDown;
  const text = headingOf(column);
  return (
    <th
      scope="col"
      {...(sortable && { 'aria-sort': rising ? 'ascending' : falling ? 'descending' : 'none' })}
      className={classNames(
        'px-3 py-2 align-bottom font-semibold whitespace-nowrap',
        number && 'text-right',
        wide && 'max-lg:hidden',
        names && 'sticky left-0 z-1 bg-sheet',
      )}
    >
      {sortable ? (
        <Link
          to={address.hrefWith({ sort: next })}
          state={{ keepFocus: true }}
          className={classNames(
            'inline-flex items-center gap-1 rounded hover:text-ink',
            (rising || falling) && 'text-ink',
          )}
        >
          {text}
          {spoken && <span className="sr-only">, {spoken}</span>}
          <Arrow aria-hidden="true" className="size-3.5 shrink-0" />
        </Link>
      ) : (
        text
      )}
    </th>
  );
}

function Cell<T>({ column, item, text }: { column: Column<T>; item: T; text: string }) {
  const { number, cell, wide, names } = column;
  const content: ReactNode = cell ? cell(item) : text;
  const className = classNames(
    'px-3 py-1.5 align-top',
    number ? 'text-right font-mono text-sm whitespace-pre' : 'text-left',
    wide && 'max-lg:hidden',
  );
  if (names) {
    return (
      <th
        scope="row"
        className={classNames(
          className,
          'sticky left-0 z-1 bg-sheet font-semibold group-hover:bg-soft max-sm:max-w-44',
        )}
      >
        {content}
      </th>
    );
  }
  return (
    <td className={className}>
      {text === '' && !cell ? <span className="font-sans text-muted">–</span> : content}
    </td>
  );
}

/** Held in sight while the columns above it are scrolled. */
function Below({ content, columns }: { content: ReactNode; columns: number }) {
  if (content === null) return null;
  return (
    <tr className="lg:hidden">
      <td colSpan={columns} className="p-0">
        <div className="sticky left-0 w-[min(36rem,100vw-2.25rem)] px-3 pb-2">{content}</div>
      </td>
    </tr>
  );
}

interface ReferenceTableProps<T> {
  /** Spoken name of the table. */
  label: string;
  columns: ReadonlyArray<Column<T>>;
  items: readonly T[];
  nameOf: (item: T) => string;
  startOf: (item: T) => ReferenceStart | null;
  /** What stands under a row where the screen is too narrow for its column. */
  below?: ((item: T) => ReactNode) | undefined;
  address: TableAddress;
  /** The rows are of the last question while the next answer is on its way. */
  dimmed: boolean;
}

/** Numbers on their decimal points, names in a column that stays while the rest scrolls below it on a narrow screen. */
export function ReferenceTable<T>(props: ReferenceTableProps<T>) {
  const { label, items, nameOf, startOf, below, address, dimmed } = props;
  const columns = props.columns.filter(({ fileOnly }) => !fileOnly);
  const texts = columns.map((column) => {
    const plain = items.map((item) => textOf(column, item));
    return column.number ? aligned(plain) : plain;
  });
  return (
    <div
      role="region"
      aria-label={label}
      // A region that scrolls must be reached by the keyboard.
      tabIndex={0}
      aria-busy={dimmed}
      className={classNames(
        'relative overflow-x-auto rounded border border-line bg-sheet',
        dimmed && 'stale',
      )}
    >
      <table className="w-full border-collapse">
        <caption className="sr-only">{label}</caption>
        <thead className="border-b border-line text-sm text-muted">
          <tr className="text-left">
            {columns.map((column) => (
              <Heading key={column.key} column={column} address={address} />
            ))}
            <td className="w-px" data-screen-only />
          </tr>
        </thead>
        <tbody>
          {items.map((item, row) => (
            <Fragment key={nameOf(item)}>
              <tr className="group border-t border-line/70 first:border-t-0 hover:bg-soft">
                {columns.map((column, place) => (
                  <Cell
                    key={column.key}
                    column={column}
                    item={item}
                    text={texts[place]?.[row] ?? ''}
                  />
                ))}
                <td className="px-2 py-0.5 align-top" data-screen-only>
                  <RowActions
                    name={nameOf(item)}
                    line={lineOf(props.columns, item)}
                    start={startOf(item)}
                  />
                </td>
              </tr>
              <Below content={below?.(item) ?? null} columns={columns.length + 1} />
            </Fragment>
          ))}
        </tbody>
      </table>
    </div>
  );
}
