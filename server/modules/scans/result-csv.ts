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

/** One line of names with units, then a line a point (with dcs, an angle) in order; empty where there is no value. */
export function resultCsv({ axes, angles, values, output, unit }: ScanResult): string {
  const names = columnNames(axes).map((name, i) => `${name} (${axes[i]?.unit ?? '1'})`);
  const theta = angles ? [`theta (${angles.unit})`] : [];
  const header = [...names, ...theta, unit === null ? output : `${output} (${unit})`]
    .map(cell)
    .join(',');
  const grid = [...axes.map((axis) => axis.values), ...(angles ? [angles.values] : [])];
  const lines = flat(values).map((value, at) => {
    let rest = at;
    const place = grid.map(() => 0);
    for (let i = grid.length - 1; i >= 0; i -= 1) {
      const column = grid[i] ?? [];
      place[i] = column[rest % column.length] ?? NaN;
      rest = Math.floor(rest / column.length);
    }
    return [...place.map(String), value === null ? '' : String(value)].join(',');
  });
  return `${[header, ...lines].join('\n')}\n`;
}
