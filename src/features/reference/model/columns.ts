import type { ReactNode } from 'react';
import { withBrackets } from '#shared/units/brackets.ts';
import { unitSymbol } from '#shared/units/format.ts';

export interface MeasuredNumber {
  value: number;
  uncertainty?: number | undefined;
}

/** One column of a reference table: how it is headed, shown, sorted and written to a file. */
export interface Column<T> {
  key: string;
  /** Heading, as short as the trade has it. */
  title: string;
  /** The same for files and for those who hear the page, where the heading is a sign. */
  spoken?: string;
  unit?: string;
  sortable?: boolean;
  /** A first click shows the largest. */
  firstFalls?: boolean;
  /** A number, set on the decimal point. */
  number?: (item: T) => MeasuredNumber | null;
  /** Anything else. */
  text?: (item: T) => string;
  /** How it is shown where the bare text is not enough. */
  cell?: (item: T) => ReactNode;
  /** Shown on wide screens only; files have it always. */
  wide?: boolean;
  /** Not on the page: too long for a row, or said elsewhere. */
  fileOnly?: boolean;
  /** This column names the row. */
  names?: boolean;
}

export function headingOf<T>({ title, unit }: Column<T>): string {
  return unit === undefined ? title : `${title} (${unitSymbol(unit)})`;
}

export function textOf<T>(column: Column<T>, item: T): string {
  if (column.text) return column.text(item);
  const found = column.number?.(item) ?? null;
  return found === null ? '' : withBrackets(found.value, found.uncertainty);
}

/** One row as a line to paste elsewhere: each value with its name and unit. */
export function lineOf<T>(columns: ReadonlyArray<Column<T>>, item: T): string {
  return columns
    .flatMap((column) => {
      const text = textOf(column, item);
      if (text === '') return [];
      if (column.names) return [text];
      const unit = column.unit === undefined ? '' : ` ${unitSymbol(column.unit)}`;
      return [`${column.spoken ?? column.title} ${text}${unit}`];
    })
    .join('\t');
}

/** A file of the table: a row of names, a row of units, then one row an entry; uncertainties in columns of their own. */
export function fileRows<T>(columns: ReadonlyArray<Column<T>>, items: readonly T[]): string[][] {
  const measured = new Set(
    columns
      .filter(
        ({ number }) => number && items.some((item) => number(item)?.uncertainty !== undefined),
      )
      .map(({ key }) => key),
  );
  const spread = <R>(column: Column<T>, value: R, uncertainty: R): R[] =>
    measured.has(column.key) ? [value, uncertainty] : [value];
  const names = columns.flatMap((column) => {
    const name = column.spoken ?? column.title;
    return spread(column, name, `standard uncertainty of ${name}`);
  });
  const units = columns.flatMap((column) => spread(column, column.unit ?? '', column.unit ?? ''));
  const rows = items.map((item) =>
    columns.flatMap((column) => {
      if (!column.number) return [textOf(column, item)];
      const found = column.number(item);
      const plain = (number: number | undefined) => (number === undefined ? '' : String(number));
      return spread(column, plain(found?.value), plain(found?.uncertainty));
    }),
  );
  return [names, units, ...rows];
}
