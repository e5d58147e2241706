import type { ReactNode } from 'react';
import { Chip } from '#src/components/chip.tsx';
import { AreaUnitMenu, Figure } from '#src/components/figure.tsx';
import { Notice } from '#src/components/notice.tsx';
import { classNames } from '#src/lib/class-names.ts';
import { METHODS } from '#shared/contracts/estimates.ts';
import type { Estimate, Integral } from '#shared/contracts/estimates.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import { FigureMeaning } from '../aids/figure-meaning.tsx';
import { VERDICT_WORDS, decidingNumber, numericsText } from '../model/verdict.ts';
import { METHOD_NAMES } from '../model/words.ts';

type Kind = 'elastic' | 'absorption' | 'total' | 'momentumTransfer' | 'viscosity';

const LABELS: Record<Kind, string> = {
  elastic: 'Elastic σ',
  momentumTransfer: 'Momentum transfer σ',
  absorption: 'Absorption σ',
  total: 'Total σ',
  viscosity: 'Viscosity σ',
};

type Finite = Exclude<Integral, { divergent: true }>;

function inUnit({ value, unit: from, relativeError, absoluteError }: Finite, unit: string) {
  const factor = composedFactor(from, unit);
  return {
    value: value * factor,
    relativeError,
    absoluteError: absoluteError === undefined ? undefined : absoluteError * factor,
  };
}

interface OtherValue {
  method: string;
  integral: Integral;
}

/** The same figure by the other methods of the case, a line each. */
function Others({ others, unit }: { others: readonly OtherValue[]; unit: string }) {
  return others.map(({ method, integral }) => (
    <span key={method} className="block text-xs text-muted">
      {method}{' '}
      {'divergent' in integral ? (
        'divergent'
      ) : (
        <>
          <span className="font-mono text-ink">
            {formatNumber(inUnit(integral, unit).value, 4)}
          </span>{' '}
          {unitSymbol(unit)} · {numericsText(inUnit(integral, unit))}
        </>
      )}
    </span>
  ));
}

interface CellProps {
  label: string;
  meaning: ReactNode;
  method: string;
  integral: Integral;
  others: readonly OtherValue[];
  unit: string;
  onUnit: (unit: string) => void;
}

function Cell({ label, meaning, method, integral, others, unit, onUnit }: CellProps) {
  if ('divergent' in integral) {
    return (
      <>
        <dt className="flex items-center justify-between gap-1 text-sm text-muted">
          {label} {meaning}
        </dt>
        <dd>
          <span className="block text-lg font-semibold">divergent</span>
          <span className="block text-xs text-muted">{method} · reason below</span>
          <Others others={others} unit={unit} />
        </dd>
      </>
    );
  }
  const shown = inUnit(integral, unit);
  return (
    <>
      <dt className="flex items-center justify-between gap-1 text-sm text-muted">
        {label} {meaning}
      </dt>
      <dd>
        <Figure
          size="large"
          label={`${label}, ${method}`}
          value={shown.value}
          unit={unit}
          unitMenu={
            <AreaUnitMenu unit={unit} onChange={onUnit} label={`Unit of ${label}, ${method}`} />
          }
        />
        <span className="block text-xs text-muted">
          {method} · {numericsText(shown)}
        </span>
        <Others others={others} unit={unit} />
      </dd>
    </>
  );
}

function VerdictCell({ estimate }: { estimate: Estimate }) {
  const { validity } = estimate;
  const { word, tone, sign } = VERDICT_WORDS[validity.verdict];
  return (
    <>
      <dt className="text-sm text-muted">First Born here</dt>
      <dd>
        <Chip tone={tone} className="my-1 text-sm" icon={<span aria-hidden="true">{sign}</span>}>
          {word}
        </Chip>
        <span className="block text-xs text-pretty text-muted">{decidingNumber(validity)}</span>
      </dd>
    </>
  );
}

function absorbs(estimate: Estimate): boolean {
  return METHODS.some((method) => {
    const result = estimate.methods[method];
    if (!result || 'unavailable' in result) return false;
    return 'divergent' in result.absorption || result.absorption.value !== 0;
  });
}

/** Each figure once, by the first of the methods asked for, with what the others make of it. */
function figuresOf(estimate: Estimate) {
  const computed = METHODS.flatMap((method) => {
    const result = estimate.methods[method];
    return !result || 'unavailable' in result ? [] : [{ method, result }];
  });
  const [first, ...rest] = computed;
  if (!first) return [];
  const kinds: Kind[] = absorbs(estimate)
    ? ['elastic', 'absorption', 'total', 'momentumTransfer', 'viscosity']
    : ['elastic', 'momentumTransfer', 'viscosity'];
  return kinds.map((kind) => ({
    key: kind,
    label: LABELS[kind],
    meaning: first.method === 'born1' && (
      <FigureMeaning kind={kind} label={LABELS[kind]} estimate={estimate} />
    ),
    method: METHOD_NAMES[first.method],
    integral: first.result[kind],
    others: rest.map(({ method, result }) => ({
      method: method === 'partialWaves' ? 'exact' : METHOD_NAMES[method],
      integral: result[kind],
    })),
  }));
}

/** The last cell takes what its row has left: in rows of two, and in rows of three where there is room. */
function spanOfLast(cells: number): string {
  if (cells === 4) return '';
  const inTwo = cells % 2 === 1 ? 'col-span-2' : '';
  const inThree = ['@lg:col-span-1', '@lg:col-span-3', '@lg:col-span-2'][cells % 3] ?? '';
  return `${inTwo} ${inThree}`;
}

interface FiguresStripProps {
  estimate: Estimate;
  dimmed: boolean;
  unit: string;
  onUnit: (unit: string) => void;
}

/** The figures that matter, each with its unit and with what limits it. */
export function FiguresStrip({ estimate, dimmed, unit, onUnit }: FiguresStripProps) {
  const shown = figuresOf(estimate);
  const fourInOneRow = shown.length === 3;
  const divergent = shown.flatMap(({ label, integral }) =>
    'divergent' in integral ? [{ label, reason: integral.reason }] : [],
  );
  return (
    <>
      <dl
        aria-busy={dimmed || undefined}
        className={classNames(
          'grid grid-cols-2 gap-px overflow-clip rounded border border-line bg-line',
          fourInOneRow ? '@2xl:grid-cols-4' : '@lg:grid-cols-3',
          dimmed && 'stale',
        )}
      >
        {shown.map(({ key, ...cell }) => (
          <div key={key} className="bg-sheet px-4 py-3">
            <Cell {...cell} unit={unit} onUnit={onUnit} />
          </div>
        ))}
        <div className={classNames('bg-sheet px-4 py-3', spanOfLast(shown.length + 1))}>
          <VerdictCell estimate={estimate} />
        </div>
      </dl>
      {divergent.length > 0 && (
        <Notice tone="info">
          {divergent.map(({ label, reason }) => (
            <p key={label}>
              <b className="font-semibold">{label}</b> diverges:{' '}
              {reason.charAt(0).toLowerCase() + reason.slice(1)}
            </p>
          ))}
        </Notice>
      )}
    </>
  );
}
