/**
 * A speed trace made ready for driving: what depends on the schedule and its road alone, worked out once per study.
 * Standing steps (zero speed at both ends) take time and nothing else, so that they are folded into one figure; the
 * arrays hold the moving steps in the order of the trace, and every sum over them runs in that order.
 */
import { slopeOf } from '../vehicle/road-load.ts';
import { createDrivenSteps, type DrivenSteps } from './driven-steps.ts';
import { type LossWindows, tenMinuteWindows } from './loss-window.ts';

/** A speed trace: times in s, rising strictly; speeds in m/s, not negative; equally many, at least two. */
export interface SpeedTraceLike {
  readonly timesS: readonly number[];
  readonly speedsMPerS: readonly number[];
}

/** Grade over time (s) or over distance (m): piecewise linear, held beyond its ends; `at` rises strictly. */
export interface RoadProfileLike {
  readonly over: 'time' | 'distance';
  readonly at: readonly number[];
  readonly grades: readonly number[];
}

/** What a cycle trial states beside its trace. */
export interface CycleConditions {
  /** Constant grade, rise over run; a road profile replaces it. */
  readonly grade: number;
  readonly road: RoadProfileLike | null;
  /** Speeds above it are clipped to it; NaN: no cap. */
  readonly capSpeedMPerS: number;
}

/** Sums over the moving steps from which road energies follow without another loop; α slope, v mean speed, Δt duration. */
export interface RoadMoments {
  /** ∑ cos α v Δt. */
  readonly cosV: number;
  /** ∑ sin α v Δt. */
  readonly sinV: number;
  /** ∑ cos α v³ Δt. */
  readonly cosV3: number;
  /** ∑ v² Δt. */
  readonly v2: number;
  /** ∑ v³ Δt. */
  readonly v3: number;
}

/** The moving steps of a schedule. */
interface MovingSteps {
  readonly durationS: Float64Array;
  /** Mean speed, above zero. */
  readonly speedMPerS: Float64Array;
  /** One over the mean speed. */
  readonly perSpeedSPerM: Float64Array;
  readonly accelerationMPerS2: Float64Array;
  readonly cosSlope: Float64Array;
  readonly sinSlope: Float64Array;
}

/** A cycle ready to be driven, with the arrays to drive it in: not to be shared between threads. */
export interface CompiledCycle extends MovingSteps {
  /** All moving steps have the same slope. */
  readonly evenSlope: boolean;
  readonly moments: RoadMoments;
  /** (v² − v₀²)/2 over the whole trace: what is left in a unit of mass. */
  readonly kineticJPerKg: number;
  /** Which step of the trace each moving step is, counted from 0. */
  readonly stepOfTrace: Int32Array;
  /** Steps of the trace, standing ones included. */
  readonly traceSteps: number;
  /** Time of all standing steps together. */
  readonly standingS: number;
  readonly totalS: number;
  readonly distanceM: number;
  /** What the cap took from the distance; 0 without a cap. */
  readonly distanceLostToCapM: number;
  /** Runs of steps over which the worst loss load is sought. */
  readonly windows: LossWindows;

  /** The steps as driven by the design in hand: in its only or lower gear, in the end in the gears chosen. */
  readonly driven: DrivenSteps;
  /** The same in the higher of two gears. */
  readonly drivenHigher: DrivenSteps;
  /** Moving steps near a limit of the drive. */
  readonly nearLimit: Int32Array;
  /** Motor losses up to the end of so many moving steps: one entry more than steps, the first 0. */
  readonly lossToJ: Float64Array;
}

/**
 * Prepares a trace for driving. The cap clips the speeds first; step k runs from time k to time k + 1 at their mean
 * speed and with constant acceleration; the road profile is read at mid-step, half of the step's time or distance on.
 */
