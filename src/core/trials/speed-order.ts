/**
 * The order in which the energy drawn over a cycle is added up: by the schedule alone, so that a design's sum has the same bits
 * beside any other design. Steps of like kind stand together, slow ones first: the quick loops then take the same branches
 * for long, and steps beyond a speed are those behind it. Equal steps are driven once.
 */
import type { MovingSteps } from './moving-steps.ts';

/** The moving steps of a cycle in that order: three runs, each by rising speed. */
export interface SpeedOrder extends MovingSteps {
  /** So many steps come first that do not slow down by more than `EASES`. */
  readonly steady: number;
  /** Behind those between stand, from this one on, those that slow down by more than `BRAKES`. */
  readonly braking: number;
}

/**
 * Two decelerations c0 + c2 v²: what about half the rolling resistance and air drag of a car make, or those of a lorry; and what takes brakes.
 * Which run a step stands in decides how quickly it is driven, never what comes of it.
 */
export const EASES = { constantMPerS2: 0.04, squarePerM: 5e-5 };
const BRAKES = { constantMPerS2: 0.15, squarePerM: 4e-4 };

/** Puts moving steps in order; steps that are alike in speed, acceleration and slope become one that takes the time of all. */
export function orderBySpeed(steps: MovingSteps): SpeedOrder {
  const { durationS, speedMPerS, accelerationMPerS2, sinSlope } = steps;
  const runs = Uint8Array.from(speedMPerS, (speed, k) => {
    const within = ({ constantMPerS2, squarePerM }: typeof EASES) => -accelerationMPerS2[k] <= constantMPerS2 + squarePerM * speed * speed;
    return within(EASES) ? 0 : within(BRAKES) ? 1 : 2;
  });
  const compare = (a: number, b: number) =>
    runs[a] - runs[b] || speedMPerS[a] - speedMPerS[b] || accelerationMPerS2[a] - accelerationMPerS2[b] || sinSlope[a] - sinSlope[b];
  const sorted = Array.from(speedMPerS.keys()).sort((a, b) => compare(a, b) || a - b);
  const kinds = sorted.filter((k, place) => place === 0 || compare(sorted[place - 1], k) !== 0);
  const ordered = (values: Float64Array) => Float64Array.from(kinds, (k) => values[k]);
  return {
    durationS: timesOfKinds(sorted, durationS, compare),
    speedMPerS: ordered(speedMPerS),
    perSpeedSPerM: ordered(steps.perSpeedSPerM),
    accelerationMPerS2: ordered(accelerationMPerS2),
    cosSlope: ordered(steps.cosSlope),
    sinSlope: ordered(sinSlope),
    evenSlope: steps.evenSlope,
    steady: kinds.filter((k) => runs[k] === 0).length,
    braking: kinds.filter((k) => runs[k] < 2).length,
  };
}

/** Time that each kind of step takes in all, in order. */
function timesOfKinds(sorted: readonly number[], durationS: Float64Array, compare: (a: number, b: number) => number): Float64Array {
  const times: number[] = [];
  sorted.forEach((k, place) => {
    if (place > 0 && compare(sorted[place - 1], k) === 0) times[times.length - 1] += durationS[k];
    else times.push(durationS[k]);
  });
  return Float64Array.from(times);
}
