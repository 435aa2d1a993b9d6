/** Speeds at which the law of tractive force or road load changes: between them both are smooth. */
import { type RealFunction, signChange, signChanges } from '../numerics/roots.ts';
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
  const torqueEnds = torqueStretches(vehicle, rating, fromMPerS * perSpeed, toMPerS * perSpeed);
  const ends = [fromMPerS, toMPerS];
  for (let k = 1; k < torqueEnds.length - 1; k++) insert(ends, torqueEnds[k] / perSpeed);
  insert(ends, -vehicle.road.headWindMPerS);
  for (const speed of adhesionBreakSpeedsMPerS(vehicle)) insert(ends, speed);
  insertAdhesion(vehicle, gear, rating, slope, ends);
  return ends.slice(1, -1);
}

// Below, a list of ends holds both ends of a range and, rising, what parts it into smooth stretches.

/** Ends (rad/s) of the stretches on which the torque that motor and battery allow is smooth. */
function torqueStretches(vehicle: Vehicle, rating: DrivingRating, from: number, to: number): number[] {
  const ends = limitStretches(vehicle.motor, rating, from, to);
  if (mayBind(vehicle, rating, to)) insertBattery(vehicle, rating, ends);
  return ends;
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

/** Ends (rad/s) of the stretches on which the torque limit of the rating is smooth. */
function limitStretches(motor: Motor, rating: DrivingRating, from: number, to: number): number[] {
  const branches = [from, to];
  insertBranches(motor, branches);
  if (rating === 'peak') return branches;
  const corner = (motor.baseSpeedRadPerS * motor.continuousPowerShare) / motor.continuousTorqueShare;
  const stretches = branches.slice();
  insert(stretches, corner);
  const above = (speed: number) => continuousRatingNm(motor, speed) - peakTorqueLimitNm(motor, speed);
  const near = (speed: number) => 1e-9 * peakTorqueLimitNm(motor, speed);
  const ends = [from, to];
  insertChanges(stretches, above, ends);
  if (above(corner) <= near(corner)) insert(ends, corner);
  for (const speed of branches) if (speed === motor.maxSpeedRadPerS || above(speed) >= -near(speed)) insert(ends, speed);
  return ends;
}

/** Where a branch of the peak limit ends, the last at maximum speed. */
function insertBranches(motor: Motor, ends: number[]): void {
  insert(ends, motor.maxSpeedRadPerS);
  if (motor.fullLoad === null) {
    insert(ends, motor.baseSpeedRadPerS);
    insert(ends, motor.constantPowerToRadPerS);
    return;
  }
  const stretch = motor.baseSpeedRadPerS / motor.fullLoad.referenceBaseSpeedRadPerS;
  for (const speed of motor.fullLoad.speedsRadPerS) insert(ends, speed * stretch);
}

/** Where the battery starts or stops to bind, and, while it binds, where its torque changes its law. */
function insertBattery(vehicle: Vehicle, rating: DrivingRating, ends: number[]): void {
  const { motor } = vehicle;
  const allowedW = dischargeLimitW(vehicle.battery) - vehicle.auxiliariesW;
  const beyond = motor.lossMap === null ? powerBeyond(motor, rating, allowedW) : torqueBeyond(vehicle, rating);
  const stretches = ends.slice();
  insertLossLaw(motor, stretches);
  insertChanges(stretches, beyond, ends);
  for (const speed of ends) insert(stretches, speed);
  let boundBefore = false;
  for (let k = 1; k < stretches.length; k++) {
    const bound = beyond(0.5 * (stretches[k - 1] + stretches[k])) > 0;
    if (bound || boundBefore) insert(ends, stretches[k - 1]);
    if (bound) insertLineCrossings(motor, allowedW, stretches[k - 1], stretches[k], ends);
    boundBefore = bound;
  }
}

// Two functions of motor speed that are above zero where the battery binds.

/** Power (W) beyond the battery's at the motor's own limit: losses by coefficients rise with torque, so that the battery binds just there. */
function powerBeyond(motor: Motor, rating: DrivingRating, allowedW: number): RealFunction {
  return (speed) => {
    const limitNm = torqueLimitNm(motor, speed, rating);
    return limitNm * speed + motorLossW(motor, limitNm, speed) - allowedW;
  };
}

/** Torque (N·m) that the motor would give beyond the battery's; held where the battery is far from binding, so that it stays finite. */
function torqueBeyond(vehicle: Vehicle, rating: DrivingRating): RealFunction {
  return (speed) => {
    const limitNm = torqueLimitNm(vehicle.motor, speed, rating);
    return Math.max(limitNm - batteryTorqueLimitNm(vehicle, speed), -limitNm);
  };
}

/** Where the loss law itself changes: base speed and the speed lines of a map. */
function insertLossLaw({ baseSpeedRadPerS, lossMap }: Motor, ends: number[]): void {
  insert(ends, baseSpeedRadPerS);
  if (lossMap === null) return;
  const stretch = baseSpeedRadPerS / lossMap.referenceBaseSpeedRadPerS;
  for (const speed of lossMap.speedsRadPerS) insert(ends, speed * stretch);
}

/** Where the battery's torque becomes 0 or passes a torque line of the loss map, on a smooth stretch on which it binds. */
function insertLineCrossings(motor: Motor, allowedW: number, from: number, to: number, ends: number[]): void {
  const insertLine = (torqueNm: number) => insertChanges([from, to], (speed) => torqueNm * speed + motorLossW(motor, torqueNm, speed) - allowedW, ends);
  if (motor.lossMap === null) {
    // Losses by coefficients rise with speed: the last speed tells whether they ever use up what is allowed.
    if (motorLossW(motor, 0, to) > allowedW) insertLine(0);
    return;
  }
  insertLine(0);
  const perLine = motor.peakTorqueNm / motor.lossMap.referencePeakTorqueNm;
  for (const torque of motor.lossMap.torquesNm) if (torque > 0) insertLine(torque * perLine);
}

/** Where adhesion starts or stops to bind. */
function insertAdhesion(vehicle: Vehicle, gear: Gear, rating: DrivingRating, slope: Slope, ends: number[]): void {
  const grip = (speed: number) => adhesionLimitN(vehicle, speed, slope.cos);
  const { motor, gearing, wheelRadiusM } = vehicle;
  const mostN = (largestTorqueNm(motor) * gearing.ratios[gear] * gearing.efficiencies[gear]) / wheelRadiusM;
  const [from, to] = [ends[0], ends[ends.length - 1]];
  // Adhesion rises or falls throughout with speed: it is least at one of the ends.
  if (Math.min(grip(from), grip(to)) > mostN) return;
  const excessN = (speed: number) => driveForceN(vehicle, gear, speed, rating) - grip(speed);
  if (motor.fullLoad !== null || motor.lossMap !== null || vehicle.axles.driven === 'rear') insertChanges(ends.slice(), excessN, ends);
  // By the laws alone drive force never rises, and the other axles' adhesion never falls.
  else if (excessN(from) > 0 && !(excessN(to) > 0)) insert(ends, signChange(excessN, from, to));
}

/** Inserts the speeds at which `f`, smooth on each of the stretches, changes sign. */
function insertChanges(stretches: readonly number[], f: RealFunction, ends: number[]): void {
  for (let k = 1; k < stretches.length; k++) {
    for (const speed of signChanges(f, stretches[k - 1], stretches[k], PIECES)) insert(ends, speed);
  }
}

/** Inserts a value where it belongs, unless it lies outside the ends or as good as on one. */
function insert(ends: number[], value: number): void {
  let k = ends.length - 1;
  while (k >= 0 && ends[k] > value) k--;
  // NaN finds no place either.
  if (!(k >= 0 && k < ends.length - 1)) return;
  if (value - ends[k] > SAME * value && ends[k + 1] - value > SAME * value) ends.splice(k + 1, 0, value);
}
