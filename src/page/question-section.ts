/** The question of the study as one sentence. */
import { columnPhrase, figureAlone, neededDecimals, valueText, withUnit } from '../charts/figure-words.ts';
import type { ReportData } from '../charts/report-data.ts';
import { shortText } from '../charts/visible-text.ts';
import { axisOf, type ResultColumn } from '../core/evaluate/result-columns.ts';
import type { Axis } from '../core/study/study.ts';
import { formatFigure } from '../core/units/format-quantity.ts';
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
  const varied = study.axes.map((axis) => axisWords(axis, data));
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

/** `ratio from 7.5 to 12.25`, `motor on offer (slow-wound or fast-wound)`, `4 pairs of first and second ratio`. */
function axisWords(axis: Axis, data: ReportData): string {
  const columns = data.columns.filter((column) => axisOf(column, data.study) === axis);
  const column = columns[0] as ResultColumn;
  const phrase = columnPhrase(column, data.study);
  if (axis.labels !== null) return `${phrase} (${optionWords(axis.labels)})`;
  if (columns.length > 1) return `${axis.points.length} pairs of ${listWords(columns.map((each) => columnPhrase(each, data.study)))}`;
  const values = axis.range === null ? axis.points.map((point) => point[0] as number) : [axis.range.from, axis.range.to];
  const low = Math.min(...values);
  const high = Math.max(...values);
  if (low === high) return `${phrase} ${valueText(low, column, data.study)}`;
  const decimals = Math.max(neededDecimals(low, column, data.study), neededDecimals(high, column, data.study));
  const shown = (value: number) => withUnit(figureAlone(value, column, decimals, data.study), column, data.study);
  return `${phrase} from ${shown(low)} to ${shown(high)}`;
}

function optionWords(labels: readonly string[]): string {
  const names = labels.map((label) => shortText(label, 30));
  return names.length > 4 ? `${names.length} of them` : names.join(' or ');
}
