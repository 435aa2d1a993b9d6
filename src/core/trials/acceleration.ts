/** Acceleration at full pedal from one speed to another. */
import { shiftSpeedMPerS } from '../vehicle/shift.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import { afterShift } from './coasting.ts';
import { afterSpeedingUp, type GearUse, highestGear, isBeyondMotorSpeed, type Motion, type PedalConditions, pullInGear } from './full-pedal.ts';

/** From one speed to a greater one, m/s. */
export interface AccelerationConditions extends PedalConditions {
  fromMPerS: number;
  toMPerS: number;
}

/** NaN all three when the speed is not reached. */
export interface AccelerationResult extends GearUse {
  timeS: number;
  distanceM: number;
}

/**
 * Time and distance of an acceleration, with two ratios over the shift where it lies inside: its pause counts, the speed it costs is
 * made up in the higher gear. Not reached where F − R ≤ 0 anywhere on the way, or above maximum motor speed. Relative error at most
 * 1e-6 where (F − R)/F ≥ 1e-9, about 1e-11 in ordinary cases.
 */
export function solveAcceleration(vehicle: Vehicle, conditions: AccelerationConditions): AccelerationResult {
  const { fromMPerS, toMPerS, slope, rating } = conditions;
  const shiftMPerS = shiftSpeedMPerS(vehicle, rating, slope);
  const end = afterAcceleration(vehicle, conditions, shiftMPerS);
  if (end === null) return { timeS: Number.NaN, distanceM: Number.NaN, gear: 0, shiftMPerS: Number.NaN };
  const gear = fromMPerS >= shiftMPerS || toMPerS > shiftMPerS ? 1 : 0;
  return { timeS: end.timeS, distanceM: end.distanceM, gear, shiftMPerS: gear === 1 && fromMPerS < shiftMPerS ? shiftMPerS : Number.NaN };
}

function afterAcceleration(vehicle: Vehicle, conditions: AccelerationConditions, shiftMPerS: number): Motion | null {
  const { fromMPerS, toMPerS, slope } = conditions;
  const gear = highestGear(vehicle);
  if (isBeyondMotorSpeed(vehicle, gear, toMPerS)) return null;
  const start: Motion = { speedMPerS: fromMPerS, timeS: 0, distanceM: 0 };
  if (fromMPerS >= shiftMPerS) return afterSpeedingUp(pullInGear(vehicle, gear, conditions), start, toMPerS);
  const before = afterSpeedingUp(pullInGear(vehicle, 0, conditions), start, Math.min(toMPerS, shiftMPerS));
  if (before === null || toMPerS <= shiftMPerS) return before;
  const shifted = afterShift(vehicle, slope, before, (motion) => motion.speedMPerS - toMPerS);
  if (shifted.trialEnded) return shifted;
  return shifted.speedMPerS === 0 ? null : afterSpeedingUp(pullInGear(vehicle, gear, conditions), shifted, toMPerS);
}
