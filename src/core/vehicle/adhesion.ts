/** Adhesion of the driven axle, with the load that the tractive force itself moves between the axles. */
import { GRAVITY_M_PER_S2 } from './road-load.ts';
import type { Vehicle } from './vehicle.ts';

/**
 * Largest force (N) that the driven tyres can bring to the road at speed v ≥ 0 on slope cosine `cos`; Infinity where no
 * adhesion is stated. Proportional to `cos`. All-wheel drive uses the whole weight; rear drive never more than that, nor
 * less than 0. The hitch is taken at road level: a trailer moves no load between the axles.
 * Source: Wong, Theory of Ground Vehicles, ch. 3 (from memory).
 */
export function adhesionLimitN(vehicle: Vehicle, speedMPerS: number, cos: number): number {
  const { axles, road } = vehicle;
  const { adhesion, driven, frontShare } = axles;
  if (Number.isNaN(adhesion)) return Infinity;
  const weightN = vehicle.carriedMassKg * GRAVITY_M_PER_S2 * cos;
  if (driven === 'all') return adhesion * weightN;
  const leverShare = axles.centreHeightM / axles.wheelbaseM;
  const rollingN = cos * (road.carriedRollingN + road.carriedRollingPerSpeed2NS2PerM2 * speedMPerS * speedMPerS);
  const transferredN = rollingN * leverShare;
  if (driven === 'front') return (adhesion * (frontShare * weightN + transferredN)) / (1 + adhesion * leverShare);
  const growth = 1 - adhesion * leverShare;
  if (growth <= 0) return adhesion * weightN;
  const rearN = (adhesion * ((1 - frontShare) * weightN - transferredN)) / growth;
  return Math.max(0, Math.min(adhesion * weightN, rearN));
}

/**
 * Speeds (m/s) at which that law changes: the rear axle, unloaded by growing rolling resistance, stops to carry the whole weight or to carry
 * any. None for other drives, nor where rolling resistance does not grow.
 */
export function adhesionBreakSpeedsMPerS({ axles, road, carriedMassKg }: Vehicle): number[] {
  const leverShare = axles.centreHeightM / axles.wheelbaseM;
  if (axles.driven !== 'rear' || !(axles.adhesion * leverShare < 1) || !(road.carriedRollingPerSpeed2NS2PerM2 > 0)) return [];
  const weightN = carriedMassKg * GRAVITY_M_PER_S2;
  const rollingN = [(axles.adhesion - axles.frontShare / leverShare) * weightN, ((1 - axles.frontShare) / leverShare) * weightN];
  return rollingN.map((whole) => Math.sqrt((whole - road.carriedRollingN) / road.carriedRollingPerSpeed2NS2PerM2)).filter((speed) => speed > 0);
}
