/** The core at work in the page: any design of the study, computed on the spot from the embedded study. */
import { compileStudy } from '../core/evaluate/compile.ts';
import { type LimitWord, limitWords } from '../core/evaluate/evaluator.ts';
import { createSearch } from '../core/search/search.ts';
import { type MetricColumn, machineKey } from '../core/study/metrics.ts';
import { findParameter } from '../core/study/parameters.ts';
import type { Study } from '../core/study/study.ts';
import { fromSi, machineUnit } from '../core/units/units.ts';

/** A design computed: inputs and metrics in SI, NaN where a metric does not exist, and what limits each. */
export interface ComputedDesign {
  readonly number: number;
  readonly inputs: readonly { readonly name: string; readonly value: number }[];
  readonly metrics: readonly { readonly column: MetricColumn; readonly value: number; readonly limit: LimitWord }[];
}

/** The same as machine output: keys with units, null where a metric does not exist, limits only where there is one. */
export interface MachineSheet {
  readonly inputs: Readonly<Record<string, number>>;
  readonly metrics: Readonly<Record<string, number | null>>;
  readonly limits: Readonly<Record<string, string>>;
}

/** Computes designs of one study. */
export interface DesignBench {
  /** Numbers from 0, the reference, to this one exist. */
  readonly last: number;
  /** Null where there is no design of that number. */
  compute(number: number): ComputedDesign | null;
}

/** Compiles the study once; each design afterwards takes milliseconds. */
export function createBench(study: Study): DesignBench {
  const evaluator = compileStudy(study);
  const search = createSearch(study);
  const metrics = new Float64Array(evaluator.metrics.length);
  const limits = new Uint8Array(evaluator.metrics.length);
  return {
    last: search.count,
    compute(number) {
      if (!Number.isInteger(number) || number < 0 || number > search.count) return null;
      const row = Float64Array.from(evaluator.reference);
      if (number > 0) search.inputs(number, row, 0);
      evaluator.evaluate(row, 0, metrics, 0, limits);
      return {
        number,
        inputs: evaluator.inputs.map((name, at) => ({ name, value: row[at] as number })),
        metrics: evaluator.metrics.map((column, at) => ({ column, value: metrics[at] as number, limit: limitWords[limits[at] as number] as LimitWord })),
      };
    },
  };
}

/** A computed design under the keys of machine output; without varied inputs every number of the study is one. */
export function machineSheet(design: ComputedDesign, study: Study): MachineSheet {
  const inputs = design.inputs.length > 0 ? design.inputs : Object.entries(study.values).map(([name, value]) => ({ name, value }));
  return {
    inputs: Object.fromEntries(
      inputs.map(({ name, value }) => {
        const quantity = findParameter(name)?.quantity ?? 'number';
        return [machineKey(name, quantity), fromSi(value, machineUnit(quantity))];
      }),
    ),
    metrics: Object.fromEntries(
      design.metrics.map(({ column, value }) => [column.key, Number.isNaN(value) ? null : fromSi(value, machineUnit(column.row.quantity))]),
    ),
    limits: Object.fromEntries(design.metrics.filter(({ limit }) => limit !== '').map(({ column, limit }) => [column.key, limit])),
  };
}
