import { useQuery } from '@tanstack/react-query';
import type { DifferentialPoint, Estimate } from '#shared/contracts/estimates.ts';
import { formatComposed } from '#shared/units/format.ts';
import { estimateBody } from '../api.ts';
import { useEditing } from '../editing/editor-context.ts';
import { Explain, MeaningDialog } from './explain.tsx';
import { straight } from './model/angle-range.ts';
import { meaningOfPoint } from './model/meaning-point.ts';
import type { PointExtras } from './model/meaning-point.ts';
import { aidsQuery } from './use-aids.ts';

interface PointMeaningProps {
  point: DifferentialPoint;
  estimate: Estimate;
}

/** Kinematics of the angle, and the amplitude the other way where the particles are identical: both are asked of the engine. */
function usePointExtras({ point, estimate }: PointMeaningProps, rank: number): PointExtras {
  const { draft } = useEditing();
  const body = estimateBody(draft.document);
  const unit = estimate.units.angle;
  const kinematics = useQuery(
    aidsQuery({ ...body, angles: { unit, values: [point.theta] }, aids: { kinematics: true } }),
  );
  const ways = kinematics.isPlaceholderData
    ? undefined
    : kinematics.data?.aids?.kinematics?.rows[0]?.ways;
  const way = [...(ways ?? [])].sort((a, b) => a.thetaCm - b.thetaCm)[rank] ?? null;
  const opposite = way === null ? null : Math.max(0, straight(unit) - way.thetaCm);
  const exchanged = useQuery({
    ...aidsQuery({ ...body, frame: 'cm', angles: { unit, values: [opposite ?? 0] } }),
    enabled: estimate.identical && opposite !== null,
  });
  const born = exchanged.isPlaceholderData ? undefined : exchanged.data?.methods.born1;
  const other = born && !('unavailable' in born) ? born.differential[0]?.amplitude : null;
  return { way, exchanged: other ?? null };
}

function PointDialog(props: PointMeaningProps & { rank: number; onClose: () => void }) {
  const { point, estimate, rank, onClose } = props;
  const { draft, forms } = useEditing();
  const extras = usePointExtras(props, rank);
  const branch = point.branches?.length
    ? [...point.branches].sort((a, b) => a.thetaCm - b.thetaCm)[rank]
    : undefined;
  const shown = branch ? { ...branch, theta: point.theta } : point;
  const meaning = meaningOfPoint({
    estimate,
    document: draft.document,
    forms,
    point: shown,
    ...extras,
  });
  const value =
    shown.dcs === null
      ? (point.reason ?? 'no value')
      : formatComposed(shown.dcs, `${estimate.units.area}/sr`, 10);
  return <MeaningDialog meaning={meaning} value={value} onClose={onClose} />;
}

/** What the cross section at the crosshair is; of two branches the one named. */
export function PointMeaning({
  point,
  estimate,
  rank = 0,
  label,
}: PointMeaningProps & { rank?: number; label: string }) {
  return (
    <Explain
      label={label}
      dialog={(close) => (
        <PointDialog point={point} estimate={estimate} rank={rank} onClose={close} />
      )}
    />
  );
}
