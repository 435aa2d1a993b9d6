/** An invented parcel van, and random drives around it, for the tests of this room. */
import fc from 'fast-check';
import { fullLoadCurve } from '../../../src/core/vehicle/full-load-curve.ts';
import type { LossMap } from '../../../src/core/vehicle/loss-map.ts';
import { roadLoadFromCoefficients } from '../../../src/core/vehicle/road-load.ts';
import type { Axles, Battery, Gearing, Motor, RoadLoad, Vehicle } from '../../../src/core/vehicle/vehicle.ts';

export function sampleMotor(change: Partial<Motor> = {}): Motor {
  const motor: Motor = {
    peakTorqueNm: 270,
    baseSpeedRadPerS: 450,
    constantPowerToRadPerS: 1200,
    maxSpeedRadPerS: 1360,
    peakPowerW: Number.NaN,
    continuousTorqueShare: 0.52,
    continuousPowerShare: 0.58,
    standstillShare: 0.9,
    rotorInertiaKgM2: 0.04,
    losses: {
      hysteresis: 1.2e-3,
      eddyS: 8e-7,
      windageS2: 2e-10,
      copperWPerNm: 42,
      acCopperS2: 1e-6,
      fieldWeakening: 0.2,
      inverterFixed: 0.0014,
      inverterLinear: 0.018,
      inverterSquare: 0.01,
    },
    lossMap: null,
    fullLoad: null,
    ...change,
  };
  return { ...motor, peakPowerW: motor.peakTorqueNm * motor.baseSpeedRadPerS };
}

export function sampleGearing(change: Partial<Gearing> = {}): Gearing {
  return { ratioCount: 1, ratios: [9.5, 5.8], efficiencies: [0.97, 0.975], shiftTimeS: 0.25, dragFixedNm: 0.4, dragPerSpeedNms: 0.0006, ...change };
}

export function sampleBattery(change: Partial<Battery> = {}): Battery {
  return { voltageV: 390, resistanceOhm: 0.09, dischargeW: 110_000, chargeW: 90_000, usableJ: 58 * 3.6e6, chargingEfficiency: 0.89, ...change };
}

export function sampleAxles(change: Partial<Axles> = {}): Axles {
  return { driven: 'front', adhesion: 0.85, frontShare: 0.57, centreHeightM: 0.71, wheelbaseM: 3.06, ...change };
}

export function sampleRoad(movedMassKg: number, carriedMassKg: number, headWindMPerS = 0): RoadLoad {
  return roadLoadFromCoefficients({
    movedMassKg,
    carriedMassKg,
    rollingC0: 0.0098,
    rollingC1S2PerM2: 2.1e-6,
    dragAreaM2: 1.12,
    trailerDragAreaM2: 0,
    airDensityKgPerM3: 1.2,
    headWindMPerS,
  });
}

export function sampleVehicle(change: Partial<Vehicle> = {}): Vehicle {
  return {
    motor: sampleMotor(),
    gearing: sampleGearing(),
    battery: sampleBattery(),
    axles: sampleAxles(),
    regeneration: { share: 0.7, fromMPerS: 5 / 3.6, fullMPerS: 15 / 3.6 },
    road: sampleRoad(2800, 2800),
    wheelRadiusM: 0.333,
    auxiliariesW: 420,
    carriedMassKg: 2800,
    movedMassKg: 2800,
    effectiveMassKg: [2900, 2850],
    ...change,
  };
}

/** A map with every loss a known function of speed (rad/s) and torque (N·m). */
export function mapOf(speeds: number[], torques: number[], lossW: (speed: number, torque: number) => number, change: Partial<LossMap> = {}): LossMap {
  return {
    speedsRadPerS: speeds,
    torquesNm: torques,
    lossesW: speeds.flatMap((speed) => torques.map((torque) => lossW(speed, torque))),
    motoringOnly: torques[0] >= 0,
    motorAlone: false,
    referencePeakTorqueNm: 270,
    referenceBaseSpeedRadPerS: 450,
    ...change,
  };
}

/** Evenly spread: fc.double draws bit patterns, most of them next to nothing. */
const share = (from: number, to: number) => fc.integer({ min: 0, max: 1_000_000 }).map((k) => from + ((to - from) * k) / 1_000_000);

/** Motors whose losses come from coefficients. */
export const coefficientMotors: fc.Arbitrary<Motor> = fc
  .record({
    torque: share(80, 600),
    base: share(200, 600),
    top: share(1.2, 4),
    constantTo: share(0, 1),
    losses: fc.record({
      hysteresis: share(0, 0.004),
      eddyS: share(0, 5e-6),
      windageS2: share(0, 2e-9),
      copperWPerNm: share(5, 60),
      acCopperS2: fc.oneof(fc.constant(0), share(0, 1e-6)),
      fieldWeakening: fc.oneof(fc.constant(0), share(0, 0.6)),
      inverterFixed: share(0, 0.002),
      inverterLinear: fc.oneof(fc.constant(0), share(0, 0.02)),
      inverterSquare: share(0, 0.01),
    }),
    continuousTorqueShare: share(0.3, 1),
    continuousPowerShare: share(0.3, 1),
  })
  .map(({ torque, base, top, constantTo, ...rest }) =>
    sampleMotor({
      peakTorqueNm: torque,
      baseSpeedRadPerS: base,
      maxSpeedRadPerS: base * top,
      constantPowerToRadPerS: base * (1 + constantTo * (top - 1)),
      ...rest,
    }),
  );

