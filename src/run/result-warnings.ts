/**
 * What only results can warn of: a sample evaluated in full, the counts of requirements, the designs put forward. One row per rule;
 * each names the place and the reason, once. What the study alone told before is not told again.
 */
import { columnPhrase, givenText, withCurrency } from '../charts/figure-words.ts';
import { studyColumns } from '../core/search/evaluate-designs.ts';
import { metricColumns } from '../core/study/catalogue/metric-columns.ts';
import type { MetricRow } from '../core/study/catalogue/metrics.ts';
import { findParameter, type ParameterRow } from '../core/study/catalogue/parameters.ts';
import type { Axis, Requirement, Study, Trial } from '../core/study/study.ts';
import { type Issue, IssueList } from '../core/study/text/issue.ts';
import { placesInText } from '../core/study/text/place-in-text.ts';
import { axisPath, endReach } from '../core/study/warn/design-corners.ts';
import { isBeyondEveryMotor } from '../core/study/warn/motor-warnings.ts';
import { type Sight, shown, someOf, type WarningRow } from '../core/study/warn/warning-row.ts';
import { formatAgainstLimit, formatFigure } from '../core/units/format-quantity.ts';
import { observeDesigns, peakLastsS, type SampleSeen } from './observe-designs.ts';

/** A study and what was told of it before. */
export interface ToldStudy {
  readonly study: Study;
  readonly studyFile: string;
  readonly studyText: string;
  readonly warnings: readonly Issue[];
}

/** How many designs miss each requirement, over those counted. */
export interface RequirementsSeen {
  readonly designs: number;
  /** Every design of the search is counted. */
  readonly whole: boolean;
  /** Per requirement of the study. */
  readonly failing: readonly number[];
  /** Per requirement: the value that comes closest to its good end, SI; NaN where no design has one. */
  readonly best: readonly number[];
  /** Designs that meet every requirement but lack an objective. */
  readonly withoutObjectives: number;
}

/** What designs have shown. */
export interface ResultsSeen {
  /** Null where nothing was counted. */
  readonly requirements: RequirementsSeen | null;
  /** Null where not every design was looked at. */
  readonly proposals: readonly ProposedDesign[] | null;
}

/** A design put forward: the rules that chose it, and its varied numbers, SI. */
export interface ProposedDesign {
  readonly rules: readonly string[];
  inputOf(name: string): number;
}

interface Context extends ResultsSeen {
  readonly study: Study;
  readonly sample: SampleSeen;
  readonly told: readonly Issue[];
}

/** Every rule that takes results. */
export const resultWarningRows: readonly WarningRow<Context>[] = [
  { rule: 'grip at the start', expected: 'a start that motor and ratio decide', look: seeGrip },
  { rule: 'battery limit', expected: 'a pack that feeds the motors looked at', look: seeBattery },
  { rule: 'long at peak', expected: `at most about ${peakLastsS} s at peak torque`, look: seeLongPulls },
  { rule: 'range edge', expected: 'the best designs inside the range', look: seeEdges },
  { rule: 'idle requirement', expected: 'a requirement that tells designs apart', look: seeIdle },
  { rule: 'requirement out of reach', expected: 'a requirement that some design meets', look: seeOutOfReach },
  { rule: 'missing objective', expected: 'a figure for every objective', look: seeMissingObjectives },
];

/** The warnings that results add, in the order of the study file. Looks at a sample of designs, about half a second. */
export function resultWarnings({ study, studyFile, studyText, warnings: told }: ToldStudy, seen: ResultsSeen): Issue[] {
  const text = studyText.startsWith('\ufeff') ? studyText.slice(1) : studyText;
  const issues = new IssueList(studyFile, text);
  const offsetOf = placesInText(text);
  const context = { ...seen, study, told, sample: observeDesigns(study) };
  for (const { rule, expected, look } of resultWarningRows) {
    for (const { path, found, hint } of look(context)) issues.warn(offsetOf(path), path, { rule, expected, found, hint });
  }
  return issues.list('warning');
}

function count(designs: number): string {
  return formatFigure(designs, 0);
}

/** `all 468 designs`, `all 400 designs of a sample`. */
function allOf({ designs, whole }: { readonly designs: number; readonly whole: boolean }): string {
  return `all ${count(designs)} designs${whole ? '' : ' of a sample'}`;
}

