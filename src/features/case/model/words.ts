import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Correction, Criterion, Method, Projectile } from '#shared/contracts/estimates.ts';
import { digits } from '#src/lib/term-words.ts';

/** The words of terms and particles are those of the library too. */
export {
  brief,
  briefQuantity,
  choiceName,
  digits,
  formLabel,
  projectileText,
  quantityText,
  targetText,
  termEntries,
  termText,
  termValueText,
} from '#src/lib/term-words.ts';

export const METHOD_NAMES: Record<Method, string> = {
  born1: 'first Born',
  born2: 'second Born',
  eikonal: 'eikonal',
  partialWaves: 'exact (phase shifts)',
};

export const CORRECTION_NAMES: Record<Correction, string> = {
  mckinleyFeshbach: 'McKinley and Feshbach',
};

export const REGIME_NAMES = {
  nonrelativistic: 'non-relativistic',
  relativistic: 'relativistic',
} as const;

export const FRAME_NAMES = { cm: 'centre of mass', lab: 'lab' } as const;

export const CRITERION_NAMES: Record<Criterion['name'], string> = {
  unitarity: 'unitarity',
  secondOrder: 'second-order size',
  slow: 'slow criterion',
  fast: 'fast criterion',
  eta: 'Sommerfeld parameter',
};

/** Name alone, for the beam line. */
export function projectileName(projectile: Projectile): string {
  if ('nuclide' in projectile) return projectile.nuclide;
  return projectile.species === 'custom' ? 'custom particle' : projectile.species;
}

export function anglesText(angles: CaseDocument['angles']): string {
  if (!angles) return '0° to 180°, 181 angles';
  const symbol = angles.unit === 'deg' ? '°' : ` ${angles.unit}`;
  if (!('values' in angles)) {
    return `${digits(angles.from)}${symbol} to ${digits(angles.to)}${symbol}, ${angles.count} angles`;
  }
  const listed = angles.values.map((value) => `${digits(value)}${symbol}`);
  if (listed.length <= 12) return listed.join(', ');
  return `${listed.slice(0, 4).join(', ')} … ${listed.at(-1) ?? ''}, ${listed.length} angles`;
}

export function identicalText(identical: boolean | undefined): string {
  if (identical === undefined) return 'by the rule (same species or nuclide)';
  return identical ? 'treated as identical' : 'treated as distinguishable';
}
