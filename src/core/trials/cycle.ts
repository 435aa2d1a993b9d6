/**
 * Cycle trial: a prepared speed trace driven backward-facing, step by step, from the force at the wheels to the energy
 * drawn from the pack; on request with a sink for every joule of it.
 * Source: quasi-static (backward-facing) simulation, Guzzella & Sciarretta, Vehicle Propulsion Systems, ch. 2 (from memory).
 */
import { mostPowerW } from '../vehicle/battery.ts';
import { motorSpeedRadPerS } from '../vehicle/gearing.ts';
import { continuousCornerLossW, isOutsideMap } from '../vehicle/motor.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import { chooseGears } from './choose-gear.ts';
import type { CompiledCycle } from './compiled-cycle.ts';
import { addSteps, type CycleSums, emptySums } from './cycle-sums.ts';
import { addDrawn, addStanding, clearDrawn, packHeatJ } from './drawn-sums.ts';
import { driveBySpeed } from './drive-by-speed.ts';
import { driveInGear } from './drive-in-gear.ts';
import { STEPS_AT_A_TIME } from './driven-steps.ts';
import { highestMeanW } from './loss-window.ts';
import { writeQuickLaw } from './quick-law.ts';
import { airEnergyJ, gradeEnergyJ, inertiaEnergyJ, rollingEnergyJ } from './road-energies.ts';

/** Figures of one design on one cycle; energies per distance driven. NaN: does not exist. */
export interface CycleResult {
  /** Drawn from the pack at open-circuit voltage; negative on a trace that runs downhill enough. */
  batteryEnergyJPerM: number;
  /** NaN where nothing is drawn, or without a charging efficiency. */
  gridEnergyJPerM: number;
  /** NaN where nothing is drawn, or without usable energy. */
  rangeM: number;
  wheelDemandJPerM: number;
  wheelBrakingJPerM: number;
  rmsTorqueNm: number;
  /** RMS torque over continuous torque; NaN without a continuous rating, as both loss loads. */
  torqueLoad: number;
  lossLoad: number;
  worstLossLoad: number;
  /** Share of the time in which the drive cannot follow the trace. */
  offTrace: number;
  /** Share of the braking energy that returns to the pack; NaN on a trace without braking. */
  recovered: number;
  /** Share of the time in which the motor works outside its measured map; NaN without a map. */
  outsideMap: number;
  rollingJPerM: number;
  airJPerM: number;
  gradeJPerM: number;
  inertiaJPerM: number;
  gearingJPerM: number;
  motorJPerM: number;
  batteryJPerM: number;
  auxiliariesJPerM: number;
  brakesJPerM: number;
  /** Negative: what clipped steps did not deliver at the wheels. */
  unmetJPerM: number;
}

/** A record for runCycle to fill, every figure NaN. */
export function createCycleResult(): CycleResult {
  return {
    batteryEnergyJPerM: Number.NaN,
    gridEnergyJPerM: Number.NaN,
    rangeM: Number.NaN,
    wheelDemandJPerM: Number.NaN,
    wheelBrakingJPerM: Number.NaN,
    rmsTorqueNm: Number.NaN,
    torqueLoad: Number.NaN,
    lossLoad: Number.NaN,
    worstLossLoad: Number.NaN,
    offTrace: Number.NaN,
    recovered: Number.NaN,
    outsideMap: Number.NaN,
    rollingJPerM: Number.NaN,
    airJPerM: Number.NaN,
    gradeJPerM: Number.NaN,
    inertiaJPerM: Number.NaN,
    gearingJPerM: Number.NaN,
    motorJPerM: Number.NaN,
    batteryJPerM: Number.NaN,
    auxiliariesJPerM: Number.NaN,
    brakesJPerM: Number.NaN,
    unmetJPerM: Number.NaN,
  };
}

/**
 * Drives the cycle and fills `result`: what is drawn from the pack and the time off the trace; the whole account of the energy and of the
 * motor's load only if asked, else those figures stay as they are. What is drawn has the same bits either way. With the account, the
 * steps as driven stay in `cycle.driven` until the next design.
 */
export function runCycle(vehicle: Vehicle, cycle: CompiledCycle, result: CycleResult, withAccount = true): void {
  const { drawn, distanceM, totalS } = cycle;
  const { ratioCount } = vehicle.gearing;
  const isQuick = ratioCount === 1 && vehicle.motor.lossMap === null;
  clearDrawn(drawn);
  if (isQuick) driveBySpeed(vehicle, cycle);
  else {
    driveAlongTrace(vehicle, cycle);
    addDrawn(vehicle, cycle.durationS, cycle.driven, 0, cycle.durationS.length, drawn);
  }
  addStanding(vehicle, cycle.standingS, drawn);
  result.offTrace = drawn.missedS / totalS;
  writeBatteryFigures(vehicle, perDistance(drawn.terminalJ + packHeatJ(vehicle, drawn), distanceM), result);
  if (!withAccount) return;
  if (isQuick) driveAlongTrace(vehicle, cycle);
  writeAccount(vehicle, cycle, result);
}

