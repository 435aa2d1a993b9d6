/** What a cycle draws from the pack, added up step by step, and the time in which the drive cannot follow. */
import { mostPowerW, packCurrentA } from '../vehicle/battery.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import type { DrivenSteps } from './driven-steps.ts';

/** Totals so far. */
export interface DrawnSums {
  /** At the terminals of the pack. */
  terminalJ: number;
  /**
   * ∑ (2 R I)² Δt: twice the voltage lost in the pack, squared. With V I = P + R I² the drawn energy needs no division for I, and loses no digits
   * for a tiny R.
   */
  dropSquareV2S: number;
  missedS: number;
}

/** A record to add up in, to be cleared first. */
export function createDrawnSums(): DrawnSums {
  return { terminalJ: Number.NaN, dropSquareV2S: Number.NaN, missedS: Number.NaN };
}

/** Nothing added up yet. */
export function clearDrawn(sums: DrawnSums): void {
  sums.terminalJ = 0;
  sums.dropSquareV2S = 0;
  sums.missedS = 0;
}

/**
 * Adds steps `from` up to, not including, `to` as driven. Terminal power below the charge limit is held there, as beyond V²/(4R), where
 * the step is missed as well.
 */
export function addDrawn({ battery, auxiliariesW }: Vehicle, durationS: Float64Array, driven: DrivenSteps, from: number, to: number, sums: DrawnSums): void {
  const { shaftW, lossW, missed } = driven;
  const { voltageV, resistanceOhm, chargeW } = battery;
  const mostW = mostPowerW(battery);
  const voltageSquare = voltageV * voltageV;
  const resistance4 = 4 * resistanceOhm;
  let { terminalJ, dropSquareV2S, missedS } = sums;
  for (let k = from; k < to; k++) {
    const stepS = durationS[k];
    let terminal = shaftW[k] + lossW[k] + auxiliariesW;
    if (terminal < -chargeW) terminal = -chargeW;
    if (terminal > mostW) {
      terminal = mostW;
      missed[k] = 1;
    }
    if (missed[k] !== 0) missedS += stepS;
    const drop = voltageV - Math.sqrt(Math.max(0, voltageSquare - resistance4 * terminal));
    terminalJ += terminal * stepS;
    dropSquareV2S += drop * drop * stepS;
  }
  sums.terminalJ = terminalJ;
  sums.dropSquareV2S = dropSquareV2S;
  sums.missedS = missedS;
}

/** Adds standing time, which draws the auxiliaries alone. */
export function addStanding({ battery, auxiliariesW }: Vehicle, standingS: number, sums: DrawnSums): void {
  const mostW = mostPowerW(battery);
  const drop = 2 * battery.resistanceOhm * packCurrentA(battery, auxiliariesW);
  sums.terminalJ += Math.min(auxiliariesW, mostW) * standingS;
  sums.dropSquareV2S += drop * drop * standingS;
  if (auxiliariesW > mostW) sums.missedS += standingS;
}

/** Energy (J) lost in the resistance of the pack. */
export function packHeatJ({ battery }: Vehicle, { dropSquareV2S }: DrawnSums): number {
  return battery.resistanceOhm > 0 ? dropSquareV2S / (4 * battery.resistanceOhm) : 0;
}
