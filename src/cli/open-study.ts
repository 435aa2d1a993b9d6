/** A study file, read and checked; its mistakes told all at once. */
import { readdirSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import { capitalised } from '../charts/figure-words.ts';
import { shortText } from '../charts/visible-text.ts';
import { checkStudy } from '../core/study/check-study.ts';
import type { Study } from '../core/study/study.ts';
import { formatIssues, type Issue, warningPlace, warningWords } from '../core/study/text/issue.ts';
import { nearestName } from '../core/units/nearest-name.ts';
import { type FileDigest, readStudyFile, studySources } from '../run/study-files.ts';
import { countOf } from './figure-text.ts';
import { complain, ink, say } from './terminal.ts';

/** A study that can be used. */
export interface OpenStudy {
  readonly ok: true;
  readonly file: string;
  readonly text: string;
  readonly study: Study;
  readonly warnings: readonly Issue[];
  /** Digests of the further files it uses. */
  readonly digests: readonly FileDigest[];
}

/** A file that is no study: it could not be read (`unreadable`, in words), or its mistakes. */
export interface WrongStudy {
  readonly ok: false;
  readonly file: string;
  readonly unreadable: string | null;
  readonly issues: readonly Issue[];
}

/** Reads and checks a study file; says nothing. */
export function readStudy(file: string): OpenStudy | WrongStudy {
  const read = readStudyFile(file);
  if ('problem' in read) return { ok: false, file, unreadable: `${read.problem}${whatToDo(file)}`, issues: [] };
  const sources = studySources(file);
  const checked = checkStudy(read.text, file, sources);
  if (!checked.ok) return { ok: false, file, unreadable: null, issues: checked.issues };
  return { ok: true, file, text: read.text, study: checked.study, warnings: checked.warnings, digests: sources.digests() };
}

/** Reads and checks a study file; says what is wrong with it and gives null where it is no study. */
export function openStudy(file: string): OpenStudy | null {
  const read = readStudy(file);
  if (read.ok) return read;
  sayWrong(read);
  return null;
}

/** Says everything that is wrong with a file. */
export function sayWrong(wrong: WrongStudy): void {
  if (wrong.unreadable === null) {
    say(formatIssues(wrong.issues));
    say(`\n${ink('red', countOf(wrong.issues.length, 'mistake'))} in ${wrong.file}`);
  } else {
    complain(`${shortText(wrong.file, 200)}: ${wrong.unreadable}`);
  }
}

/** A warning as a sentence or two: where, what was found, what is usual, what to do. */
export function warningSentence(warning: Issue, study: OpenStudy): string {
  return `${capitalised(warningPlace(warning, study.file))}: ${warningWords(warning)}`;
}

/** The nearest file beside a name that leads nowhere. */
function whatToDo(file: string): string {
  try {
    const near = nearestName(basename(file), readdirSync(dirname(file)));
    return near === null || near === basename(file) ? '' : `. Did you mean ${join(dirname(file), near)}?`;
  } catch {
    return '';
  }
}
