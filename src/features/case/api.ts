import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { z } from 'zod';
import { campaignSchema } from '#shared/contracts/campaigns.ts';
import {
  caseDetailSchema,
  caseSchema,
  versionDetailSchema,
  versionHeadSchema,
} from '#shared/contracts/cases.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { estimateSchema } from '#shared/contracts/estimates.ts';
import type { Estimate, EstimateRequest, Projectile } from '#shared/contracts/estimates.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { request, requestTagged } from '#src/lib/api.ts';
import { massFromSpeed } from './model/beam-context.ts';
import { without } from './model/without.ts';

export { formsQuery } from '#src/lib/forms.ts';

export const campaignsQuery = queryOptions({
  queryKey: ['campaigns'],
  queryFn: async ({ signal }) =>
    (
      await request('/api/campaigns', {
        answer: z.object({ items: z.array(campaignSchema) }),
        signal,
      })
    ).items,
});

function estimate(body: EstimateRequest, signal: AbortSignal): Promise<Estimate> {
  return request('/api/estimates', { method: 'POST', body, answer: estimateSchema, signal });
}

/** A term without the text its table came from. */
const bare = (term: InteractionTerm): InteractionTerm => ({
  ...without(term, 'original'),
  form: term.form,
});

/** The part of a document that decides the result: what was typed does not. */
export function estimateBody(document: CaseDocument): EstimateRequest {
  const interaction = { terms: document.interaction.terms.map(bare) };
  return { ...without(document, 'entered', 'format', 'runPlan'), interaction };
}

export type PotentialUnits = EstimateRequest['units'];

/** V(r) of one term on its own. Nothing but the potential is wanted, so the beam is slow and the answer quick. */
export function potentialQuery(term: InteractionTerm, units: PotentialUnits) {
  const asked = bare(term);
  return queryOptions({
    queryKey: ['potential', asked, units],
    queryFn: async ({ signal }) => {
      const body: EstimateRequest = {
        projectile: { species: 'electron' },
        target: { kind: 'fixed', charge: 0 },
        energy: { value: 1, unit: 'meV' },
        interaction: { terms: [asked] },
        methods: ['born1'],
        angles: { unit: 'deg', values: [90] },
        ...(units && { units }),
      };
      return (await estimate(body, signal)).potential;
    },
    retry: false,
    staleTime: Infinity,
    gcTime: 60_000,
  });
}

/** The running calculation of a case; the signal takes back the one that is no longer wanted. */
export function estimateQuery(document: CaseDocument) {
  const body = estimateBody(document);
  return queryOptions({
    queryKey: ['estimate', body],
    queryFn: ({ signal }) => estimate(body, signal),
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 60_000,
  });
}

const ONE_MEV = 1e6;

/** Rest energy in eV of a projectile, by asking the engine for its speed at 1 MeV: the browser holds no table of masses. */
export function massQuery(projectile: Projectile) {
  return queryOptions({
    queryKey: ['mass', projectile],
    queryFn: async ({ signal }) => {
      const answer = await estimate(
        {
          projectile,
          target: { kind: 'fixed', charge: 0 },
          energy: { value: ONE_MEV, unit: 'eV' },
          kinematics: 'nonrelativistic',
          interaction: { terms: [{ form: 'contact', b: { value: 1, unit: 'fm' } }] },
          methods: ['born1'],
          angles: { unit: 'deg', values: [90] },
        },
        signal,
      );
      return massFromSpeed(ONE_MEV, answer.kinematics.beta);
    },
    staleTime: Infinity,
  });
}

export function caseQuery(id: string) {
  return queryOptions({
    queryKey: ['case', id],
    queryFn: ({ signal }) =>
      requestTagged(`/api/cases/${encodeURIComponent(id)}`, { answer: caseDetailSchema, signal }),
  });
}

export function versionsQuery(id: string) {
  return queryOptions({
    queryKey: ['case', id, 'versions'],
    queryFn: async ({ signal }) =>
      (
        await request(`/api/cases/${encodeURIComponent(id)}/versions`, {
          answer: z.object({ items: z.array(versionHeadSchema) }),
          query: { pageSize: 200 },
          signal,
        })
      ).items,
  });
}

/** A version never changes; only its status may. */
export function versionQuery(id: string, n: number) {
  return queryOptions({
    queryKey: ['case', id, 'versions', n],
    queryFn: ({ signal }) =>
      request(`/api/cases/${encodeURIComponent(id)}/versions/${n}`, {
        answer: versionDetailSchema,
        signal,
      }),
  });
}

export interface NewCase {
  title: string;
  campaignId: string | null;
  tags: string[];
  note: string;
  document: CaseDocument;
}

/** `key` makes a repeated request after a lost answer the same save, not a second one. */
export function createCase(input: NewCase, key: string) {
  const { campaignId, note, ...rest } = input;
  return requestTagged('/api/cases', {
    method: 'POST',
    body: {
      ...rest,
      ...(campaignId === null ? {} : { campaignId }),
      ...(note === '' ? {} : { note }),
    },
    headers: { 'idempotency-key': key },
    answer: caseSchema,
  });
}

export interface NewVersion {
  title: string;
  tags: string[];
  note: string;
  document: CaseDocument;
}

export function saveVersion(id: string, input: NewVersion, etag: string, key: string) {
  const { note, ...rest } = input;
  return requestTagged(`/api/cases/${encodeURIComponent(id)}/versions`, {
    method: 'POST',
    body: { ...rest, ...(note === '' ? {} : { note }) },
    headers: { 'if-match': etag, 'idempotency-key': key },
    answer: caseSchema,
  });
}

/** Takes the newest version out of work; the case and its history stay. */
export function withdrawCase(id: string, reason: string, etag: string) {
  return requestTagged(`/api/cases/${encodeURIComponent(id)}/withdraw`, {
    method: 'POST',
    body: { reason },
    headers: { 'if-match': etag },
    answer: caseSchema,
  });
}
