import type { z } from 'zod';
import type { CaseDocument, summarySchema } from '#shared/contracts/cases.ts';
import { DEFAULT_ANGLES } from '#shared/contracts/estimates.ts';
import { describeTerm } from './describe-interaction.ts';
import { describeProjectile, describeTarget } from './describe-target.ts';
import { enteredQuantity, plainNumber, plainQuantity } from './plain-quantity.ts';

export type Summary = z.infer<typeof summarySchema>;

function describeBeam(document: CaseDocument): string {
  const energy = enteredQuantity(document.energy, document.entered?.['/energy']);
  const regime = document.kinematics === 'relativistic' ? ', relativistic' : '';
  return `${describeProjectile(document.projectile)}, ${energy}${regime}`;
}

function describeDetectors(document: CaseDocument): string {
  const angles = document.angles ?? DEFAULT_ANGLES;
  const { unit } = angles;
  const [from, to, count] =
    'values' in angles
      ? [Math.min(...angles.values), Math.max(...angles.values), angles.values.length]
      : [angles.from, angles.to, angles.count];
  const first = unit === 'deg' ? plainQuantity({ value: from, unit }) : plainNumber(from);
  const range =
    from === to
      ? plainQuantity({ value: to, unit })
      : `${first} to ${plainQuantity({ value: to, unit })}`;
  // On a fixed centre lab and centre of mass are one frame, and to name one would suggest a difference.
  const frame = document.target.kind === 'fixed' ? '' : `, ${document.frame ?? 'cm'}`;
  return `${count} ${count === 1 ? 'angle' : 'angles'}, ${range}${frame}`;
}

/** The four stations of the beam line in a line each, as the trade would write them. */
export function summarise(document: CaseDocument): Summary {
  const entered = document.entered ?? {};
  return {
    beam: describeBeam(document),
    target: describeTarget(document.target),
    interaction: document.interaction.terms
      .map((term, index) => describeTerm(term, index, entered))
      .join(' + '),
    detectors: describeDetectors(document),
  };
}
