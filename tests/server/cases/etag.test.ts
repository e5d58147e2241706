import { describe, expect, it } from 'vitest';
import { DomainError } from '#shared/errors.ts';
import { etagOf, matchesLock } from '#server/modules/cases/etag.ts';

describe('If-Match', () => {
  it.each([etagOf(3), 'W/"3"', '"1", "3"', ' "3" ', '*'])('%s matches lock 3', (header) => {
    expect(matchesLock(header, 3)).toBe(true);
  });

  it.each(['"2"', '"33"', '""', '"1","2"', 'W/"4"'])('%s does not match lock 3', (header) => {
    expect(matchesLock(header, 3)).toBe(false);
  });

  it.each([
    [undefined, 'preconditionRequired'],
    ['', 'preconditionRequired'],
    ['  ', 'preconditionRequired'],
    ['3', 'malformed'],
    ['"3', 'malformed'],
    ['"3" x', 'malformed'],
  ])('%j is refused as %s', (header, code) => {
    const refused = (): unknown => {
      try {
        return matchesLock(header, 3);
      } catch (error) {
        return error;
      }
    };
    expect(refused()).toBeInstanceOf(DomainError);
    expect(refused()).toMatchObject({ code });
  });
});
