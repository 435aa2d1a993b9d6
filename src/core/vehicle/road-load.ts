/** Road load: rolling resistance, air drag and slope, from coefficients or from a coast-down. */
import type { RoadLoad } from './vehicle.ts';

/** Standard gravity, exact by definition (3rd General Conference on Weights and Measures, 1901). */
export const GRAVITY_M_PER_S2 = 9.80665;

/** A slope by the sine and cosine of its angle; downhill has a negative sine. */
export interface Slope {
  readonly sin: number;
  readonly cos: number;
}

/** The slope of a grade (rise over run). */
export function slopeOf(grade: number): Slope {
  const hypotenuse = Math.sqrt(1 + grade * grade);
  return { sin: grade / hypotenuse, cos: 1 / hypotenuse };
}

/** Rolling resistance (N) on slope cosine `cos` at speed v ≥ 0: m g cos α (c0 + c1 v²), or the f0 term of a coast-down. */
export function rollingResistanceN(road: RoadLoad, speedMPerS: number, cos: number): number {
  return cos * (road.rollingN + road.rollingPerSpeed2NS2PerM2 * speedMPerS * speedMPerS);
}

/** Air part (N) at speed v ≥ 0: ½ρ CdA (v + w)|v + w| with head wind w (negative in a strong tail wind), or f1 v + f2 v². */
export function airResistanceN(road: RoadLoad, speedMPerS: number): number {
  const airspeed = speedMPerS + road.headWindMPerS;
  return road.dragNS2PerM2 * airspeed * Math.abs(airspeed) + speedMPerS * (road.airLinearNSPerM + road.airSquareNS2PerM2 * speedMPerS);
}

/** Whole resistance (N) at steady speed v ≥ 0: rolling, air and slope. Source: Wong, Theory of Ground Vehicles, ch. 3 (from memory). */
export function resistanceN(road: RoadLoad, speedMPerS: number, slope: Slope): number {
  return rollingResistanceN(road, speedMPerS, slope.cos) + airResistanceN(road, speedMPerS) + road.weightN * slope.sin;
}

/** What a road load from coefficients is made of. */
export interface RoadCoefficients {
  /** Carried mass and trailer. */
  movedMassKg: number;
  /** Vehicle and payload. */
  carriedMassKg: number;
  /** Rolling coefficient: rollingC0 + rollingC1S2PerM2 · v². */
  rollingC0: number;
  rollingC1S2PerM2: number;
  dragAreaM2: number;
  trailerDragAreaM2: number;
  airDensityKgPerM3: number;
  headWindMPerS: number;
}

/** Road load of the whole train from rolling and drag coefficients. */
export function roadLoadFromCoefficients(given: RoadCoefficients): RoadLoad {
  const weightN = given.movedMassKg * GRAVITY_M_PER_S2;
  const carriedWeightN = given.carriedMassKg * GRAVITY_M_PER_S2;
  return {
    rollingN: weightN * given.rollingC0,
    rollingPerSpeed2NS2PerM2: weightN * given.rollingC1S2PerM2,
    airLinearNSPerM: 0,
    airSquareNS2PerM2: 0,
    dragNS2PerM2: 0.5 * given.airDensityKgPerM3 * (given.dragAreaM2 + given.trailerDragAreaM2),
    headWindMPerS: given.headWindMPerS,
    weightN,
    carriedRollingN: carriedWeightN * given.rollingC0,
    carriedRollingPerSpeed2NS2PerM2: carriedWeightN * given.rollingC1S2PerM2,
  };
}

/** What a road load from a coast-down is made of. */
export interface CoastDown {
  f0N: number;
  f1NSPerM: number;
  f2NS2PerM2: number;
  /** Mass at which the coefficients were measured. */
  referenceMassKg: number;
  /** Carried mass and trailer. */
  movedMassKg: number;
  /** Vehicle and payload. */
  carriedMassKg: number;
}

/** Road load of the whole train from coast-down coefficients: f0 scales with mass, f1 and f2 stay; wind and air play no part. */
export function roadLoadFromCoastDown(given: CoastDown): RoadLoad {
  return {
    rollingN: (given.movedMassKg / given.referenceMassKg) * given.f0N,
    rollingPerSpeed2NS2PerM2: 0,
    airLinearNSPerM: given.f1NSPerM,
    airSquareNS2PerM2: given.f2NS2PerM2,
    dragNS2PerM2: 0,
    headWindMPerS: 0,
    weightN: given.movedMassKg * GRAVITY_M_PER_S2,
    carriedRollingN: (given.carriedMassKg / given.referenceMassKg) * given.f0N,
    carriedRollingPerSpeed2NS2PerM2: 0,
  };
}
