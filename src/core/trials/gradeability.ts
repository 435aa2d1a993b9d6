/** Gradeability: the steepest grade on which a speed is held at full pedal. */
import type { DrivingRating } from '../vehicle/traction-breaks.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import { highestGear, isBeyondMotorSpeed } from './full-pedal.ts';
import { type GradeResult, steepestGrade } from './steepest-grade.ts';

/** The speed to hold, m/s. */
export interface GradeabilityConditions {
  speedMPerS: number;
  rating: DrivingRating;
}

/**
 * The steepest grade on which a speed is held without acceleration, in closed form; with two ratios in the better one. NaN with the limit
 * 'motor speed' above maximum motor speed.
 */
export function solveGradeability(vehicle: Vehicle, { speedMPerS, rating }: GradeabilityConditions): GradeResult {
  const gear = highestGear(vehicle);
  if (isBeyondMotorSpeed(vehicle, gear, speedMPerS)) return { grade: Number.NaN, gear, limit: 'motor speed' };
  const lowerEnds = isBeyondMotorSpeed(vehicle, 0, speedMPerS);
  if (lowerEnds) return steepestGrade(vehicle, 1, speedMPerS, rating, 0);
  const inLower = steepestGrade(vehicle, 0, speedMPerS, rating, 0);
  if (vehicle.gearing.ratioCount === 1) return inLower;
  const inHigher = steepestGrade(vehicle, 1, speedMPerS, rating, 0);
  return inHigher.grade > inLower.grade ? inHigher : inLower;
}
