import type { ReactNode } from 'react';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import { Power } from '#src/components/figure.tsx';
import { timeOf } from './model/numbers.ts';

interface AmountProps {
  value: number;
  unit: string;
  digits?: number;
}

/** A joule a second is a watt. */
const symbolOf = (unit: string): string => (unit === 'J/s' ? 'W' : unitSymbol(unit));

/** A figure with its unit, its power of ten raised. */
export function Amount({ value, unit, digits = 4 }: AmountProps) {
  const symbol = symbolOf(unit);
  return (
    <span className="whitespace-nowrap">
      <Power text={formatNumber(value, digits)} />
      {symbol && <span>{symbol === '°' ? symbol : `\u00a0${symbol}`}</span>}
    </span>
  );
}

type Maybe = { value: number; unit: string } | { unavailable: true; reason: string };

function Reason({ children }: { children: ReactNode }) {
  return <span className="block max-w-prose font-sans">{children}</span>;
}

/** A figure, or in words why there is none. */
export function AmountOr({ of, digits = 4 }: { of: Maybe; digits?: number }) {
  if ('unavailable' in of) return <Reason>{of.reason}</Reason>;
  return <Amount value={of.value} unit={of.unit} digits={digits} />;
}

/** A time as people plan it: seconds, minutes, hours, then days. */
export function Time({ seconds }: { seconds: number }) {
  const { value, unit } = timeOf(seconds);
  return <Amount value={value} unit={unit} digits={3} />;
}

/** A time as people plan it, or in words why there is none. */
export function TimeOr({ of }: { of: Maybe }) {
  if ('unavailable' in of) return <Reason>{of.reason}</Reason>;
  return <Time seconds={of.value} />;
}
