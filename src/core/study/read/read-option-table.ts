/** CSV -> options: a row each, columns by the dotted names of the study with their units, `name,motor.peakTorque_Nm,motor.map`. */
import { toSi, type Unit } from '../../units/units.ts';
import { type ParameterRow, parameters, trialParameters } from '../catalogue/parameters.ts';
import { trialKindRow } from '../catalogue/trial-kinds.ts';
import { type CsvLine, type CsvTable, cellAt, cellText, headsOf, readCell, readCsv } from '../text/csv-table.ts';
import { clip, type Issue, IssueList } from '../text/issue.ts';
import { boundsMissed } from './bounds.ts';
import { type Found, nothingFound } from './read-places.ts';
import type { TrialFound } from './read-trials.ts';

const LONGEST_NAME = 80;
/** Columns of text: files, and the tyre size. */
const textColumns: readonly { readonly head: string; readonly name: string }[] = [
  { head: 'motor.fullLoad', name: 'motor.fullLoad.file' },
  { head: 'motor.map', name: 'motor.map.file' },
  { head: 'vehicle.tyre', name: 'vehicle.tyre' },
];

/** What a column sets. */
type OptionColumn = { readonly head: string; readonly name: string } & ({ readonly row: ParameterRow; readonly unit: Unit } | { readonly row: null });

/** The options of a table. An empty cell leaves its number to the study. In what is found everything stands at `at`, the list's place in the study. */
export function readOptionTable(
  csvText: string,
  fileName: string,
  { at, trials }: { readonly at: number; readonly trials: readonly TrialFound[] },
): { ok: true; options: { name: string; at: number; found: Found }[] } | { ok: false; problems: Issue[] } {
  const issues = new IssueList(fileName, csvText);
  const table = readCsv(csvText, 'name,motor.peakTorque_Nm,motor.baseSpeed_rpm', issues);
  const columns = table && readHead(table, trials, issues);
  if (table === null || columns === null || issues.failed) return { ok: false, problems: issues.list('error') };
  const rows = table.rows.map((line) => ({ line, name: cellText(line, columns.nameIndex) ?? '' }));
  checkOptionNames(
    rows.map(({ line, name }) => ({ name, at: cellAt(line, columns.nameIndex) })),
    'name',
    issues,
  );
  if (rows.length === 0) issues.error(table.head.at, '', { expected: 'a row for each option', found: 'a head alone', hint: 'Write the options below it.' });
  const options = rows.map(({ line, name }) => ({ name, at, found: readRow(line, columns.columns, table, at, issues) }));
  return issues.failed ? { ok: false, problems: issues.list('error') } : { ok: true, options };
}

/** Names of one list: 1 to 80 printable characters, each once. */
export function checkOptionNames(options: readonly { readonly name: string; readonly at: number }[], path: string, issues: IssueList): void {
  const seen = new Map<string, number>();
  for (const { name, at } of options) {
    const first = seen.get(name);
    if (name === '' || name.length > LONGEST_NAME || /\p{Cc}/u.test(name)) {
      const expected = `an option name of 1 to ${LONGEST_NAME} printable characters`;
      issues.error(at, path, { expected, found: name === '' ? 'nothing' : clip(name, 100), hint: 'Results call the option by its name.' });
    } else if (first !== undefined) {
      const found = `${clip(name)} again, after line ${issues.lineOf(first)}`;
      issues.error(at, path, { expected: 'each option name once', found, hint: 'Results tell options apart by their names: rename or remove one.' });
    }
    seen.set(name, at);
  }
}

