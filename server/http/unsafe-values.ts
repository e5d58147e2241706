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

/**
 * What no input may hold, whatever its schema: numbers beyond double precision, texts PostgreSQL cannot
 * store, keys that reach for prototypes, nesting without end. Iterative, so depth cannot exhaust the stack.
 */
export function unsafeValues(root: unknown): FieldError[] {
  const faults: FieldError[] = [];
  const waiting: { container: object; path: (string | number)[] }[] = [];
  const visit = (value: unknown, path: () => (string | number)[]): void => {
    if (typeof value === 'object' && value !== null) {
      waiting.push({ container: value, path: path() });
      return;
    }
    const fault = scalarFault(value);
    if (fault && faults.length < MAX_REPORTED) {
      faults.push({ path: jsonPointer(path()), message: fault });
    }
  };
  visit(root, () => []);
  for (let next = waiting.pop(); next; next = waiting.pop()) {
    const { container, path } = next;
    if (path.length >= MAX_DEPTH) {
      return [{ path: jsonPointer(path), message: `Nested deeper than ${MAX_DEPTH} levels.` }];
    }
    if (Array.isArray(container)) {
      container.forEach((item: unknown, index) => visit(item, () => [...path, index]));
      continue;
    }
    for (const [key, item] of Object.entries(container)) {
      const wrongKey = keyFault(key);
      if (wrongKey) faults.push({ path: jsonPointer([...path, key]), message: wrongKey });
      else visit(item, () => [...path, key]);
    }
  }
  return faults.slice(0, MAX_REPORTED);
}
