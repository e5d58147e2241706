import { interactionDetailSchema } from '#shared/contracts/library.ts';
import type { InteractionDetail } from '#shared/contracts/library.ts';
import type { Agent } from '#tests/support/test-app.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';

let counter = 0;

/** Yukawa of this depth, eV. */
export const yukawaTerms = (depth: number) => [
  { form: 'yukawa', V0: { value: depth, unit: 'eV' }, a: { value: 1, unit: 'angstrom' } },
];

/** A publication that is sound; what is not said is invented, and its name is one of its own. */
export function publication(changes: object = {}) {
  counter += 1;
  return {
    name: `Screened well ${counter}`,
    description: 'A screened attraction of a fixed centre.',
    validity: {
      words: 'Electrons from 50 eV on.',
      energy: { from: { value: 50, unit: 'eV' } },
      species: ['electron'],
    },
    source: 'Lab note 7 of the tests',
    terms: yukawaTerms(-10),
    tags: ['screened'],
    ...changes,
  };
}

/** Publishes and answers what was published, with its tag. */
export async function publish(
  agent: Agent,
  changes: object = {},
): Promise<{ published: InteractionDetail; etag: string }> {
  const answer = await agent.post('/api/interactions').send(publication(changes)).expect(201);
  return {
    published: interactionDetailSchema.parse(answer.body),
    etag: answer.headers['etag'] ?? '',
  };
}

/** A further version on top of `etag`; what is answered is for the caller to judge. */
export function addVersion(
  agent: Agent,
  { id, name }: Pick<InteractionDetail, 'id' | 'name'>,
  etag: string,
  changes: object = {},
) {
  return agent
    .post(`/api/interactions/${id}/versions`)
    .set('If-Match', etag)
    .send(publication({ name, terms: yukawaTerms(-12), ...changes }));
}

/** A document with the terms of a published interaction and its citation. */
export function citing({ id, terms }: InteractionDetail, version: number, changes: object = {}) {
  return {
    ...yukawaDocument,
    interaction: { terms, citation: { id, version }, ...changes },
  };
}
