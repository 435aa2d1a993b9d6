/** The answer: the designs put forward, or first of all that none passes. */
import { columnPhrase, differenceFigure, valueText } from '../charts/figure-words.ts';
import type { ReportData, ReportDesign } from '../charts/report-data.ts';
import { proposalLetter } from '../charts/trade-off-view.ts';
import { axisOf, type ResultColumn } from '../core/evaluate/result-columns.ts';
import { cautionLine } from '../core/study/catalogue/cautions.ts';
import type { Axis, Objective } from '../core/study/study.ts';
import { endReach } from '../core/study/warn/design-corners.ts';
import { formatFigure } from '../core/units/format-quantity.ts';
import { type Candidate, candidatesOf } from './candidates.ts';
import { marginTable } from './margin-table.ts';
import { html, type Markup, type Piece } from './markup.ts';
import { requirementList } from './requirement-section.ts';
import { boundWords, countWords, designOf, differenceWords, listWords, meets, metricColumn, valueAgainst } from './wording.ts';

/** Section 2: how many designs pass, the ones put forward with what each gives up, and their margins; the caution in short below. */
export function answerSection(data: ReportData): Markup {
  const candidates = candidatesOf(data);
  return html`<section aria-labelledby="answer">
<h2 id="answer">The answer</h2>
<div class="body">
${data.counts.feasible === 0 ? nothingPasses(data) : choiceWords(data)}
<div class="cards">${candidates.map((candidate) => card(candidate, candidates, data))}</div>
${marginTable(candidates, data)}
<p class="caution">${cautionLine}</p>
</div>
</section>`;
}

function choiceWords(data: ReportData): Markup {
  const { designs, feasible, front, shownFront } = data.counts;
  const share = formatFigure((100 * feasible) / designs, feasible * 10 < designs ? 1 : 0);
  const thinned = shownFront < front ? `; ${formatFigure(shownFront, 0)} of them differ by more than the resolution asked for and are shown` : '';
  const letters = listWords(data.proposals.map((_, index) => proposalLetter(index)));
  return html`<p class="headline"><b>${formatFigure(feasible, 0)} of ${countWords(formatFigure(designs, 0), 'design')}</b> (${share} %) ${feasible === 1 ? 'meets' : 'meet'} every requirement.
<b>${formatFigure(front, 0)}</b> ${front === 1 ? 'is' : 'are'} on the trade-off front: what betters one of these in one objective is worse in another${thinned}.
${data.proposals.length === 1 ? html`The choice is <b>A</b>.` : html`The choice put forward is between <b class="together">${letters}</b>.`}</p>`;
}

function nothingPasses(data: ReportData): Markup {
  return html`<p class="headline"><b>No design meets every requirement.</b> There is no front to choose from among ${countWords(formatFigure(data.counts.designs, 0), 'design')}. ${closestWords(data)}</p>
${requirementList(data)}`;
}

function closestWords(data: ReportData): string {
  if (data.closest === null) return '';
  const design = designOf(data, data.closest.number);
  const missed = data.requirements
    .filter(({ metric }) => data.closest?.missed.includes(metric))
    .flatMap((requirement) => {
      const { column, index } = metricColumn(data, requirement.metric);
      const value = design?.values[index] ?? null;
      if (meets(value, requirement)) return [];
      return [
        `${columnPhrase(column, data.study)} (${valueAgainst(value, requirement, column, data.study)} where ${boundWords(requirement, column, data.study)} is asked)`,
      ];
    });
  const absent = data.study.objectives.flatMap(({ metric }) => {
    const { column, index } = metricColumn(data, metric);
    return (design?.values[index] ?? null) === null ? [`has no ${columnPhrase(column, data.study)}`] : [];
  });
  const reasons = [...(missed.length === 0 ? [] : [`misses ${listWords(missed)}`]), ...absent];
  return `Design ${formatFigure(data.closest.number, 0)} comes closest${reasons.length === 0 ? '' : `; it ${listWords(reasons)}`}.`;
}

