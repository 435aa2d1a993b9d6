/** Two ratios at full pedal: where the higher gear takes over. */
import { signChanges } from '../numerics/roots.ts';
import { maxVehicleSpeedMPerS } from './gearing.ts';
import type { Slope } from './road-load.ts';
import { tractiveForceN } from './traction.ts';
import { type DrivingRating, tractionBreakSpeeds } from './traction-breaks.ts';
import type { Vehicle } from './vehicle.ts';

/** Share of the force by which the higher gear must pull more. */
const CLEARLY_MORE = 1e-9;
const PIECES = 8;

/**
 * Shift speed (m/s): the lowest v at which the tractive force in the higher gear exceeds that in the lower by more than 1e-9 of it, at
 * most the speed at which the lower gear ends. 0 where the higher gear always pulls more; Infinity with one ratio.
 */
export function shiftSpeedMPerS(vehicle: Vehicle, rating: DrivingRating, slope: Slope): number {
  if (vehicle.gearing.ratioCount === 1) return Infinity;
  const end = maxVehicleSpeedMPerS(vehicle, 0);
  const gainN = (speed: number) => {
    const lowerN = tractiveForceN(vehicle, 0, speed, rating, slope);
    return tractiveForceN(vehicle, 1, speed, rating, slope) - lowerN - CLEARLY_MORE * Math.abs(lowerN);
  };
  if (gainN(0) > 0) return 0;
  const lower = tractionBreakSpeeds(vehicle, 0, rating, slope, 0, end);
  const higher = tractionBreakSpeeds(vehicle, 1, rating, slope, 0, end);
  const stretches = [0, ...[...lower, ...higher].sort((a, b) => a - b), end];
  for (let k = 1; k < stretches.length; k++) {
    const [first] = signChanges(gainN, stretches[k - 1], stretches[k], PIECES);
    if (first !== undefined) return first;
  }
  return end;
}
