import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { without } from '../../model/without.ts';
import { isChargeless, keepsSign, rangeOf, scaled } from './limit-terms.ts';
import { limitsOfForm } from './limits-of-form.ts';
import { reachOf } from './limit-reach.ts';
import type { Start } from './limit-start.ts';
import type { Limit } from './limit-sides.ts';

const FORWARD = 0;
const BACKWARD = 2;
/** 0, 60 and 180 degrees where the forward direction is finite. */
const THREE = { unit: 'deg', values: [0, 60, 180] };

/** Born's amplitude is of first order in V. */
function halfStrength({ body }: Start): Limit[] {
  const halves = body.interaction.terms.flatMap((term) => scaled(term, 0.5) ?? []);
  if (halves.length < body.interaction.terms.length) return [];
  // Incoherent scattering does not scale with the amplitude; a length given as b has none.
  return [
    {
      key: 'strength',
      limit: 'half the strength',
      holds: 'dσ/dΩ at 60° falls to a quarter',
      expected: { body, read: { place: 0 }, factor: 0.25 },
      obtained: {
        body: { ...body, interaction: { terms: halves } },
        read: { place: 0 },
        factor: 1,
      },
      within: 0,
    },
  ];
}

/** k times the longest range; null where a tail has none. */
function reachedBy(start: Start): number | null {
  const ranges = start.body.interaction.terms.map((term) => rangeOf(term, start));
  const finite = ranges.filter((range) => range !== null);
  return finite.length < ranges.length ? null : start.k * Math.max(...finite);
}

/** The mean square radius: 1 - q²⟨r²⟩/3 of the forward peak is left, and q is twice as large at 180° as at 60°. */
function meanSquareRadius(start: Start): Limit[] {
  const { body } = start;
  const [term, ...more] = body.interaction.terms;
  const reach = reachedBy(start);
  if (!term || more.length > 0 || !keepsSign(term) || reach === null || !(reach > 0)) return [];
  const kr = Math.min(reach, 3e-3);
  const gentle: EstimateRequest = {
    ...body,
    angles: THREE,
    identical: false,
    kinematics: 'nonrelativistic',
    energy: { ...body.energy, value: body.energy.value * (kr / reach) ** 2 },
  };
  return [
    {
      key: 'mean square radius',
      limit: 'energy so low that k times the range is at most 3e-3, without relativity',
      holds:
        'what dσ/dΩ lacks of its forward value goes as q²: four times as much at 180° as at 60°',
      expected: { body: gentle, read: { lossTo: 1 }, factor: 4 },
      obtained: { body: gentle, read: { lossTo: 2 }, factor: 1 },
      within: 50 * kr ** 2,
    },
  ];
}

/** With k·range = 1e-3 the amplitude varies by a few (k·range)² at most. */
function slow(start: Start): Limit[] {
  const { body } = start;
  const reach = reachedBy(start);
  if (reach === null) return [];
  const kr = Math.min(reach, 1e-3);
  const share = reach > 0 ? (kr / reach) ** 2 : 1;
  const gentle: EstimateRequest = {
    ...body,
    angles: THREE,
    identical: false,
    kinematics: 'nonrelativistic',
    energy: { ...body.energy, value: body.energy.value * share },
  };
  const within = 100 * kr ** 2;
  const moment: EstimateRequest = { ...gentle, energy: body.energy };
  return [
    {
      key: 'isotropic',
      limit: 'energy so low that k times the range is at most 1e-3, without relativity',
      holds: 'dσ/dΩ is the same forward and backward',
      expected: { body: gentle, read: { place: FORWARD }, factor: 1 },
      obtained: { body: gentle, read: { place: BACKWARD }, factor: 1 },
      within,
    },
    {
      key: 'four pi',
      limit: 'the same low energy',
      holds: 'the elastic total is 4π times dσ/dΩ',
      expected: { body: gentle, read: { place: FORWARD }, factor: 4 * Math.PI, overSphere: true },
      obtained: { body: gentle, read: 'elastic', factor: 1 },
      within,
    },
    ...(share < 1
      ? [
          {
            key: 'forward',
            limit: 'straight forward, at this energy and at the low one, without relativity',
            holds: 'dσ/dΩ forward is the volume integral of V, whatever the energy',
            expected: { body: gentle, read: { place: FORWARD }, factor: 1 },
            obtained: { body: moment, read: { place: FORWARD }, factor: 1 },
            within: 0,
          },
        ]
      : []),
  ];
}

