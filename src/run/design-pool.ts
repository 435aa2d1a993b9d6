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

/** Tasks that a thread has in hand: it goes on with them while the main thread writes a part, for a tenth of a second or so. */
const tasksInHand = 4;

/** Evaluates designs 1…count; batches come in the order of design numbers, whatever the threads do. Throws RunProblem. */
export async function* evaluateInThreads(data: ThreadData, count: number, workers: number, threadUrl: URL): AsyncGenerator<DesignBatch> {
  const pool = new Piscina({ filename: threadUrl.href, workerData: data, minThreads: workers, maxThreads: workers, concurrentTasksPerWorker: tasksInHand });
  let lost: unknown = null;
  // A thread that fails with no task in hand tells only the pool, which starts no other in its place: what is queued would wait for ever.
  pool.on('error', (error) => {
    lost ??= error;
    void pool.destroy();
  });
  const tasks = tasksOf(count);
  // No more in flight than the threads have in hand: memory stays flat while the oldest is awaited.
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
    for (let k = 0; k < workers * tasksInHand; k++) startNext();
    for (let oldest = inFlight.shift(); oldest !== undefined; oldest = inFlight.shift()) {
      const { task } = oldest;
      const done = await oldest.result.catch((error: unknown) => {
        throw threadProblem(task, inFlight.at(-1)?.task ?? task, lost ?? error);
      });
      if (lost !== null) throw threadProblem(task, inFlight.at(-1)?.task ?? task, lost);
      const batch = batchOf(task, done, data.columns.length);
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

/** Which of the tasks in flight the thread had begun nobody can tell. */
function threadProblem(oldest: DesignTask, newest: DesignTask, cause: unknown): RunProblem {
  const reason = cause instanceof Error ? cause.message : String(cause);
  const message = `A worker thread stopped somewhere in designs ${oldest.first} to ${newest.first + newest.count - 1}: ${reason}`;
  return new RunProblem(message, 'Run again, with fewer --workers where memory is short.', { cause });
}

function batchOf(task: DesignTask, result: TaskResult, width: number): DesignBatch {
  if ('fault' in result) throw new Error(`design ${result.designNumber}: ${result.fault}`);
  return { ...task, columns: Array.from({ length: width }, (_, k) => result.subarray(k * task.count, (k + 1) * task.count)) };
}
