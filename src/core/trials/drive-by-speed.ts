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
import { addAny, addOneWay, brakingLaw, pullingLaw, type TorqueLaw } from './quick-steps.ts';
import { EASES } from './speed-order.ts';
import { type CalmResistance, writeDemand } from './wheel-demand.ts';

/** Adds all moving steps to `cycle.drawn`. */
export function driveBySpeed(vehicle: Vehicle, cycle: CompiledCycle): void {
  const { bySpeed, laws } = cycle;
  const { speedMPerS, steady, braking } = bySpeed;
  const [law] = laws;
  writeQuickLaw(vehicle, 0, bySpeed, law);
  const { calm } = law;
  const pulls = calm !== null && holdsBack(calm, law.effectiveMassKg);
  const brakes = calm !== null && law.brakingShare > 0;
  const wholeShare = firstNotBelow(speedMPerS, law.brakingFullMPerS, braking, speedMPerS.length);
  addRun(vehicle, cycle, pulls ? pullingLaw(law, calm) : null, 0, steady);
  addRun(vehicle, cycle, null, steady, braking);
  addRun(vehicle, cycle, null, braking, wholeShare);
  addRun(vehicle, cycle, brakes ? brakingLaw(law, calm) : null, wholeShare, speedMPerS.length);
}

/** Does the road alone slow the vehicle down by more than any steady step? Then the motor pulls on all of them. */
function holdsBack({ constantN, linearNSPerM, squareNS2PerM2 }: CalmResistance, effectiveMassKg: number): boolean {
  return constantN >= EASES.constantMPerS2 * effectiveMassKg && linearNSPerM >= 0 && squareNS2PerM2 >= EASES.squarePerM * effectiveMassKg;
}

/** Adds steps of rising speed, which may keep to one torque law. */
function addRun(vehicle: Vehicle, cycle: CompiledCycle, torqueLaw: TorqueLaw | null, from: number, to: number): void {
  const { speedMPerS } = cycle.bySpeed;
  const { clearMPerS, clearW, clearFastMPerS, clearFastW } = cycle.laws[0];
  const fast = firstNotBelow(speedMPerS, clearMPerS, from, to);
  const tooFast = firstNotBelow(speedMPerS, clearFastMPerS, fast, to);
  addStretch(vehicle, cycle, torqueLaw, clearW, from, fast);
  addStretch(vehicle, cycle, torqueLaw, clearFastW, fast, tooFast);
  for (let k = tooFast; k < to; k++) addExactly(vehicle, cycle, k);
}

/** Adds steps on which one shaft power, above base speed, is clear of the motor's limit. */
function addStretch(vehicle: Vehicle, cycle: CompiledCycle, torqueLaw: TorqueLaw | null, clearW: number, from: number, to: number): void {
  const { bySpeed, drawn } = cycle;
  const { demandN } = cycle.drivenBySpeed;
  const [law] = cycle.laws;
  for (let start = from; start < to; start += STEPS_AT_A_TIME) {
    const end = Math.min(start + STEPS_AT_A_TIME, to);
    if (torqueLaw === null) writeDemand(law, vehicle.road, bySpeed, start, end, demandN);
    for (let k = start; k < end; k++) {
      k = torqueLaw === null ? addAny(law, demandN, clearW, bySpeed, k, end, drawn) : addOneWay(law, torqueLaw, clearW, bySpeed, k, end, drawn);
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
