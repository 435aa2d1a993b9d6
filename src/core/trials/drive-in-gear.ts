/**
 * The drive on the moving steps of a cycle in one gear, step by step: for the account of a cycle, for the choice between two gears, and for measured
 * losses. Steps near a limit are listed and driven by drive-step.ts afterwards, as are all steps of a motor with measured losses.
 */
import { dischargeLimitW } from '../vehicle/battery.ts';
import type { Gear } from '../vehicle/gearing.ts';
import type { LossMap } from '../vehicle/loss-map.ts';
import { mapScale } from '../vehicle/motor.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import type { CompiledCycle } from './compiled-cycle.ts';
import { driveStep } from './drive-step.ts';
import type { DrivenSteps } from './driven-steps.ts';
import { CLEAR } from './quick-law.ts';
import { writeDemand } from './wheel-demand.ts';

/** Largest loss of each map met, as written; found once. */
const largestLossesW = new WeakMap<LossMap, number>();

/** Drives the moving steps `first` up to, not including, `end` in one gear and writes them to `out`; `cycle.laws` hold the design. */
export function driveInGear(vehicle: Vehicle, gear: Gear, cycle: CompiledCycle, first: number, end: number, out: DrivenSteps): void {
  const { speedMPerS, nearLimit } = cycle;
  writeDemand(cycle.laws[gear], vehicle.road, cycle, first, end, out.demandN);
  out.gear.fill(gear, first, end);
  if (vehicle.motor.lossMap !== null) {
    const freeShaftW = freeShaftPowerW(vehicle, vehicle.motor.lossMap);
    for (let k = first; k < end; k++) driveStep(vehicle, gear, speedMPerS[k], freeShaftW, k, out);
    return;
  }
  out.missed.fill(0, first, end);
  const count = driveClearOfLimits(gear, cycle, first, end, out);
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
function driveClearOfLimits(gear: Gear, cycle: CompiledCycle, first: number, end: number, out: DrivenSteps): number {
  const { speedMPerS, perSpeedSPerM, nearLimit } = cycle;
  const { demandN, gearedN, torqueNm, shaftW, lossW } = out;
  const law = cycle.laws[gear];
  const { turnsRadPerM, pullingLeverM, brakingLeverM, dragFixedNm, dragPerSpeedNs } = law;
  const { brakingShare, brakingFromMPerS, brakingFullMPerS, brakingSharePerSpeedSPerM } = law;
  const { idleFixedW, idleLinearN, idleSquareNSPerM, idleCubeNS2PerM2, squareWPerN2M2, squarePerSpeed2WS2PerN2M4, linearWPerNm, fieldNm, baseMPerS } = law;
  const { clearNm, clearW, clearMPerS, clearFastW, clearFastMPerS } = law;
  const clearDrawnW = law.clearTerminalW - law.auxiliariesW;
  let count = 0;

  for (let k = first; k < end; k++) {
    const v = speedMPerS[k];
    const demand = demandN[k];
    const drag = dragFixedNm + dragPerSpeedNs * v;
    const field = v > baseMPerS ? fieldNm * (1 - baseMPerS * perSpeedSPerM[k]) : 0;
    const idle = idleFixedW + v * (idleLinearN + v * (idleSquareNSPerM + v * idleCubeNS2PerM2));
    const perCurrent2 = squareWPerN2M2 + squarePerSpeed2WS2PerN2M4 * (v * v);
    let geared = demand;
    let torque = demand * (demand >= 0 ? pullingLeverM : brakingLeverM) + drag;
    const pulls = torque >= 0;
    if (!pulls) {
      geared *= v >= brakingFullMPerS ? brakingShare : v <= brakingFromMPerS ? 0 : brakingSharePerSpeedSPerM * (v - brakingFromMPerS);
      torque = geared * brakingLeverM + drag;
    }
    const current2 = torque * torque + field * field;
    let shaft = torque * (turnsRadPerM * v);
    let loss = idle + perCurrent2 * current2 + linearWPerNm * Math.sqrt(current2);
    const isClear = v > baseMPerS ? Math.abs(shaft) < (v < clearMPerS ? clearW : clearFastW) && v < clearFastMPerS : Math.abs(torque) < clearNm;
    if (!(isClear && shaft + loss < clearDrawnW)) nearLimit[count++] = k;
    if (!pulls && shaft + loss > 0) {
      const coasting = idle + perCurrent2 * (field * field) + linearWPerNm * field;
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
