import type { Term } from '#server/physics/potentials/types.ts';
import type { Condition } from '../amplitude.ts';
import type { MethodInput } from '../method-input.ts';

/** k times the range above which a path through the potential is many wavelengths long. */
const MANY_WAVELENGTHS = 5;
const SHALLOW = 0.1;

/** |∫ V dr| from r = 1/k outwards over the range, as a share of the energy; null where it diverges or has no meaning. */
function meanDepth(terms: readonly Term[], range: number, { k, twoMuOverHbar2 }: MethodInput) {
  let re = 0;
  let im = 0;
  let found = false;
  for (const { strength, lineIntegral, coulombTail } of terms) {
    if (coulombTail !== 0) continue;
    const line = lineIntegral(1 / k);
    if (line === null) return null;
    re += strength.re * line;
    im += strength.im * line;
    found = true;
  }
  if (!found) return null;
  return (twoMuOverHbar2 * Math.hypot(re, im)) / range / (k * k);
}

/** When the eikonal may be used: short waves, fast particles, small angles. */
export function eikonalConditions(terms: readonly Term[], input: MethodInput): Condition[] {
  const { k, born } = input;
  const range = Math.max(0, ...terms.map((term) => term.range ?? 0));
  const found: Condition[] = [];
  if (range > 0) {
    const value = k * range;
    found.push({
      name: 'shortWaves',
      value,
      least: MANY_WAVELENGTHS,
      holds: value >= MANY_WAVELENGTHS,
      meaning: 'Wave number times the largest range: the potential must be many wavelengths wide.',
    });
    const depth = meanDepth(terms, range, input);
    if (depth !== null) {
      found.push({
        name: 'fastParticles',
        value: depth,
        most: SHALLOW,
        holds: depth <= SHALLOW,
        meaning:
          'Mean depth of the potential, |∫ V dr| from r = 1/k outwards over the range, as a share of the energy: the particle must hardly be slowed or bent.',
      });
    }
    found.push({
      name: 'smallAngles',
      value: Math.min(Math.PI, 1 / Math.sqrt(value)),
      holds: true,
      meaning:
        'Scattering angle in rad, in the centre of mass, up to which a straight path is assured: 1/√(k times the range). Beyond it the curve may be far off.',
    });
  }
  const eta = Math.hypot(born.tail.re, born.tail.im) / (2 * k);
  if (eta > 0) {
    found.push({
      name: 'eta',
      value: eta,
      holds: true,
      meaning:
        "Sommerfeld's parameter |Z1 Z2| alpha c/v. The eikonal amplitude of the bare charges is the exact one at any value; what is short of range beside it is not.",
    });
  }
  const fittedTo = Math.min(Infinity, ...terms.map(({ kinks }) => kinks?.[0] ?? Infinity));
  if (fittedTo < Infinity) {
    found.push({
      name: 'momentumTransfer',
      value: 2 * k,
      most: fittedTo,
      holds: 2 * k <= fittedTo,
      meaning:
        'Largest momentum transfer in 1/angstrom. The potential is known up to the limit; above it only the first-order part of the amplitude has the nucleus.',
    });
  }
  return found;
}
