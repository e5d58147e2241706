import { queryOptions } from '@tanstack/react-query';
import { listSchema } from '#shared/contracts/list.ts';
import { settingsSchema, settingsVersionSchema } from '#shared/contracts/settings.ts';
import type { ChangeSettings } from '#shared/contracts/settings.ts';
import { request, requestTagged } from '#src/lib/api.ts';

export const settingsQuery = queryOptions({
  queryKey: ['settings'],
  queryFn: ({ signal }) => requestTagged('/api/settings', { answer: settingsSchema, signal }),
});

export const settingsHistoryQuery = queryOptions({
  queryKey: ['settings', 'history'],
  queryFn: ({ signal }) =>
    request('/api/settings/history', {
      query: { pageSize: 50 },
      answer: listSchema(settingsVersionSchema),
      signal,
    }),
});

export function changeSettings({ body, etag }: { body: ChangeSettings; etag: string }) {
  return requestTagged('/api/settings', {
    method: 'PUT',
    body,
    headers: { 'if-match': etag },
    answer: settingsSchema,
  });
}
