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
