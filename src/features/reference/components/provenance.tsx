import type { TableHead } from '#shared/contracts/reference.ts';

/** Where the numbers of a page come from: edition first, the rest within reach. */
export function Provenance({ table }: { table: TableHead }) {
  const { edition, source, licence, notes } = table;
  return (
    <details className="group rounded border border-line bg-sheet text-sm">
      <summary className="flex list-none flex-wrap items-baseline gap-x-3 gap-y-0.5 rounded px-3.5 py-2 marker:content-none [&::-webkit-details-marker]:hidden">
        <span className="text-muted">Edition</span>
        <span className="font-mono font-medium text-ink">{edition}</span>
        <span className="min-w-0 flex-1 basis-64 truncate text-muted group-open:invisible">
          {source}
        </span>
        <span className="text-slate underline underline-offset-2 group-open:hidden">
          Source and cautions
        </span>
        <span className="hidden text-slate underline underline-offset-2 group-open:inline">
          Close
        </span>
      </summary>
      <div className="flex max-w-[80ch] flex-col gap-2.5 px-3.5 pt-1 pb-3.5">
        <dl className="grid gap-x-4 gap-y-1.5 sm:grid-cols-[5rem_1fr]">
          <dt className="text-muted">Source</dt>
          <dd>{source}</dd>
          <dt className="text-muted">Licence</dt>
          <dd>{licence}</dd>
        </dl>
        {notes.length > 0 && (
          <ul className="flex list-disc flex-col gap-1 pl-5 marker:text-muted">
            {notes.map((note) => (
              <li key={note}>{note}</li>
            ))}
          </ul>
        )}
      </div>
    </details>
  );
}
