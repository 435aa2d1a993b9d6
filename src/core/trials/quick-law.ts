/**
 * One design in one gear with its constants multiplied out: the laws of gearing, motor and pack as polynomials of vehicle speed v, for
 * the quick loops over a cycle, and how far from every limit of the drive these hold.
 */
import { interpolateLinear } from '../numerics/interpolation.ts';
import { dischargeLimitW } from '../vehicle/battery.ts';
import type { Gear } from '../vehicle/gearing.ts';
import type { Motor, Vehicle } from '../vehicle/vehicle.ts';
import type { MovingSteps } from './moving-steps.ts';
import { calmResistance, type DemandLaw } from './wheel-demand.ts';

/** Below this share of a limit the exact test finds nothing to clip, whatever the rounding. */
export const CLEAR = 1 - 1e-12;

/**
 * Motor torque T = lever × wheel force + dragFixed + dragPerSpeed v. Loss = idleFixed + v (idleLinear + v (idleSquare + v idleCube)) +
 * (square + squarePerSpeed2 v²) I² + linear I, where I² = T² + f² stands for the current and f = field (1 − base/v), above base speed,
 * for its field-weakening part.
 */
export interface QuickLaw extends DemandLaw {
  /** Motor speed over vehicle speed. */
  turnsRadPerM: number;
  pullingLeverM: number;
  brakingLeverM: number;
  dragFixedNm: number;
  dragPerSpeedNs: number;
  /** Share of the braking force from speed `full` on, falling evenly to nothing at `from`. */
  brakingShare: number;
  brakingFromMPerS: number;
  brakingFullMPerS: number;
  brakingSharePerSpeedSPerM: number;
  idleFixedW: number;
  idleLinearN: number;
  idleSquareNSPerM: number;
  idleCubeNS2PerM2: number;
  squareWPerN2M2: number;
  squarePerSpeed2WS2PerN2M4: number;
  linearWPerNm: number;
  fieldNm: number;
  baseMPerS: number;

  auxiliariesW: number;
  chargeW: number;
  voltageV: number;
  /** Four times the resistance of the pack. */
  resistance4Ohm: number;

  /** No limit is touched by a torque below this up to base speed, … */
  clearNm: number;
  /** … by a shaft power below this above base speed, … */
  clearW: number;
  /** … if speed is below this, or by a shaft power below this other one … */
  clearMPerS: number;
  clearFastW: number;
  /** … if it is below this; and by a terminal power below this. */
  clearFastMPerS: number;
  clearTerminalW: number;
}

/** A record for `writeQuickLaw` to fill. */
export function createQuickLaw(): QuickLaw {
  const no = Number.NaN;
  return {
    effectiveMassKg: no,
    calm: null,
    turnsRadPerM: no,
    pullingLeverM: no,
    brakingLeverM: no,
    dragFixedNm: no,
    dragPerSpeedNs: no,
    brakingShare: no,
    brakingFromMPerS: no,
    brakingFullMPerS: no,
    brakingSharePerSpeedSPerM: no,
    idleFixedW: no,
    idleLinearN: no,
    idleSquareNSPerM: no,
    idleCubeNS2PerM2: no,
    squareWPerN2M2: no,
    squarePerSpeed2WS2PerN2M4: no,
    linearWPerNm: no,
    fieldNm: no,
    baseMPerS: no,
    auxiliariesW: no,
    chargeW: no,
    voltageV: no,
    resistance4Ohm: no,
    clearNm: no,
    clearW: no,
    clearMPerS: no,
    clearFastW: no,
    clearFastMPerS: no,
    clearTerminalW: no,
  };
}

