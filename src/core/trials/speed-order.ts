/**
 * The order in which the energy drawn over a cycle is added up: by the schedule alone, so that a design's sum has the same bits
 * beside any other design. Steps of like kind stand together, slow ones first: the quick loops then take the same branches
 * for long, and steps beyond a speed are those behind it.
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
 * Deceleration c0 + c2 v² (m/s²) that half the rolling resistance and air drag of a car, or those of a lorry, make, and one that takes brakes. Which run
 * a step stands in decides how quickly it is driven, never what comes of it.
 */
export const EASES = { constantMPerS2: 0.04, squarePerM: 5e-5 };
const BRAKES = { constantMPerS2: 0.15, squarePerM: 4e-4 };

/** Puts moving steps in order; those of equal speed in a run stay in the order of the trace. */
export function orderBySpeed(steps: MovingSteps): SpeedOrder {
  const { speedMPerS, accelerationMPerS2 } = steps;
  const runs = Uint8Array.from(speedMPerS, (speed, k) => {
    const within = ({ constantMPerS2, squarePerM }: typeof EASES) => -accelerationMPerS2[k] <= constantMPerS2 + squarePerM * speed * speed;
    return within(EASES) ? 0 : within(BRAKES) ? 1 : 2;
  });
  const order = Int32Array.from(speedMPerS.keys()).sort((a, b) => runs[a] - runs[b] || speedMPerS[a] - speedMPerS[b] || a - b);
  const ordered = (values: Float64Array) => Float64Array.from(order, (k) => values[k]);
  return {
    durationS: ordered(steps.durationS),
    speedMPerS: ordered(speedMPerS),
    perSpeedSPerM: ordered(steps.perSpeedSPerM),
    accelerationMPerS2: ordered(accelerationMPerS2),
    cosSlope: ordered(steps.cosSlope),
    sinSlope: ordered(steps.sinSlope),
    evenSlope: steps.evenSlope,
    steady: runs.filter((run) => run === 0).length,
    braking: runs.filter((run) => run < 2).length,
  };
}
