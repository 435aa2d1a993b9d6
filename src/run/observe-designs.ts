/** A sample of designs evaluated in full, with what limits them: what stored results do not tell of a study. */
import { compileStudy } from '../core/evaluate/compile.ts';
import { type LimitWord, limitWords } from '../core/evaluate/evaluator.ts';
import { createPedalProbe } from '../core/evaluate/pedal-limits.ts';
import { createSearch } from '../core/search/search.ts';
import type { MetricColumn } from '../core/study/catalogue/metrics.ts';
import type { Requirement, Study, Trial } from '../core/study/study.ts';
import { sampleNumbers } from './design-sample.ts';

/** What peak torque is commonly rated for, s. */
export const peakLastsS = 30;

/** Designs in the sample, at most and at least. */
const mostDesigns = 1_000;
const leastDesigns = 4;
/** Work that the sample may cost in all, in steps of cycles: about half a second. A fixed count, not a clock, so that every run looks at the same designs. */
const mostSteps = 4_000_000;
/** What one trial without a trace costs, in steps of a cycle. */
const stepsPerTrial = 300;

/** One trial over the sample; counts of designs. */
export interface TrialSeen {
  readonly trial: Trial;
  /** With a figure for it. */
  designs: number;
  /** Of them: starts from rest, and those that grip limits. */
  starts: number;
  gripStarts: number;
  /** Of them: where battery power is the limit. */
  byBattery: number;
}

/** Full-pedal times of a trial over the designs that decide: those that meet every requirement, all where none does. */
export interface PedalTimes {
  readonly trial: Trial;
  readonly designs: number;
  readonly longerThanPeak: number;
  readonly longestS: number;
}

/** What a sample shows. */
export interface SampleSeen {
  readonly designs: number;
  /** Every design of the search is in it. */
  readonly whole: boolean;
  /** Designs that meet every requirement and have every objective. */
  readonly passing: number;
  readonly trials: readonly TrialSeen[];
  readonly pedalTimes: readonly PedalTimes[];
}

/** Looks at a sample of a study's designs, or at the reference where nothing varies. */
export function observeDesigns(study: Study): SampleSeen {
  const search = createSearch(study);
  const numbers = search.count === 0 ? [0] : sampleNumbers(search.count, sampleSize(study));
  const evaluator = compileStudy(study);
  const watches = watchTrials(study, evaluator.metrics);
  const passes = passing(study, evaluator.metrics);
  const inputs = Float64Array.from(evaluator.reference);
  const metrics = new Float64Array(evaluator.metrics.length);
  const limits = new Uint8Array(evaluator.metrics.length);
  const times = pedalTimeColumns(study, evaluator.metrics).map((column) => ({ ...column, all: [] as number[], passing: [] as number[] }));
  let passed = 0;
  for (const number of numbers) {
    if (number > 0) search.inputs(number, inputs, 0);
    evaluator.evaluate(inputs, 0, metrics, 0, limits);
    for (const watch of watches) watch.look(inputs, metrics, limits);
    const passesAll = passes(metrics);
    if (passesAll) passed++;
    for (const { at, all, passing: few } of times) {
      if (Number.isNaN(metrics[at])) continue;
      all.push(metrics[at]);
      if (passesAll) few.push(metrics[at]);
    }
  }
  return {
    designs: numbers.length,
    whole: numbers.length >= search.count,
    passing: passed,
    trials: watches.map(({ seen }) => seen),
    pedalTimes: times.map(({ trial, all, passing: few }) => timesOf(trial, passed > 0 ? few : all)),
  };
}

function sampleSize({ trials }: Study): number {
  const steps = trials.reduce((sum, { trace }) => sum + (trace?.timesS.length ?? stepsPerTrial), 0);
  return Math.max(leastDesigns, Math.min(mostDesigns, Math.floor(mostSteps / steps)));
}

function passing({ requirements, objectives }: Study, columns: readonly MetricColumn[]): (metrics: Float64Array) => boolean {
  const at = (metric: string) => columns.findIndex(({ name }) => name === metric);
  const required = requirements.map(({ metric }) => at(metric));
  const aims = objectives.map(({ metric }) => at(metric));
  const meets = (value: number, { bound, limit }: Requirement) => (bound === 'atLeast' ? value >= limit : value <= limit);
  return (metrics) => requirements.every((each, r) => meets(metrics[required[r]], each)) && aims.every((aim) => !Number.isNaN(metrics[aim]));
}

