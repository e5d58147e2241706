import type { Target } from '#shared/contracts/estimates.ts';

const ATOM =
  /\[(\d{1,3})([A-Z][a-z]?)\]|^(\d{1,3})([A-Z][a-z]?)|([A-Z][a-z]?)-(\d{1,3})|([A-Z][a-z]?)/g;
const ISOTOPES: Readonly<Record<string, string>> = { D: 'H-2', T: 'H-3' };

/** Kinds of atoms a formula names, for a menu; the server reads the formula itself. */
export function atomsIn(formula: string): string[] {
  const names = [...formula.matchAll(ATOM)].map((match) => {
    const [, bracketed, ofBracket, leading, ofLeading, symbol, mass, plain = ''] = match;
    if (bracketed && ofBracket) return `${ofBracket}-${bracketed}`;
    if (leading && ofLeading) return `${ofLeading}-${leading}`;
    return symbol && mass ? `${symbol}-${mass}` : (ISOTOPES[plain] ?? plain);
  });
  return [...new Set(names)];
}

/** Whether a person has to say which atoms the case describes: the target is none of them. */
export function mustChooseAtom(atoms: readonly string[], target: Target): boolean {
  if (atoms.length < 2) return false;
  if (target.kind !== 'nuclide') return true;
  const { nuclide } = target;
  return !atoms.includes(nuclide) && !atoms.includes(nuclide.split('-')[0] ?? '');
}
