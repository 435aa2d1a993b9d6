/** Traction motor and inverter: torque limits over speed, and losses from coefficients or a measured map. */
import { interpolateBilinear, interpolateLinear } from '../numerics/interpolation.ts';
import type { LossMap } from './loss-map.ts';
import type { Motor } from './vehicle.ts';

/** Room for rounding when a speed or torque lies on the very edge of what a motor or a map covers. */
export const EDGE = 1e-12;

/**
 * Peak torque (N·m, motoring; generating is its mirror image) at ω ≥ 0: constant torque, constant power, then falling with
 * the square of speed, or the measured curve in the axes of this motor; 0 above maximum speed.
 */
export function peakTorqueLimitNm(motor: Motor, speedRadPerS: number): number {
  if (speedRadPerS > motor.maxSpeedRadPerS * (1 + EDGE)) return 0;
  if (motor.fullLoad !== null) {
    const { speedsRadPerS, torquesNm, referencePeakTorqueNm, referenceBaseSpeedRadPerS } = motor.fullLoad;
    const measuredAt = speedRadPerS * (referenceBaseSpeedRadPerS / motor.baseSpeedRadPerS);
    return interpolateLinear(speedsRadPerS, torquesNm, measuredAt) * (motor.peakTorqueNm / referencePeakTorqueNm);
  }
  if (speedRadPerS <= motor.baseSpeedRadPerS) return motor.peakTorqueNm;
  if (speedRadPerS <= motor.constantPowerToRadPerS) return motor.peakPowerW / speedRadPerS;
  return (motor.peakPowerW * motor.constantPowerToRadPerS) / (speedRadPerS * speedRadPerS);
}

/** Continuous torque by its own rating alone: constant torque, then constant power; may lie above the peak limit. */
export function continuousRatingNm(motor: Motor, speedRadPerS: number): number {
  const byTorque = motor.continuousTorqueShare * motor.peakTorqueNm;
  const byPower = (motor.continuousPowerShare * motor.peakPowerW) / speedRadPerS;
  return Math.min(byTorque, byPower);
}

/** Continuous torque limit (N·m) at ω ≥ 0: the continuous rating, never above the peak limit. NaN without a continuous rating. */
export function continuousTorqueLimitNm(motor: Motor, speedRadPerS: number): number {
  return Math.min(continuousRatingNm(motor, speedRadPerS), peakTorqueLimitNm(motor, speedRadPerS));
}

/** Speed (rad/s) of the continuous corner, where continuous torque meets continuous power; not above maximum speed. NaN without a rating. */
export function continuousCornerRadPerS(motor: Motor): number {
  return Math.min((motor.baseSpeedRadPerS * motor.continuousPowerShare) / motor.continuousTorqueShare, motor.maxSpeedRadPerS);
}

/** Losses (W) at the continuous corner: the level that loss loads are measured against. NaN without a continuous rating. */
export function continuousCornerLossW(motor: Motor): number {
  return motorLossW(motor, motor.continuousTorqueShare * motor.peakTorqueNm, continuousCornerRadPerS(motor));
}

/**
 * Losses of motor and inverter together (W) at shaft torque T (negative: generating) and speed ω ≥ 0: from coefficients, or
 * from a measured map in normalised axes, scaled by peak power. A map of the motor alone takes the inverter's coefficients on top.
 */
export function motorLossW(motor: Motor, torqueNm: number, speedRadPerS: number): number {
  if (motor.lossMap === null) {
    const currentSquare = currentSquareShare(motor, torqueNm, speedRadPerS);
    return machineLossW(motor, speedRadPerS, currentSquare) + inverterLossW(motor, currentSquare);
  }
  const measured = mapLossW(motor, motor.lossMap, torqueNm, speedRadPerS);
  return motor.lossMap.motorAlone ? measured + inverterLossW(motor, currentSquareShare(motor, torqueNm, speedRadPerS)) : measured;
}

/** Square of the field-weakening share of current, (κφ)²: 0 up to base speed. */
export function fieldCurrentSquareShare(motor: Motor, speedRadPerS: number): number {
  if (speedRadPerS <= motor.baseSpeedRadPerS) return 0;
  const share = motor.losses.fieldWeakening * (1 - motor.baseSpeedRadPerS / speedRadPerS);
  return share * share;
}

/** Square of motor current over peak current: torque share and field-weakening share at right angles. */
function currentSquareShare(motor: Motor, torqueNm: number, speedRadPerS: number): number {
  const torqueShare = torqueNm / motor.peakTorqueNm;
  return torqueShare * torqueShare + fieldCurrentSquareShare(motor, speedRadPerS);
}

/** Loss (W) that speed alone makes: hysteresis, eddy currents, windage. */
export function idleLossW(motor: Motor, speedRadPerS: number): number {
  const { hysteresis, eddyS, windageS2 } = motor.losses;
  return motor.peakTorqueNm * speedRadPerS * (hysteresis + speedRadPerS * (eddyS + speedRadPerS * windageS2));
}

/** Winding loss (W) at peak current: rises with the square of speed (skin and proximity effect). */
export function windingLossW(motor: Motor, speedRadPerS: number): number {
  return motor.peakTorqueNm * motor.losses.copperWPerNm * (1 + motor.losses.acCopperS2 * speedRadPerS * speedRadPerS);
}

function machineLossW(motor: Motor, speedRadPerS: number, currentSquare: number): number {
  return idleLossW(motor, speedRadPerS) + windingLossW(motor, speedRadPerS) * currentSquare;
}

function inverterLossW(motor: Motor, currentSquare: number): number {
  const { inverterFixed, inverterLinear, inverterSquare } = motor.losses;
  return motor.peakPowerW * (inverterFixed + inverterLinear * Math.sqrt(currentSquare) + inverterSquare * currentSquare);
}

/** Measured losses (W) alone, without any coefficient. */
function mapLossW(motor: Motor, map: LossMap, torqueNm: number, speedRadPerS: number): number {
  const speed = speedRadPerS * (map.referenceBaseSpeedRadPerS / motor.baseSpeedRadPerS);
  const torque = (map.motoringOnly ? Math.abs(torqueNm) : torqueNm) * (map.referencePeakTorqueNm / motor.peakTorqueNm);
  return interpolateBilinear(map.speedsRadPerS, map.torquesNm, map.lossesW, speed, torque) * mapScale(motor, map);
}

/** Peak power over the power of the motor that the map belongs to. */
export function mapScale(motor: Motor, map: LossMap): number {
  return motor.peakPowerW / (map.referencePeakTorqueNm * map.referenceBaseSpeedRadPerS);
}

/** Does the motor work outside its measured map at this torque and speed? False without a map. */
export function isOutsideMap(motor: Motor, torqueNm: number, speedRadPerS: number): boolean {
  const map = motor.lossMap;
  if (map === null) return false;
  const speed = speedRadPerS * (map.referenceBaseSpeedRadPerS / motor.baseSpeedRadPerS);
  const torque = (map.motoringOnly ? Math.abs(torqueNm) : torqueNm) * (map.referencePeakTorqueNm / motor.peakTorqueNm);
  return isOutside(map.speedsRadPerS, speed) || isOutside(map.torquesNm, torque);
}

function isOutside(axis: readonly number[], x: number): boolean {
  const first = axis[0];
  const last = axis[axis.length - 1];
  const room = EDGE * (last - first);
  return x < first - room || x > last + room;
}
