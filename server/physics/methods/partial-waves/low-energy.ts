import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import { PanelError, radialPanels } from '#server/physics/numerics/radial-panels.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { LowEnergy } from '../amplitude.ts';
import type { RadialInteraction } from './interaction.ts';
import type { ZeroWave } from './zero-wave.ts';
import { weakLength, zeroWave } from './zero-wave.ts';

const NOTHING: LowEnergy = {
  scatteringLength: null,
  effectiveRange: null,
  boundStates: null,
  remark: null,
};
/** A scattering length of so many reaches of the potential is a resonance at zero energy. */
const RESONANT = 10;
const RULE = gaussRule(16);
const DOUBLINGS = 60;
/** Ranges after which the square of a tail that falls off as a power has no part in the scattering length. */
const FAR = 1e4;

/**
 * What a tail beyond R adds to the scattering length, first order in the tail.
 *
 * Formula: da/dr = U (r - a)², integrated over doubling panels.
 */
function beyond({ field }: RadialInteraction, R: number, a: number): number {
  const out = new Float64Array(field.components);
  let sum = 0;
  let from = R;
  for (let i = 0; i < DOUBLINGS; i++) {
    const half = from / 2;
    let part = 0;
    for (let n = 0; n < RULE.nodes.length; n++) {
      const r = from + half * (1 + (RULE.nodes[n] ?? 0));
      field.at(r, out);
      part += half * (RULE.weights[n] ?? 0) * (out[0] ?? 0) * (r - a) ** 2;
    }
    sum += part;
    if (Math.abs(part) < UNIT_ROUNDOFF * Math.abs(sum)) break;
    from *= 2;
  }
  return sum;
}

/** p of U ~ r^-p far out. */
function fallAt({ field }: RadialInteraction, R: number): number {
  const out = new Float64Array(field.components);
  field.at(R, out);
  const near = out[0] ?? 0;
  field.at(2 * R, out);
  return Math.log2(near / (out[0] ?? NaN));
}

const FERMI = 1e-5;
/** Nuclei are measured in fm, atoms in angstrom. */
const scaleOf = (size: number): [number, string] =>
  size < 100 * FERMI ? [FERMI, 'fm'] : [1, 'angstrom'];

function complexLength({ R, u, uIm, slope, slopeIm }: ZeroWave): string {
  const size = slope * slope + slopeIm * slopeIm;
  const re = R - (u * slope + uIm * slopeIm) / size;
  const im = -(uIm * slope - u * slopeIm) / size;
  const sign = im < 0 ? '-' : '+';
  const [unit, name] = scaleOf(Math.hypot(re, im));
  const text = (part: number) => Number((part / unit).toPrecision(6));
  return `Complex depths: the scattering length is ${text(re)} ${sign} ${text(Math.abs(im))}i ${name}; bound states are not counted.`;
}

const NEARLY = (a: number, R: number): string =>
  `Resonance at zero energy: the scattering length is ${Math.round(Math.abs(a) / R)} times the reach of the potential; ${
    a > 0 ? 'the last bound state is barely bound' : 'one more bound state is barely missed'
  }, and cross sections at low energy depend on the last digits of the strength.`;

const LOST_RANGE =
  'The effective range is lost in rounding: the potential is too weak for it to be told from nothing.';

function noRange(fall: number): string {
  const tail = `The potential falls off as r^-${Number(fall.toPrecision(2))}`;
  return fall < 5.5
    ? `${tail}: an effective range does not exist.`
    : `${tail}: the effective range hangs on the whole of its tail and is not computed.`;
}

/** Radius that counts as the size of the interaction: where most of it lies. */
function sizeOf(interaction: RadialInteraction, R: number): number {
  return interaction.size > 0 ? Math.min(interaction.size, R) : R;
}

function evaluated(interaction: RadialInteraction, zero: ZeroWave, weak: number | null): LowEnergy {
  const { R, u, slope, square, panels } = zero;
  const D = R * slope - u;
  const inner = weak ?? D / slope;
  const lost = UNIT_ROUNDOFF * (16 + 4 * panels);
  const outer = interaction.power ? beyond(interaction, R, inner) : 0;
  const a = inner + outer;
  const off = lost * (Math.abs(u) + Math.abs(R * slope));
  const rounding =
    weak === null
      ? (off / Math.abs(slope)) * (1 + Math.abs(inner) / R)
      : 16 * lost * Math.abs(weak);
  const error = rounding + lost * Math.abs(outer) + (outer / R) ** 2 * R;
  const known = Number.isFinite(a) && error < Math.abs(a) + R;
  const nodes = zero.nodes + (inner > R ? 1 : 0);
  const size = sizeOf(interaction, R);
  const parts = [
    R,
    (-R * R * slope) / D,
    (R * R * R * slope * slope) / (3 * D * D),
    -square / (D * D),
  ];
  const range = 2 * parts.reduce((sum, part) => sum + part, 0);
  const spread = parts.reduce((sum, part) => sum + Math.abs(part), 0);
  const rangeError = 2 * spread * lost * (1 + (Math.abs(u) + Math.abs(R * slope)) / Math.abs(D));
  const fall = interaction.power ? fallAt(interaction, R) : Infinity;
  const hasRange =
    fall === Infinity && Number.isFinite(range) && rangeError < 1e-3 * (Math.abs(range) + R);
  const remarks = [
    ...(known
      ? []
      : ['Bound state at zero energy to all digits: the scattering length is infinite.']),
    ...(known && Math.abs(a) > RESONANT * size ? [NEARLY(a, size)] : []),
    ...(fall < Infinity ? [noRange(fall)] : hasRange ? [] : [LOST_RANGE]),
  ];
  return {
    scatteringLength: known ? { value: a, error } : null,
    effectiveRange: hasRange ? { value: range, error: rangeError } : null,
    boundStates: nodes,
    remark: remarks.length > 0 ? remarks.join(' ') : null,
  };
}

/**
 * Scattering length, effective range and bound states of l = 0 from the wave at zero energy.
 *
 * Formula: u'' = U u; a = R - u/u' beyond the potential, r = 2 ∫ [(1 - r/a)² - (u/u(0) of its outer line)²] dr; every node is a
 *   bound state.
 *
 * @param interaction as the radial equation takes it
 * @returns lengths in angstrom with bounds of their errors; null with a remark where they have no meaning
 *
 * Source: H. A. Bethe, Phys. Rev. 76 (1949) 38; J. M. Levinson, Mat. Fys. Medd. 25 (1949) no. 9.
 */
export function lowEnergy(interaction: RadialInteraction): LowEnergy {
  if (interaction.charge !== 0) {
    return {
      ...NOTHING,
      remark:
        'The potential falls off as 1/r: a scattering length in the usual sense does not exist.',
    };
  }
  const { field, core, shells, breaks, power, size } = interaction;
  const reach = power ? Math.max(interaction.reach, FAR * size) : interaction.reach;
  if (!(reach > 0)) return NOTHING;
  try {
    const panels = radialPanels({
      field,
      start: core,
      end: core === reach ? reach * 1.5 : reach,
      breaks: [...breaks, ...shells.map(({ radius }) => radius)],
      wave: 0,
      tolerance: 1e-24,
    });
    const zero = zeroWave(interaction, panels);
    if (interaction.absorbs) return { ...NOTHING, remark: complexLength(zero) };
    return evaluated(interaction, zero, weakLength(interaction, panels));
  } catch (error) {
    if (!(error instanceof PanelError)) throw error;
    return {
      ...NOTHING,
      remark:
        'The wave at zero energy cannot be followed: the potential is too strong or too steep.',
    };
  }
}
