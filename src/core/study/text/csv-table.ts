/** Numeric CSV files with units in their head: notes, columns in SI, and an issue with line and column for every cell that is none. */
import { nearestName } from '../../units/nearest-name.ts';
import { type Quantity, quantityRow, toSi, type Unit } from '../../units/units.ts';
import { clip, type IssueList } from './issue.ts';

/** One column that a file may or must have: a base name and the quantity whose unit suffixes follow it (`speed` → `speed_kmh`, `speed_mph`). */
export interface CsvColumn {
  readonly base: string;
  readonly quantity: Quantity;
}

/** A column as found. */
export interface CsvColumnFound extends CsvColumn {
  readonly head: string;
  readonly unit: Unit;
  readonly index: number;
}

/** A line of cells with its offset in the text. */
export interface CsvLine {
  readonly at: number;
  readonly cells: readonly string[];
}

/** A CSV file taken apart. */
export interface CsvTable {
  /** Texts of the `# …` lines in front of the head. */
  readonly notes: readonly string[];
  readonly head: CsvLine;
  readonly rows: readonly CsvLine[];
}

const LARGEST_CSV = 20_000_000;
const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/u;

/** Takes a file apart; null with an issue where it has no head and rows. `expected` describes the head. */
export function readCsv(text: string, expected: string, issues: IssueList): CsvTable | null {
  if (text.length > LARGEST_CSV) {
    const found = `${Math.round(text.length / 1e6)} MB`;
    issues.error(0, '', { expected: `a CSV file of at most ${LARGEST_CSV / 1e6} MB`, found, hint: 'Thin the data out.' });
    return null;
  }
  const odd = /(?![\t\n\r])[\p{Cc}\ufffd]/u.exec(text);
  if (odd !== null) {
    issues.error(odd.index, '', { expected: 'a CSV file in UTF-8', found: 'bytes that are no text', hint: 'Check that this is the right file, saved as CSV.' });
    return null;
  }
  const { notes, lines } = linesOf(text);
  const [head, ...rows] = lines;
  if (head === undefined) {
    issues.error(0, '', { expected: `a head such as ${expected}`, found: 'no lines', hint: 'Write the head in the first line and numbers below.' });
    return null;
  }
  return { notes, head, rows };
}

function linesOf(text: string): { notes: string[]; lines: CsvLine[] } {
  const notes: string[] = [];
  const lines: CsvLine[] = [];
  let at = text.startsWith('\ufeff') ? 1 : 0;
  while (at < text.length) {
    const next = text.indexOf('\n', at);
    const end = next < 0 ? text.length : next;
    const line = text.slice(at, end).trimEnd();
    if (line.startsWith('#')) {
      if (lines.length === 0) notes.push(line.replace(/^#+\s*/u, ''));
    } else if (line.trim() !== '') {
      lines.push({ at, cells: line.split(',') });
    }
    at = end + 1;
  }
  return { notes, lines };
}

/** Offset of a cell, for its issue; of the end of the line where the line is too short. */
export function cellAt(line: CsvLine, index: number): number {
  const before = line.cells.slice(0, index).reduce((sum, cell) => sum + cell.length + 1, 0);
  const cell = line.cells[index];
  return cell === undefined ? line.at + Math.max(0, before - 1) : line.at + before + (cell.length - cell.trimStart().length);
}

/** A cell without quotes and white space; undefined where the line is too short. */
export function cellText(line: CsvLine, index: number): string | undefined {
  return line.cells[index]
    ?.trim()
    .replace(/^"(.*)"$/u, '$1')
    .trim();
}

/** Every head a column may have, with its unit. A pure number has its base alone. */
export function headsOf({ base, quantity }: CsvColumn): { head: string; unit: Unit }[] {
  return quantityRow(quantity).units.map((unit) => ({ head: unit.suffix === '' ? base : `${base}_${unit.suffix}`, unit }));
}

/** The column of the head that is one of `wanted`; null with an issue where there is none or more than one. */
export function findColumn(table: CsvTable, wanted: readonly CsvColumn[], issues: IssueList): CsvColumnFound | null {
  const heads = table.head.cells.map((_, index) => cellText(table.head, index) ?? '');
  const choices = wanted.flatMap((column) => headsOf(column).map((choice) => ({ ...column, ...choice })));
  const found = choices.flatMap((choice) => heads.flatMap((head, index) => (head === choice.head ? [{ ...choice, index }] : [])));
  if (found.length === 1) return found[0] as CsvColumnFound;
  const names = choices.map(({ head }) => head);
  if (found.length > 1) {
    const second = Math.max(...found.map(({ index }) => index));
    issues.error(cellAt(table.head, second), '', {
      expected: `one column: ${names.join(', ')}`,
      found: found.map(({ head }) => head).join(' and '),
      hint: 'Keep one of them.',
    });
    return null;
  }
  issues.error(table.head.at, '', {
    expected: `a column ${names.join(' or ')}`,
    found: `the head ${clip(heads.join(','))}`,
    hint: headHint(table, heads, names),
  });
  return null;
}

function headHint(table: CsvTable, heads: readonly string[], names: readonly string[]): string {
  const line = table.head.cells.join(',');
  if (/[;\t]/u.test(line)) return 'Separate columns by commas, and write decimals with a point.';
  if (heads.every((head) => NUMBER.test(head))) return 'Write a head above the numbers: the names of the columns with their units.';
  const near = names.map((name) => nearestName(name, heads)).find((name) => name !== null);
  return near === undefined || near === null
    ? 'Name the columns with their units in the first line.'
    : `Is ${clip(near)} meant? Spell it ${nearestName(near, names) ?? names[0]}.`;
}

/** The numbers of a column as written; NaN with an issue for every cell that is none. */
export function readColumn(table: CsvTable, { index, head }: { readonly index: number; readonly head: string }, issues: IssueList): number[] {
  return table.rows.map((row) => readCell(row, index, head, issues));
}

/** One number of a line; NaN with an issue where there is none. */
export function readCell(line: CsvLine, index: number, head: string, issues: IssueList): number {
  const text = cellText(line, index);
  if (text !== undefined && NUMBER.test(text)) {
    const value = Number(text);
    if (Number.isFinite(value)) return value;
  }
  const found = text === undefined || text === '' ? 'an empty cell' : clip(text);
  const hint = text?.includes(';')
    ? 'Separate columns by commas, and write decimals with a point.'
    : 'Fill the gap with the measured figure, or leave the line out.';
  issues.error(cellAt(line, index), head, { expected: `a number for ${head}`, found, hint });
  return Number.NaN;
}

/** Written numbers in SI. */
export function columnToSi(written: readonly number[], unit: Unit): number[] {
  return written.map((value) => toSi(value, unit));
}
