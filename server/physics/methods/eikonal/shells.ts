import type { Complex } from '#server/physics/potentials/types.ts';
import type { LocalPotential } from '../local-potential.ts';
import { impactPanels, joined, type ImpactPanels } from './impact-panels.ts';
import type { Phase } from './phase.ts';
import { pastCharges } from './point-charges.ts';
import { shellRim, type Rim } from './shell-rim.ts';
import type { Transmission } from './transmission.ts';

/** J0 turns through no more than this from the start of a rim to the shell, rad. */
const TURN_OF_J0 = 3;

/** A delta shell in the eikonal: chi = -A/√(R² - b²) inside. */
interface EikonalShell {
  R: number;
  A: number;
}

/** Shells of the interaction by radius; those of one radius are one. */
export function eikonalShells({ shells }: LocalPotential, k: number): EikonalShell[] {
  const strengths = new Map<number, number>();
  for (const { R, re } of shells) strengths.set(R, (strengths.get(R) ?? 0) + re);
  return [...strengths]
    .map(([R, g]) => ({ R, A: (g * R) / k }))
    .filter(({ A }) => A !== 0)
    .sort((one, other) => one.R - other.R);
}

/** The phase with what the shells add to it. */
export function withShells(
  chi: (b: number) => Phase,
  shells: readonly EikonalShell[],
): (b: number) => Phase {
  if (shells.length === 0) return chi;
  return (b) => {
    const phase = chi(b);
    let { re, error } = phase;
    for (const { R, A } of shells) {
      if (!(b < R)) continue;
      const part = A / Math.sqrt((R - b) * (R + b));
      re -= part;
      error += 4e-16 * Math.abs(part);
    }
    return { re, im: phase.im, error };
  };
}

/** The rim of one shell, whose own phase is left out of `others`. */
function rimOf(
  shell: EikonalShell,
  others: (b: number) => Phase,
  { F, noise }: Transmission,
  eta: number,
  k: number,
): Rim {
  const past = (b: number): Complex => (eta === 0 ? { re: 1, im: 0 } : pastCharges(eta, k, b));
  const whole = (b: number, own: number): Phase => {
    const { re, im, error } = others(b);
    return { re: re + own, im, error: error + 4e-16 * Math.abs(own) };
  };
  return {
    ...shell,
    F: (b, own) => F(whole(b, own), b),
    noise: (b, own) => noise(whole(b, own), b),
    firstOrderApart: eta === 0,
    O: (b) => {
      const { re, im } = others(b);
      const [charges, size] = [past(b), Math.exp(-im)];
      const [x, y] = [size * Math.cos(re), size * Math.sin(re)];
      return { re: x * charges.re - y * charges.im, im: x * charges.im + y * charges.re };
    },
    S: (b) => {
      if (eta !== 0) {
        const charges = past(b);
        return { re: -charges.re, im: -charges.im };
      }
      const { re, im } = others(b);
      return { re: im - 1, im: -re };
    },
  };
}

/**
 * A transmission on panels, and on points about the rims of the shells.
 *
 * @param smooth phase without shells
 * @param transmission as a function of the whole phase
 * @returns null where it turns too often to be followed
 */
export function transmissionOnPanels(
  potential: LocalPotential,
  shells: readonly EikonalShell[],
  smooth: (b: number) => Phase,
  transmission: Transmission,
  eta: number,
  k: number,
): ImpactPanels | null {
  const { edges, jumps } = potential;
  const chi = withShells(smooth, shells);
  const F = (b: number) => transmission.F(chi(b), b);
  const noise = (b: number) => transmission.noise(chi(b), b);
  const parts: (ImpactPanels | null)[] = [];
  const between = (from: number, to: number) => {
    const inner = edges.filter((b) => b > from && b < to);
    if (to > from) parts.push(impactPanels(F, [from, ...inner, to], noise));
  };
  let start = 0;
  for (const shell of shells) {
    const { R } = shell;
    const all = Math.sqrt((R - start) * (R + start));
    const wanted = Math.sqrt((TURN_OF_J0 * R) / k);
    // A rim that would reach the centre takes all; one that would reach the next shell leaves half.
    const y1 = wanted > 0.9 * all ? (start === 0 ? all : all / 2) : wanted;
    const b1 = y1 === all ? start : Math.sqrt((R - y1) * (R + y1));
    between(start, b1);
    const others = withShells(
      smooth,
      shells.filter((other) => other !== shell),
    );
    const rim = rimOf(shell, others, transmission, eta, k);
    const inside = jumps.filter((r) => r > b1 && r < R);
    parts.push(shellRim(rim, y1, inside, 2 * k));
    start = R;
  }
  between(start, edges.at(-1) ?? 0);
  const found = parts.filter((part) => part !== null);
  return found.length === parts.length ? joined(found) : null;
}
