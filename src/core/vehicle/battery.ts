/** Traction battery at its terminals: current, discharge limit, and the motor torque that the limit allows. */
import { blend, cellOf, placeInCell } from '../numerics/interpolation.ts';
import type { LossMap } from './loss-map.ts';
import { fieldCurrentSquareShare, idleLossW, mapScale, motorLossW, windingLossW } from './motor.ts';
import type { Battery, Motor, Vehicle } from './vehicle.ts';

/** Largest power (W) at the terminals: the stated limit or V²/(4R), where the pack gives all it can; Infinity without either. */
export function dischargeLimitW(battery: Battery): number {
  return Math.min(battery.dischargeW, mostPowerW(battery));
}

/** V²/(4R): terminal power of the pack at half its open-circuit voltage; Infinity without resistance. */
export function mostPowerW(battery: Battery): number {
  const { voltageV, resistanceOhm } = battery;
  return resistanceOhm > 0 ? (voltageV * voltageV) / (4 * resistanceOhm) : Infinity;
}

/**
 * Current (A, charging negative) at terminal power P: the smaller root of P = V I − R I², written without the difference of
 * nearly equal numbers; P beyond V²/(4R) is held there. Source: open-circuit voltage and resistance in series.
 */
export function packCurrentA(battery: Battery, terminalW: number): number {
  const { voltageV, resistanceOhm } = battery;
  const heldW = Math.min(terminalW, mostPowerW(battery));
  const root = Math.sqrt(Math.max(0, voltageV * voltageV - 4 * resistanceOhm * heldW));
  return (2 * heldW) / (voltageV + root);
}

/**
 * Lowest torque T ≥ 0 (N·m) at which T ω + losses + auxiliaries use up the discharge limit; 0 where losses and auxiliaries alone
 * exceed it, Infinity where no torque reaches it. Relative error at most 1e-13 beside the rounding of the power balance itself.
 */
export function batteryTorqueLimitNm(vehicle: Vehicle, speedRadPerS: number): number {
  const allowedW = dischargeLimitW(vehicle.battery) - vehicle.auxiliariesW;
  if (allowedW === Infinity) return Infinity;
  const { motor } = vehicle;
  return motor.lossMap === null ? coefficientLimitNm(motor, allowedW, speedRadPerS) : mapLimitNm(motor, motor.lossMap, allowedW, speedRadPerS, Infinity);
}

/** `torqueNm` ≥ 0, or the battery limit where that is less: the same as the lesser of the two, but quicker. */
export function clipToBatteryNm(vehicle: Vehicle, torqueNm: number, speedRadPerS: number): number {
  const allowedW = dischargeLimitW(vehicle.battery) - vehicle.auxiliariesW;
  if (allowedW === Infinity) return torqueNm;
  const { motor } = vehicle;
  if (motor.lossMap !== null) return Math.min(torqueNm, mapLimitNm(motor, motor.lossMap, allowedW, speedRadPerS, torqueNm));
  // Losses from coefficients rise with torque: a torque that keeps to the limit lies below the lowest that reaches it.
  if (torqueNm * speedRadPerS + motorLossW(motor, torqueNm, speedRadPerS) <= allowedW) return torqueNm;
  return Math.min(torqueNm, coefficientLimitNm(motor, allowedW, speedRadPerS));
}

// What follows solves the power balance in the torque share τ = T / peak torque:
//   square τ² + linear τ + root √(τ² + field) = left,   field the square of the field-weakening share.
// Its left side is convex, so that Newton's method from beyond the root falls onto it without passing it.

function coefficientLimitNm(motor: Motor, allowedW: number, speedRadPerS: number): number {
  const field = fieldCurrentSquareShare(motor, speedRadPerS);
  const square = windingLossW(motor, speedRadPerS) + motor.peakPowerW * motor.losses.inverterSquare;
  const root = motor.peakPowerW * motor.losses.inverterLinear;
  const left = allowedW - idleLossW(motor, speedRadPerS) - motor.peakPowerW * motor.losses.inverterFixed - square * field;
  return openLimit(square, motor.peakTorqueNm * speedRadPerS, root, field, left) * motor.peakTorqueNm;
}

