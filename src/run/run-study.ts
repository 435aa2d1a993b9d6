/** A run from first to last: every design evaluated, stored and counted; then front, charts and report. */
import { chartFiles } from '../charts/chart-files.ts';
import type { ReportData } from '../charts/report-data.ts';
import { machineValue } from '../core/evaluate/result-columns.ts';
import { createDesignEvaluator, studyColumns } from '../core/search/evaluate-designs.ts';
import type { Study } from '../core/study/study.ts';
import { type Issue, issueRecord } from '../core/study/text/issue.ts';
import { designsPerTask, evaluateInThreads } from './design-pool.ts';
import { frontCsv } from './front-file.ts';
import { designsPerPart, PartRows, partBytes, partName } from './part-file.ts';
import { findingsOf } from './report-account.ts';
import { RunAccount } from './run-account.ts';
import { openRunFolder, type RunFolder } from './run-folder.ts';
import { digest, type FileDigest } from './study-files.ts';

/** Progress is told this often at most. */
const tellEveryMs = 200;

/** How far a run is; counts of designs. */
export interface RunProgress {
  readonly done: number;
  readonly total: number;
  readonly feasible: number;
  readonly front: number;
}

/** What a run needs. */
export interface RunOptions {
  readonly study: Study;
  /** Name of the study file as given, and its text. */
  readonly studyFile: string;
  readonly studyText: string;
  /** Digests of the further files the study uses. */
  readonly digests: readonly FileDigest[];
  /** From the check of the study. */
  readonly warnings: readonly Issue[];
  readonly outFolder: string;
  readonly workers: number;
  readonly version: string;
  /** The built thread; beside this module in the built program. */
  readonly threadUrl?: URL;
  renderReport(data: ReportData): string;
  onProgress?(progress: RunProgress): void;
}

/** What a run has found. */
export interface RunOutcome {
  readonly report: ReportData;
  readonly folder: string;
  readonly seconds: number;
}

/** Runs a study that varies something and states a trade-off. Throws RunProblem; a fault of ours throws as it is. */
export async function runStudy(options: RunOptions): Promise<RunOutcome> {
  const { study, workers } = options;
  const started = new Date();
  const columns = studyColumns(study);
  const designs = createDesignEvaluator(study, columns);
  const account = new RunAccount(study, columns);
  const usefulWorkers = Math.max(1, Math.min(workers, Math.ceil(designs.count / designsPerTask)));
  const record = {
    version: options.version,
    node: process.version,
    study: options.studyFile,
    title: study.title,
    started: started.toISOString(),
  };
  const inputDigests = [digest(options.studyFile, options.studyText), ...options.digests];

  const folder = openRunFolder(options.outFolder, { state: 'running', ...record });
  folder.write('study.yaml', options.studyText);
  const threadUrl = options.threadUrl ?? new URL('./thread.js', import.meta.url);
  const parts = new PartWriter(folder, columns);
  let done = 0;
  let told = Number.NEGATIVE_INFINITY;
  const tell = (): void => {
    told = performance.now();
    options.onProgress?.({ done, total: designs.count, feasible: account.feasible, front: account.filter.size });
  };
  for await (const batch of evaluateInThreads({ study, columns }, designs.count, usefulWorkers, threadUrl)) {
    const feasible = account.add(batch.first, batch.count, batch.columns);
    parts.append(batch.first, batch.count, batch.columns, feasible);
    done += batch.count;
    if (performance.now() - told >= tellEveryMs) tell();
  }
  parts.end();
  tell();

  const provenance = {
    version: record.version,
    node: record.node,
    started: record.started,
    seconds: secondsSince(started),
    digests: inputDigests,
  };
  const { report, front } = findingsOf({ ...options, provenance }, account, designs);
  folder.write('front.csv', frontCsv(front, designs, report));
  // Large, and only wanted here: in memory from the start it would burden the garbage collector all the while.
  const { JSDOM } = await import('jsdom');
  for (const chart of chartFiles(report, new JSDOM('').window.document)) folder.write(`charts/${chart.name}`, chart.svg);
  folder.write('report.html', options.renderReport(report));
  const seconds = secondsSince(started);
  folder.record({ state: 'finished', ...record, seconds, digests: inputDigests, search: study.search, ...summaryOf(report) });
  return { report, folder: folder.path, seconds };
}

/** Fills parts of a fixed size from batches of any size, and writes each as soon as it is full. */
class PartWriter {
  private readonly folder: RunFolder;
  private readonly columns: ReturnType<typeof studyColumns>;
  private rows: PartRows;
  private part = 0;

  constructor(folder: RunFolder, columns: ReturnType<typeof studyColumns>) {
    this.folder = folder;
    this.columns = columns;
    this.rows = new PartRows(designsPerPart, columns.length);
  }

  append(first: number, count: number, columns: readonly Float64Array[], feasible: Uint8Array): void {
    for (let from = 0; from < count; ) {
      const taken = Math.min(count - from, designsPerPart - this.rows.count);
      this.rows.append(first, from, taken, columns, feasible);
      from += taken;
      if (this.rows.count === designsPerPart) this.flush();
    }
  }

  end(): void {
    if (this.rows.count > 0) this.flush();
  }

  private flush(): void {
    this.folder.write(`designs/${partName(this.part++)}`, partBytes(this.rows, this.columns));
    this.rows.count = 0;
  }
}

function secondsSince(start: Date): number {
  return (Date.now() - start.getTime()) / 1000;
}

/** What run.json and the command line tell of a finished run, in machine units. */
export function summaryOf(report: ReportData): object {
  const { counts, columns, designs, proposals, closest, warnings } = report;
  const byNumber = new Map(designs.map((design) => [design.number, design]));
  const figures = (number: number) =>
    Object.fromEntries(columns.map((column, k) => [column.key, machineValue(column, byNumber.get(number)?.values[k] ?? Number.NaN)]));
  return {
    counts,
    reference: figures(0),
    proposals: proposals.map(({ number, rules }) => ({ number, rules, ...figures(number) })),
    requirements: report.requirements.map(({ metric, bound, limit, relaxedTo, implied, failing, failingAlone }) => {
      const column = columns.find((candidate) => candidate.role === 'metric' && candidate.name === metric);
      const machine = (value: number | null) => (column === undefined || value === null ? null : machineValue(column, value));
      return { metric: column?.key ?? metric, [bound]: machine(limit), implied, failing, failingAlone, relaxedTo: machine(relaxedTo) };
    }),
    closest: closest && { ...closest, ...figures(closest.number) },
    warnings: warnings.map(issueRecord),
  };
}
