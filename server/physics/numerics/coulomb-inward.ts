import { UNIT_ROUNDOFF } from './rounding.ts';

/** A solution and its derivative, both times 2^power, and the Taylor steps taken to reach it. */
export interface Carried {
  g: number;
  dg: number;
  power: number;
  steps: number;
}

const STEP_POWER = 256;
const BIG = 2 ** STEP_POWER;
const MAX_TERMS = 200;

/** y and h y' at rho + h from rho y'' = (2 eta - rho) y, whose Taylor coefficients obey a recurrence of four terms. */
function taylorStep(eta: number, rho: number, h: number, y: number, dy: number): [number, number] {
  const factor = (2 * eta - rho) * h * h;
  const cube = h * h * h;
  let [before, here, next] = [0, y, dy * h];
  let value = here + next;
  let slope = next;
  for (let m = 0; m < MAX_TERMS; m++) {
    const term =
      (factor * here - cube * before - (m + 1) * m * h * next) / (rho * (m + 1) * (m + 2));
    value += term;
    slope += (m + 2) * term;
    const small = UNIT_ROUNDOFF / 16;
    if ((m + 2) * (Math.abs(term) + Math.abs(next)) < small * (Math.abs(value) + Math.abs(slope)))
      break;
    [before, here, next] = [here, next, term];
  }
  return [value, slope / h];
}

/**
 * Carries a solution of the Coulomb equation for l = 0 inwards, where G_0 is the one that grows or all oscillate alike.
 *
 * Formula: y'' = (2 eta/rho - 1) y by Taylor series in steps of at most rho/3 and two inverse local wave numbers.
 *
 * @param eta Sommerfeld parameter
 * @param from argument where the solution is known, > 0
 * @param y value there
 * @param dy derivative there
 * @param to argument wanted, 0 < to <= from
 * @returns value and derivative times 2^power; relative error about 4 u a step
 *
 * Source: textbook; power series of a linear equation, DLMF 33.2.1.
 */
export function carryInwards(
  eta: number,
  from: number,
  y: number,
  dy: number,
  to: number,
): Carried {
  let [rho, g, dg, power, steps] = [from, y, dy, 0, 0];
  while (rho > to) {
    const length = Math.min(rho / 3, 2 / Math.sqrt(Math.abs((2 * eta) / rho - 1) + 0.25));
    const target = rho - length;
    const next = target - to < 0.1 * length ? to : target;
    [g, dg] = taylorStep(eta, rho, next - rho, g, dg);
    rho = next;
    steps += 1;
    while (Math.hypot(g, dg) > BIG) {
      g /= BIG;
      dg /= BIG;
      power += STEP_POWER;
    }
  }
  return { g, dg, power, steps };
}
