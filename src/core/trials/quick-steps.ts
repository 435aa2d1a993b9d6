/**
 * The quick loops over a cycle, which are most of the computing time of a run: one gear, losses by coefficients, steps clear of
 * every limit of the drive. They read numbers and typed arrays only, and allocate nothing. A loop stops at the first step that may touch a limit, so that
 * it can be driven word for word and the sum goes on behind it: whatever the limits, steps are added in one order.
 */
import type { DrawnSums } from './drawn-sums.ts';
import type { MovingSteps } from './moving-steps.ts';
import type { QuickLaw } from './quick-law.ts';
import type { CalmResistance } from './wheel-demand.ts';

/**
 * Adds steps on which the motor pulls: they do not slow down, the resistance is calm, and no term of it is negative. From step `from` on, at
 * most up to `to`; returns the step it stopped at. `clearW` is the shaft power that is clear of the motor's limit above base speed.
 */
export function addPulling(
  law: QuickLaw,
  calm: CalmResistance,
  clearW: number,
  { speedMPerS, perSpeedSPerM, accelerationMPerS2, durationS }: MovingSteps,
  from: number,
  to: number,
  sums: DrawnSums,
): number {
  const { turnsRadPerM: turns, pullingLeverM, dragFixedNm, dragPerSpeedNs, idleFixedW, idleLinearN, idleSquareNSPerM, idleCubeNS2PerM2 } = law;
  const { squareWPerN2M2, squarePerSpeed2WS2PerN2M4, linearWPerNm, fieldNm, baseMPerS } = law;
  const { auxiliariesW, voltageV, resistance4Ohm, clearNm, clearTerminalW } = law;
  // Torque = perAcceleration a + constant + linear v + square v².
  const perAcceleration = law.effectiveMassKg * pullingLeverM;
  const constant = calm.constantN * pullingLeverM + dragFixedNm;
  const linear = calm.linearNSPerM * pullingLeverM + dragPerSpeedNs;
  const square = calm.squareNS2PerM2 * pullingLeverM;
  const idleConstant = idleFixedW + auxiliariesW;
  const fieldBase = fieldNm * baseMPerS;
  const voltageSquare = voltageV * voltageV;
  let { terminalJ, dropSquareV2S } = sums;
  let k = from;
  for (; k < to; k++) {
    const v = speedMPerS[k];
    const v2 = v * v;
    const torque = perAcceleration * accelerationMPerS2[k] + (constant + linear * v + square * v2);
    const shaft = torque * (turns * v);
    const idle = idleConstant + idleLinearN * v + v2 * (idleSquareNSPerM + idleCubeNS2PerM2 * v);
    const perCurrent2 = squareWPerN2M2 + squarePerSpeed2WS2PerN2M4 * v2;
    let terminal: number;
    if (v > baseMPerS) {
      const field = fieldNm - fieldBase * perSpeedSPerM[k];
      const current2 = torque * torque + field * field;
      terminal = shaft + idle + perCurrent2 * current2 + linearWPerNm * Math.sqrt(current2);
      if (!(shaft < clearW && terminal < clearTerminalW)) break;
    } else {
      terminal = shaft + idle + torque * (perCurrent2 * torque + linearWPerNm);
      if (!(torque < clearNm && terminal < clearTerminalW)) break;
    }
    const drop = voltageV - Math.sqrt(voltageSquare - resistance4Ohm * terminal);
    const stepS = durationS[k];
    terminalJ += terminal * stepS;
    dropSquareV2S += drop * drop * stepS;
  }
  sums.terminalJ = terminalJ;
  sums.dropSquareV2S = dropSquareV2S;
  return k;
}

/** Adds steps of any kind, whose wheel force is `demandN`, in the same manner. */
export function addAny(
  law: QuickLaw,
  demandN: Float64Array,
  clearW: number,
  { speedMPerS, perSpeedSPerM, durationS }: MovingSteps,
  from: number,
  to: number,
  sums: DrawnSums,
): number {
  const { turnsRadPerM: turns, pullingLeverM, brakingLeverM, dragFixedNm, dragPerSpeedNs } = law;
  const { brakingShare, brakingFromMPerS, brakingFullMPerS, brakingSharePerSpeedSPerM } = law;
  const { idleFixedW, idleLinearN, idleSquareNSPerM, idleCubeNS2PerM2, squareWPerN2M2, squarePerSpeed2WS2PerN2M4, linearWPerNm, fieldNm, baseMPerS } = law;
  const { auxiliariesW, chargeW, voltageV, resistance4Ohm, clearNm, clearTerminalW } = law;
  const idleConstant = idleFixedW + auxiliariesW;
  const fieldBase = fieldNm * baseMPerS;
  const voltageSquare = voltageV * voltageV;
  let { terminalJ, dropSquareV2S } = sums;
  let k = from;
  for (; k < to; k++) {
    const v = speedMPerS[k];
    const v2 = v * v;
    const demand = demandN[k];
    const drag = dragFixedNm + dragPerSpeedNs * v;
    let torque = demand * (demand >= 0 ? pullingLeverM : brakingLeverM) + drag;
    const pulls = torque >= 0;
    if (!pulls) {
      const share = v >= brakingFullMPerS ? brakingShare : v <= brakingFromMPerS ? 0 : brakingSharePerSpeedSPerM * (v - brakingFromMPerS);
      torque = share * demand * brakingLeverM + drag;
    }
    const shaft = torque * (turns * v);
    const idle = idleConstant + idleLinearN * v + v2 * (idleSquareNSPerM + idleCubeNS2PerM2 * v);
    const perCurrent2 = squareWPerN2M2 + squarePerSpeed2WS2PerN2M4 * v2;
    let field = 0;
    let terminal: number;
    if (v > baseMPerS) {
      field = fieldNm - fieldBase * perSpeedSPerM[k];
      const current2 = torque * torque + field * field;
      terminal = shaft + idle + perCurrent2 * current2 + linearWPerNm * Math.sqrt(current2);
      if (!(Math.abs(shaft) < clearW && terminal < clearTerminalW)) break;
    } else {
      const load = Math.abs(torque);
      terminal = shaft + idle + load * (perCurrent2 * load + linearWPerNm);
      if (!(load < clearNm && terminal < clearTerminalW)) break;
    }
    if (!pulls && terminal > auxiliariesW) terminal = Math.min(terminal, idle + field * (perCurrent2 * field + linearWPerNm));
    if (terminal < -chargeW) terminal = -chargeW;
    const drop = voltageV - Math.sqrt(voltageSquare - resistance4Ohm * terminal);
    const stepS = durationS[k];
    terminalJ += terminal * stepS;
    dropSquareV2S += drop * drop * stepS;
  }
  sums.terminalJ = terminalJ;
  sums.dropSquareV2S = dropSquareV2S;
  return k;
}
