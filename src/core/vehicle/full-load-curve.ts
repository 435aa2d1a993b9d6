/** A measured full-load curve: peak torque over motor speed, as stated at its own reference motor. */

/** Points in rising speed; torque is linear between them, constant below the first, and the last point is maximum speed. */
export interface FullLoadCurve {
  readonly speedsRadPerS: readonly number[];
  readonly torquesNm: readonly number[];
  /** What the curve states of its motor; the axes scale with a varied motor's peak torque and base speed. */
  readonly referencePeakTorqueNm: number;
  readonly referenceBaseSpeedRadPerS: number;
}
