import { useCallback, useState, type ReactNode } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Download } from 'lucide-react';
import { Button, ButtonLink } from '#src/components/button.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Failure } from '#src/components/failure.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { Pagination } from '#src/components/pagination.tsx';
import { downloadCsv } from '#src/components/plot-export.ts';
import { SearchBox } from '#src/components/search-box.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { inWords } from '#src/lib/api.ts';
import { csvOf } from '#src/lib/csv.ts';
import type { ReferenceStart } from '#src/lib/reference-start.ts';
import { say } from '#src/lib/toasts.ts';
import { useTableAddress, type TableAddress } from '../address.ts';
import type { TableQuery, TableSource } from '../api.ts';
import { fileRows, type Column } from '../model/columns.ts';
import { Provenance } from './provenance.tsx';
import { ReferenceTable } from './reference-table.tsx';

export interface TableDescription<T> {
  title: string;
  /** What one entry is called, and many. */
  noun: readonly [string, string];
  /** One sentence under the title: what is here and how to find it. */
  lead: string;
  /** File name without its ending. */
  file: string;
  placeholder: string;
  source: TableSource<T>;
  columns: ReadonlyArray<Column<T>>;
  nameOf: (item: T) => string;
  startOf: (item: T) => ReferenceStart | null;
  /** What stands under a row on a narrow screen. */
  below?: (item: T) => ReactNode;
  /** Filters by their key in the address, with the values each may have. */
  filters: Readonly<Record<string, readonly string[]>>;
}

function Export<T>({ table, query }: { table: TableDescription<T>; query: TableQuery }) {
  const [busy, setBusy] = useState(false);
  async function save(): Promise<void> {
    setBusy(true);
    try {
      const rows = await table.source.all({ ...query, page: undefined });
      downloadCsv(table.file, csvOf(fileRows(table.columns, rows)));
    } catch (error) {
      say(inWords(error), { tone: 'fault' });
    } finally {
      setBusy(false);
    }
  }
  return (
    <Button busy={busy} onClick={() => void save()}>
      {!busy && <Download aria-hidden="true" className="size-4" />} Export CSV
    </Button>
  );
}

function Nothing<T>({ table, address }: { table: TableDescription<T>; address: TableAddress }) {
  const { q, page } = address.query;
  const many = table.noun[1];
  if (typeof page === 'number' && page > 1) {
    return (
      <EmptyState
        title="This page of the table is empty."
        actions={
          <ButtonLink to={address.hrefWith({ page: undefined })} size="small">
            To the first page
          </ButtonLink>
        }
      />
    );
  }
  return (
    <EmptyState
      title={q === undefined ? `No ${many} fit the filters.` : `No ${many} fit “${q}”.`}
      actions={
        <ButtonLink to="?" size="small">
          Show all {many}
        </ButtonLink>
      }
    >
      {table.lead}
    </EmptyState>
  );
}

function Placeholders({ noun }: { noun: string }) {
  return (
    <Waiting what={`the ${noun}`}>
      <div className="flex flex-col gap-3 rounded border border-line bg-sheet px-3 py-3.5">
        {[0, 1, 2, 3, 4, 5].map((row) => (
          <Skeleton key={row} className={row % 2 ? 'w-2/3' : 'w-3/4'} />
        ))}
      </div>
    </Waiting>
  );
}

/** A published table as a page: edition and source in its head, search, order, pages, files. */
export function TablePage<T>({
  table,
  filters,
}: {
  table: TableDescription<T>;
  filters?: (address: TableAddress) => ReactNode;
}) {
  const { title, noun, lead, source, columns } = table;
  const [sorts] = useState(() => columns.filter((c) => c.sortable).map(({ key }) => key));
  const address = useTableAddress(sorts, table.filters);
  const { query, change } = address;
  const search = useCallback((q: string) => change({ q }, true), [change]);
  const { data, error, isPlaceholderData, refetch } = useQuery(source.page(query));
  return (
    <div className="flex flex-col gap-4">
      <div className="flex flex-col gap-1.5">
        <PageHead title={title}>
          <Export table={table} query={query} />
        </PageHead>
        <p className="max-w-[75ch] text-muted">{lead}</p>
      </div>
      {data && <Provenance table={data.table} />}
      <div data-screen-only className="flex flex-wrap items-center gap-2">
        <SearchBox
          id="table-search"
          label={`Search the ${noun[1]}`}
          placeholder={table.placeholder}
          value={typeof query['q'] === 'string' ? query['q'] : ''}
          onSearch={search}
        />
        {filters?.(address)}
      </div>
      {error && <Failure what={`The ${noun[1]}`} error={error} onRetry={() => void refetch()} />}
      {!data && !error && <Placeholders noun={noun[1]} />}
      {data && !error && (
        <>
          <p role="status" className="sr-only">
            {isPlaceholderData
              ? 'Searching …'
              : `${data.total} ${noun[data.total === 1 ? 0 : 1]} found`}
          </p>
          {data.items.length === 0 && !isPlaceholderData ? (
            <Nothing table={table} address={address} />
          ) : (
            <ReferenceTable
              label={title}
              columns={columns}
              items={data.items}
              nameOf={table.nameOf}
              startOf={table.startOf}
              below={table.below}
              address={address}
              dimmed={isPlaceholderData}
            />
          )}
          <Pagination
            page={data.page}
            pageSize={data.pageSize}
            total={data.total}
            noun={noun[1]}
            hrefOf={(page) => address.hrefWith({ page: page === 1 ? undefined : String(page) })}
          />
        </>
      )}
    </div>
  );
}
