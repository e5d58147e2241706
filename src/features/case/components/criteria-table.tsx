import { Link } from 'react-router-dom';
import { Chip } from '#src/components/chip.tsx';
import type { Criterion, Validity } from '#shared/contracts/estimates.ts';
import { formatNumber } from '#shared/units/format.ts';
import { VERDICT_WORDS, decidingNumber } from '../model/verdict.ts';
import { CRITERION_NAMES } from '../model/words.ts';
import { useSectionAddress } from './section-tabs.tsx';

function gradeOf({ value, limits }: Criterion): Validity['verdict'] {
  if (value < limits.sound) return 'sound';
  return value < limits.usable ? 'usable' : 'notValid';
}

/** The verdict in a word, with a sign of its own. */
export function Grade({ verdict, large }: { verdict: Validity['verdict']; large?: boolean }) {
  const { word, tone, sign } = VERDICT_WORDS[verdict];
  return (
    <Chip
      tone={tone}
      icon={<span aria-hidden="true">{sign}</span>}
      {...(large ? { className: 'text-base' } : {})}
    >
      {word}
    </Chip>
  );
}

const SCALE = 132;

/** Where the number stands between its limits, on a logarithmic scale of six decades. */
export function Scale({ value, limits }: Pick<Criterion, 'value' | 'limits'>) {
  const middle = Math.log10(limits.sound * limits.usable) / 2;
  const x = (v: number) => (SCALE * (Math.log10(v) - middle + 3)) / 6;
  const at = Math.min(SCALE - 4, Math.max(4, value > 0 ? x(value) : 0));
  const [a, b] = [x(limits.sound), x(limits.usable)];
  return (
    <svg viewBox={`0 0 ${SCALE} 22`} className="w-33 shrink-0" aria-hidden="true">
      <path d={`M0,11H${a - 2}`} className="stroke-field" strokeWidth="4" />
      <path
        d={`M${a},11H${b - 2}`}
        className="stroke-straw"
        strokeWidth="4"
        strokeDasharray="6 2"
      />
      <path
        d={`M${b},11H${SCALE}`}
        className="stroke-fault"
        strokeWidth="4"
        strokeDasharray="2 2"
      />
      <path d={`M${at},3V19`} className="stroke-ink" strokeWidth="2.5" />
    </svg>
  );
}

function Row({ criterion }: { criterion: Criterion }) {
  const { name, value, limits, meaning, decides } = criterion;
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-5 gap-y-1 border-t border-line py-2">
      <div className="min-w-0 flex-1 basis-56">
        <span className={decides ? 'font-semibold' : undefined}>{CRITERION_NAMES[name]}</span>{' '}
        <span className="font-mono">{formatNumber(value, 3)}</span>
        {decides && <span className="text-muted"> · decides</span>}
        <span className="block text-xs text-muted">{meaning}</span>
      </div>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
        <span className="text-xs text-muted">
          <Scale {...criterion} />
          sound &lt; {limits.sound} · usable &lt; {limits.usable}
        </span>
        <Grade verdict={gradeOf(criterion)} />
      </div>
    </li>
  );
}

/** Each criterion with its number, its limits and what it means. */
export function CriteriaList({ validity }: { validity: Validity }) {
  return (
    <ul>
      {validity.criteria.map((criterion) => (
        <Row key={criterion.name} criterion={criterion} />
      ))}
    </ul>
  );
}

/** Is the first Born approximation to be trusted here, in brief; the section Validity has the rest. */
export function CriteriaTable({ validity }: { validity: Validity }) {
  const address = useSectionAddress();
  return (
    <section aria-label="Verdict" className="rounded border border-line bg-sheet px-4.5 py-4">
      <h2 className="flex flex-wrap items-center gap-2 font-bold">
        Is first Born to be trusted? <Grade verdict={validity.verdict} />
      </h2>
      <p className="mt-1 mb-2.5 text-sm text-muted">
        {validity.basis === 'exact'
          ? `Against the exact calculation: ${decidingNumber(validity)}.`
          : 'Judged by criteria, not by an exact calculation of this case. The largest decides.'}{' '}
        {validity.reason}{' '}
        <Link
          to={address('validity')}
          state={{ keepFocus: true }}
          className="text-ink underline underline-offset-4"
          data-screen-only
        >
          {validity.basis === 'exact' ? 'All of it under Validity' : 'Held against every method'}
        </Link>
      </p>
      <CriteriaList validity={validity} />
    </section>
  );
}
