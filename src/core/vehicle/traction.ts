/** Tractive force at full pedal: the least of what motor, battery and adhesion allow, and which of them it is. */
import { adhesionLimitN } from './adhesion.ts';
import { batteryTorqueLimitNm, clipToBatteryNm } from './battery.ts';
import { type Gear, motorSpeedRadPerS, wheelForceN } from './gearing.ts';
import { continuousRatingNm, continuousTorqueLimitNm, EDGE, peakTorqueLimitNm } from './motor.ts';
import type { Slope } from './road-load.ts';
import type { Motor, Vehicle } from './vehicle.ts';

/** Which motor limit is in force. At a hill start the standstill share of peak torque caps the peak or the continuous limit. */
export type Rating = 'peak' | 'continuous' | 'standstill' | 'standstill continuous';

/** What holds the force down, in the words that people read. */
export type TractionLimit = 'adhesion' | 'battery power' | 'motor speed' | 'motor torque' | 'motor power';

/** Motor torque limit (N·m) at ω ≥ 0 by the rating alone. */
export function torqueLimitNm(motor: Motor, speedRadPerS: number, rating: Rating): number {
  switch (rating) {
    case 'peak':
      return peakTorqueLimitNm(motor, speedRadPerS);
    case 'continuous':
      return continuousTorqueLimitNm(motor, speedRadPerS);
    case 'standstill':
      return Math.min(peakTorqueLimitNm(motor, speedRadPerS), motor.standstillShare * motor.peakTorqueNm);
    case 'standstill continuous':
      return Math.min(continuousTorqueLimitNm(motor, speedRadPerS), motor.standstillShare * motor.peakTorqueNm);
  }
}

/** Wheel force (N) that motor and battery allow at speed v ≥ 0, adhesion apart; negative where the drag is larger. */
export function driveForceN(vehicle: Vehicle, gear: Gear, speedMPerS: number, rating: Rating): number {
  const speedRadPerS = motorSpeedRadPerS(vehicle, gear, speedMPerS);
  const torqueNm = clipToBatteryNm(vehicle, torqueLimitNm(vehicle.motor, speedRadPerS, rating), speedRadPerS);
  return wheelForceN(vehicle, gear, torqueNm, speedRadPerS);
}

/** Tractive force (N) at full pedal at speed v ≥ 0 on a slope: the drive force, held by adhesion. */
export function tractiveForceN(vehicle: Vehicle, gear: Gear, speedMPerS: number, rating: Rating, slope: Slope): number {
  return Math.min(driveForceN(vehicle, gear, speedMPerS, rating), adhesionLimitN(vehicle, speedMPerS, slope.cos));
}

/** What limits the tractive force at that speed and slope; of equal limits the first in the order adhesion, battery, motor. */
export function tractionLimit(vehicle: Vehicle, gear: Gear, speedMPerS: number, rating: Rating, slope: Slope): TractionLimit {
  if (adhesionLimitN(vehicle, speedMPerS, slope.cos) <= driveForceN(vehicle, gear, speedMPerS, rating)) return 'adhesion';
  return driveLimit(vehicle, gear, speedMPerS, rating);
}

/** What limits the drive force, adhesion apart. */
export function driveLimit(vehicle: Vehicle, gear: Gear, speedMPerS: number, rating: Rating): TractionLimit {
  const { motor } = vehicle;
  const speedRadPerS = motorSpeedRadPerS(vehicle, gear, speedMPerS);
  if (speedRadPerS > motor.maxSpeedRadPerS * (1 + EDGE)) return 'motor speed';
  const torqueNm = torqueLimitNm(motor, speedRadPerS, rating);
  if (batteryTorqueLimitNm(vehicle, speedRadPerS) < torqueNm) return 'battery power';
  return isFlat(motor, torqueNm, speedRadPerS, rating) ? 'motor torque' : 'motor power';
}

/** Is the limit in force on its flat branch: a constant share of peak torque, or the peak limit up to base speed (measured or not)? */
function isFlat(motor: Motor, torqueNm: number, speedRadPerS: number, rating: Rating): boolean {
  const standing = rating === 'standstill' || rating === 'standstill continuous';
  if (standing && torqueNm === motor.standstillShare * motor.peakTorqueNm) return true;
  const continuous = rating === 'continuous' || rating === 'standstill continuous';
  if (continuous && torqueNm === continuousRatingNm(motor, speedRadPerS)) return torqueNm === motor.continuousTorqueShare * motor.peakTorqueNm;
  return speedRadPerS <= motor.baseSpeedRadPerS;
}
