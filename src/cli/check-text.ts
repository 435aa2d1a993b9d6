/** The outcome of `check` for people. */
import { givenText } from '../charts/figure-words.ts';
import { visibleText } from '../charts/visible-text.ts';
import { findParameter, type ParameterRow } from '../core/study/catalogue/parameters.ts';
import { searchWords } from '../core/study/catalogue/search-methods.ts';
import type { Axis, Study } from '../core/study/study.ts';
import { boundWords } from '../page/wording.ts';
import type { RunEstimate } from '../run/estimate-run.ts';
import { type CheckedStudy, requiredColumn } from './checked-study.ts';
import { count, countOf, durationText, shareText, sizeText } from './figure-text.ts';
import { warningSentence } from './open-study.ts';
import { columns } from './table.ts';
import { capped, ink } from './terminal.ts';
import { trialConditions } from './trial-text.ts';

const mostLines = 40;

/** A valid study: what would run, how long, how large, and what to keep an eye on. */
export function checkText({ opened, outlook, warnings }: Extract<CheckedStudy, { outlook: unknown }>): string {
  const { study, file } = opened;
  const parts = [
    `${ink('bold', file)} has ${ink('green', 'no mistakes')}. ${visibleText(study.title)}`,
    block('Trials', trialLines(study)),
    'needs' in outlook
      ? `A run needs ${outlook.needs.expected}; this is ${outlook.needs.found}. ${outlook.needs.hint}`
      : [block('Varied', axisLines(study)), costLine(outlook.estimate, study), block(sampleTitle(outlook.estimate), sampleLines(outlook.estimate, study))]
          .filter((part) => part !== '')
          .join('\n\n'),
    block(
      'What to keep an eye on',
      warnings.map((warning) => `  ${warningSentence(warning, opened)}`),
    ),
  ];
  return parts.filter((part) => part !== '').join('\n\n');
}

function block(title: string, lines: readonly string[]): string {
  return lines.length === 0 ? '' : [ink('bold', title), ...capped(lines, mostLines, 'lines')].join('\n');
}

function trialLines(study: Study): string[] {
  return lines(study.trials.map((trial) => [visibleText(trial.name), trialConditions(study, trial)]));
}

function axisLines(study: Study): string[] {
  return lines(study.axes.map((axis) => [visibleText(axis.name), pointWords(axis), axisText(axis, study)]));
}

function pointWords({ sets, points, labels, range }: Axis): string {
  if (range?.stepped === false) return 'any value';
  return countOf(points.length, labels !== null ? 'option' : sets.length > 1 ? 'pair' : 'value');
}

function axisText({ sets, points, labels, range }: Axis, study: Study): string {
  const figure = (value: number, k: number) => givenText(value, findParameter(sets[k] as string) as ParameterRow, study);
  const words = labels?.map(visibleText) ?? points.map((point) => point.map(figure).join(' / '));
  if (range !== null) return `${words[0]} to ${words.at(-1)}`;
  return words.length <= 6 ? words.join(', ') : `${words.slice(0, 4).join(', ')}, … ${words.at(-1)}`;
}

function costLine({ designs, seconds, workers, bytes, sampled }: RunEstimate, { search }: Study): string {
  const time = `about ${durationText(seconds)} with ${countOf(workers, 'worker')}`;
  return `A run evaluates ${ink('bold', countOf(designs, 'design'))}, ${searchWords(search)}: ${time}, about ${sizeText(bytes)} of results (measured on ${countOf(sampled, 'design')}).`;
}

function sampleTitle({ sampled, designs, feasible }: RunEstimate): string {
  const sample = sampled === designs ? `All ${countOf(designs, 'design')}` : `Sample of ${countOf(sampled, 'design')}`;
  const meet = feasible === 0 ? 'none meets' : `${count(feasible)} (${shareText(feasible / sampled)}) meet`;
  return `${sample}: ${meet} every requirement`;
}

function sampleLines({ failing, sampled }: RunEstimate, study: Study): string[] {
  return lines(
    study.requirements.map((requirement, at) => {
      const bound = boundWords(requirement, requiredColumn(requirement, study).row, study);
      return [visibleText(requirement.metric), bound, removalText(failing[at] as number, sampled) + (requirement.implied ? ' (asked of every cycle)' : '')];
    }),
  );
}

function removalText(failing: number, sampled: number): string {
  if (failing === 0) return 'removes nothing';
  return failing === sampled ? ink('red', 'removes everything') : `removes ${shareText(failing / sampled)}`;
}

function lines(rows: readonly (readonly string[])[]): string[] {
  return rows.length === 0 ? [] : columns(rows, { indent: 2 }).split('\n');
}
