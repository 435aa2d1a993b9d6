/** Speeds at which the law of tractive force or road load changes: between them both are smooth. */
import { signChanges } from '../numerics/roots.ts';
import { adhesionLimitN } from './adhesion.ts';
import { batteryTorqueLimitNm, dischargeLimitW } from './battery.ts';
import { type Gear, motorSpeedRadPerS } from './gearing.ts';
import { continuousRatingNm, motorLossW, peakTorqueLimitNm } from './motor.ts';
import type { Slope } from './road-load.ts';
import { driveForceN, type Rating, torqueLimitNm } from './traction.ts';
import type { Motor, Vehicle } from './vehicle.ts';

/** Ratings of a moving vehicle. */
export type DrivingRating = Extract<Rating, 'peak' | 'continuous'>;

/** Pieces in which a smooth stretch is searched for crossings; dips between them are followed further. */
const PIECES = 8;
/** Breaks closer than this share of their speed are one. */
const SAME = 1e-11;

/**
 * Speeds (m/s) strictly inside (from, to), rising, at which F(v) or R(v) changes its law: ends of the motor's branches, points of a
 * measured curve, the continuous corner, where continuous and peak limit, battery or adhesion start or stop to bind, grid lines of a loss
 * map while the battery binds, maximum motor speed, and the air standing still against a tail wind. Between them both are smooth.
 */
export function tractionBreakSpeeds(vehicle: Vehicle, gear: Gear, rating: DrivingRating, slope: Slope, fromMPerS: number, toMPerS: number): number[] {
  const perSpeed = motorSpeedRadPerS(vehicle, gear, 1);
  const drive = torqueBreaksRadPerS(vehicle, rating, fromMPerS * perSpeed, toMPerS * perSpeed).map((speedRadPerS) => speedRadPerS / perSpeed);
  const breaks = rising([...drive, -vehicle.road.headWindMPerS], fromMPerS, toMPerS);
  const gripping = adhesionBreaksMPerS(vehicle, gear, rating, slope, [fromMPerS, ...breaks, toMPerS]);
  return gripping.length === 0 ? breaks : rising([...breaks, ...gripping], fromMPerS, toMPerS);
}

/** Motor speeds at which the torque that motor and battery allow changes its law. */
function torqueBreaksRadPerS(vehicle: Vehicle, rating: DrivingRating, from: number, to: number): number[] {
  const limitBreaks = limitBreaksRadPerS(vehicle.motor, rating, from, to);
  return dischargeLimitW(vehicle.battery) === Infinity ? limitBreaks : [...limitBreaks, ...batteryBreaksRadPerS(vehicle, rating, limitBreaks, from, to)];
}

/** Motor speeds at which the torque limit of the rating changes its law. */
function limitBreaksRadPerS(motor: Motor, rating: DrivingRating, from: number, to: number): number[] {
  const branches = rising(branchEndsRadPerS(motor), from, to);
  if (rating === 'peak') return branches;
  const corner = (motor.baseSpeedRadPerS * motor.continuousPowerShare) / motor.continuousTorqueShare;
  const stretches = [from, ...rising([...branches, corner], from, to), to];
  const above = (speed: number) => continuousRatingNm(motor, speed) - peakTorqueLimitNm(motor, speed);
  const meeting = crossings(stretches, above, PIECES / 2);
  const near = (speed: number) => 1e-9 * peakTorqueLimitNm(motor, speed);
  const peakHolds = branches.filter((speed) => speed === motor.maxSpeedRadPerS || above(speed) >= -near(speed));
  return rising([...peakHolds, ...meeting, ...(above(corner) <= near(corner) ? [corner] : [])], from, to);
}

/** Motor speeds at which a branch of the peak limit ends, the last maximum speed. */
function branchEndsRadPerS(motor: Motor): number[] {
  if (motor.fullLoad === null) return [motor.baseSpeedRadPerS, motor.constantPowerToRadPerS, motor.maxSpeedRadPerS];
  const stretch = motor.baseSpeedRadPerS / motor.fullLoad.referenceBaseSpeedRadPerS;
  return [...motor.fullLoad.speedsRadPerS.map((speed) => speed * stretch), motor.maxSpeedRadPerS];
}

