import { Button } from '#src/components/button.tsx';
import type { PlannedDetector, RunPlan } from '#shared/contracts/run-plans.ts';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import { Power } from '#src/components/figure.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { Panel, TableBox } from '../validity/panel.tsx';
import { putIn } from './model/plan.ts';
import { percentText, timeText } from './model/numbers.ts';
import { Cell, HeadCells, NameCell } from './table-cells.tsx';

const A_DAY = { value: 24, unit: 'h' };

function Asking() {
  const { editDocument, readOnly } = useEditing();
  const ask = () =>
    editDocument('/runPlan/aim/beamTime', (document) => putIn('aim', 'beamTime')(document, A_DAY));
  return (
    <div className="flex flex-wrap items-center gap-3">
      <p className="max-w-prose text-sm">
        State the beam time there is, and every detector says which current, areal density, solid
        angle or time would reach the precision.
      </p>
      {!readOnly && (
        <span data-screen-only>
          <Button size="small" onClick={ask}>
            Ask for 24 h of beam
          </Button>
        </span>
      )}
    </div>
  );
}

function Row({ name, needed }: Pick<PlannedDetector, 'name' | 'needed'>) {
  if (!needed) return null;
  if ('unavailable' in needed) {
    return (
      <tr className="even:bg-soft/60">
        <NameCell>{name}</NameCell>
        <td colSpan={5} className="px-2 py-0.5 text-sm">
          {needed.reason}
        </td>
      </tr>
    );
  }
  const { factor, factorOfCurrent, current, particlesPerSecond: rate } = needed;
  const { arealDensity, solidAngle, time } = needed;
  const beam = typeof factorOfCurrent === 'number' ? (current ?? rate) : null;
  const texts = [
    factor <= 1 ? `enough, × ${formatNumber(factor, 3)}` : `× ${formatNumber(factor, 3)}`,
    beam ? formatNumber(beam.value, 4) : 'none',
    formatNumber(arealDensity.value, 4),
    typeof solidAngle === 'number' ? formatNumber(solidAngle * 1e3, 4) : 'none',
    timeText(time.value),
  ];
  return (
    <tr className="even:bg-soft/60">
      <NameCell>{name}</NameCell>
      {texts.map((text, column) => (
        <Cell key={column}>
          <Power text={text} />
        </Cell>
      ))}
    </tr>
  );
}

/** The inverse question: which one change reaches the precision in the time there is. */
export function NeededPanel({ plan }: { plan: RunPlan }) {
  const { beamTime, relativePrecision } = plan.aim;
  const current = plan.detectors
    .map(({ needed }) => (needed && 'factor' in needed ? needed.current : undefined))
    .find((one) => one !== undefined);
  return (
    <Panel
      title="What would it take?"
      says={
        beamTime &&
        `Any one of these, the rest as it is, reaches ${percentText(relativePrecision)} at a position within ${timeText(beamTime.value)}, sample and blank together. Attenuation and the mean over the opening are taken as they are now: put the new value in and see.`
      }
    >
      {beamTime ? (
        <TableBox label="Table of what would reach the aim">
          <table className="w-full text-sm">
            <caption className="sr-only">What would reach the precision in the beam time</caption>
            <HeadCells
              heads={[
                ['detector'],
                ['signal', 'of what it is'],
                current ? ['current', unitSymbol(current.unit)] : ['beam', 's⁻¹'],
                ['areal density', 'cm⁻²'],
                ['solid angle', 'msr'],
                ['time', 'with this signal'],
              ]}
            />
            <tbody>
              {plan.detectors.map(({ name, needed }) => (
                <Row key={name} name={name} needed={needed} />
              ))}
            </tbody>
          </table>
        </TableBox>
      ) : (
        <Asking />
      )}
    </Panel>
  );
}
