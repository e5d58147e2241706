import type { PlotSeries, Scale } from '#src/components/plot-types.ts';

export interface Curve {
  x: readonly number[];
  re: readonly number[];
  im?: readonly number[] | undefined;
}

/** Share of the abscissa whose outer part decides the height where a curve rises without end at its beginning. */
const INNER = 0.12;

/** Height at which a linear picture is cut so that it shows the shape; null where the whole curve does. */
export function cutOf({ x, re }: Curve): number | null {
  const end = x.at(-1) ?? 1;
  const sizes = re.map(Math.abs);
  const whole = Math.max(...sizes);
  const outer = Math.max(...sizes.filter((_, i) => (x[i] ?? 0) >= INNER * end));
  return outer > 0 && whole > 4 * outer ? 2 * outer : null;
}

const COMPONENTS = [
  { key: 're', name: 'real part', size: 'size of the real part' },
  { key: 'im', name: 'imaginary part', size: 'size of the imaginary part' },
] as const;

/** The curves of a plot: signed and cut on a linear scale, sizes on a logarithmic one. */
export function seriesOf(curve: Curve, symbol: string, scale: Scale): PlotSeries[] {
  const cut = scale === 'linear' ? cutOf(curve) : null;
  return COMPONENTS.flatMap(({ key, name, size }) => {
    const values = curve[key];
    if (!values) return [];
    const alone = curve.im === undefined;
    const said = scale === 'log' ? size : name;
    const label = alone ? (scale === 'log' ? `|${symbol}|` : symbol) : said;
    const points = curve.x.map((x, i): [number, number | null] => {
      const value = values[i] ?? 0;
      if (scale === 'log') return [x, value === 0 ? null : Math.abs(value)];
      return [x, cut !== null && Math.abs(value) > cut ? null : value];
    });
    return [{ key, name: label, points }];
  });
}

export function rowsOf(
  curve: Curve,
  names: readonly [string, string],
  units: readonly [string, string],
) {
  const [x, y] = names;
  const complex = curve.im !== undefined;
  const values = complex ? [`Re ${y}`, `Im ${y}`] : [y];
  return [
    [x, ...values],
    [units[0], ...values.map(() => units[1])],
    ...curve.x.map((at, i) => [
      String(at),
      String(curve.re[i] ?? ''),
      ...(complex ? [String(curve.im?.[i] ?? '')] : []),
    ]),
  ];
}
