import { Chip } from '#src/components/chip.tsx';
import type { Criterion, Validity } from '#shared/contracts/estimates.ts';
import { formatNumber } from '#shared/units/format.ts';
import { VERDICT_WORDS, decidingNumber } from '../model/verdict.ts';
import { CRITERION_NAMES } from '../model/words.ts';

function gradeOf({ value, limits }: Criterion): Validity['verdict'] {
  if (value < limits.sound) return 'sound';
  return value < limits.usable ? 'usable' : 'notValid';
}

function Grade({ verdict }: { verdict: Validity['verdict'] }) {
  const { word, tone, sign } = VERDICT_WORDS[verdict];
  return (
    <Chip tone={tone} icon={<span aria-hidden="true">{sign}</span>}>
      {word}
    </Chip>
  );
}

/** Is the first Born approximation to be trusted here: each criterion with its number, its limits and what it means. */
export function CriteriaTable({ validity }: { validity: Validity }) {
  return (
    <section aria-label="Verdict" className="rounded border border-line bg-sheet px-4.5 py-4">
      <h2 className="flex flex-wrap items-center gap-2 font-bold">
        Is first Born to be trusted? <Grade verdict={validity.verdict} />
      </h2>
      <p className="mt-1 text-sm text-muted">
        {validity.basis === 'exact'
          ? `Against the exact calculation: ${decidingNumber(validity)}.`
          : 'Judged by criteria, not by an exact calculation of this case. The largest decides.'}{' '}
        {validity.reason}
      </p>
      {validity.criteria.length > 0 && (
        <div className="mt-3 overflow-x-auto" tabIndex={0} role="region" aria-label="Criteria">
          <table className="w-full text-sm">
            <thead>
              <tr className="border-b border-line text-left text-muted">
                <th scope="col" className="py-1 pr-4 font-normal">
                  Criterion
                </th>
                <th scope="col" className="py-1 pr-4 text-right font-normal">
                  Value
                </th>
                <th scope="col" className="py-1 pr-4 font-normal">
                  Sound / usable below
                </th>
                <th scope="col" className="py-1 font-normal">
                  Says
                </th>
              </tr>
            </thead>
            <tbody>
              {validity.criteria.map((criterion) => (
                <tr key={criterion.name} className="border-b border-line align-top last:border-0">
                  <th scope="row" className="min-w-40 py-1.5 pr-4 text-left font-normal">
                    <span className={criterion.decides ? 'font-semibold' : undefined}>
                      {CRITERION_NAMES[criterion.name]}
                    </span>
                    {criterion.decides && <span className="text-muted"> (decides)</span>}
                    <span className="block text-xs text-muted">{criterion.meaning}</span>
                  </th>
                  <td className="py-1.5 pr-4 text-right font-mono whitespace-nowrap">
                    {formatNumber(criterion.value, 4)}
                  </td>
                  <td className="py-1.5 pr-4 font-mono whitespace-nowrap">
                    {criterion.limits.sound} / {criterion.limits.usable}
                  </td>
                  <td className="py-1.5">
                    <Grade verdict={gradeOf(criterion)} />
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
    </section>
  );
}
