import type { ScanResult } from '#shared/contracts/scans.ts';
import { namesOf } from './pointer.ts';

function cell(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** The last name of the pointer, or all of it where two axes would be called the same. */
function columnNames(axes: ScanResult['axes']): string[] {
  const short = axes.map(({ path }) => namesOf(path).at(-1) ?? path);
  return new Set(short).size === short.length ? short : axes.map(({ path }) => path);
}

type Value = number | string | null;

function flat(values: ScanResult['values']): Value[] {
  const all: Value[] = [];
  for (const item of values) {
    if (Array.isArray(item)) for (const one of flat(item)) all.push(one);
    else all.push(item);
  }
  return all;
}

const LINES_AT_ONCE = 2_000;

/**
 * One line of names with units, then a line a point (with dcs, an angle) in order; empty where there is no value. In pieces, so that
 * whoever sends a long table can let others have their turn between them.
 */
export function* resultCsv(result: ScanResult): Generator<string> {
  const { axes, angles, values, output, unit } = result;
  const names = columnNames(axes).map((name, i) => `${name} (${axes[i]?.unit ?? '1'})`);
  const theta = angles ? [`theta (${angles.unit})`] : [];
  const header = [...names, ...theta, unit === null ? output : `${output} (${unit})`];
  yield `${header.map(cell).join(',')}\n`;

  const columns = [...axes.map((axis) => axis.values), ...(angles ? [angles.values] : [])].map(
    (column) => column.map(String),
  );
  const all = flat(values);
  for (let start = 0; start < all.length; start += LINES_AT_ONCE) {
    const lines = all
      .slice(start, start + LINES_AT_ONCE)
      .map((value, i) => `${placeOf(start + i, columns)},${value === null ? '' : value}\n`);
    yield lines.join('');
  }
}

/** Where a value stands on each axis, the last one running fastest. */
function placeOf(at: number, columns: readonly string[][]): string {
  let rest = at;
  let place = '';
  for (let i = columns.length - 1; i >= 0; i -= 1) {
    const column = columns[i] ?? [];
    const name = column[rest % column.length] ?? '';
    place = place === '' ? name : `${name},${place}`;
    rest = Math.floor(rest / column.length);
  }
  return place;
}
