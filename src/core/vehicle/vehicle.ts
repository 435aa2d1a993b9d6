/**
 * One design as the laws of motion see it: the vehicle, its drive and its load, in SI. Plain records that the rooms
 * above fill in and the laws of this room read; a trial gets one with its own load and air.
 */
import type { FullLoadCurve } from './full-load-curve.ts';
import type { LossMap } from './loss-map.ts';

/** Coefficients of the loss law (see motor.ts); SI, the dimensionless ones as fractions. */
export interface LossCoefficients {
  hysteresis: number;
  eddyS: number;
  windageS2: number;
  copperWPerNm: number;
  acCopperS2: number;
  /** Field-weakening current as a share of peak current. */
  fieldWeakening: number;
  inverterFixed: number;
  inverterLinear: number;
  inverterSquare: number;
}

/** A traction motor with its inverter. NaN continuous shares: no continuous rating. */
export interface Motor {
  peakTorqueNm: number;
  baseSpeedRadPerS: number;
  /** Where constant power ends. */
  constantPowerToRadPerS: number;
  maxSpeedRadPerS: number;
  /** Always peak torque × base speed. */
  peakPowerW: number;
  continuousTorqueShare: number;
  continuousPowerShare: number;
  standstillShare: number;
  rotorInertiaKgM2: number;
  losses: LossCoefficients;
  /** Measured losses; null: the coefficients give them. */
  lossMap: LossMap | null;
  /** Measured torque limit; null: constant torque, constant power, then falling with the square of speed. */
  fullLoad: FullLoadCurve | null;
}

/** One or two ratios; gear 0 is the larger ratio (the lower gear). */
export interface Gearing {
  ratioCount: 1 | 2;
  ratios: [number, number];
  efficiencies: [number, number];
  shiftTimeS: number;
  /** Drag torque at the motor shaft: fixed + perSpeed × ω. */
  dragFixedNm: number;
  dragPerSpeedNms: number;
}

/** The traction battery at its terminals; Infinity where a limit is not stated. */
export interface Battery {
  voltageV: number;
  resistanceOhm: number;
  dischargeW: number;
  chargeW: number;
  /** NaN: not stated. */
  usableJ: number;
  /** NaN: not stated. */
  chargingEfficiency: number;
}

/** Which axle pulls, and what adhesion knows; NaN adhesion: grip is not looked at. */
export interface Axles {
  driven: 'front' | 'rear' | 'all';
  adhesion: number;
  /** Static share of the weight on the front axle. */
  frontShare: number;
  centreHeightM: number;
  wheelbaseM: number;
}

/** Share of the braking force that the motor may take, rising from 0 at `from` to the share at `full`. */
export interface Regeneration {
  share: number;
  fromMPerS: number;
  fullMPerS: number;
}

/** Road load of the whole train at its moved mass: see road-load.ts for the law. */
export interface RoadLoad {
  /** m·g·c0, or coast-down f0 scaled to the moved mass; on the level. */
  rollingN: number;
  /** m·g·c1. */
  rollingPerSpeed2NS2PerM2: number;
  /** Coast-down f1. */
  airLinearNSPerM: number;
  /** Coast-down f2 (still air). */
  airSquareNS2PerM2: number;
  /** ½ρ(CdA + trailer CdA), meets the head wind. */
  dragNS2PerM2: number;
  headWindMPerS: number;
  /** m·g. */
  weightN: number;
  /** Rolling resistance of the towing vehicle alone (carried mass), for the load transfer: constant and v² part. */
  carriedRollingN: number;
  carriedRollingPerSpeed2NS2PerM2: number;
}

/** One design on one trial. */
export interface Vehicle {
  motor: Motor;
  gearing: Gearing;
  battery: Battery;
  axles: Axles;
  regeneration: Regeneration;
  road: RoadLoad;
  wheelRadiusM: number;
  auxiliariesW: number;
  /** On the vehicle's own axles: vehicle and payload. */
  carriedMassKg: number;
  /** Carried mass and trailer. */
  movedMassKg: number;
  /** Mass factor × moved mass, per gear. */
  effectiveMassKg: [number, number];
}
