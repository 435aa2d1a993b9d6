/** The question of the study as one sentence. */
import { columnPhrase, neededDecimals, valueText } from '../charts/figure-words.ts';
import type { ReportData } from '../charts/report-data.ts';
import { shortText } from '../charts/visible-text.ts';
import type { ResultColumn } from '../core/evaluate/result-columns.ts';
import type { Axis } from '../core/study/study.ts';
import { formatFigure, formatQuantity } from '../core/units/format-quantity.ts';
import { html, type Markup, type Piece } from './markup.ts';
import { countWords, listWords, objectiveWords, requirementClause } from './wording.ts';

/** Section 1: how many designs, what they must do, and what the best trade is sought between. */
export function questionSection(data: ReportData): Markup {
  return html`<section aria-labelledby="question">
<h2 id="question">The question</h2>
<div class="body"><p class="question">${questionSentence(data)}</p></div>
</section>`;
}

function questionSentence(data: ReportData): Markup {
  const { study, counts } = data;
  const varied = study.axes.map((axis, index) => axisWords(axis, data.columns[index] as ResultColumn, data));
  const designs = html`Of <b>${countWords(formatFigure(counts.designs, 0), 'design')}</b>${varied.length === 0 ? '' : ` with ${listWords(varied)}`}`;
  const objectives = study.objectives.map((objective) => html`<b>${objectiveWords(objective, data)}</b>`);
  const trade = objectives.length === 1 ? html`which has the ${objectives[0] as Markup}` : html`what is the best trade between ${listed(objectives, 'and')}`;
  const clauses = requirementClauses(data);
  if (objectives.length === 0) return html`${designs}: which ${listed(clauses, 'and')}?`;
  return clauses.length === 0 ? html`${designs}, ${trade}?` : html`${designs}, which ones ${listed(clauses, 'and')} – and of these, ${trade}?`;
}

/** Requirements as written first; those that hold of themselves, that a cycle is followed, in one clause at the end. */
function requirementClauses(data: ReportData): Markup[] {
  const written = data.requirements.filter(({ implied }) => !implied).map((requirement) => requirementClause(requirement, data));
  const followed = data.requirements.filter(({ implied }) => implied).map(({ metric }) => shortText(metric.slice(0, metric.lastIndexOf('.')), 40));
  return [
    ...written.map(({ before, limit, after }) => html`${before}<b class="limit">${limit}</b>${after}`),
    ...(followed.length === 0 ? [] : [html`follow the trace of ${listWords(followed)} throughout`]),
  ];
}

function listed(pieces: readonly Markup[], last: string): Piece {
  return pieces.map((piece, index) => (index === 0 ? piece : html`${index === pieces.length - 1 ? ` ${last} ` : ', '}${piece}`));
}

/** `ratio from 7.5 to 12.25`, `3 of motor on offer`. */
function axisWords(axis: Axis, column: ResultColumn, data: ReportData): string {
  const phrase = columnPhrase(column, data.study);
  if (axis.labels !== null) return `${axis.labels.length} of ${phrase}`;
  const values = axis.range === null ? axis.points.map((point) => point[0] as number) : [axis.range.from, axis.range.to];
  const low = Math.min(...values);
  const high = Math.max(...values);
  if (low === high) return `${phrase} ${valueText(low, column, data.study)}`;
  const decimals = Math.max(neededDecimals(low, column, data.study), neededDecimals(high, column, data.study));
  const shown = (value: number) => formatQuantity(value, column.quantity, { decimals, system: data.study.report.units });
  return `${phrase} from ${shown(low)} to ${shown(high)}`;
}
