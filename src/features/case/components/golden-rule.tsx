import { Figure } from '#src/components/figure.tsx';
import { Formula } from '#src/components/formula.tsx';
import { Notice } from '#src/components/notice.tsx';
import { classNames } from '#src/lib/class-names.ts';
import type { Estimate, GoldenRule as Sheet } from '#shared/contracts/estimates.ts';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import { TakeRows } from '../aids/take-rows.tsx';
import { chainRows } from '../aids/model/chain-rows.ts';
import { useEditing } from '../editing/editor-context.ts';
import { chainOf, transformTex } from '../model/chain.ts';
import type { ChainStep } from '../model/chain.ts';
import { brief } from '../model/verdict.ts';
import { BoxSide } from './box-side.tsx';
import { PotentialSketch } from './potential-sketch.tsx';
import { Window } from './golden-rule-window.tsx';
import { Warnings } from './cross-section.tsx';

function Value({ step }: { step: ChainStep }) {
  const { value, name } = step;
  if ('value' in value) {
    return (
      <Figure
        value={value.value}
        unit={value.unit}
        label={name}
        digits={step.final ? 6 : 5}
        size={step.final ? 'large' : 'normal'}
      />
    );
  }
  if (value.im === 0) return <Figure value={value.re} unit={value.unit} label={name} digits={5} />;
  return (
    <span className="font-mono whitespace-nowrap">
      {formatNumber(value.re, 5)} {value.im < 0 ? '−' : '+'} {formatNumber(Math.abs(value.im), 5)} i{' '}
      <span className="font-sans text-sm text-muted">{unitSymbol(value.unit)}</span>
    </span>
  );
}

function Step({ step, number }: { step: ChainStep; number: number }) {
  return (
    <li
      className={classNames(
        'grid gap-x-5 gap-y-1 border-t border-line px-4.5 py-3 first:border-t-0 @2xl:grid-cols-[minmax(0,1fr)_auto]',
        step.final && 'bg-barn-soft/45',
      )}
    >
      <div className="min-w-0">
        <h3 className="text-sm text-muted">
          <span className="font-mono">{number}</span> · {step.name}
        </h3>
        <div className="flex flex-wrap items-center gap-x-6">
          <Formula display tex={step.law} className="max-w-full" />
          <Formula
            display
            tex={`= ${step.substituted}`.replace(/^= V_/, 'V_')}
            className="max-w-full text-muted"
          />
        </div>
      </div>
      <div className="self-center justify-self-start @2xl:justify-self-end">
        <Value step={step} />
      </div>
    </li>
  );
}

function Quadrature({ rule }: { rule: Sheet }) {
  const check = rule.quadratureCheck;
  if (!check) {
    return (
      <p className="text-sm text-muted">
        There is nothing to integrate in this form, so no second route to its matrix element.
      </p>
    );
  }
  const { re, im } = rule.matrixElementTimesVolume;
  const size = Math.hypot(re, im);
  const difference = Math.hypot(check.re - re, check.im - im);
  return (
    <p className="text-sm">
      The same matrix element by quadrature, the independent route:{' '}
      <span className="font-mono whitespace-nowrap">
        {formatNumber(check.re, 8)}
        {check.im !== 0 &&
          ` ${check.im < 0 ? '−' : '+'} ${formatNumber(Math.abs(check.im), 8)} i`}{' '}
        {unitSymbol(check.unit)}
      </span>
      , error at most {brief(check.absoluteError)}, {check.evaluations} evaluations;{' '}
      {size > 0
        ? `relative difference ${brief(difference / size)}`
        : `difference ${brief(difference)}`}
      .
    </p>
  );
}

const FACTOR_NAMES: Readonly<Record<string, string>> = {
  exchange: 'exchange of identical particles',
  spin: 'spin of the lepton (Mott), recoil included',
  mckinleyFeshbach: 'correction of McKinley and Feshbach',
  incoherent: 'incoherent scattering added',
};

function FactorsAfter({ rule }: { rule: Sheet }) {
  if (rule.factorsAfter.length === 0) return null;
  return (
    <section
      aria-label="Factors after the golden rule"
      className="rounded border border-line bg-sheet px-4.5 py-4"
    >
      <h2 className="font-bold">After the golden rule</h2>
      <p className="text-sm text-muted">What stands in the curve but not in the chain above.</p>
      <ol className="mt-2">
        {rule.factorsAfter.map(({ name, dcs }) => (
          <li
            key={name}
            className="flex flex-wrap justify-between gap-x-4 border-t border-line py-1.5"
          >
            <span>{FACTOR_NAMES[name] ?? name}</span>
            <Figure
              value={dcs.value}
              unit={dcs.unit}
              label={`dσ/dΩ with ${FACTOR_NAMES[name] ?? name}`}
              digits={6}
            />
          </li>
        ))}
      </ol>
    </section>
  );
}

/** The chain from matrix element to cross section, laid out so that a reviewer can check it by hand. */
export function GoldenRuleSheet({ estimate, fileName }: { estimate: Estimate; fileName: string }) {
  const { draft, forms, stale } = useEditing();
  const { goldenRule: rule } = estimate;
  if ('unavailable' in rule) {
    return (
      <Notice tone="info" title="There is no golden-rule sheet for this case.">
        {rule.reason}
      </Notice>
    );
  }
  const transforms = transformTex(draft.document.interaction.terms, forms);
  return (
    <div className={classNames('flex flex-col gap-4', stale && 'stale')}>
      <BoxSide rule={rule} estimate={estimate} />
      <section aria-label="Chain" className="rounded border border-line bg-sheet">
        <ol>
          {chainOf(rule, estimate).map((step, index) => (
            <Step key={step.key} step={step} number={index + 1} />
          ))}
        </ol>
        <div className="border-t border-line px-4.5 py-3" data-screen-only>
          <TakeRows fileName={fileName} rows={() => chainRows(rule, estimate)} />
        </div>
      </section>
      <section
        aria-label="Matrix element"
        className="flex flex-col gap-2 rounded border border-line bg-sheet px-4.5 py-4"
      >
        <h2 className="font-bold">Where the matrix element comes from</h2>
        <div className="grid items-center gap-x-6 gap-y-3 @2xl:grid-cols-[minmax(0,1fr)_18rem]">
          <div className="flex min-w-0 flex-col gap-2">
            {transforms.map((tex, index) => (
              <Formula key={index} display tex={tex} />
            ))}
            <Quadrature rule={rule} />
          </div>
          <PotentialSketch estimate={estimate} dimmed={stale} />
        </div>
      </section>
      <Window rule={rule} />
      <FactorsAfter rule={rule} />
      <Warnings estimate={estimate} />
    </div>
  );
}
