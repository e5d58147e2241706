// @ts-check
import { rmSync } from 'node:fs';
import { join } from 'node:path';
import { build } from 'esbuild';
import { serverEntries } from './build.mjs';
import { ROOT } from './settings.mjs';

// Run as a process of its own, so that it can be stopped and its memory goes with it.
const outdir = join(ROOT, 'dist/server');
rmSync(outdir, { recursive: true, force: true });
await build({
  absWorkingDir: ROOT,
  entryPoints: serverEntries(ROOT),
  outbase: 'server',
  outdir,
  bundle: true,
  splitting: true,
  chunkNames: 'chunks/[name]-[hash]',
  packages: 'external',
  format: 'esm',
  platform: 'node',
  target: 'node20',
  sourcemap: true,
  logLevel: 'warning',
});
