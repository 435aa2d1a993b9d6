/**
 * The quick loops over a cycle, which are most of the computing time of a run: one gear, losses by coefficients, steps clear of
 * every limit of the drive. They read numbers and typed arrays only, and allocate nothing. A loop stops at the first step that may touch a limit, so that
 * it can be driven word for word and the sum goes on behind it: whatever the limits, steps are added in one order.
 *
 * No arithmetic stands where only some designs come by, outside the loops above all: V8 would throw away its code at the first of
 * them, and might go on for good in a loop that it enters half-way through each call, four times slower.
 */
import type { DrawnSums } from './drawn-sums.ts';
import type { MovingSteps } from './moving-steps.ts';
import type { QuickLaw } from './quick-law.ts';
import type { CalmResistance } from './wheel-demand.ts';

/** Motor torque as one polynomial: perAcceleration a + constant + linear v + square v². */
export interface TorqueLaw {
  perAccelerationKgM: number;
  constantNm: number;
  linearNs: number;
  squareNS2PerM: number;
  /** 1: the motor pulls; −1: it brakes. */
  sign: 1 | -1;
  /** Beyond this terminal power the law does not hold. */
  mostTerminalW: number;
}

/** The law of steps on which the motor pulls: the resistance alone would slow the vehicle down by more. */
export function pullingLaw({ effectiveMassKg, pullingLeverM, dragFixedNm, dragPerSpeedNs, clearTerminalW }: QuickLaw, calm: CalmResistance): TorqueLaw {
  return {
    perAccelerationKgM: effectiveMassKg * pullingLeverM,
    constantNm: calm.constantN * pullingLeverM + dragFixedNm,
    linearNs: calm.linearNSPerM * pullingLeverM + dragPerSpeedNs,
    squareNS2PerM: calm.squareNS2PerM2 * pullingLeverM,
    sign: 1,
    mostTerminalW: clearTerminalW,
  };
}

/**
 * The law of steps on which the motor brakes with its whole share, at or above the speed from which it takes that. Where it gives nothing back, it may
 * be coasting: such steps are not among them.
 */
export function brakingLaw(law: QuickLaw, calm: CalmResistance): TorqueLaw {
  const lever = law.brakingShare * law.brakingLeverM;
  return {
    perAccelerationKgM: law.effectiveMassKg * lever,
    constantNm: calm.constantN * lever + law.dragFixedNm,
    linearNs: calm.linearNSPerM * lever + law.dragPerSpeedNs,
    squareNS2PerM: calm.squareNS2PerM2 * lever,
    sign: -1,
    mostTerminalW: Math.min(law.auxiliariesW, law.clearTerminalW),
  };
}

/**
 * Adds steps that keep to one torque law: from step `from` on, at most up to `to`; returns the step it stopped at. `clearW` is the shaft power that
 * is clear of the motor's limit above base speed.
 */
export function addOneWay(
  law: QuickLaw,
  torqueLaw: TorqueLaw,
  clearW: number,
  { speedMPerS, perSpeedSPerM, accelerationMPerS2, durationS }: MovingSteps,
  from: number,
  to: number,
  sums: DrawnSums,
): number {
  const { turnsRadPerM: turns, idleFixedW, idleLinearN, idleSquareNSPerM, idleCubeNS2PerM2 } = law;
  const { squareWPerN2M2, squarePerSpeed2WS2PerN2M4, linearWPerNm, fieldNm, baseMPerS } = law;
  const { auxiliariesW, chargeW, voltageV, resistance4Ohm, clearNm } = law;
  const { perAccelerationKgM, constantNm, linearNs, squareNS2PerM, sign, mostTerminalW } = torqueLaw;
  const leastTerminalW = -chargeW;
  const idleConstant = idleFixedW + auxiliariesW;
  const fieldBase = fieldNm * baseMPerS;
  const voltageSquare = voltageV * voltageV;
  let { terminalJ, dropSquareV2S } = sums;
  let k = from;
  for (; k < to; k++) {
    const v = speedMPerS[k];
    const v2 = v * v;
    const torque = perAccelerationKgM * accelerationMPerS2[k] + (constantNm + linearNs * v + squareNS2PerM * v2);
    const load = sign * torque;
    const shaft = torque * (turns * v);
    const idle = idleConstant + idleLinearN * v + v2 * (idleSquareNSPerM + idleCubeNS2PerM2 * v);
    const perCurrent2 = squareWPerN2M2 + squarePerSpeed2WS2PerN2M4 * v2;
    let terminal: number;
    if (v > baseMPerS) {
      const field = fieldNm - fieldBase * perSpeedSPerM[k];
      const current2 = torque * torque + field * field;
      terminal = shaft + idle + perCurrent2 * current2 + linearWPerNm * Math.sqrt(current2);
      if (!(load >= 0 && sign * shaft < clearW && terminal < mostTerminalW)) break;
    } else {
      terminal = shaft + idle + load * (perCurrent2 * load + linearWPerNm);
      if (!(load >= 0 && load < clearNm && terminal < mostTerminalW)) break;
    }
    terminal = Math.max(terminal, leastTerminalW);
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
  const leastTerminalW = -chargeW;
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
    terminal = Math.max(terminal, leastTerminalW);
    const drop = voltageV - Math.sqrt(voltageSquare - resistance4Ohm * terminal);
    const stepS = durationS[k];
    terminalJ += terminal * stepS;
    dropSquareV2S += drop * drop * stepS;
  }
  sums.terminalJ = terminalJ;
  sums.dropSquareV2S = dropSquareV2S;
  return k;
}
