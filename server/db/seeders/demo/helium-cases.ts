import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import type { DemoCase } from './scenario.ts';

/** Charge number of the 1s orbitals of helium that the variational principle finds, 27/16. */
export const ZETA = 1.6875;

/** Electrons of 500 eV on the static field of helium, written in atomic units. */
export function onHelium(term: InteractionTerm): CaseDocument {
  return {
    projectile: { species: 'electron' },
    target: { kind: 'fixed', charge: 0 },
    energy: { value: 500, unit: 'eV' },
    kinematics: 'nonrelativistic',
    interaction: { terms: [term] },
    methods: ['born1'],
    angles: { unit: 'deg', from: 0, to: 180, count: 91 },
    frame: 'cm',
    goldenRule: { theta: 30, boxSide: { value: 10, unit: 'nm' } },
    units: { length: 'bohr', area: 'bohr2', energy: 'eV' },
  };
}

/** Static field of helium in hartree, r in bohr, to the six digits a printed table would have. */
function printedRow(r: number): [number, number] {
  const V = -2 * (1 / r + ZETA) * Math.exp(-2 * ZETA * r);
  return [r, Number(V.toPrecision(6))];
}

/** Steps as such tables have them: even ratios near the nucleus, where V rises as 1/r. */
const RADII = Array.from({ length: 61 }, (_, i) => Number((0.01 * 1.1 ** i).toPrecision(4)));

const helium: DemoCase = {
  title: 'Electrons on helium: the static field as a table',
  tags: ['electrons', 'helium', 'gas', 'static potential', 'table'],
  campaign: null,
  versions: [
    {
      author: 'theorist',
      note: 'Shows a table read in: the field of two 1s orbitals of effective charge 27/16 as 61 printed rows from 0.01 to 3.04 bohr, joined by a spline. It keeps its first value inside the first row, which costs half a per cent of the curve at 180 degrees and 0.06 per cent of the elastic cross section.',
      document: onHelium({
        form: 'tabulated',
        lengthUnit: 'bohr',
        energyUnit: 'hartree',
        points: RADII.map(printedRow),
        tail: 'exponential',
      }),
    },
  ],
};

export const HELIUM_CASES: readonly DemoCase[] = [helium];
