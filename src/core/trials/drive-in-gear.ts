/**
 * The drive on the moving steps of a cycle in one gear. Its loop and the one of cycle-sums.ts are most of the computing
 * time of a run: they read numbers and typed arrays only, and allocate nothing. Steps near a limit are listed and driven
 * by drive-step.ts afterwards, as are all steps of a motor with measured losses.
 */
import { interpolateLinear } from '../numerics/interpolation.ts';
import { dischargeLimitW } from '../vehicle/battery.ts';
import type { Gear } from '../vehicle/gearing.ts';
import type { LossMap } from '../vehicle/loss-map.ts';
import { mapScale } from '../vehicle/motor.ts';
import type { Motor, Vehicle } from '../vehicle/vehicle.ts';
import type { CompiledCycle } from './compiled-cycle.ts';
import { driveStep } from './drive-step.ts';
import type { DrivenSteps } from './driven-steps.ts';
import { writeDemand } from './wheel-demand.ts';

/** Below this share of a limit the exact test finds nothing to clip, whatever the rounding. */
const CLEAR = 1 - 1e-12;

/** Largest loss of each map met, as written; found once. */
const largestLossesW = new WeakMap<LossMap, number>();

/** Drives the moving steps `first` up to, not including, `end` in one gear and writes them to `out`. */
export function driveInGear(vehicle: Vehicle, gear: Gear, cycle: CompiledCycle, first: number, end: number, out: DrivenSteps): void {
  const { speedMPerS, nearLimit } = cycle;
  writeDemand(vehicle.road, vehicle.effectiveMassKg[gear], cycle, first, end, out.demandN);
  out.gear.fill(gear, first, end);
  if (vehicle.motor.lossMap !== null) {
    const freeShaftW = freeShaftPowerW(vehicle, vehicle.motor.lossMap);
    for (let k = first; k < end; k++) driveStep(vehicle, gear, speedMPerS[k], freeShaftW, k, out);
    return;
  }
  out.missed.fill(0, first, end);
  const count = driveClearOfLimits(vehicle, gear, cycle, first, end, out);
  for (let i = 0; i < count; i++) driveStep(vehicle, gear, speedMPerS[nearLimit[i]], Number.NEGATIVE_INFINITY, nearLimit[i], out);
}

/** Shaft power that the battery gives whatever the measured losses: its limit less the largest of them; 0 with coefficients on top. */
function freeShaftPowerW({ motor, battery, auxiliariesW }: Vehicle, map: LossMap): number {
  let largestW = largestLossesW.get(map);
  if (largestW === undefined) {
    largestW = map.lossesW.reduce((largest, lossW) => Math.max(largest, lossW), 0);
    largestLossesW.set(map, largestW);
  }
  return map.motorAlone ? 0 : (dischargeLimitW(battery) - auxiliariesW - largestW * mapScale(motor, map)) * CLEAR;
}

/**
 * The steps of a motor with loss coefficients as if it had no limits; lists those that may touch one in
 * `cycle.nearLimit` and returns their count.
 */
