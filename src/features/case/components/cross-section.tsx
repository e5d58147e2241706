import { Notice } from '#src/components/notice.tsx';
import { classNames } from '#src/lib/class-names.ts';
import { METHODS } from '#shared/contracts/estimates.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { AidsArea } from '../aids/aids-area.tsx';
import { AidsProvider } from '../aids/aids-provider.tsx';
import { PotentialExport } from '../aids/potential-export.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { METHOD_NAMES } from '../model/words.ts';
import { Treatment } from '../validity/treatment.tsx';
import { CriteriaTable } from './criteria-table.tsx';
import { Distribution } from './distribution.tsx';
import { FiguresStrip } from './figures-strip.tsx';
import { KinematicsList } from './kinematics-list.tsx';
import { MethodChoice } from './method-choice.tsx';
import { PotentialSketch } from './potential-sketch.tsx';
import { WarningList } from './warning-list.tsx';

/** What to beware of stands out; what only rounds the picture off stands small. */
export function Warnings({ estimate, except }: { estimate: Estimate; except?: string }) {
  return <WarningList warnings={estimate.warnings.filter(({ code }) => code !== except)} />;
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
  const base = fileName.replace(/-dcs$/, '');
  return (
    <AidsProvider>
      <div className="flex flex-col gap-4">
        <FiguresStrip estimate={estimate} dimmed={stale} unit={areaUnit} onUnit={setAreaUnit} />
        <Treatment estimate={estimate} />
        <section
          aria-label="Angular distribution"
          className="rounded border border-line bg-sheet px-4.5 py-4"
        >
          <MethodChoice estimate={estimate} />
          <Distribution estimate={estimate} dimmed={stale} fileName={fileName} />
        </section>
        <AidsArea estimate={estimate} fileName={base} />
        <UnavailableMethods estimate={estimate} />
        <div
          className={classNames(
            'grid gap-4 @3xl:grid-cols-[20rem_minmax(0,1fr)]',
            stale && 'stale',
          )}
        >
          <section
            aria-label="Potential and wavelength"
            className="rounded border border-line bg-sheet px-4.5 py-4"
          >
            <div className="mb-2 flex items-center justify-between gap-2">
              <h2 className="font-bold">V(r) and the wavelength</h2>
              <PotentialExport estimate={estimate} fileName={`${base}-potential`} />
            </div>
            <PotentialSketch estimate={estimate} dimmed={stale} />
            <KinematicsList estimate={estimate} />
          </section>
          <CriteriaTable validity={estimate.validity} />
        </div>
        <Warnings estimate={estimate} />
      </div>
    </AidsProvider>
  );
}
