import { plainQuantity } from '#server/documents/plain-quantity.ts';
import type { Tail, Term } from '#server/physics/potentials/types.ts';
import type { AnswerUnits } from '#server/modules/estimates/answer-units.ts';

const TAILS: Readonly<Record<Tail, string>> = {
  compact: 'Ends at a radius: nothing scatters beyond it, and every integral converges.',
  exponential:
    'Dies exponentially or faster: the forward cross section and every integral over angle converge.',
  power:
    'Falls as a power of r, faster than 1/r³: the forward cross section is finite, but the far tail still decides small angles.',
  coulomb:
    'Falls as 1/r: the forward cross section and the total diverge. Ask for the part beyond an angle, or screen it.',
  point: 'Acts at a point: scatters alike into all angles, at any energy where its length holds.',
};

/** What a form becomes in a limit, and what it is not made for. */
const OWN: Readonly<Record<string, readonly string[]>> = {
  yukawa: [
    'With a → ∞ at constant V₀a it becomes the Coulomb potential; the first Born total stays finite only for finite a.',
  ],
  coulomb: [
    'Without relativity first order gives the exact (Rutherford) cross section of distinct particles; the phase of the amplitude is not the exact one, so interference with other terms and between identical particles is not exact.',
  ],
  screenedCoulomb: [
    'With a → ∞ it becomes the bare Coulomb potential. One exponential is a rough atom: near the nucleus and far out Molière or tabulated factors are closer.',
  ],
  moliere: ['A fit to the Thomas–Fermi atom: poor for Z below about 10 and far outside the atom.'],
  krc: ['For ions on atoms, averaged over many pairs; single pairs differ by several per cent.'],
  universalIon: [
    'For ions on atoms, averaged over many pairs. Its printed weights add up to 7e-5 more than 1, so that it is that much stronger than the bare charges at the origin.',
  ],
  squareWell: [
    'The sharp edge makes the amplitude ring: zeros where tan qR = qR. Soften it (Woods–Saxon) before comparing minima with data.',
  ],
  gaussian: ['The amplitude has no zeros and dies as a Gaussian: large angles tell nothing more.'],
  woodsSaxon: [
    'With a → 0 it becomes the square well. At nuclear strengths first order is a sketch: use it for shapes, not for magnitudes.',
  ],
  deltaShell: ['The amplitude falls only as 1/q: totals converge slowly with energy.'],
  hulthen: ['Like a Yukawa potential far out and like 1/r near the origin.'],
  polarization: [
    'For neutral atoms and slow charged projectiles, far out; inside the cut-off length it is a convention.',
  ],
  extendedCharge: [
    'Outside the charge it is the Coulomb potential; inside it levels off, and the amplitude gets the form factor of the charge, with its zeros.',
  ],
  atomicElectron: [
    'Made from fitted factors of free neutral atoms: bonds change small angles by several per cent, and beyond the fit the Mott–Bethe tail takes over.',
    'A table of cross sections made from the five Gaussians alone lacks that tail. At 100 keV it adds 0.8 % to the elastic total for C, 1.3 % for Al, 2.4 % for Cu and 3.2 % for Au; the momentum-transfer cross section it doubles (C) to triples (Au), for that lives on large angles. Below 0.6 keV nothing reaches the tail.',
  ],
  tabulated: [
    'Only as good as its points: between them a spline runs, beyond the last one the stated tail.',
  ],
  expression: [
    'Arithmetic and elementary functions of r and named parameters; its dimensions are checked, its size and computing time are bounded.',
  ],
  contact: [
    'First order only, by construction: the length already holds all orders. Slow neutrons, below about 1 eV.',
  ],
};

function ofTerm(term: Term, units: AnswerUnits): (string | false)[] {
  const length = (angstrom: number): string =>
    plainQuantity(units.lengthQuantity(rounded(angstrom)));
  return [
    term.noBorn ?? TAILS[term.tail],
    term.noFunction !== undefined && term.noFunction,
    term.range !== null &&
      `With the defaults its range is ${length(term.range)}: fast particles need |V|R/ħv well below 1 for first order to hold, slow ones 2m|V|R²/ħ².`,
    term.closed === null &&
      term.noBorn === undefined &&
      'No closed transform: the quadrature stands alone, with its error bound.',
    term.quadrature === null &&
      term.closed !== null &&
      'There is nothing to integrate: the transform is the definition.',
    term.coulombTail !== 0 &&
      'The transform has a part c/q² that is kept apart and never integrated.',
  ];
}

const rounded = (value: number): number => Number(value.toPrecision(4));

/** Behaviour and limits of a form in words: what its term says of itself, then what the trade knows. */
export function formRemarks(term: Term, units: AnswerUnits): string[] {
  const derived = ofTerm(term, units).filter((line): line is string => typeof line === 'string');
  return [...derived, ...(OWN[term.form] ?? [])];
}
