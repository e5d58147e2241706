import { spawnSync } from 'node:child_process';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import { ELECTRON_MASS } from '#server/physics/constants/codata2022.ts';
import { firstBorn } from '#server/physics/methods/born1.ts';
import { formByKey } from '#server/physics/potentials/register.ts';
import type { FormContext, Term } from '#server/physics/potentials/types.ts';
import { measure, shown } from './measure.ts';

const ANGLES = Float64Array.from({ length: 181 }, (_, i) => (i * Math.PI) / 180);
const RADIUS = 1;
const DIFFUSENESS = 0.1;
const ACCURACY = 1e-9;

interface Other {
  values: number[];
  best: number;
  median: number;
}

/** The beam whose k times the radius is 20. */
function collisionAt(k: number) {
  const unit = twoBody({
    projectileMass: ELECTRON_MASS,
    targetMass: Infinity,
    energy: 1,
    regime: 'nonrelativistic',
  });
  return twoBody({
    projectileMass: ELECTRON_MASS,
    targetMass: Infinity,
    energy: (k / unit.k) ** 2,
    regime: 'nonrelativistic',
  });
}

function woodsSaxonTerm(context: FormContext): Term {
  const form = formByKey('woodsSaxon');
  if (!form) throw new Error('woodsSaxon is not registered.');
  return form.build({ V0: -1, R: RADIUS, a: DIFFUSENESS }, context);
}

function others(k: number, repeats: number): { quad: Other; numpy: Other } {
  const run = spawnSync('/usr/bin/python3', ['scripts/bench/born1.py'], {
    input: JSON.stringify({ k, R: RADIUS, a: DIFFUSENESS, repeats }),
    encoding: 'utf8',
  });
  if (run.status !== 0) {
    throw new Error(`scipy is needed (apt-get install python3-scipy): ${run.stderr}`);
  }
  return JSON.parse(run.stdout) as { quad: Other; numpy: Other };
}

function deviation(ours: number[], theirs: number[]): number {
  const forward = Math.abs(ours[0] ?? NaN);
  return Math.max(...ours.map((value, i) => Math.abs(value - (theirs[i] ?? NaN)) / forward));
}

/** First Born at 181 angles for woodsSaxon, kR 20, against scipy and numpy in the same run. */
export function benchFirstBorn(): void {
  const collision = collisionAt(20);
  const factor = collision.twoMuOverHbar2;
  const term = woodsSaxonTerm({ twoMuOverHbar2: factor, projectileCharge: -1, targetCharge: 0 });
  const born = firstBorn([term], factor);
  const distribution = () =>
    Array.from(ANGLES, (theta) => born.amplitude(2 * collision.k * Math.sin(theta / 2))?.re ?? NaN);
  const ours = measure(distribution, 400);
  const { quad, numpy } = others(collision.k, 200);
  // f1 = -(2 mu/hbar²) V0 S with V0 = -1 eV.
  const transforms = distribution().map((amplitude) => amplitude / factor);
  console.log('First Born, woodsSaxon, kR 20, 181 angles');
  console.log(
    `  engine                     ${shown(ours.best)} best, ${shown(ours.median)} median`,
  );
  for (const [name, other, wanted] of [
    ['scipy quad, weight sin', quad, 50],
    ['numpy, 240 cached nodes', numpy, 3],
  ] as const) {
    const apart = deviation(transforms, other.values);
    const ratios = `${(other.best / ours.best).toFixed(1)} (best), ${(other.median / ours.median).toFixed(1)} (median)`;
    console.log(
      `  ${name.padEnd(26)} ${shown(other.best)} best, ${shown(other.median)} median; engine faster by ${ratios}, wanted ${wanted}; ` +
        `apart by ${apart.toExponential(1)} of the forward amplitude${apart < ACCURACY ? '' : ', MORE THAN 1e-9'}`,
    );
  }
}
