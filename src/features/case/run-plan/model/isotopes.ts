import { fullDigits } from '#shared/units/format.ts';
import { readNumber } from '#shared/units/read-number.ts';
import { readNuclide } from '../../components/nuclide-field.tsx';
import type { Reading } from '../../model/typing.ts';

type Isotopes = Record<string, number>;

const HOW = 'Write isotopes with their mole fractions, such as Li-6 0.95, Li-7 0.05.';

/** `Li-6 0.95, Li-7 5 %` as a mixture; nothing typed is the natural one. */
export function readIsotopes(text: string): Reading<Isotopes | undefined> {
  const parts = text
    .split(/[,;\n]+/)
    .map((part) => part.trim())
    .filter((part) => part !== '');
  if (parts.length === 0) return { value: undefined };
  const found: Isotopes = {};
  for (const part of parts) {
    const [, name = '', amount = '', percent] = /^(\S+?)[\s:=]+(\S+?)\s*(%)?$/.exec(part) ?? [];
    const nuclide = readNuclide(name);
    const number = readNumber(amount);
    if (!('value' in nuclide) || !number.ok || number.rest !== '') return { problem: HOW };
    const fraction = percent ? number.value / 100 : number.value;
    if (!(fraction >= 0 && fraction <= 1)) {
      return { problem: `The fraction of ${nuclide.value} lies between 0 and 1.` };
    }
    if (nuclide.value in found) return { problem: `${nuclide.value} is there twice.` };
    found[nuclide.value] = fraction;
  }
  return { value: found };
}

export const isotopesText = (isotopes: Isotopes | undefined): string =>
  Object.entries(isotopes ?? {})
    .map(([name, fraction]) => `${name} ${fullDigits(fraction)}`)
    .join(', ');
