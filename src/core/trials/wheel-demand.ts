/** The force that a trace asks for at the wheels, step by step, and what the road takes over the whole trace. */
import { airResistanceN } from '../vehicle/road-load.ts';
import type { RoadLoad, Vehicle } from '../vehicle/vehicle.ts';
import type { CompiledCycle } from './compiled-cycle.ts';
import type { MovingSteps } from './moving-steps.ts';

/** Road load on one slope without wind: constant + v (linear + v square). */
export interface CalmResistance {
  readonly constantN: number;
  readonly linearNSPerM: number;
  readonly squareNS2PerM2: number;
}

/** The resistance of steps that all have one slope, without wind; null where slope or wind make it another one. */
export function calmResistance(road: RoadLoad, { evenSlope, cosSlope, sinSlope }: MovingSteps): CalmResistance | null {
  if (!evenSlope || road.headWindMPerS !== 0 || cosSlope.length === 0) return null;
  return {
    constantN: cosSlope[0] * road.rollingN + road.weightN * sinSlope[0],
    linearNSPerM: road.airLinearNSPerM,
    squareNS2PerM2: cosSlope[0] * road.rollingPerSpeed2NS2PerM2 + road.airSquareNS2PerM2 + road.dragNS2PerM2,
  };
}

/** What the wheel force of a design in one gear depends on beside its road load. */
export interface DemandLaw {
  effectiveMassKg: number;
  /** The calm resistance of the steps, where it is one. */
  calm: CalmResistance | null;
}

/** Writes F = m_e a + R(v̄) (N) of the steps `from` up to, not including, `to` to `demandN`. */
export function writeDemand({ calm, effectiveMassKg }: DemandLaw, road: RoadLoad, steps: MovingSteps, from: number, to: number, demandN: Float64Array): void {
  if (calm === null) writeOpenDemand(road, effectiveMassKg, steps, from, to, demandN);
  else writeCalmDemand(calm, effectiveMassKg, steps, from, to, demandN);
}

function writeCalmDemand(resistance: CalmResistance, effectiveMassKg: number, steps: MovingSteps, from: number, to: number, demandN: Float64Array): void {
  const { speedMPerS, accelerationMPerS2 } = steps;
  const { constantN, linearNSPerM, squareNS2PerM2 } = resistance;
  for (let k = from; k < to; k++) {
    const v = speedMPerS[k];
    demandN[k] = effectiveMassKg * accelerationMPerS2[k] + (constantN + v * (linearNSPerM + v * squareNS2PerM2));
  }
}

function writeOpenDemand(road: RoadLoad, effectiveMassKg: number, steps: MovingSteps, from: number, to: number, demandN: Float64Array): void {
  const { speedMPerS, accelerationMPerS2, cosSlope, sinSlope } = steps;
  const { rollingN, rollingPerSpeed2NS2PerM2, airLinearNSPerM, airSquareNS2PerM2, dragNS2PerM2, headWindMPerS, weightN } = road;
  for (let k = from; k < to; k++) {
    const v = speedMPerS[k];
    const airspeed = v + headWindMPerS;
    const air = dragNS2PerM2 * airspeed * Math.abs(airspeed) + v * (airLinearNSPerM + airSquareNS2PerM2 * v);
    const rolling = cosSlope[k] * (rollingN + rollingPerSpeed2NS2PerM2 * v * v);
    demandN[k] = effectiveMassKg * accelerationMPerS2[k] + (rolling + air + weightN * sinSlope[k]);
  }
}

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
