/**
 * YAML text -> a plain tree that knows where everything stands. All scalars stay text: what they mean is decided by the tables.
 * Anything a study has no use for (aliases, tags, merge keys, several documents, absurd depth or size) is an issue, found before it can cost time or memory.
 */
import { Composer, isAlias, isMap, isScalar, isSeq, Lexer, type ParsedNode, Parser, type YAMLParseError } from 'yaml';
import { clip, type IssueList } from './issue.ts';
import { syntaxWords } from './syntax-words.ts';

/** A text, a mapping or a list, with its offset in the file. */
export type Located = LocatedText | LocatedMap | LocatedList;

/** A scalar as written, without its quotes; a value that is missing is the empty text. */
export interface LocatedText {
  readonly kind: 'text';
  readonly at: number;
  readonly text: string;
}

/** A mapping; keys are unique texts. */
export interface LocatedMap {
  readonly kind: 'map';
  readonly at: number;
  readonly entries: readonly LocatedEntry[];
}

/** One entry of a mapping, `at` its key. */
export interface LocatedEntry {
  readonly key: string;
  readonly at: number;
  readonly value: Located;
}

/** A list. */
export interface LocatedList {
  readonly kind: 'list';
  readonly at: number;
  readonly items: readonly Located[];
}

const LARGEST_TEXT = 300_000;
const DEEPEST = 40;
/** Far beyond any study by hand; keeps time and memory bounded whatever the text. */
const MOST_LEXEMES = 60_000;
const FORBIDDEN_KEYS = new Set(['__proto__', 'constructor', 'prototype']);

/** The tree of a study's text, or null with the reasons in `issues`. */
export function readLocated(text: string, issues: IssueList): LocatedMap | null {
  if (!guardText(text, issues)) return null;
  const tokens = tokensOf(text, issues);
  if (tokens === null) return null;
  // The failsafe schema leaves every scalar a text; unique keys are checked here because the library compares every pair.
  const composer = new Composer({ schema: 'failsafe', uniqueKeys: false, merge: false, prettyErrors: false, logLevel: 'silent' });
  const documents = [...composer.compose(tokens, true, text.length)];
  // What follows the first syntax error is mostly its echo.
  const problem = documents.flatMap((document) => document.errors).sort((a, b) => a.pos[0] - b.pos[0])[0];
  if (problem !== undefined) addSyntaxIssue(problem, text, issues);
  const second = documents[1]?.contents;
  if (second !== undefined) {
    issues.error(second?.range[0] ?? 0, '', {
      expected: 'one study in one file',
      found: 'a second document after ---',
      hint: 'Put each study in a file of its own.',
    });
  }
  if (issues.failed) return null;
  return rootOf(documents[0]?.contents ?? null, issues);
}

/** Refuses what is no text of a sensible size before anything looks inside. */
function guardText(text: string, issues: IssueList): boolean {
  const expected = 'a study in YAML, as UTF-8 text';
  if (text.length > LARGEST_TEXT) {
    const found = `${Math.round(text.length / 1000)} kB of text`;
    issues.error(0, '', { expected: `a study of at most ${LARGEST_TEXT / 1000} kB`, found, hint: 'Keep data in CSV files and name them in the study.' });
  } else if (text.trim() === '') {
    issues.error(0, '', { expected, found: 'an empty file', hint: 'Start from a commented example: layshaft new FILE.' });
  } else {
    const odd = /(?![\t\n\r])[\p{Cc}\ufffd]/u.exec(text);
    if (odd === null) return true;
    const found = odd[0] === '\ufffd' ? 'bytes that are not UTF-8' : 'a control character: this looks like a binary file';
    issues.error(odd.index, '', { expected, found, hint: 'Save the file as UTF-8 text, or check that this is the right file.' });
  }
  return false;
}

/** The concrete syntax, token by token, so that depth is known before anything recursive runs. */
function tokensOf(text: string, issues: IssueList) {
  const parser = new Parser();
  const tokens = [];
  let lexemes = 0;
  for (const lexeme of new Lexer().lex(text)) {
    for (const token of parser.next(lexeme)) tokens.push(token);
    lexemes += 1;
    if (lexemes > MOST_LEXEMES) {
      issues.error(parser.offset, '', {
        expected: 'a study: some hundred entries',
        found: `more than ${MOST_LEXEMES} signs and words up to here`,
        hint: 'Check that this is the right file; long lists go into CSV files or ranges.',
      });
      return null;
    }
    if (parser.stack.length <= DEEPEST) continue;
    issues.error(parser.offset, '', {
      expected: 'a study: a few levels of sections',
      found: `sections within sections, ${DEEPEST} deep`,
      hint: 'Check the brackets and the indentation.',
    });
    return null;
  }
  for (const token of parser.end()) tokens.push(token);
  return tokens;
}

