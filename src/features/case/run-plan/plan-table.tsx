import { formatNumber } from '#shared/units/format.ts';
import type { PlannedDetector, RunPlan } from '#shared/contracts/run-plans.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { unitSymbol } from '#shared/units/format.ts';
import { Power } from '#src/components/figure.tsx';
import { TakeRows } from '../aids/take-rows.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { TableBox, bodyCell, headCell } from '../validity/panel.tsx';
import { percentText, rateText, timeText } from './model/numbers.ts';
import { planRows } from './model/rows.ts';

type Limit = PlannedDetector['detectionLimit'];
const limitText = (limit: Limit): string =>
  'unavailable' in limit ? 'none' : rateText(limit.value);

function timeOf({ timeForPrecision: time }: PlannedDetector): string {
  return 'unavailable' in time ? 'never' : timeText(time.total.value);
}

interface RowProps {
  detector: PlannedDetector;
  area: string;
  chosen: boolean;
  onChoose: () => void;
}

function Row({ detector, area, chosen, onChoose }: RowProps) {
  const { name, angle, solidAngle, averagedDcs, trueRate, observedRate } = detector;
  const dcs = averagedDcs && averagedDcs.value * composedFactor(averagedDcs.unit, `${area}/sr`);
  const number = (text: string) => (
    <td className={`${bodyCell} font-mono`}>
      <Power text={text} />
    </td>
  );
  return (
    <tr className={chosen ? 'bg-barn-soft' : 'even:bg-soft/60'}>
      <th scope="row" className="px-3 py-0.5 text-left font-normal whitespace-nowrap">
        <button
          type="button"
          className="rounded px-1 font-semibold underline decoration-dotted underline-offset-4"
          aria-pressed={chosen}
          onClick={onChoose}
        >
          {name}
        </button>
      </th>
      {number(`${formatNumber(angle, 5)}°`)}
      {number(formatNumber(solidAngle * 1e3, 4))}
      {number(dcs === null ? '—' : formatNumber(dcs, 4))}
      {number(rateText(trueRate.value))}
      {number(rateText(observedRate.value))}
      {number(percentText(detector.deadTimeFraction, 2))}
      {number(timeOf(detector))}
      {number(limitText(detector.detectionLimit))}
    </tr>
  );
}

interface PlanTableProps {
  plan: RunPlan;
  fileName: string;
  chosen: number;
  onChoose: (index: number) => void;
}

/** What every detector sees, and how long it takes. */
export function PlanTable({ plan, fileName, chosen, onChoose }: PlanTableProps) {
  const { areaUnit } = useEditing();
  const heads = [
    'angle, lab',
    'ΔΩ (msr)',
    `⟨dσ/dΩ⟩ (${unitSymbol(areaUnit)}/sr, lab)`,
    'true rate',
    'observed',
    'dead',
    `time to ${percentText(plan.aim.relativePrecision)}`,
    'detection limit',
  ];
  return (
    <div className="flex flex-col gap-2">
      <TableBox label="Table of detectors">
        <table className="w-full text-sm">
          <caption className="sr-only">Rates and times of every detector</caption>
          <thead>
            <tr>
              <th scope="col" className={`${headCell} text-left!`}>
                detector
              </th>
              {heads.map((head) => (
                <th key={head} scope="col" className={headCell}>
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {plan.detectors.map((detector, index) => (
              <Row
                key={`${index} ${detector.name}`}
                detector={detector}
                area={areaUnit}
                chosen={index === chosen}
                onChoose={() => onChoose(index)}
              />
            ))}
          </tbody>
        </table>
      </TableBox>
      <div className="flex flex-wrap items-center justify-between gap-2 text-xs text-muted">
        <span>Times are for sample and blank together, statistics of counting alone.</span>
        <TakeRows fileName={`${fileName}-run-plan`} rows={() => planRows(plan, areaUnit)} />
      </div>
    </div>
  );
}
