/** Requirements, loads and differences in the words of a sentence. */
import { columnPhrase, columnWords, differenceText, figureText, givenText, type Measured, unitWord, withCurrency, withUnit } from '../charts/figure-words.ts';
import type { ReportData, ReportDesign, RequirementCount } from '../charts/report-data.ts';
import { shortText } from '../charts/visible-text.ts';
import type { ResultColumn } from '../core/evaluate/result-columns.ts';
import { trialMetrics } from '../core/study/catalogue/metrics.ts';
import { type TrialParameter, trialParameters } from '../core/study/catalogue/parameters.ts';
import type { Objective, Requirement, Study, Trial } from '../core/study/study.ts';
import { formatAgainstLimit, formatFigure, readingDecimals } from '../core/units/format-quantity.ts';
import { fromSi, readingUnit } from '../core/units/units.ts';

/** `a`, `a and b`, `a, b and c`. */
export function listWords(words: readonly string[]): string {
  return words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}

/** The number with its noun in the singular or plural. */
export function countWords(count: string, noun: string): string {
  return `${count} ${count === '1' ? noun : `${noun}s`}`;
}

/** The column of a metric and its place; every objective and required metric has one. */
export function metricColumn(data: ReportData, metric: string): { column: ResultColumn; index: number } {
  const index = data.columns.findIndex((column) => column.role === 'metric' && column.name === metric);
  if (index < 0) throw new Error(`the report has no column of ${metric}`);
  return { column: data.columns[index] as ResultColumn, index };
}

/** `at least 20 %`. */
export function boundWords(requirement: Pick<Requirement, 'limit' | 'bound'>, column: Measured, study: Study): string {
  return `${requirement.bound === 'atLeast' ? 'at least' : 'at most'} ${givenText(requirement.limit, column, study)}`;
}

/** A value in decimals enough to stand on its own side of the limit. */
export function valueAgainst(value: number | null, { limit, bound }: Pick<Requirement, 'limit' | 'bound'>, column: Measured, study: Study): string {
  if (value === null || Number.isNaN(value)) return figureText(null, column, study);
  const { quantity, decimals } = column;
  return withCurrency(formatAgainstLimit(value, limit, bound, quantity, { decimals, system: study.report.units }), quantity, study);
}

/** A limit that a value just meets, rounded to the side where it still does. */
export function easedLimit(value: number, { bound }: Pick<Requirement, 'bound'>, measured: Measured, study: Study): string {
  const unit = readingUnit(measured.quantity, study.report.units);
  const usual = readingDecimals(measured.decimals, measured.quantity, study.report.units);
  const written = Number(fromSi(value, unit).toPrecision(12));
  const decimals = Number(written.toFixed(usual)) === written ? usual : usual + 1;
  const steps = 10 ** decimals;
  const scaled = Number((written * steps).toPrecision(12));
  const rounded = (bound === 'atLeast' ? Math.floor(scaled) : Math.ceil(scaled)) / steps;
  return withUnit(formatFigure(rounded, decimals), measured, study);
}

/** Inclusive; a figure that does not exist meets nothing. */
export function meets(value: number | null, { limit, bound }: Pick<Requirement, 'limit' | 'bound'>): boolean {
  return value !== null && (bound === 'atLeast' ? value >= limit : value <= limit);
}

/** A clause of the question in three parts, the limit in the middle: `start on `, `20 %`, ` or steeper laden to 2800 kg`. */
export interface Clause {
  readonly before: string;
  readonly limit: string;
  readonly after: string;
}

