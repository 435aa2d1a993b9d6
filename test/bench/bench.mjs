// Builds the benchmark and the thread it starts, apart from dist, and runs it.
import { cpSync, mkdirSync } from 'node:fs';
import { build } from 'esbuild';

const outdir = 'node_modules/.cache/bench';
mkdirSync(outdir, { recursive: true });
const node = { bundle: true, platform: 'node', format: 'esm', target: 'node20', packages: 'external', outdir, logLevel: 'warning' };
await build({ ...node, entryPoints: { bench: 'test/bench/bench.ts', thread: 'workers/thread.ts' } });
cpSync('src/run/cycles', `${outdir}/cycles`, { recursive: true });
await import(new URL(`../../${outdir}/bench.js`, import.meta.url).href);
