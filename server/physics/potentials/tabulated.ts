import { readParameters } from './parameters.ts';
import { integral, lineOf, shapeOf, straightened, tableOf } from './table-shape.ts';
import type { TableTail } from './table-tail.ts';
import { exponentialTailPanels, TABLE_TAILS } from './table-tail.ts';
import { closedTransform, tableQuadrature } from './table-transform.ts';
import { readPoints } from './tabulated-points.ts';
import type { AnyParameter, Form, Term } from './types.ts';

const parameters: AnyParameter[] = [
  {
    key: 'points',
    label: 'Table',
    symbol: '(r_i, V_i)',
    dimension: 'points',
    default: Array.from({ length: 17 }, (_, i) => {
      const r = i / 4;
      return [r, Number((-10 * Math.exp(-r * r)).toPrecision(6))] as const;
    }),
    description:
      'Rows of r and V, r rising. A cubic spline passes through them; inside the first row V keeps its first value.',
  },
  {
    key: 'tail',
    label: 'Beyond the last row',
    symbol: 'V(r > r_n)',
    dimension: 'choice',
    choices: TABLE_TAILS,
    default: 'zero',
    description:
      'zero: nothing; exponential: through the last two rows; coulomb: falling as 1/r from the last one.',
  },
];

function termOf(r: readonly number[], V: readonly number[], tail: TableTail): Term {
  const table = tableOf(r, V, tail);
  const { exponential, coulomb, R } = table;
  const v = shapeOf(table);
  const left = (x: number) => v(x) - coulomb / x;
  const norm = integral(table, (x) => x * x * Math.abs(left(x)));
  const first = integral(table, (x) => x * Math.abs(left(x)));
  const closed = closedTransform(table, norm);
  const lines = closedTransform(straightened(table, r, V), norm);
  const start = r[0] ?? 0;
  return {
    form: 'tabulated',
    strength: { re: V.some((value) => value !== 0) ? 1 : 0, im: 0 },
    v,
    closed,
    quadrature: tableQuadrature(table, norm),
    coulombTail: coulomb,
    ...(coulomb !== 0 && { withoutTail: closedTransform(table, norm, true) }),
    norm,
    firstMoment: coulomb === 0 ? integral(table, (x) => x * v(x)) : null,
    lineIntegral: lineOf(table),
    range: first > 0 ? norm / first : R,
    tail: coulomb !== 0 ? 'coulomb' : exponential ? 'exponential' : 'compact',
    reach: coulomb !== 0 ? null : exponential ? exponentialTailPanels(exponential).reach : R,
    breakpoints: start > 0 ? [start, R] : [R],
    knots: table.pieces.map((piece) => piece.start).filter((x) => x > 0),
    interpolationDoubt: (q) => Math.abs(closed(q).value - lines(q).value),
  };
}

function isTail(name: string | undefined): name is TableTail {
  return TABLE_TAILS.some((tail) => tail === name);
}

export const tabulated: Form<AnyParameter> = {
  key: 'tabulated',
  label: 'Table',
  formula: String.raw`V(r) = \text{cubic spline through } (r_i, V_i),\ \text{not-a-knot};\quad \text{tail beyond } r_n`,
  transformFormula: String.raw`\int_0^\infty r^2 V(r)\,j_0(qr)\,dr = \frac{1}{q}\sum_i \int_{r_i}^{r_{i+1}} r\,P_i(r)\,\sin qr\,dr + \text{tail}`,
  source:
    'Your own rows; spline: C. de Boor, A Practical Guide to Splines (1978); integrals in closed form after L. N. G. Filon, Proc. R. Soc. Edinburgh 49 (1928) 38',
  parameters,
  build(values) {
    const read = readParameters(parameters, values);
    const { r, V } = readPoints(read.points('points') ?? []);
    const tail = read.name('tail');
    return termOf(r, V, isTail(tail) ? tail : 'zero');
  },
};
