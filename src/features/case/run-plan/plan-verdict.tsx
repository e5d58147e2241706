import { Chip } from '#src/components/chip.tsx';
import type { Tone } from '#src/components/chip.tsx';
import { formatNumber } from '#shared/units/format.ts';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import { Item, Items } from '../validity/panel.tsx';
import { Amount, TimeOr } from './amount.tsx';

const WORDS: Record<RunPlan['verdict'], { word: string; tone: Tone; sign: string }> = {
  feasible: { word: 'feasible', tone: 'sound', sign: '●' },
  tight: { word: 'tight', tone: 'attention', sign: '◐' },
  notFeasible: { word: 'not feasible', tone: 'fault', sign: '○' },
  singleScatteringNotValid: { word: 'single scattering not valid', tone: 'fault', sign: '○' },
};

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
      <dl className="mt-3 flex flex-wrap gap-x-10 gap-y-2">
        <div>
          <dt className="text-sm text-muted">all detectors at once</dt>
          <dd className="font-mono text-xl font-medium">
            <TimeOr of={plan.totalTime} />
          </dd>
        </div>
        <div>
          <dt className="text-sm text-muted">one position after the other</dt>
          <dd className="font-mono text-xl font-medium">
            <TimeOr of={plan.totalTimeInTurn} />
          </dd>
        </div>
      </dl>
      <Items>
        <Item name="beam">
          <Amount value={plan.beamRate.value} unit={plan.beamRate.unit} />
        </Item>
        <Item name={`nuclei of ${plan.scatterer}`}>
          <Amount value={plan.arealDensity.value} unit={plan.arealDensity.unit} />
        </Item>
        <Item name="collisions per particle, n t σ">
          <Amount value={target.collisions} unit="" digits={3} />
          {target.collisionsBeyond !== undefined && (
            <span className="font-sans text-muted">
              {' '}
              beyond {formatNumber(target.collisionsBeyond, 3)}°
            </span>
          )}
        </Item>
      </Items>
    </>
  );
}
