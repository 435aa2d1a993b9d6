/** A syntax error of YAML -> where to look, what stands there and what to do, in the words of people who write studies instead of those of the grammar. */
import type { YAMLParseError } from 'yaml';

/** What a person needs to know of a syntax error. */
export interface SyntaxWords {
  /** Offset of the place to mend. */
  readonly at: number;
  readonly found: string;
  readonly hint: string;
}

interface Place {
  readonly text: string;
  readonly at: number;
  /** The line of `at`. */
  readonly line: string;
}

/** The first pattern that the library's message matches decides; the codes alone do not tell these apart. */
const table: readonly (readonly [RegExp, (place: Place) => SyntaxWords])[] = [
  [/^Tabs are not/u, ({ at }) => ({ at, found: 'a tab as indentation', hint: 'Indent with spaces; tabs are not allowed in YAML.' })],
  [/end with a [\]}]$|^Missing closing/u, unclosed],
  [/block sequence may not/u, strayDash],
  [/^Nested mappings/u, nested],
  [/^Implicit|^Missing space after :/u, noColon],
  [
    /^Block collections are not/u,
    ({ at }) => ({ at, found: 'a second colon before the next comma', hint: `${COMMAS}; a text with a colon in it goes in quotes.` }),
  ],
  [/items must start at the same column|Unexpected .* at node end/u, otherColumn],
  [/^Plain value cannot start/u, badStart],
  [/^Block scalar header|^Not a YAML token/u, textSign],
  [
    /^Unexpected flow-(?:map|seq)-end/u,
    ({ text, at }) => ({ at, found: `a ${text[at] ?? 'bracket'} that closes nothing`, hint: 'Remove it, or open the bracket before.' }),
  ],
  [/^Missing ,/u, ({ at }) => ({ at, found: 'no comma between two entries', hint: `${COMMAS}.` })],
  [/^Unexpected ,/u, ({ at }) => ({ at, found: 'a comma with nothing before it', hint: 'Remove one comma.' })],
  [
    /^Comments must/u,
    ({ at }) => ({ at, found: 'a # without a space before it', hint: 'Put a space before the comment; a text with # in it goes in quotes.' }),
  ],
];

const COMMAS = 'Inside { } and [ ] a comma stands between entries';
const COLUMNS = 'Start the entries of one section in the same column, and close every bracket.';

/** The words of the first syntax error of a text. */
export function syntaxWords(problem: YAMLParseError, text: string): SyntaxWords {
  const at = problem.pos[0];
  const message = problem.message.split('\n')[0] as string;
  const row = table.find(([pattern]) => pattern.test(message));
  if (row !== undefined) return row[1]({ text, at, line: lineAt(text, at) });
  const stray = problem.code === 'UNEXPECTED_TOKEN';
  return { at, found: message, hint: stray ? 'Remove the stray sign, or put the text in quotes.' : 'Check the line, and the one above it.' };
}

/** Tells of the bracket or quote itself: the library notices only where the text cannot go on, often lines below. */
function unclosed({ text, at }: Place): SyntaxWords {
  const open = lastOpen(text.slice(0, at));
  const sign = text[open] ?? '';
  if (sign === '"' || sign === "'") return { at: open, found: `a ${sign} without its second one`, hint: 'Close the quotes, or leave them out.' };
  const close = sign === '[' ? ']' : '}';
  return open < 0
    ? { at, found: 'a bracket or quote that stays open', hint: 'Close it.' }
    : { at: open, found: `a ${sign} without its ${close}`, hint: `Close it with ${close}.` };
}

/** Offset of the innermost bracket or quote that is still open at the end of a text; −1 where none is. */
function lastOpen(text: string): number {
  const open: number[] = [];
  // A sign opens something only where a value or name may begin; within quotes and comments nothing does.
  const sign = /"[^"\\]*(?:\\.[^"\\]*)*(?:"|$)|'[^']*(?:'|$)|#[^\n]*|[[{]|[\]}]|[^\s"'#[\]{},:-][^\n,[\]{}#:]*|./gsu;
  for (const { 0: found, index } of text.matchAll(sign)) {
    const first = found[0] as string;
    if ((first === '"' || first === "'") && (found.length === 1 || !found.endsWith(first))) return index;
    if (first === '[' || first === '{') open.push(index);
    else if (first === ']' || first === '}') open.pop();
  }
  return open.at(-1) ?? -1;
}

function strayDash({ text, at }: Place): SyntaxWords {
  return { at: firstSign(text, at), found: 'a dash, which starts a list, among entries with names', hint: 'Remove the dash: write "name: value".' };
}

/** A colon too many on one line, or a line that is indented below one that holds a value already. */
function nested({ text, at, line }: Place): SyntaxWords {
  const name = /^\s*([^\s:{]+)\s*\{/u.exec(line)?.[1];
  if (name !== undefined) return { at, found: 'a brace right after a name', hint: `A colon is missing: write "${name}: { … }".` };
  const colons = line.replace(/\s#.*$/u, '').match(/:(?=\s)/gu)?.length ?? 0;
  if (colons > 1)
    return { at, found: 'a second colon on the line', hint: 'Put one "name: value" on each line; a text with a colon and a space in it goes in quotes.' };
  const below = text.indexOf('\n', at);
  const next = below < 0 ? at : firstSign(text, below);
  return { at: next, found: 'a line indented below one that holds a value already', hint: COLUMNS };
}

function otherColumn({ text, at }: Place): SyntaxWords {
  const first = firstSign(text, at);
  const before = text.slice(text.lastIndexOf('\n', first - 1) + 1, first);
  if (before.trim() !== '') return { at: first, found: 'more text after a value that is closed', hint: 'Put the whole text in quotes, or none of it.' };
  return { at: first, found: 'a line that starts in another column than the entries above it', hint: COLUMNS };
}

function noColon({ at, line }: Place): SyntaxWords {
  if (/^\s*[\w.]+:\S/u.test(line)) return { at, found: 'no space after the colon', hint: 'Write a space after the colon: "name: value".' };
  return { at, found: 'a name without a colon', hint: 'A colon is missing on this line, or the line before belongs elsewhere: write "name: value".' };
}

function badStart({ text, at }: Place): SyntaxWords {
  return {
    at,
    found: `a value that starts with ${text[at] ?? 'nothing'}`,
    hint: 'No value starts with this sign: write the number first, such as 97 %, or put a text in quotes.',
  };
}

/** `>` and `|` announce a text of several lines in YAML; in a study somebody meant a limit. */
function textSign({ text, at }: Place): SyntaxWords {
  const start = text.lastIndexOf('\n', at - 1) + 1;
  const sign = text.slice(start, at + 1).search(/[>|]/u);
  if (sign < 0) return { at, found: `a stray ${text[at] ?? 'end'}`, hint: 'Remove the stray sign, or put the text in quotes.' };
  const hint = 'Write limits as { atLeast: … } or { atMost: … }; a text that starts so goes in quotes.';
  return { at: start + sign, found: `a value that starts with ${text[start + sign]}`, hint };
}

function lineAt(text: string, at: number): string {
  const end = text.indexOf('\n', at);
  return text.slice(text.lastIndexOf('\n', at - 1) + 1, end < 0 ? text.length : end);
}

/** Offset of the first sign at or after `at` that is neither white space nor a comment. */
function firstSign(text: string, at: number): number {
  const rest = /^(?:\s+|#[^\n]*)*/u.exec(text.slice(at))?.[0] ?? '';
  return at + rest.length < text.length ? at + rest.length : at;
}
