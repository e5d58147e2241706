import type { FieldError } from '#shared/errors.ts';
import { jsonPointer } from './json-pointer.ts';

const MAX_DEPTH = 64;
const MAX_REPORTED = 20;

function textFault(text: string): string | undefined {
  if (text.includes('\u0000')) return 'This text contains a NUL character (U+0000); remove it.';
  if (!text.isWellFormed()) {
    return 'This text contains half of a surrogate pair; retype that character.';
  }
  return undefined;
}

function scalarFault(value: unknown): string | undefined {
  if (typeof value === 'string') return textFault(value);
  if (typeof value === 'number' && !Number.isFinite(value)) {
    return 'This number is too large for double precision; give a finite number.';
  }
  return undefined;
}

function keyFault(key: string): string | undefined {
  if (key === '__proto__') return 'A key may not be called __proto__; remove it.';
  return textFault(key) && 'This key contains a character that cannot be stored; rename it.';
}

/** A container on the way, linked to the one that holds it: a path is spelt out for a fault alone. */
interface Frame {
  container: object;
  key: string | number;
  above: Frame | null;
  depth: number;
}

function pathOf(frame: Frame | null, key: string | number): (string | number)[] {
  const path = [key];
  for (let at = frame; at?.above; at = at.above) path.unshift(at.key);
  return path;
}

/** Rows of a table are short lists of finite numbers, thousands of them: nothing in them can be unsafe. */
function isRow(value: object): boolean {
  return (
    Array.isArray(value) &&
    value.length <= 4 &&
    value.every((item) => typeof item === 'number' && Number.isFinite(item))
  );
}

/**
 * What no input may hold, whatever its schema: numbers beyond double precision, texts PostgreSQL cannot
 * store, keys that reach for prototypes, nesting without end. Iterative, so depth cannot exhaust the stack.
 */
export function unsafeValues(root: unknown): FieldError[] {
  const faults: FieldError[] = [];
  const waiting: Frame[] = [];
  const visit = (value: unknown, key: string | number, above: Frame): void => {
    if (typeof value === 'object' && value !== null) {
      if (!isRow(value) || above.depth + 1 >= MAX_DEPTH) {
        waiting.push({ container: value, key, above, depth: above.depth + 1 });
      }
      return;
    }
    const fault = scalarFault(value);
    if (fault && faults.length < MAX_REPORTED) {
      faults.push({ path: jsonPointer(pathOf(above, key)), message: fault });
    }
  };
  if (typeof root !== 'object' || root === null) {
    const fault = scalarFault(root);
    return fault ? [{ path: '', message: fault }] : [];
  }
  waiting.push({ container: root, key: '', above: null, depth: 0 });
  for (let next = waiting.pop(); next; next = waiting.pop()) {
    const frame = next;
    const { container, above, key: own, depth } = frame;
    if (depth >= MAX_DEPTH) {
      const path = jsonPointer(pathOf(above, own));
      return [{ path, message: `Nested deeper than ${MAX_DEPTH} levels.` }];
    }
    if (Array.isArray(container)) {
      container.forEach((item: unknown, index) => visit(item, index, frame));
      continue;
    }
    for (const [key, item] of Object.entries(container)) {
      const wrongKey = keyFault(key);
      if (wrongKey) faults.push({ path: jsonPointer(pathOf(frame, key)), message: wrongKey });
      else visit(item, key, frame);
    }
  }
  return faults.slice(0, MAX_REPORTED);
}
