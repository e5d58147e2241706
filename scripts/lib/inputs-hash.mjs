// @ts-check
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';

/**
 * @param {string} root
 * @param {string} path
 * @returns {string[]} files at or below the path, in a fixed order
 */
function filesBelow(root, path) {
  const full = join(root, path);
  if (!existsSync(full)) return [];
  if (!statSync(full).isDirectory()) return [path];
  return readdirSync(full)
    .sort()
    .flatMap((name) => filesBelow(root, `${path}/${name}`));
}

/**
 * One number for the names and contents of everything a build reads, whatever the clocks say.
 * @param {string} root
 * @param {readonly string[]} paths files and folders; those that do not exist count as absent
 * @returns {string}
 */
export function hashInputs(root, paths) {
  const hash = createHash('sha256');
  for (const file of paths.flatMap((path) => filesBelow(root, path))) {
    const content = readFileSync(join(root, file));
    hash.update(`${file}\n${content.length}\n`).update(content);
  }
  return hash.digest('hex');
}
