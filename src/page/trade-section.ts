/** The frame of the trade-off chart: its controls, the place of the drawing, what a design pointed at is, and one design in full. */
import { capitalised, columnPhrase } from '../charts/figure-words.ts';
import type { ReportData } from '../charts/report-data.ts';
import { formatFigure } from '../core/units/format-quantity.ts';
import { html, type Markup } from './markup.ts';
import { metricColumn } from './wording.ts';

/** The columns that the chart shows at first: the first two objectives, or the first input where there is only one. */
export function firstAxes(data: ReportData): { x: number; y: number } {
  const [first, second] = data.study.objectives.map(({ metric }) => metricColumn(data, metric).index);
  if (first !== undefined && second !== undefined) return { x: first, y: second };
  return { x: 0, y: first ?? Math.min(1, data.columns.length - 1) };
}

/** Section 3. Script fills it; without script it says where the same charts lie. */
export function tradeSection(data: ReportData): Markup {
  const { x, y } = firstAxes(data);
  return html`<section aria-labelledby="trade">
<h2 id="trade">The trade</h2>
<div class="body">
<noscript><p class="note">The chart and the figures of single designs need scripts to be allowed. The same charts lie beside this file in the folder charts.</p></noscript>
<div id="chart-controls" class="controls" hidden>
<label>Across <select id="axis-x">${axisOptions(data, x)}</select></label>
<label>Upwards <select id="axis-y">${axisOptions(data, y)}</select></label>
<label class="tick"><input type="checkbox" id="wide-view"> wider, with removed designs</label>
</div>
<div class="chart-and-reading">
<div id="chart" class="chart"></div>
<div id="reading" class="reading"></div>
</div>
<form id="choose-design" class="controls" hidden>
<label>Any design by its number <input type="number" id="design-number" min="0" max="${data.counts.designs}" step="1" required></label>
<button type="submit">Compute it</button>
<span class="hint">0 is the reference, ${formatFigure(data.counts.designs, 0)} the last; this page computes it anew, as the run did.</span>
</form>
<p id="status" role="status" class="hint"></p>
<div id="design" class="design"></div>
</div>
</section>`;
}

function axisOptions(data: ReportData, chosen: number): Markup[] {
  return data.columns.map((column, index) => {
    const words = capitalised(columnPhrase(column, data.study));
    return index === chosen ? html`<option value="${index}" selected>${words}</option>` : html`<option value="${index}">${words}</option>`;
  });
}