function readHead(
  table: CsvTable,
  trials: readonly TrialFound[],
  issues: IssueList,
): { nameIndex: number; columns: (OptionColumn & { index: number })[] } | null {
  const heads = table.head.cells.map((_, index) => cellText(table.head, index) ?? '');
  const known = knownColumns(trials);
  const nameIndex = heads.indexOf('name');
  if (nameIndex < 0) {
    const hint = /[;\t]/u.test(table.head.cells.join(',')) ? 'Separate columns by commas.' : 'Add a column "name": results call the options so.';
    issues.error(table.head.at, '', { expected: 'a column name', found: `the head ${clip(heads.join(','))}`, hint });
    return null;
  }
  const columns = heads.flatMap((head, index) => {
    if (index === nameIndex) return [];
    const column = known.get(head);
    if (column === undefined) unknownHead(table, index, head, known, issues);
    return column === undefined ? [] : [{ ...column, index }];
  });
  for (const [place, column] of columns.entries()) {
    const first = columns.findIndex(({ name }) => name === column.name);
    if (first === place) continue;
    const found = `${column.head} after ${columns[first]?.head}`;
    issues.error(cellAt(table.head, column.index), column.head, { expected: 'each number in one column', found, hint: 'Keep one of the two.' });
  }
  return { nameIndex, columns };
}

/** Every head a table may have. */
function knownColumns(trials: readonly TrialFound[]): Map<string, OptionColumn> {
  const ofTrials = trials.flatMap(({ name, kind }) =>
    trialKindRow(kind).takes.map((key) => ({ name: `trials.${name}.${key}`, row: trialParameters[key] as ParameterRow })),
  );
  const numbers = [...parameters.map((row) => ({ name: row.name, row })), ...ofTrials];
  return new Map([
    ...numbers.flatMap(({ name, row }) =>
      headsOf({ base: name, quantity: row.quantity }).map(({ head, unit }): [string, OptionColumn] => [head, { head, name, row, unit }]),
    ),
    ...textColumns.map((column): [string, OptionColumn] => [column.head, { ...column, row: null }]),
  ]);
}

function unknownHead(table: CsvTable, index: number, head: string, known: ReadonlyMap<string, OptionColumn>, issues: IssueList): void {
  const expected = 'a number of the study by its dotted name with its unit, such as motor.peakTorque_Nm';
  const without = [...known.values()].find(({ name }) => name === head);
  const near = without?.head ?? issues.nearest(head, [...known.keys(), 'name']);
  const hint = without !== undefined ? `Add the unit: ${without.head}.` : near !== null ? `Did you mean ${near}?` : 'Leave columns out that set nothing.';
  issues.error(cellAt(table.head, index), '', { expected, found: clip(head) || 'an empty head', hint });
}

function readRow(line: CsvLine, columns: readonly (OptionColumn & { index: number })[], table: CsvTable, at: number, issues: IssueList): Found {
  const found = nothingFound();
  const surplus = line.cells.length - table.head.cells.length;
  if (surplus > 0) {
    const hint = 'Texts go without commas, decimals with a point.';
    issues.error(cellAt(line, table.head.cells.length), '', { expected: `${table.head.cells.length} cells, as in the head`, found: `${surplus} more`, hint });
    return found;
  }
  for (const column of columns) {
    const text = cellText(line, column.index) ?? '';
    if (text === '') continue;
    if (column.row === null) readText(column.name, text, at, found);
    else readNumber(line, column, at, found, issues);
  }
  return found;
}

function readText(name: string, text: string, at: number, { texts, stands, tried }: Found): void {
  texts.set(name, { at, text });
  for (const stated of [name, name.replace(/\.file$/u, '')]) {
    stands.set(stated, at);
    tried.add(stated);
  }
}

function readNumber(line: CsvLine, column: OptionColumn & { index: number; row: ParameterRow; unit: Unit }, at: number, found: Found, issues: IssueList): void {
  const { head, index, name, row, unit } = column;
  const written = readCell(line, index, head, issues);
  if (Number.isNaN(written)) return;
  const value = toSi(written, unit);
  const bounds = boundsMissed(row, value, unit);
  if (bounds !== null) {
    const hint = `Check the figure and the unit in the head. ${row.sentence}`;
    issues.error(cellAt(line, index), head, { expected: `${row.label}, ${bounds}`, found: cellText(line, index) ?? '', hint });
    return;
  }
  found.figures.set(name, { at, value, written, unit });
  found.stands.set(name, at);
  found.tried.add(name);
}
