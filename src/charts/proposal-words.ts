/** Why a design is put forward, in words. */
import { columnPhrase } from './figure-words.ts';
import type { Proposal, ReportData } from './report-data.ts';

/** `least battery energy in stops`, `most range in trunk`, `balanced`: one phrase per rule that chose the design. */
export function proposalRules(proposal: Proposal, { study, columns }: ReportData): string[] {
  return proposal.rules.map((rule) => {
    if (rule === 'balanced') return 'balanced';
    const column = columns.find((candidate) => candidate.role === 'metric' && candidate.name === rule);
    const objective = study.objectives.find(({ metric }) => metric === rule);
    if (column === undefined || objective === undefined) throw new Error(`a proposal is best in ${rule}, which is no objective`);
    return `${objective.aim === 'minimise' ? 'least' : 'most'} ${columnPhrase(column, study)}`;
  });
}
