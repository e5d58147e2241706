import type { EntityManager } from '@mikro-orm/postgresql';
import { HITS_PER_GROUP } from '#shared/contracts/search.ts';
import type { Hit, SearchAnswer, SearchKind } from '#shared/contracts/search.ts';
import type { Actor } from '#server/http/actor.ts';
import { can } from '#server/http/can.ts';
import { listCases } from '#server/modules/cases/list-cases.ts';
import { describeTerms } from '#server/modules/library/interaction-content.ts';
import { listInteractions } from '#server/modules/library/list-interactions.ts';
import { plainNumber } from '#server/documents/plain-quantity.ts';
import { elementName, findNuclides } from '#server/modules/reference/find-nuclides.ts';
import { rankForm } from '#server/modules/reference/forms.ts';
import { rankElement } from '#server/modules/reference/list-elements.ts';
import { rankMaterial } from '#server/modules/reference/list-materials.ts';
import { rankSpecies } from '#server/modules/reference/list-species.ts';
import { fold, rank } from '#server/modules/reference/match.ts';
import { FORMS } from '#server/physics/potentials/register.ts';
import { ELEMENTS } from '#server/physics/tables/elements.ts';
import { MATERIALS } from '#server/physics/tables/materials.ts';
import { SPECIES } from '#server/physics/tables/species.ts';

/** A group before it is cut: its hits, the best first, and how well the best one fits. */
interface Group {
  kind: SearchKind;
  hits: Hit[];
  total: number;
  best: number;
}

function groupOf<T>(
  kind: SearchKind,
  items: readonly T[],
  rankOf: (item: T) => number | null,
  present: (item: T) => Hit,
): Group {
  const found = items
    .flatMap((item) => {
      const at = rankOf(item);
      return at === null ? [] : [{ item, at }];
    })
    .sort((one, other) => one.at - other.at);
  return {
    kind,
    hits: found.slice(0, HITS_PER_GROUP).map(({ item }) => present(item)),
    total: found.length,
    best: found[0]?.at ?? Infinity,
  };
}

function nuclides(q: string): Group {
  const found = findNuclides(q);
  return {
    kind: 'nuclides',
    hits: found.slice(0, HITS_PER_GROUP).map(({ nuclide: { name, symbol, ...rest } }) => ({
      key: name,
      label: name,
      detail:
        rest.abundance === null
          ? `${elementName(symbol)}, not in nature`
          : `${elementName(symbol)}, ${plainNumber(100 * rest.abundance)} % in nature`,
    })),
    total: found.length,
    best: found[0]?.rank ?? Infinity,
  };
}

/** The cases one may read, by the search of their own page; a number, a title or a beginning of one ranks before a mention. */
async function cases(em: EntityManager, actor: Actor, q: string): Promise<Group> {
  const query = { q, page: 1, pageSize: HITS_PER_GROUP, sort: '-updated' } as const;
  const { rows, total } = await listCases(em, actor, query);
  const ranked = rows
    .map((row) => ({
      row,
      at: rank(q, { names: [row.title, String(row.number), `#${row.number}`] }) ?? 4,
    }))
    .sort((one, other) => one.at - other.at);
  return {
    kind: 'cases',
    hits: ranked.map(({ row }) => ({
      key: row.id,
      label: row.title,
      detail: `Case ${row.number}: ${row.summary.beam} on ${row.summary.target}`,
    })),
    total,
    best: ranked[0]?.at ?? Infinity,
  };
}

/** The lab's published interactions, by the search of the library. */
async function interactions(em: EntityManager, q: string): Promise<Group> {
  const { rows, total } = await listInteractions(em, {
    ...{ q, status: 'published', sort: 'name' },
    ...{ page: 1, pageSize: HITS_PER_GROUP },
  });
  const ranked = rows
    .map((row) => ({ row, at: rank(q, { names: [row.content.name] }) ?? 4 }))
    .sort((one, other) => one.at - other.at);
  return {
    kind: 'interactions',
    hits: ranked.map(({ row }) => ({
      key: row.id,
      label: row.content.name,
      detail: `Version ${row.n}: ${describeTerms(row.content.terms)}`,
    })),
    total,
    best: ranked[0]?.at ?? Infinity,
  };
}

function tables(q: string): Group[] {
  return [
    nuclides(q),
    groupOf(
      'elements',
      ELEMENTS,
      (entry) => rankElement(q, entry),
      (entry) => ({
        key: entry.symbol,
        label: entry.name,
        detail: `${entry.symbol}, Z = ${entry.atomicNumber}`,
      }),
    ),
    groupOf(
      'forms',
      FORMS,
      (form) => rankForm(q, form),
      ({ key, label, source }) => ({
        key,
        label,
        detail: source,
      }),
    ),
    groupOf(
      'materials',
      MATERIALS,
      (entry) => rankMaterial(q, entry),
      (entry) => ({
        key: entry.key,
        label: entry.label,
        detail:
          entry.density === null
            ? `${entry.formula}, gas`
            : `${entry.formula}, ${plainNumber(entry.density)} g/cm³`,
      }),
    ),
    groupOf(
      'species',
      SPECIES,
      (entry) => rankSpecies(q, entry),
      (entry) => ({
        key: entry.key,
        label: entry.label,
        detail: `Particle, charge ${entry.charge > 0 ? '+' : ''}${plainNumber(entry.charge)}`,
      }),
    ),
  ];
}

/** Hits in groups, the group with the best hit first. Of cases only what the actor may read is found or counted. */
export async function searchEverything(
  em: EntityManager,
  actor: Actor,
  q: string,
): Promise<SearchAnswer> {
  const asked = q.trim();
  if (fold(asked) === '') return { q: asked, groups: [] };
  const own = can(actor, 'case.list') ? [await cases(em, actor, asked)] : [];
  const library = can(actor, 'interaction.read') ? [await interactions(em, asked)] : [];
  const groups = [...own, ...library, ...tables(asked)]
    .filter(({ total }) => total > 0)
    .sort((one, other) => one.best - other.best);
  return { q: asked, groups: groups.map(({ kind, hits, total }) => ({ kind, hits, total })) };
}