function addSyntaxIssue(problem: YAMLParseError, text: string, issues: IssueList): void {
  const { at, found, hint } = syntaxWords(problem, text);
  issues.error(at, '', { expected: 'YAML that can be read', found, hint: `${hint} Everything else is checked once this can be read.` });
}

function rootOf(contents: ParsedNode | null, issues: IssueList): LocatedMap | null {
  const tree = contents === null ? null : locate(contents, '', issues);
  if (tree?.kind === 'map') return issues.failed ? null : tree;
  if (!issues.failed) {
    const found = tree === null ? 'only comments' : tree.kind === 'list' ? 'a list' : `the text ${clip(tree.text)}`;
    const hint = tree?.kind === 'text' && /\w:\S/u.test(tree.text) ? 'A colon is followed by a space.' : 'Start from a commented example: layshaft new FILE.';
    issues.error(tree?.at ?? 0, '', { expected: 'the sections of a study: vehicle, motor, gearing, trials and so on', found, hint });
  }
  return null;
}

function locate(node: ParsedNode, path: string, issues: IssueList): Located {
  const at = node.range[0];
  if (isAlias(node)) {
    issues.error(at, path, {
      expected: 'the value itself',
      found: `an alias, *${clip(node.source)}`,
      hint: 'Repeat the value; a study uses no anchors and aliases.',
    });
    return { kind: 'text', at, text: '' };
  }
  if (node.anchor !== undefined) {
    issues.error(at, path, {
      expected: 'a value without an anchor',
      found: `the anchor &${clip(node.anchor)}`,
      hint: 'Remove it; a text that starts with & goes in quotes.',
    });
  }
  if (node.tag !== undefined) {
    issues.error(at, path, {
      expected: 'a value without a tag',
      found: `the tag ${clip(node.tag)}`,
      hint: 'Remove it; a text that starts with ! goes in quotes.',
    });
  }
  if (isMap(node)) return { kind: 'map', at, entries: locateEntries(node.items as { key: ParsedNode; value: ParsedNode | null }[], path, issues) };
  if (isSeq(node)) return { kind: 'list', at, items: (node.items as ParsedNode[]).map((item, index) => locate(item, `${path}[${index + 1}]`, issues)) };
  return { kind: 'text', at, text: isScalar(node) ? String(node.value ?? '') : '' };
}

function locateEntries(pairs: readonly { key: ParsedNode; value: ParsedNode | null }[], path: string, issues: IssueList): LocatedEntry[] {
  const seen = new Map<string, number>();
  return pairs.flatMap(({ key: keyNode, value }) => {
    const at = keyNode.range[0];
    const located = locate(keyNode, path, issues);
    if (located.kind !== 'text') {
      issues.error(at, path, { expected: 'a name before the colon', found: located.kind === 'map' ? 'a mapping' : 'a list', hint: 'Write "name: value".' });
      return [];
    }
    const key = located.text;
    const first = seen.get(key);
    if (!usableKey(key, first, at, path, issues)) return [];
    seen.set(key, at);
    const inside = path === '' ? key : `${path}.${key}`;
    return [{ key, at, value: value === null ? { kind: 'text', at: keyNode.range[1], text: '' } : locate(value, inside, issues) } satisfies LocatedEntry];
  });
}

function usableKey(key: string, first: number | undefined, at: number, path: string, issues: IssueList): boolean {
  if (first !== undefined) {
    issues.error(at, path, { expected: 'each name once', found: `${clip(key)} again, after line ${issues.lineOf(first)}`, hint: 'Keep one of the two.' });
  } else if (key === '<<') {
    issues.error(at, path, { expected: 'a name', found: 'the merge key <<', hint: 'Write the values out; a study uses no merge keys.' });
  } else if (FORBIDDEN_KEYS.has(key)) {
    issues.error(at, path, { expected: 'a name', found: key, hint: 'Choose another name; this one is reserved by the language the program is written in.' });
  } else if (key === '') {
    issues.error(at, path, { expected: 'a name before the colon', found: 'nothing', hint: 'Write "name: value".' });
  } else {
    return true;
  }
  return false;
}
