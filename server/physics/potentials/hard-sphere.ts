import { lengthParameter, readParameters } from './parameters.ts';
import type { Form, FormParameter } from './types.ts';

const parameters: FormParameter[] = [
  lengthParameter(
    { key: 'R', label: 'Radius', symbol: 'R', description: 'Radius within which nothing enters.' },
    { value: 1, unit: 'angstrom' },
  ),
];

export const hardSphere: Form = {
  key: 'hardSphere',
  label: 'Hard sphere',
  formula: String.raw`V(r) = \begin{cases} \infty, & r < R\\ 0, & r > R \end{cases}`,
  transformFormula: String.raw`\text{none: the integral of an infinite potential does not exist}`,
  source: 'Textbook form; L. I. Schiff, Quantum Mechanics, 3rd ed. (1968), sec. 19',
  parameters,
  build(values) {
    const R = readParameters(parameters, values).need('R');
    return {
      form: 'hardSphere',
      strength: { re: 1, im: 0 },
      v: (r) => (r < R ? Infinity : 0),
      closed: null,
      quadrature: null,
      noBorn:
        'A hard sphere is infinitely strong: the Born integral of its potential does not exist, however small the sphere. Ask for partial waves, or use squareWell with a finite barrier.',
      coulombTail: 0,
      norm: 0,
      firstMoment: null,
      lineIntegral: () => null,
      range: R,
      tail: 'compact',
      reach: R,
      breakpoints: [R],
    };
  },
};
