/** Motion at full pedal in one gear on one slope: how long and how far a change of speed takes, exactly by pieces. */
import { addMoments, type Moments } from '../numerics/quadrature.ts';
import type { RealFunction } from '../numerics/roots.ts';
import { adhesionLimitN } from '../vehicle/adhesion.ts';
import { clipToBatteryNm, dischargeLimitW } from '../vehicle/battery.ts';
import { type Gear, maxVehicleSpeedMPerS, motorSpeedRadPerS, wheelForceN } from '../vehicle/gearing.ts';
import { EDGE, motorLossW } from '../vehicle/motor.ts';
import { resistanceN, type Slope } from '../vehicle/road-load.ts';
import { torqueLimitNm } from '../vehicle/traction.ts';
import { type DrivingRating, tractionBreakSpeeds } from '../vehicle/traction-breaks.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';

/** What every full-pedal trial of a moving vehicle states. */
export interface PedalConditions {
  slope: Slope;
  rating: DrivingRating;
}

/** Where a vehicle is in its trial. */
export interface Motion {
  speedMPerS: number;
  timeS: number;
  distanceM: number;
}

/** Which gear a trial ends in, and the speed at which it shifts on the way; NaN where it does not. */
export interface GearUse {
  gear: Gear;
  shiftMPerS: number;
}

/** A vehicle at full pedal in one gear. */
export interface Pull {
  /** F − R at a speed. */
  readonly netForceN: RealFunction;
  readonly effectiveMassKg: number;
  /** Vehicle speed at maximum motor speed. */
  readonly topMPerS: number;
  /** Speeds strictly between two others at which the law of F or R changes, rising. */
  readonly breaksMPerS: (fromMPerS: number, toMPerS: number) => number[];
}

/** Uncertainty of net force by rounding, over mass (m/s²): about 1e-15 of the weight. */
const ROUNDING_M_PER_S2 = 1e-14;

/** The higher gear, or the only one. */
export function highestGear(vehicle: Vehicle): Gear {
  return vehicle.gearing.ratioCount === 1 ? 0 : 1;
}

/** Does a speed ask more than maximum motor speed in that gear? */
export function isBeyondMotorSpeed(vehicle: Vehicle, gear: Gear, speedMPerS: number): boolean {
  return speedMPerS > maxVehicleSpeedMPerS(vehicle, gear) * (1 + EDGE);
}

/** Full pedal in that gear. */
export function pullInGear(vehicle: Vehicle, gear: Gear, { slope, rating }: PedalConditions): Pull {
  return {
    netForceN: netForce(vehicle, gear, slope, rating),
    effectiveMassKg: vehicle.effectiveMassKg[gear],
    topMPerS: maxVehicleSpeedMPerS(vehicle, gear),
    breaksMPerS: (fromMPerS, toMPerS) => tractionBreakSpeeds(vehicle, gear, rating, slope, fromMPerS, toMPerS),
  };
}

/**
 * Tractive force less resistance, for many speeds: the same bits as `tractiveForceN` gives, but battery and adhesion are only asked where they
 * might bind.
 */
function netForce(vehicle: Vehicle, gear: Gear, slope: Slope, rating: DrivingRating): RealFunction {
  const { motor, road } = vehicle;
  const sparedW = powerWithinBatteryW(vehicle);
  const sparedN = Math.min(adhesionLimitN(vehicle, 0, slope.cos), adhesionLimitN(vehicle, maxVehicleSpeedMPerS(vehicle, gear), slope.cos));
  return (speedMPerS) => {
    const speedRadPerS = motorSpeedRadPerS(vehicle, gear, speedMPerS);
    const limitNm = torqueLimitNm(motor, speedRadPerS, rating);
    const spared = limitNm * speedRadPerS <= sparedW && limitNm <= motor.peakTorqueNm;
    const torqueNm = spared ? limitNm : clipToBatteryNm(vehicle, limitNm, speedRadPerS);
    const driveN = wheelForceN(vehicle, gear, torqueNm, speedRadPerS);
    // Adhesion rises or falls throughout with speed: it is least at one of the ends.
    const tractiveN = driveN <= sparedN ? driveN : Math.min(driveN, adhesionLimitN(vehicle, speedMPerS, slope.cos));
    return tractiveN - resistanceN(road, speedMPerS, slope);
  };
}

/** Shaft power below which the battery cannot bind up to peak torque: it has room for the largest loss besides. */
function powerWithinBatteryW({ motor, battery, auxiliariesW }: Vehicle): number {
  const allowedW = dischargeLimitW(battery) - auxiliariesW;
  if (allowedW === Infinity) return Infinity;
  // Losses from coefficients rise with torque and speed; a map is asked each time.
  return motor.lossMap === null ? allowedW - motorLossW(motor, motor.peakTorqueNm, motor.maxSpeedRadPerS) : -Infinity;
}

/**
 * The motion when speed has risen or fallen to `toMPerS` between two breaks: t = ∫ m_e dv / (F − R), x = ∫ m_e v dv / (F − R); with `rises`
 * given, also back in time. Where net force is found against it, time and distance are NaN and the speed is the one where it was found.
 * Relative error of what is added about 1e-11, rising with the rounding of F − R: 1e-6 where (F − R)/F is 1e-9.
 */
export function afterSpeedChange(pull: Pull, from: Motion, toMPerS: number, rises = toMPerS > from.speedMPerS): Motion {
  if (toMPerS === from.speedMPerS) return from;
  const { netForceN, effectiveMassKg } = pull;
  let reachedMPerS = toMPerS;
  const secondsPerSpeed = (speedMPerS: number) => {
    const force = netForceN(speedMPerS);
    if (rises ? force > 0 : force < 0) return effectiveMassKg / force;
    reachedMPerS = speedMPerS;
    return Number.NaN;
  };
  const added: Moments = { integral: 0, moment: 0 };
  addMoments(secondsPerSpeed, from.speedMPerS, toMPerS, ROUNDING_M_PER_S2, added);
  return { speedMPerS: reachedMPerS, timeS: from.timeS + added.integral, distanceM: from.distanceM + added.moment };
}

/** The motion after speeding up to `toMPerS`, over breaks; null where F − R ≤ 0 anywhere on the way, its ends included. */
export function afterSpeedingUp(pull: Pull, from: Motion, toMPerS: number): Motion | null {
  const pulls = (speedMPerS: number) => pull.netForceN(speedMPerS) > 0;
  if (!(pulls(from.speedMPerS) && pulls(toMPerS))) return null;
  let motion = from;
  for (const next of pull.breaksMPerS(from.speedMPerS, toMPerS)) {
    if (!pulls(next)) return null;
    motion = afterSpeedChange(pull, motion, next);
    if (Number.isNaN(motion.timeS)) return null;
  }
  motion = afterSpeedChange(pull, motion, toMPerS);
  return Number.isNaN(motion.timeS) ? null : motion;
}
