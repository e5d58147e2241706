import type { ReactNode } from 'react';

/** Names of columns with their units below them, so that the columns stay narrow. */
export function HeadCells({ heads }: { heads: readonly (readonly [string, string?])[] }) {
  return (
    <thead>
      <tr>
        {heads.map(([name, unit], column) => (
          <th
            key={name}
            scope="col"
            className={`sticky top-0 bg-sheet px-2 py-1.5 align-bottom font-semibold whitespace-nowrap ${column === 0 ? 'text-left' : 'text-right'}`}
          >
            {name}
            {unit && <span className="block font-normal text-muted">{unit}</span>}
          </th>
        ))}
      </tr>
    </thead>
  );
}

export function NameCell({ children }: { children: ReactNode }) {
  return (
    <th scope="row" className="px-2 py-0.5 text-left font-normal whitespace-nowrap">
      {children}
    </th>
  );
}

export function Cell({ children }: { children: ReactNode }) {
  return <td className="px-2 py-0.5 text-right font-mono whitespace-nowrap">{children}</td>;
}
