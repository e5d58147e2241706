import { describe, expect, test } from 'vitest';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import {
  MAX_LINK,
  isCaseLink,
  linkName,
  linkOf,
  openLink,
} from '#src/features/case/model/permalink.ts';

const content = { title: 'Über 100 eV — “test”', tags: ['a', 'β'], document: DEFAULT_DOCUMENT };

async function folded(value: unknown): Promise<string> {
  const stream = new Blob([JSON.stringify(value)])
    .stream()
    .pipeThrough(new CompressionStream('deflate-raw'));
  const bytes = Buffer.from(await new Response(stream).arrayBuffer());
  return `#case1=${bytes.toString('base64url')}`;
}

test('an address opens what it was made of, to the last digit', async () => {
  const document = { ...DEFAULT_DOCUMENT, energy: { value: 0.1 + 0.2, unit: 'keV' } };
  const link = await linkOf({ ...content, document });
  expect(link).toMatch(/^#case1=[\w-]+$/);
  expect(link?.length).toBeLessThan(800);
  const opened = await openLink(link ?? '');
  const { format, ...rest } = document;
  expect(format).toBe(1);
  expect(opened).toEqual({ content: { ...content, document: rest } });
});

test('a document too large for an address gets none', async () => {
  const values = Array.from({ length: 3000 }, (_, i) => Math.abs(Math.sin(i * 12.9898)) * 180);
  const document = { ...DEFAULT_DOCUMENT, angles: { unit: 'deg', values } };
  expect(await linkOf({ ...content, document })).toBeNull();
});

describe('an address that will not do is refused in words', () => {
  test('shortened, changed, empty, too long', async () => {
    const link = (await linkOf(content)) ?? '';
    for (const damaged of [
      link.slice(0, -9),
      `${link.slice(0, 40)}AAAA${link.slice(44)}`,
      '#case1=',
      '#case1=!!!!',
      `#case1=${'A'.repeat(MAX_LINK)}`,
      '#else',
    ]) {
      expect(await openLink(damaged)).toHaveProperty('problem');
    }
  });

  test('of another shape, with the place', async () => {
    const wrong = {
      ...content,
      document: { ...DEFAULT_DOCUMENT, energy: { value: 1, unit: 'V' } },
    };
    const opened = await openLink(await folded(wrong));
    expect(opened).toHaveProperty('problem');
    expect('problem' in opened ? opened.problem : '').toContain('document/energy/unit');
  });

  test('a text that unfolds without end is given up', async () => {
    const bomb = await folded('a'.repeat(5_000_000));
    expect(bomb.length).toBeLessThan(MAX_LINK);
    expect(await openLink(bomb)).toHaveProperty('problem');
  });
});

test('a fragment has one short name, and only its own kind is taken for a case', async () => {
  const link = (await linkOf(content)) ?? '';
  expect(linkName(link)).toMatch(/^link-[0-9a-f]{8}$/);
  expect(linkName(link)).toBe(linkName(link));
  expect(linkName(link)).not.toBe(linkName(`${link}A`));
  expect(isCaseLink('#section')).toBe(false);
});
