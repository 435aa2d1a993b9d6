/** A pool of threads that evaluates ranges of designs and hands the results back in order. */
import { Piscina } from 'piscina';
import type { ResultColumn } from '../core/evaluate/result-columns.ts';
import type { Study } from '../core/study/study.ts';
import { RunProblem } from './run-problem.ts';

/** What a thread is started with. */
export interface ThreadData {
  readonly study: Study;
  readonly columns: readonly ResultColumn[];
}

/** Designs first…first + count − 1. */
export interface DesignTask {
  readonly first: number;
  readonly count: number;
}

/** Column-major values, moved over: column k of design i at `k × count + i`; or a fault of ours at one design. */
export type TaskResult = Float64Array | { readonly fault: string; readonly designNumber: number };

/** Results of one task. */
export interface DesignBatch extends DesignTask {
  /** One array per column, SI. */
  readonly columns: readonly Float64Array[];
}

/** Designs per task: tens of milliseconds of work, so that handing over costs nothing and progress moves. */
export const designsPerTask = 1_000;

/** Evaluates designs 1…count; batches come in the order of design numbers, whatever the threads do. Throws RunProblem. */
export async function* evaluateInThreads(data: ThreadData, count: number, workers: number, threadUrl: URL): AsyncGenerator<DesignBatch> {
  const pool = new Piscina({ filename: threadUrl.href, workerData: data, minThreads: workers, maxThreads: workers, concurrentTasksPerWorker: 1 });
  const tasks = tasksOf(count);
  // Two tasks a thread in flight keep every thread busy while the oldest is awaited, and memory flat.
  const inFlight: { task: DesignTask; result: Promise<TaskResult> }[] = [];
  const startNext = (): void => {
    const { value: task } = tasks.next();
    if (task === undefined) return;
    const result = pool.run(task) as Promise<TaskResult>;
    // A later task may fail while an earlier one is awaited; its turn to be reported comes.
    result.catch(() => undefined);
    inFlight.push({ task, result });
  };
  try {
    for (let k = 0; k < workers * 2; k++) startNext();
    for (let oldest = inFlight.shift(); oldest !== undefined; oldest = inFlight.shift()) {
      const batch = await awaitBatch(oldest.task, oldest.result, data.columns.length);
      startNext();
      yield batch;
    }
  } finally {
    await pool.destroy();
  }
}

function* tasksOf(count: number): Generator<DesignTask, undefined> {
  for (let first = 1; first <= count; first += designsPerTask) yield { first, count: Math.min(designsPerTask, count - first + 1) };
  return undefined;
}

async function awaitBatch(task: DesignTask, result: Promise<TaskResult>, width: number): Promise<DesignBatch> {
  const done = await result.catch((error: unknown) => {
    const reason = error instanceof Error ? error.message : String(error);
    throw new RunProblem(
      `A worker thread stopped at designs ${task.first} to ${task.first + task.count - 1}: ${reason}`,
      'Run again, with fewer --workers where memory is short.',
      {
        cause: error,
      },
    );
  });
  if ('fault' in done) throw new Error(`design ${done.designNumber}: ${done.fault}`);
  const columns = Array.from({ length: width }, (_, k) => done.subarray(k * task.count, (k + 1) * task.count));
  return { ...task, columns };
}
