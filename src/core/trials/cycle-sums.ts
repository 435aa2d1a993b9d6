/** The account of a driven cycle: sums over its steps at the wheels, and where the energy goes. Always added up in the order of the trace. */
import { mostPowerW } from '../vehicle/battery.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import type { CompiledCycle } from './compiled-cycle.ts';

/** Totals over the whole time of a cycle. */
export interface CycleSums {
  /** What the trace asks for at the wheels while pulling. */
  demandJ: number;
  /** What the trace takes out at the wheels while braking, and what of it reaches the terminals before the auxiliaries. */
  brakingJ: number;
  recoveredJ: number;
  gearingJ: number;
  lossJ: number;
  brakesJ: number;
  /** Not above zero. */
  unmetJ: number;
  /** ∑ T² Δt. */
  torqueSquareN2M2S: number;
}

/** Nothing added up yet. */
export function emptySums(): CycleSums {
  return {
    demandJ: 0,
    brakingJ: 0,
    recoveredJ: 0,
    gearingJ: 0,
    lossJ: 0,
    brakesJ: 0,
    unmetJ: 0,
    torqueSquareN2M2S: 0,
  };
}

/**
 * Adds the moving steps `from` up to, not including, `to` of `cycle.driven`. Terminal power below the charge limit is held there
 * and the excess goes to the friction brakes; beyond V²/(4R) it is held too, the step is missed and the difference is unmet.
 */
export function addSteps(vehicle: Vehicle, cycle: CompiledCycle, from: number, to: number, sums: CycleSums): void {
  const { durationS, speedMPerS, lossToJ } = cycle;
  const { demandN, gearedN, torqueNm, shaftW, lossW, missed } = cycle.driven;
  const { chargeW } = vehicle.battery;
  const { auxiliariesW } = vehicle;
  const mostW = mostPowerW(vehicle.battery);
  let { demandJ, brakingJ, recoveredJ, gearingJ, lossJ, brakesJ, unmetJ, torqueSquareN2M2S } = sums;
  for (let k = from; k < to; k++) {
    const stepS = durationS[k];
    const lengthM = speedMPerS[k] * stepS;
    const demand = demandN[k];
    const geared = gearedN[k];
    const torque = torqueNm[k];
    const shaft = shaftW[k];
    const loss = lossW[k];
    const terminal = shaft + loss + auxiliariesW;
    lossJ += loss * stepS;
    lossToJ[k + 1] = lossJ;
    torqueSquareN2M2S += torque * torque * stepS;
    gearingJ += shaft * stepS - geared * lengthM;
    if (geared > demand) brakesJ += (geared - demand) * lengthM;
    else unmetJ += (geared - demand) * lengthM;
    if (demand >= 0) demandJ += demand * lengthM;
    else {
      brakingJ -= demand * lengthM;
      if (terminal < -chargeW) brakesJ -= (chargeW + terminal) * stepS;
      if (terminal < auxiliariesW) recoveredJ += (auxiliariesW - Math.max(terminal, -chargeW)) * stepS;
    }
    if (terminal > mostW) {
      unmetJ -= (terminal - mostW) * stepS;
      missed[k] = 1;
    }
  }
  sums.demandJ = demandJ;
  sums.brakingJ = brakingJ;
  sums.recoveredJ = recoveredJ;
  sums.gearingJ = gearingJ;
  sums.lossJ = lossJ;
  sums.brakesJ = brakesJ;
  sums.unmetJ = unmetJ;
  sums.torqueSquareN2M2S = torqueSquareN2M2S;
}
