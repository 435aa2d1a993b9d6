/** The steepest grade that a force holds, in closed form. */
import { adhesionLimitN } from '../vehicle/adhesion.ts';
import type { Gear } from '../vehicle/gearing.ts';
import { airResistanceN, rollingResistanceN } from '../vehicle/road-load.ts';
import { driveForceN, driveLimit, type Rating, type TractionLimit } from '../vehicle/traction.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';

/** What limits a grade: the tractive force, or that steeper ones than 45° are not reported. */
export type GradeLimit = TractionLimit | 'beyond 45°';

/** Rise over run, at most 1; negative: only downhill. NaN: no grade at all. */
export interface GradeResult {
  grade: number;
  gear: Gear;
  limit: GradeLimit;
}

/**
 * The steepest grade on which full pedal in that gear holds a speed (0: stands) and keeps `reserveN` besides. The drive force alone, and
 * adhesion, which shrinks with cos α as the weight on the tyres does, each hold a grade of their own; the lesser counts.
 */
export function steepestGrade(vehicle: Vehicle, gear: Gear, speedMPerS: number, rating: Rating, reserveN: number): GradeResult {
  const { road } = vehicle;
  const againstN = airResistanceN(road, speedMPerS) + reserveN;
  const rollingN = rollingResistanceN(road, speedMPerS, 1);
  const byDrive = gradeAt(driveForceN(vehicle, gear, speedMPerS, rating) - againstN, rollingN, road.weightN);
  // μ-limited force, rolling resistance and slope all turn with α; only air and reserve do not. Infinity where adhesion is not looked at.
  const gripN = adhesionLimitN(vehicle, speedMPerS, 1);
  const byGrip = gripN === Infinity ? Infinity : gradeAt(-againstN, rollingN - gripN, road.weightN);
  const grade = Math.min(byDrive, byGrip);
  if (grade > 1) return { grade: 1, gear, limit: 'beyond 45°' };
  return { grade: grade === -Infinity ? Number.NaN : grade, gear, limit: byGrip <= byDrive ? 'adhesion' : driveLimit(vehicle, gear, speedMPerS, rating) };
}

/**
 * tan α of the steepest slope on which forceN ≥ levelN cos α + weightN sin α. Infinity where it holds up to the vertical, −Infinity where
 * it holds nowhere. With ρ the root of levelN² + weightN²: sin(α + φ) = force/ρ, tan φ = level/weight.
 */
function gradeAt(forceN: number, levelN: number, weightN: number): number {
  const rest = levelN * levelN + weightN * weightN - forceN * forceN;
  if (rest < 0) return forceN > 0 ? Infinity : -Infinity;
  const across = Math.sqrt(rest);
  // cos α and sin α, both times ρ².
  const cos = weightN * across + levelN * forceN;
  return cos > 0 ? (weightN * forceN - levelN * across) / cos : forceN > 0 ? Infinity : -Infinity;
}
