/** What a run found, for the terminal: counts, the designs put forward, what each requirement removes. Words and letters as in the report. */
import { join } from 'node:path';
import { columnPhrase, unitWord, valueText } from '../charts/figure-words.ts';
import type { ReportData, ReportDesign, RequirementCount } from '../charts/report-data.ts';
import { visibleText } from '../charts/visible-text.ts';
import type { ResultColumn } from '../core/evaluate/result-columns.ts';
import { cautionLine } from '../core/study/catalogue/cautions.ts';
import { type Candidate, candidatesOf } from '../page/candidates.ts';
import { boundWords, easedLimit, meets, metricColumn, valueAgainst } from '../page/wording.ts';
import { count, countOf, durationText, shareText } from './figure-text.ts';
import { columns } from './table.ts';
import { ink, typed } from './terminal.ts';

/** Designs that stand side by side in the table. */
const mostAbreast = 7;

/** The whole summary of one run; `warnings` are those that its results gave cause for, a line each. */
export function runSummary(report: ReportData, folder: string, seconds: number, warnings: readonly string[]): string {
  const candidates = candidatesOf(report).slice(0, mostAbreast);
  const parts = [
    headline(report, seconds),
    [ink('bold', report.counts.feasible > 0 ? 'Designs put forward' : 'Designs to look at'), ...candidates.map((each) => candidateLine(each, report))].join(
      '\n',
    ),
    candidateTable(candidates, report),
    requirementBlock(report),
    warnings.length === 0 ? '' : [ink('bold', 'What to keep an eye on'), ...warnings.map((line) => `  ${line}`)].join('\n'),
    `Report: ${join(folder, 'report.html')}\nOne design in full: layshaft sheet ${typed(report.studyFile)} --design ${candidates[0]?.design.number ?? 0}`,
    cautionLine,
  ];
  return parts.filter((part) => part !== '').join('\n\n');
}

function headline({ study, counts }: ReportData, seconds: number): string {
  const title = `${ink('bold', visibleText(study.title))}: ${countOf(counts.designs, 'design')} in ${durationText(seconds)}.`;
  if (counts.feasible === 0) return `${title}\n${ink('red', 'No design meets every requirement.')} There is no front.`;
  const meet = `${count(counts.feasible)} (${shareText(counts.feasible / counts.designs)}) ${counts.feasible === 1 ? 'meets' : 'meet'} every requirement`;
  const thinned = counts.shownFront < counts.front ? ` (${count(counts.shownFront)} at the resolution asked for)` : '';
  return `${title}\n${meet}; ${count(counts.front)} on the front${thinned}.`;
}

function candidateLine({ letter, design, rules }: Candidate, report: ReportData): string {
  const missed = report.requirements.filter((requirement) => !meets(requiredValue(design, requirement.metric, report), requirement));
  const misses = missed.length === 0 ? '' : `; misses ${missed.map((requirement) => shortfall(design, requirement, report)).join(', ')}`;
  const why = design.number === 0 ? 'the reference' : rules.join(', ');
  return `  ${letter ?? ' '}  design ${design.number}: ${why}${misses}`;
}

function shortfall(design: ReportDesign, requirement: RequirementCount, report: ReportData): string {
  const { column } = metricColumn(report, requirement.metric);
  const value = valueAgainst(requiredValue(design, requirement.metric, report), requirement, column, report.study);
  return `${columnPhrase(column, report.study)} (${value}, ${boundWords(requirement, column, report.study)} asked)`;
}

function requiredValue(design: ReportDesign, metric: string, report: ReportData): number | null {
  return design.values[metricColumn(report, metric).index] ?? null;
}

/** Objectives and inputs of the designs side by side. */
function candidateTable(candidates: readonly Candidate[], report: ReportData): string {
  const objectives = report.study.objectives.map(({ metric }) => metricColumn(report, metric));
  const inputs = report.columns.flatMap((column, index) => (column.role === 'metric' ? [] : [{ column, index }]));
  const head = ['', '', ...candidates.map(({ letter, design }) => letter ?? `design ${design.number}`)];
  const rows = [...objectives, ...inputs].map(({ column, index }) => [
    columnPhrase(column, report.study),
    column.labels === null ? unitWord(column.quantity, report.study) : '',
    ...candidates.map(({ design }) => figureOf(design.values[index] ?? null, column, report)),
  ]);
  return columns([head, ...rows], { indent: 2, align: ['left', 'left', ...candidates.map(() => 'right' as const)] });
}

/** The figure of a cell whose unit stands in a column of its own. */
function figureOf(value: number | null, column: ResultColumn, report: ReportData): string {
  const text = valueText(value, column, report.study);
  const unit = column.labels === null ? unitWord(column.quantity, report.study) : '';
  return unit !== '' && text.endsWith(unit) ? text.slice(0, -unit.length).trimEnd() : text;
}

function requirementBlock(report: ReportData): string {
  if (report.requirements.length === 0) return '';
  const rows = report.requirements.map((requirement) => requirementRow(requirement, report));
  const head = ['', '', 'miss it', 'miss no other', 'if eased'];
  return `${ink('bold', 'What the requirements remove')}\n${columns([head, ...rows], { indent: 2, align: ['left', 'left', 'right', 'right', 'left'] })}`;
}

function requirementRow(requirement: RequirementCount, report: ReportData): string[] {
  const { column } = metricColumn(report, requirement.metric);
  const { failing, failingAlone } = requirement;
  const share = (designs: number) => `${count(designs)} (${shareText(designs / Math.max(1, report.counts.designs))})`;
  return [columnPhrase(column, report.study), boundWords(requirement, column, report.study), share(failing), share(failingAlone), easing(requirement, report)];
}

function easing(requirement: RequirementCount, report: ReportData): string {
  if (requirement.failing === 0) return 'removes nothing';
  if (requirement.failingAlone === 0) return 'removes nothing alone';
  if (requirement.relaxedTo === null) return 'no other limit lets one pass';
  const { column } = metricColumn(report, requirement.metric);
  return `${report.counts.feasible === 0 ? 'a first' : 'one more'} passes at ${easedLimit(requirement.relaxedTo, requirement, column, report.study)}`;
}
