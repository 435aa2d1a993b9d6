/** The pause of a shift: the vehicle coasts without tractive force. */
import { signChange } from '../numerics/roots.ts';
import { resistanceN, type Slope } from '../vehicle/road-load.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import type { Motion } from './full-pedal.ts';

/** Steps of a coast at least, and their greatest length. */
const FEWEST = 8;
const LONGEST_S = 0.05;

/** The motion after the pause of a shift, or where the trial ended in it. Speed 0: the vehicle came to rest. */
export interface Shifted extends Motion {
  trialEnded: boolean;
}

/**
 * Coasts through the pause of a shift under R with the effective mass of the higher gear. The trial ends where `excess`, negative before
 * and rising, reaches zero.
 */
export function afterShift(vehicle: Vehicle, slope: Slope, from: Motion, excess: (motion: Motion) => number): Shifted {
  const pauseS = vehicle.gearing.shiftTimeS;
  const coasted = (timeS: number) => afterCoasting(vehicle, slope, from, timeS);
  const whole = coasted(pauseS);
  if (!(excess(whole) > 0)) return { ...whole, trialEnded: false };
  return { ...coasted(signChange((timeS) => excess(coasted(timeS)), 0, pauseS)), trialEnded: true };
}

/**
 * Runge-Kutta method of fourth order (classical) in steps of at most 0.05 s, over which R hardly changes: relative error of speed and
 * distance far below 1e-10.
 */
function afterCoasting({ effectiveMassKg, road }: Vehicle, slope: Slope, from: Motion, timeS: number): Motion {
  const gain = (speedMPerS: number) => -resistanceN(road, speedMPerS, slope) / effectiveMassKg[1];
  const steps = Math.max(FEWEST, Math.ceil(timeS / LONGEST_S));
  const stepS = timeS / steps;
  let { speedMPerS, distanceM } = from;
  for (let k = 0; k < steps; k++) {
    const gain1 = gain(speedMPerS);
    const gain2 = gain(speedMPerS + 0.5 * stepS * gain1);
    const gain3 = gain(speedMPerS + 0.5 * stepS * gain2);
    const gain4 = gain(speedMPerS + stepS * gain3);
    const next = speedMPerS + (stepS / 6) * (gain1 + 2 * gain2 + 2 * gain3 + gain4);
    if (!(next > 0)) return { speedMPerS: 0, timeS: from.timeS + k * stepS, distanceM };
    // The same stages for distance, whose rate is the speed.
    distanceM += stepS * (speedMPerS + (stepS / 6) * (gain1 + gain2 + gain3));
    speedMPerS = next;
  }
  return { speedMPerS, timeS: from.timeS + timeS, distanceM };
}
