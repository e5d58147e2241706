import { createHash } from 'node:crypto';

/**
 * Marks an answer that only a new edition changes: the browser keeps it and asks each time whether it still holds (304).
 * Answers the answer.
 */
export function cacheable<T>(setHeader: (name: string, value: string) => void, answer: T): T {
  const hash = createHash('sha256').update(JSON.stringify(answer)).digest('base64url');
  setHeader('ETag', `"${hash.slice(0, 22)}"`);
  setHeader('Cache-Control', 'private, no-cache');
  return answer;
}
