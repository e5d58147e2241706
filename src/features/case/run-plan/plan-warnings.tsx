import { Notice } from '#src/components/notice.tsx';
import type { Warning } from '#shared/contracts/estimates.ts';

interface GroupProps {
  warnings: readonly Warning[];
}

function List({ warnings }: GroupProps) {
  return (
    <ul className="flex list-disc flex-col gap-1 pl-4.5 text-sm">
      {warnings.map(({ code, message }) => (
        <li key={`${code} ${message}`}>{message}</li>
      ))}
    </ul>
  );
}

/** What the answer takes for granted and what it leaves out, in one place: many single notices are read by nobody. */
export function PlanWarnings({ warnings }: GroupProps) {
  const cautions = warnings.filter(({ level }) => level !== 'info');
  const remarks = warnings.filter(({ level }) => level === 'info');
  return (
    <>
      {cautions.length > 0 && (
        <Notice
          tone="attention"
          title={
            cautions.length === 1 ? 'One thing to decide' : `${cautions.length} things to decide`
          }
        >
          <List warnings={cautions} />
        </Notice>
      )}
      {remarks.length > 0 && (
        <section aria-label="Worth knowing" className="px-1 text-muted">
          <List warnings={remarks} />
        </section>
      )}
    </>
  );
}