/** The same motors with a rough measured map, of the motor alone or with its inverter. */
export const mapMotors: fc.Arbitrary<Motor> = fc
  .record({
    motor: coefficientMotors,
    speeds: fc.integer({ min: 3, max: 8 }),
    torques: fc.integer({ min: 3, max: 8 }),
    roughness: fc.array(share(0.9, 1.1), { minLength: 64, maxLength: 64 }),
    motorAlone: fc.boolean(),
    scales: fc.tuple(share(0.8, 1.2), share(0.8, 1.2)),
  })
  .map(({ motor, speeds, torques, roughness, motorAlone, scales }) => {
    const axis = (to: number, points: number) => Array.from({ length: points }, (_, k) => (to * k) / (points - 1));
    let k = 0;
    const rough = (speed: number, torque: number) => (100 + 1.2 * speed + 2e-3 * speed * speed + (30 * torque * torque) / motor.peakTorqueNm) * roughness[k++];
    const lossMap = mapOf(axis(motor.maxSpeedRadPerS * 1.02, speeds), axis(motor.peakTorqueNm * 1.02, torques), rough, {
      motorAlone,
      referencePeakTorqueNm: motor.peakTorqueNm * scales[0],
      referenceBaseSpeedRadPerS: motor.baseSpeedRadPerS * scales[1],
    });
    return { ...motor, lossMap };
  });

/** Motors with a measured full-load curve instead of branches. */
export const curveMotors: fc.Arbitrary<Motor> = fc.tuple(coefficientMotors, fc.array(share(0.92, 1), { minLength: 3, maxLength: 10 })).map(([motor, dents]) => {
  const { baseSpeedRadPerS, maxSpeedRadPerS, peakTorqueNm } = motor;
  const speeds = dents.map((_, k) => 0.3 * baseSpeedRadPerS + ((maxSpeedRadPerS - 0.3 * baseSpeedRadPerS) * k) / (dents.length - 1));
  const fullLoad = fullLoadCurve(
    speeds,
    dents.map((dent, k) => dent * peakTorqueNm * Math.min(1, baseSpeedRadPerS / speeds[k])),
    peakTorqueNm,
    baseSpeedRadPerS,
  );
  return { ...motor, fullLoad };
});

/** Whole vehicles of every sort: any motor, either drive, with and without adhesion, battery resistance and wind. */
export const vehicles: fc.Arbitrary<Vehicle> = fc
  .record({
    motor: fc.oneof(coefficientMotors, mapMotors, curveMotors),
    dischargeShare: share(0.3, 1.6),
    resistanceOhm: fc.oneof(fc.constant(0), share(0.02, 0.2)),
    voltageV: share(250, 800),
    driven: fc.constantFrom('front' as const, 'rear' as const, 'all' as const),
    adhesion: fc.oneof(fc.constant(Number.NaN), share(0.2, 1.2)),
    frontShare: share(0.4, 0.6),
    massKg: share(900, 3000),
    ratio: share(5, 14),
    step: share(0.4, 0.9),
    efficiencies: fc.tuple(share(0.9, 0.99), share(0.9, 0.99)),
    headWindMPerS: share(-15, 5),
    dragPerSpeedNms: fc.oneof(fc.constant(0), share(0, 0.001)),
    auxiliariesW: share(0, 2000),
  })
  .map((drawn) =>
    sampleVehicle({
      motor: drawn.motor,
      gearing: sampleGearing({
        ratioCount: 2,
        ratios: [drawn.ratio, drawn.ratio * drawn.step],
        efficiencies: drawn.efficiencies,
        dragPerSpeedNms: drawn.dragPerSpeedNms,
      }),
      battery: sampleBattery({
        dischargeW: drawn.motor.peakPowerW * drawn.dischargeShare,
        resistanceOhm: drawn.resistanceOhm,
        voltageV: drawn.voltageV,
      }),
      axles: sampleAxles({ driven: drawn.driven, adhesion: drawn.adhesion, frontShare: drawn.frontShare }),
      road: sampleRoad(drawn.massKg, drawn.massKg, drawn.headWindMPerS),
      carriedMassKg: drawn.massKg,
      movedMassKg: drawn.massKg,
      effectiveMassKg: [drawn.massKg * 1.08, drawn.massKg * 1.04],
      auxiliariesW: drawn.auxiliariesW,
    }),
  );