function pedalTimeColumns({ trials }: Study, columns: readonly MetricColumn[]): { trial: Trial; at: number }[] {
  return trials
    .filter(({ kind, rating }) => (kind === 'acceleration' || kind === 'standing distance') && rating === 'peak')
    .map((trial) => ({ trial, at: columns.findIndex(({ name }) => name === `${trial.name}.time`) }));
}

function timesOf(trial: Trial, timesS: readonly number[]): PedalTimes {
  const longest = timesS.reduce((a, b) => Math.max(a, b), 0);
  return { trial, designs: timesS.length, longerThanPeak: timesS.filter((timeS) => timeS > peakLastsS).length, longestS: longest };
}

/** Counts for one trial, design by design. */
interface Watch {
  readonly seen: TrialSeen;
  look(inputs: Float64Array, metrics: Float64Array, limits: Uint8Array): void;
}

function watchTrials(study: Study, columns: readonly MetricColumn[]): Watch[] {
  const pedal = createPedalProbe(study);
  const clipped = clippedByBattery(study);
  return study.trials.map((trial) => {
    const seen: TrialSeen = { trial, designs: 0, starts: 0, gripStarts: 0, byBattery: 0 };
    const at = (metric: string) => columns.findIndex(({ name }) => name === `${trial.name}.${metric}`);
    const count = (there: boolean, start: LimitWord | null, byBattery: () => boolean): void => {
      if (start !== null) seen.starts++;
      if (start === 'adhesion') seen.gripStarts++;
      if (!there) return;
      seen.designs++;
      if (byBattery()) seen.byBattery++;
    };
    if (trial.kind === 'cycle') {
      const offTrace = at('offTrace');
      return {
        seen,
        look: (inputs, metrics) => count(!Number.isNaN(metrics[offTrace]), null, () => metrics[offTrace] > 0 && clipped(trial, inputs, metrics[offTrace])),
      };
    }
    const probed = pedal.trials.indexOf(trial);
    if (probed >= 0) {
      const endSpeed = at('endSpeed');
      return {
        seen,
        look: (inputs, metrics) => {
          const { start, end } = pedal.limitsOf(probed, inputs, endSpeed < 0 ? Number.NaN : metrics[endSpeed]);
          count(end !== null, start, () => end === 'battery power');
        },
      };
    }
    const figure = at(trial.kind === 'top speed' ? 'speed' : 'grade');
    return {
      seen,
      look: (_, metrics, limits) => {
        const there = !Number.isNaN(metrics[figure]);
        const word = limitWords[limits[figure]];
        count(there, trial.kind === 'hill start' && there ? word : null, () => word === 'battery power');
      },
    };
  });
}

const BATTERY_LIMIT = /^battery\.(?:discharge|resistance)/u;

/** Does a cycle miss less without the limits of the battery? Then steps of it are clipped by the battery, not by the motor. */
function clippedByBattery(study: Study): (trial: Trial, inputs: Float64Array, offTrace: number) => boolean {
  const free = <Value>(figures: Readonly<Record<string, Value>>) => Object.fromEntries(Object.entries(figures).filter(([name]) => !BATTERY_LIMIT.test(name)));
  const trials = study.trials.map((trial) => ({ ...trial, with: free(trial.with) }));
  const evaluator = compileStudy(
    { ...study, values: free(study.values), trials },
    new Set(trials.filter(({ kind }) => kind === 'cycle').map(({ name }) => `${name}.offTrace`)),
  );
  const lifted = evaluator.inputs.flatMap((name, k) => (BATTERY_LIMIT.test(name) ? [k] : []));
  const metrics = new Float64Array(evaluator.metrics.length);
  const own = new Float64Array(evaluator.inputs.length);
  const columns = new Map(trials.map(({ name }) => [name, evaluator.metrics.findIndex((metric) => metric.name === `${name}.offTrace`)]));
  let last: Float64Array | null = null;
  return ({ name }, inputs, offTrace) => {
    // Trials of one design follow one another.
    if (last === null || last.some((value, k) => !Object.is(value, inputs[k]))) {
      last = Float64Array.from(inputs);
      own.set(inputs);
      for (const k of lifted) own[k] = Number.NaN;
      evaluator.evaluate(own, 0, metrics, 0);
    }
    return metrics[columns.get(name) as number] < offTrace;
  };
}
