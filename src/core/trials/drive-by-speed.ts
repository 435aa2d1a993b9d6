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
import { type CalmResistance, writeDemand } from './wheel-demand.ts';

/** Adds all moving steps to `cycle.drawn`. */
export function driveBySpeed(vehicle: Vehicle, cycle: CompiledCycle): void {
  const { bySpeed, laws } = cycle;
  writeQuickLaw(vehicle, 0, bySpeed, laws[0]);
  const { calm } = laws[0];
  const pulls = calm !== null && calm.constantN >= 0 && calm.linearNSPerM >= 0 && calm.squareNS2PerM2 >= 0;
  addRun(vehicle, cycle, pulls ? calm : null, 0, bySpeed.steady);
  addRun(vehicle, cycle, null, bySpeed.steady, bySpeed.speedMPerS.length);
}

/** Adds steps of rising speed; where `pullsAgainst` is given, the motor pulls on all of them. */
function addRun(vehicle: Vehicle, cycle: CompiledCycle, pullsAgainst: CalmResistance | null, from: number, to: number): void {
  const { speedMPerS } = cycle.bySpeed;
  const { clearMPerS, clearW, clearFastMPerS, clearFastW } = cycle.laws[0];
  const fast = firstNotBelow(speedMPerS, clearMPerS, from, to);
  const tooFast = firstNotBelow(speedMPerS, clearFastMPerS, fast, to);
  addStretch(vehicle, cycle, pullsAgainst, clearW, from, fast);
  addStretch(vehicle, cycle, pullsAgainst, clearFastW, fast, tooFast);
  for (let k = tooFast; k < to; k++) addExactly(vehicle, cycle, k);
}

/** Adds steps on which one shaft power, above base speed, is clear of the motor's limit. */
function addStretch(vehicle: Vehicle, cycle: CompiledCycle, pullsAgainst: CalmResistance | null, clearW: number, from: number, to: number): void {
  const { bySpeed, drawn } = cycle;
  const { demandN } = cycle.drivenBySpeed;
  const [law] = cycle.laws;
  for (let start = from; start < to; start += STEPS_AT_A_TIME) {
    const end = Math.min(start + STEPS_AT_A_TIME, to);
    if (pullsAgainst === null) writeDemand(law, vehicle.road, bySpeed, start, end, demandN);
    for (let k = start; k < end; k++) {
      k = pullsAgainst === null ? addAny(law, demandN, clearW, bySpeed, k, end, drawn) : addPulling(law, pullsAgainst, clearW, bySpeed, k, end, drawn);
      if (k < end) addExactly(vehicle, cycle, k);
    }
  }
}

/** Drives step k of the order word for word. */
function addExactly(vehicle: Vehicle, { bySpeed, drivenBySpeed, drawn, laws }: CompiledCycle, k: number): void {
  writeDemand(laws[0], vehicle.road, bySpeed, k, k + 1, drivenBySpeed.demandN);
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
