/**
 * The worst ten minutes of a cycle: the runs of consecutive steps over which motor losses are averaged, found once per
 * schedule, and the highest mean over them. Ten minutes stand for the thermal time constant of a housing.
 */

const windowS = 600;
/** Lets a run of ten minutes count when its times are decimal fractions. */
const windowTolerance = 1e-9;

/** Runs of steps: from moving step `from` up to, not including, moving step `to`, and one over the time they take. */
export interface LossWindows {
  readonly from: Int32Array;
  readonly to: Int32Array;
  readonly perS: Float64Array;
}

/**
 * Every run that starts at a step of the trace and is the shortest of at least 600 s (1 − 1e-9) by the times as
 * written; the whole trace where it is shorter than that. `moving` lists the steps of the trace that move: standing
 * steps have no losses, so that runs over the same moving steps differ in length only and the shortest stands for all.
 */
export function tenMinuteWindows(timesS: readonly number[], moving: Int32Array): LossWindows {
  const last = timesS.length - 1;
  const before = movingBefore(last, moving);
  const from: number[] = [];
  const to: number[] = [];
  const durations: number[] = [];
  const add = (start: number, end: number): void => {
    const durationS = timesS[end] - timesS[start];
    const known = from.length - 1;
    if (known >= 0 && from[known] === before[start] && to[known] === before[end]) {
      durations[known] = Math.min(durations[known], durationS);
      return;
    }
    from.push(before[start]);
    to.push(before[end]);
    durations.push(durationS);
  };
  const shortestS = windowS * (1 - windowTolerance);
  for (let start = 0, end = 0; start < last; start++) {
    while (end < last && timesS[end] - timesS[start] < shortestS) end++;
    if (timesS[end] - timesS[start] < shortestS) break;
    add(start, end);
  }
  if (from.length === 0) add(0, last);
  return { from: Int32Array.from(from), to: Int32Array.from(to), perS: Float64Array.from(durations, (durationS) => 1 / durationS) };
}

/** Highest mean power over the runs; `energyJ[i]` is the energy of the first i moving steps. */
export function highestMeanW(windows: LossWindows, energyJ: Float64Array): number {
  const { from, to, perS } = windows;
  let highest = 0;
  for (let i = 0; i < perS.length; i++) {
    const mean = (energyJ[to[i]] - energyJ[from[i]]) * perS[i];
    if (mean > highest) highest = mean;
  }
  return highest;
}

/** How many moving steps lie before each time of the trace. */
function movingBefore(last: number, moving: Int32Array): Int32Array {
  const before = new Int32Array(last + 1);
  let count = 0;
  for (let k = 0; k < last; k++) {
    before[k] = count;
    if (moving[count] === k) count++;
  }
  before[last] = count;
  return before;
}
