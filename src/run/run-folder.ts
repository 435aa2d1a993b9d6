/** The run folder: whose it is, what stands in it, and clearing what an earlier run left. */
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, statSync } from 'node:fs';
import { basename, join } from 'node:path';
import { RunProblem, systemReason } from './run-problem.ts';
import { type RunRecord, readRunRecord, runRecordText } from './run-record.ts';
import { asideEnding, writeWhole } from './write-whole.ts';

/** Files that a run writes, by folder, beside run.json; everything else in the folder is left alone. */
const ours: readonly { readonly folder: string; readonly files: RegExp }[] = [
  { folder: '', files: /^(study\.yaml|front\.csv|report\.html)$/u },
  { folder: 'designs', files: /^part-\d{5,}\.parquet$/u },
  { folder: 'charts', files: /^[A-Za-z0-9.-]+-over-[A-Za-z0-9.-]+\.svg$/u },
];

/** Paths inside a run folder. */
export class RunFolder {
  readonly path: string;

  constructor(path: string) {
    this.path = path;
  }

  /** Path of a file of the run, `designs/part-00000.parquet` like. */
  file(name: string): string {
    return join(this.path, name);
  }

  /** Writes one file of the run whole. */
  write(name: string, content: string | Uint8Array): void {
    writeWhole(this.file(name), content);
  }

  /** Writes run.json. */
  record(record: Omit<RunRecord, 'maker'>): void {
    this.write('run.json', runRecordText(record));
  }
}

/** Name of the run folder of a study file: its name without ending. */
export function runFolderName(studyFile: string): string {
  return basename(studyFile).replace(/\.(ya?ml)$/iu, '');
}

/**
 * Makes the folder ready for a new run: there, ours by the record in its run.json, and free of an earlier run's files. Throws
 * RunProblem. The record is written before anything is made or cleared: a crash at any moment leaves a folder that is still ours.
 */
export function openRunFolder(path: string, record: Omit<RunRecord, 'maker'>): RunFolder {
  try {
    if (existsSync(path)) refuseForeign(path);
    mkdirSync(path, { recursive: true });
    const opened = new RunFolder(path);
    opened.record(record);
    for (const { folder } of ours) mkdirSync(join(path, folder), { recursive: true });
    clearOurs(path);
    return opened;
  } catch (error) {
    if (error instanceof RunProblem) throw error;
    throw new RunProblem(`The folder ${path} cannot be used: ${systemReason(error)}`, 'Choose another one with --out.', { cause: error });
  }
}

function refuseForeign(path: string): void {
  if (!statSync(path).isDirectory()) throw new RunProblem(`${path} is a file, not a folder`, 'Move it away, or choose another folder with --out.');
  if (readdirSync(path).length === 0 || isOurs(join(path, 'run.json'))) return;
  throw new RunProblem(`The folder ${path} holds files that no run of this program has written`, 'Choose an empty or new folder with --out.');
}

function isOurs(record: string): boolean {
  return existsSync(record) && readRunRecord(readFileSync(record, 'utf8')) !== null;
}

function clearOurs(path: string): void {
  for (const { folder, files } of ours) {
    for (const name of readdirSync(join(path, folder))) {
      if (files.test(name.endsWith(asideEnding) ? name.slice(0, -asideEnding.length) : name)) rmSync(join(path, folder, name));
    }
  }
}
