import type { FieldError } from '#shared/errors.ts';

const escapePointer = (key: string): string => key.replaceAll('~', '~0').replaceAll('/', '~1');

function faultOf(text: string): string | undefined {
  if (text.includes('\u0000')) return 'The text contains a NUL character; remove it.';
  if (!text.isWellFormed()) {
    return 'The text contains half of a surrogate pair; retype that character.';
  }
  return undefined;
}

/** Texts (and names of members) anywhere in a JSON value that the database could not keep, by JSON Pointer. */
export function textFaults(value: unknown, pointer = ''): FieldError[] {
  if (typeof value === 'string') {
    const message = faultOf(value);
    return message === undefined ? [] : [{ path: pointer, message }];
  }
  if (Array.isArray(value)) {
    return value.flatMap((item: unknown, index) => textFaults(item, `${pointer}/${index}`));
  }
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, item]) => {
    const message = faultOf(key);
    // The name itself is unfit to be written into a pointer, so the member that holds it is named.
    return message === undefined
      ? textFaults(item, `${pointer}/${escapePointer(key)}`)
      : [{ path: pointer, message }];
  });
}
