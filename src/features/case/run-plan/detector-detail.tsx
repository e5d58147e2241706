import type { ReactNode } from 'react';
import { formatNumber } from '#shared/units/format.ts';
import type { BudgetLine, PlannedDetector } from '#shared/contracts/run-plans.ts';
import { TableBox, bodyCell, headCell } from '../validity/panel.tsx';
import { Amount, Time } from './amount.tsx';
import { DetectorCounts } from './detector-counts.tsx';
import { INPUT_NAMES } from './model/words.ts';
import { MonteCarlo } from './monte-carlo.tsx';
import { SameAngle } from './target-checks.tsx';
import { percentText, timeText } from './model/numbers.ts';

const FACTOR_NAMES: Record<PlannedDetector['factors'][number]['name'], string> = {
  beamRate: 'beam particles per second',
  arealDensity: 'nuclei per area, along the normal',
  slant: 'longer path through a tilted foil, 1/cos',
  dcs: 'dσ/dΩ at the central angle, lab',
  solidAngle: 'solid angle',
  efficiency: 'efficiency',
};

function Line({ name, children, sum }: { name: string; children: ReactNode; sum?: boolean }) {
  return (
    <tr className={sum ? 'border-t border-ink font-semibold' : 'border-t border-line'}>
      <th scope="row" className={`py-1 pr-3 text-left ${sum ? '' : 'font-normal'}`}>
        {name}
      </th>
      <td className="py-1 text-right font-mono whitespace-nowrap">{children}</td>
    </tr>
  );
}

function Times({ by }: { by: number }) {
  return (
    <>
      × <Amount value={by} unit="" digits={6} />
    </>
  );
}

/** The product that anyone can check by hand, then what averaging and attenuation make of it. */
export function Factors({ detector }: { detector: PlannedDetector }) {
  const { factors, product, averaging, trueRate } = detector;
  return (
    <table className="w-full text-sm">
      <caption className="mb-1 text-left font-semibold">
        Rate at {detector.name}, factor by factor
      </caption>
      <tbody>
        {factors.map(({ name, value, unit }) => (
          <Line key={name} name={FACTOR_NAMES[name]}>
            <Amount value={value} unit={unit === '1' ? '' : unit} digits={7} />
          </Line>
        ))}
        <Line sum name="product, at the central angle">
          {product ? <Amount value={product.value} unit={product.unit} digits={8} /> : '—'}
        </Line>
        <Line name="mean over the opening against its centre">
          <Times by={averaging.acceptance} />
        </Line>
        <Line name="mean over energies and depth">
          <Times by={averaging.energies} />
        </Line>
        <Line name="what the target lets through">
          <Times by={averaging.attenuation} />
        </Line>
        <Line sum name="true rate, before dead time">
          <Amount value={trueRate.value} unit={trueRate.unit} digits={8} />
        </Line>
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
      <td className={bodyCell}>
        {line.type}, {line.distribution}
        {line.freedom !== null && (
          <span className="font-mono"> ν = {formatNumber(line.freedom, 3)}</span>
        )}
      </td>
      <td className={bodyCell}>{line.shared ? 'all detectors' : 'this one'}</td>
    </tr>
  );
}

function Budget({ detector }: { detector: PlannedDetector }) {
  const { uncertaintyBudget: lines, combined, combinedWithCounting, usefulTime } = detector;
  const { expanded, combinedOfRatio } = detector;
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
              {['input', 'uncertainty', 'sensitivity', 'contribution', 'type', 'shared by'].map(
                (head, i) => (
                  <th
                    key={head}
                    scope="col"
                    className={`${headCell} ${i === 0 ? 'text-left!' : ''}`}
                  >
                    {head}
                  </th>
                ),
              )}
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
        <span className="font-mono">{percentText(combinedWithCounting)}</span>; expanded for{' '}
        {percentText(expanded.coverage, 2)} coverage{' '}
        <span className="font-mono">{percentText(expanded.relative)}</span> (k ={' '}
        <span className="font-mono">{formatNumber(expanded.coverageFactor, 4)}</span>).
        {combinedOfRatio !== undefined && (
          <>
            {' '}
            Of the ratio to the monitor{' '}
            <span className="font-mono">{percentText(combinedOfRatio)}</span>, inputs alone.
          </>
        )}
        {'unavailable' in usefulTime
          ? ''
          : ` Beyond ${timeText(usefulTime.value)} the inputs outweigh the counts: more beam is useless.`}
      </p>
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
          Count{' '}
          <span className="font-mono">
            <Time seconds={time.signal.value} />
          </span>{' '}
          with the sample
          {time.blank.value > 0 && (
            <>
              {' '}
              and{' '}
              <span className="font-mono">
                <Time seconds={time.blank.value} />
              </span>{' '}
              with the blank
            </>
          )}
          {counts && (
            <>
              : about{' '}
              <span className="font-mono">
                <Amount value={counts.gross} unit="" digits={4} />
              </span>
              {time.blank.value > 0 && (
                <>
                  {' '}
                  and{' '}
                  <span className="font-mono">
                    <Amount value={counts.blank} unit="" digits={3} />
                  </span>
                </>
              )}{' '}
              counts
            </>
          )}
          .
        </p>
      )}
      <DetectorCounts detector={detector} />
      <Budget detector={detector} />
      <MonteCarlo detector={detector} />
      <SameAngle detector={detector} />
    </div>
  );
}
