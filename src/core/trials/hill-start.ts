/** Hill start: the steepest grade on which a vehicle moves off at full pedal. */
import type { DrivingRating } from '../vehicle/traction-breaks.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import { type GradeResult, steepestGrade } from './steepest-grade.ts';

/** The acceleration (m/s²) that must remain on the grade. */
export interface HillStartConditions {
  startAccelerationMPerS2: number;
  rating: DrivingRating;
}

/** The steepest grade on which full pedal at standstill keeps an acceleration, F = R + m_e a, in the lower gear; in closed form. */
export function solveHillStart(vehicle: Vehicle, { startAccelerationMPerS2, rating }: HillStartConditions): GradeResult {
  const standing = rating === 'peak' ? 'standstill' : 'standstill continuous';
  return steepestGrade(vehicle, 0, 0, standing, vehicle.effectiveMassKg[0] * startAccelerationMPerS2);
}
