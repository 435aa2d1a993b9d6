/** `layshaft run`: every design of one study or several, one after another; the run folder of each. */
import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { createSearch } from '../core/search/search.ts';
import { whatRunNeeds } from '../core/study/check-study.ts';
import type { Issue } from '../core/study/text/issue.ts';
import { runFolderName } from '../run/run-folder.ts';
import { RunProblem } from '../run/run-problem.ts';
import { type CommandRow, type ExitStatus, exitStatus, jsonOption, type OptionValues, wholeNumber, worstStatus } from './command.ts';
import { type OpenStudy, readStudy, sayWrong, warningSentence } from './open-study.ts';
import { startProgress } from './progress.ts';
import { capped, complain, giveJson, ink, say } from './terminal.ts';
import { version } from './version.ts';

/** The row of `run`. */
export const runCommand: CommandRow = {
  name: 'run',
  sentence: 'Evaluates every design, finds the front, writes the report',
  about: [
    'The run folder gets report.html (one file, opens in any browser), front.csv, charts, and all designs as Parquet parts. Results of an earlier run in the same folder are replaced.',
    'Several studies run one after another; a wrong one does not stop the others.',
  ],
  arguments: [{ name: 'STUDY', sentence: 'A study file with vary and tradeOff', many: true }],
  options: [
    {
      name: 'out',
      value: 'DIR',
      sentence: 'Puts the run folders there instead of out.',
      example: 'layshaft run my-van.yaml --out results',
    },
    {
      name: 'workers',
      value: 'N',
      sentence: 'Threads that evaluate; all cores by default. The results do not depend on it.',
      example: 'layshaft run my-van.yaml --workers 1',
      read: wholeNumber(1),
    },
    jsonOption('layshaft run my-van.yaml --json > summary.json', 'the summary of each run'),
  ],
  example: 'layshaft run my-van.yaml',
  act: runAll,
};

const mostWarnings = 10;

/** What a study became: its status, and the entry for programs. */
interface Ended {
  readonly status: ExitStatus;
  readonly entry: object;
}

async function runAll(files: readonly string[], options: OptionValues): Promise<ExitStatus> {
  stopOnSignals();
  const folders = files.map((file) => runFolderOf(file, options));
  const twice = folders.findIndex((folder, at) => folders.indexOf(folder) !== at);
  if (twice >= 0) {
    complain(`${files[twice]} would write to the same folder as another study, ${folders[twice]}. Rename one of the two files, or run them apart with --out.`);
    return exitStatus.wrong;
  }
  // All files are looked at before the first run starts, so that a slip in the last one shows at once.
  const studies = files.map((file) => runnable(file));
  const ended: Ended[] = [];
  for (const [at, study] of studies.entries()) {
    const folder = folders[at] as string;
    ended.push(study === null ? { status: exitStatus.wrong, entry: { study: files[at], status: exitStatus.wrong } } : await runOne(study, folder, options));
  }
  if (options['json'] === true && studies.some((study) => study !== null)) giveJson({ runs: ended.map(({ entry }) => entry) });
  return worstStatus(ended.map(({ status }) => status));
}

/** Ends at once: every file of a run is written whole or not at all, so nothing half-written is left. */
function stopOnSignals(): void {
  for (const signal of ['SIGINT', 'SIGTERM'] as const) {
    process.once(signal, () => {
      say('\nInterrupted. The same command starts the run again.');
      process.exit(exitStatus.interrupted);
    });
  }
}

/** The folder of a study's run. */
function runFolderOf(file: string, options: OptionValues): string {
  return join((options['out'] as string | undefined) ?? 'out', runFolderName(file));
}

/** A study that a run can take; null after saying why it cannot. */
function runnable(file: string): OpenStudy | null {
  const opened = readStudy(file);
  if (!opened.ok) {
    sayWrong(opened);
    return null;
  }
  const needed = whatRunNeeds(opened.study);
  if (needed !== null) {
    complain(`${file}: expected ${needed.expected}, found ${needed.found}. ${needed.hint}`);
    return null;
  }
  return opened;
}

async function runOne(opened: OpenStudy, folder: string, options: OptionValues): Promise<Ended> {
  const { study, file, text, digests } = opened;
  const workers = (options['workers'] as number | undefined) ?? availableParallelism();
  const warningLines = (warnings: readonly Issue[]) =>
    capped(
      warnings.map((warning) => warningSentence(warning, opened)),
      mostWarnings,
      'warnings',
    );
  say(`${ink('bold', file)} into ${folder}`);
  for (const line of warningLines(opened.warnings)) say(`${ink('yellow', 'warning:')} ${line}`);
  // Threads, charts and page are heavy: only a run loads them.
  const [{ runStudy, summaryOf }, { renderReport }, { runSummary }] = await Promise.all([
    import('../run/run-study.ts'),
    import('./render-report.ts'),
    import('./run-summary.ts'),
  ]);
  const progress = startProgress(createSearch(study).count);
  try {
    const { report, seconds } = await runStudy({
      study,
      studyFile: file,
      studyText: text,
      digests,
      warnings: opened.warnings,
      outFolder: folder,
      workers,
      version,
      renderReport,
      onProgress: progress.update,
    });
    progress.end();
    // What the study itself gave cause for was said before the run began.
    const seen = warningLines(report.warnings.filter((warning) => !opened.warnings.includes(warning)));
    say(`\n${runSummary(report, folder, seconds, seen)}\n`);
    const status = report.counts.feasible > 0 ? exitStatus.done : exitStatus.nothingFeasible;
    return { status, entry: { study: file, status, folder, seconds, ...summaryOf(report) } };
  } catch (error) {
    progress.abandon();
    if (!(error instanceof RunProblem)) throw error;
    complain(`${file}: ${error.message}. ${error.hint}`);
    return { status: exitStatus.failed, entry: { study: file, status: exitStatus.failed, problem: error.message } };
  }
}
