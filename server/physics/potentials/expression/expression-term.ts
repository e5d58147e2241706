import type { LegendrePanel } from '#server/physics/numerics/legendre-panels.ts';
import { fitPanels } from '#server/physics/numerics/legendre-panels.ts';
import { panelSineTransform } from '#server/physics/numerics/panel-sine.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { SMALLEST_NORMAL, UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { refuse } from '../parameters.ts';
import { radialQuadrature } from '../radial-quadrature.ts';
import { Q_ALLOWANCE } from '../transform-error.ts';
import type { Tail, Term } from '../types.ts';
import type { Compiled } from './evaluate.ts';
import type { Profile } from './profile.ts';

/** Share of ∫ r² |V| dr that the fit of one panel may miss. */
const AIM = 5e-17;
/** Calls of the formula times its parts. */
const MOST_WORK = 3e6;

interface Fitted {
  compiled: Compiled;
  profile: Profile;
  panels: LegendrePanel[];
  /** Bounds of ∫ |r V - c| dr and of ∫ r |r V - c| dr beyond the end. */
  remainder: { plain: number; moment: number };
  norm: number;
}

/** ∫ x |f| and ∫ f over panels, from their sums at the points of a rule. */
function momentsOf(panels: readonly LegendrePanel[], g: (r: number) => number) {
  let total = 0;
  const parts = panels.map(({ middle, half }) => {
    const inner = integrate((r) => r * Math.abs(g(r)), middle - half, middle + half, {
      relative: 1e-9,
      maxEvaluations: 2000,
    });
    total += inner.value;
    return { from: middle - half, to: middle + half, sum: total, part: inner.value };
  });
  return { total, parts };
}

/** Radius within which half of ∫ r² |V| dr lies. */
function medianRadius({ total, parts }: ReturnType<typeof momentsOf>): number {
  const found = parts.find(({ sum }) => sum >= total / 2);
  if (!found) return 0;
  const { from, to, sum, part } = found;
  if (!(part > 0)) return to;
  // ∫ r² dr grows as r³: exact for a well, good enough for the rest.
  return Math.cbrt(from ** 3 + (to ** 3 - from ** 3) * (1 - (sum - total / 2) / part));
}

/** V jumps where its values on both sides differ by more than a millionth of the larger. */
function jumpsOf({ at }: Compiled, branches: readonly number[]): number[] {
  return branches.filter((r) => {
    const [inner, outer] = [at(r * (1 - 1e-9)), at(r * (1 + 1e-9))];
    return Math.abs(inner - outer) > 1e-6 * Math.max(Math.abs(inner), Math.abs(outer));
  });
}

/** Edges that double from the radius where most of V lies: a wide panel would lose digits to its own width. */
function edgesOf({ scale, end }: Profile, inside: readonly number[]): number[] {
  const edges = [...inside];
  for (let r = scale; r < end; r *= 2) edges.push(r);
  const sorted = edges.sort((a, b) => a - b);
  return [0, ...sorted.filter((r, i) => r !== sorted[i - 1]), end];
}

function fit(
  compiled: Compiled,
  profile: Profile,
  radii: { mesh: readonly number[]; branches: readonly number[] },
  parts: number,
): Fitted {
  const { coulomb, end, norm } = profile;
  const { at, knownAt } = compiled;
  const inside = radii.branches.filter((r) => r > 0 && r < end);
  const found = fitPanels((r) => r * at(r) - coulomb, edgesOf(profile, inside), {
    moment: AIM * norm,
    noise: (r) => r * knownAt(r).error + 2 * UNIT_ROUNDOFF * Math.abs(r * at(r)),
    checks: radii.mesh,
    maxEvaluations: MOST_WORK / parts,
  });
  if (found.failure) {
    const where = `at r = ${Number(found.failure.at.toPrecision(3))} angstrom`;
    refuse(
      'formula',
      found.failure.finite
        ? `V(r) cannot be followed ${where}: it varies too fast or too wildly to be integrated.`
        : `V(r) has no finite value ${where}: it must be a number for every r above zero.`,
    );
  }
  const last = end * Math.abs(end * at(end) - coulomb);
  const { fall } = profile;
  const remainder =
    fall < Infinity
      ? { plain: last / (fall - 2), moment: (end * last) / (fall - 3) }
      : { plain: last, moment: end * last };
  return { compiled, profile, panels: found.panels, remainder, norm };
}

const divergent = (coulomb: number): NumericalResult => ({
  value: Math.sign(coulomb) * Infinity,
  error: 0,
  evaluations: 0,
  status: 'converged',
});