export function compileCycle(trace: SpeedTraceLike, conditions: CycleConditions): CompiledCycle {
  const { timesS } = trace;
  const capped = { timesS, speedsMPerS: cappedSpeeds(trace.speedsMPerS, conditions.capSpeedMPerS) };
  const speeds = capped.speedsMPerS;
  const moving = listMoving(speeds);
  const steps = moveAlong(capped, moving, gradeReader(conditions));
  const last = timesS.length - 1;
  const distanceM = distanceOf(capped);
  return {
    ...steps,
    evenSlope: steps.sinSlope.every((sin) => sin === steps.sinSlope[0]),
    moments: momentsOf(steps),
    kineticJPerKg: (speeds[last] * speeds[last] - speeds[0] * speeds[0]) / 2,
    stepOfTrace: moving,
    traceSteps: last,
    standingS: standingTime(timesS, moving),
    totalS: timesS[last] - timesS[0],
    distanceM,
    distanceLostToCapM: distanceOf(trace) - distanceM,
    windows: tenMinuteWindows(timesS, moving),
    driven: createDrivenSteps(moving.length),
    drivenHigher: createDrivenSteps(moving.length),
    nearLimit: new Int32Array(moving.length),
    lossToJ: new Float64Array(moving.length + 1),
  };
}

function cappedSpeeds(speeds: readonly number[], cap: number): readonly number[] {
  return Number.isNaN(cap) ? speeds : speeds.map((speed) => Math.min(speed, cap));
}

function listMoving(speeds: readonly number[]): Int32Array {
  const moving: number[] = [];
  for (let k = 0; k + 1 < speeds.length; k++) {
    if (speeds[k] !== 0 || speeds[k + 1] !== 0) moving.push(k);
  }
  return Int32Array.from(moving);
}

function moveAlong({ timesS, speedsMPerS }: SpeedTraceLike, moving: Int32Array, gradeAt: GradeReader): MovingSteps {
  const array = () => new Float64Array(moving.length);
  const steps = {
    durationS: array(),
    speedMPerS: array(),
    perSpeedSPerM: array(),
    accelerationMPerS2: array(),
    cosSlope: array(),
    sinSlope: array(),
  };
  let distanceM = 0;
  for (let i = 0; i < moving.length; i++) {
    const k = moving[i];
    const durationS = timesS[k + 1] - timesS[k];
    const speed = (speedsMPerS[k] + speedsMPerS[k + 1]) / 2;
    const slope = slopeOf(gradeAt(timesS[k] + durationS / 2, distanceM + (speed * durationS) / 2));
    steps.durationS[i] = durationS;
    steps.speedMPerS[i] = speed;
    steps.perSpeedSPerM[i] = 1 / speed;
    steps.accelerationMPerS2[i] = (speedsMPerS[k + 1] - speedsMPerS[k]) / durationS;
    steps.cosSlope[i] = slope.cos;
    steps.sinSlope[i] = slope.sin;
    distanceM += speed * durationS;
  }
  return steps;
}

type GradeReader = (timeS: number, distanceM: number) => number;

/** Reads the grade at places that never step back. */
function gradeReader({ grade, road }: CycleConditions): GradeReader {
  if (road === null) return () => grade;
  const { over, at, grades } = road;
  let next = 0;
  return (timeS, distanceM) => {
    const here = over === 'time' ? timeS : distanceM;
    while (next < at.length && at[next] <= here) next++;
    if (next === 0) return grades[0];
    if (next === at.length) return grades[next - 1];
    const share = (here - at[next - 1]) / (at[next] - at[next - 1]);
    return grades[next - 1] + (grades[next] - grades[next - 1]) * share;
  };
}

function momentsOf({ durationS, speedMPerS, cosSlope, sinSlope }: MovingSteps): RoadMoments {
  const moments = { cosV: 0, sinV: 0, cosV3: 0, v2: 0, v3: 0 };
  for (let k = 0; k < durationS.length; k++) {
    const v = speedMPerS[k];
    const lengthM = v * durationS[k];
    moments.cosV += cosSlope[k] * lengthM;
    moments.sinV += sinSlope[k] * lengthM;
    moments.cosV3 += cosSlope[k] * v * v * lengthM;
    moments.v2 += v * lengthM;
    moments.v3 += v * v * lengthM;
  }
  return moments;
}

function standingTime(timesS: readonly number[], moving: Int32Array): number {
  let standing = 0;
  let next = 0;
  for (let k = 0; k + 1 < timesS.length; k++) {
    if (moving[next] === k) next++;
    else standing += timesS[k + 1] - timesS[k];
  }
  return standing;
}

function distanceOf({ timesS, speedsMPerS }: SpeedTraceLike): number {
  let distance = 0;
  for (let k = 0; k + 1 < timesS.length; k++) distance += ((speedsMPerS[k] + speedsMPerS[k + 1]) / 2) * (timesS[k + 1] - timesS[k]);
  return distance;
}
