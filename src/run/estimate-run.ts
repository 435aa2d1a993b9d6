/** What a run would cost and bring, from a small sample: for `check`. */
import { availableParallelism } from 'node:os';
import { createDesignEvaluator, studyColumns } from '../core/search/evaluate-designs.ts';
import type { Study } from '../core/study/study.ts';
import { sampleNumbers } from './design-sample.ts';
import { PartRows, partBytes } from './part-file.ts';
import { proposalsOf, proposedDesigns, requirementsSeen } from './report-account.ts';
import type { ResultsSeen } from './result-warnings.ts';
import { RunAccount } from './run-account.ts';

/** Designs in the sample, at most, the time spent on it, at most, and then on measuring. */
const sampleDesigns = 400;
const sampleMs = 2_000;
const steadyMs = 600;
/** Seconds for starting the threads, the charts and the report. */
const aroundS = 1.5;
/** Bytes that a run writes beside its parts: report, charts, front. */
const besidesBytes = 2_000_000;

/** An estimate; times in s, sizes in bytes. */
export interface RunEstimate {
  readonly designs: number;
  readonly sampled: number;
  readonly feasible: number;
  readonly secondsPerDesign: number;
  readonly workers: number;
  /** With that many workers, start-up included. */
  readonly seconds: number;
  readonly bytes: number;
  /** Per requirement of the study: sampled designs that miss it. */
  readonly failing: readonly number[];
  /** For the warnings that results give. */
  readonly seen: ResultsSeen;
}

/** Evaluates a sample spread over all design numbers by hash, in this thread. */
export function estimateRun(study: Study, workers = availableParallelism()): RunEstimate {
  const columns = studyColumns(study);
  const designs = createDesignEvaluator(study, columns);
  const account = new RunAccount(study, columns);
  const numbers = sampleNumbers(designs.count, sampleDesigns);
  const rows = new PartRows(numbers.length, columns.length);
  const row = new Float64Array(columns.length);
  const began = performance.now();
  let sampled = 0;
  for (const number of numbers) {
    designs.evaluate(number, row, 0, 1);
    const single = columns.map((_, k) => row.subarray(k, k + 1));
    rows.append(number, 0, 1, single, account.add(number, 1, single));
    sampled++;
    if (performance.now() - began > sampleMs) break;
  }
  const secondsPerDesign = steadySeconds(numbers.slice(0, sampled), (number) => designs.evaluate(number, row, 0, 1));
  const bytesPerDesign = partBytes(rows, columns).length / sampled;
  const requirements = requirementsSeen(account, designs.count);
  return {
    designs: designs.count,
    sampled,
    feasible: account.feasible,
    secondsPerDesign,
    workers,
    seconds: aroundS + (secondsPerDesign * designs.count) / workers,
    bytes: Math.ceil(bytesPerDesign * designs.count) + besidesBytes,
    failing: requirements.failing,
    seen: { requirements, proposals: requirements.whole ? proposedDesigns(proposalsOf(study, account.filter.front()), designs) : null },
  };
}

/** Seconds per design once the compiler has done its work, as in a run: the median pass over the sample until the time is up. */
function steadySeconds(numbers: readonly number[], evaluate: (number: number) => void): number {
  const passes: number[] = [];
  for (const end = performance.now() + steadyMs; performance.now() < end; ) {
    const began = performance.now();
    for (const number of numbers) evaluate(number);
    passes.push((performance.now() - began) / 1000 / numbers.length);
  }
  return passes.sort((a, b) => a - b)[passes.length >> 1];
}
