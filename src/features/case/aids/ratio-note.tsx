import { formatNumber } from '#shared/units/format.ts';
import { FRAME_NAMES } from '../model/words.ts';
import { useEditing } from '../editing/editor-context.ts';
import { REFERENCE_NAMES } from './model/ratio.ts';
import type { Ratio } from './use-ratio.ts';

/** The ratio at the crosshair, for the row below the plot. */
export function ratioAt(
  { reference, reason }: Ratio,
  place: number,
): { name: string; text: string } {
  if (!reference) return { name: 'ratio', text: reason === null ? '…' : 'none' };
  const name = `over ${REFERENCE_NAMES[reference.kind]}`;
  const value = reference.points[place]?.ratio;
  return { name, text: typeof value === 'number' ? formatNumber(value, 5) : 'no value' };
}

/** What the curve is divided by, in a sentence. */
export function RatioNote({ ratio }: { ratio: Ratio }) {
  const { draft } = useEditing();
  const { reference, reason } = ratio;
  if (reason !== null) return <p className="mt-2 text-sm">{reason}</p>;
  if (!reference) return null;
  const { kind, chargeProduct, charges } = reference;
  const product = formatNumber(chargeProduct, 6).replace(/\.?0+$/, '');
  return (
    <p className="mt-2 text-sm text-muted">
      Divided by {REFERENCE_NAMES[kind]}’s cross section of two point charges, Z₁Z₂ = {product}
      {charges === 'particles' && ', the charges of projectile and target'}
      {kind === 'mott' && ', with the spin of the lepton'}; same kinematics and frame (
      {FRAME_NAMES[draft.document.frame ?? 'cm']}).
    </p>
  );
}
