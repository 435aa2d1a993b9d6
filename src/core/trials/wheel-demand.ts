/** The force that a trace asks for at the wheels, step by step. */
import type { RoadLoad } from '../vehicle/vehicle.ts';
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
