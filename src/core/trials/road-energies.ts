/** What the road takes over a whole trace: the energies that do not depend on how the drive follows it. */
import { airResistanceN } from '../vehicle/road-load.ts';
import type { RoadLoad, Vehicle } from '../vehicle/vehicle.ts';
import type { CompiledCycle } from './compiled-cycle.ts';

/** Energy (J) lost to rolling resistance over the trace. */
export function rollingEnergyJ(road: RoadLoad, { moments }: CompiledCycle): number {
  return road.rollingN * moments.cosV + road.rollingPerSpeed2NS2PerM2 * moments.cosV3;
}

/** Energy (J) lost to the air over the trace. */
export function airEnergyJ(road: RoadLoad, cycle: CompiledCycle): number {
  const { moments, speedMPerS, durationS } = cycle;
  if (road.headWindMPerS === 0) return road.airLinearNSPerM * moments.v2 + (road.airSquareNS2PerM2 + road.dragNS2PerM2) * moments.v3;
  let energyJ = 0;
  for (let k = 0; k < speedMPerS.length; k++) energyJ += airResistanceN(road, speedMPerS[k]) * speedMPerS[k] * durationS[k];
  return energyJ;
}

/** Energy (J) spent on climbing, net. */
export function gradeEnergyJ(road: RoadLoad, { moments }: CompiledCycle): number {
  return road.weightN * moments.sinV;
}

/** Energy (J) left in the moving mass, net: exactly zero on a closed trace in one gear. */
export function inertiaEnergyJ({ effectiveMassKg, gearing }: Vehicle, cycle: CompiledCycle): number {
  if (gearing.ratioCount === 1) return effectiveMassKg[0] * cycle.kineticJPerKg;
  const { speedMPerS, accelerationMPerS2, durationS, driven } = cycle;
  let energyJ = 0;
  for (let k = 0; k < speedMPerS.length; k++) energyJ += effectiveMassKg[driven.gear[k]] * accelerationMPerS2[k] * speedMPerS[k] * durationS[k];
  return energyJ;
}
