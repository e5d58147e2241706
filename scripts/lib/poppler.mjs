// @ts-check
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';

/** @returns {boolean} whether Debian's readers of PDF are here, by which reports are read back */
export function hasPoppler() {
  const folders = (process.env['PATH'] ?? '').split(':').filter((folder) => folder !== '');
  return ['pdftotext', 'pdfinfo', 'pdffonts'].every((name) =>
    folders.some((folder) => existsSync(join(folder, name))),
  );
}
