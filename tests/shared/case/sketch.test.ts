import { expect, test } from 'vitest';
import { sketchOf } from '#src/components/potential-shape.ts';

const unit = { r: 'angstrom', v: 'eV' };
const from = (first: number) => Array.from({ length: 40 }, (_, i) => first + 0.02 * i);

test('a potential that is infinite near the origin has a wall there', () => {
  const r = from(1);
  const { wall, r: range } = sketchOf({ r, v: r.map(() => 0), unit });
  expect(wall).toBe(1);
  expect(range).toEqual([0, Math.max(...range)]);
  expect(range[1]).toBeGreaterThan(1);
});

test('a finite potential, and one that rises without end at the origin, has none', () => {
  const r = from(0.02);
  expect(sketchOf({ r, v: r.map((x) => -Math.exp(-x)), unit }).wall).toBeNull();
  const steep = sketchOf({ r, v: r.map((x) => 1 / x), unit });
  expect(steep.wall).toBeNull();
  expect(steep.cut).toBe(true);
});
