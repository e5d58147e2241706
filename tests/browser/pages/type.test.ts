import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { openStage, type Stage } from '#tests/browser/support/stage.ts';
import { fonts } from '#src/styles/tokens.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
});
afterAll(() => stage.close());
afterEach(() => stage.settle());

const RAISED = '⁰⁴⁵⁶⁷⁸⁹⁺⁻';
const LOWERED = '₀₁₂₃₄₅₆₇₈₉';

/** Widths of signs in thousandths of the size, as the page's own style sheet and files set them. */
async function widths(faces: string, signs: string): Promise<number[]> {
  const { page, goTo } = await stage.visitor('theorist');
  await goTo('/reference');
  return page.evaluate(
    async ([family, all]) => {
      const font = `1000px ${family}`;
      await document.fonts.load(font, all);
      const context = document.createElement('canvas').getContext('2d');
      if (!context) throw new Error('no canvas');
      context.font = font;
      return [...all].map((sign) => Math.round(context.measureText(sign).width));
    },
    [faces, signs] as const,
  );
}

// All signs of a face are made equally wide; one that came from the system would be of another width.
test('raised and lowered signs of the text are of one face, and none is the system’s', async () => {
  const found = await widths(fonts.sans, `${RAISED}${LOWERED}⇌`);
  expect(found.slice(0, -1)).toEqual([...RAISED, ...LOWERED].map(() => 367));
  expect(found.at(-1)).not.toBe(367);
});

test('raised signs beside figures are of one face, and none is the system’s', async () => {
  const found = await widths(fonts.mono, `${RAISED}¹²³⇌`);
  expect(found.slice(0, -1)).toEqual([...RAISED, 1, 2, 3].map(() => 372));
  expect(found.at(-1)).not.toBe(372);
});
