import type { ReactNode } from 'react';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import type { BudgetLine, PlannedDetector } from '#shared/contracts/run-plans.ts';
import { Power } from '#src/components/figure.tsx';
import { TableBox, bodyCell, headCell } from '../validity/panel.tsx';
import { INPUT_NAMES } from './aim-of-run.tsx';
import { percentText, rateText, timeText } from './model/numbers.ts';

const FACTOR_NAMES: Record<PlannedDetector['factors'][number]['name'], string> = {
  beamRate: 'beam particles per second',
  arealDensity: 'nuclei per area, along the normal',
  slant: 'longer path through a tilted foil, 1/cos',
  dcs: 'dσ/dΩ at the central angle, lab',
  solidAngle: 'solid angle',
  efficiency: 'efficiency',
};

function Line({ name, text, sum }: { name: ReactNode; text: string; sum?: boolean }) {
  return (
    <tr className={sum ? 'border-t border-ink font-semibold' : 'border-t border-line'}>
      <th scope="row" className={`py-1 pr-3 text-left ${sum ? '' : 'font-normal'}`}>
        {name}
      </th>
      <td className="py-1 text-right font-mono whitespace-nowrap">
        <Power text={text} />
      </td>
    </tr>
  );
}

/** The product that anyone can check by hand, then what averaging and attenuation make of it. */
export function Factors({ detector }: { detector: PlannedDetector }) {
  const { factors, product, averaging, trueRate } = detector;
  const times = (value: number) => `× ${formatNumber(value, 6)}`;
  return (
    <table className="w-full text-sm">
      <caption className="mb-1 text-left font-semibold">
        Rate at {detector.name}, factor by factor
      </caption>
      <tbody>
        {factors.map(({ name, value, unit }) => (
          <Line
            key={name}
            name={FACTOR_NAMES[name]}
            text={`${formatNumber(value, 7)} ${unitSymbol(unit)}`.trim()}
          />
        ))}
        <Line
          sum
          name="product, at the central angle"
          text={product ? `${formatNumber(product.value, 8)} /s` : '—'}
        />
        <Line name="mean over the opening against its centre" text={times(averaging.acceptance)} />
        <Line name="mean over energies and depth" text={times(averaging.energies)} />
        <Line name="what the target lets through" text={times(averaging.attenuation)} />
        <Line sum name="true rate, before dead time" text={rateText(trueRate.value)} />
      </tbody>
    </table>
  );
}

function BudgetRow({ line }: { line: BudgetLine }) {
  const absolute = line.input === 'angle';
  const given = line.relativeStandardUncertainty;
  return (
    <tr className="even:bg-soft/60">
      <th scope="row" className="px-3 py-0.5 text-left font-normal">
        {INPUT_NAMES[line.input]}
      </th>
      <td className={`${bodyCell} font-mono`}>
        {absolute ? `${formatNumber(given, 3)}°` : percentText(given)}
      </td>
      <td className={`${bodyCell} font-mono`}>
        {absolute ? `${percentText(line.sensitivity)} per °` : formatNumber(line.sensitivity, 4)}
      </td>
      <td className={`${bodyCell} font-mono`}>{percentText(line.contribution)}</td>
    </tr>
  );
}

function Budget({ detector }: { detector: PlannedDetector }) {
  const { uncertaintyBudget: lines, combined, combinedWithCounting, usefulTime } = detector;
  if (lines.length === 0) {
    return (
      <p className="text-sm text-muted">
        No uncertainty of an input is stated: the counts alone decide the precision.
      </p>
    );
  }
  return (
    <div>
      <p className="mb-1 text-sm font-semibold">Uncertainty budget, standard uncertainties</p>
      <TableBox label={`Uncertainty budget of ${detector.name}`}>
        <table className="w-full text-sm">
          <thead>
            <tr>
              {['input', 'uncertainty', 'sensitivity', 'contribution'].map((head, i) => (
                <th key={head} scope="col" className={`${headCell} ${i === 0 ? 'text-left!' : ''}`}>
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {lines.map((line) => (
              <BudgetRow key={line.input} line={line} />
            ))}
          </tbody>
        </table>
      </TableBox>
      <p className="mt-1.5 text-sm">
        Together <span className="font-mono">{percentText(combined)}</span>, with counting{' '}
        <span className="font-mono">{percentText(combinedWithCounting)}</span>.
        {'unavailable' in usefulTime
          ? ''
          : ` Beyond ${timeText(usefulTime.value)} the inputs outweigh the counts: more beam is useless.`}
      </p>
    </div>
  );
}

/** What would have to change to reach the aim in the time there is. */
function Needed({ detector }: { detector: PlannedDetector }) {
  const { needed } = detector;
  if (!needed) return null;
  if ('unavailable' in needed) return <p className="text-sm">{needed.reason}</p>;
  const { current, particlesPerSecond, arealDensity, solidAngle, time, factor } = needed;
  const amount = (value: number, unit: string) => `${formatNumber(value, 4)} ${unitSymbol(unit)}`;
  const ways: [string, string][] = [
    current
      ? ['current', amount(current.value, current.unit)]
      : ['beam', amount(particlesPerSecond.value, particlesPerSecond.unit)],
    ['areal density', amount(arealDensity.value, arealDensity.unit)],
    ['solid angle', typeof solidAngle === 'number' ? amount(solidAngle, 'sr') : solidAngle.reason],
    ['time', timeText(time.value)],
  ];
  return (
    <div>
      <p className="text-sm font-semibold">
        To reach the aim in the time there is: a signal{' '}
        <span className="font-mono">{formatNumber(factor, 3)}</span> times what it is, by one of
      </p>
      <dl className="mt-1 flex flex-wrap gap-x-8 gap-y-1">
        {ways.map(([name, text]) => (
          <div key={name}>
            <dt className="text-xs text-muted">{name}</dt>
            <dd className="font-mono text-sm">
              <Power text={text} />
            </dd>
          </div>
        ))}
      </dl>
    </div>
  );
}

/** One detector taken apart: product, averages, thresholds, budget and the inverse question. */
export function DetectorDetail({ detector }: { detector: PlannedDetector }) {
  const { timeForPrecision: time, expectedCounts: counts } = detector;
  return (
    <div className="flex flex-col gap-4">
      {detector.reason && <p className="text-sm text-fault">{detector.reason}</p>}
      <Factors detector={detector} />
      {'unavailable' in time ? (
        <p className="text-sm">{time.reason}</p>
      ) : (
        <p className="text-sm">
          Count <span className="font-mono">{timeText(time.signal.value)}</span> with the sample and{' '}
          <span className="font-mono">{timeText(time.blank.value)}</span> with the blank
          {counts && (
            <>
              : about <span className="font-mono">{formatNumber(counts.gross, 4)}</span> and{' '}
              <span className="font-mono">{formatNumber(counts.blank, 3)}</span> counts
            </>
          )}
          .
        </p>
      )}
      <Needed detector={detector} />
      <Budget detector={detector} />
    </div>
  );
}
