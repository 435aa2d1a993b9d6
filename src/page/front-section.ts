/** The front as a table that its reader can sort. */
import { capitalised, columnPhrase, figureAlone, neededDecimals, optionText, unitWord } from '../charts/figure-words.ts';
import type { ReportData, ReportDesign } from '../charts/report-data.ts';
import { proposalLetter } from '../charts/trade-off-view.ts';
import type { ResultColumn } from '../core/evaluate/result-columns.ts';
import { formatFigure, readingDecimals } from '../core/units/format-quantity.ts';
import { html, type Markup } from './markup.ts';

/** How the table stands: the column sorted by (-1: design number), which way, and whether all rows are shown. */
export interface TableOrder {
  readonly column: number;
  readonly descending: boolean;
  readonly all: boolean;
}

/** Rows shown until all are asked for. */
export const firstRows = 25;

/** Rows on paper; the style sheet hides the others. */
const printedRows = 12;

/** The order in which the table first stands: by the first objective, its better end on top. */
export function firstOrder({ study, columns }: ReportData): TableOrder {
  const [objective] = study.objectives;
  const column = columns.findIndex(({ role, name }) => role === 'metric' && name === objective?.metric);
  return { column, descending: objective?.aim === 'maximise', all: false };
}

/** Section 5. */
export function frontSection(data: ReportData): Markup | null {
  if (data.counts.shownFront === 0) return null;
  const { shownFront, front } = data.counts;
  const which =
    shownFront < front
      ? `${formatFigure(shownFront, 0)} of ${formatFigure(front, 0)} designs, one for each step of the resolution`
      : `${formatFigure(front, 0)} ${front === 1 ? 'design' : 'designs'}`;
  return html`<section aria-labelledby="front" class="wide">
<h2 id="front">The front, design by design</h2>
<div class="body">
<p>${which}. The whole front lies in front.csv.${shownFront > printedRows && html`<span class="in-print"> Printed are the first ${printedRows} of the order on the screen.</span>`}</p>
<div id="front-table">${frontTable(data, firstOrder(data))}</div>
</div>
</section>`;
}

/** The table in an order. Heads are buttons that sort; the script listens to \`data-sort\`, \`data-design\` and \`data-all\`. */
export function frontTable(data: ReportData, order: TableOrder): Markup {
  const rows = sortedFront(data, order);
  const shown = order.all ? rows : rows.slice(0, firstRows);
  const letters = new Map(data.proposals.map(({ number }, index) => [number, proposalLetter(index)]));
  const decimals = data.columns.map((column, index) => columnDecimals(column, rows, index, data));
  const kept = data.columns.map((column, index) => ({ column, index })).filter(({ column, index }) => !alwaysFollowed(column, index, rows, data));
  const head = (index: number, words: string) => {
    const sort = order.column !== index ? 'none' : order.descending ? 'descending' : 'ascending';
    return html`<th scope="col" aria-sort="${sort}" class="${index < 0 ? 'stay' : ''}"><button type="button" class="head" data-sort="${index}">${words}</button></th>`;
  };
  return html`<div class="scroll" tabindex="0" role="region" aria-label="Designs on the front"><table class="front">
<thead><tr>${head(-1, 'Design')}${kept.map(({ column, index }) => head(index, headWords(column, data)))}</tr></thead>
<tbody>${shown.map((design) => {
    const letter = letters.get(design.number);
    return html`<tr><th scope="row" class="stay"><button type="button" class="plain" data-design="${design.number}">${formatFigure(design.number, 0)}</button>${letter !== undefined && html` <b class="letter">${letter}</b>`}</th>${kept.map(({ column, index }) => html`<td>${cellText(design.values[index] ?? null, column, decimals[index] as number, data)}</td>`)}</tr>`;
  })}</tbody>
</table></div>
${rows.length > shown.length && html`<p><button type="button" data-all="yes">Show all ${formatFigure(rows.length, 0)} designs</button></p>`}`;
}

/** Designs of the front in the order of a column; figures that do not exist come last, equals by design number. */
export function sortedFront(data: ReportData, { column, descending }: TableOrder): ReportDesign[] {
  const turn = descending ? -1 : 1;
  const value = (design: ReportDesign) => (column < 0 ? design.number : (design.values[column] ?? null));
  return data.designs
    .filter(({ standing }) => standing === 'front')
    .sort((a, b) => {
      const [first, second] = [value(a), value(b)];
      if (first === null || second === null) return Number(first === null) - Number(second === null) || a.number - b.number;
      return turn * (first - second) || a.number - b.number;
    });
}

/** Every design on a front follows every cycle unless the study allows otherwise: such a column tells nothing. */
function alwaysFollowed(column: ResultColumn, index: number, rows: readonly ReportDesign[], { requirements }: ReportData): boolean {
  const implied = column.role === 'metric' && requirements.some(({ metric, implied }) => implied && metric === column.name);
  return implied && rows.every(({ values }) => values[index] === 0);
}

function headWords(column: ResultColumn, { study }: ReportData): string {
  const unit = column.labels === null ? unitWord(column.quantity, study) : '';
  const words = capitalised(columnPhrase(column, study));
  return unit === '' ? words : `${words}, ${unit}`;
}

/** As many decimals in every row of a column, so that points stand below one another. */
function columnDecimals(column: ResultColumn, rows: readonly ReportDesign[], index: number, { study }: ReportData): number {
  if (column.role === 'metric') return readingDecimals(column.decimals, column.quantity, study.report.units);
  return Math.max(0, ...rows.map(({ values }) => neededDecimals(values[index] ?? Number.NaN, column, study)));
}

function cellText(value: number | null, column: ResultColumn, decimals: number, { study }: ReportData): string {
  if (value === null) return '—';
  if (column.labels !== null) return optionText(value, column.labels, 40);
  return figureAlone(value, column, decimals, study);
}
