import type { Dimension } from '#shared/units/vocabulary.ts';

/** How a form is written in Python. */
export interface Closed {
  /** Parameters in the order they are handed over, with their dimension. */
  parameters: readonly (readonly [string, Dimension])[];
  /** A depth that may be complex: V0 and W0. */
  complex?: boolean;
  code: string;
}

/** Transforms ∫ r² V(r) j0(qr) dr in eV angstrom³, as the register writes them; small arguments by series, where the formula cancels. */
export const CLOSED: Readonly<Record<string, Closed>> = {
  yukawa: {
    parameters: [
      ['V0', 'energy'],
      ['a', 'length'],
    ],
    code: `def yukawa(q, V0, a):
    return V0 * a**3 / (1 + (q * a)**2)`,
  },
  coulomb: {
    parameters: [],
    code: `def coulomb(q, charge_product):
    return charge_product * ALPHA * HBAR_C / q**2`,
  },
  screenedCoulomb: {
    parameters: [['a', 'length']],
    code: `def screenedCoulomb(q, charge_product, a):
    return charge_product * ALPHA * HBAR_C * a**2 / (1 + (q * a)**2)`,
  },
  squareWell: {
    parameters: [['R', 'length']],
    complex: true,
    code: `def squareWell(q, depth, R):
    x = q * R
    if x < 0.1:
        return depth * R**3 * (1/3 - x**2/30 + x**4/840 - x**6/45360 + x**8/3991680)
    return depth * (math.sin(x) - x * math.cos(x)) / q**3`,
  },
  gaussian: {
    parameters: [['a', 'length']],
    complex: true,
    code: `def gaussian(q, depth, a):
    return depth * math.sqrt(math.pi) / 4 * a**3 * math.exp(-(q * a)**2 / 4)`,
  },
  exponential: {
    parameters: [
      ['V0', 'energy'],
      ['a', 'length'],
    ],
    code: `def exponential(q, V0, a):
    return 2 * V0 * a**3 / (1 + (q * a)**2)**2`,
  },
  deltaShell: {
    parameters: [
      ['g', 'energyLength'],
      ['R', 'length'],
    ],
    code: `def deltaShell(q, g, R):
    x = q * R
    return g * R**2 * (1 - x**2/6 if x < 1e-4 else math.sin(x) / x)`,
  },
  contact: {
    parameters: [['b', 'length']],
    code: `def contact(q, b):
    return b / FACTOR`,
  },
};
