/**
 * The drive on all moving steps of a cycle in one gear. This loop and the sums of cycle.ts are nearly all of the
 * computing time of a run: they read numbers and typed arrays only, call nothing and allocate nothing. Steps near a
 * limit are listed and driven by drive-step.ts afterwards, as are all steps of a motor with measured losses.
 */
import { interpolateLinear } from '../numerics/interpolation.ts';
import { dischargeLimitW } from '../vehicle/battery.ts';
import type { Gear } from '../vehicle/gearing.ts';
import type { Motor, Vehicle } from '../vehicle/vehicle.ts';
import type { CompiledCycle } from './compiled-cycle.ts';
import { driveStep } from './drive-step.ts';
import type { DrivenSteps } from './driven-steps.ts';
import { writeDemand } from './wheel-demand.ts';

/** Below this share of a limit the exact test finds nothing to clip, whatever the rounding. */
const CLEAR = 1 - 1e-12;

/** Drives all moving steps in one gear and writes them to `out`. */
export function driveInGear(vehicle: Vehicle, gear: Gear, cycle: CompiledCycle, out: DrivenSteps): void {
  const { speedMPerS, nearLimit } = cycle;
  writeDemand(vehicle.road, vehicle.effectiveMassKg[gear], cycle, out.demandN);
  out.gear.fill(gear);
  if (vehicle.motor.lossMap !== null) {
    for (let k = 0; k < speedMPerS.length; k++) driveStep(vehicle, gear, speedMPerS[k], k, out);
    return;
  }
  out.missed.fill(0);
  const count = driveClearOfLimits(vehicle, gear, cycle, out);
  for (let i = 0; i < count; i++) driveStep(vehicle, gear, speedMPerS[nearLimit[i]], nearLimit[i], out);
}

/**
 * The steps of a motor with loss coefficients as if it had no limits; lists those that may touch one in
 * `cycle.nearLimit` and returns their count. The loss law is that of motor.ts with its constants multiplied out:
 * fixed + ω (h + ω (e + ω w)) + (s + a ω²) I² + l I, where I² = T² + field² stands for the square of the current.
 */
function driveClearOfLimits(vehicle: Vehicle, gear: Gear, cycle: CompiledCycle, out: DrivenSteps): number {
  const { speedMPerS, perSpeedSPerM, nearLimit } = cycle;
  const { demandN, gearedN, torqueNm, shaftW, lossW } = out;
  const { peakTorqueNm, peakPowerW, baseSpeedRadPerS, losses } = vehicle.motor;
  const { ratios, efficiencies, dragFixedNm, dragPerSpeedNms } = vehicle.gearing;
  const { share, fromMPerS, fullMPerS } = vehicle.regeneration;
  const turnsRadPerM = ratios[gear] / vehicle.wheelRadiusM;
  const pullingLeverM = 1 / (turnsRadPerM * efficiencies[gear]);
  const brakingLeverM = efficiencies[gear] / turnsRadPerM;
  const fixed = peakPowerW * losses.inverterFixed;
  const hysteresis = peakTorqueNm * losses.hysteresis;
  const eddy = peakTorqueNm * losses.eddyS;
  const windage = peakTorqueNm * losses.windageS2;
  const copper = losses.copperWPerNm / peakTorqueNm;
  const square = copper + (peakPowerW * losses.inverterSquare) / (peakTorqueNm * peakTorqueNm);
  const acSquare = copper * losses.acCopperS2;
  const linear = (peakPowerW * losses.inverterLinear) / peakTorqueNm;
  const fieldNm = losses.fieldWeakening * peakTorqueNm;
  const baseMPerS = baseSpeedRadPerS / turnsRadPerM;
  const fadePerMPerS = share / (fullMPerS - fromMPerS);
  const { torqueNm: clearNm, powerW: clearW, speedRadPerS: clearRadPerS } = clearOfEnvelope(vehicle.motor);
  const clearDrawnW = dischargeLimitW(vehicle.battery) * CLEAR - vehicle.auxiliariesW;
  let count = 0;

  for (let k = 0; k < speedMPerS.length; k++) {
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

/** Torque, power and speed below which the torque limit is surely not reached; together they bound a region under its curve. */
function clearOfEnvelope(motor: Motor): { torqueNm: number; powerW: number; speedRadPerS: number } {
  if (motor.fullLoad === null) {
    return { torqueNm: motor.peakTorqueNm * CLEAR, powerW: motor.peakPowerW * CLEAR, speedRadPerS: motor.constantPowerToRadPerS * CLEAR };
  }
  const { speedsRadPerS, torquesNm, referencePeakTorqueNm, referenceBaseSpeedRadPerS } = motor.fullLoad;
  let torqueNm = interpolateLinear(speedsRadPerS, torquesNm, referenceBaseSpeedRadPerS);
  let powerW = torqueNm * referenceBaseSpeedRadPerS;
  for (let i = 0; i < torquesNm.length; i++) {
    // Between points torque is linear, so that torque and power are least at an end of each stretch.
    if (speedsRadPerS[i] <= referenceBaseSpeedRadPerS) torqueNm = Math.min(torqueNm, torquesNm[i]);
    else powerW = Math.min(powerW, torquesNm[i] * speedsRadPerS[i]);
  }
  const perTorque = motor.peakTorqueNm / referencePeakTorqueNm;
  const perSpeed = motor.baseSpeedRadPerS / referenceBaseSpeedRadPerS;
  return { torqueNm: torqueNm * perTorque * CLEAR, powerW: powerW * perTorque * perSpeed * CLEAR, speedRadPerS: motor.maxSpeedRadPerS * CLEAR };
}
