import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import { isQuantity } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { without } from '../../model/without.ts';
import { angstroms, chargeProductOf, lengthOf } from './limit-terms.ts';
import { AT_60, DISTINCT, SLOW, withTerms } from './limit-start.ts';
import type { Start } from './limit-start.ts';
import type { Limit } from './limit-sides.ts';
import { atomLimits } from './limits-of-atom.ts';
import { contactLimits } from './limits-of-contact.ts';
import { profileLimits } from './limits-of-profile.ts';
import { screenedLimits } from './limits-of-screening.ts';

/** q in units of k at 60°. */
const FAR = 1e5;

const withTerm = (body: EstimateRequest, term: InteractionTerm, change = {}) =>
  withTerms(body, [term], change);

/** V0 a kept, the screening length far beyond 1/q: dσ/dΩ differs from Coulomb's by about 2/(q a)². */
function unscreened({ body, k }: Start, term: InteractionTerm): Limit[] {
  const a = lengthOf(term, 'a');
  const { V0 } = term;
  if (a === null || !isQuantity(V0) || !(a > 0)) return [];
  const far = Math.max(FAR / k, 1e4 * a);
  const wide = { ...term, a: angstroms(far), V0: { ...V0, value: (V0.value * a) / far } };
  const coulomb = { form: 'coulomb', chargeProduct: chargeProductOf(V0, a) };
  return [
    {
      key: 'unscreened',
      limit: 'range a without bound, V₀a kept, without relativity',
      holds: 'dσ/dΩ at 60° becomes that of a Coulomb potential of the same V₀a',
      expected: { body: withTerm(body, coulomb, SLOW), read: AT_60, factor: 1 },
      obtained: { body: withTerm(body, wide, SLOW), read: AT_60, factor: 1 },
      within: 10 / (k * far) ** 2,
    },
  ];
}

function unscreenedCharges({ body, k }: Start, term: InteractionTerm): Limit[] {
  const a = lengthOf(term, 'a');
  if (a === null) return [];
  const far = Math.max(FAR / k, 1e4 * a);
  const bare = { ...without(term, 'a'), form: 'coulomb' };
  return [
    {
      key: 'unscreened',
      limit: 'screening length a without bound',
      holds: 'dσ/dΩ at 60° becomes that of two bare charges',
      expected: { body: withTerm(body, bare, DISTINCT), read: AT_60, factor: 1 },
      obtained: {
        body: withTerm(body, { ...term, a: angstroms(far) }, DISTINCT),
        read: AT_60,
        factor: 1,
      },
      within: 10 / (k * far) ** 2,
    },
  ];
}

/** The edge adds π²(a/R)² to the volume, and takes (πqa)²/3 from the amplitude. */
function sharpEdge({ body, k }: Start, term: InteractionTerm): Limit[] {
  const R = lengthOf(term, 'R');
  if (R === null || !(R > 0)) return [];
  const a = Math.min(R / 1000, 1e-3 / k);
  return [
    {
      key: 'sharp edge',
      limit: 'diffuseness a to R/1000 or less',
      holds: 'the elastic total becomes that of a square well of the same depth and radius',
      expected: {
        body: withTerm(body, { ...without(term, 'a'), form: 'squareWell' }, DISTINCT),
        read: 'elastic',
        factor: 1,
      },
      obtained: {
        body: withTerm(body, { ...term, a: angstroms(a) }, DISTINCT),
        read: 'elastic',
        factor: 1,
      },
      within: 4 * Math.PI ** 2 * ((a / R) ** 2 + (k * a) ** 2),
    },
  ];
}

/** The form factor is 1 - q²⟨r²⟩/6; no kind has an rms radius above five of its lengths. */
function pointCharge({ body, k }: Start, term: InteractionTerm): Limit[] {
  const radius = lengthOf(term, 'radius');
  if (radius === null || !(radius > 0)) return [];
  const diffuseness = lengthOf(term, 'diffuseness');
  const largest = Math.max(radius, diffuseness ?? 0);
  const shrink = Math.min(1e-3, 1e-4 / (k * largest));
  const small = {
    ...term,
    radius: angstroms(radius * shrink),
    ...(diffuseness === null ? {} : { diffuseness: angstroms(diffuseness * shrink) }),
  };
  const bare = { ...without(term, 'kind', 'radius', 'diffuseness'), form: 'coulomb' };
  return [
    {
      key: 'point charge',
      limit: `radius times ${shrink.toExponential(0)}`,
      holds: 'dσ/dΩ at 60° becomes that of two point charges',
      expected: { body: withTerm(body, bare, DISTINCT), read: AT_60, factor: 1 },
      obtained: { body: withTerm(body, small, DISTINCT), read: AT_60, factor: 1 },
      within: 10 * (k * largest * shrink) ** 2,
    },
  ];
}

/** dσ/dΩ goes as 1/T² at every angle. */
function rutherfordLaw({ body }: Start): Limit[] {
  const doubled = { ...body.energy, value: 2 * body.energy.value };
  return [
    {
      key: 'energy',
      limit: 'twice the energy, without relativity',
      holds: 'dσ/dΩ at 60° falls to a quarter',
      expected: { body: { ...body, ...SLOW }, read: AT_60, factor: 0.25 },
      obtained: { body: { ...body, ...SLOW, energy: doubled }, read: AT_60, factor: 1 },
      within: 0,
    },
  ];
}

const OF_FORM: Readonly<Record<string, (start: Start, term: InteractionTerm) => Limit[]>> = {
  yukawa: unscreened,
  hulthen: unscreened,
  screenedCoulomb: unscreenedCharges,
  woodsSaxon: sharpEdge,
  extendedCharge: pointCharge,
  coulomb: rutherfordLaw,
  moliere: screenedLimits,
  krc: screenedLimits,
  universalIon: screenedLimits,
  atomicElectron: atomLimits,
  tabulated: profileLimits,
  expression: profileLimits,
  contact: contactLimits,
};

/** Limits in which a form becomes another one; of a sum of terms none is known. */
export function limitsOfForm(start: Start): Limit[] {
  const [term, ...more] = start.body.interaction.terms;
  if (!term || more.length > 0) return [];
  return OF_FORM[term.form]?.(start, term) ?? [];
}
