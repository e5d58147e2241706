import { PlotExportMenu } from '#src/components/plot-export-menu.tsx';
import { csvOf } from '#src/lib/csv.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { potentialPicture, potentialRows } from './model/potential-export.ts';

/** V(r) for slides and spreadsheets; nothing where V is no function of r. */
export function PotentialExport({ estimate, fileName }: { estimate: Estimate; fileName: string }) {
  const { potential } = estimate;
  if ('unavailable' in potential) return null;
  return (
    <span data-screen-only>
      <PlotExportMenu
        label="Export V(r)"
        fileName={fileName}
        picture={potentialPicture(potential)}
        csv={() => csvOf(potentialRows(potential))}
      />
    </span>
  );
}
