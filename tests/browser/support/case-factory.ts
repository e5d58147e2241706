import type { Agent } from '#tests/support/test-app.ts';

const DOCUMENT = {
  projectile: { species: 'electron' },
  target: { kind: 'fixed', charge: 0 },
  energy: { value: 100, unit: 'eV' },
  interaction: {
    terms: [{ form: 'yukawa', V0: { value: -10, unit: 'eV' }, a: { value: 1, unit: 'angstrom' } }],
  },
  methods: ['born1'],
};

/** Saves a case as its owner would, through the application; returns its identifier. */
export async function saveCase(
  owner: Agent,
  title: string,
  rest: { tags?: string[]; campaignId?: string; document?: object } = {},
): Promise<string> {
  const answer = await owner
    .post('/api/cases')
    .send({ title, document: DOCUMENT, ...rest })
    .expect(201);
  return (answer.body as { id: string }).id;
}
