import { spawnSync } from 'node:child_process';
import { firstBorn } from '#server/physics/methods/born1.ts';
import type { PartialWaves } from '#server/physics/methods/amplitude.ts';
import { partialWaves } from '#server/physics/methods/partial-waves/partial-waves.ts';
import { formByKey } from '#server/physics/potentials/register.ts';
import { measure, shown } from './measure.ts';

const SINES = Float64Array.from({ length: 181 }, (_, i) => Math.sin((i * Math.PI) / 360));
const RADIUS = 1;
const DIFFUSENESS = 0.1;
const TWO_MU = 0.25;
const WITHIN = 1e-9;
const SIZES = [20, 50, 100, 200, 500];

interface Other {
  setting: string;
  best: number;
  median: number;
  /** Largest error of a phase, rad. */
  off: number;
}

/** A well half as deep as the energy, in which every wave up to kR is distorted; strengths in eV. */
function wellAt(k: number) {
  const form = formByKey('woodsSaxon');
  if (!form) throw new Error('woodsSaxon is not registered.');
  const depth = -(k * k) / 2 / TWO_MU;
  const context = { twoMuOverHbar2: TWO_MU, projectileCharge: 0, targetCharge: 0 };
  return form.build({ V0: depth, R: RADIUS, a: DIFFUSENESS }, context);
}

/** Everything from the term to the amplitudes at 181 angles. */
function distribution(k: number): { found: PartialWaves; square: number[] } {
  const terms = [wellAt(k)];
  const born = firstBorn(terms, TWO_MU);
  const found = partialWaves({ terms, born, k, twoMuOverHbar2: TWO_MU, projectileSpin: null });
  if ('unavailable' in found) throw new Error(found.unavailable);
  const square = Array.from(SINES, (sine) => {
    const f = found.shortRange(2 * k * sine);
    return f.re * f.re + f.im * f.im;
  });
  return { found, square };
}

function others(k: number, repeats: number): Record<'numerov' | 'ratios' | 'ivp', Other> {
  const { waves, lMax } = distribution(k).found;
  const T = waves
    .filter(({ l }) => l <= lMax)
    .map(({ delta }) => [Math.sin(2 * delta) / 2, Math.sin(delta) ** 2]);
  const input = { k, R: RADIUS, a: DIFFUSENESS, U0: -(k * k) / 2, T, repeats };
  const run = spawnSync('/usr/bin/python3', ['scripts/bench/partial_waves.py'], {
    input: JSON.stringify(input),
    encoding: 'utf8',
  });
  if (run.status !== 0) {
    throw new Error(`scipy is needed (apt-get install python3-scipy): ${run.stderr}`);
  }
  return JSON.parse(run.stdout) as Record<'numerov' | 'ratios' | 'ivp', Other>;
}

/** Slope of ln t over ln x by least squares. */
function exponentOf(x: readonly number[], t: readonly number[]): number {
  const mean = (list: number[]) => list.reduce((a, b) => a + b, 0) / list.length;
  const [u, v] = [x.map(Math.log), t.map(Math.log)];
  const [mu, mv] = [mean(u), mean(v)];
  const over = u.reduce((sum, value, i) => sum + (value - mu) * ((v[i] ?? NaN) - mv), 0);
  return over / u.reduce((sum, value) => sum + (value - mu) ** 2, 0);
}

function benchRatios(): void {
  const k = 20 / RADIUS;
  const ours = measure(() => distribution(k), 200);
  const { found } = distribution(k);
  const error = Math.max(...found.waves.map((wave) => wave.error));
  console.log('\nPartial waves, woodsSaxon, kR 20, 181 angles, phases to 1e-9');
  console.log(
    `  engine                     ${shown(ours.best)} best, ${shown(ours.median)} median; ` +
      `${found.lMax + 1} waves, phases to ${error.toExponential(1)} by their own bound`,
  );
  const { numerov, ratios, ivp } = others(k, 100);
  for (const [name, other, wanted] of [
    ['Numerov in numpy, all l', numerov, 20],
    ['the same by ratios', ratios, 20],
    ['scipy solve_ivp, DOP853', ivp, 100],
  ] as const) {
    const faster = `${(other.best / ours.best).toFixed(1)} (best), ${(other.median / ours.median).toFixed(1)} (median)`;
    console.log(
      `  ${name.padEnd(26)} ${shown(other.best)} best, ${shown(other.median)} median; engine faster by ${faster}, wanted ${wanted}; ` +
        `${other.setting}, phases apart by ${other.off.toExponential(1)}${other.off <= WITHIN ? '' : ', MORE THAN 1e-9'}`,
    );
  }
}

function benchGrowth(): void {
  const times = SIZES.map((kR) => measure(() => distribution(kR), kR > 150 ? 3 : 12).best);
  const listed = SIZES.map((kR, i) => `${kR}: ${shown(times[i] ?? NaN)}`).join(', ');
  console.log(
    `  cost by kR                 ${listed}; fitted exponent ${exponentOf(SIZES, times).toFixed(2)}, wanted at most 2.2`,
  );
}

/** Full angular distributions by partial waves, against numpy and scipy in the same run, and how the cost grows. */
export function benchPartialWaves(): void {
  benchRatios();
  benchGrowth();
}
