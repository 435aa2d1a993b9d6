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
  const inputs = new Float64Array(evaluator.inputs.length);
  const points = new Int32Array(study.axes.length);
  const metrics = new Float64Array(evaluator.metrics.length);
  const readers = columns.map(reader);

  function reader({ role, name }: ResultColumn): () => number {
    if (role === 'metric') {
      const at = evaluator.metrics.findIndex((metric) => metric.name === name);
      return () => metrics[at];
    }
    if (role === 'option') {
      const axis = study.axes.findIndex((candidate) => candidate.name === name);
      return () => points[axis];
    }
    const at = evaluator.inputs.indexOf(name);
    return () => inputs[at];
  }

  return {
    columns,
    count: search.count,
    evaluate(designNumber, out, at, stride) {
      if (designNumber === 0) {
        inputs.set(evaluator.reference);
        points.fill(-1);
      } else {
        search.inputs(designNumber, inputs, 0);
        search.points(designNumber, points);
      }
      evaluator.evaluate(inputs, 0, metrics, 0);
      for (let k = 0; k < readers.length; k++) out[at + k * stride] = readers[k]();
    },
  };
}

/** The stored columns of a study. */
export function studyColumns(study: Study): ResultColumn[] {
  return resultColumns(study, compileStudy(study, new Set()).metrics);
}
