import { Chip } from '#src/components/chip.tsx';
import type { Tone } from '#src/components/chip.tsx';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import { Power } from '#src/components/figure.tsx';
import { Item, Items } from '../validity/panel.tsx';
import { timeText } from './model/numbers.ts';

const WORDS: Record<RunPlan['verdict'], { word: string; tone: Tone; sign: string }> = {
  feasible: { word: 'feasible', tone: 'sound', sign: '●' },
  tight: { word: 'tight', tone: 'attention', sign: '◐' },
  notFeasible: { word: 'not feasible', tone: 'fault', sign: '○' },
  singleScatteringNotValid: { word: 'single scattering not valid', tone: 'fault', sign: '○' },
};

type Maybe = { value: number; unit: string } | { unavailable: true; reason: string };

function Amount({ of }: { of: Maybe }) {
  if ('unavailable' in of) return <span className="font-sans">{of.reason}</span>;
  return <Power text={`${formatNumber(of.value, 4)} ${unitSymbol(of.unit)}`} />;
}

const Time = ({ of }: { of: Maybe }) =>
  'unavailable' in of ? <span className="font-sans">{of.reason}</span> : timeText(of.value);

/** Can it be done, and what decides. */
export function PlanVerdict({ plan }: { plan: RunPlan }) {
  const { word, tone, sign } = WORDS[plan.verdict];
  const { target } = plan;
  return (
    <>
      <div className="flex flex-wrap items-center gap-3">
        <Chip tone={tone} icon={<span aria-hidden="true">{sign}</span>}>
          {word}
        </Chip>
        <p className="min-w-0 flex-1 basis-64">{plan.decidedBy.message}</p>
      </div>
      <Items>
        <Item name="all detectors at once">
          <Time of={plan.totalTime} />
        </Item>
        <Item name="one position after the other">
          <Time of={plan.totalTimeInTurn} />
        </Item>
        <Item name="beam">
          <Amount of={plan.beamRate} />
        </Item>
        <Item name={`nuclei of ${plan.scatterer}`}>
          <Amount of={plan.arealDensity} />
        </Item>
        <Item name="collisions per particle, n t σ">
          <Power text={formatNumber(target.collisions, 3)} />
          {target.collisionsBeyond !== undefined && (
            <span className="font-sans text-muted">
              {' '}
              beyond {formatNumber(target.collisionsBeyond, 3)}°
            </span>
          )}
        </Item>
        <Item name="energy loss in the target">
          <Amount of={target.energyLoss} />
        </Item>
        <Item name="multiple scattering, plane">
          <Amount of={target.multipleScattering} />
        </Item>
        <Item name="power of the beam">
          <Amount of={target.beamPower} />
        </Item>
      </Items>
    </>
  );
}
