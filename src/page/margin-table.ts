/** The designs of the answer against each requirement: value, and what is to spare. */
import { columnPhrase, differenceText } from '../charts/figure-words.ts';
import type { ReportData, RequirementCount } from '../charts/report-data.ts';
import type { Candidate } from './candidates.ts';
import { html, type Markup } from './markup.ts';
import { boundWords, meets, metricColumn, relativeMargin, valueAgainst } from './wording.ts';

/** One row per requirement, one column per candidate; the tightest margin of each is marked. */
export function marginTable(candidates: readonly Candidate[], data: ReportData): Markup | null {
  if (data.requirements.length === 0 || candidates.length === 0) return null;
  const tightest = candidates.map((candidate) => tightestOf(candidate, data));
  const rows = data.requirements
    .filter((requirement) => !isFollowedByAll(requirement, candidates, data))
    .map((requirement) => {
      const { column, index } = metricColumn(data, requirement.metric);
      const cells = candidates.map(({ design }, at) => marginCell(design.values[index] ?? null, requirement, data, tightest[at] === requirement));
      return html`<tr><th scope="row" class="stay">${columnPhrase(column, data.study)} <small>${boundWords(requirement, column, data.study)}</small></th>${cells}</tr>`;
    });
  const heads = candidates.map(
    ({ letter, design }) =>
      html`<th scope="col">${letter === null ? (design.number === 0 ? 'reference' : 'closest') : html`<b class="letter">${letter}</b>`}</th>`,
  );
  return html`<p class="caption" id="margins">Margins to the requirements; what binds a design most is marked <span class="tight">tightest</span>${data.requirements.some((requirement) => isFollowedByAll(requirement, candidates, data)) && '; what is asked of every cycle and met by all is not listed'}</p>
<div class="scroll" tabindex="0" role="region" aria-labelledby="margins"><table class="margins" aria-labelledby="margins">
<thead><tr><th scope="col" class="stay">Requirement</th>${heads}</tr></thead>
<tbody>${rows}</tbody>
</table></div>`;
}

/** A requirement that the study does not write and all of these meet has nothing to tell. */
function isFollowedByAll(requirement: RequirementCount, candidates: readonly Candidate[], data: ReportData): boolean {
  const { index } = metricColumn(data, requirement.metric);
  return requirement.implied && candidates.every(({ design }) => meets(design.values[index] ?? null, requirement));
}

function marginCell(value: number | null, requirement: RequirementCount, data: ReportData, tightest: boolean): Markup {
  const { column } = metricColumn(data, requirement.metric);
  const shown = valueAgainst(value, requirement, column, data.study);
  if (value === null) return html`<td class="missed">— <small class="missed">missed: there is no value</small></td>`;
  if (!meets(value, requirement)) {
    return html`<td class="missed">${shown} <small class="missed">missed by ${differenceText(value - requirement.limit, column, data.study)}</small></td>`;
  }
  const spare =
    value === requirement.limit
      ? requirement.implied
        ? 'met'
        : 'nothing to spare'
      : `${differenceText(value - requirement.limit, column, data.study)} to spare`;
  return html`<td>${shown} <small>${tightest ? html`<span class="tight">tightest</span> ` : ''}${spare}</small></td>`;
}

/** The requirement with the least share of its limit to spare, among those a design meets; implied ones bind nothing. */
function tightestOf({ design }: Candidate, data: ReportData): RequirementCount | null {
  let least: RequirementCount | null = null;
  let margin = Number.POSITIVE_INFINITY;
  for (const requirement of data.requirements) {
    const value = design.values[metricColumn(data, requirement.metric).index] ?? null;
    if (requirement.implied || value === null || !meets(value, requirement)) continue;
    const own = relativeMargin(value, requirement);
    if (own >= margin) continue;
    margin = own;
    least = requirement;
  }
  return least;
}
