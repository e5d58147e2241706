import { describe, expect, it } from 'vitest';
import { coulombWaves } from '#server/physics/numerics/coulomb-functions.ts';
import { deviation, readReference, type Split } from './reference-table.ts';

/** (high + low) · 2^power */
type Scaled = Split & { power: number };
interface Row {
  l: number;
  eta: number;
  rho: number;
  f: Scaled;
  df: Scaled;
  g: Scaled;
  dg: Scaled;
  /** How far the GNU Scientific Library is off. */
  gsl?: number;
}
const { rows } = readReference<{ rows: Row[] }>('numerics/coulomb-functions.json');

/** Deviation of value · 2^power from the reference, and the reference's size, both over 2^(the reference's power). */
function compared(value: number, power: number, reference: Scaled) {
  return deviation(value * 2 ** (power - reference.power), reference);
}

/** Largest deviation in the sense of `error`, and that bound. */
function judged({ l, eta, rho, f, df, g, dg }: Row): { off: number; error: number } {
  const waves = coulombWaves(l, eta, rho);
  const scale = waves.scale[l] ?? NaN;
  const own = (values: Float64Array) => values[l] ?? NaN;
  const off = [
    compared(own(waves.f), -scale, f),
    compared(own(waves.df), -scale, df),
    compared(own(waves.g), scale, g),
    compared(own(waves.dg), scale, dg),
  ];
  const error = own(waves.error);
  const behind = l * (l + 1) + 2 * eta * rho > rho * rho;
  const plain = ({ high, power }: Scaled) => high * 2 ** power;
  const sizes = behind
    ? [f, df, g, dg].map(({ high }) => Math.abs(high))
    : [f, df, g, dg].map(({ power }, i) => {
        const envelope =
          i % 2 === 0 ? Math.hypot(plain(f), plain(g)) : Math.hypot(plain(df), plain(dg));
        return envelope / 2 ** power;
      });
  return { off: Math.max(...off.map((value, i) => value / (sizes[i] ?? NaN))), error };
}

describe('Coulomb functions against 30 digits of Kummer and Tricomi functions', () => {
  it.each(rows)('l = $l, eta = $eta, rho = $rho: within the error, which is below 1e-12', (row) => {
    const { off, error } = judged(row);
    expect(off).toBeLessThanOrEqual(error);
    expect(error).toBeLessThan(1e-12);
  });

  it('come as near to them as the GNU Scientific Library 2.7.1 wherever it answers, or within 2e-13', () => {
    const answered = rows.filter(({ gsl }) => gsl !== undefined);
    expect(answered.length).toBeGreaterThan(100);
    for (const row of answered) {
      expect(judged(row).off).toBeLessThan(Math.max(row.gsl ?? 0, 2e-13));
    }
  });
});
