/** A measured full-load curve: peak torque over motor speed, as stated at its own reference motor. */

/** Points in rising speed; torque is linear between them, constant below the first, and the last point is maximum speed. */
export interface FullLoadCurve {
  readonly speedsRadPerS: readonly number[];
  readonly torquesNm: readonly number[];
  /** What the curve states of its motor; the axes scale with a varied motor's peak torque and base speed. */
  readonly referencePeakTorqueNm: number;
  readonly referenceBaseSpeedRadPerS: number;
}

/**
 * A curve from its points (two or more) and the peak torque and base speed that it states; by default its largest torque, and
 * its largest power over its points divided by its largest torque.
 */
export function fullLoadCurve(
  speedsRadPerS: readonly number[],
  torquesNm: readonly number[],
  statedPeakTorqueNm?: number,
  statedBaseSpeedRadPerS?: number,
): FullLoadCurve {
  const largestTorqueNm = Math.max(...torquesNm);
  const largestPowerW = Math.max(...torquesNm.map((torqueNm, k) => torqueNm * speedsRadPerS[k]));
  return {
    speedsRadPerS,
    torquesNm,
    referencePeakTorqueNm: statedPeakTorqueNm ?? largestTorqueNm,
    referenceBaseSpeedRadPerS: statedBaseSpeedRadPerS ?? largestPowerW / largestTorqueNm,
  };
}

/** Maximum speed (rad/s) of a motor of that base speed under this curve. */
export function curveMaxSpeedRadPerS(curve: FullLoadCurve, baseSpeedRadPerS: number): number {
  return curve.speedsRadPerS[curve.speedsRadPerS.length - 1] * (baseSpeedRadPerS / curve.referenceBaseSpeedRadPerS);
}
