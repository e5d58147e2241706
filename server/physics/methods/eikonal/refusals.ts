import type { Term } from '#server/physics/potentials/types.ts';

/** Why a term has no eikonal phase; null where it has one. */
export function whyNoEikonal(term: Term): string | null {
  if (term.form === 'spinOrbit') {
    return 'The eikonal is computed without spin; take partial waves for the spin-orbit term.';
  }
  if (term.form === 'hardSphere') {
    return 'The eikonal phase of an infinitely hard sphere is infinite; take partial waves.';
  }
  if (term.tail === 'point') {
    return 'The contact interaction is made for first order alone: it has no phase along a straight line.';
  }
  if (term.noBorn !== undefined) return term.noBorn;
  if (term.v === null && term.form !== 'deltaShell') {
    return term.noFunction ?? `The ${term.form} form has no potential as a function of r.`;
  }
  return null;
}
