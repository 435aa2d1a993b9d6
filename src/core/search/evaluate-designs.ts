/** Designs by number to rows of results: what a thread does all day, and how a run looks single designs up again. */
import { compileStudy } from '../evaluate/compile.ts';
import { type ResultColumn, resultColumns } from '../evaluate/result-columns.ts';
import type { Study } from '../study/study.ts';
import { createSearch } from './search.ts';

/** Evaluates the stored columns of a study's designs. Not shared between threads. */
export interface DesignEvaluator {
  readonly columns: readonly ResultColumn[];
  /** Designs 1…count exist beside the reference, 0. */
  readonly count: number;
  /** Writes one design's columns (SI; NaN: does not exist; option columns: index of the point) to `out[at + k × stride]` for column k. */
  evaluate(designNumber: number, out: Float64Array, at: number, stride: number): void;
}

/** Compiles a study for its stored columns only; the same bits as a full evaluation. */
export function createDesignEvaluator(study: Study, columns: readonly ResultColumn[]): DesignEvaluator {
  const evaluator = compileStudy(study, new Set(columns.filter(({ role }) => role === 'metric').map(({ name }) => name)));
  const search = createSearch(study);
  // One row: inputs, points on the axes, metrics.
  const pointsAt = evaluator.inputs.length;
  const metricsAt = pointsAt + study.axes.length;
  const row = new Float64Array(metricsAt + evaluator.metrics.length);
  const points = new Int32Array(study.axes.length);
  const hasOptions = columns.some(({ role }) => role === 'option');
  const places = Int32Array.from(columns, placeOf);

  function placeOf({ role, name }: ResultColumn): number {
    if (role === 'metric') return metricsAt + evaluator.metrics.findIndex((metric) => metric.name === name);
    return role === 'option' ? pointsAt + study.axes.findIndex((axis) => axis.name === name) : evaluator.inputs.indexOf(name);
  }

  return {
    columns,
    count: search.count,
    evaluate(designNumber, out, at, stride) {
      if (designNumber === 0) {
        row.set(evaluator.reference);
        points.fill(-1);
      } else {
        search.inputs(designNumber, row, 0);
        if (hasOptions) search.points(designNumber, points);
      }
      row.set(points, pointsAt);
      evaluator.evaluate(row, 0, row, metricsAt);
      for (let k = 0; k < places.length; k++) out[at + k * stride] = row[places[k]];
    },
  };
}

/** The stored columns of a study. */
export function studyColumns(study: Study): ResultColumn[] {
  return resultColumns(study, compileStudy(study, new Set()).metrics);
}
