import { composedFactor } from '#shared/units/composed.ts';
import { formatComposed, formatNumber } from '#shared/units/format.ts';
import type { Estimate, Method } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { METHOD_NAMES } from '../model/words.ts';
import { computedMethods, computedOf } from './model/methods.ts';
import { bodyCell, headCell } from './panel.tsx';

function elasticOf(estimate: Estimate, method: Method) {
  const elastic = computedOf(estimate, method)?.elastic;
  return elastic && !('divergent' in elastic) ? elastic : null;
}

/** σ elastic of both signs and their ratio, a line each method. */
export function SignTotals({ given, turned }: { given: Estimate; turned: Estimate }) {
  const { areaUnit } = useEditing();
  const rows = computedMethods(given)
    .filter(({ method }) => computedOf(turned, method) !== null)
    .map(({ method }) => ({
      method,
      a: elasticOf(given, method),
      b: elasticOf(turned, method),
    }));
  return (
    <div
      className="relative overflow-x-auto"
      tabIndex={0}
      role="region"
      aria-label="Elastic totals of both signs"
    >
      <table className="text-sm">
        <caption className="sr-only">Elastic cross section with either sign</caption>
        <thead>
          <tr>
            <th scope="col" className="py-1.5 pr-3 text-left font-semibold">
              elastic σ
            </th>
            <th scope="col" className={headCell}>
              as given
            </th>
            <th scope="col" className={headCell}>
              opposite sign
            </th>
            <th scope="col" className={headCell}>
              opposite / given
            </th>
          </tr>
        </thead>
        <tbody className="font-mono">
          {rows.map(({ method, a, b }) => (
            <tr key={method} className="border-t border-line">
              <th scope="row" className="py-1 pr-3 text-left font-sans font-normal">
                {METHOD_NAMES[method]}
              </th>
              {[a, b].map((elastic, place) => (
                <td key={place} className={`${bodyCell} py-1`}>
                  {elastic === null
                    ? 'divergent'
                    : formatComposed(
                        elastic.value * composedFactor(elastic.unit, areaUnit),
                        areaUnit,
                        5,
                      )}
                </td>
              ))}
              <td className={`${bodyCell} py-1`}>
                {a === null || b === null || a.value === 0
                  ? '—'
                  : formatNumber(b.value / a.value, 6)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
