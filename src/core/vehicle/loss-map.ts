/** A measured loss map: losses of motor and inverter on a grid of speed and torque, as stated at its own reference motor. */

/** Losses on a full grid; `lossesW[i * torques + j]` belongs to speed i and torque j. Axes rise strictly. */
export interface LossMap {
  readonly speedsRadPerS: readonly number[];
  readonly torquesNm: readonly number[];
  readonly lossesW: readonly number[];
  /** The map knows motoring only: generating torque reads it at |T|. */
  readonly motoringOnly: boolean;
  /** The inverter is not in the map: its coefficients come on top. */
  readonly motorAlone: boolean;
  readonly referencePeakTorqueNm: number;
  readonly referenceBaseSpeedRadPerS: number;
}

/**
 * Losses (W) behind a measured efficiency at torque T ≠ 0 and speed ω > 0: T ω (1/e − 1) motoring, |T| ω (1 − e) generating.
 * Interpolate these, never the efficiency.
 */
export function lossOfEfficiencyW(torqueNm: number, speedRadPerS: number, efficiency: number): number {
  const shaftW = torqueNm * speedRadPerS;
  return torqueNm >= 0 ? shaftW * (1 / efficiency - 1) : -shaftW * (1 - efficiency);
}
