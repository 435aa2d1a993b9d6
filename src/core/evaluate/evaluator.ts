/** What evaluates designs: a study compiled once, then rows of inputs to rows of metrics. */
import type { MetricColumn } from '../study/catalogue/metrics.ts';

/** Why a metric is what it is, or does not exist; stored as its index. */
export const limitWords = [
  '',
  'adhesion',
  'battery power',
  'motor speed',
  'motor torque',
  'motor power',
  'beyond 45°',
  'too heavy',
  'base speed above maximum speed',
] as const;
/** One of the limit words. */
export type LimitWord = (typeof limitWords)[number];

/** A compiled study. Not safe to share between threads; each host compiles its own. */
export interface Evaluator {
  /** Dotted names of the numbers a design sets, in the order of an input row. */
  readonly inputs: readonly string[];
  /** Columns of a metric row. */
  readonly metrics: readonly MetricColumn[];
  /** The study's own figures as an input row, SI: design 0. */
  readonly reference: Float64Array;
  /**
   * One design: `inputs[inputAt…]` (SI) to `metrics[metricAt…]` (SI; NaN: does not exist) and, where given,
   * `limits[metricAt…]` (index into limitWords). Never throws for a design's own outcome.
   */
  evaluate(inputs: Float64Array, inputAt: number, metrics: Float64Array, metricAt: number, limits?: Uint8Array): void;
}
