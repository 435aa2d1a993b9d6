/** What each requirement costs: the designs it removes, alone and together with others, and what easing it would bring. */
import { columnPhrase, figureText } from '../charts/figure-words.ts';
import type { ReportData, RequirementCount } from '../charts/report-data.ts';
import { proposalLetter } from '../charts/trade-off-view.ts';
import { formatFigure } from '../core/units/format-quantity.ts';
import { html, type Markup, type Piece } from './markup.ts';
import { boundWords, designOf, differenceWords, easedLimit, metricColumn, objectiveWords } from './wording.ts';

/** Section 4; where nothing passes, the answer says all of it. */
export function requirementSection(data: ReportData): Markup | null {
  if (data.requirements.length === 0 || data.counts.feasible === 0) return null;
  return html`<section aria-labelledby="requirements">
<h2 id="requirements">What the requirements cost</h2>
<div class="body">
<p>${costliestWords(data)}</p>
${requirementList(data)}
</div>
</section>`;
}

/** Each requirement with the designs that miss it (pale), those that miss no other (dark), and what easing it brings. */
export function requirementList(data: ReportData): Markup {
  return html`<ul class="requirements">${data.requirements.map((requirement) => requirementItem(requirement, data))}</ul>`;
}

function requirementItem(requirement: RequirementCount, data: ReportData): Markup {
  const { column } = metricColumn(data, requirement.metric);
  const share = (count: number) => `${formatFigure((100 * count) / Math.max(1, data.counts.designs), 1)} %`;
  const { failing, failingAlone } = requirement;
  return html`<li>
<p><b>${columnPhrase(column, data.study)}</b><br>${boundWords(requirement, column, data.study)}${requirement.implied && ', asked of every cycle'}</p>
<p>${bar(requirement, data.counts.designs)}<br>${formatFigure(failing, 0)} miss it <small>${share(failing)}</small><br>${formatFigure(failingAlone, 0)} miss no other <small>${share(failingAlone)}</small></p>
<div>${easingWords(requirement, data)}</div>
</li>`;
}

/** Lengths as attributes of a small drawing: the content policy allows no style attributes. */
function bar({ failing, failingAlone }: RequirementCount, designs: number): Markup {
  const width = (count: number) => Math.round((count / Math.max(1, designs)) * 12_000) / 100;
  return html`<svg class="share" width="120" height="10" viewBox="0 0 120 10" aria-hidden="true"><rect width="120" height="10" class="all"/><rect width="${width(failing)}" height="10" class="missing"/><rect width="${width(failingAlone)}" height="10" class="alone"/></svg>`;
}

function easingWords(requirement: RequirementCount, data: ReportData): Piece {
  if (requirement.failing === 0) return html`<p>Removes nothing.</p>`;
  if (requirement.failingAlone === 0) return html`<p>Removes nothing that the others would let pass.</p>`;
  const { column } = metricColumn(data, requirement.metric);
  const limit = (value: number) => easedLimit(value, requirement, column, data.study);
  const more = data.counts.feasible === 0 ? 'A first' : 'One more';
  const first = requirement.relaxedTo === null ? 'No other limit lets a design pass.' : `${more} design passes at ${limit(requirement.relaxedTo)}.`;
  const gains = requirement.relaxedBest.flatMap((best, index) => {
    const objective = data.study.objectives[index];
    if (best === null || objective === undefined) return [];
    const { column: measure } = metricColumn(data, objective.metric);
    const now = bestShown(objective.metric, data);
    const gain =
      now === null
        ? `${objectiveWords(objective, data)} then ${figureText(best.objective, measure, data.study)}`
        : `${differenceWords(best.objective, now.value, measure, data.study)} than ${now.letter}`;
    return [
      html`<li>At ${limit(best.limit)}: ${gain} <span class="together">(<button type="button" class="plain" data-design="${best.number}" hidden>design ${formatFigure(best.number, 0)}</button>)</span></li>`,
    ];
  });
  return [html`<p>${first}</p>`, gains.length > 0 && html`<ul>${gains}</ul>`];
}

/** The design put forward as best in a metric, by its letter, and its value there. */
function bestShown(metric: string, data: ReportData): { letter: string; value: number } | null {
  const place = data.proposals.findIndex(({ rules }) => rules.includes(metric));
  const value = place < 0 ? null : (designOf(data, data.proposals[place]!.number)?.values[metricColumn(data, metric).index] ?? null);
  return value === null ? null : { letter: proposalLetter(place), value };
}

function costliestWords(data: ReportData): Piece {
  const most = data.requirements.reduce((found, each) => (each.failingAlone > found.failingAlone ? each : found));
  const { column } = metricColumn(data, most.metric);
  return most.failingAlone === 0
    ? 'No single requirement keeps a design out that the others would let pass.'
    : html`The requirement that alone keeps out most designs is <b>${columnPhrase(column, data.study)} ${boundWords(most, column, data.study)}</b>: ${formatFigure(most.failingAlone, 0)} designs miss only this one.`;
}
