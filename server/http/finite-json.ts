/**
 * JSON text of a value, refusing NaN and infinities, which `JSON.stringify` would silently turn into null.
 * A non-finite number here is a bug of ours, so it throws a plain Error and never leaves.
 */
export function finiteJson(value: unknown): string {
  const text = JSON.stringify(value, (key, item: unknown) => {
    if (typeof item === 'number' && !Number.isFinite(item)) {
      throw new Error(`A non-finite number was about to leave under the key "${key}".`);
    }
    return item;
  });
  if (text === undefined) throw new Error('There is nothing to answer where JSON is due.');
  return text;
}
