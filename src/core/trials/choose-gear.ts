/** Two ratios on a cycle: which of them takes each step. */
import { mostPowerW } from '../vehicle/battery.ts';
import { motorSpeedRadPerS } from '../vehicle/gearing.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import type { CompiledCycle } from './compiled-cycle.ts';
import { isOverspeed } from './drive-step.ts';
import type { DrivenSteps } from './driven-steps.ts';

/** Puts those of the moving steps `from` up to, not including, `to` that the higher gear takes into `cycle.driven`. */
export function chooseGears(vehicle: Vehicle, cycle: CompiledCycle, from: number, to: number): void {
  const { driven: lower, drivenHigher: higher } = cycle;
  const mostW = mostPowerW(vehicle.battery) - vehicle.auxiliariesW;
  for (let k = from; k < to; k++) {
    if (takesHigherGear(vehicle, cycle.speedMPerS[k], mostW, k, lower, higher)) copyStep(higher, lower, k);
  }
}

/**
 * Of the gears that follow the step, the one that draws less, the lower on a tie; when neither follows, the one within its
 * speed that delivers more force, and the higher gear when both are above theirs. A gear whose losses ask more than the
 * pack can ever give (`mostW` without the auxiliaries) does not follow.
 */
function takesHigherGear(vehicle: Vehicle, speedMPerS: number, mostW: number, k: number, lower: DrivenSteps, higher: DrivenSteps): boolean {
  const lowerW = lower.shaftW[k] + lower.lossW[k];
  const higherW = higher.shaftW[k] + higher.lossW[k];
  const lowerFollows = lower.missed[k] === 0 && lowerW <= mostW;
  const higherFollows = higher.missed[k] === 0 && higherW <= mostW;
  if (lowerFollows && higherFollows) return higherW < lowerW;
  if (lowerFollows || higherFollows) return higherFollows;
  // The higher gear turns the motor more slowly: it is above its speed only where the lower gear is too.
  if (isOverspeed(vehicle.motor, motorSpeedRadPerS(vehicle, 0, speedMPerS))) return true;
  return deliveredN(higher, k) > deliveredN(lower, k);
}

/** Force that a motor within its speed gives at the wheels. While it coasts, and only then is a step of no torque not missed, the gearing brakes, not the motor. */
function deliveredN({ torqueNm, missed, gearedN }: DrivenSteps, k: number): number {
  return torqueNm[k] === 0 && missed[k] === 0 ? 0 : gearedN[k];
}

function copyStep(from: DrivenSteps, to: DrivenSteps, k: number): void {
  to.demandN[k] = from.demandN[k];
  to.gearedN[k] = from.gearedN[k];
  to.torqueNm[k] = from.torqueNm[k];
  to.shaftW[k] = from.shaftW[k];
  to.lossW[k] = from.lossW[k];
  to.missed[k] = from.missed[k];
  to.gear[k] = from.gear[k];
}
