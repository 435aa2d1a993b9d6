/** Gearing between motor and driven wheels: mesh efficiency and the drag of what turns. */
import type { Gearing, Vehicle } from './vehicle.ts';

/** Index of a ratio: 0 the lower gear (larger ratio) or the only one, 1 the higher gear. */
export type Gear = 0 | 1;

/** Drag torque of the turning gearing (N·m) at the motor shaft; its fixed part also at standstill. */
export function dragTorqueNm(gearing: Gearing, speedRadPerS: number): number {
  return gearing.dragFixedNm + gearing.dragPerSpeedNms * speedRadPerS;
}

/** Motor speed (rad/s) at a vehicle speed. */
export function motorSpeedRadPerS(vehicle: Vehicle, gear: Gear, speedMPerS: number): number {
  return (speedMPerS * vehicle.gearing.ratios[gear]) / vehicle.wheelRadiusM;
}

/** Vehicle speed (m/s) at maximum motor speed. */
export function maxVehicleSpeedMPerS(vehicle: Vehicle, gear: Gear): number {
  return (vehicle.motor.maxSpeedRadPerS * vehicle.wheelRadiusM) / vehicle.gearing.ratios[gear];
}

/** Motor torque (N·m) for a wheel force (N, negative: braking): the mesh loss is on the side the power comes from, the drag on top. */
export function motorTorqueNm(vehicle: Vehicle, gear: Gear, forceN: number, speedRadPerS: number): number {
  const { gearing, wheelRadiusM } = vehicle;
  const geared = (forceN * wheelRadiusM) / gearing.ratios[gear];
  const efficiency = gearing.efficiencies[gear];
  return (forceN >= 0 ? geared / efficiency : geared * efficiency) + dragTorqueNm(gearing, speedRadPerS);
}

/** Wheel force (N) of a pulling motor torque: the efficiency multiplies also where the drag is larger than the torque. */
export function wheelForceN(vehicle: Vehicle, gear: Gear, torqueNm: number, speedRadPerS: number): number {
  const { gearing, wheelRadiusM } = vehicle;
  return ((torqueNm - dragTorqueNm(gearing, speedRadPerS)) * gearing.ratios[gear] * gearing.efficiencies[gear]) / wheelRadiusM;
}
