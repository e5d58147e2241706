import { FileDown } from 'lucide-react';
import { buttonClasses } from '#src/components/button.tsx';

const KINDS = [
  { kind: 'proposal', name: 'Proposal page' },
  { kind: 'full', name: 'Full report' },
] as const;

/** A saved version on paper. The server draws the file from what was stored and names it. */
export function ReportLinks({ caseId, n }: { caseId: string; n: number }) {
  return (
    <p data-screen-only className="mt-2 flex flex-wrap gap-2">
      {KINDS.map(({ kind, name }) => (
        <a
          key={kind}
          download
          href={`/api/cases/${caseId}/versions/${n}/report.pdf?kind=${kind}`}
          className={buttonClasses('plain', 'small')}
        >
          <FileDown aria-hidden="true" className="size-4" />
          {name} <span className="sr-only">of version {n}, </span>(PDF)
        </a>
      ))}
    </p>
  );
}
