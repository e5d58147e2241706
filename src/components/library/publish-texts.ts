import type { Species } from '#shared/contracts/estimates.ts';
import { publishInteractionSchema } from '#shared/contracts/library.ts';
import type { InteractionContent, PublishInteraction } from '#shared/contracts/library.ts';
import { parseQuantity } from '#shared/units/parse.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { faultsOf, type Faults } from '#src/lib/form-faults.ts';
import { quantityText } from '#src/lib/term-words.ts';
import { tagsOf } from '../tags-field.tsx';

/** What stands in the fields of a publication, valid or not. */
export interface PublishTexts {
  name: string;
  description: string;
  words: string;
  from: string;
  to: string;
  species: Species[];
  source: string;
  tags: string;
  note: string;
}

export const EMPTY_TEXTS: PublishTexts = {
  name: '',
  description: '',
  words: '',
  from: '',
  to: '',
  species: [],
  source: '',
  tags: '',
  note: '',
};

/** The fields as a further version begins: with what the last one says, and without its note. */
export function textsOf(content: InteractionContent): PublishTexts {
  const { name, description, validity, source, tags } = content;
  const { from, to } = validity.energy ?? {};
  return {
    name,
    description,
    words: validity.words,
    from: from ? quantityText(from) : '',
    to: to ? quantityText(to) : '',
    species: validity.species ?? [],
    source,
    tags: tags.join(', '),
    note: '',
  };
}

const FROM = 'validity/energy/from';
const TO = 'validity/energy/to';

function readEnergy(
  text: string,
  at: string,
  faults: Record<string, string>,
): Quantity | undefined {
  if (text.trim() === '') return undefined;
  const read = parseQuantity(text, 'energy');
  if (read.ok) return read.quantity;
  faults[at] = read.message;
  return undefined;
}

/** A publication of these texts, and what is wrong with it by the names the server will use too. */
export function publicationOf(
  texts: PublishTexts,
  { terms, example }: Pick<InteractionContent, 'terms' | 'example'>,
): { body: PublishInteraction; faults: Faults } {
  const unread: Record<string, string> = {};
  const from = readEnergy(texts.from, FROM, unread);
  const to = readEnergy(texts.to, TO, unread);
  const energy = { ...(from && { from }), ...(to && { to }) };
  const body: PublishInteraction = {
    name: texts.name,
    description: texts.description,
    validity: {
      words: texts.words,
      ...((from ?? to) && { energy }),
      ...(texts.species.length > 0 && { species: texts.species }),
    },
    source: texts.source,
    terms,
    tags: tagsOf(texts.tags),
    example,
    ...(texts.note.trim() !== '' && { note: texts.note }),
  };
  return { body, faults: { ...faultsOf(publishInteractionSchema, body), ...unread } };
}