/** Writes the moving steps, in the order of the trace, to `cycle.driven`. */
function driveAlongTrace(vehicle: Vehicle, cycle: CompiledCycle): void {
  const { ratioCount } = vehicle.gearing;
  const steps = cycle.durationS.length;
  writeQuickLaw(vehicle, 0, cycle, cycle.laws[0]);
  if (ratioCount === 2) writeQuickLaw(vehicle, 1, cycle, cycle.laws[1]);
  for (let from = 0; from < steps; from += STEPS_AT_A_TIME) {
    const to = Math.min(from + STEPS_AT_A_TIME, steps);
    driveInGear(vehicle, 0, cycle, from, to, cycle.driven);
    if (ratioCount === 1) continue;
    driveInGear(vehicle, 1, cycle, from, to, cycle.drivenHigher);
    chooseGears(vehicle, cycle, from, to);
  }
}

function writeAccount(vehicle: Vehicle, cycle: CompiledCycle, result: CycleResult): void {
  const { drawn, distanceM, totalS } = cycle;
  const { road, battery, auxiliariesW } = vehicle;
  const sums = accountOfSteps(vehicle, cycle);
  result.wheelDemandJPerM = perDistance(sums.demandJ, distanceM);
  result.wheelBrakingJPerM = perDistance(sums.brakingJ, distanceM);
  result.rollingJPerM = perDistance(rollingEnergyJ(road, cycle), distanceM);
  result.airJPerM = perDistance(airEnergyJ(road, cycle), distanceM);
  result.gradeJPerM = perDistance(gradeEnergyJ(road, cycle), distanceM);
  result.inertiaJPerM = perDistance(inertiaEnergyJ(vehicle, cycle), distanceM);
  result.gearingJPerM = perDistance(sums.gearingJ, distanceM);
  result.motorJPerM = perDistance(sums.lossJ, distanceM);
  result.batteryJPerM = perDistance(packHeatJ(vehicle, drawn), distanceM);
  result.auxiliariesJPerM = perDistance(auxiliariesW * totalS, distanceM);
  result.brakesJPerM = perDistance(sums.brakesJ, distanceM);
  // While standing, the pack may not even have the power for the auxiliaries.
  const standingUnmetJ = Math.max(0, auxiliariesW - mostPowerW(battery)) * cycle.standingS;
  result.unmetJPerM = perDistance(sums.unmetJ - standingUnmetJ, distanceM);
  result.recovered = sums.brakingJ > 0 ? sums.recoveredJ / sums.brakingJ : Number.NaN;
  result.outsideMap = vehicle.motor.lossMap === null ? Number.NaN : outsideMapS(vehicle, cycle) / totalS;
  writeMotorLoads(vehicle, cycle, sums, result);
}

function accountOfSteps(vehicle: Vehicle, cycle: CompiledCycle): CycleSums {
  const sums = emptySums();
  const steps = cycle.durationS.length;
  for (let from = 0; from < steps; from += STEPS_AT_A_TIME) addSteps(vehicle, cycle, from, Math.min(from + STEPS_AT_A_TIME, steps), sums);
  return sums;
}

/** A trace that never moves has no distance to share its energy. */
function perDistance(energyJ: number, distanceM: number): number {
  return distanceM > 0 ? energyJ / distanceM : Number.NaN;
}

function writeBatteryFigures({ battery }: Vehicle, energyJPerM: number, result: CycleResult): void {
  const draws = energyJPerM > 0;
  result.batteryEnergyJPerM = energyJPerM;
  result.gridEnergyJPerM = draws ? energyJPerM / battery.chargingEfficiency : Number.NaN;
  result.rangeM = draws ? battery.usableJ / energyJPerM : Number.NaN;
}

function writeMotorLoads({ motor }: Vehicle, cycle: CompiledCycle, sums: CycleSums, result: CycleResult): void {
  const cornerLossW = continuousCornerLossW(motor);
  result.rmsTorqueNm = Math.sqrt(sums.torqueSquareN2M2S / cycle.totalS);
  result.torqueLoad = result.rmsTorqueNm / (motor.continuousTorqueShare * motor.peakTorqueNm);
  result.lossLoad = sums.lossJ / cycle.totalS / cornerLossW;
  result.worstLossLoad = highestMeanW(cycle.windows, cycle.lossToJ) / cornerLossW;
}

function outsideMapS(vehicle: Vehicle, { durationS, speedMPerS, driven }: CompiledCycle): number {
  let outsideS = 0;
  for (let k = 0; k < durationS.length; k++) {
    const speedRadPerS = motorSpeedRadPerS(vehicle, driven.gear[k] === 0 ? 0 : 1, speedMPerS[k]);
    if (isOutsideMap(vehicle.motor, driven.torqueNm[k], speedRadPerS)) outsideS += durationS[k];
  }
  return outsideS;
}
