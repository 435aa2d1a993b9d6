/**
 * One moving step of a cycle in one gear, word for word: what the motor is asked for, what its limits leave of it, and
 * when it coasts. The quick loop of drive-in-gear.ts does the same for steps that are clear of every limit.
 */
import { clipToBatteryNm } from '../vehicle/battery.ts';
import { dragTorqueNm, type Gear, motorSpeedRadPerS, motorTorqueNm, wheelForceN } from '../vehicle/gearing.ts';
import { EDGE, motorLossW, peakTorqueLimitNm } from '../vehicle/motor.ts';
import type { Motor, Regeneration, Vehicle } from '../vehicle/vehicle.ts';
import type { DrivenSteps } from './driven-steps.ts';

/** A step clipped by more than this share of its torque is missed. */
const CLIP_ROOM = 1e-9;

/** Does this motor speed lie above the maximum, beyond rounding? */
export function isOverspeed(motor: Motor, speedRadPerS: number): boolean {
  return speedRadPerS > motor.maxSpeedRadPerS * (1 + EDGE);
}

/** Share of the braking force that the motor takes at a speed: nothing up to `from`, rising evenly, the whole share at `full`. */
function regenerationShare({ share, fromMPerS, fullMPerS }: Regeneration, speedMPerS: number): number {
  if (speedMPerS >= fullMPerS) return share;
  return speedMPerS <= fromMPerS ? 0 : share * ((speedMPerS - fromMPerS) / (fullMPerS - fromMPerS));
}

/**
 * Drives step k, whose demand stands in `out`, at its mean speed, and writes what comes of it. Shaft power below
 * `freeShaftW` is known to keep to the limit of the battery; −Infinity where nothing is known.
 */
export function driveStep(vehicle: Vehicle, gear: Gear, speedMPerS: number, freeShaftW: number, k: number, out: DrivenSteps): void {
  const speedRadPerS = motorSpeedRadPerS(vehicle, gear, speedMPerS);
  const demandN = out.demandN[k];
  out.missed[k] = isOverspeed(vehicle.motor, speedRadPerS) ? 1 : 0;
  const askedNm = motorTorqueNm(vehicle, gear, demandN, speedRadPerS);
  if (demandN >= 0 || askedNm >= 0) pull(vehicle, gear, speedRadPerS, askedNm, freeShaftW, k, out);
  else brake(vehicle, gear, speedRadPerS, regenerationShare(vehicle.regeneration, speedMPerS) * demandN, k, out);
}

/** Above maximum speed the step is missed anyway, and only the battery still clips it. */
function pull(vehicle: Vehicle, gear: Gear, speedRadPerS: number, askedNm: number, freeShaftW: number, k: number, out: DrivenSteps): void {
  const { motor } = vehicle;
  const allowedNm = out.missed[k] === 1 ? askedNm : Math.min(askedNm, peakTorqueLimitNm(motor, speedRadPerS));
  const isFree = allowedNm * speedRadPerS < freeShaftW;
  const torqueNm = isFree ? allowedNm : clipToBatteryNm(vehicle, allowedNm, speedRadPerS);
  if (askedNm - torqueNm > CLIP_ROOM * askedNm) out.missed[k] = 1;
  const gearedN = torqueNm === askedNm ? out.demandN[k] : gearedForceN(vehicle, gear, torqueNm, speedRadPerS);
  write(out, k, torqueNm, speedRadPerS, motorLossW(motor, torqueNm, speedRadPerS), gearedN);
}

/** `shareN` is the motor's part of the braking force. It coasts where it would draw more than by turning without current. */
function brake(vehicle: Vehicle, gear: Gear, speedRadPerS: number, shareN: number, k: number, out: DrivenSteps): void {
  const { motor } = vehicle;
  const askedNm = motorTorqueNm(vehicle, gear, shareN, speedRadPerS);
  const torqueNm = out.missed[k] === 1 ? askedNm : Math.max(askedNm, -peakTorqueLimitNm(motor, speedRadPerS));
  const lossW = motorLossW(motor, torqueNm, speedRadPerS);
  const coastingW = motorLossW(motor, 0, speedRadPerS);
  if (coastingW < torqueNm * speedRadPerS + lossW) {
    const dragN = (dragTorqueNm(vehicle.gearing, speedRadPerS) * vehicle.gearing.ratios[gear]) / vehicle.wheelRadiusM;
    write(out, k, 0, speedRadPerS, coastingW, Math.max(out.demandN[k], -dragN));
    return;
  }
  const gearedN = torqueNm === askedNm ? shareN : gearedForceN(vehicle, gear, torqueNm, speedRadPerS);
  write(out, k, torqueNm, speedRadPerS, lossW, gearedN);
}

function write(out: DrivenSteps, k: number, torqueNm: number, speedRadPerS: number, lossW: number, gearedN: number): void {
  out.torqueNm[k] = torqueNm;
  out.shaftW[k] = torqueNm * speedRadPerS;
  out.lossW[k] = lossW;
  out.gearedN[k] = gearedN;
}

/** The wheel force whose motor torque this is. A torque below the drag is dragged by the wheels, which pay the mesh losses. */
function gearedForceN(vehicle: Vehicle, gear: Gear, torqueNm: number, speedRadPerS: number): number {
  const forceN = wheelForceN(vehicle, gear, torqueNm, speedRadPerS);
  const efficiency = vehicle.gearing.efficiencies[gear];
  return forceN >= 0 ? forceN : forceN / (efficiency * efficiency);
}
