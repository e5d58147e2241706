/**
 * Legendre polynomials P_0(x) … P_lMax(x).
 *
 * Formula: with d_l = P_l - P_{l-1}, (l+1) d_{l+1} = l d_l - (2l+1)(1-x) P_l, which does not lose the forward cone as
 * the plain three-term recurrence does; for x < 0, P_l(x) = (-1)^l P_l(-x).
 *
 * @param lMax highest degree, integer >= 0
 * @param x argument, -1 to 1
 * @param oneMinusX 1 - x, where it is known better than by subtraction (2 sin²(theta/2)); ignored for x < 0
 * @returns lMax + 1 values; error about lMax·u of the envelope
 * @throws RangeError outside the domain
 *
 * Source: DLMF 14.10.3, 18.9; difference form after C. Reinsch (as in J. Stoer, Numerische Mathematik 1).
 */
export function legendreArray(lMax: number, x: number, oneMinusX = 1 - x): Float64Array {
  if (!(Number.isInteger(lMax) && lMax >= 0)) throw new RangeError(`degree ${lMax} is no count`);
  if (!(x >= -1 && x <= 1)) throw new RangeError(`P_l(x) is asked at ${x}, outside -1 to 1`);
  const values = new Float64Array(lMax + 1);
  const gap = x < 0 ? 1 + x : oneMinusX;
  let value = 1;
  let difference = 0;
  values[0] = 1;
  for (let l = 0; l < lMax; l++) {
    difference = (l * difference - (2 * l + 1) * gap * value) / (l + 1);
    value += difference;
    values[l + 1] = x < 0 && l % 2 === 0 ? -value : value;
  }
  return values;
}
