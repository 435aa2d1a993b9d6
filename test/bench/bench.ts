/**
 * `npm run bench`: checks the answers, then tells rates. `-- --json` prints them for machines, `-- --quick` takes a minute instead of
 * several. Rates per core are by the CPU time of the process; what has to do with threads or with disk is by the clock.
 */
import { cpus, loadavg } from 'node:os';
import { parseArgs } from 'node:util';
import { checkFront, checkKernel } from './check-answers.ts';
import { kernelBench } from './kernel-bench.ts';
import { evaluationMeasures, evaluationRates, frontMeasures, kernelMeasures, type Measure, poolMeasures, runMeasures, type Thoroughness } from './measures.ts';
import { commonWorkload, otherWorkloads, smallerCommon } from './workloads.ts';

const workloads = [commonWorkload, ...otherWorkloads()];
const { values: asked, positionals } = parseArgs({
  allowPositionals: true,
  options: { json: { type: 'boolean', default: false }, quick: { type: 'boolean', default: false }, evaluate: { type: 'boolean', default: false } },
});
const thorough: Thoroughness = asked.quick
  ? { rounds: 5, designs: 300, poolDesigns: 60_000, poolRounds: 3, frontPoints: 200_000, frontRounds: 3, runRounds: 1 }
  : { rounds: 15, designs: 1000, poolDesigns: 240_000, poolRounds: 5, frontPoints: 1_000_000, frontRounds: 7, runRounds: 3 };
const measures: Measure[] = [];

if (asked.evaluate) evaluateAlone(positionals);
else await benchAll();

/** The process that evaluationMeasures starts for one workload. */
function evaluateAlone([name, rounds, designs]: readonly string[]): void {
  const workload = workloads.find((candidate) => candidate.name === name);
  if (workload === undefined) throw new Error(`no workload named ${name}`);
  console.log(JSON.stringify(evaluationRates(workload, Number(rounds), Number(designs))));
}

async function benchAll(): Promise<void> {
  const started = { node: process.version, cpu: cpus()[0].model, cores: cpus().length, loadAverage: loadavg() };
  say(`Node ${started.node} · ${started.cores} cores, ${started.cpu} · load average ${loadText()}`);
  const kernel = kernelBench(commonWorkload.study, 400);
  const checks = [...checkKernel(kernel), checkFront()];
  say('\nanswers');
  for (const { name, cases, largest, accepted } of checks) {
    say(`  ${name}: ${cases} cases, largest difference ${largest === 0 ? 'none' : largest.toExponential(1)}, accepted ${accepted}`);
  }
  tell('cycle kernel, one core', kernelMeasures(kernel, thorough));
  tell('whole evaluation of a design, one core', evaluationMeasures(workloads, thorough));
  tell('threads', await poolMeasures(commonWorkload, thorough));
  tell('front filter', frontMeasures(thorough));
  tell('whole run', await runMeasures(asked.quick ? smallerCommon(50_000) : commonWorkload, thorough));
  say(`\nload average at the end ${loadText()}`);
  if (asked.json) console.log(JSON.stringify({ ...started, loadAverageAtEnd: loadavg(), checks, measures }, null, 1));
}

function tell(title: string, found: readonly Measure[]): void {
  say(`\n${title.padEnd(64)}       median   (quartiles)`);
  for (const { name, unit, median, low, high, rounds } of found) {
    const spread = rounds > 1 ? `(${figure(low)} to ${figure(high)}, ${rounds} rounds)` : '';
    say(`  ${name.padEnd(62)} ${figure(median).padStart(12)}   ${unit} ${spread}`);
  }
  measures.push(...found);
}

function say(text: string): void {
  if (!asked.json) console.log(text);
}

function figure(value: number): string {
  return value >= 1000 ? Math.round(value).toLocaleString('en') : value.toPrecision(3);
}

function loadText(): string {
  return loadavg()
    .map((load) => load.toFixed(1))
    .join(' ');
}
