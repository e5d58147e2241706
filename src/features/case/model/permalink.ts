import { z } from 'zod';
import { caseDocumentSchema } from '#shared/contracts/cases.ts';
import type { Content } from './fields.ts';
import { without } from './without.ts';

/** Mark of the fragment; the digit is the version of what follows. */
const MARK = '#case1=';
/** Longer addresses break in mails and chats. */
export const MAX_LINK = 8000;
/** What a link may unfold to, in bytes: a small text can be made to unfold without end. */
const MAX_UNFOLDED = 400_000;

const contentSchema = z.object({
  title: z.string().max(200),
  tags: z.array(z.string().max(40)).max(20),
  document: caseDocumentSchema,
});

export type Opened = { content: Content } | { problem: string };

async function collect(
  stream: ReadableStream<Uint8Array>,
  most: number,
): Promise<Uint8Array | null> {
  const parts: Uint8Array[] = [];
  let size = 0;
  const reader = stream.getReader();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    size += value.length;
    if (size > most) {
      await reader.cancel();
      return null;
    }
    parts.push(value);
  }
  const whole = new Uint8Array(size);
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}

function toText(bytes: Uint8Array): string {
  let binary = '';
  for (const byte of bytes) binary += String.fromCharCode(byte);
  return btoa(binary).replaceAll('+', '-').replaceAll('/', '_').replace(/=+$/, '');
}

function toBytes(text: string): Uint8Array<ArrayBuffer> {
  const binary = atob(text.replaceAll('-', '+').replaceAll('_', '/'));
  return Uint8Array.from(binary, (sign) => sign.charCodeAt(0));
}

const through = (bytes: Uint8Array<ArrayBuffer>, change: CompressionStream | DecompressionStream) =>
  new Blob([bytes]).stream().pipeThrough(change);

export function isCaseLink(fragment: string): boolean {
  return fragment.startsWith(MARK);
}

/** The fragment of an address that opens this content again as a case not yet saved; null where it would be too long. */
export async function linkOf({ title, tags, document }: Content): Promise<string | null> {
  const shared = { title, tags, document: without(document, 'format', 'runPlan') };
  const bytes = new Uint8Array(new TextEncoder().encode(JSON.stringify(shared)));
  const folded = await collect(through(bytes, new CompressionStream('deflate-raw')), MAX_UNFOLDED);
  const fragment = folded === null ? null : `${MARK}${toText(folded)}`;
  return fragment === null || fragment.length > MAX_LINK ? null : fragment;
}

const DAMAGED =
  'This address holds no case that can be read: it was shortened or changed on its way. Ask for it again, and copy it whole.';

/** What a fragment holds, checked as any document is; the engine checks the numbers when it computes them. */
export async function openLink(fragment: string): Promise<Opened> {
  if (!isCaseLink(fragment) || fragment.length > MAX_LINK) return { problem: DAMAGED };
  try {
    const bytes = toBytes(fragment.slice(MARK.length));
    const unfolded = await collect(
      through(bytes, new DecompressionStream('deflate-raw')),
      MAX_UNFOLDED,
    );
    if (unfolded === null) return { problem: DAMAGED };
    const sent: unknown = JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(unfolded));
    const parsed = contentSchema.safeParse(sent);
    if (parsed.success) return { content: parsed.data };
    const [issue] = parsed.error.issues;
    const where = issue ? ` (${issue.path.join('/') || 'the whole'}: ${issue.message})` : '';
    return {
      problem: `The case in this address is not one that this version understands${where}.`,
    };
  } catch (cause) {
    console.info('The fragment of the address is damaged', cause);
    return { problem: DAMAGED };
  }
}

/** A short name for what a fragment holds, so that unsaved work on it is found again. */
export function linkName(fragment: string): string {
  let hash = 0x811c9dc5;
  for (const sign of fragment) hash = Math.imul(hash ^ (sign.codePointAt(0) ?? 0), 0x01000193);
  return `link-${(hash >>> 0).toString(16).padStart(8, '0')}`;
}
