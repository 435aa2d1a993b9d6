/** What a study is made of on disk: its own text, the files it names, the built-in cycles it uses. */
import { createHash } from 'node:crypto';
import { readFileSync, type Stats, statSync } from 'node:fs';
import { dirname, resolve } from 'node:path';
import type { StudySources } from '../core/study/check-study.ts';
import { builtInCycleNames, builtInCycleText } from './built-in-cycles.ts';
import { systemReason } from './run-problem.ts';

const SAVE = 'save it in that encoding, or check that this is the right file';
/** Larger studies are none: a study is written by people. */
const mostStudyBytes = 1_000_000;
/** A day at ten points a second is about 15 MB. */
const mostDataBytes = 20_000_000;

/** A text, or the sentence that says why there is none. */
export type FileText = { readonly text: string } | { readonly problem: string };

/** Name and SHA-256 (hexadecimal) of an input file. */
export interface FileDigest {
  readonly name: string;
  readonly sha256: string;
}

/** The text of a study file. */
export function readStudyFile(path: string): FileText {
  return readText(path, mostStudyBytes);
}

/** Sources for the check of a study at `studyPath`; files are looked up beside it. Remembers what it handed out. */
export function studySources(studyPath: string): StudySources & { digests(): FileDigest[] } {
  const handedOut = new Map<string, string>();
  const remember = (name: string, text: string): string => {
    handedOut.set(name, text);
    return text;
  };
  return {
    cycleNames: builtInCycleNames(),
    cycle: (name) => remember(`built-in cycle ${name}`, builtInCycleText(name)),
    file(path) {
      const read = readText(resolve(dirname(studyPath), path), mostDataBytes);
      if ('text' in read) remember(path, read.text);
      return read;
    },
    digests: () => [...handedOut].map(([name, text]) => digest(name, text)).sort((a, b) => (a.name < b.name ? -1 : 1)),
  };
}

/** The digest of one input text. */
export function digest(name: string, text: string): FileDigest {
  return { name, sha256: createHash('sha256').update(text, 'utf8').digest('hex') };
}

function readText(path: string, mostBytes: number): FileText {
  let stats: Stats;
  try {
    stats = statSync(path);
  } catch (error) {
    return { problem: systemReason(error) };
  }
  if (stats.isDirectory()) return { problem: 'it is a folder' };
  if (!stats.isFile()) return { problem: 'it is not a plain file' };
  if (stats.size > mostBytes) return { problem: `it has ${stats.size.toLocaleString('en')} bytes; at most ${mostBytes.toLocaleString('en')} are read` };
  return decode(path);
}

function decode(path: string): FileText {
  try {
    const text = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(readFileSync(path));
    return text.includes('\0') ? { problem: `it is not a text file in UTF-8; ${SAVE}` } : { text };
  } catch (error) {
    return { problem: error instanceof TypeError ? `it is not a text file in UTF-8; ${SAVE}` : systemReason(error) };
  }
}
