/** A design's sheet for people: inputs, trials with what limits them, cycles side by side, requirements with their margins. */
import { unitWord } from '../charts/figure-words.ts';
import { visibleText } from '../charts/visible-text.ts';
import type { ComputedDesign, DesignMetric, Setting } from '../core/search/design-bench.ts';
import { cautionLine } from '../core/study/catalogue/cautions.ts';
import type { OptionChoice } from '../core/study/read-setting.ts';
import type { Study, Trial } from '../core/study/study.ts';
import { boundWords, meets, valueAgainst } from '../page/wording.ts';
import { figureCells, inputCells } from './figure-text.ts';
import { verdictText } from './requirement-text.ts';
import { columns } from './table.ts';
import { ink } from './terminal.ts';
import { limitText, trialConditions } from './trial-text.ts';

type Align = 'left' | 'right';

/** A computed design with the study it belongs to and what was set for it. */
export interface DesignSheet extends ComputedDesign {
  readonly study: Study;
  readonly settings: readonly Setting[];
  readonly choices: readonly OptionChoice[];
}

/** Cycles that stand side by side. */
const cyclesAbreast = 5;

/** The whole sheet; warnings are those of the study. */
export function sheetText(sheet: DesignSheet, warnings: readonly string[]): string {
  const cycles = sheet.study.trials.filter((trial) => trial.kind === 'cycle');
  const groups = Array.from({ length: Math.ceil(cycles.length / cyclesAbreast) }, (_, at) => cycles.slice(at * cyclesAbreast, (at + 1) * cyclesAbreast));
  const parts = [
    sheet.study.title === '' ? '' : ink('bold', visibleText(sheet.study.title)),
    whichDesign(sheet),
    block('Inputs', inputRows(sheet), ['left', 'right', 'left']),
    fullPedalBlock(sheet),
    ...groups.map((group) => cycleBlock(sheet, group)),
    block('Drive unit and vehicle', wholeDesignRows(sheet), ['left', 'right', 'left']),
    block('Requirements', requirementRows(sheet), ['left', 'left', 'right', 'left']),
    block(
      'Warnings',
      warnings.map((warning) => [warning]),
    ),
    cautionLine,
  ];
  return parts.filter((part) => part !== '').join('\n\n');
}

function block(title: string, rows: readonly (readonly string[])[], align: readonly Align[] = []): string {
  return rows.length === 0 ? '' : `${ink('bold', title)}\n${columns(rows, { indent: 2, align })}`;
}

function whichDesign(sheet: DesignSheet): string {
  const base = sheet.number === 0 ? "Design 0, the reference: the study's own figures" : `Design ${sheet.number} of the search`;
  const names = [...sheet.choices.map(({ list }) => visibleText(list)), ...sheet.settings.map(({ name }) => name)];
  return names.length === 0 ? base : `${base}, with ${names.join(', ')} set`;
}

function inputRows(sheet: DesignSheet): string[][] {
  if (sheet.study.axes.length === 0 && sheet.settings.length === 0) return [];
  return sheet.inputs.map((input) => {
    if (input.row === null) return [visibleText(input.name), visibleText(input.option ?? "the study's own"), ''];
    return [visibleText(input.name), ...inputCells(input.value, input.row, sheet.study)];
  });
}

/** Each trial's conditions, and under them its results, aligned over all trials. */
function fullPedalBlock(sheet: DesignSheet): string {
  const trials = sheet.study.trials.filter((trial) => trial.kind !== 'cycle');
  const rows = trials.flatMap((trial) => resultsOf(sheet, trial).map((metric) => resultRow(sheet, metric)));
  if (rows.length === 0) return '';
  const lines = columns(rows, { indent: 4, align: ['left', 'right', 'left', 'left'] }).split('\n');
  const body = trials.flatMap((trial) => [
    `  ${ink('bold', visibleText(trial.name))}: ${trialConditions(sheet.study, trial)}`,
    ...lines.splice(0, resultsOf(sheet, trial).length),
  ]);
  return [ink('bold', 'Full-pedal trials'), ...body].join('\n');
}

function resultsOf(sheet: DesignSheet, trial: Trial): DesignMetric[] {
  return sheet.metrics.filter(({ column }) => column.trial === trial.name);
}

function resultRow(sheet: DesignSheet, metric: DesignMetric): string[] {
  return [metric.column.row.label, ...metricCells(sheet, metric), limitText(metric.limit, !Number.isNaN(metric.value), metric.column.row)];
}

/** Figure and unit; one that misses a requirement in decimals enough not to look as if it met it. */
function metricCells({ study }: DesignSheet, { column, value }: DesignMetric): [string, string] {
  const missed = study.requirements.find((requirement) => requirement.metric === column.name && !meets(value, requirement));
  const [figure, unit] = figureCells(value, column.row, study);
  if (missed === undefined || Number.isNaN(value)) return [figure, unit];
  const printed = valueAgainst(value, missed, column.row, study);
  return [unit === '' ? printed : printed.slice(0, -unit.length).trimEnd(), unit];
}

/** Cycles side by side: one line per metric that at least one of them has. */
function cycleBlock(sheet: DesignSheet, cycles: readonly Trial[]): string {
  const results = cycles.map((trial) => resultsOf(sheet, trial));
  const rows = (results[0] ?? []).flatMap(({ column }, at) => {
    const metrics = results.map((metricsOfOne) => metricsOfOne[at] as DesignMetric);
    if (metrics.every((metric) => Number.isNaN(metric.value) && metric.limit === '')) return [];
    const sink = column.row.name.startsWith('energy.');
    const row = [
      sink ? `  ${column.row.label}` : column.row.label,
      unitWord(column.row.quantity, sheet.study),
      ...metrics.map((metric) => cycleCell(sheet, metric)),
    ];
    return column.row.name === 'energy.rolling' ? [['of the battery energy', '', ...metrics.map(() => '')], row] : [row];
  });
  const head = ['', '', ...cycles.map((trial) => visibleText(trial.name))];
  const align: Align[] = ['left', 'left', ...cycles.map((): Align => 'right')];
  const conditions = cycles.map((trial) => `  ${ink('bold', visibleText(trial.name))}: ${trialConditions(sheet.study, trial)}`);
  return [ink('bold', 'Cycles'), ...conditions, columns([head, ...rows], { indent: 4, align })].join('\n');
}

function cycleCell(sheet: DesignSheet, metric: DesignMetric): string {
  return Number.isNaN(metric.value) && metric.limit !== '' ? metric.limit : metricCells(sheet, metric)[0];
}

function wholeDesignRows(sheet: DesignSheet): string[][] {
  return sheet.metrics
    .filter(({ column, value }) => column.trial === null && !Number.isNaN(value))
    .map((metric) => [metric.column.row.label, ...metricCells(sheet, metric)]);
}

function requirementRows(sheet: DesignSheet): string[][] {
  const { study } = sheet;
  const byName = new Map(sheet.metrics.map((metric) => [metric.column.name, metric]));
  return study.requirements.map((requirement) => {
    const { column, value } = byName.get(requirement.metric) as DesignMetric;
    const verdict = verdictText(value, requirement, column.row, study);
    const coloured = meets(value, requirement) ? ink('green', verdict) : ink('red', verdict);
    return [requirement.metric, boundWords(requirement, column.row, study), valueAgainst(value, requirement, column.row, study), coloured];
  });
}
