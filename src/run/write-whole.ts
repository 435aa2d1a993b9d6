/** Files that are whole or not there: written aside, synced, renamed. */
import { closeSync, fsyncSync, openSync, renameSync, rmSync, writeSync } from 'node:fs';
import { dirname } from 'node:path';
import { RunProblem, systemReason } from './run-problem.ts';

/** Ending of a file that is still being written; what a crash leaves behind under it is worthless. */
export const asideEnding = '.tmp';

/** Writes a file so that a reader, or a restart after a crash, sees the old content or the new, never a part. Throws RunProblem. */
export function writeWhole(path: string, content: string | Uint8Array): void {
  const aside = `${path}${asideEnding}`;
  try {
    writeSynced(aside, typeof content === 'string' ? Buffer.from(content, 'utf8') : content);
    renameSync(aside, path);
    syncFolder(dirname(path));
  } catch (error) {
    removeAside(aside);
    throw new RunProblem(`${path} cannot be written: ${systemReason(error)}`, 'Free space or choose another folder with --out, then run again.', {
      cause: error,
    });
  }
}

/** Where even that fails, the reason to tell is still that of the write. */
function removeAside(path: string): void {
  try {
    rmSync(path, { force: true });
  } catch {
    // The next run clears it away, or says why it cannot.
  }
}

function writeSynced(path: string, bytes: Uint8Array): void {
  const file = openSync(path, 'w');
  try {
    for (let written = 0; written < bytes.length; ) written += writeSync(file, bytes, written);
    fsyncSync(file);
  } finally {
    closeSync(file);
  }
}

/** A rename is only lasting once its folder is synced; some systems cannot sync a folder, and then nothing more can be done. */
function syncFolder(path: string): void {
  let folder: number;
  try {
    folder = openSync(path, 'r');
  } catch {
    return;
  }
  try {
    fsyncSync(folder);
  } catch {
    // Not every file system knows how.
  } finally {
    closeSync(folder);
  }
}