/** c/q² of a Coulomb tail added to the transform of what it leaves. */
function withTail(
  coulomb: number,
  rest: (q: number) => NumericalResult,
): (q: number) => NumericalResult {
  if (coulomb === 0) return rest;
  return (q) => {
    const point = coulomb / (q * q);
    if (!Number.isFinite(point)) return divergent(coulomb);
    const part = rest(q);
    const rounding = (4 * UNIT_ROUNDOFF + 2 * Q_ALLOWANCE) * Math.abs(point);
    return { ...part, value: point + part.value, error: part.error + rounding };
  };
}

/** Transform of the panels: V is not asked again, whatever q. */
function fromPanels({ panels, profile, remainder, norm }: Fitted): (q: number) => NumericalResult {
  return (q) => {
    const { value, error } = panelSineTransform(panels, q);
    const slope = norm * Math.min(1.3, (q * profile.end) ** 2 / 3);
    const { plain, moment } = remainder;
    const beyond = q * moment > plain ? plain / q : moment;
    const whole = error + beyond + Q_ALLOWANCE * slope + SMALLEST_NORMAL;
    return { value, error: whole, evaluations: 0, status: 'converged' };
  };
}

function tailOf({ coulomb, fall, end }: Profile, { at }: Compiled): Tail {
  if (coulomb !== 0) return 'coulomb';
  if (fall < Infinity) return 'power';
  return at(end) === 0 && at(end * 1.0001) === 0 ? 'compact' : 'exponential';
}

function lineOf({ compiled, profile, panels }: Fitted): (from: number) => number | null {
  const edges = panels.map(({ middle, half }) => middle + half);
  return (from) => {
    if (profile.coulomb !== 0) return null;
    if (!(from < profile.end)) return 0;
    const line = integrate(compiled.at, from, profile.end, {
      breakpoints: edges,
      relative: 1e-9,
      maxEvaluations: 20_000,
    });
    return Number.isFinite(line.value) ? line.value : null;
  };
}

const NOTHING: NumericalResult = { value: 0, error: 0, evaluations: 0, status: 'converged' };

/** A formula that is zero, or c/r, everywhere: there is nothing to fit. */
function plainTerm({ coulomb }: Profile, { at }: Compiled): Term {
  const transform = coulomb === 0 ? () => NOTHING : withTail(coulomb, () => NOTHING);
  return {
    form: 'expression',
    strength: { re: coulomb === 0 ? 0 : 1, im: 0 },
    v: at,
    closed: transform,
    quadrature: transform,
    coulombTail: coulomb,
    norm: 0,
    firstMoment: coulomb === 0 ? 0 : null,
    lineIntegral: () => (coulomb === 0 ? 0 : null),
    range: null,
    tail: coulomb === 0 ? 'compact' : 'coulomb',
    reach: null,
    breakpoints: [],
  };
}

/**
 * The term of a compiled formula.
 *
 * Formula: s(r) = V(r) in eV, strength 1; S(q) = c/q² + ∫ (r V - c) sin(qr)/q dr, r V - c fitted by Legendre polynomials on panels, their
 * sine transforms in closed form; beside it the oscillatory quadrature that samples V itself.
 *
 * @param profile where V counts
 * @param radii where it is looked at
 * @param parts of the formula, for the bound of the work
 * @throws DomainError invalidInput at /formula for a V(r) that cannot be followed
 */
export function expressionTerm(
  compiled: Compiled,
  profile: Profile,
  radii: { mesh: readonly number[]; branches: readonly number[] },
  parts: number,
): Term {
  if (profile.norm === 0) return plainTerm(profile, compiled);
  const rough = fit(compiled, profile, radii, parts);
  const { coulomb, end, rise } = profile;
  const g = (r: number) => r * compiled.at(r) - coulomb;
  const moments = momentsOf(rough.panels, g);
  const fitted = { ...rough, norm: moments.total };
  const tail = tailOf(profile, compiled);
  const edges = [0, ...fitted.panels.map(({ middle, half }) => middle + half)];
  const quadrature = radialQuadrature(
    { integrand: g, edges, tail: fitted.remainder.moment },
    fitted.norm,
  );
  const rest = fromPanels(fitted);
  const hasLine = coulomb === 0 && rise < 2 - 1e-3;
  return {
    form: 'expression',
    strength: { re: 1, im: 0 },
    v: compiled.at,
    closed: withTail(coulomb, rest),
    quadrature: withTail(coulomb, quadrature),
    coulombTail: coulomb,
    ...(coulomb !== 0 && { withoutTail: rest }),
    norm: fitted.norm,
    firstMoment: hasLine
      ? fitted.panels.reduce((sum, { half, c }) => sum + 2 * half * (c[0] ?? 0), 0)
      : null,
    lineIntegral: lineOf(fitted),
    range: medianRadius(moments),
    tail,
    reach: coulomb === 0 ? end : null,
    breakpoints: jumpsOf(
      compiled,
      radii.branches.filter((r) => r <= end),
    ),
    knots: radii.branches.filter((r) => r > 0 && r <= end),
  };
}
