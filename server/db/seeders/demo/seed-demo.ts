import type { EntityManager } from '@mikro-orm/postgresql';
import type { Role } from '#shared/roles.ts';
import type { Compute } from '#server/compute/compute.ts';
import { createCampaign } from '#server/modules/campaigns/create-campaign.ts';
import { createCase } from '#server/modules/cases/create-case.ts';
import { etagOf } from '#server/modules/cases/etag.ts';
import { saveVersion } from '#server/modules/cases/save-version.ts';
import { createUser } from '#server/modules/users/create-user.ts';
import { ATOM_CASES } from './atom-cases.ts';
import { ELECTRON_CASES } from './electron-cases.ts';
import { FORMULA_CASES } from './formula-cases.ts';
import { HELIUM_CASES } from './helium-cases.ts';
import { ION_CASES } from './ion-cases.ts';
import { EXACT_CASES } from './exact-cases.ts';
import { RUN_CASES } from './run-cases.ts';
import { LIBRARY_CASES, seedLibrary } from './library-demo.ts';
import { LIGHT_ION_CASES } from './light-ion-cases.ts';
import { NEUTRON_CASES } from './neutron-cases.ts';
import { SAMPLE_CASES } from './sample-cases.ts';
import { DEMO_ACCOUNTS, DEMO_CAMPAIGNS, DEMO_PASSWORD } from './scenario.ts';
import type { DemoCampaign, DemoCase } from './scenario.ts';
import { THEORY_CASES } from './theory-cases.ts';

/** Any number but those of the other locks: two programs that start at once seed one after the other. */
const SEED_LOCK = 4_780_003;

/** In the order of their numbers: a case that was once in the demo keeps its place, new ones follow. */
export const DEMO_CASES: readonly DemoCase[] = [
  ...ELECTRON_CASES,
  ...ION_CASES,
  ...NEUTRON_CASES,
  ...ATOM_CASES,
  ...LIGHT_ION_CASES,
  ...SAMPLE_CASES,
  ...THEORY_CASES,
  ...HELIUM_CASES,
  ...FORMULA_CASES,
  ...LIBRARY_CASES,
  ...EXACT_CASES,
  ...RUN_CASES,
];

export interface SeedContext {
  em: EntityManager;
  compute: Compute;
  clock: () => Date;
  passwordCost: number;
}
interface Person {
  id: string;
  name: string;
  role: Role;
}
type People = Record<Role, Person>;

async function isEmpty(em: EntityManager): Promise<boolean> {
  const [row] = await em.execute<{ filled: boolean }[]>(
    'select exists (select from accounts) or exists (select from cases) as filled',
  );
  return row?.filled === false;
}

async function seedPeople({ em, clock, passwordCost }: SeedContext): Promise<People> {
  const people: Partial<People> = {};
  for (const { role, name, email } of DEMO_ACCOUNTS) {
    const context = { em, actor: { name: 'demo' }, now: clock(), passwordCost };
    const input = { name, email, role, password: DEMO_PASSWORD, demo: true };
    const { id } = await createUser(context, input);
    people[role] = { id, name, role };
  }
  return people as People;
}

async function seedCampaigns(
  { em, clock }: SeedContext,
  people: People,
): Promise<Record<DemoCampaign, string>> {
  const ids: Partial<Record<DemoCampaign, string>> = {};
  for (const key of Object.keys(DEMO_CAMPAIGNS) as DemoCampaign[]) {
    const { name, members } = DEMO_CAMPAIGNS[key];
    const memberIds = members.map((role) => people[role].id);
    const context = { em, actor: people.manager, now: clock() };
    ids[key] = (await createCampaign(context, { name, memberIds })).id;
  }
  return ids as Record<DemoCampaign, string>;
}

async function seedCase(
  { em, compute, clock }: SeedContext,
  demo: DemoCase,
  people: People,
  campaignId: string | null,
): Promise<void> {
  const { title, tags } = demo;
  const [first, ...later] = demo.versions;
  const asAuthor = (role: Role) => ({ em, compute, actor: people[role], now: clock() });
  const { author, note, document } = first;
  let saved = await createCase(asAuthor(author), { title, tags, campaignId, note, document });
  for (const version of later) {
    const request = { caseId: saved.caseId, ifMatch: etagOf(saved.lock) };
    const { note, document } = version;
    saved = await saveVersion(asAuthor(version.author), request, { note, document });
  }
}

/**
 * Fills an empty database with the Lowmoor demo through the verbs that people use, in one transaction: a seed that is
 * killed leaves nothing behind. Answers the number of cases made; 0 where there was something already.
 */
export async function seedDemo(context: SeedContext): Promise<number> {
  return context.em.transactional(async (em) => {
    await em.execute('select pg_advisory_xact_lock(?)', [SEED_LOCK]);
    if (!(await isEmpty(em))) return 0;
    const within = { ...context, em };
    const people = await seedPeople(within);
    const campaigns = await seedCampaigns(within, people);
    await seedLibrary({ ...within, actor: people.theorist, now: context.clock() });
    for (const demo of DEMO_CASES) {
      await seedCase(within, demo, people, demo.campaign && campaigns[demo.campaign]);
    }
    return DEMO_CASES.length;
  });
}
