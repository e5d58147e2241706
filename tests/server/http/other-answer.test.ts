import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import express from 'express';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { prefers, textAnswer } from '#server/http/other-answer.ts';

test.each([
  [undefined, false],
  ['', false],
  ['*/*', false],
  ['application/json', false],
  ['application/json, text/plain, */*', false],
  ['text/*', false],
  ['text/csv', true],
  ['Text/CSV; charset=utf-8', true],
  ['text/csv, */*;q=0.1', true],
  ['text/csv, application/json', true],
  ['application/json, text/csv', false],
  ['application/json;q=0.5, text/csv', true],
  ['text/csv;q=0.5, application/json;q=0.9', false],
  ['text/csv;q=0', false],
])('Accept: %s asks for CSV: %s', (accept, expected) => {
  expect(prefers(accept, 'text/csv')).toBe(expected);
});

describe('a long text in pieces', () => {
  const LINE = `${'x'.repeat(99)}\n`;
  let sent = 0;
  function* pieces() {
    for (sent = 0; sent < 400; sent += 1) yield LINE.repeat(500);
  }
  const app = express();
  app.get('/', (_req, res) => textAnswer('text/csv', pieces(), 'long.csv').send(res));
  const server = app.listen(0, '127.0.0.1');
  let url: string;
  beforeAll(async () => {
    if (!server.listening) await once(server, 'listening');
    url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  });
  afterAll(() => void server.close());

  test('arrives whole', async () => {
    const answer = await fetch(url);
    expect(answer.headers.get('content-disposition')).toBe('attachment; filename="long.csv"');
    expect((await answer.text()).length).toBe(400 * 500 * LINE.length);
  });

  test('is not made for a client that left', async () => {
    const leaving = new AbortController();
    const answer = await fetch(url, { signal: leaving.signal });
    await answer.body?.getReader().read();
    leaving.abort();
    const before = await new Promise<number>((resolve) => setTimeout(() => resolve(sent), 300));
    expect(before).toBeLessThan(400);
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect(sent).toBe(before);
  });
});
