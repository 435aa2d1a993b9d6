/**
 * Cycle trial: a prepared speed trace driven backward-facing, step by step, from the force at the wheels to the energy
 * drawn from the pack, with a sink for every joule of it.
 * Source: quasi-static (backward-facing) simulation, Guzzella & Sciarretta, Vehicle Propulsion Systems, ch. 2 (from memory).
 */
import { motorSpeedRadPerS } from '../vehicle/gearing.ts';
import { continuousCornerLossW, isOutsideMap } from '../vehicle/motor.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import { chooseGears } from './choose-gear.ts';
import type { CompiledCycle } from './compiled-cycle.ts';
import { addStanding, addSteps, type CycleSums, emptySums } from './cycle-sums.ts';
import { driveInGear } from './drive-in-gear.ts';
import { highestMeanW } from './loss-window.ts';
import { airEnergyJ, gradeEnergyJ, inertiaEnergyJ, rollingEnergyJ } from './wheel-demand.ts';

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
 * Steps driven at a time. Long loops in the first calls leave V8 with loop code that it entered half-way through a call (on-stack
 * replacement), measured three times slower and kept for good; short ones let it compile whole functions.
 */
const BLOCK = 128;

/** Drives the cycle and fills `result`. The steps as driven stay in `cycle.driven` until the next design. */
export function runCycle(vehicle: Vehicle, cycle: CompiledCycle, result: CycleResult): void {
  const { distanceM, totalS } = cycle;
  const sums = driveSteps(vehicle, cycle);
  const { road } = vehicle;
  result.wheelDemandJPerM = perDistance(sums.demandJ, distanceM);
  result.wheelBrakingJPerM = perDistance(sums.brakingJ, distanceM);
  result.rollingJPerM = perDistance(rollingEnergyJ(road, cycle), distanceM);
  result.airJPerM = perDistance(airEnergyJ(road, cycle), distanceM);
  result.gradeJPerM = perDistance(gradeEnergyJ(road, cycle), distanceM);
  result.inertiaJPerM = perDistance(inertiaEnergyJ(vehicle, cycle), distanceM);
  result.gearingJPerM = perDistance(sums.gearingJ, distanceM);
  result.motorJPerM = perDistance(sums.lossJ, distanceM);
  result.batteryJPerM = perDistance(sums.packHeatJ, distanceM);
  result.auxiliariesJPerM = perDistance(vehicle.auxiliariesW * totalS, distanceM);
  result.brakesJPerM = perDistance(sums.brakesJ, distanceM);
  result.unmetJPerM = perDistance(sums.unmetJ, distanceM);
  result.offTrace = sums.missedS / totalS;
  result.recovered = sums.brakingJ > 0 ? sums.recoveredJ / sums.brakingJ : Number.NaN;
  result.outsideMap = vehicle.motor.lossMap === null ? Number.NaN : outsideMapS(vehicle, cycle) / totalS;
  writeBatteryFigures(vehicle, perDistance(sums.terminalJ + sums.packHeatJ, distanceM), result);
  writeMotorLoads(vehicle, cycle, sums, result);
}

function driveSteps(vehicle: Vehicle, cycle: CompiledCycle): CycleSums {
  const sums = emptySums();
  const steps = cycle.speedMPerS.length;
  for (let from = 0; from < steps; from += BLOCK) {
    const to = Math.min(from + BLOCK, steps);
    driveInGear(vehicle, 0, cycle, from, to, cycle.driven);
    if (vehicle.gearing.ratioCount === 2) {
      driveInGear(vehicle, 1, cycle, from, to, cycle.drivenHigher);
      chooseGears(vehicle, cycle, from, to);
    }
    addSteps(vehicle, cycle, from, to, sums);
  }
  addStanding(vehicle, cycle, sums);
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
