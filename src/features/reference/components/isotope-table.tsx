import { Link } from 'react-router-dom';
import type { NuclideItem } from '#shared/contracts/reference.ts';
import { classNames } from '#src/lib/class-names.ts';
import { aligned } from '../model/align.ts';
import { percentText, spinText } from '../model/words.ts';
import { NuclideSign } from './nuclide-sign.tsx';

/** The isotopes of an element that occur in nature, their shares as bars. */
export function IsotopeTable({
  isotopes,
  current,
}: {
  isotopes: readonly NuclideItem[];
  current: string;
}) {
  const shares = aligned(isotopes.map(({ abundance }) => percentText(abundance ?? 0)));
  return (
    <table className="w-full max-w-xl border-collapse text-left">
      <caption className="sr-only">Isotopes in nature</caption>
      <thead className="border-b border-line text-sm text-muted">
        <tr>
          <th scope="col" className="py-1.5 pr-4 font-semibold">
            Isotope
          </th>
          <th scope="col" className="py-1.5 pr-4 font-semibold">
            Share
          </th>
          <th scope="col" className="w-2/5 py-1.5 pr-4 font-semibold max-sm:hidden">
            <span className="sr-only">Share as a bar</span>
          </th>
          <th scope="col" className="py-1.5 font-semibold">
            Spin (ħ)
          </th>
        </tr>
      </thead>
      <tbody>
        {isotopes.map(({ nuclide, abundance, spin }, place) => (
          <tr
            key={nuclide}
            className={classNames(
              'border-t border-line/70 first:border-t-0',
              nuclide === current && 'font-semibold',
            )}
          >
            <th scope="row" className="py-1 pr-4 font-[inherit]">
              {nuclide === current ? (
                <span aria-current="page">
                  <NuclideSign nuclide={nuclide} />
                </span>
              ) : (
                <Link to={`/reference/nuclides/${nuclide}`} className="rounded hover:underline">
                  <NuclideSign nuclide={nuclide} />
                </Link>
              )}
            </th>
            <td className="py-1 pr-4 text-right font-mono text-sm whitespace-pre">
              {shares[place]}
            </td>
            <td className="py-1 pr-4 max-sm:hidden">
              <svg
                viewBox="0 0 100 8"
                preserveAspectRatio="none"
                className="h-2 w-full"
                aria-hidden="true"
              >
                <rect width="100" height="8" className="fill-soft" />
                <rect
                  width={Math.max(0.6, 100 * (abundance ?? 0))}
                  height="8"
                  className={nuclide === current ? 'fill-barn' : 'fill-edge'}
                />
              </svg>
            </td>
            <td className="py-1 font-mono text-sm">{spin === null ? '–' : spinText(spin)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