/** Recoil goes as the ratio of the masses, relativity's share of it as energy over mass. */
function heavyTarget({ body }: Start): Limit[] {
  if (body.target.kind === 'fixed') return [];
  if (!body.interaction.terms.every(isChargeless)) return [];
  const mass = { value: 1e12, unit: 'u' };
  return [
    {
      key: 'heavy target',
      limit: 'target of 1e12 u, without charge or spin',
      holds: 'dσ/dΩ at 60° becomes that of a fixed centre',
      expected: {
        body: { ...body, identical: false, target: { kind: 'fixed', charge: 0 } },
        read: { place: 0 },
        factor: 1,
      },
      obtained: {
        body: { ...body, identical: false, target: { kind: 'custom', mass, charge: 0, spin: 0 } },
        read: { place: 0 },
        factor: 1,
      },
      within: 1e-8,
    },
  ];
}

/** Both kinematics differ by terms of β². */
function gentleRelativity({ body }: Start, beta: number): Limit[] {
  if (body.kinematics !== 'relativistic') return [];
  const gamma = 1 / Math.sqrt(1 - beta ** 2);
  // T = (gamma - 1) m c²; at beta = 1e-4 it is beta²/2 of m c². Written so that slow beams lose no digits.
  const share = Math.min(1, (0.5e-8 * (gamma + 1)) / (gamma * beta) ** 2);
  if (!(share > 0)) return [];
  const energy = { ...body.energy, value: body.energy.value * share };
  return [
    {
      key: 'slow particle',
      limit: 'energy so low that v/c is at most 1e-4',
      holds: 'dσ/dΩ at 60° becomes the non-relativistic one',
      expected: {
        body: { ...body, energy, kinematics: 'nonrelativistic' },
        read: { place: 0 },
        factor: 1,
      },
      obtained: { body: { ...body, energy }, read: { place: 0 }, factor: 1 },
      within: 1e-6,
    },
  ];
}

function symmetric({ body }: Start, identical: boolean): Limit[] {
  if (!identical) return [];
  const both: EstimateRequest = { ...body, angles: { unit: 'deg', values: [60, 120] } };
  return [
    {
      key: 'symmetric',
      limit: '60° and 120° in the centre of mass, identical particles',
      holds: 'dσ/dΩ is the same',
      expected: { body: both, read: { place: 0 }, factor: 1 },
      obtained: { body: both, read: { place: 1 }, factor: 1 },
      within: 0,
    },
  ];
}

/** The limiting forms that are known for a case; `estimate` is its own, for wavenumber and speed. */
export function limitsOf(document: CaseDocument, estimate: Estimate): Limit[] {
  const rest = without(
    document,
    'entered',
    'format',
    'runPlan',
    'goldenRule',
    'corrections',
    'angles',
  );
  const { k, beta, reducedMass } = estimate.kinematics;
  const wavenumber = k.value * composedFactor(k.unit, '1/angstrom');
  const gamma = 1 / Math.sqrt(1 - beta ** 2);
  const relativistic = document.kinematics === 'relativistic';
  // The text a table was read from is kept with the case; no limit needs it.
  const terms = document.interaction.terms.map((term) => ({
    ...without(term, 'original'),
    form: term.form,
  }));
  const start: Start = {
    body: {
      ...rest,
      ...{ interaction: { terms }, methods: ['born1'], frame: 'cm' },
      angles: { unit: 'deg', values: [60] },
    },
    k: wavenumber,
    slowK: relativistic ? wavenumber * Math.sqrt(2 / (gamma + 1)) : wavenumber,
    reducedMass: reducedMass.value * composedFactor(reducedMass.unit, 'eV'),
    reach: reachOf(estimate),
  };
  return [
    ...limitsOfForm(start),
    ...halfStrength(start),
    ...slow(start),
    ...meanSquareRadius(start),
    ...heavyTarget(start),
    ...gentleRelativity(start, beta),
    ...symmetric(start, estimate.identical),
  ];
}
