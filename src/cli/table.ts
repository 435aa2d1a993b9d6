/** Aligned columns without rules, for people; wide characters and colour codes are counted as they show. */
import Table from 'cli-table3';

/** How a column is laid out. */
export interface TableLayout {
  /** Per column; left where absent. */
  readonly align?: readonly ('left' | 'right')[];
  /** Spaces in front of every line. */
  readonly indent?: number;
  /** Width of the whole line; the last column is wrapped at words to fit. Absent: as wide as it comes. */
  readonly width?: number;
}

const bare = [
  'top',
  'top-mid',
  'top-left',
  'top-right',
  'bottom',
  'bottom-mid',
  'bottom-left',
  'bottom-right',
  'left',
  'left-mid',
  'mid',
  'mid-mid',
  'right',
  'right-mid',
];
const noRules = Object.fromEntries(bare.map((place) => [place, '']));

/** The rows as lines, columns two spaces apart, no trailing blanks. Every row has the same number of cells. */
export function columns(rows: readonly (readonly string[])[], layout: TableLayout = {}): string {
  if (rows.length === 0) return '';
  const { align = [], indent = 0, width } = layout;
  const table = new Table({
    chars: { ...noRules, middle: '  ' },
    style: { head: [], border: [], 'padding-left': 0, 'padding-right': 0 },
    colAligns: [...align],
    ...(width === undefined ? {} : { wordWrap: true, colWidths: lastColumnToFit(rows, width - indent) }),
  });
  table.push(...rows.map((row) => [...row]));
  const lines = table.toString().split('\n');
  return lines.map((line) => `${' '.repeat(indent)}${line}`.trimEnd()).join('\n');
}

/** Widths that leave all columns but the last as they come. */
function lastColumnToFit(rows: readonly (readonly string[])[], width: number): (number | null)[] {
  const last = (rows[0] as readonly string[]).length - 1;
  const before = Array.from({ length: last }, (_, at) => Math.max(...rows.map((row) => (row[at] as string).length)));
  const used = before.reduce((sum, each) => sum + each + 2, 0);
  return [...before.map(() => null), Math.max(20, width - used)];
}