/** A requirement as what a design must do. */
export function requirementClause(requirement: RequirementCount, data: ReportData): Clause {
  const { study } = data;
  const { column } = metricColumn(data, requirement.metric);
  const { measure, trial: trialName } = columnWords(column, study);
  const trial = study.trials.find(({ name }) => name === trialName);
  const limit = givenText(requirement.limit, column, study);
  const usual = requirement.bound === (column.better === 'more' ? 'atLeast' : 'atMost');
  if (trial !== undefined && usual) {
    const load = loadWords(trial, study);
    const tag = load === '' ? ` (${shortText(trial.name, 40)})` : ` ${load} (${shortText(trial.name, 40)})`;
    const setting = (key: TrialParameter) => settingText(trial, key, study);
    if (trial.kind === 'hill start' && measure === trialMetrics.grade.label) return { before: 'start on ', limit, after: ` or steeper${tag}` };
    if (trial.kind === 'gradeability' && measure === trialMetrics.grade.label) return { before: 'climb ', limit, after: ` at ${setting('at')}${tag}` };
    if (trial.kind === 'top speed' && measure === trialMetrics.speed.label) return { before: 'hold ', limit, after: tag };
    if (trial.kind === 'acceleration' && measure === trialMetrics.time.label) {
      return { before: `go from ${setting('from')} to ${setting('to')} within `, limit, after: tag };
    }
    if (trial.kind === 'standing distance' && measure === trialMetrics.time.label) {
      return { before: `cover ${setting('distance')} from rest within `, limit, after: tag };
    }
    if (requirement.implied) return { before: '', limit: '', after: `follow the trace of ${shortText(trial.name, 40)} throughout` };
  }
  return { before: `have ${requirement.bound === 'atLeast' ? 'at least' : 'at most'} `, limit, after: ` ${columnPhrase(column, study)}` };
}

/** `laden to 2800 kg`, `with 300 kg on board and a trailer of 1500 kg`; nothing where the trial carries and tows nothing. */
function loadWords(trial: Trial, study: Study): string {
  const given = (key: TrialParameter) => (study.values[`trials.${trial.name}.${key}`] ?? 0) > 0;
  const load = given('laden')
    ? `laden to ${settingText(trial, 'laden', study)}`
    : given('payload')
      ? `with ${settingText(trial, 'payload', study)} on board`
      : '';
  if (!given('trailer.mass')) return load;
  return `${load}${load.startsWith('with') ? ' and' : ' with'} a trailer of ${settingText(trial, 'trailer.mass', study)}`.trimStart();
}

/** A trial's own figure as written, without needless decimals. */
function settingText(trial: Trial, key: TrialParameter, study: Study): string {
  const value = study.values[`trials.${trial.name}.${key}`];
  return value === undefined ? '—' : givenText(value, trialParameters[key], study);
}

/** `least battery energy in stops`. */
export function objectiveWords({ metric, aim }: Objective, data: ReportData): string {
  return `${aim === 'minimise' ? 'least' : 'most'} ${columnPhrase(metricColumn(data, metric).column, data.study)}`;
}

/** By how much a value differs from another, in words: `3.2 Wh/km more battery energy in stops`, `140 EUR cheaper`, `0.4 s slower in sprint`. */
export function differenceWords(value: number, other: number, column: ResultColumn, study: Study): string {
  const size = differenceText(value - other, column, study);
  const more = value > other;
  const { trial } = columnWords(column, study);
  if (column.quantity === 'money' && unitWord('money', study) !== '') return `${size} ${more ? 'dearer' : 'cheaper'}`;
  if (column.quantity === 'time' && trial !== null) return `${size} ${more ? 'slower' : 'faster'} in ${shortText(trial, 40)}`;
  return `${size} ${more ? 'more' : 'less'} ${columnPhrase(column, study)}`;
}

/** How far a value is from its limit as a share of the limit (of 1 where the limit is 0); negative where it misses. */
export function relativeMargin(value: number, { limit, bound }: Pick<Requirement, 'limit' | 'bound'>): number {
  const away = bound === 'atLeast' ? value - limit : limit - value;
  return away / (limit === 0 ? 1 : Math.abs(limit));
}

/** The embedded design of a number. */
export function designOf(data: ReportData, number: number): ReportDesign | undefined {
  return data.designs.find((design) => design.number === number);
}
