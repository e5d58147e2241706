import { formatNumber } from '#shared/units/format.ts';
import type { Criterion, Estimate, Validity } from '#shared/contracts/estimates.ts';
import { CriteriaList, Grade, Scale } from '../components/criteria-table.tsx';
import { CRITERION_NAMES } from '../model/words.ts';
import { VERDICT_MEANINGS, deviationFigures } from './model/deviations.ts';

interface Decision {
  /** The number as it is read. */
  text: string;
  what: string;
  size: number;
  limits: Criterion['limits'];
  /** A limit as it is read. */
  limitText: (limit: number) => string;
}

const WEIGHTED = 'of dσ/dΩ, weighted by solid angle, for the totals diverge';

/** The number the verdict rests on. */
function decisionOf(estimate: Estimate): Decision | null {
  const { validity } = estimate;
  const figure = deviationFigures(estimate).find(({ decides }) => decides);
  if (figure && validity.deviations && validity.deviation !== undefined) {
    return {
      text: figure.text,
      what: figure.key === 'weighted' ? WEIGHTED : figure.detail,
      size: validity.deviation,
      limits: validity.deviations.limits,
      limitText: (limit) => `${String(Number((100 * limit).toPrecision(6)))}\u00a0%`,
    };
  }
  const criterion = validity.criteria.find(({ decides }) => decides);
  if (!criterion) return null;
  return {
    text: formatNumber(criterion.value, 3),
    what: CRITERION_NAMES[criterion.name],
    size: criterion.value,
    limits: criterion.limits,
    limitText: String,
  };
}

const BASES: Record<Validity['basis'], string> = {
  exact: 'Basis: the exact calculation of this very case.',
  criteria:
    'Basis: criteria, for no exact curve stands beside first order here; the largest of them decides.',
};

function Headline({ estimate }: { estimate: Estimate }) {
  const { validity } = estimate;
  const decision = decisionOf(estimate);
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-8 gap-y-3">
      <div className="min-w-0 flex-1 basis-72">
        <p aria-live="polite" className="flex flex-wrap items-center gap-x-3 gap-y-1">
          <Grade verdict={validity.verdict} large />
          {decision && (
            <>
              <span className="font-mono text-xl font-medium">{decision.text}</span>
              <span className="text-muted">{decision.what}</span>
            </>
          )}
        </p>
        <p className="mt-2 max-w-prose">
          {validity.reason === undefined && VERDICT_MEANINGS[validity.verdict]}{' '}
          {validity.verdict !== 'unassessed' && (
            <span className="text-muted">{BASES[validity.basis]}</span>
          )}{' '}
          {validity.reason}
        </p>
      </div>
      {decision && (
        <p className="text-xs text-muted">
          <Scale value={decision.size} limits={decision.limits} />
          sound below {decision.limitText(decision.limits.sound)} · usable below{' '}
          {decision.limitText(decision.limits.usable)}
          <span className="block">thresholds of this lab</span>
        </p>
      )}
    </div>
  );
}

function Deviations({ estimate }: { estimate: Estimate }) {
  const figures = deviationFigures(estimate);
  if (figures.length === 0) return null;
  return (
    <section aria-label="Deviations" className="mt-4">
      <h3 className="mb-1.5 text-sm font-semibold">First Born against the exact calculation</h3>
      <dl className="grid gap-px overflow-clip rounded border border-line bg-line @lg:grid-cols-3">
        {figures.map(({ key, name, text, detail, decides }) => (
          <div key={key} className="bg-sheet px-4 py-2.5">
            <dt className="text-sm text-muted">
              {name}
              {decides && <span className="font-semibold text-ink"> · decides</span>}
            </dt>
            <dd>
              <span className="block font-mono text-lg font-medium">{text}</span>
              <span className="block text-xs text-muted">{detail}</span>
            </dd>
          </div>
        ))}
      </dl>
      <p className="mt-1.5 text-xs text-muted">
        Of dσ/dΩ in the centre of mass, relative to the exact value or, near a minimum, to a
        thousandth of the exact forward one. This is a deviation of the model; numerical errors
        stand beside the numbers and uncertainties of the inputs are neither of them.
      </p>
    </section>
  );
}

function Criteria({ validity }: { validity: Validity }) {
  if (validity.criteria.length === 0) return null;
  return (
    <section aria-label="Criteria" className="mt-4">
      <h3 className="mb-1 text-sm font-semibold">
        Criteria
        {validity.basis === 'exact' && (
          <span className="font-normal text-muted">
            {' '}
            · for comparison only, since the exact curve has decided
          </span>
        )}
      </h3>
      <CriteriaList validity={validity} />
    </section>
  );
}

/** The verdict, what it rests on, and what to use instead. */
export function VerdictPanel({ estimate }: { estimate: Estimate }) {
  const { validity } = estimate;
  return (
    <section aria-label="Verdict" className="rounded border border-line bg-sheet px-4.5 py-4">
      <h2 className="mb-2.5 font-bold">Is first Born to be trusted here?</h2>
      <Headline estimate={estimate} />
      {validity.instead !== undefined && (
        <p className="mt-2 max-w-prose">
          <b className="font-semibold">Use instead:</b> {validity.instead}
        </p>
      )}
      <Deviations estimate={estimate} />
      <Criteria validity={validity} />
    </section>
  );
}