/** Lowest root τ ≥ 0 of a balance whose terms all rise with τ; 0 where nothing is left, Infinity where nothing rises. */
function openLimit(square: number, linear: number, root: number, field: number, left: number): number {
  if (left <= root * Math.sqrt(field)) return 0;
  // √(τ² + f) ≥ τ: leaving f out lowers the balance, so this start lies at or beyond the root.
  const slope = linear + root;
  const start = (2 * left) / (slope + Math.sqrt(slope * slope + 4 * square * left));
  if (root === 0 || field === 0 || start === Infinity) return start;
  return fallToRoot(square, linear, root, field, left, start);
}

/** Newton's method on the balance from `start` at or beyond its root. */
function fallToRoot(square: number, linear: number, root: number, field: number, left: number, start: number): number {
  let share = start;
  for (;;) {
    const current = Math.sqrt(share * share + field);
    const excess = share * (square * share + linear) + root * current - left;
    const slope = 2 * square * share + linear + (root * share) / current;
    const next = share - excess / slope;
    if (!(next < share)) return share;
    share = next;
  }
}

/**
 * The same with measured losses, which are linear in torque between grid lines and constant beyond the last: walks up the
 * grid to the first line at or beyond the limit. Infinity as soon as it is known to lie beyond `enoughNm`.
 */
function mapLimitNm(motor: Motor, map: LossMap, allowedW: number, speedRadPerS: number, enoughNm: number): number {
  const inverterW = map.motorAlone ? motor.peakPowerW : 0;
  const square = inverterW * motor.losses.inverterSquare;
  const root = inverterW * motor.losses.inverterLinear;
  const field = fieldCurrentSquareShare(motor, speedRadPerS);
  const linear = motor.peakTorqueNm * speedRadPerS;
  const left = allowedW - inverterW * motor.losses.inverterFixed - square * field;
  const measuredAt = speedRadPerS * (map.referenceBaseSpeedRadPerS / motor.baseSpeedRadPerS);
  const row = cellOf(map.speedsRadPerS, measuredAt);
  const rowShare = placeInCell(map.speedsRadPerS, row, measuredAt);
  const scale = mapScale(motor, map);
  const torques = map.torquesNm;

  let share = 0;
  const rest = cellOf(torques, 0);
  let lossW = blend(lossLineW(map, row, rowShare, rest), lossLineW(map, row, rowShare, rest + 1), placeInCell(torques, rest, 0)) * scale;
  if (left <= root * Math.sqrt(field) + lossW) return 0;
  for (let column = torques[rest] > 0 ? rest : rest + 1; column < torques.length; column++) {
    const nextShare = torques[column] / map.referencePeakTorqueNm;
    const nextLossW = lossLineW(map, row, rowShare, column) * scale;
    const needed = nextShare * (square * nextShare + linear) + root * Math.sqrt(nextShare * nextShare + field) + nextLossW;
    if (needed >= left) {
      const rise = (nextLossW - lossW) / (nextShare - share);
      return fallToRoot(square, linear + rise, root, field, left - (lossW - rise * share), nextShare) * motor.peakTorqueNm;
    }
    if (nextShare * motor.peakTorqueNm >= enoughNm) return Infinity;
    [share, lossW] = [nextShare, nextLossW];
  }
  return openLimit(square, linear, root, field, left - lossW) * motor.peakTorqueNm;
}

/** Measured loss (W) on torque line `column`, at a place between two speed rows. */
function lossLineW(map: LossMap, row: number, rowShare: number, column: number): number {
  const at = row * map.torquesNm.length + column;
  return blend(map.lossesW[at], map.lossesW[at + map.torquesNm.length], rowShare);
}
