/**
 * The order in which the energy drawn over a cycle is added up: by the schedule alone, so that a design's sum has the same bits
 * beside any other design. Steps of like kind stand together, slow ones first: the quick loops then take the same branches
 * for long, and steps beyond a speed are those behind it.
 */
import type { MovingSteps } from './moving-steps.ts';

/** The moving steps of a cycle in that order. */
export interface SpeedOrder extends MovingSteps {
  /** So many come first that do not slow down, by rising speed; behind them stand those that do, by rising speed too. */
  readonly steady: number;
}

/** Puts moving steps in order; those of equal speed stay in the order of the trace. */
export function orderBySpeed(steps: MovingSteps): SpeedOrder {
  const { speedMPerS, accelerationMPerS2 } = steps;
  const slows = (k: number) => (accelerationMPerS2[k] < 0 ? 1 : 0);
  const order = Int32Array.from(speedMPerS.keys()).sort((a, b) => slows(a) - slows(b) || speedMPerS[a] - speedMPerS[b] || a - b);
  const ordered = (values: Float64Array) => Float64Array.from(order, (k) => values[k]);
  return {
    durationS: ordered(steps.durationS),
    speedMPerS: ordered(speedMPerS),
    perSpeedSPerM: ordered(steps.perSpeedSPerM),
    accelerationMPerS2: ordered(accelerationMPerS2),
    cosSlope: ordered(steps.cosSlope),
    sinSlope: ordered(steps.sinSlope),
    evenSlope: steps.evenSlope,
    steady: accelerationMPerS2.reduce((count, _, k) => count + 1 - slows(k), 0),
  };
}
