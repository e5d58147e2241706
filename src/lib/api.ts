import type { z } from 'zod';
import { problemSchema } from '#shared/contracts/problem-details.ts';
import type { ErrorCode, FieldError } from '#shared/errors.ts';
import { regainSession } from './session-loss.ts';

/** What only the browser can find out, beside the codes of the server. */
export type ApiErrorCode = ErrorCode | 'network' | 'unreadable';

/** A refusal in words: `message` can be shown as it is, `errors` point into what was sent. */
export class ApiError extends Error {
  override readonly name = 'ApiError';
  constructor(
    readonly code: ApiErrorCode,
    message: string,
    readonly status = 0,
    readonly errors: readonly FieldError[] = [],
  ) {
    super(message);
  }

  /** What is wrong with one input, by its JSON Pointer. */
  at(path: string): string | undefined {
    return this.errors.find((error) => error.path === path)?.message;
  }
}

export interface Call<S extends z.ZodType> {
  method?: 'GET' | 'POST' | 'PATCH' | 'PUT' | 'DELETE';
  /** Sent as JSON. */
  body?: unknown;
  query?: Readonly<Record<string, string | number | undefined>>;
  headers?: Readonly<Record<string, string>>;
  signal?: AbortSignal;
  /** Shape of the answer; without one nothing is read from it. */
  answer: S;
  /** Ask a person whose session has ended to sign in again and then repeat (the default), or refuse at once. */
  onSignedOut?: 'ask' | 'refuse';
}

/** An answer together with its ETag, which a save needs for If-Match. */
export interface Tagged<T> {
  data: T;
  etag: string | null;
}

const NETWORK =
  'The server cannot be reached. What you typed is kept in this window; try again when the connection is back.';
const UNREADABLE =
  'The server gave an answer this page does not understand. Reload the page: it may be older than the server.';

function addressOf(path: string, query: Call<z.ZodType>['query']): string {
  const search = new URLSearchParams();
  for (const [key, value] of Object.entries(query ?? {})) {
    if (value !== undefined && value !== '') search.set(key, String(value));
  }
  return search.size > 0 ? `${path}?${search.toString()}` : path;
}

async function send(path: string, call: Call<z.ZodType>): Promise<Response> {
  const headers: Record<string, string> = { accept: 'application/json', ...call.headers };
  if (call.body !== undefined) headers['content-type'] = 'application/json';
  try {
    return await fetch(addressOf(path, call.query), {
      method: call.method ?? 'GET',
      headers,
      credentials: 'same-origin',
      ...(call.body !== undefined && { body: JSON.stringify(call.body) }),
      ...(call.signal && { signal: call.signal }),
    });
  } catch (cause) {
    if (call.signal?.aborted) throw cause;
    throw new ApiError('network', NETWORK);
  }
}

async function problemOf(response: Response): Promise<ApiError> {
  const text = await response.text();
  let body: unknown;
  try {
    body = JSON.parse(text);
  } catch (notJson) {
    console.info('An answer that is not JSON', response.status, notJson);
  }
  const problem = problemSchema.safeParse(body);
  if (problem.success) {
    const { code, detail, status, errors } = problem.data;
    return new ApiError(code, detail, status, errors);
  }
  return response.status >= 500
    ? new ApiError(
        'unavailable',
        `The server is not able to answer (${response.status}). Try again in a moment.`,
        response.status,
      )
    : new ApiError('unreadable', UNREADABLE, response.status);
}

/** Sends, and reads the answer by its contract; every failure is an ApiError in words, except an abort. */
export async function requestTagged<S extends z.ZodType>(
  path: string,
  call: Call<S>,
): Promise<Tagged<z.output<S>>> {
  const response = await send(path, call);
  if (!response.ok) {
    const error = await problemOf(response);
    const mayAsk = error.code === 'unauthenticated' && call.onSignedOut !== 'refuse';
    if (mayAsk && (await regainSession(call.signal))) {
      return requestTagged(path, { ...call, onSignedOut: 'refuse' });
    }
    throw error;
  }
  let body: unknown;
  try {
    body = response.status === 204 ? undefined : await response.json();
  } catch (cause) {
    if (call.signal?.aborted) throw cause;
    throw new ApiError('unreadable', UNREADABLE, response.status);
  }
  const parsed = call.answer.safeParse(body);
  if (!parsed.success) {
    console.error(`Answer of ${path} breaks its contract`, parsed.error.issues);
    throw new ApiError('unreadable', UNREADABLE, response.status);
  }
  return { data: parsed.data, etag: response.headers.get('etag') };
}

export async function request<S extends z.ZodType>(
  path: string,
  call: Call<S>,
): Promise<z.output<S>> {
  return (await requestTagged(path, call)).data;
}

/** Words for any failure, for the places that show one line. */
export function inWords(error: unknown): string {
  if (error instanceof ApiError) return error.message;
  return 'Something went wrong in this page. What you typed is kept; reload the page and try again.';
}
