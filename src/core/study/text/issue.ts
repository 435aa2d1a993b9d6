/** Issues: what is wrong in a person's file, where, what was expected, what was found, and what to do; and how they read in print. */
import { nearestName } from '../../units/nearest-name.ts';

/** One issue. Lines and columns count from 1; a file without lines has its issue at 1:1 with an empty source line. */
export interface Issue {
  readonly severity: 'error' | 'warning';
  /** Name of the rule that a warning comes from; empty for mistakes. */
  readonly rule: string;
  readonly file: string;
  readonly line: number;
  readonly column: number;
  /** The line shown, cut around the column, without control characters. */
  readonly source: string;
  /** Where in `source` the column stands, from 0. */
  readonly caret: number;
  /** Dotted place in the file: `vehicle.kerbMass`; empty for the file itself. */
  readonly path: string;
  readonly expected: string;
  readonly found: string;
  /** What to do, one or two sentences; may be empty. */
  readonly hint: string;
}

/** The words of an issue. */
export interface IssueWords {
  readonly expected: string;
  readonly found: string;
  readonly hint?: string;
}

/** The words of a warning, and the rule that it comes from. */
export interface WarningWords extends IssueWords {
  readonly rule: string;
}

/** Beyond this many, further issues change nothing but that there are more. */
const MOST_KEPT = 100;
/** How many are printed before 'and N more'. */
const MOST_PRINTED = 40;
const SOURCE_WIDTH = 120;

/** Collects the issues of one file's text. */
export class IssueList {
  readonly file: string;
  private readonly text: string;
  private readonly lineStarts: readonly number[];
  private readonly issues: Issue[] = [];
  private errors = 0;

  constructor(file: string, text: string) {
    this.file = file;
    this.text = text;
    this.lineStarts = lineStartsOf(text);
  }

  /** How many errors there are, those not kept included. */
  get errorCount(): number {
    return this.errors;
  }

  /** Whether any error was added. */
  get failed(): boolean {
    return this.errors > 0;
  }

  /** Adds an error at an offset of the text. */
  error(offset: number, path: string, words: IssueWords): void {
    this.add('error', offset, path, { ...words, rule: '' });
  }

  /** Adds a warning at an offset of the text. */
  warn(offset: number, path: string, words: WarningWords): void {
    this.add('warning', offset, path, words);
  }

  /** Takes over issues found in another file. */
  take(others: readonly Issue[]): void {
    this.errors += others.filter(({ severity }) => severity === 'error').length;
    this.issues.push(...others.slice(0, MOST_KEPT));
  }

  /** Whether further issues are no longer kept: then their words need no care. */
  get full(): boolean {
    return this.issues.length >= MOST_KEPT;
  }

  /** The valid name most likely meant, or null; none is looked for once the list is full. */
  nearest(wanted: string, names: Iterable<string>): string | null {
    return this.full ? null : nearestName(wanted, names);
  }

  /** The line (from 1) of an offset. */
  lineOf(offset: number): number {
    let [low, high] = [0, this.lineStarts.length - 1];
    while (low < high) {
      const middle = Math.ceil((low + high) / 2);
      if ((this.lineStarts[middle] as number) <= offset) low = middle;
      else high = middle - 1;
    }
    return low + 1;
  }

  /** All issues in the order of the file, those of other files after them; errors only, or warnings only. */
  list(severity: Issue['severity']): Issue[] {
    return inFileOrder(
      this.issues.filter((issue) => issue.severity === severity),
      this.file,
    );
  }

  private add(severity: Issue['severity'], offset: number, path: string, words: WarningWords): void {
    if (severity === 'error') this.errors += 1;
    if (this.full) return;
    const line = this.lineOf(offset);
    const start = this.lineStarts[line - 1] as number;
    const column = offset - start + 1;
    const shown = this.text.slice(start, this.lineStarts[line] ?? this.text.length).trimEnd();
    const from = shown.length <= SOURCE_WIDTH ? 0 : Math.max(0, Math.min(column - 1 - SOURCE_WIDTH / 2, shown.length - SOURCE_WIDTH));
    const source = printable(shown.slice(from, from + SOURCE_WIDTH));
    const place = { severity, file: this.file, line, column, source, caret: column - 1 - from, path: printable(clip(path, 120)) };
    const { rule, expected, found, hint = '' } = words;
    this.issues.push({ ...place, rule, expected: printable(expected), found: printable(clip(found, 200)), hint: printable(hint) });
  }
}

/** Issues in the order of the study file, those of other files after them. */
export function inFileOrder(issues: readonly Issue[], studyFile: string): Issue[] {
  const own = (issue: Issue) => (issue.file === studyFile ? 0 : 1);
  return [...issues].sort((a, b) => own(a) - own(b) || a.line - b.line || a.column - b.column);
}

function lineStartsOf(text: string): number[] {
  const starts = [0];
  for (let at = text.indexOf('\n'); at >= 0; at = text.indexOf('\n', at + 1)) starts.push(at + 1);
  return starts;
}

/** Without characters that would move the cursor, change the direction of writing, or hide something. */
function printable(text: string): string {
  return text.replace(/\t/gu, ' ').replace(/[\p{Cc}\u200e\u200f\u202a-\u202e\u2066-\u2069\ufeff]/gu, '·');
}

/** A text cut to a length, with an ellipsis where something is missing. */
export function clip(text: string, length = 60): string {
  return text.length <= length ? text : `${text.slice(0, length - 1)}…`;
}

/** One issue in print: file:line:column, the line with a caret, expected, found, what to do. No line break at the end. */
export function formatIssue(issue: Issue): string {
  const where = `${issue.file}:${issue.line}:${issue.column}`;
  const head = `${where}: ${issue.severity}${issue.path === '' ? '' : ` in ${issue.path}`}`;
  const margin = ' '.repeat(String(issue.line).length);
  const shown = issue.source === '' ? [] : [`  ${issue.line} | ${issue.source}`, `  ${margin} | ${' '.repeat(issue.caret)}^`];
  const words = [`  expected    ${issue.expected}`, `  found       ${issue.found}`, ...(issue.hint === '' ? [] : [`  what to do  ${issue.hint}`])];
  return [head, ...shown, ...words].join('\n');
}

/** Several issues in print, an empty line between them, and 'and N more' beyond forty. */
export function formatIssues(issues: readonly Issue[]): string {
  const printed = issues.slice(0, MOST_PRINTED).map(formatIssue);
  const left = issues.length - printed.length;
  const more = issues.length >= MOST_KEPT ? `and at least ${left} more` : `and ${left} more`;
  return [...printed, ...(left > 0 ? [more] : [])].join('\n\n');
}

/** The words of a warning in one or two sentences: what was found, what is usual, what to do. Without its place. */
export function warningWords({ expected, found, hint }: Pick<Issue, 'expected' | 'found' | 'hint'>): string {
  return `${found}; expected ${expected}. ${hint}`.trim();
}

/** Where a warning stands: `line 12, vary.gearing.ratio`, with the file where it is not the study's own. */
export function warningPlace({ file, line, path }: Pick<Issue, 'file' | 'line' | 'path'>, studyFile: string): string {
  return `${file === studyFile ? '' : `${file}, `}line ${line}${path === '' ? '' : `, ${path}`}`;
}

/** An issue for programs. */
export function issueRecord({ rule, file, line, column, path, expected, found, hint }: Issue): Record<string, string | number> {
  return { ...(rule === '' ? {} : { rule }), file, line, column, path, expected, found, whatToDo: hint };
}
