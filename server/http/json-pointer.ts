/** JSON Pointer (RFC 6901) of a path of keys and indices; the empty text means the whole. */
export function jsonPointer(path: readonly PropertyKey[]): string {
  return path
    .map((segment) => `/${String(segment).replaceAll('~', '~0').replaceAll('/', '~1')}`)
    .join('');
}
