import type { Estimate } from '#shared/contracts/estimates.ts';

/** The figures of an estimate that a change of the engine must not move unseen, by name. */
export type KeyDigits = Record<string, number | string>;

const INTEGRALS = ['elastic', 'absorption', 'total', 'momentumTransfer', 'viscosity'] as const;

/** Five points of the curve, first and last among them. */
function sampled(length: number): number[] {
  return [...new Set([0, 0.25, 0.5, 0.75, 1].map((part) => Math.round(part * (length - 1))))];
}

type Method = NonNullable<Estimate['methods']['born1']>;

function digitsOfMethod(method: Method | undefined): KeyDigits {
  if (!method || 'unavailable' in method) return { curve: 'unavailable' };
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

function digitsOfWaves(method: Method): KeyDigits {
  if ('unavailable' in method) return {};
  const first = (method.phaseShifts ?? []).slice(0, 4);
  return Object.fromEntries(
    first.flatMap(({ l, j, delta, eta }) => {
      const wave = j === undefined ? `l = ${l}` : `l = ${l}, j = ${j}`;
      return [
        [`delta of ${wave}`, delta],
        [`|S| of ${wave}`, eta],
      ];
    }),
  );
}

/** First order under the bare names, every other method under its own. */
function digitsOfMethods({ methods }: Estimate): KeyDigits {
  const { born1, ...others } = methods;
  const digits = digitsOfMethod(born1);
  if (digits['curve'] !== undefined) {
    delete digits['curve'];
    digits['born1'] = 'unavailable';
  }
  for (const [name, method] of Object.entries(others)) {
    const all = { ...digitsOfMethod(method), ...digitsOfWaves(method) };
    for (const [key, value] of Object.entries(all)) digits[`${name}: ${key}`] = value;
  }
  return digits;
}

export function keyDigits(estimate: Estimate): KeyDigits {
  const { kinematics, goldenRule, validity, warnings } = estimate;
  return {
    k: kinematics.k.value,
    beta: kinematics.beta,
    energyCm: kinematics.energyCm.value,
    ...digitsOfMethods(estimate),
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