/** Fills the record for steps of a cycle; of measured losses it knows nothing. */
export function writeQuickLaw(vehicle: Vehicle, gear: Gear, steps: MovingSteps, law: QuickLaw): void {
  const { motor, gearing, battery, regeneration, wheelRadiusM, auxiliariesW } = vehicle;
  const turns = gearing.ratios[gear] / wheelRadiusM;
  const efficiency = gearing.efficiencies[gear];
  law.effectiveMassKg = vehicle.effectiveMassKg[gear];
  law.calm = calmResistance(vehicle.road, steps);
  law.turnsRadPerM = turns;
  law.pullingLeverM = 1 / (turns * efficiency);
  law.brakingLeverM = efficiency / turns;
  law.dragFixedNm = gearing.dragFixedNm;
  law.dragPerSpeedNs = gearing.dragPerSpeedNms * turns;
  law.brakingShare = regeneration.share;
  law.brakingFromMPerS = regeneration.fromMPerS;
  law.brakingFullMPerS = regeneration.fullMPerS;
  law.brakingSharePerSpeedSPerM = regeneration.share / (regeneration.fullMPerS - regeneration.fromMPerS);
  writeLosses(motor, turns, law);
  law.auxiliariesW = auxiliariesW;
  law.chargeW = battery.chargeW;
  law.voltageV = battery.voltageV;
  law.resistance4Ohm = 4 * battery.resistanceOhm;
  law.clearTerminalW = dischargeLimitW(battery) * CLEAR;
  if (motor.fullLoad === null) writeClear(motor, law);
  else writeClearOfCurve(motor, motor.fullLoad, law);
  law.clearMPerS *= CLEAR / turns;
  law.clearFastMPerS *= CLEAR / turns;
}

function writeLosses({ peakTorqueNm, peakPowerW, baseSpeedRadPerS, losses }: Motor, turns: number, law: QuickLaw): void {
  const copper = losses.copperWPerNm / peakTorqueNm;
  const turns2 = turns * turns;
  law.idleFixedW = peakPowerW * losses.inverterFixed;
  law.idleLinearN = peakTorqueNm * losses.hysteresis * turns;
  law.idleSquareNSPerM = peakTorqueNm * losses.eddyS * turns2;
  law.idleCubeNS2PerM2 = peakTorqueNm * losses.windageS2 * turns2 * turns;
  law.squareWPerN2M2 = copper + (peakPowerW * losses.inverterSquare) / (peakTorqueNm * peakTorqueNm);
  law.squarePerSpeed2WS2PerN2M4 = copper * losses.acCopperS2 * turns2;
  law.linearWPerNm = (peakPowerW * losses.inverterLinear) / peakTorqueNm;
  law.fieldNm = losses.fieldWeakening * peakTorqueNm;
  law.baseMPerS = baseSpeedRadPerS / turns;
}

/** Speeds here still in rad/s. Where power falls it is least at maximum speed. */
function writeClear({ peakTorqueNm, peakPowerW, constantPowerToRadPerS, maxSpeedRadPerS }: Motor, law: QuickLaw): void {
  law.clearNm = peakTorqueNm * CLEAR;
  law.clearW = peakPowerW * CLEAR;
  law.clearMPerS = constantPowerToRadPerS;
  law.clearFastW = ((peakPowerW * constantPowerToRadPerS) / maxSpeedRadPerS) * CLEAR;
  law.clearFastMPerS = maxSpeedRadPerS;
}

/** Torque is linear between the points of a curve, so that neither it nor the power is least between them. */
function writeClearOfCurve({ peakTorqueNm, baseSpeedRadPerS, maxSpeedRadPerS }: Motor, curve: NonNullable<Motor['fullLoad']>, law: QuickLaw): void {
  const { speedsRadPerS, torquesNm, referencePeakTorqueNm, referenceBaseSpeedRadPerS } = curve;
  let torqueNm = interpolateLinear(speedsRadPerS, torquesNm, referenceBaseSpeedRadPerS);
  let powerW = torqueNm * referenceBaseSpeedRadPerS;
  for (let i = 0; i < torquesNm.length; i++) {
    if (speedsRadPerS[i] <= referenceBaseSpeedRadPerS) torqueNm = Math.min(torqueNm, torquesNm[i]);
    else powerW = Math.min(powerW, torquesNm[i] * speedsRadPerS[i]);
  }
  const perTorque = peakTorqueNm / referencePeakTorqueNm;
  law.clearNm = torqueNm * perTorque * CLEAR;
  law.clearW = powerW * perTorque * (baseSpeedRadPerS / referenceBaseSpeedRadPerS) * CLEAR;
  law.clearMPerS = maxSpeedRadPerS;
  law.clearFastW = law.clearW;
  law.clearFastMPerS = maxSpeedRadPerS;
}