function shareText(share: number): string {
  const percent = 100 * share;
  return `${percent < 99.5 || percent === 100 ? formatFigure(percent, 0) : 'over 99'} %`;
}

/** Grip decides the start of a trial in every design: motor and ratio change nothing there. */
function seeGrip({ sample }: Context): Sight[] {
  if (sample.designs < 2) return [];
  return sample.trials
    .filter(({ starts, gripStarts }) => starts > 0 && gripStarts === starts)
    .map(({ trial }) => ({
      path: `trials.${trial.name}`,
      found: `grip, not the drive, limits the start in ${allOf(sample)}`,
      hint:
        trial.kind === 'hill start'
          ? 'More torque or a larger ratio changes nothing in this trial; check adhesion and axle loads.'
          : 'More torque or a larger ratio does not help at low speed in this trial; check adhesion and axle loads.',
    }));
}

/** Battery power, not the motor, is the limit in more than half of the designs. */
function seeBattery({ study, sample }: Context): Sight[] {
  if (sample.designs < 2) return [];
  const limited = sample.trials.filter(({ designs, byBattery }) => byBattery > designs / 2).sort((a, b) => b.byBattery / b.designs - a.byBattery / a.designs);
  if (limited.length === 0) return [];
  const ofDesigns = sample.whole ? 'of the designs' : `of a sample of ${count(sample.designs)} designs`;
  const where = limited.map(({ trial, designs, byBattery }, k) => `${shareText(byBattery / designs)} ${k === 0 ? `${ofDesigns} ` : ''}${placeIn(trial)}`);
  const path = ['battery.discharge', 'battery.resistance'].find((name) => study.values[name] !== undefined) ?? 'battery';
  return [
    {
      path,
      found: `battery power, not the motor, limits ${someOf(where)}`,
      hint: 'Motor power beyond what the pack gives is paid for and not used: look at smaller motors or a stronger pack.',
    },
  ];
}

function placeIn({ kind, name }: Trial): string {
  if (kind === 'cycle') return `in steps of ${name}`;
  return kind === 'acceleration' || kind === 'standing distance' ? `at the end of ${name}` : `in ${name}`;
}

/** Full pedal for longer than peak torque commonly lasts, in a design that may be chosen. */
function seeLongPulls({ study, sample }: Context): Sight[] {
  return sample.pedalTimes
    .filter(({ longerThanPeak }) => longerThanPeak > 0)
    .map(({ trial, designs, longerThanPeak, longestS }) => {
      const which =
        sample.designs === 1
          ? ''
          : ` in ${shareText(longerThanPeak / designs)} of the ${sample.whole ? '' : 'sampled '}designs${sample.passing > 0 ? ' that meet every requirement' : ''}`;
      return {
        path: `trials.${trial.name}`,
        found: `full pedal at peak rating for more than ${peakLastsS} s${which}, up to ${shown(longestS, 'time', 0, study)}`,
        hint: 'Ask for how long peak torque is rated, or write "rating: continuous" in the trial.',
      };
    });
}

/** Designs put forward at an end of a range: something better may lie beyond. Lists and options end where the choice ends. */
function seeEdges({ study, proposals, told }: Context): Sight[] {
  if (proposals === null || proposals.length === 0) return [];
  return study.axes.flatMap((axis): Sight[] => {
    const path = axisPath(axis);
    if (
      axis.range === null ||
      (axis.range.stepped && axis.points.length < 3) ||
      told.some((issue) => issue.rule === 'unpriced circumstance' && issue.path === path)
    )
      return [];
    const row = findParameter(axis.name) as ParameterRow;
    const near = endReach(axis.range);
    const ends = endsOf(axis.range, row).flatMap(({ word, value }) => {
      const there = proposals.filter(({ inputOf }) => Math.abs(inputOf(axis.name) - value) <= near);
      if (there.length === 0) return [];
      const where = `${near === 0 ? '' : 'less than 1 % of the range from '}${givenText(value, row, study)}, the ${word} searched`;
      return [`${where}, in the design${there.length === 1 ? '' : 's'} put forward as ${ruleWords(there, study)}`];
    });
    return ends.length === 0
      ? []
      : [{ path, found: ends.join('; '), hint: 'Something better may lie beyond: widen the range, unless no such part can be had.' }];
  });
}

