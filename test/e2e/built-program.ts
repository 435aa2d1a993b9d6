/** The built program as a user meets it: started in a temporary folder of its own. */
import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const program = fileURLToPath(new URL('../../dist/layshaft.js', import.meta.url));

/** What a command left behind. */
export interface Outcome {
  readonly status: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

/** How to start it. */
export interface Start {
  readonly cwd: string;
  readonly env?: Readonly<Record<string, string>>;
  /** Closes the reading end of stdout after this many bytes, as `head` does. */
  readonly closeStdoutAfter?: number;
  /** Options for node itself, such as a limit on memory. */
  readonly node?: readonly string[];
  /** Sent once the text on stderr matches. */
  readonly signal?: { readonly name: NodeJS.Signals; readonly when: RegExp };
}

/** Runs dist/layshaft.js to its end. */
export function layshaft(args: readonly string[], start: Start): Promise<Outcome> {
  if (!existsSync(program)) throw new Error('dist/layshaft.js is missing: npm run build makes it');
  const child = spawn(process.execPath, [...(start.node ?? []), program, ...args], {
    cwd: start.cwd,
    env: { PATH: process.env['PATH'] ?? '', HOME: start.cwd, ...start.env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let stdout = '';
  let stderr = '';
  let signalled = false;
  child.stdout.setEncoding('utf8').on('data', (text: string) => {
    stdout += text;
    if (start.closeStdoutAfter !== undefined && stdout.length >= start.closeStdoutAfter) child.stdout.destroy();
  });
  child.stderr.setEncoding('utf8').on('data', (text: string) => {
    stderr += text;
    if (signalled || start.signal === undefined || !start.signal.when.test(stderr)) return;
    signalled = true;
    child.kill(start.signal.name);
  });
  return new Promise((resolve, reject) => {
    child.on('error', reject);
    child.on('close', (status) => resolve({ status, stdout, stderr }));
  });
}

/** An empty temporary folder, and how to remove it. */
export function emptyFolder(): { readonly path: string; remove(): void } {
  const path = mkdtempSync(join(tmpdir(), 'layshaft-test-'));
  return { path, remove: () => rmSync(path, { recursive: true, force: true }) };
}
