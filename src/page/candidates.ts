/** The designs that stand in the answer, side by side. */
import { proposalRules } from '../charts/proposal-words.ts';
import type { ReportData, ReportDesign } from '../charts/report-data.ts';
import { proposalLetter } from '../charts/trade-off-view.ts';
import { designOf } from './wording.ts';

/** A design that stands in the answer: one put forward, or the reference (without letter). */
export interface Candidate {
  readonly letter: string | null;
  readonly design: ReportDesign;
  readonly rules: readonly string[];
}

/** Those put forward, the closest where nothing passes, and the reference. */
export function candidatesOf(data: ReportData): Candidate[] {
  const named = data.proposals.map((proposal, index) => ({ letter: proposalLetter(index), number: proposal.number, rules: proposalRules(proposal, data) }));
  const closest = data.closest === null ? [] : [{ letter: null, number: data.closest.number, rules: ['closest to passing'] }];
  const reference = { letter: null, number: 0, rules: ["reference: the study's own figures"] };
  return [...named, ...closest, reference].flatMap(({ number, ...rest }) => {
    const design = designOf(data, number);
    return design === undefined ? [] : [{ ...rest, design }];
  });
}
