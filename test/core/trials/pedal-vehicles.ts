/** Vehicles for the full-pedal trials: plain ones whose force can be written down, and random ones of every sort. */
import fc from 'fast-check';
import type { PedalConditions } from '../../../src/core/trials/full-pedal.ts';
import { fullLoadCurve } from '../../../src/core/vehicle/full-load-curve.ts';
import { slopeOf } from '../../../src/core/vehicle/road-load.ts';
import type { Motor, RoadLoad, Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { mapOf, sampleAxles, sampleBattery, sampleGearing, sampleMotor, sampleRoad, sampleVehicle } from '../vehicle/sample-vehicle.ts';

/** On the level by peak torque. */
export const levelPeak: PedalConditions = { slope: slopeOf(0), rating: 'peak' };

export interface PlainFigures {
  /** Wheel force (N) up to `fullForceToMPerS`, then constant power up to `topMPerS`. */
  forceN: number;
  fullForceToMPerS: number;
  topMPerS: number;
  massKg: number;
  /** Constant and v² part of the resistance. */
  resistanceN: number;
  dragNS2PerM2: number;
}

/**
 * A vehicle without gearing, losses, battery limit or adhesion: motor torque and speed are wheel force and vehicle speed, and what is
 * accelerated is the mass alone.
 */
export function plainVehicle(figures: Partial<PlainFigures> = {}): Vehicle {
  const { forceN, fullForceToMPerS, topMPerS, massKg, resistanceN, dragNS2PerM2 } = {
    ...{ forceN: 4000, fullForceToMPerS: 100, topMPerS: 100, massKg: 1500, resistanceN: 0, dragNS2PerM2: 0 },
    ...figures,
  };
  return sampleVehicle({
    motor: sampleMotor({
      peakTorqueNm: forceN,
      baseSpeedRadPerS: fullForceToMPerS,
      constantPowerToRadPerS: topMPerS,
      maxSpeedRadPerS: topMPerS,
      standstillShare: 1,
    }),
    gearing: sampleGearing({ ratios: [1, 0.5], efficiencies: [1, 1], dragFixedNm: 0, dragPerSpeedNms: 0 }),
    battery: sampleBattery({ dischargeW: Number.POSITIVE_INFINITY, resistanceOhm: 0 }),
    axles: sampleAxles({ adhesion: Number.NaN }),
    road: plainRoad(massKg, resistanceN, dragNS2PerM2),
    wheelRadiusM: 1,
    carriedMassKg: massKg,
    movedMassKg: massKg,
    effectiveMassKg: [massKg, massKg],
  });
}

function plainRoad(massKg: number, rollingN: number, dragNS2PerM2: number): RoadLoad {
  return { ...sampleRoad(massKg, massKg), rollingN, rollingPerSpeed2NS2PerM2: 0, dragNS2PerM2, carriedRollingN: rollingN, carriedRollingPerSpeed2NS2PerM2: 0 };
}

/** Evenly spread: fast-check's own doubles crowd near zero, where vehicles have no losses and no wind. */
const between = (from: number, to: number) => fc.integer({ min: 0, max: 1_000_000 }).map((k) => from + ((to - from) * k) / 1e6);

const motors: fc.Arbitrary<Motor> = fc
  .record({
    torqueNm: between(80, 500),
    base: between(200, 600),
    top: between(1.3, 4),
    constantTo: between(0, 1),
    hysteresis: between(0, 0.004),
    eddyS: between(0, 5e-6),
    copperWPerNm: between(5, 60),
    acCopperS2: between(0, 1e-6),
    fieldWeakening: between(0, 0.6),
    inverterLinear: between(0, 0.02),
    continuousTorqueShare: between(0.3, 0.9),
    continuousPowerShare: between(0.3, 0.9),
  })
  .map(({ torqueNm, base, top, constantTo, continuousTorqueShare, continuousPowerShare, ...losses }) =>
    sampleMotor({
      peakTorqueNm: torqueNm,
      baseSpeedRadPerS: base,
      constantPowerToRadPerS: base * (1 + constantTo * (top - 1)),
      maxSpeedRadPerS: base * top,
      continuousTorqueShare,
      continuousPowerShare,
      losses: { ...sampleMotor().losses, ...losses },
    }),
  );

const bumps = fc.array(between(0.9, 1.1), { minLength: 36, maxLength: 36 });

/** The same with a measured loss map, uneven as measurements are. */
const mapMotors = fc.tuple(motors, bumps).map(([motor, uneven]) => {
  const axis = (to: number) => [0, 0.2, 0.4, 0.6, 0.8, 1.02].map((share) => share * to);
  let k = 0;
  const lossW = (speed: number, torque: number) => (100 + 1.2 * speed + 2e-3 * speed * speed + (30 * torque * torque) / motor.peakTorqueNm) * uneven[k++];
  const lossMap = mapOf(axis(motor.maxSpeedRadPerS), axis(motor.peakTorqueNm), lossW, {
    referencePeakTorqueNm: motor.peakTorqueNm,
    referenceBaseSpeedRadPerS: motor.baseSpeedRadPerS,
  });
  return { ...motor, lossMap };
});

/** The same with a measured full-load curve. */
const curveMotors = fc.tuple(motors, fc.array(between(0.9, 1), { minLength: 3, maxLength: 9 })).map(([motor, uneven]) => {
  const { baseSpeedRadPerS, maxSpeedRadPerS, peakTorqueNm } = motor;
  const speeds = uneven.map((_, k) => 0.3 * baseSpeedRadPerS + ((maxSpeedRadPerS - 0.3 * baseSpeedRadPerS) * k) / (uneven.length - 1));
  const torques = uneven.map((share, k) => share * peakTorqueNm * Math.min(1, baseSpeedRadPerS / speeds[k]));
  return { ...motor, fullLoad: fullLoadCurve(speeds, torques, peakTorqueNm, baseSpeedRadPerS) };
});

const drives = fc.record({
  dischargeShare: fc.oneof(fc.constant(Number.POSITIVE_INFINITY), between(0.3, 1.6)),
  resistanceOhm: fc.oneof(fc.constant(0), between(0.02, 0.2)),
  voltageV: between(250, 800),
  driven: fc.constantFrom('front' as const, 'rear' as const, 'all' as const),
  adhesion: fc.oneof(fc.constant(Number.NaN), between(0.2, 1.2)),
  frontShare: between(0.4, 0.6),
  massKg: between(900, 3000),
  trailerKg: fc.oneof(fc.constant(0), between(200, 1500)),
  ratioCount: fc.constantFrom(1 as const, 2 as const),
  ratio: between(5, 14),
  step: between(0.4, 0.9),
  shiftTimeS: fc.oneof(fc.constant(0), between(0.1, 2)),
  headWindMPerS: fc.oneof(fc.constant(0), between(-12, 8)),
  dragPerSpeedNms: between(0, 0.001),
});

/** Vehicles of every sort. */
export const pedalVehicles: fc.Arbitrary<Vehicle> = fc
  .record({ motor: fc.oneof(motors, mapMotors, curveMotors), drive: drives })
  .map(({ motor, drive }) => assemble(motor, drive));

/** Vehicles that nothing but motor and road limits, in one ratio. */
export const freeVehicles: fc.Arbitrary<Vehicle> = fc
  .record({ motor: fc.oneof(motors, curveMotors), drive: drives })
  .map(({ motor, drive }) => assemble(motor, { ...drive, dischargeShare: Number.POSITIVE_INFINITY, resistanceOhm: 0, adhesion: Number.NaN, ratioCount: 1 }));

type Drive = typeof drives extends fc.Arbitrary<infer D> ? D : never;

function assemble(motor: Motor, drive: Drive): Vehicle {
  const movedMassKg = drive.massKg + drive.trailerKg;
  return sampleVehicle({
    motor,
    gearing: sampleGearing({
      ratioCount: drive.ratioCount,
      ratios: [drive.ratio, drive.ratio * drive.step],
      shiftTimeS: drive.shiftTimeS,
      dragPerSpeedNms: drive.dragPerSpeedNms,
    }),
    battery: sampleBattery({ dischargeW: motor.peakPowerW * drive.dischargeShare, resistanceOhm: drive.resistanceOhm, voltageV: drive.voltageV }),
    axles: sampleAxles({ driven: drive.driven, adhesion: drive.adhesion, frontShare: drive.frontShare }),
    road: sampleRoad(movedMassKg, drive.massKg, drive.headWindMPerS),
    carriedMassKg: drive.massKg,
    movedMassKg,
    effectiveMassKg: [movedMassKg * 1.08, movedMassKg * 1.04],
  });
}

/** Slopes and ratings of a trial. */
export const pedalConditions: fc.Arbitrary<PedalConditions> = fc.record({
  slope: fc.oneof(fc.constant(0), between(-0.04, 0.12)).map(slopeOf),
  rating: fc.constantFrom('peak' as const, 'continuous' as const),
});

/** A share, evenly spread over 0 to 1. */
export const shares = between(0, 1);
