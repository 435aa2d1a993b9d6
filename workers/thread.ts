/** The thread: compiles the study it was started with once, then evaluates ranges of design numbers into columns. */
import { move, workerData } from 'piscina';
import { createDesignEvaluator, type DesignEvaluator } from '../src/core/search/evaluate-designs.ts';
import type { DesignTask, TaskResult, ThreadData } from '../src/run/design-pool.ts';

const { study, columns } = workerData as ThreadData;
let evaluator: DesignEvaluator | null = null;

/** One task: designs first…first + count − 1 to column-major values, or the fault that stopped it, with the design it stopped at. */
export default function evaluateTask({ first, count }: DesignTask): TaskResult {
  let at = 0;
  try {
    evaluator ??= createDesignEvaluator(study, columns);
    const values = new Float64Array(count * columns.length);
    for (; at < count; at++) evaluator.evaluate(first + at, values, at, count);
    return move(values) as unknown as Float64Array;
  } catch (error) {
    // A custom error would lose its fields on the way to the main thread.
    return { fault: error instanceof Error ? (error.stack ?? error.message) : String(error), designNumber: first + at };
  }
}
