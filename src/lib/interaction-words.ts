import type { FormInfo } from '#shared/contracts/forms.ts';
import type { Example, InteractionContent, ValidityRange } from '#shared/contracts/library.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import type { Difference } from '#src/components/difference-table.tsx';
import { same } from './same.ts';
import {
  formLabel,
  projectileText,
  quantityText,
  targetText,
  termEntries,
  termText,
  termValueText,
} from './term-words.ts';

export function energyRangeText({ energy }: ValidityRange): string {
  const { from, to } = energy ?? {};
  if (from && to) return `${quantityText(from)} to ${quantityText(to)}`;
  if (from) return `from ${quantityText(from)} on`;
  return to ? `up to ${quantityText(to)}` : 'any energy';
}

export function speciesText({ species }: ValidityRange): string {
  return species === undefined ? 'any particle' : species.join(', ');
}

export function exampleText({ projectile, energy, target, kinematics }: Example): string {
  const regime = kinematics === 'relativistic' ? ', relativistic' : '';
  return `${projectileText(projectile)}, ${quantityText(energy)}${regime}, on ${targetText(target)}`;
}

type Read = (content: InteractionContent) => string;

const PLAIN: readonly { key: string; label: string; read: Read }[] = [
  { key: 'name', label: 'Name', read: ({ name }) => name },
  { key: 'description', label: 'Description', read: ({ description }) => description },
  { key: 'validity', label: 'Validity', read: ({ validity }) => validity.words },
  { key: 'energy', label: 'Energies', read: ({ validity }) => energyRangeText(validity) },
  { key: 'species', label: 'Particles', read: ({ validity }) => speciesText(validity) },
  { key: 'source', label: 'Source', read: ({ source }) => source },
  { key: 'tags', label: 'Tags', read: ({ tags }) => tags.join(', ') || 'none' },
  { key: 'example', label: 'Shown with', read: ({ example }) => exampleText(example) },
];

const shapeOf = (terms: readonly InteractionTerm[]): string =>
  terms.map(({ form }) => form).join(' ');

/** Parameter by parameter where both are sums of the same forms, otherwise as a whole. */
function termDifferences(
  before: readonly InteractionTerm[],
  after: readonly InteractionTerm[],
  forms: readonly FormInfo[],
): Difference[] {
  if (same(before, after)) return [];
  if (shapeOf(before) !== shapeOf(after)) {
    const text = (terms: readonly InteractionTerm[]) =>
      terms.map((term) => termText(term, forms)).join(' + ');
    return [{ key: 'terms', label: 'Terms', before: text(before), after: text(after) }];
  }
  return before.flatMap((older, index) => {
    const newer = after[index] ?? older;
    const prefix = before.length > 1 ? `Term ${index + 1}, ` : '';
    const parameters = new Map(
      [older, newer].flatMap((term) =>
        termEntries(term, forms).map(({ key, label }) => [key, label] as const),
      ),
    );
    return [...parameters]
      .filter(([key]) => !same(older[key], newer[key]))
      .map(([key, label]) => ({
        key: `terms/${index}/${key}`,
        label: `${prefix}${formLabel(older.form, forms)}: ${label}`,
        before: termValueText(older[key]),
        after: termValueText(newer[key]),
      }));
  });
}

/** Field by field, in words and units, what turns one published version into another. */
export function interactionDifferences(
  before: InteractionContent,
  after: InteractionContent,
  forms: readonly FormInfo[],
): Difference[] {
  const plain = PLAIN.map(({ key, label, read }) => ({
    key,
    label,
    before: read(before),
    after: read(after),
  })).filter((difference) => difference.before !== difference.after);
  return [...termDifferences(before.terms, after.terms, forms), ...plain];
}
