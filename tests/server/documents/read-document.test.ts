import { describe, expect, it } from 'vitest';
import { CURRENT_FORMAT } from '#shared/contracts/cases.ts';
import { DomainError } from '#shared/errors.ts';
import { UPCASTERS, readDocument } from '#server/documents/read-document.ts';
import { formatOf, upcast } from '#server/documents/upcast.ts';
import type { StoredDocument, Upcaster } from '#server/documents/upcast.ts';
import { yukawaDocument } from './sample-documents.ts';

describe('readDocument', () => {
  it('reads a document of format 1, and one whose format was left out, as they are', () => {
    expect(readDocument({ ...yukawaDocument, format: 1 })).toEqual({
      ...yukawaDocument,
      format: 1,
    });
    expect(readDocument(yukawaDocument)).toEqual(yukawaDocument);
  });

  it('refuses a format of the future in words, saying which it reads', () => {
    const read = () => readDocument({ ...yukawaDocument, format: CURRENT_FORMAT + 6 });
    expect(read).toThrow(DomainError);
    expect(read).toThrow(/newer Tallybarn \(document format 7; this one reads up to format 1\)/);
  });

  it.each([0, -1, 1.5, '1', null, [1]])('takes %j for no format at all', (format) => {
    expect(formatOf({ format })).toBe(format === null ? 1 : undefined);
  });

  it('has a step for every format before the current one', () => {
    expect([...UPCASTERS.keys()].sort((a, b) => a - b)).toEqual(
      Array.from({ length: CURRENT_FORMAT - 1 }, (_, index) => index + 1),
    );
  });
});

describe('upcast', () => {
  const steps = new Map<number, Upcaster>([
    [1, ({ beamEnergy, ...rest }: StoredDocument) => ({ ...rest, energy: beamEnergy })],
    [2, (document) => ({ ...document, frame: document.frame ?? 'cm' })],
  ]);

  it('runs the steps in order and stamps each format', () => {
    expect(upcast({ format: 1, beamEnergy: 100 }, 3, steps)).toEqual({
      format: 3,
      energy: 100,
      frame: 'cm',
    });
    expect(upcast({ format: 2, energy: 5, frame: 'lab' }, 3, steps)).toEqual({
      format: 3,
      energy: 5,
      frame: 'lab',
    });
  });

  it('leaves the stored document untouched', () => {
    const stored = Object.freeze({ format: 1, beamEnergy: 100 });
    upcast(stored, 3, steps);
    expect(stored).toEqual({ format: 1, beamEnergy: 100 });
  });

  it('does not skip a missing step', () => {
    expect(() => upcast({ format: 1 }, 4, steps)).toThrow(/from document format 3 to 4/);
  });
});