/** The ends of a range beyond which there could be more: none where the figure itself ends there (100 %). */
function endsOf({ from, to }: NonNullable<Axis['range']>, { atLeast, atMost }: ParameterRow): { word: string; value: number }[] {
  return [...(from === atLeast ? [] : [{ word: 'lowest', value: from }]), ...(to === atMost ? [] : [{ word: 'highest', value: to }])];
}

/** `least drive unit cost and balanced`: the rules as report and terminal name them. */
function ruleWords(proposals: readonly ProposedDesign[], study: Study): string {
  const columns = studyColumns(study);
  const words = (rule: string) => {
    const column = columns.find(({ role, name }) => role === 'metric' && name === rule);
    const aim = study.objectives.find(({ metric }) => metric === rule)?.aim === 'maximise' ? 'most' : 'least';
    return column === undefined ? rule : `${aim} ${columnPhrase(column, study)}`;
  };
  return someOf(proposals.flatMap(({ rules }) => rules.map(words)));
}

/** Each requirement with its row, the designs that miss it, and where it stands. */
function requirementsOf(study: Study, { failing, best }: RequirementsSeen) {
  const columns = metricColumns(study);
  return study.requirements.map((requirement, r) => {
    const column = columns.find(({ name }) => name === requirement.metric);
    const row = column?.row as MetricRow;
    const path = requirement.implied ? `trials.${column?.trial}` : `requirements.${requirement.metric}`;
    const trial = study.trials.find(({ name }) => name === column?.trial);
    return { requirement, row, trial, path, failing: failing[r], best: best[r], bound: boundText(requirement, row, study) };
  });
}

function boundText({ bound, limit }: Requirement, row: MetricRow, study: Study): string {
  return `${row.label} ${bound === 'atLeast' ? 'at least' : 'at most'} ${givenText(limit, row, study)}`;
}

/** A requirement that removes nothing; that cycles are followed is asked of itself and may well be so. */
function seeIdle({ study, requirements }: Context): Sight[] {
  if (requirements === null || requirements.designs < 2) return [];
  return requirementsOf(study, requirements)
    .filter(({ requirement, failing }) => failing === 0 && !requirement.implied)
    .map(({ path, bound }) => ({
      path,
      found: `${bound}, met by ${allOf(requirements)}`,
      hint: 'It removes nothing and plays no part in the choice: tighten it, or leave it out.',
    }));
}

/** A requirement that removes everything, unless the reason was told. */
function seeOutOfReach({ study, requirements, told }: Context): Sight[] {
  if (requirements === null || requirements.designs < 2) return [];
  return requirementsOf(study, requirements)
    .filter(({ failing, best, trial }) => failing === requirements.designs && !wasTold(trial, best, study, told))
    .map(({ path, bound, best, requirement, row }) => ({
      path,
      found: `${bound}, missed by ${allOf(requirements)}, ${Number.isNaN(best) ? 'none of which has a value' : `the best with ${besideLimit(best, requirement, row, study)}`}`,
      hint: 'It removes everything: ease it, or search where it can be met.',
    }));
}

/** Was it told that every design lacks the speed, or that designs have no values at all? */
function wasTold(trial: Trial | undefined, best: number, study: Study, told: readonly Issue[]): boolean {
  if (trial === undefined) return false;
  if (Number.isNaN(best) && told.some(({ rule, path }) => rule === 'speeds out of order' || (rule === 'too heavy' && path === `trials.${trial.name}.laden`)))
    return true;
  return isBeyondEveryMotor(study, trial);
}

function besideLimit(value: number, { limit, bound }: Requirement, { quantity, decimals }: MetricRow, study: Study): string {
  return withCurrency(formatAgainstLimit(value, limit, bound, quantity, { decimals, system: study.report.units }), quantity, study);
}

function seeMissingObjectives({ requirements }: Context): Sight[] {
  if (requirements === null || requirements.withoutObjectives === 0) return [];
  const { withoutObjectives, whole } = requirements;
  const who = withoutObjectives === 1 ? '1 design' : `${count(withoutObjectives)} designs`;
  return [
    {
      path: 'tradeOff',
      found: `${who}${whole ? '' : ' of a sample'} that ${withoutObjectives === 1 ? 'meets' : 'meet'} every requirement but ${withoutObjectives === 1 ? 'has' : 'have'} no value for an objective`,
      hint: 'They cannot enter the front; require what the objective needs, so that the reason shows.',
    },
  ];
}
