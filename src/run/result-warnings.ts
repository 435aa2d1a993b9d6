/** What the results themselves warn of: proposals at the edge of what was searched, designs that lack an objective. */
import { columnPhrase, valueText } from '../charts/figure-words.ts';
import type { Proposal } from '../charts/report-data.ts';
import type { ResultColumn } from '../core/evaluate/result-columns.ts';
import type { RequirementResult } from '../core/front/requirements.ts';
import type { Study } from '../core/study/study.ts';
import { formatFigure } from '../core/units/format-quantity.ts';

/** The results to look at. */
export interface ResultsSeen {
  readonly study: Study;
  readonly columns: readonly ResultColumn[];
  readonly tally: RequirementResult;
  readonly proposals: readonly Proposal[];
  /** Stored values of a design by number, SI, one per column. */
  valuesOf(number: number): Float64Array;
}

/** Sentences in the order of the study's axes, then about missing objectives. What each requirement removes is told with the requirements. */
export function resultWarnings(seen: ResultsSeen): string[] {
  return [...seen.study.axes.flatMap((axis) => edgeWarnings(axis, seen)), ...missingObjectives(seen.tally)];
}

/** A list or options end where the choice ends; only a range could have been drawn wider. */
function edgeWarnings({ name, range, points }: Study['axes'][number], { study, columns, proposals, valuesOf }: ResultsSeen): string[] {
  if (range === null || points.length < 2) return [];
  const at = columns.findIndex((column) => column.role === 'input' && column.name === name);
  const ends = [
    ['lowest', points[0][0]],
    ['highest', points[points.length - 1][0]],
  ] as const;
  return ends.flatMap(([word, end]) => {
    const there = proposals.filter(({ number }) => valuesOf(number)[at] === end).map(({ number }) => formatFigure(number, 0));
    if (there.length === 0) return [];
    const who = there.length === 1 ? `design ${there[0]} lies` : `designs ${there.slice(0, -1).join(', ')} and ${there.at(-1)} lie`;
    const value = valueText(end, columns[at], study);
    return [`Of the designs put forward, ${who} at the ${word} ${columnPhrase(columns[at], study)} searched, ${value}: a wider range may hold better ones.`];
  });
}

function missingObjectives({ withoutObjectives }: RequirementResult): string[] {
  if (withoutObjectives === 0) return [];
  const [who, lacks] = withoutObjectives === 1 ? ['1 design meets', 'lacks'] : [`${formatFigure(withoutObjectives, 0)} designs meet`, 'lack'];
  return [`${who} every requirement but ${lacks} a figure for an objective, and so cannot enter the front.`];
}
