/** front.csv: the reference design, then the exact front, one row a design. */
import { csvFormatRows } from 'd3-dsv';
import type { ReportData } from '../charts/report-data.ts';
import { machineValue } from '../core/evaluate/result-columns.ts';
import type { DesignEvaluator } from '../core/search/evaluate-designs.ts';

/** CSV (RFC 4180) with a head: number, mark, and the result columns in machine units; an empty cell is a value that does not exist. */
export function frontCsv(front: Float64Array, designs: DesignEvaluator, { proposals }: Pick<ReportData, 'proposals'>): string {
  const marks = new Map(proposals.map(({ number, rules }) => [number, rules.map((rule) => (rule === 'balanced' ? rule : `best in ${rule}`)).join('; ')]));
  const row = new Float64Array(designs.columns.length);
  const cells = (number: number, mark: string): string[] => {
    designs.evaluate(number, row, 0, 1);
    return [String(number), textCell(mark), ...designs.columns.map((column, k) => valueCell(machineValue(column, row[k])))];
  };
  const head = ['number', 'mark', ...designs.columns.map(({ key }) => textCell(key))];
  return `${csvFormatRows([head, cells(0, 'reference'), ...Array.from(front, (number) => cells(number, marks.get(number) ?? ''))])}\n`;
}

function valueCell(value: number | string | null): string {
  if (value === null) return '';
  return typeof value === 'number' ? String(value) : textCell(value);
}

/** A text that a spreadsheet would take for a formula is led by an apostrophe. */
function textCell(text: string): string {
  return /^[=+\-@\t\r]/u.test(text) ? `'${text}` : text;
}
