/** What is timed. */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readdirSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { FrontFilter } from '../../src/core/front/front-filter.ts';
import { createDesignEvaluator, studyColumns } from '../../src/core/search/evaluate-designs.ts';
import { runCycle } from '../../src/core/trials/cycle.ts';
import { evaluateInThreads } from '../../src/run/design-pool.ts';
import { runStudy } from '../../src/run/run-study.ts';
import { randomStream } from '../core/front/oracles.ts';
import type { KernelBench } from './kernel-bench.ts';
import { ratesInTurns, ratios, type Spread, spreadOf, type Work, wallSeconds } from './measure.ts';
import { drivePlainly } from './plain-cycle.ts';
import type { Workload } from './workloads.ts';

/** How much of everything. */
export interface Thoroughness {
  readonly rounds: number;
  /** Designs a round. */
  readonly designs: number;
  readonly poolDesigns: number;
  readonly poolRounds: number;
  readonly frontPoints: number;
  readonly frontRounds: number;
  readonly runRounds: number;
}

export interface Measure extends Spread {
  readonly name: string;
  readonly unit: string;
}

const threadUrl = new URL('./thread.js', import.meta.url);

function measure(name: string, unit: string, values: readonly number[]): Measure {
  return { name, unit, ...spreadOf(values) };
}

/** Kernel and plain loop in turns, and what the account of a cycle adds. */
export function kernelMeasures({ vehicles, cycle, trace, result, sums }: KernelBench, { rounds }: Thoroughness): Measure[] {
  const works: Record<string, Work> = {
    plain: () => {
      for (const vehicle of vehicles) drivePlainly(vehicle, trace, sums);
      return vehicles.length;
    },
    kernel: () => {
      for (const vehicle of vehicles) runCycle(vehicle, cycle, result, false);
      return vehicles.length;
    },
    account: () => {
      for (const vehicle of vehicles) runCycle(vehicle, cycle, result, true);
      return vehicles.length;
    },
  };
  const { plain, kernel, account } = ratesInTurns(works, rounds);
  return [
    measure('plain loop in the order of the trace', 'cycles/s', plain),
    measure('kernel', 'cycles/s', kernel),
    measure('kernel with the whole account', 'cycles/s', account),
    measure('kernel over plain loop', '×', ratios(kernel, plain)),
  ];
}

/** Whole evaluations of the stored columns, from number to row; each study in a process of its own, as a thread of a run knows one study only. */
export function evaluationMeasures(workloads: readonly Workload[], { rounds, designs }: Thoroughness): Measure[] {
  return workloads.map(({ name }) => {
    const told = execFileSync(process.execPath, [fileURLToPath(new URL('./bench.js', import.meta.url)), '--evaluate', name, String(rounds), String(designs)]);
    return measure(name, 'designs/s', JSON.parse(told.toString('utf8')) as number[]);
  });
}

/** What such a process does: rates, one a round. */
export function evaluationRates({ study }: Workload, rounds: number, designs: number): number[] {
  return ratesInTurns({ evaluate: evaluateSome(study, designs) }, rounds).evaluate;
}

/** Evaluates so many designs a call, the same from all over the search. */
function evaluateSome(study: Workload['study'], designs: number): Work {
  const columns = studyColumns(study);
  const evaluator = createDesignEvaluator(study, columns);
  const row = new Float64Array(columns.length);
  return () => {
    for (let i = 0; i < designs; i++) evaluator.evaluate(1 + ((i * 104_729) % evaluator.count), row, 0, 1);
    return designs;
  };
}

/** One and two threads in turns, by the clock, nothing stored. */
export async function poolMeasures({ study }: Workload, { poolDesigns, poolRounds }: Thoroughness): Promise<Measure[]> {
  const rates: [number[], number[]] = [[], []];
  for (let round = 0; round < poolRounds; round++) {
    for (const workers of [1, 2] as const) rates[workers - 1].push(await poolRate(study, poolDesigns, workers));
  }
  return [
    measure('1 worker', 'designs/s', rates[0]),
    measure('2 workers', 'designs/s', rates[1]),
    measure('2 workers over 1', '×', ratios(rates[1], rates[0])),
  ];
}