function card(candidate: Candidate, all: readonly Candidate[], data: ReportData): Markup {
  const { letter, design, rules } = candidate;
  const title =
    letter === null ? html`<span class="rule">${rules.join(', ')}</span>` : html`<b class="letter">${letter}</b> <span class="rule">${rules.join(', ')}</span>`;
  return html`<article class="card${letter === null ? ' aside' : ''}">
<h3>${title}</h3>
<dl class="inputs">${inputRows(design, data)}</dl>
<dl class="objectives">${data.study.objectives.map((objective) => objectiveRow(objective, candidate, all, data))}</dl>
<p>${standingWords(candidate, all, data)}</p>
<p class="more"><button type="button" class="plain" data-design="${design.number}" hidden>all figures of design ${formatFigure(design.number, 0)}</button></p>
</article>`;
}

function inputRows(design: ReportDesign, data: ReportData): Piece[] {
  return data.columns.flatMap((column, index) => {
    if (column.role === 'metric') return [];
    const value = design.values[index] ?? null;
    const edge = edgeWords(value, axisOf(column, data.study));
    return [
      html`<div><dt>${columnPhrase(column, data.study)}</dt><dd>${valueText(value, column, data.study)}${edge !== '' && html` <small>${edge}</small>`}</dd></div>`,
    ];
  });
}

/** Says that an input is the last that was tried, or next to it, so that something better may lie beyond. */
function edgeWords(value: number | null, axis: Axis | undefined): string {
  if (value === null || axis === undefined || axis.labels !== null || axis.sets.length > 1 || axis.points.length < 2) return '';
  const tried = axis.points.map((point) => point[0] as number);
  const reach = axis.range === null ? 0 : endReach(axis.range);
  const words = reach > 0 ? 'next to the ' : '';
  if (value <= Math.min(...tried) + reach) return `${words}lowest tried`;
  return value >= Math.max(...tried) - reach ? `${words}highest tried` : '';
}

function objectiveRow(objective: Objective, candidate: Candidate, all: readonly Candidate[], data: ReportData): Markup {
  const { column, index } = metricColumn(data, objective.metric);
  const value = candidate.design.values[index] ?? null;
  const best = bestOf(objective, all, data);
  const beside =
    best === null || value === null || best.letter === candidate.letter
      ? ''
      : value === best.value
        ? `as ${best.letter}`
        : `${value > best.value ? '+' : '−'}${differenceFigure(value - best.value, column, data.study)} to ${best.letter}`;
  const note = best !== null && best.letter === candidate.letter && candidate.letter !== null ? 'best' : beside;
  return html`<div><dt>${columnPhrase(column, data.study)}</dt><dd>${valueText(value, column, data.study)}${note !== '' && html` <small>${note}</small>`}</dd></div>`;
}

/** Who among those put forward is best in an objective, and with what value. */
function bestOf(objective: Objective, all: readonly Candidate[], data: ReportData): { letter: string; value: number; column: ResultColumn } | null {
  const { column, index } = metricColumn(data, objective.metric);
  let best: { letter: string; value: number; column: ResultColumn } | null = null;
  for (const { letter, design } of all) {
    const value = design.values[index] ?? null;
    if (letter === null || value === null) continue;
    if (best === null || (objective.aim === 'minimise' ? value < best.value : value > best.value)) best = { letter, value, column };
  }
  return best;
}

/** What a proposal gives up against the best of each objective; of the reference, whether it passes. */
function standingWords(candidate: Candidate, all: readonly Candidate[], data: ReportData): string {
  if (candidate.letter === null) return passingWords(candidate.design, data);
  const given = data.study.objectives.flatMap((objective) => {
    const best = bestOf(objective, all, data);
    const value = candidate.design.values[metricColumn(data, objective.metric).index] ?? null;
    if (best === null || value === null || value === best.value) return [];
    return [`${differenceWords(value, best.value, best.column, data.study)} than ${best.letter}`];
  });
  return given.length === 0 ? 'Gives up nothing: best in every objective.' : `Gives up: ${listWords(given)}.`;
}

function passingWords(design: ReportDesign, data: ReportData): string {
  const missed = data.requirements.filter((requirement) => !meets(design.values[metricColumn(data, requirement.metric).index] ?? null, requirement));
  if (missed.length === 0) return data.requirements.length === 0 ? '' : 'Meets every requirement.';
  return `Misses ${listWords(missed.map(({ metric }) => columnPhrase(metricColumn(data, metric).column, data.study)))}.`;
}
