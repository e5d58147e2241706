import type { Estimate } from '#shared/contracts/estimates.ts';

/** The figures of an estimate that a change of the engine must not move unseen, by name. */
export type KeyDigits = Record<string, number | string>;

const INTEGRALS = ['elastic', 'absorption', 'total', 'momentumTransfer', 'viscosity'] as const;

/** Five points of the curve, first and last among them. */
function sampled(length: number): number[] {
  return [...new Set([0, 0.25, 0.5, 0.75, 1].map((part) => Math.round(part * (length - 1))))];
}

function digitsOfMethod(estimate: Estimate): KeyDigits {
  const method = estimate.methods.born1;
  if (!method || 'unavailable' in method) return { born1: 'unavailable' };
  const digits: KeyDigits = {};
  for (const name of INTEGRALS) {
    const integral = method[name];
    digits[name] = 'divergent' in integral ? 'divergent' : integral.value;
  }
  for (const index of sampled(method.differential.length)) {
    const point = method.differential[index];
    if (!point) continue;
    const at = `at ${point.theta}`;
    digits[`dcs ${at}`] = point.dcs ?? 'none';
    if (point.amplitude) digits[`amplitude ${at}`] = point.amplitude.re;
    (point.branches ?? []).forEach((branch, n) => {
      digits[`branch ${n + 1} ${at}`] = branch.thetaCm;
    });
  }
  return digits;
}

export function keyDigits(estimate: Estimate): KeyDigits {
  const { kinematics, goldenRule, validity, warnings } = estimate;
  return {
    k: kinematics.k.value,
    beta: kinematics.beta,
    energyCm: kinematics.energyCm.value,
    ...digitsOfMethod(estimate),
    ...('unavailable' in goldenRule
      ? { goldenRule: 'unavailable' }
      : { rate: goldenRule.rate.value, densityOfStates: goldenRule.densityOfStates.value }),
    verdict: validity.verdict,
    ...Object.fromEntries(validity.criteria.map(({ name, value }) => [`criterion ${name}`, value])),
    warnings: warnings
      .map(({ code }) => code)
      .sort()
      .join(' '),
  };
}

/** Where the figures differ by more than a tolerance (relative, by name) of themselves, and from which digit on. */
export function movedDigits(
  frozen: KeyDigits,
  now: KeyDigits,
  toleranceOf: (name: string) => number,
): string[] {
  const names = new Set([...Object.keys(frozen), ...Object.keys(now)]);
  return [...names].flatMap((name) => {
    const [was, is] = [frozen[name], now[name]];
    if (typeof was === 'number' && typeof is === 'number') {
      if (was === is) return [];
      const deviation = Math.abs(is / was - 1);
      if (deviation <= toleranceOf(name)) return [];
      const digit = Math.max(1, Math.ceil(-Math.log10(deviation)));
      return [`${name}: ${was} is now ${is} (moved in digit ${digit})`];
    }
    return was === is ? [] : [`${name}: ${was ?? 'absent'} is now ${is ?? 'absent'}`];
  });
}
