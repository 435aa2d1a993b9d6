/**
 * What a design with one ratio and losses by coefficients draws over a cycle: the quick loops where they hold, the exact step
 * elsewhere, added up in the order of speed-order.ts.
 */
import type { Vehicle } from '../vehicle/vehicle.ts';
import type { CompiledCycle } from './compiled-cycle.ts';
import { addDrawn } from './drawn-sums.ts';
import { driveStep } from './drive-step.ts';
import { STEPS_AT_A_TIME } from './driven-steps.ts';
import { writeQuickLaw } from './quick-law.ts';
import { addAny, addPulling } from './quick-steps.ts';
import { type CalmResistance, calmResistance, writeDemand } from './wheel-demand.ts';

/** Adds all moving steps to `cycle.drawn`. */
export function driveBySpeed(vehicle: Vehicle, cycle: CompiledCycle): void {
  const { bySpeed, laws } = cycle;
  writeQuickLaw(vehicle, 0, laws[0]);
  const resistance = calmResistance(vehicle.road, bySpeed);
  const calm = resistance !== null && resistance.constantN >= 0 && resistance.linearNSPerM >= 0 && resistance.squareNS2PerM2 >= 0;
  addRun(vehicle, cycle, calm ? resistance : null, 0, bySpeed.steady);
  addRun(vehicle, cycle, null, bySpeed.steady, bySpeed.speedMPerS.length);
}

/** Adds steps that rise in speed; with `pullingAgainst`, the motor pulls on all of them. */
function addRun(vehicle: Vehicle, cycle: CompiledCycle, pullingAgainst: CalmResistance | null, from: number, to: number): void {
  const { clearMPerS, clearW, clearFastMPerS, clearFastW } = cycle.laws[0];
  const fast = firstNotBelow(cycle.bySpeed.speedMPerS, clearMPerS, from, to);
  const tooFast = firstNotBelow(cycle.bySpeed.speedMPerS, clearFastMPerS, fast, to);
  addStretch(vehicle, cycle, pullingAgainst, clearW, from, fast);
  addStretch(vehicle, cycle, pullingAgainst, clearFastW, fast, tooFast);
  writeDemand(vehicle.road, vehicle.effectiveMassKg[0], cycle.bySpeed, tooFast, to, cycle.drivenBySpeed.demandN);
  for (let k = tooFast; k < to; k++) addExactly(vehicle, cycle, k);
}

function addStretch(vehicle: Vehicle, cycle: CompiledCycle, pullingAgainst: CalmResistance | null, clearW: number, from: number, to: number): void {
  const { road, effectiveMassKg } = vehicle;
  const { bySpeed, drawn, drivenBySpeed } = cycle;
  const { demandN } = drivenBySpeed;
  const [law] = cycle.laws;
  const [massKg] = effectiveMassKg;
  for (let start = from; start < to; start += STEPS_AT_A_TIME) {
    const end = Math.min(start + STEPS_AT_A_TIME, to);
    if (pullingAgainst === null) writeDemand(road, massKg, bySpeed, start, end, demandN);
    for (let k = start; k < end; k++) {
      if (pullingAgainst === null) k = addAny(law, demandN, clearW, bySpeed, k, end, drawn);
      else {
        k = addPulling(law, massKg, pullingAgainst, clearW, bySpeed, k, end, drawn);
        if (k < end) writeDemand(road, massKg, bySpeed, k, k + 1, demandN);
      }
      if (k < end) addExactly(vehicle, cycle, k);
    }
  }
}

/** Drives step k of the order, whose demand stands there, word for word. */
function addExactly(vehicle: Vehicle, { bySpeed, drivenBySpeed, drawn }: CompiledCycle, k: number): void {
  driveStep(vehicle, 0, bySpeed.speedMPerS[k], Number.NEGATIVE_INFINITY, k, drivenBySpeed);
  addDrawn(vehicle, bySpeed.durationS, drivenBySpeed, k, k + 1, drawn);
}

/** Index of the first of rising speeds that is not below a speed, by halving; `to` where there is none. */
function firstNotBelow(speedMPerS: Float64Array, limitMPerS: number, from: number, to: number): number {
  let low = from;
  let high = to;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (speedMPerS[middle] < limitMPerS) low = middle + 1;
    else high = middle;
  }
  return low;
}
