/** Speeds at which the law of tractive force or road load changes: between them both are smooth. */
import { signChanges } from '../numerics/roots.ts';
import { adhesionBreakSpeedsMPerS, adhesionLimitN } from './adhesion.ts';
import { batteryTorqueLimitNm, dischargeLimitW } from './battery.ts';
import { type Gear, motorSpeedRadPerS } from './gearing.ts';
import { continuousRatingNm, mapScale, motorLossW, peakTorqueLimitNm } from './motor.ts';
import type { Slope } from './road-load.ts';
import { driveForceN, type Rating, torqueLimitNm } from './traction.ts';
import type { Motor, Vehicle } from './vehicle.ts';

/** Ratings of a moving vehicle. */
export type DrivingRating = Extract<Rating, 'peak' | 'continuous'>;

/** Pieces in which a smooth stretch is searched for crossings; dips between them are followed further. */
const PIECES = 4;
/** Breaks closer than this share of their speed are one. */
const SAME = 1e-11;

/**
 * Speeds (m/s) strictly inside (from, to), rising, at which F(v) or R(v) changes its law: ends of the motor's branches, points of a
 * measured curve, the continuous corner, where continuous and peak limit, battery or adhesion start or stop to bind, where a rear axle stops to
 * carry the whole weight, grid lines of a loss map while the battery binds, maximum motor speed, and where a tail wind and the vehicle are
 * level. Between them both are smooth.
 */
export function tractionBreakSpeeds(vehicle: Vehicle, gear: Gear, rating: DrivingRating, slope: Slope, fromMPerS: number, toMPerS: number): number[] {
  const perSpeed = motorSpeedRadPerS(vehicle, gear, 1);
  const drive = torqueBreaksRadPerS(vehicle, rating, fromMPerS * perSpeed, toMPerS * perSpeed).map((speedRadPerS) => speedRadPerS / perSpeed);
  const breaks = rising([...drive, -vehicle.road.headWindMPerS, ...adhesionBreakSpeedsMPerS(vehicle)], fromMPerS, toMPerS);
  const gripping = adhesionBreaksMPerS(vehicle, gear, rating, slope, [fromMPerS, ...breaks, toMPerS]);
  return gripping.length === 0 ? breaks : rising([...breaks, ...gripping], fromMPerS, toMPerS);
}

/** Motor speeds at which the torque that motor and battery allow changes its law. */
function torqueBreaksRadPerS(vehicle: Vehicle, rating: DrivingRating, from: number, to: number): number[] {
  const limitBreaks = limitBreaksRadPerS(vehicle.motor, rating, from, to);
  return mayBind(vehicle, rating, to) ? [...limitBreaks, ...batteryBreaksRadPerS(vehicle, rating, limitBreaks, from, to)] : limitBreaks;
}

/** Could the battery bind at a motor speed up to `to`? No where it has room for the most power and the most loss at once. */
function mayBind({ motor, battery, auxiliariesW }: Vehicle, rating: DrivingRating, to: number): boolean {
  const mostNm = rating === 'peak' ? largestTorqueNm(motor) : motor.continuousTorqueShare * motor.peakTorqueNm;
  const mostW = rating === 'peak' ? largestPowerW(motor) : motor.continuousPowerShare * motor.peakPowerW;
  return mostW + largestLossW(motor, mostNm, to) + auxiliariesW > dischargeLimitW(battery);
}

function largestTorqueNm(motor: Motor): number {
  if (motor.fullLoad === null) return motor.peakTorqueNm;
  return largest(motor.fullLoad.torquesNm) * (motor.peakTorqueNm / motor.fullLoad.referencePeakTorqueNm);
}

/** Largest power (W) of the peak limit, or more: the larger torque of each stretch of a curve at its higher speed. */
function largestPowerW(motor: Motor): number {
  if (motor.fullLoad === null) return motor.peakPowerW;
  const { speedsRadPerS, torquesNm, referencePeakTorqueNm, referenceBaseSpeedRadPerS } = motor.fullLoad;
  const most = largest(speedsRadPerS.map((speed, k) => speed * Math.max(torquesNm[k], torquesNm[Math.max(k - 1, 0)])));
  return (most * motor.peakPowerW) / (referencePeakTorqueNm * referenceBaseSpeedRadPerS);
}

