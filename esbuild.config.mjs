// Builds the three hosts of one core into dist: the command line, the thread, and the report's page as one script and one style sheet.
import { cpSync, rmSync } from 'node:fs';
import { build } from 'esbuild';

rmSync('dist', { recursive: true, force: true });

const node = { bundle: true, platform: 'node', format: 'esm', target: 'node20', packages: 'external', outdir: 'dist', logLevel: 'warning' };

await Promise.all([
  // Split, so that threads, charts and page are loaded by the commands that need them only.
  build({ ...node, entryPoints: { layshaft: 'src/cli/layshaft.ts' }, splitting: true, banner: { js: '#!/usr/bin/env node' } }),
  build({ ...node, entryPoints: { thread: 'workers/thread.ts' } }),
  build({
    entryPoints: { page: 'src/page/page.ts', style: 'src/page/report.css' },
    bundle: true,
    platform: 'browser',
    format: 'iife',
    target: 'es2022',
    minify: true,
    charset: 'utf8',
    legalComments: 'none',
    outdir: 'dist',
    logLevel: 'warning',
  }),
]);
cpSync('src/run/cycles', 'dist/cycles', { recursive: true });
