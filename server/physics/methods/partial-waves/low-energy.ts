import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import {
  PanelError,
  type RadialPanels,
  radialPanels,
} from '#server/physics/numerics/radial-panels.ts';
import type { PanelPowers } from '#server/physics/numerics/radial-powers.ts';
import { addBarrier, fieldPowers, panelPowers } from '#server/physics/numerics/radial-powers.ts';
import type { RadialWave } from '#server/physics/numerics/radial-series.ts';
import {
  squareOfLast,
  stepComplex,
  stepFromOrigin,
  stepReal,
} from '#server/physics/numerics/radial-steps.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { LowEnergy } from '../amplitude.ts';
import type { RadialInteraction } from './interaction.ts';
import { CENTRAL_IM, CENTRAL_RE } from './interaction.ts';

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
const TINY = 1e-140;

/** The wave of l = 0 at zero energy at the end of its panels. */
interface ZeroWave {
  R: number;
  u: number;
  uIm: number;
  slope: number;
  slopeIm: number;
  /** ∫ u² */
  square: number;
  nodes: number;
  panels: number;
}

function originPowers(powers: PanelPowers): Float64Array {
  const shifted = new Float64Array(powers.length + 2);
  for (let m = 0; m < powers.length; m++) shifted[m + 1] = powers.powers[m] ?? 0;
  return shifted;
}

function rescale(wave: RadialWave): number {
  const size = Math.max(Math.hypot(wave.re, wave.im), Math.hypot(wave.slopeRe, wave.slopeIm));
  if (size > TINY && size < 1 / TINY) return 1;
  wave.re /= size;
  wave.im /= size;
  wave.slopeRe /= size;
  wave.slopeIm /= size;
  return 1 / size;
}

function carry(interaction: RadialInteraction, panels: RadialPanels): ZeroWave {
  const { absorbs, core, shells } = interaction;
  const { edges, count } = panels;
  const [total, second] = [panelPowers(), panelPowers()];
  const wave: RadialWave = { re: 0, im: 0, slopeRe: 1, slopeIm: 0 };
  let square = 0;
  let nodes = 0;
  for (let p = 0; p < count; p++) {
    const width = (edges[p + 1] ?? 0) - (edges[p] ?? 0);
    const before = wave.re;
    const fromOrigin = p === 0 && core === 0;
    fieldPowers(panels, p, CENTRAL_RE, 1, 0, 0, total);
    if (absorbs) fieldPowers(panels, p, CENTRAL_IM, 1, 0, 0, second);
    if (p > 0) {
      const last = (edges[p] ?? 0) - (edges[p - 1] ?? 0);
      square *= rescale(wave) ** 2;
      wave.slopeRe *= width / last;
      wave.slopeIm *= width / last;
    }
    if (fromOrigin) {
      const imaginary = absorbs ? originPowers(second) : null;
      const terms = stepFromOrigin(0, originPowers(total), imaginary, wave);
      square += width * squareOfLast(terms, 1);
    } else {
      addBarrier(panels, p, 0, 0, total);
      const terms = absorbs
        ? stepComplex(total.powers, total.length, second.powers, second.length, wave)
        : stepReal(total.powers, total.length, wave);
      square += width * squareOfLast(terms, 0);
    }
    if (before * wave.re < 0) nodes += 1;
    const jump = shells.find(({ radius }) => radius === edges[p + 1])?.jump ?? 0;
    wave.slopeRe += width * jump * wave.re;
    wave.slopeIm += width * jump * wave.im;
  }
  const last = (edges[count] ?? 0) - (edges[count - 1] ?? 0);
  return {
    R: edges[count] ?? 0,
    u: wave.re,
    uIm: wave.im,
    slope: wave.slopeRe / last,
    slopeIm: wave.slopeIm / last,
    square,
    nodes,
    panels: count,
  };
}

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

function complexLength({ R, u, uIm, slope, slopeIm }: ZeroWave): string {
  const size = slope * slope + slopeIm * slopeIm;
  const re = R - (u * slope + uIm * slopeIm) / size;
  const im = -(uIm * slope - u * slopeIm) / size;
  const sign = im < 0 ? '-' : '+';
  return `Complex depths: the scattering length is ${Number(re.toPrecision(8))} ${sign} ${Number(Math.abs(im).toPrecision(8))}i angstrom; bound states are not counted.`;
}

const NEARLY = (a: number, R: number): string =>
  `Resonance at zero energy: the scattering length, ${Number(a.toPrecision(4))} angstrom, is ${Math.round(Math.abs(a) / R)} times the reach of the potential; ${
    a > 0 ? 'the last bound state is barely bound' : 'one more bound state is barely missed'
  }, and cross sections at low energy depend on the last digits of the strength.`;

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

function evaluated(interaction: RadialInteraction, zero: ZeroWave): LowEnergy {
  const { R, u, slope, square, panels } = zero;
  const D = R * slope - u;
  const inner = D / slope;
  const lost = UNIT_ROUNDOFF * (16 + 4 * panels);
  const outer = interaction.power ? beyond(interaction, R, inner) : 0;
  const a = inner + outer;
  const off = lost * (Math.abs(u) + Math.abs(R * slope));
  const error =
    (off / Math.abs(slope)) * (1 + Math.abs(inner) / R) +
    lost * Math.abs(outer) +
    (outer / R) ** 2 * R;
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
  const remarks = [
    ...(known
      ? []
      : ['Bound state at zero energy to all digits: the scattering length is infinite.']),
    ...(known && Math.abs(a) > RESONANT * size ? [NEARLY(a, size)] : []),
    ...(fall < Infinity ? [noRange(fall)] : []),
  ];
  const hasRange = fall === Infinity && Number.isFinite(range) && rangeError < Math.abs(range) + R;
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
      tolerance: 1e-17,
    });
    const zero = carry(interaction, panels);
    if (interaction.absorbs) return { ...NOTHING, remark: complexLength(zero) };
    return evaluated(interaction, zero);
  } catch (error) {
    if (!(error instanceof PanelError)) throw error;
    return {
      ...NOTHING,
      remark:
        'The wave at zero energy cannot be followed: the potential is too strong or too steep.',
    };
  }
}
