import { useParams } from 'react-router-dom';
import { Button } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { classNames } from '#src/lib/class-names.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { Warnings } from '../components/cross-section.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { AmplitudePlane } from './amplitude-plane.tsx';
import { AnalysingPower } from './analysing-power.tsx';
import { IntegralsTable } from './integrals-table.tsx';
import { LowEnergy } from './low-energy.tsx';
import { MethodCurves } from './method-curves.tsx';
import { MethodConditions } from './method-terms.tsx';
import { computedOf } from './model/methods.ts';
import { wavesOf } from './model/waves.ts';
import { hasCoulombTail } from './model/treatment.ts';
import { OppositeSign } from './opposite-sign.tsx';
import { Panel } from './panel.tsx';
import { PhaseShifts } from './phase-shifts.tsx';
import { Treatment } from './treatment.tsx';
import { UnitarityPlane } from './unitarity-plane.tsx';
import { useAllMethods } from './use-all-methods.ts';
import { VerdictPanel } from './verdict-panel.tsx';

function FirstComparison() {
  return (
    <Waiting what="all methods">
      <p className="mb-3 text-muted" aria-hidden="true">
        Computing every method of this case …
      </p>
      <div className="flex flex-col gap-4">
        <Skeleton className="h-60" />
        <Skeleton className="h-115" />
      </div>
    </Waiting>
  );
}

interface PartsProps {
  estimate: Estimate;
  dimmed: boolean;
  fileName: string;
}

/** What the partial waves say beyond the curve. */
function Waves({ estimate, dimmed, fileName }: PartsProps) {
  const { draft } = useEditing();
  const exact = computedOf(estimate, 'partialWaves');
  if (!exact) return null;
  const { lMax, lowEnergy } = exact;
  const waves = wavesOf(estimate);
  return (
    <>
      {waves.length === 0 && (
        <Panel title="Phase shifts">
          <p className="text-sm">
            The exact amplitude of two point charges is a closed form: beyond the Coulomb phase no
            wave has a phase shift of its own.
          </p>
        </Panel>
      )}
      <PhaseShifts
        waves={waves}
        lMax={lMax}
        coulomb={hasCoulombTail(draft.document)}
        dimmed={dimmed}
        fileName={fileName}
      />
      {lowEnergy && <LowEnergy answer={lowEnergy} />}
    </>
  );
}

/** The two planes of complex numbers, side by side where there is room. */
function Planes(props: PartsProps) {
  const waves = wavesOf(props.estimate);
  if (waves.length === 0) return <AmplitudePlane {...props} />;
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-4 @3xl:grid-cols-[repeat(2,minmax(0,1fr))]">
      <AmplitudePlane {...props} />
      <UnitarityPlane waves={waves} dimmed={props.dimmed} fileName={props.fileName} />
    </div>
  );
}

function Parts(props: PartsProps) {
  const { estimate, dimmed } = props;
  return (
    <div
      aria-busy={dimmed || undefined}
      className={classNames('flex min-w-0 flex-col gap-4', dimmed && 'stale')}
    >
      <VerdictPanel estimate={estimate} />
      <Treatment estimate={estimate} />
      <MethodCurves {...props} />
      <IntegralsTable {...props} />
      <MethodConditions estimate={estimate} />
      <OppositeSign {...props} />
      <AnalysingPower {...props} />
      <Planes {...props} />
      <Waves {...props} />
      {/* What first order cannot see has a part of its own above. */}
      <Warnings estimate={estimate} except="signUnseen" />
    </div>
  );
}

/** A version keeps the result it was saved with; the methods it did not ask for are computed now. */
function ComputedNow({ estimate }: { estimate: Estimate }) {
  const { n } = useParams();
  if (n === undefined) return null;
  const { name, version } = estimate.engine;
  return (
    <p className="mb-3 text-sm text-muted">
      Computed now by {name} {version} from the inputs of version {n}. What was saved with it stands
      under Cross section.
    </p>
  );
}

/** Can the first-order number be believed: every method beside it, and a verdict that rests on the exact one. */
export function ValiditySection({ fileName }: { fileName: string }) {
  const { problems } = useEditing();
  const { estimate, stale, errors, failure, retry } = useAllMethods();
  // What is wrong with the inputs is said at the inputs; what is left is refused for the sake of a method.
  const refused = problems.length === 0 ? (errors[0]?.message ?? null) : null;
  const trouble = failure ?? refused;
  return (
    <>
      {trouble !== null && (
        <Notice
          live
          tone="fault"
          title="The methods could not be held against each other."
          actions={
            <Button size="small" onClick={retry}>
              Try again
            </Button>
          }
          className="mb-4"
        >
          {trouble}
        </Notice>
      )}
      {!estimate && trouble === null && problems.length > 0 && (
        <p className="text-muted">The verdict appears here once the inputs are sound.</p>
      )}
      {!estimate && trouble === null && problems.length === 0 && <FirstComparison />}
      {estimate && (
        <>
          <ComputedNow estimate={estimate} />
          <Parts estimate={estimate} dimmed={stale} fileName={fileName} />
        </>
      )}
    </>
  );
}
