/** The driving schedules that come with the product, as CSV files with their sources in the head. */
import { readdirSync, readFileSync } from 'node:fs';
import { readTrace } from '../core/study/read/read-trace.ts';
import type { SpeedTrace } from '../core/study/study.ts';

/** In the source tree and in the built program alike they stand beside this module. */
const folder = new URL('./cycles/', import.meta.url);

/** One built-in cycle with its totals, SI. */
export interface BuiltInCycle {
  readonly name: string;
  readonly notes: readonly string[];
  readonly durationS: number;
  readonly distanceM: number;
  readonly topSpeedMPerS: number;
  /** Distance over whole duration. */
  readonly meanSpeedMPerS: number;
}

/** Names of the built-in cycles, in alphabetical order. */
export function builtInCycleNames(): string[] {
  return readdirSync(folder)
    .filter((file) => file.endsWith('.csv'))
    .map((file) => file.slice(0, -'.csv'.length))
    .sort();
}

/** CSV text of a built-in cycle. */
export function builtInCycleText(name: string): string {
  return readFileSync(new URL(`${name}.csv`, folder), 'utf8');
}

/** Every built-in cycle. */
export function builtInCycles(): BuiltInCycle[] {
  return builtInCycleNames().map((name) => {
    const read = readTrace(builtInCycleText(name), name);
    if (!read.ok) throw new Error(`built-in cycle ${name}: ${read.problems.map((problem) => JSON.stringify(problem)).join('; ')}`);
    return { name, notes: read.trace.notes, ...traceTotals(read.trace) };
  });
}

function traceTotals({ timesS, speedsMPerS }: SpeedTrace): Omit<BuiltInCycle, 'name' | 'notes'> {
  let distanceM = 0;
  for (let k = 1; k < timesS.length; k++) distanceM += ((speedsMPerS[k] + speedsMPerS[k - 1]) / 2) * (timesS[k] - timesS[k - 1]);
  const durationS = timesS[timesS.length - 1] - timesS[0];
  return { durationS, distanceM, topSpeedMPerS: Math.max(...speedsMPerS), meanSpeedMPerS: distanceM / durationS };
}
