import { Notice } from '#src/components/notice.tsx';
import { METHODS } from '#shared/contracts/estimates.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { METHOD_NAMES } from '../model/words.ts';
import { CriteriaTable } from './criteria-table.tsx';
import { Distribution } from './distribution.tsx';
import { FiguresStrip } from './figures-strip.tsx';

export function Warnings({ estimate }: { estimate: Estimate }) {
  return estimate.warnings.map((warning) => (
    <Notice key={`${warning.code} ${warning.message}`} tone="attention">
      {warning.message}
    </Notice>
  ));
}

function UnavailableMethods({ estimate }: { estimate: Estimate }) {
  return METHODS.flatMap((method) => {
    const result = estimate.methods[method];
    if (!result || !('unavailable' in result)) return [];
    return [
      <Notice key={method} tone="info" title={`No ${METHOD_NAMES[method]} result here.`}>
        {result.reason}
      </Notice>,
    ];
  });
}

/** How much scatters, and where. */
export function CrossSection({ estimate, fileName }: { estimate: Estimate; fileName: string }) {
  const { stale, areaUnit, setAreaUnit } = useEditing();
  return (
    <div className="flex flex-col gap-4">
      <FiguresStrip estimate={estimate} dimmed={stale} unit={areaUnit} onUnit={setAreaUnit} />
      <section
        aria-label="Angular distribution"
        className="rounded border border-line bg-sheet px-4.5 py-4"
      >
        <Distribution estimate={estimate} dimmed={stale} fileName={fileName} />
      </section>
      <Warnings estimate={estimate} />
      <UnavailableMethods estimate={estimate} />
      <CriteriaTable validity={estimate.validity} />
    </div>
  );
}
