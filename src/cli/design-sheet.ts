/** One design evaluated for a sheet: the reference, a design of the search, or either with figures of its own. */
import { compileStudy } from '../core/evaluate/compile.ts';
import { type LimitWord, limitWords } from '../core/evaluate/evaluator.ts';
import { createSearch } from '../core/search/search.ts';
import { type MetricColumn, machineKey } from '../core/study/metrics.ts';
import { findParameter, type ParameterRow } from '../core/study/parameters.ts';
import type { Study } from '../core/study/study.ts';
import type { Quantity } from '../core/units/units.ts';
import { fromSi, machineUnit } from '../core/units/units.ts';

/** A figure that a person sets for one sheet, SI. */
export interface Setting {
  readonly name: string;
  readonly value: number;
}

/** One input of the design, SI. */
export interface SheetInput extends Setting {
  readonly quantity: Quantity;
  readonly decimals: number;
}

/** One metric of the design, SI; NaN where it does not exist. */
export interface SheetMetric {
  readonly column: MetricColumn;
  readonly value: number;
  /** What limits it, or why it does not exist; empty where there is nothing to say. */
  readonly limit: LimitWord;
}

/** A design and everything it is judged by. */
export interface DesignSheet {
  readonly study: Study;
  /** 0: the reference design. */
  readonly number: number;
  readonly settings: readonly Setting[];
  /** Varied and set numbers; every number of the study where it varies none and none is set. */
  readonly inputs: readonly SheetInput[];
  readonly metrics: readonly SheetMetric[];
}

/**
 * Evaluates a design of a study that already holds the settings; where one sets a varied number it goes before the design's own.
 * Throws a RangeError where the search has no design of that number.
 */
export function designSheet(study: Study, number: number, settings: readonly Setting[]): DesignSheet {
  const evaluator = compileStudy(study);
  const row = Float64Array.from(evaluator.reference);
  if (number > 0) createSearch(study).inputs(number, row, 0);
  for (const [at, name] of evaluator.inputs.entries()) row[at] = settings.find((setting) => setting.name === name)?.value ?? row[at];
  const values = new Float64Array(evaluator.metrics.length);
  const limits = new Uint8Array(values.length);
  evaluator.evaluate(row, 0, values, 0, limits);
  return {
    study,
    number,
    settings,
    inputs: sheetInputs(study, evaluator.inputs, row, settings),
    metrics: evaluator.metrics.map((column, at) => ({
      column,
      value: values[at] as number,
      limit: limitWords[limits[at] as number] as LimitWord,
    })),
  };
}

function sheetInputs(study: Study, varied: readonly string[], row: Float64Array, settings: readonly Setting[]): SheetInput[] {
  const set = settings.filter(({ name }) => !varied.includes(name));
  if (varied.length === 0 && set.length === 0) return everyNumber(study);
  return [...varied.map((name, at) => sheetInput(name, row[at] as number)), ...set.map(({ name, value }) => sheetInput(name, value))];
}

function everyNumber(study: Study): SheetInput[] {
  return Object.entries(study.values).map(([name, value]) => sheetInput(name, value));
}

function sheetInput(name: string, value: number): SheetInput {
  const { quantity, decimals } = findParameter(name) as ParameterRow;
  return { name, value, quantity, decimals };
}

/** The sheet for programs: keys carry units, a metric that does not exist is null, limits only where there is one. */
export function sheetJson(sheet: DesignSheet): { inputs: Record<string, number>; metrics: Record<string, number | null>; limits: Record<string, string> } {
  return {
    inputs: Object.fromEntries(sheet.inputs.map(({ name, value, quantity }) => [machineKey(name, quantity), fromSi(value, machineUnit(quantity))])),
    metrics: Object.fromEntries(sheet.metrics.map(({ column, value }) => [column.key, machineValue(column, value)])),
    limits: Object.fromEntries(sheet.metrics.filter(({ limit }) => limit !== '').map(({ column, limit }) => [column.key, limit])),
  };
}

function machineValue(column: MetricColumn, value: number): number | null {
  return Number.isNaN(value) ? null : fromSi(value, machineUnit(column.row.quantity));
}
