/** The names a JSON Pointer (RFC 6901) walks along. */
export function namesOf(pointer: string): string[] {
  return pointer
    .split('/')
    .slice(1)
    .map((name) => name.replaceAll('~1', '/').replaceAll('~0', '~'));
}

function isContainer(value: unknown): value is Record<string, unknown> | unknown[] {
  return typeof value === 'object' && value !== null;
}

/** What stands at the pointer; undefined where nothing does. */
export function valueAt(document: unknown, pointer: string): unknown {
  let at = document;
  for (const name of namesOf(pointer)) {
    if (!isContainer(at) || !Object.hasOwn(at, name)) return undefined;
    at = Array.isArray(at) ? at[Number(name)] : at[name];
  }
  return at;
}

/** A copy with another value at the pointer, which must exist; the rest is shared with the original. */
export function withValueAt<T>(document: T, pointer: string, value: unknown): T {
  const replace = (at: unknown, [name, ...rest]: string[]): unknown => {
    if (name === undefined) return value;
    if (Array.isArray(at)) {
      const list: unknown[] = at;
      return list.map((item, i) => (i === Number(name) ? replace(item, rest) : item));
    }
    if (typeof at !== 'object' || at === null || !Object.hasOwn(at, name)) {
      throw new Error(`${pointer} points at nothing.`);
    }
    const members: Record<string, unknown> = { ...at };
    return { ...members, [name]: replace(members[name], rest) };
  };
  return replace(document, namesOf(pointer)) as T;
}
