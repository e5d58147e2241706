import { useState } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import type { CaseDetail } from '#shared/contracts/cases.ts';
import { ApiError } from '#src/lib/api.ts';
import { clearDraft } from '#src/lib/drafts.ts';
import { say } from '#src/lib/toasts.ts';
import { caseQuery, createCase, saveVersion, versionQuery } from '../api.ts';
import type { Content } from '../model/fields.ts';
import { same } from '#src/lib/same.ts';
import { ownKey } from './kept-draft.ts';
import { contentOf, draftOf } from './use-work.ts';
import type { Base, Work } from './use-work.ts';

/** A save that met a newer version: both sides, and what both began from. */
export interface Stale {
  base: Content;
  theirs: Content;
  current: CaseDetail;
  etag: string;
  note: string;
}

export const contentOfCase = ({ title, tags, document }: CaseDetail): Content => ({
  title,
  tags,
  document,
});

/** One key a content: pressing the button twice, or again after a lost answer, is one save. */
function useSaveKey() {
  const [last, setLast] = useState<{ content: string; key: string } | null>(null);
  return (content: unknown): string => {
    const text = JSON.stringify(content);
    if (last?.content === text) return last.key;
    const key = crypto.randomUUID();
    setLast({ content: text, key });
    return key;
  };
}

export interface FilingChoice {
  campaignId: string | null;
  note: string;
  title: string;
  tags: string[];
}

/** Filing a new case. */
export function useFiling(work: Work, account: string, subject: string) {
  const client = useQueryClient();
  const navigate = useNavigate();
  const keyFor = useSaveKey();
  return useMutation({
    mutationFn: (choice: FilingChoice) => {
      const { document } = work.editor.state.present;
      const input = { ...choice, document };
      return createCase(input, keyFor(input));
    },
    onSuccess: async ({ data }) => {
      clearDraft(account, ownKey(subject));
      work.editor.load(work.editor.state.present);
      await client.invalidateQueries({ queryKey: ['cases'] });
      say(`Saved as case ${data.number}, version 1.`, { tone: 'sound' });
      await navigate(`/cases/${data.id}`, { replace: true, state: { keepFocus: true } });
    },
  });
}

interface SaveInput {
  content: Content;
  note: string;
  etag: string;
  done: () => void;
}

/** Saving a further version, and what to do when someone else was first. */
export function useSaving(work: Work, caseId: string) {
  const client = useQueryClient();
  const keyFor = useSaveKey();
  const [stale, setStale] = useState<Stale | null>(null);

  async function baseContent(base: Base, current: CaseDetail): Promise<Content> {
    if (base.content) return base.content;
    const version = await client.fetchQuery(versionQuery(caseId, base.version));
    // Tags belong to the case, not to a version: those of today stand for those of then.
    return { title: version.title, tags: current.tags, document: version.document };
  }

  async function meet(note: string): Promise<void> {
    const { base } = work;
    if (!base) return;
    const fresh = await client.fetchQuery({ ...caseQuery(caseId), staleTime: 0 });
    setStale({
      base: await baseContent(base, fresh.data),
      theirs: contentOfCase(fresh.data),
      current: fresh.data,
      etag: fresh.etag ?? '',
      note,
    });
  }

  const mutation = useMutation({
    mutationFn: ({ content, note, etag }: SaveInput) => {
      const input = { ...content, note };
      return saveVersion(caseId, input, etag, keyFor({ ...input, etag }));
    },
    onSuccess: async ({ data, etag }, { content, done }) => {
      setStale(null);
      done();
      work.editor.edit('saved', (draft) =>
        same(draft.tags, content.tags) ? draft : { ...draft, tags: content.tags },
      );
      work.setBase({ version: data.version.n, etag: etag ?? '', content });
      say(`Saved as version ${data.version.n}.`, { tone: 'sound' });
      await client.invalidateQueries({ queryKey: ['case', caseId] });
      await client.invalidateQueries({ queryKey: ['cases'] });
    },
    onError: async (error, { note }) => {
      if (error instanceof ApiError && error.code === 'staleVersion') await meet(note);
    },
  });

  const { state } = work.editor;
  return {
    mutation,
    stale,
    leaveStale: () => setStale(null),
    save: (note: string, tags: string[], done: () => void) => {
      const { base } = work;
      if (!base) return;
      mutation.mutate({
        content: { ...contentOf(state.present), tags },
        note,
        etag: base.etag,
        done,
      });
    },
    /** Saves what was decided on top of the version that was in the way. */
    saveMerged: (merged: Content, done: () => void) => {
      if (!stale) return;
      work.editor.edit('resolve', () => draftOf(merged));
      work.setBase({
        version: stale.current.version.n,
        etag: stale.etag,
        content: stale.theirs,
      });
      mutation.mutate({ content: merged, note: stale.note, etag: stale.etag, done });
    },
  };
}
