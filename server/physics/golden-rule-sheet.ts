import { finalStates } from './kinematics/final-states.ts';
import { leptonFactor } from './lepton-factor.ts';
import type { Unavailable } from './methods/amplitude.ts';
import type { FirstBorn } from './methods/born1.ts';
import { exchangeDcs } from './methods/exchange.ts';
import { transform, transformWithoutTail } from './methods/transform.ts';
import type { ConeSamples, Scales } from './observables/cone-samples.ts';
import type { GoldenRule } from './observables/golden-rule.ts';
import { goldenRule } from './observables/golden-rule.ts';
import type { Window } from './observables/window.ts';
import { goldenRuleWindow } from './observables/window.ts';
import { incoherentOf } from './problem-scales.ts';
import type { Problem } from './problem.ts';

/** A factor that stands after the golden rule, and the cross section with it and all before. */
export interface FactorAfter {
  name: 'exchange' | 'spin' | 'mckinleyFeshbach' | 'incoherent';
  dcs: number;
}

export interface GoldenRuleSheet extends GoldenRule {
  window: Window;
  /** The cross section after each further factor, angstrom²/sr, one upon the other. */
  factorsAfter: FactorAfter[];
}

const RANGES_IN_A_BOX = 1000;
const FORWARD: Unavailable = {
  unavailable:
    'The matrix element of a 1/r potential diverges in the forward direction; choose an angle above zero.',
};

function exchangedDcs(problem: Problem, born: FirstBorn, theta: number): number | null {
  if (problem.exchangeSpin === null) return null;
  const { k } = problem.collision;
  const direct = born.amplitude(2 * k * Math.sin(theta / 2));
  const exchanged = born.amplitude(theta === Math.PI ? 0 : 2 * k * Math.cos(theta / 2));
  if (direct === null || exchanged === null) return null;
  return exchangeDcs(direct, exchanged, problem.exchangeSpin).value;
}

/** What the curve holds beyond the chain, factor by factor. */
function factorsAfter(
  problem: Problem,
  born: FirstBorn,
  theta: number,
  plain: number,
): FactorAfter[] {
  const exchanged = exchangedDcs(problem, born, theta);
  if (problem.exchangeSpin !== null) {
    return exchanged === null ? [] : [{ name: 'exchange', dcs: exchanged }];
  }
  const lepton = leptonFactor(problem);
  const found: FactorAfter[] = [];
  if (lepton) found.push({ name: 'spin', dcs: plain * lepton.plain(theta).value });
  if (lepton?.corrected) {
    found.push({ name: 'mckinleyFeshbach', dcs: plain * lepton.corrected(theta).value });
  }
  const incoherent = incoherentOf(problem);
  if (incoherent > 0) {
    found.push({ name: 'incoherent', dcs: (found.at(-1)?.dcs ?? plain) + incoherent });
  }
  return found;
}

/** The golden-rule chain at one angle, its window, and what the curve holds beyond it. */
export function goldenRuleSheet(
  problem: Problem,
  born: FirstBorn,
  theta: number,
  { range }: Scales,
  samples: ConeSamples | null,
): GoldenRuleSheet | Unavailable {
  const { terms, collision, goldenRule: asked } = problem;
  const hasTail = born.tail.re !== 0 || born.tail.im !== 0;
  if (hasTail && theta === 0) return FORWARD;
  const box = asked.boxSide ?? (range > 0 ? RANGES_IN_A_BOX * range : asked.boxWithoutRange);
  const route = hasTail ? transform : transformWithoutTail;
  const sheet = goldenRule(terms, collision, theta, box, route);
  if (sheet === null) return FORWARD;
  const window = goldenRuleWindow({
    theta,
    k: collision.k,
    energyCm: collision.energyCm,
    finalState: finalStates(problem.projectile.mass, problem.target.mass, problem),
    strength: (q) => {
      const f = born.amplitude(q);
      return f === null ? null : f.re * f.re + f.im * f.im;
    },
    range,
    totalRate: samples === null ? null : 8 * Math.PI * samples.moments[0] * sheet.flux,
  });
  return { ...sheet, window, factorsAfter: factorsAfter(problem, born, theta, sheet.dcs) };
}
