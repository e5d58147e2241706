import type { ReactNode } from 'react';
import type { PlannedDetector } from '#shared/contracts/run-plans.ts';
import { Item, Items } from '../validity/panel.tsx';
import { Amount, AmountOr } from './amount.tsx';
import { percentText } from './model/numbers.ts';

type Rate = { value: number; unit: string };

function RateItem({ name, rate }: { name: ReactNode; rate: Rate }) {
  return (
    <Item name={name}>
      <Amount value={rate.value} unit={rate.unit} />
    </Item>
  );
}

/** What the counter meets beside the signal, and the least net rate it can tell from nothing in the planned times. */
export function DetectorCounts({ detector }: { detector: PlannedDetector }) {
  const { contributions, currie, angleSensitivity } = detector;
  return (
    <Items>
      <RateItem name="background" rate={detector.backgroundRate} />
      {contributions.map(({ scatterer, rate }) => (
        <RateItem key={scatterer} name={`of it from ${scatterer}`} rate={rate} />
      ))}
      <RateItem name="while the beam is on" rate={detector.instantaneousRate} />
      <Item name="decision threshold (ISO 11929)">
        <AmountOr of={detector.decisionThreshold} />
      </Item>
      <Item name="detection limit (ISO 11929)">
        <AmountOr of={detector.detectionLimit} />
      </Item>
      {currie && (
        <>
          <RateItem
            name="detection limit (Currie, paired blank)"
            rate={currie.paired.detectionLimit}
          />
          <RateItem
            name="detection limit (Currie, well-known blank)"
            rate={currie.wellKnown.detectionLimit}
          />
        </>
      )}
      {angleSensitivity !== null && (
        <Item name="1° further out changes the rate by">{percentText(angleSensitivity)}</Item>
      )}
    </Items>
  );
}