/** The first half of the designs warms the threads up and does not count. */
async function poolRate(study: Workload['study'], designs: number, workers: number): Promise<number> {
  const warmUp = designs / 2;
  let started = Number.NaN;
  let counted = 0;
  for await (const { first, count } of evaluateInThreads({ study, columns: studyColumns(study) }, designs, workers, threadUrl)) {
    if (first > warmUp) counted += count;
    else started = wallSeconds();
  }
  return counted / (wallSeconds() - started);
}

/** Points above a curved front in four objectives, in batches as they come from threads; the nearer they lie to it, the larger it is. */
export function frontMeasures({ frontPoints, frontRounds }: Thoroughness): Measure[] {
  const width = 4;
  const [few, many] = [curvedPoints(frontPoints, width, 9), curvedPoints(frontPoints, width, 0.35)];
  const sizes = { few: 0, many: 0 };
  const works: Record<string, Work> = {
    few: () => {
      sizes.few = frontSize(few, frontPoints);
      return 1;
    },
    many: () => {
      sizes.many = frontSize(many, frontPoints);
      return 1;
    },
  };
  const rates = ratesInTurns(works, frontRounds);
  const told = (size: number) => `${frontPoints.toLocaleString('en')} designs, ${width} objectives, front of ${size.toLocaleString('en')}`;
  const seconds = (values: readonly number[]) => values.map((rate) => 1 / rate);
  return [measure(told(sizes.few), 's', seconds(rates.few)), measure(told(sizes.many), 's', seconds(rates.many))];
}

function frontSize(columns: readonly Float64Array[], points: number): number {
  const batch = 1000;
  const feasible = new Uint8Array(batch).fill(1);
  const filter = new FrontFilter(columns.length);
  for (let from = 0; from < points; from += batch) {
    const count = Math.min(batch, points - from);
    const numbers = Float64Array.from({ length: count }, (_, i) => from + i);
    const objectives = columns.map((column) => column.subarray(from, from + count));
    filter.add(count, numbers, objectives, feasible);
  }
  return filter.size;
}

/** Directions all over the positive orthant, each at a distance from 1 up to 1 + `depth`. */
function curvedPoints(count: number, width: number, depth: number): Float64Array[] {
  const random = randomStream(5);
  const columns = Array.from({ length: width }, () => new Float64Array(count));
  for (let i = 0; i < count; i++) {
    let square = 0;
    for (const column of columns) {
      column[i] = random() + random() + random();
      square += column[i] * column[i];
    }
    const away = 1 + depth * random();
    for (const column of columns) column[i] *= away / Math.sqrt(square);
  }
  return columns;
}

/** Evaluate, store and front; by the clock, with two workers. */
export async function runMeasures({ name, text, study }: Workload, { runRounds }: Thoroughness): Promise<Measure[]> {
  const folder = mkdtempSync(join(tmpdir(), 'bench-'));
  const [rates, whole, sizes]: [number[], number[], number[]] = [[], [], []];
  try {
    for (let round = 0; round < runRounds; round++) {
      const outFolder = join(folder, String(round));
      const started = wallSeconds();
      let evaluated = Number.NaN;
      const { report } = await runStudy({
        study,
        studyFile: 'workload.yaml',
        studyText: text,
        digests: [],
        warnings: [],
        outFolder,
        workers: 2,
        version: 'bench',
        threadUrl,
        renderReport: () => '',
        onProgress: ({ done, total }) => {
          if (done === total) evaluated = wallSeconds();
        },
      });
      rates.push(report.counts.designs / (evaluated - started));
      whole.push(wallSeconds() - started);
      const parts = join(outFolder, 'designs');
      sizes.push(readdirSync(parts).reduce((sum, part) => sum + statSync(join(parts, part)).size, 0) / report.counts.designs);
      rmSync(outFolder, { recursive: true });
    }
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
  return [
    measure(`${name}: evaluate, store, front; 2 workers`, 'designs/s', rates),
    measure('the same with warnings, charts and tables', 's', whole),
    measure('stored on disk', 'bytes/design', sizes),
    measure('peak memory', 'MB', [process.resourceUsage().maxRSS / 1024]),
  ];
}
