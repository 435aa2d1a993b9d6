/** One design in full, computed on the spot: what the command line's sheet and the report's page show, to the same bits. */
import { compileStudy } from '../evaluate/compile.ts';
import { type LimitWord, limitWords } from '../evaluate/evaluator.ts';
import { machineValue } from '../evaluate/result-columns.ts';
import { type MetricColumn, machineKey } from '../study/catalogue/metrics.ts';
import { findParameter, type ParameterRow } from '../study/catalogue/parameters.ts';
import type { OptionChoice } from '../study/read-setting.ts';
import type { Axis, Study } from '../study/study.ts';
import { createSearch } from './search.ts';

/** A figure set for one computation, SI. */
export interface Setting {
  readonly name: string;
  readonly value: number;
}

/** A number of the design (SI); or the choice among named options, none in the reference design (null); or a file that an option brings. */
export type DesignInput =
  | { readonly name: string; readonly row: ParameterRow; readonly value: number }
  | { readonly name: string; readonly row: null; readonly option: string | null };

/** One metric, SI; NaN where it does not exist. `limit` says what limits it or why there is none; empty where nothing is to say. */
export interface DesignMetric {
  readonly column: MetricColumn;
  readonly value: number;
  readonly limit: LimitWord;
}

/** A design and everything it is judged by. */
export interface ComputedDesign {
  readonly number: number;
  /** Options chosen, varied and set numbers; every number of a study that varies none where none is set. */
  readonly inputs: readonly DesignInput[];
  readonly metrics: readonly DesignMetric[];
}

/** The same as machine output: keys with units, null where there is no value, limits only where there is one. */
export interface MachineSheet {
  readonly inputs: Readonly<Record<string, number | string | null>>;
  readonly metrics: Readonly<Record<string, number | null>>;
  readonly limits: Readonly<Record<string, string>>;
}

/** Computes designs of one study. */
export interface DesignBench {
  /** Numbers from 0, the reference, to this one exist. */
  readonly last: number;
  /**
   * Null where there is no design of that number. Settings are figures that the study holds already; given here too, they go
   * before the design's own and are told among the inputs. Options chosen go before the design's, and settings before them.
   */
  compute(number: number, settings?: readonly Setting[], choices?: readonly OptionChoice[]): ComputedDesign | null;
}

/** Compiles the study once; each design afterwards takes milliseconds. */
export function createBench(study: Study): DesignBench {
  const evaluator = compileStudy(study);
  const search = createSearch(study);
  const points = new Int32Array(study.axes.length);
  const metrics = new Float64Array(evaluator.metrics.length);
  const limits = new Uint8Array(evaluator.metrics.length);

  function inputsOf(row: Float64Array, settings: readonly Setting[]): DesignInput[] {
    const varied = study.axes.flatMap(({ name, sets, labels }, axis): DesignInput[] => [
      ...(labels === null ? [] : [{ name, row: null, option: labels[points[axis] as number] ?? null }]),
      ...sets.flatMap((set) => inputOf(set, row[evaluator.inputs.indexOf(set)] as number)),
    ]);
    const set = settings.filter(({ name }) => !evaluator.inputs.includes(name)).flatMap(({ name, value }) => numberInput(name, value));
    if (varied.length + set.length > 0) return [...varied, ...set];
    return Object.entries(study.values).flatMap(([name, value]) => numberInput(name, value));
  }

  /** A measured curve or map that an option brings is told by its file. */
  function inputOf(name: string, value: number): DesignInput[] {
    const files = name === 'motor.fullLoad' ? study.optionCurves : name === 'motor.map' ? study.optionMaps : null;
    if (files === null) return numberInput(name, value);
    return Number.isNaN(value) ? [] : [{ name, row: null, option: files[value]?.file ?? null }];
  }

  function choose(row: Float64Array, list: string, point: number): void {
    const axis = study.axes.findIndex(({ name }) => name === list);
    const { sets, points: all } = study.axes[axis] as Axis;
    for (const [k, set] of sets.entries()) row[evaluator.inputs.indexOf(set)] = all[point]?.[k] as number;
    points[axis] = point;
  }

  return {
    last: search.count,
    compute(number, settings = [], choices = []) {
      if (!Number.isInteger(number) || number < 0 || number > search.count) return null;
      const row = Float64Array.from(evaluator.reference);
      points.fill(-1);
      if (number > 0) {
        search.inputs(number, row, 0);
        search.points(number, points);
      }
      for (const { list, point } of choices) choose(row, list, point);
      for (const { name, value } of settings) if (evaluator.inputs.includes(name)) row[evaluator.inputs.indexOf(name)] = value;
      evaluator.evaluate(row, 0, metrics, 0, limits);
      return {
        number,
        inputs: inputsOf(row, settings),
        metrics: evaluator.metrics.map((column, at) => ({ column, value: metrics[at] as number, limit: limitWords[limits[at] as number] as LimitWord })),
      };
    },
  };
}

/** Nothing for a number that plays no part in the design. */
function numberInput(name: string, value: number): DesignInput[] {
  const row = findParameter(name);
  return row === undefined || Number.isNaN(value) ? [] : [{ name, row, value }];
}

/** A computed design under the keys of machine output. */
export function machineSheet({ inputs, metrics }: ComputedDesign): MachineSheet {
  return {
    inputs: Object.fromEntries(inputs.map((input) => (input.row === null ? [input.name, input.option] : machineNumber(input.row, input.name, input.value)))),
    metrics: Object.fromEntries(
      metrics.map(({ column, value }) => [column.key, machineValue({ role: 'metric', quantity: column.row.quantity, labels: null }, value) as number | null]),
    ),
    limits: Object.fromEntries(metrics.filter(({ limit }) => limit !== '').map(({ column, limit }) => [column.key, limit])),
  };
}

function machineNumber({ quantity }: ParameterRow, name: string, value: number): [string, number | string | null] {
  return [machineKey(name, quantity), machineValue({ role: 'input', quantity, labels: null }, value)];
}
