import type { PlannedDetector, RunPlan } from '#shared/contracts/run-plans.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import { Download } from 'lucide-react';
import { Button } from '#src/components/button.tsx';
import { download } from '#src/components/plot-export.ts';
import { Power } from '#src/components/figure.tsx';
import { TakeRows } from '../aids/take-rows.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { TableBox } from '../validity/panel.tsx';
import { percentText, roughPercent, timeText } from './model/numbers.ts';
import { planJson } from './model/json.ts';
import { planRows } from './model/rows.ts';
import { Cell, HeadCells, NameCell } from './table-cells.tsx';

function timeCell({ timeForPrecision: time }: PlannedDetector): string {
  return 'unavailable' in time ? 'never' : timeText(time.total.value);
}

interface RowProps {
  detector: PlannedDetector;
  area: string;
  chosen: boolean;
  onChoose: () => void;
}

function Row({ detector, area, chosen, onChoose }: RowProps) {
  const { name, averagedDcs: dcs, detectionLimit: limit } = detector;
  const texts = [
    `${formatNumber(detector.angle, 5)}°`,
    timeCell(detector),
    formatNumber(detector.trueRate.value, 4),
    formatNumber(detector.observedRate.value, 4),
    roughPercent(detector.deadTimeFraction),
    'unavailable' in limit ? 'none' : formatNumber(limit.value, 3),
    dcs ? formatNumber(dcs.value * composedFactor(dcs.unit, `${area}/sr`), 4) : '—',
  ];
  return (
    <tr className={chosen ? 'bg-barn-soft' : 'even:bg-soft/60'}>
      <NameCell>
        <button
          type="button"
          className="rounded px-1 font-semibold underline decoration-dotted underline-offset-4"
          aria-pressed={chosen}
          onClick={onChoose}
        >
          {name}
        </button>
      </NameCell>
      {texts.map((text, column) => (
        <Cell key={column}>
          <Power text={text} />
        </Cell>
      ))}
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
  const { areaUnit, draft } = useEditing();
  function takeJson(): void {
    const text = planJson(draft.document, plan);
    download(`${fileName}-run-plan.json`, new Blob([text], { type: 'application/json' }));
  }
  return (
    <div className="flex flex-col gap-2">
      <TableBox label="Table of detectors">
        <table className="w-full text-sm">
          <caption className="sr-only">Rates and times of every detector</caption>
          <HeadCells
            heads={[
              ['detector'],
              ['angle', 'lab'],
              ['time', `to ${percentText(plan.aim.relativePrecision)}`],
              ['true rate', 's⁻¹'],
              ['observed', 's⁻¹'],
              ['dead', 'time loss'],
              ['detectable', 's⁻¹'],
              ['⟨dσ/dΩ⟩ lab', `${unitSymbol(areaUnit)}/sr`],
            ]}
          />
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
        <span className="max-w-prose">
          Times are for sample and blank together, statistics of counting alone; the detectable rate
          is the ISO 11929 detection limit for these times.
        </span>
        <div className="flex flex-wrap gap-2" data-screen-only>
          <TakeRows fileName={`${fileName}-run-plan`} rows={() => planRows(plan, areaUnit)} />
          <Button size="small" onClick={takeJson}>
            <Download aria-hidden="true" className="size-4" /> JSON
          </Button>
        </div>
      </div>
    </div>
  );
}
