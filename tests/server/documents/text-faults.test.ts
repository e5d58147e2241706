import { describe, expect, it } from 'vitest';
import { textFaults } from '#server/documents/text-faults.ts';

describe('textFaults', () => {
  it('points at every text and name the database could not keep', () => {
    const value = {
      entered: { '/energy': '10\u0000 keV', 'a~b/c': 'half \ud83d of a pair' },
      terms: [{ form: 'ok', 'bad\u0000key': 1 }, 'fine'],
    };
    expect(textFaults(value, '/document')).toEqual([
      {
        path: '/document/entered/~1energy',
        message: 'The text contains a NUL character; remove it.',
      },
      {
        path: '/document/entered/a~0b~1c',
        message: 'The text contains half of a surrogate pair; retype that character.',
      },
      { path: '/document/terms/0', message: 'The text contains a NUL character; remove it.' },
    ]);
  });

  it('finds nothing in ordinary text of any script, numbers and null', () => {
    expect(textFaults({ a: 'Å, 中, 😀', b: [1, null, true], é: {} })).toEqual([]);
  });
});
