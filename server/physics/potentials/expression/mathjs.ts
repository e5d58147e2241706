import { createRequire } from 'node:module';
import type { MathNode } from 'mathjs';

type Parse = (text: string) => MathNode;
let parse: Parse | undefined;

/** The parser, loaded with the first formula: it is the largest of all packages, and most cases have none. */
export function parseText(text: string): MathNode {
  if (!parse) {
    const load = createRequire(import.meta.url);
    const mathjs = load('mathjs/lib/browser/math.js') as { parse: Parse };
    parse = mathjs.parse;
  }
  return parse(text);
}