function driveClearOfLimits(vehicle: Vehicle, gear: Gear, cycle: CompiledCycle, first: number, end: number, out: DrivenSteps): number {
  const { speedMPerS, perSpeedSPerM, nearLimit } = cycle;
  const { demandN, gearedN, torqueNm, shaftW, lossW } = out;
  const { ratios, efficiencies, dragFixedNm, dragPerSpeedNms } = vehicle.gearing;
  const { share, fromMPerS, fullMPerS } = vehicle.regeneration;
  const turnsRadPerM = ratios[gear] / vehicle.wheelRadiusM;
  const pullingLeverM = 1 / (turnsRadPerM * efficiencies[gear]);
  const brakingLeverM = efficiencies[gear] / turnsRadPerM;
  const { fixed, hysteresis, eddy, windage, square, acSquare, linear, fieldNm } = lossLaw(vehicle.motor);
  const baseMPerS = vehicle.motor.baseSpeedRadPerS / turnsRadPerM;
  const fadePerMPerS = share / (fullMPerS - fromMPerS);
  const { torqueNm: clearNm, powerW: clearW, speedRadPerS: clearRadPerS } = clearOfEnvelope(vehicle.motor);
  const clearDrawnW = dischargeLimitW(vehicle.battery) * CLEAR - vehicle.auxiliariesW;
  let count = 0;

  for (let k = first; k < end; k++) {
    const v = speedMPerS[k];
    const demand = demandN[k];
    const omega = v * turnsRadPerM;
    const drag = dragFixedNm + dragPerSpeedNms * omega;
    const field = v > baseMPerS ? fieldNm * (1 - baseMPerS * perSpeedSPerM[k]) : 0;
    const idle = fixed + omega * (hysteresis + omega * (eddy + omega * windage));
    const perCurrent2 = square + acSquare * (omega * omega);
    let geared = demand;
    let torque = demand * (demand >= 0 ? pullingLeverM : brakingLeverM) + drag;
    const pulls = torque >= 0;
    if (!pulls) {
      geared *= v >= fullMPerS ? share : v <= fromMPerS ? 0 : fadePerMPerS * (v - fromMPerS);
      torque = geared * brakingLeverM + drag;
    }
    const current2 = torque * torque + field * field;
    let shaft = torque * omega;
    let loss = idle + perCurrent2 * current2 + linear * Math.sqrt(current2);
    const load = Math.abs(torque);
    if (!(load < clearNm && load * omega < clearW && omega < clearRadPerS && shaft + loss < clearDrawnW)) nearLimit[count++] = k;
    if (!pulls && shaft + loss > 0) {
      const coasting = idle + perCurrent2 * (field * field) + linear * field;
      if (shaft + loss > coasting) {
        torque = 0;
        shaft = 0;
        loss = coasting;
        geared = Math.max(demand, -drag * turnsRadPerM);
      }
    }
    gearedN[k] = geared;
    torqueNm[k] = torque;
    shaftW[k] = shaft;
    lossW[k] = loss;
  }
  return count;
}

/**
 * The loss law of motor.ts with its constants multiplied out: fixed + ω (hysteresis + ω (eddy + ω windage)) +
 * (square + acSquare ω²) I² + linear I in W, where I² = T² + F² stands for the current and F, up to `fieldNm`, for its field-weakening part.
 */
function lossLaw({ peakTorqueNm, peakPowerW, losses }: Motor) {
  const copper = losses.copperWPerNm / peakTorqueNm;
  return {
    fixed: peakPowerW * losses.inverterFixed,
    hysteresis: peakTorqueNm * losses.hysteresis,
    eddy: peakTorqueNm * losses.eddyS,
    windage: peakTorqueNm * losses.windageS2,
    square: copper + (peakPowerW * losses.inverterSquare) / (peakTorqueNm * peakTorqueNm),
    acSquare: copper * losses.acCopperS2,
    linear: (peakPowerW * losses.inverterLinear) / peakTorqueNm,
    fieldNm: losses.fieldWeakening * peakTorqueNm,
  };
}

/** Torque, power and speed below which the torque limit is surely not reached; together they bound a region under its curve. */
function clearOfEnvelope(motor: Motor): { torqueNm: number; powerW: number; speedRadPerS: number } {
  if (motor.fullLoad === null) {
    return { torqueNm: motor.peakTorqueNm * CLEAR, powerW: motor.peakPowerW * CLEAR, speedRadPerS: motor.constantPowerToRadPerS * CLEAR };
  }
  const { speedsRadPerS, torquesNm, referencePeakTorqueNm, referenceBaseSpeedRadPerS } = motor.fullLoad;
  let torqueNm = interpolateLinear(speedsRadPerS, torquesNm, referenceBaseSpeedRadPerS);
  let powerW = torqueNm * referenceBaseSpeedRadPerS;
  for (let i = 0; i < torquesNm.length; i++) {
    // Torque is linear between points, so that neither it nor the power is least between them.
    if (speedsRadPerS[i] <= referenceBaseSpeedRadPerS) torqueNm = Math.min(torqueNm, torquesNm[i]);
    else powerW = Math.min(powerW, torquesNm[i] * speedsRadPerS[i]);
  }
  const perTorque = motor.peakTorqueNm / referencePeakTorqueNm;
  const perSpeed = motor.baseSpeedRadPerS / referenceBaseSpeedRadPerS;
  return { torqueNm: torqueNm * perTorque * CLEAR, powerW: powerW * perTorque * perSpeed * CLEAR, speedRadPerS: motor.maxSpeedRadPerS * CLEAR };
}