/** Motor speeds at which the battery starts or stops to bind, and, while it binds, at which its torque changes its law. */
function batteryBreaksRadPerS(vehicle: Vehicle, rating: DrivingRating, limitBreaks: readonly number[], from: number, to: number): number[] {
  const { motor } = vehicle;
  const map = motor.lossMap;
  const lossLines = map === null ? [] : map.speedsRadPerS.map((speed) => speed * (motor.baseSpeedRadPerS / map.referenceBaseSpeedRadPerS));
  const lossBreaks = rising([motor.baseSpeedRadPerS, ...lossLines], from, to);
  const stretches = [from, ...rising([...limitBreaks, ...lossBreaks], from, to), to];
  // Torque (N·m) that the motor would give beyond the battery's; held where the battery is far from binding, so that it stays finite.
  const beyond = (speed: number) => {
    const limitNm = torqueLimitNm(motor, speed, rating);
    return Math.max(limitNm - batteryTorqueLimitNm(vehicle, speed), -limitNm);
  };
  const starts = crossings(stretches, beyond, PIECES);
  const torqueLines = [0, ...(map === null ? [] : map.torquesNm.filter((torque) => torque > 0))];
  const toTorque = map === null ? 1 : motor.peakTorqueNm / map.referencePeakTorqueNm;
  const bends = torqueLines.flatMap((line) => lineCrossings(vehicle, rating, line * toTorque, stretches));
  const binds = (speed: number) => batteryTorqueLimitNm(vehicle, speed) <= torqueLimitNm(motor, speed, rating) * (1 + 1e-9);
  return [...starts, ...lossBreaks.filter(binds), ...bends];
}

/** Motor speeds at which the battery's torque passes `torqueNm`, a grid line of the map (or 0), below the motor's limit. */
function lineCrossings(vehicle: Vehicle, rating: DrivingRating, torqueNm: number, stretches: readonly number[]): number[] {
  const allowedW = dischargeLimitW(vehicle.battery) - vehicle.auxiliariesW;
  const excessW = (speed: number) => torqueNm * speed + motorLossW(vehicle.motor, torqueNm, speed) - allowedW;
  return crossings(stretches, excessW, 2).filter((speed) => torqueNm <= torqueLimitNm(vehicle.motor, speed, rating));
}

/** Speeds at which adhesion starts or stops to bind; `stretches` are smooth for the drive force. */
function adhesionBreaksMPerS(vehicle: Vehicle, gear: Gear, rating: DrivingRating, slope: Slope, stretches: readonly number[]): number[] {
  const grip = (speed: number) => adhesionLimitN(vehicle, speed, slope.cos);
  const { motor, gearing, wheelRadiusM } = vehicle;
  const mostNm = motor.fullLoad === null ? motor.peakTorqueNm : Math.max(...branchEndsRadPerS(motor).map((speed) => peakTorqueLimitNm(motor, speed)));
  const mostN = (mostNm * gearing.ratios[gear] * gearing.efficiencies[gear]) / wheelRadiusM;
  // Adhesion rises or falls throughout with speed: it is least at one of the ends.
  if (Math.min(grip(stretches[0]), grip(stretches[stretches.length - 1])) > mostN) return [];
  return crossings(stretches, (speed) => driveForceN(vehicle, gear, speed, rating) - grip(speed), PIECES);
}

function crossings(stretches: readonly number[], f: (x: number) => number, pieces: number): number[] {
  const found: number[] = [];
  for (let k = 1; k < stretches.length; k++) found.push(...signChanges(f, stretches[k - 1], stretches[k], pieces));
  return found;
}

/** The values strictly inside (from, to), rising, near-equal ones taken as one. */
function rising(values: readonly number[], from: number, to: number): number[] {
  const kept: number[] = [];
  let last = from;
  for (const value of values.slice().sort((a, b) => a - b)) {
    if (value - last <= SAME * value || to - value <= SAME * to) continue;
    kept.push(value);
    last = value;
  }
  return kept;
}
