import { execFile } from 'node:child_process';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';

const run = promisify(execFile);

export interface ReadPdf {
  /** Everything written, lines where they stand. */
  text: string;
  /** The same with every run of white space as one space, and words joined that were broken at a hyphen. */
  flow: string;
  /** What the file says of itself: Title, Author, Pages … */
  info: Record<string, string>;
  /** Every font with whether it is embedded. */
  fonts: string[];
}

/** A file read back by another program than the one that wrote it (Debian's poppler-utils). */
export async function readPdf(bytes: Uint8Array): Promise<ReadPdf> {
  const folder = await mkdtemp(join(tmpdir(), 'report-'));
  const file = join(folder, 'report.pdf');
  try {
    await writeFile(file, bytes);
    const [text, info, fonts] = await Promise.all([
      run('pdftotext', ['-layout', '-enc', 'UTF-8', file, '-'], { maxBuffer: 1e8 }),
      run('pdfinfo', ['-isodates', '-enc', 'UTF-8', file]),
      run('pdffonts', [file]),
    ]);
    const lines = info.stdout.split('\n').map((line) => /^([^:]+):\s*(.*)$/.exec(line));
    return {
      text: text.stdout,
      flow: text.stdout.replace(/-\n\s*/g, '-').replace(/\s+/g, ' '),
      info: Object.fromEntries(lines.flatMap((m) => (m ? [[m[1] ?? '', m[2] ?? '']] : []))),
      fonts: fonts.stdout.split('\n').slice(2).filter(Boolean),
    };
  } finally {
    await rm(folder, { recursive: true });
  }
}
