import { Notice } from '#src/components/notice.tsx';
import type { Warning } from '#shared/contracts/estimates.ts';

/** Cautions as notices, what is only worth knowing as a list below them. */
export function WarningList({ warnings }: { warnings: readonly Warning[] }) {
  const cautions = warnings.filter(({ level }) => level !== 'info');
  const remarks = warnings.filter(({ level }) => level === 'info');
  return (
    <>
      {cautions.map((warning) => (
        <Notice key={`${warning.code} ${warning.message}`} tone="attention">
          {warning.message}
        </Notice>
      ))}
      {remarks.length > 0 && (
        <ul className="flex flex-col gap-1 px-1 text-sm text-muted">
          {remarks.map((remark) => (
            <li key={`${remark.code} ${remark.message}`}>{remark.message}</li>
          ))}
        </ul>
      )}
    </>
  );
}
