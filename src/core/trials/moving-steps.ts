/** The steps of a speed trace that move: how long, how fast, how steep. */
import { slopeOf } from '../vehicle/road-load.ts';

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

/** Moving steps in some order, one entry each. */
export interface MovingSteps {
  readonly durationS: Float64Array;
  /** Mean speed, above zero. */
  readonly speedMPerS: Float64Array;
  /** One over the mean speed. */
  readonly perSpeedSPerM: Float64Array;
  readonly accelerationMPerS2: Float64Array;
  readonly cosSlope: Float64Array;
  readonly sinSlope: Float64Array;
  /** All have the same slope. */
  readonly evenSlope: boolean;
}

/** Which steps of a trace move, counted from 0: all but those with zero speed at both ends. */
export function listMoving({ speedsMPerS }: SpeedTraceLike): Int32Array {
  const moving: number[] = [];
  for (let k = 0; k + 1 < speedsMPerS.length; k++) {
    if (speedsMPerS[k] !== 0 || speedsMPerS[k + 1] !== 0) moving.push(k);
  }
  return Int32Array.from(moving);
}

/**
 * The moving steps of a trace in its order, at their mean speed and with constant acceleration. A road profile replaces the grade (rise over
 * run) and is read at mid-step, half of the step's time or distance on.
 */
export function moveAlong({ timesS, speedsMPerS }: SpeedTraceLike, moving: Int32Array, grade: number, road: RoadProfileLike | null): MovingSteps {
  const gradeAt = road === null ? () => grade : gradeReader(road);
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
  return { ...steps, evenSlope: steps.sinSlope.every((sin) => sin === steps.sinSlope[0]) };
}

type GradeReader = (timeS: number, distanceM: number) => number;

/** Reads the grade at places that never step back. */
function gradeReader({ over, at, grades }: RoadProfileLike): GradeReader {
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
