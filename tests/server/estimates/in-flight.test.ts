import { expect, test } from 'vitest';
import { withSlot } from '#server/modules/estimates/in-flight.ts';

function gate() {
  let open: () => void = () => undefined;
  const opened = new Promise<void>((resolve) => (open = resolve));
  return { opened, open };
}

test('the 65th computation of one person is refused, another person and a later one are not', async () => {
  const { opened, open } = gate();
  const held = Array.from({ length: 64 }, () => withSlot('one', () => opened));
  await expect(withSlot('one', () => opened)).rejects.toMatchObject({ code: 'tooManyRequests' });
  expect(await withSlot('two', () => Promise.resolve('served'))).toBe('served');
  open();
  await Promise.all(held);
  expect(await withSlot('one', () => Promise.resolve('again'))).toBe('again');
});

test('a computation that fails gives its slot back', async () => {
  const fail = () => Promise.reject(new Error('failed'));
  for (let i = 0; i < 100; i++) await expect(withSlot('three', fail)).rejects.toThrow('failed');
});
