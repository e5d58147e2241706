import type { ReactNode } from 'react';
import type { PlannedDetector, RunPlan } from '#shared/contracts/run-plans.ts';
import { formatNumber } from '#shared/units/format.ts';
import { Panel, TableBox } from '../validity/panel.tsx';
import { Amount, AmountOr } from './amount.tsx';
import { percentText } from './model/numbers.ts';
import { Cell, HeadCells, NameCell } from './table-cells.tsx';

/** Atoms that send particles into the same detector, and how far apart their energies lie. */
export function SameAngle({ detector }: { detector: PlannedDetector }) {
  if (detector.sameAngle.length < 2) return null;
  return (
    <div>
      <p className="mb-1 text-sm font-semibold">Elastic lines at {detector.name}</p>
      <TableBox label={`Elastic lines at ${detector.name}`}>
        <table className="w-full text-sm">
          <HeadCells
            heads={[
              ['scattered by'],
              ['kinetic energy', 'lab, at the centre'],
              ['apart', 'from the scatterer'],
            ]}
          />
          <tbody>
            {detector.sameAngle.map(({ scatterer, energy, separation }) => (
              <tr key={scatterer} className="even:bg-soft/60">
                <NameCell>{scatterer}</NameCell>
                <Cell>
                  {energy ? (
                    <Amount value={energy.value} unit={energy.unit} digits={7} />
                  ) : (
                    'out of reach'
                  )}
                </Cell>
                <Cell>{separation === null ? '—' : percentText(separation)}</Cell>
              </tr>
            ))}
          </tbody>
        </table>
      </TableBox>
      <p className="mt-1 max-w-prose text-xs text-muted">
        A detector tells two lines apart only where its energy resolution is finer than their
        distance.
      </p>
    </div>
  );
}

function Check({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div className="grid gap-x-4 border-t border-line py-1 @md:grid-cols-[15rem_minmax(0,1fr)]">
      <dt className="text-sm text-muted">{name}</dt>
      <dd className="min-w-0 font-mono text-sm">{children}</dd>
    </div>
  );
}

/** What the target does to the beam, each figure or the reason why there is none. */
export function TargetChecks({ plan }: { plan: RunPlan }) {
  const { target, atoms } = plan;
  const { collisions, collisionsBeyond, radiationLengths } = target;
  return (
    <Panel
      title="What the target does to the beam"
      says="More than 0.1 collisions ask for a correction; above 1, single scattering does not hold."
    >
      <dl className="@container">
        <Check name="collisions per particle, n t σ">
          <Amount value={collisions} unit="" digits={4} />
          {collisionsBeyond !== undefined && (
            <span className="font-sans text-muted">
              {' '}
              beyond {formatNumber(collisionsBeyond, 3)}°
            </span>
          )}
        </Check>
        {radiationLengths !== undefined && (
          <Check name="radiation lengths">
            <Amount value={radiationLengths} unit="" digits={3} />
          </Check>
        )}
        <Check name="multiple scattering, plane (Highland)">
          <AmountOr of={target.multipleScattering} digits={3} />
        </Check>
        <Check name="mean energy loss (Bethe)">
          <AmountOr of={target.energyLoss} digits={4} />
        </Check>
        <Check name="power of the beam">
          <Amount value={target.beamPower.value} unit={target.beamPower.unit} digits={3} />
        </Check>
        {!('unavailable' in target.depositedPower) && (
          <Check name="power left in the target">
            <AmountOr of={target.depositedPower} digits={3} />
          </Check>
        )}
        {atoms.map(({ name, arealDensity }) => (
          <Check key={name} name={`all ${name} of the target`}>
            <Amount value={arealDensity.value} unit={arealDensity.unit} />
          </Check>
        ))}
      </dl>
    </Panel>
  );
}