/** Largest loss (W) up to a torque and a speed, or more: losses by coefficients rise with both, a map has its largest anywhere. */
function largestLossW(motor: Motor, torqueNm: number, speedRadPerS: number): number {
  if (motor.lossMap === null) return motorLossW(motor, torqueNm, speedRadPerS);
  const measuredW = largest(motor.lossMap.lossesW) * mapScale(motor, motor.lossMap);
  return motor.lossMap.motorAlone ? measuredW + motorLossW({ ...motor, lossMap: null }, torqueNm, speedRadPerS) : measuredW;
}

/** The largest of values that are not negative; measured grids may be too long to be spread as arguments. */
function largest(values: readonly number[]): number {
  let most = 0;
  for (const value of values) if (value > most) most = value;
  return most;
}

/** Motor speeds at which the torque limit of the rating changes its law. */
function limitBreaksRadPerS(motor: Motor, rating: DrivingRating, from: number, to: number): number[] {
  const branches = rising(branchEndsRadPerS(motor), from, to);
  if (rating === 'peak') return branches;
  const corner = (motor.baseSpeedRadPerS * motor.continuousPowerShare) / motor.continuousTorqueShare;
  const stretches = [from, ...rising([...branches, corner], from, to), to];
  const above = (speed: number) => continuousRatingNm(motor, speed) - peakTorqueLimitNm(motor, speed);
  const meeting = crossings(stretches, above, PIECES);
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
  const binds = (speed: number) => batteryTorqueLimitNm(vehicle, speed) <= torqueLimitNm(motor, speed, rating) * (1 + 1e-9);
  const bound = pairsOf([from, ...rising([...limitBreaks, ...lossBreaks, ...starts], from, to), to]).filter(([a, b]) => beyond(0.5 * (a + b)) > 0);
  return [...starts, ...lossBreaks.filter(binds), ...bound.flatMap(([a, b]) => lineCrossings(vehicle, a, b))];
}

/** Motor speeds in (from, to) at which the battery's torque becomes 0 or passes a torque line of the loss map. */
function lineCrossings(vehicle: Vehicle, from: number, to: number): number[] {
  const { motor } = vehicle;
  const map = motor.lossMap;
  const allowedW = dischargeLimitW(vehicle.battery) - vehicle.auxiliariesW;
  const lines = map === null ? [] : map.torquesNm.map((torque) => torque * (motor.peakTorqueNm / map.referencePeakTorqueNm));
  const positive = lines.filter((torqueNm) => torqueNm > 0);
  return [0, ...positive].flatMap((torqueNm) => signChanges((speed) => torqueNm * speed + motorLossW(motor, torqueNm, speed) - allowedW, from, to, 2));
}

/** Speeds at which adhesion starts or stops to bind; `stretches` are smooth for the drive force. */
function adhesionBreaksMPerS(vehicle: Vehicle, gear: Gear, rating: DrivingRating, slope: Slope, stretches: readonly number[]): number[] {
  const grip = (speed: number) => adhesionLimitN(vehicle, speed, slope.cos);
  const { motor, gearing, wheelRadiusM } = vehicle;
  const mostN = (largestTorqueNm(motor) * gearing.ratios[gear] * gearing.efficiencies[gear]) / wheelRadiusM;
  // Adhesion rises or falls throughout with speed: it is least at one of the ends.
  if (Math.min(grip(stretches[0]), grip(stretches[stretches.length - 1])) > mostN) return [];
  return crossings(stretches, (speed) => driveForceN(vehicle, gear, speed, rating) - grip(speed), PIECES);
}

function crossings(stretches: readonly number[], f: (x: number) => number, pieces: number): number[] {
  return pairsOf(stretches).flatMap(([a, b]) => signChanges(f, a, b, pieces));
}

function pairsOf(points: readonly number[]): [number, number][] {
  return points.slice(1).map((to, k) => [points[k], to]);
}

/** The values strictly inside (from, to), rising, near-equal ones taken as one. */
function rising(values: readonly number[], from: number, to: number): number[] {
  const kept: number[] = [];
  let last = from;
  const inside = values.filter((value) => value > from && value < to);
  for (const value of inside.sort((a, b) => a - b)) {
    if (value - last <= SAME * value || to - value <= SAME * to) continue;
    kept.push(value);
    last = value;
  }
  return kept;
}
