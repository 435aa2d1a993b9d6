/** Sums over the steps of a driven cycle: pack, wheels, and where the energy goes. Always added up in the order of the trace. */
import { mostPowerW, packCurrentA } from '../vehicle/battery.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import type { CompiledCycle } from './compiled-cycle.ts';

/** Totals over the whole time of a cycle. */
export interface CycleSums {
  /** At the terminals of the pack. */
  terminalJ: number;
  /** In the resistance of the pack. */
  packHeatJ: number;
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
  missedS: number;
}

/**
 * Adds up the steps in `cycle.driven` and the standing time. Terminal power below the charge limit is held there and the
 * excess goes to the friction brakes; beyond V²/(4R) it is held too, the step is missed and the difference is unmet.
 */
export function sumSteps(vehicle: Vehicle, cycle: CompiledCycle): CycleSums {
  const { durationS, speedMPerS, lossBeforeJ } = cycle;
  const { demandN, gearedN, torqueNm, shaftW, lossW, missed } = cycle.driven;
  const { voltageV, resistanceOhm, chargeW } = vehicle.battery;
  const { auxiliariesW } = vehicle;
  const mostW = mostPowerW(vehicle.battery);
  const voltageSquare = voltageV * voltageV;
  const resistance4 = 4 * resistanceOhm;
  let terminalJ = 0;
  let dropSquareV2S = 0;
  let demandJ = 0;
  let brakingJ = 0;
  let recoveredJ = 0;
  let gearingJ = 0;
  let lossJ = 0;
  let brakesJ = 0;
  let unmetJ = 0;
  let torqueSquareN2M2S = 0;
  let missedS = 0;
  for (let k = 0; k < speedMPerS.length; k++) {
    const stepS = durationS[k];
    const lengthM = speedMPerS[k] * stepS;
    const demand = demandN[k];
    const geared = gearedN[k];
    const torque = torqueNm[k];
    const shaft = shaftW[k];
    const loss = lossW[k];
    let terminal = shaft + loss + auxiliariesW;
    lossBeforeJ[k] = lossJ;
    lossJ += loss * stepS;
    torqueSquareN2M2S += torque * torque * stepS;
    gearingJ += shaft * stepS - geared * lengthM;
    if (geared > demand) brakesJ += (geared - demand) * lengthM;
    else unmetJ += (geared - demand) * lengthM;
    if (demand >= 0) demandJ += demand * lengthM;
    else {
      brakingJ -= demand * lengthM;
      if (terminal < -chargeW) {
        brakesJ -= (chargeW + terminal) * stepS;
        terminal = -chargeW;
      }
      if (terminal < auxiliariesW) recoveredJ += (auxiliariesW - terminal) * stepS;
    }
    if (terminal > mostW) {
      unmetJ -= (terminal - mostW) * stepS;
      terminal = mostW;
      missed[k] = 1;
    }
    if (missed[k] !== 0) missedS += stepS;
    // Twice the voltage lost in the pack, 2RI. ∑ V I Δt = ∑ P Δt + ∑ R I² Δt needs no division for the current itself.
    const drop = voltageV - Math.sqrt(Math.max(0, voltageSquare - resistance4 * terminal));
    terminalJ += terminal * stepS;
    dropSquareV2S += drop * drop * stepS;
  }
  lossBeforeJ[speedMPerS.length] = lossJ;
  const packHeatJ = resistanceOhm > 0 ? dropSquareV2S / resistance4 : 0;
  const sums = { terminalJ, packHeatJ, demandJ, brakingJ, recoveredJ, gearingJ, lossJ, brakesJ, unmetJ, torqueSquareN2M2S, missedS };
  addStanding(vehicle, cycle.standingS, sums);
  return sums;
}

function addStanding({ battery, auxiliariesW }: Vehicle, standingS: number, sums: CycleSums): void {
  const mostW = mostPowerW(battery);
  const currentA = packCurrentA(battery, auxiliariesW);
  sums.terminalJ += Math.min(auxiliariesW, mostW) * standingS;
  sums.packHeatJ += currentA * currentA * battery.resistanceOhm * standingS;
  if (auxiliariesW > mostW) {
    sums.unmetJ -= (auxiliariesW - mostW) * standingS;
    sums.missedS += standingS;
  }
}
