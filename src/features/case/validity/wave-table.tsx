import { formatNumber, fullDigits } from '#shared/units/format.ts';
import type { PhaseShift } from '#shared/contracts/estimates.ts';
import { brief } from '../model/verdict.ts';
import { DEGREES, breaksUnitarity, jText, waveName } from './model/waves.ts';
import { TableBox, bodyCell, headCell } from './panel.tsx';

/** Every partial wave in numbers. */
export function WaveTable({ waves }: { waves: readonly PhaseShift[] }) {
  const spin = waves.some(({ j }) => j !== undefined);
  return (
    <TableBox label="Table of phase shifts">
      <table className="w-full font-mono text-sm">
        <caption className="sr-only">
          Phase shifts of the partial waves, exact and in first order
        </caption>
        <thead>
          <tr className="font-sans">
            <th scope="col" className={headCell}>
              l
            </th>
            {spin && (
              <th scope="col" className={headCell}>
                j
              </th>
            )}
            <th scope="col" className={headCell}>
              δ (rad)
            </th>
            <th scope="col" className={headCell}>
              δ (°)
            </th>
            <th scope="col" className={headCell}>
              |S|
            </th>
            <th scope="col" className={headCell}>
              δ first Born (rad)
            </th>
            <th scope="col" className={headCell}>
              numerics of δ (rad)
            </th>
          </tr>
        </thead>
        <tbody>
          {waves.map((wave) => (
            <tr key={waveName(wave)} className="even:bg-soft/60">
              <th scope="row" className={`${bodyCell} font-normal`}>
                {wave.l}
              </th>
              {spin && <td className={bodyCell}>{wave.j === undefined ? '—' : jText(wave.j)}</td>}
              <td className={bodyCell} title={fullDigits(wave.delta)}>
                {formatNumber(wave.delta, 8)}
              </td>
              <td className={bodyCell}>{formatNumber(wave.delta * DEGREES, 7)}</td>
              <td className={bodyCell} title={fullDigits(wave.eta)}>
                {formatNumber(wave.eta, 8)}
              </td>
              <td className={bodyCell}>
                {wave.born === undefined ? '—' : formatNumber(wave.born, 6)}
                {breaksUnitarity(wave) && <span className="font-sans text-fault"> ○ above 1</span>}
              </td>
              <td className={`${bodyCell} text-muted`}>±{brief(wave.absoluteError)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </TableBox>
  );
}
