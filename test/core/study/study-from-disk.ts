/** Studies of the tests: the built-in cycles from the source tree, files from test data or from a table of texts. */
import { readdirSync, readFileSync } from 'node:fs';
import { checkStudy, type StudyCheck, type StudySources } from '../../../src/core/study/check-study.ts';
import type { Study } from '../../../src/core/study/study.ts';
import { formatIssues } from '../../../src/core/study/text/issue.ts';

const cycles = new URL('../../../src/run/cycles/', import.meta.url);

/** Sources with the built-in cycles and the files of a table. */
export function sourcesWith(files: Readonly<Record<string, string>> = {}): StudySources {
  return {
    cycleNames: readdirSync(cycles).map((name) => name.slice(0, -'.csv'.length)),
    cycle: (name) => readFileSync(new URL(`${name}.csv`, cycles), 'utf8'),
    file: (path) => (Object.hasOwn(files, path) ? { text: files[path] as string } : { problem: 'there is no such file' }),
  };
}

/** Checks a text under the name study.yaml. */
export function check(text: string, files: Readonly<Record<string, string>> = {}): StudyCheck {
  return checkStudy(text, 'study.yaml', sourcesWith(files));
}

/** The study of a text that must be right. */
export function studyOf(text: string, files: Readonly<Record<string, string>> = {}): Study {
  const read = check(text, files);
  if (!read.ok) throw new Error(formatIssues(read.issues));
  return read.study;
}

/** Everything printed for a text that must be wrong; empty for one that is right. */
export function complaint(text: string, files: Readonly<Record<string, string>> = {}): string {
  const read = check(text, files);
  return read.ok ? '' : formatIssues(read.issues);
}

/** Every warning printed for a text that must be right. */
export function warningsOf(text: string, files: Readonly<Record<string, string>> = {}): string {
  const read = check(text, files);
  if (!read.ok) throw new Error(formatIssues(read.issues));
  return formatIssues(read.warnings);
}

/** The example of the study file's description. */
export const harbour = readFileSync(new URL('../../data/harbour.yaml', import.meta.url), 'utf8');

/** The text with one passage replaced; throws where the passage is not there, so that no test runs on an unchanged text. */
export function edited(text: string, ...edits: readonly (readonly [from: string, to: string])[]): string {
  return edits.reduce((changed, [from, to]) => {
    if (!changed.includes(from)) throw new Error(`not in the text: ${from}`);
    return changed.replace(from, () => to);
  }, text);
}
