/** From the account of a run to what the report holds: front, proposals, requirements, sample, each design with its figures. */
import type { DesignStanding, Proposal, Provenance, ReportData, ReportDesign, RequirementCount } from '../charts/report-data.ts';
import type { Front } from '../core/front/front-filter.ts';
import { balancedDesign, bestInEach } from '../core/front/proposals.ts';
import type { RequirementOutcome, RequirementResult } from '../core/front/requirements.ts';
import { thinFront } from '../core/front/thin-front.ts';
import { hashNumber } from '../core/numerics/hash.ts';
import type { DesignEvaluator } from '../core/search/evaluate-designs.ts';
import type { Study } from '../core/study/study.ts';
import { type Issue, inFileOrder } from '../core/study/text/issue.ts';
import { type ProposedDesign, type RequirementsSeen, resultWarnings } from './result-warnings.ts';
import type { RunAccount } from './run-account.ts';

/** Front designs shown, at most; a finer resolution than this tells people nothing. */
const mostShown = 20_000;

/** What the report is made from. */
export interface ReportSource {
  readonly study: Study;
  readonly studyFile: string;
  readonly studyText: string;
  /** From the check of the study. */
  readonly warnings: readonly Issue[];
  readonly provenance: Provenance;
}

/** Everything people are shown of a run, and the exact front. */
export interface RunFindings {
  readonly report: ReportData;
  /** Design numbers of the exact front, ascending. */
  readonly front: Float64Array;
}

/** Puts the report together once every design has been counted; single designs are evaluated again by number, to the same bits. */
export function findingsOf(source: ReportSource, account: RunAccount, designs: DesignEvaluator): RunFindings {
  const { study } = source;
  const tally = account.tally.result();
  const front = account.filter.front();
  const proposals = proposalsOf(study, front);
  const shown = shownFront(study, front, proposals);
  const standings = standingsOf(account, front.numbers, shown, tally);
  return {
    front: front.numbers,
    // Field by field: what else the caller holds, such as paths of its machine, has no place in a report.
    report: {
      study,
      studyFile: source.studyFile,
      studyText: source.studyText,
      provenance: source.provenance,
      columns: designs.columns,
      counts: { designs: tally.designs, feasible: tally.feasible, front: front.numbers.length, shownFront: shown.length },
      designs: standings.map(([number, standing]) => reportDesign(number, standing, designs)),
      requirements: study.requirements.map((requirement, r) => requirementCount(study, requirement, tally.requirements[r])),
      proposals,
      closest: closestOf(study, tally),
      warnings: inFileOrder(
        [
          ...source.warnings,
          ...resultWarnings(source, { requirements: requirementsSeen(account, designs.count), proposals: proposedDesigns(proposals, designs) }),
        ],
        source.studyFile,
      ),
    },
  };
}

/** Best in each objective and the balanced one over the exact front, each design once with all the rules that chose it; the rules in the order of the objectives. */
export function proposalsOf(study: Study, { objectives, numbers }: Front): Proposal[] {
  if (numbers.length === 0) return [];
  const chosen: (readonly [number: number, rule: string])[] = [
    ...bestInEach(objectives).map((index, k): [number, string] => [numbers[index], study.objectives[k].metric]),
    [numbers[balancedDesign(objectives)], 'balanced'],
  ];
  const byNumber = new Map<number, string[]>();
  for (const [number, rule] of chosen) byNumber.set(number, [...(byNumber.get(number) ?? []), rule]);
  return [...byNumber].map(([number, rules]) => ({ number, rules }));
}

/** What the account says of the requirements of a search of `count` designs. */
export function requirementsSeen({ tally, best }: RunAccount, count: number): RequirementsSeen {
  const { designs, requirements, withoutObjectives } = tally.result();
  return { designs, whole: designs === count, failing: requirements.map(({ failing }) => failing), best: [...best], withoutObjectives };
}

/** The designs put forward, with what varies in them. */
export function proposedDesigns(proposals: readonly Proposal[], designs: DesignEvaluator): ProposedDesign[] {
  const at = (input: string) => designs.columns.findIndex(({ role, name }) => role === 'input' && name === input);
  return proposals.map(({ number, rules }) => {
    const values = valuesOf(number, designs);
    return { rules, inputOf: (name) => values[at(name)] };
  });
}

/** Indices of the front designs that people see, ascending: every proposal and one design per box of the resolution, those by hashed number where they are too many. */
function shownFront(study: Study, { objectives, numbers }: Front, proposals: readonly Proposal[]): Uint32Array {
  const thinned = thinFront(
    objectives,
    study.objectives.map(({ resolution }) => resolution),
  );
  const proposed = new Set(proposals.map(({ number }) => numbers.indexOf(number)));
  const others = Array.from(thinned).filter((index) => !proposed.has(index));
  if (others.length + proposed.size > mostShown) others.sort((a, b) => hashNumber(numbers[a]) - hashNumber(numbers[b]) || a - b);
  return Uint32Array.from([...proposed, ...others].slice(0, mostShown)).sort();
}

/** Reference first, then the shown front, then samples without the front's designs, and the closest design where nothing is feasible. */
function standingsOf(account: RunAccount, front: Float64Array, shown: Uint32Array, tally: RequirementResult): [number, DesignStanding][] {
  const onFront = new Set(front);
  const samples = account.samples();
  const removed = new Set(samples.removed);
  if (tally.closest !== null) removed.add(tally.closest.number);
  return [
    [0, 'reference'],
    ...Array.from(shown, (index): [number, DesignStanding] => [front[index], 'front']),
    ...samples.feasible.filter((number) => !onFront.has(number)).map((number): [number, DesignStanding] => [number, 'feasible']),
    ...[...removed].map((number): [number, DesignStanding] => [number, 'removed']),
  ];
}

function reportDesign(number: number, standing: DesignStanding, designs: DesignEvaluator): ReportDesign {
  return { number, standing, values: Array.from(valuesOf(number, designs), (value) => (Number.isNaN(value) ? null : value)) };
}

function valuesOf(number: number, designs: DesignEvaluator): Float64Array {
  const row = new Float64Array(designs.columns.length);
  designs.evaluate(number, row, 0, 1);
  return row;
}

function requirementCount(study: Study, requirement: Study['requirements'][number], outcome: RequirementOutcome): RequirementCount {
  const { failing, failingAlone, relaxedTo, relaxedBest } = outcome;
  return {
    ...requirement,
    failing,
    failingAlone,
    relaxedTo: Number.isNaN(relaxedTo) ? null : relaxedTo,
    relaxedBest: relaxedBest.map((best, k) => best && { ...best, objective: study.objectives[k].aim === 'minimise' ? best.objective : -best.objective }),
  };
}

function closestOf(study: Study, { closest }: RequirementResult): ReportData['closest'] {
  if (closest === null) return null;
  const missed = closest.missed.map((r) => study.requirements[r].metric);
  const without = closest.withoutObjectives.map((k) => study.objectives[k].metric);
  return { number: closest.number, missed: [...new Set([...missed, ...without])] };
}
