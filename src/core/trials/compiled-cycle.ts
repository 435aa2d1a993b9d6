/**
 * A speed trace made ready for driving: what depends on the schedule and its road alone, worked out once per study.
 * Standing steps (zero speed at both ends) take time and nothing else, so that they are folded into one figure.
 */
import { createDrawnSums, type DrawnSums } from './drawn-sums.ts';
import { createDrivenSteps, type DrivenSteps } from './driven-steps.ts';
import { type LossWindows, tenMinuteWindows } from './loss-window.ts';
import { listMoving, type MovingSteps, moveAlong, type RoadProfileLike, type SpeedTraceLike } from './moving-steps.ts';
import { createQuickLaw, type QuickLaw } from './quick-law.ts';
import { orderBySpeed, type SpeedOrder } from './speed-order.ts';

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

/** A cycle ready to be driven, its moving steps in the order of the trace, with the arrays to drive it in: not to be shared between threads. */
export interface CompiledCycle extends MovingSteps {
  /** The same steps in the order in which the energy drawn is added up. */
  readonly bySpeed: SpeedOrder;
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

  /** The design in hand: its laws multiplied out for each gear, what it has drawn, and those of its steps in the order `bySpeed` that were driven word for word. */
  readonly laws: readonly [QuickLaw, QuickLaw];
  readonly drawn: DrawnSums;
  readonly drivenBySpeed: DrivenSteps;
  /** Its steps in the order of the trace: in its only or lower gear, in the end in the gears chosen. */
  readonly driven: DrivenSteps;
  /** The same in the higher of two gears. */
  readonly drivenHigher: DrivenSteps;
  /** Moving steps near a limit of the drive. */
  readonly nearLimit: Int32Array;
  /** Motor losses up to the end of so many moving steps: one entry more than steps, the first 0. */
  readonly lossToJ: Float64Array;
}

/** Prepares a trace for driving. The cap clips the speeds first. */
export function compileCycle(trace: SpeedTraceLike, conditions: CycleConditions): CompiledCycle {
  const { timesS } = trace;
  const capped = { timesS, speedsMPerS: cappedSpeeds(trace.speedsMPerS, conditions.capSpeedMPerS) };
  const speeds = capped.speedsMPerS;
  const moving = listMoving(capped);
  const steps = moveAlong(capped, moving, conditions.grade, conditions.road);
  const last = timesS.length - 1;
  const bySpeed = orderBySpeed(steps);
  const distanceM = distanceOf(capped);
  return {
    ...steps,
    bySpeed,
    moments: momentsOf(steps),
    kineticJPerKg: (speeds[last] * speeds[last] - speeds[0] * speeds[0]) / 2,
    stepOfTrace: moving,
    traceSteps: last,
    standingS: standingTime(timesS, moving),
    totalS: timesS[last] - timesS[0],
    distanceM,
    distanceLostToCapM: distanceOf(trace) - distanceM,
    windows: tenMinuteWindows(timesS, moving),
    laws: [createQuickLaw(), createQuickLaw()],
    drawn: createDrawnSums(),
    drivenBySpeed: createDrivenSteps(bySpeed.speedMPerS.length),
    driven: createDrivenSteps(moving.length),
    drivenHigher: createDrivenSteps(moving.length),
    nearLimit: new Int32Array(moving.length),
    lossToJ: new Float64Array(moving.length + 1),
  };
}

function cappedSpeeds(speeds: readonly number[], cap: number): readonly number[] {
  return Number.isNaN(cap) ? speeds : speeds.map((speed) => Math.min(speed, cap));
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
