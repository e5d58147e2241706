import type { EstimateResult } from './estimate.ts';
import { chargeProductOf, isRelativisticLepton } from './lepton-factor.ts';
import type { Term } from './potentials/types.ts';
import type { MethodName } from './problem.ts';
import type { Warning } from './warning.ts';

const isActive = ({ strength }: Term) => strength.re !== 0 || strength.im !== 0;

const NAMES: Record<MethodName, string> = {
  born1: 'first order',
  born2: 'second order',
  eikonal: 'the eikonal amplitude',
  partialWaves: 'partial waves',
};

function computedBeyond({ beyond }: EstimateResult): MethodName[] {
  const names: readonly MethodName[] = ['born2', 'eikonal', 'partialWaves'];
  return names.filter((name) => {
    const found = name === 'born1' ? undefined : beyond[name];
    return found !== undefined && !('unavailable' in found);
  });
}

/** |f1|² is the same for V and -V: what tells them apart begins at second order. */
function signUnseen(result: EstimateResult): Warning | null {
  const { terms, projectile } = result.problem;
  const active = terms.filter(isActive);
  const first = result.firstBorn;
  if (first === null || 'unavailable' in first || active.length === 0) return null;
  if (active.every(({ form }) => form === 'contact')) return null;
  // With absorption the imaginary part keeps its sign, and a pair of bare charges has one cross section for both.
  if (active.some(({ strength }) => strength.im !== 0)) return null;
  const bare = active.every(({ tail, norm }) => tail === 'coulomb' && norm === 0);
  if (bare && projectile.kind !== 'lepton') return null;
  const charged = chargeProductOf(result.problem) !== 0 && projectile.kind === 'lepton';
  const who = charged
    ? 'an electron and a positron of this energy have'
    : 'the same interaction with its sign reversed has';
  const sees = computedBeyond(result);
  // Of an arbitrary potential nobody asks it; of electrons and positrons everybody does.
  if (!charged && sees.length === 0) return null;
  const then =
    sees.length > 0
      ? `${sees.map((name) => NAMES[name]).join(', ')} tell the two apart`
      : 'ask for partial waves to see the difference';
  return {
    code: 'signUnseen',
    level: 'info',
    message: `First order cannot see the sign of the potential: ${who} the same first-order cross section; ${then}.`,
  };
}

/** The radial equation has no spin of its own. */
function spinless(result: EstimateResult): Warning | null {
  const { problem } = result;
  if (!isRelativisticLepton(problem) || chargeProductOf(problem) === 0) return null;
  const beyond = computedBeyond(result);
  if (beyond.length === 0) return null;
  const names = beyond.map((name) => NAMES[name]).join(', ');
  return {
    code: 'spinlessBeyondFirstOrder',
    level: 'caution',
    message: `The spin of a relativistic lepton is in the first-order curve alone; ${names} solve the wave equation with relativistic k and mu but without spin and without the square of the potential. The verdict compares amplitudes without spin.`,
  };
}

/** What must be known of a result because of the methods it was asked by. */
export function methodWarnings(result: EstimateResult): (Warning | null)[] {
  return [signUnseen(result), spinless(result)];
}
