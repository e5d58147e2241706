import { expect, test } from 'vitest';
import { prefers } from '#server/http/other-answer.ts';

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
