/** Columns and figures in the words and units people read, the same on charts and in the page. */
import type { ResultColumn } from '../core/evaluate/result-columns.ts';
import type { Study } from '../core/study/study.ts';
import { exactDecimals, formatFigure, formatLimit, formatQuantity, readingDecimals } from '../core/units/format-quantity.ts';
import { fromSi, type Quantity, readingUnit } from '../core/units/units.ts';
import { shortText } from './visible-text.ts';

/** What has a quantity, and decimals for readers of SI: a column, a metric, a parameter. */
export interface Measured {
  readonly quantity: Quantity;
  readonly decimals: number;
}

/** Value of an option column where a design has none of the options: the reference. */
export const noOption = -1;
/** What people read there. */
export const ownFigures = "the study's own";

/** What a column tells: the measure, and the trial it is measured in (null: of the design itself). Study text is not yet made visible. */
export function columnWords(column: Pick<ResultColumn, 'name' | 'label' | 'role'>, study: Study): { measure: string; trial: string | null } {
  const prefix = column.role === 'input' ? 'trials.' : '';
  const trial = column.role === 'option' ? undefined : study.trials.find(({ name }) => column.name.startsWith(`${prefix}${name}.`));
  if (trial === undefined) return { measure: column.label, trial: null };
  // The label has the trial in front: `ramp: grade` of a metric, `ramp.laden` of an input.
  return { measure: column.label.slice(trial.name.length + (column.role === 'metric' ? 2 : 1)), trial: trial.name };
}

/** `battery energy in stops`, on one line and of a bearable length. */
export function columnPhrase(column: ResultColumn, study: Study): string {
  const { measure, trial } = columnWords(column, study);
  return trial === null ? shortText(measure, 60) : `${shortText(measure, 40)} in ${shortText(trial, 40)}`;
}

/** The first letter in upper case. */
export function capitalised(text: string): string {
  return text.slice(0, 1).toUpperCase() + text.slice(1);
}

/** Symbol of the unit people read, the currency for money and in front of `/kW`; empty for pure numbers. */
export function unitWord(quantity: Quantity, study: Study): string {
  const { symbol } = readingUnit(quantity, study.report.units);
  return quantity === 'money' || symbol.startsWith('/') ? `${shortText(study.currency ?? '', 12)}${symbol}` : symbol;
}

/** A figure with its unit; a dash where it does not exist. */
export function figureText(value: number | null, measured: Measured, study: Study): string {
  if (value === null || Number.isNaN(value)) return '—';
  return withCurrency(formatQuantity(value, measured.quantity, { decimals: measured.decimals, system: study.report.units }), measured.quantity, study);
}

/** Adds the currency to a figure that is money, or money per something. */
export function withCurrency(text: string, quantity: Quantity, study: Study): string {
  const { symbol } = readingUnit(quantity, study.report.units);
  const unit = unitWord(quantity, study);
  if (unit === symbol) return text;
  return symbol === '' ? `${text}\u202f${unit}` : `${text.slice(0, -symbol.length)}${unit}`;
}

/** A value of a column: the option's name, or a figure with its unit; an input in no more decimals than it needs. */
export function valueText(value: number | null, column: ResultColumn, study: Study): string {
  if (column.labels !== null) return optionText(value, column.labels, 60);
  return column.role === 'metric' ? figureText(value, column, study) : inputText(value, column, study);
}

/** An option by its name, cut to a length; the reference has the study's own figures instead. */
export function optionText(value: number | null, labels: readonly string[], longest: number): string {
  return shortText(labels[value ?? Number.NaN] ?? ownFigures, longest);
}

/** A number of the study in no more decimals than it needs, and never more than are usual for it. */
export function inputText(value: number | null, measured: Measured, study: Study): string {
  if (value === null || Number.isNaN(value)) return '—';
  return withUnit(figureAlone(value, measured, neededDecimals(value, measured, study), study), measured, study);
}

/** A figure without its unit, in a number of decimals of the unit people read. */
export function figureAlone(value: number, { quantity }: Measured, decimals: number, study: Study): string {
  return formatFigure(fromSi(value, readingUnit(quantity, study.report.units)), decimals);
}

/** A figure and its unit, held together. */
export function withUnit(figure: string, { quantity }: Measured, study: Study): string {
  const unit = unitWord(quantity, study);
  return unit === '' ? figure : `${figure}\u202f${unit}`;
}

/** A number as its study gives it or as a limit: every decimal it was written with. */
export function givenText(value: number, { quantity, decimals }: Measured, study: Study): string {
  return withCurrency(formatLimit(value, quantity, { decimals, system: study.report.units }), quantity, study);
}

/** The fewest decimals, in the unit people read, that show a value exactly, to twelve digits; never more than are usual for it. */
export function neededDecimals(value: number, { quantity, decimals }: Measured, study: Study): number {
  const usual = readingDecimals(decimals, quantity, study.report.units);
  return exactDecimals(fromSi(value, readingUnit(quantity, study.report.units)), usual) ?? usual;
}

/** The size of a difference between two SI values, in decimals enough that a difference never reads as none; percentages differ by %-points. */
export function differenceText(difference: number, measured: Measured, study: Study): string {
  const unit = unitWord(measured.quantity, study);
  const figure = differenceFigure(difference, measured, study);
  return unit === '' ? figure : `${figure}\u202f${unit === '%' ? '%-points' : unit}`;
}

/** The same without its unit, for a place beside the value itself. */
export function differenceFigure(difference: number, { quantity, decimals }: Measured, study: Study): string {
  const unit = readingUnit(quantity, study.report.units);
  const size = Math.abs((difference * unit.divisor) / unit.factor);
  const usual = readingDecimals(decimals, quantity, study.report.units);
  return size !== 0 && Number(size.toFixed(usual)) === 0 ? size.toPrecision(1) : formatFigure(size, usual);
}

/** A value in the unit people read, as a plain number; for options the index. */
export function readingValue(value: number, column: ResultColumn, study: Study): number {
  return column.labels === null ? fromSi(value, readingUnit(column.quantity, study.report.units)) : value;
}
