/** Full-pedal trials against figures from outside: a published car, a published conversion, statics and road exercises, integrals. */
import { describe, expect, it } from 'vitest';
import { solveAcceleration } from '../../../src/core/trials/acceleration.ts';
import { solveGradeability } from '../../../src/core/trials/gradeability.ts';
import { solveHillStart } from '../../../src/core/trials/hill-start.ts';
import { solveStandingDistance } from '../../../src/core/trials/standing-distance.ts';
import { solveTopSpeed } from '../../../src/core/trials/top-speed.ts';
import { roadLoadFromCoefficients } from '../../../src/core/vehicle/road-load.ts';
import type { Axles, Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { compare } from '../../reference-table.ts';
import { levelPeak, plainVehicle } from './pedal-vehicles.ts';

const MPH = 0.44704;
const FOOT_M = 0.3048;
const POUND_FORCE_N = 4.4482216152605;
const accelerate = (vehicle: Vehicle, toMPerS: number, fromMPerS = 0) => solveAcceleration(vehicle, { ...levelPeak, fromMPerS, toMPerS });

describe('an electric two-seater of the 1990s', () => {
  // J. Larminie, J. Lowry, Electric Vehicle Technology Explained, Wiley 2003, ch. 7: model of the GM EV1. Equations and times read in a
  // student report built on it (Ozarkar, Wayne State University, 2015); the book's own values from memory.
  const source = 'Larminie & Lowry 2003, ch. 7 (times read in a report on it, values from memory)';
  const built = (effectiveMassKg: number): Vehicle => {
    const movedMassKg = effectiveMassKg - 20;
    const base = plainVehicle({ forceN: 140, fullForceToMPerS: 733, topMPerS: 1500 });
    const road = roadLoadFromCoefficients({
      movedMassKg,
      carriedMassKg: movedMassKg,
      rollingC0: 0.0048,
      rollingC1S2PerM2: 0,
      dragAreaM2: 0.19 * 1.8,
      trailerDragAreaM2: 0,
      airDensityKgPerM3: 1.25,
      headWindMPerS: 0,
    });
    return {
      ...base,
      road,
      gearing: { ...base.gearing, ratios: [11, 11], efficiencies: [0.95, 0.95] },
      wheelRadiusM: 11 / 37,
      carriedMassKg: movedMassKg,
      movedMassKg,
      effectiveMassKg: [effectiveMassKg, effectiveMassKg],
    };
  };

  it('reaches 60 mph from rest in the published times, from its physical figures', () => {
    for (const [effectiveMassKg, published] of [
      [1560, 9.1],
      [1326, 7.8],
      [1794, 10.5],
    ]) {
      const { timeS } = accelerate(built(effectiveMassKg), 60 * MPH);
      compare({ check: `EV1 at ${effectiveMassKg} kg effective, 0-60 mph, s`, source, expected: published, got: timeS, within: 0.02 });
    }
  });

  it('reaches 60 mph in 9.15 s by the rounded equations', () => {
    // dv/dt = 3.11 − 0.000137 v² up to 19.8 m/s, then 62.1/v − 0.046 − 0.000137 v².
    const forceN = 1560 * (3.11 + 0.046);
    const rounded = plainVehicle({
      forceN,
      fullForceToMPerS: (1560 * 62.1) / forceN,
      topMPerS: 50,
      massKg: 1560,
      resistanceN: 1560 * 0.046,
      dragNS2PerM2: 1560 * 0.000137,
    });
    const { timeS } = accelerate(rounded, 60 * MPH);
    compare({ check: 'EV1 by rounded equations, 0-60 mph, s', source: 'the same equations, recomputed elsewhere', expected: 9.15, got: timeS, within: 0.005 });
  });
});

describe('an electric conversion at constant force', () => {
  // Constant-force model on siliconproductions.com/car/ElectricConversion (read): end speed 80.67 ft/s, initial acceleration
  // 32.174 (336/(2635 · 0.958) − 0.0075) ft/s².
  const source = 'siliconproductions.com/car/ElectricConversion (read)';
  const massKg = 1000;
  const initial = 32.174 * (336 / (2635 * 0.958) - 0.0075) * FOOT_M;
  const terminal = 80.67 * FOOT_M;
  const vehicle = plainVehicle({ massKg, forceN: massKg * initial, dragNS2PerM2: (massKg * initial) / terminal ** 2 });

  it('takes the published times to 30 and 50 mph', () => {
    for (const [speed, expected] of [
      [30, 12.218],
      [50, 30.397],
    ]) {
      compare({ check: `conversion, 0-${speed} mph, s`, source, expected, got: accelerate(vehicle, speed * MPH).timeS, within: 5e-4 });
    }
  });

  it('covers the quarter mile as published', () => {
    const { timeS, endSpeedMPerS } = solveStandingDistance(vehicle, { ...levelPeak, distanceM: 1320 * FOOT_M });
    compare({ check: 'conversion, quarter mile, s', source, expected: 29.155, got: timeS, within: 5e-4 });
    compare({ check: 'conversion, speed at the quarter mile, mph', source, expected: 49.37, got: endSpeedMPerS / MPH, within: 5e-4 });
  });
});

describe('a grade limited by traction', () => {
  // Statics exercise, physicsforums thread 339714 (read): centre of gravity 0.875 m behind the front axle and 0.475 m high, wheelbase
  // 2.675 m, μ 0.5, no rolling resistance.
  const vehicle = plainVehicle({ forceN: 1e6 });

  it.each([
    ['rear', 10.18],
    ['front', 17.17],
    ['all', 26.57],
  ] as const)('with %s drive is %d°', (driven, expected) => {
    const axles: Axles = { driven, adhesion: 0.5, frontShare: 1 - 0.875 / 2.675, centreHeightM: 0.475, wheelbaseM: 2.675 };
    const { grade, limit } = solveHillStart({ ...vehicle, axles }, { startAccelerationMPerS2: 0, rating: 'peak' });
    expect(limit).toBe('adhesion');
    const source = 'statics exercise, physicsforums.com thread 339714 (read)';
    const degrees = (Math.atan(grade) * 180) / Math.PI;
    // Printed to a hundredth of a degree.
    compare({ check: `hill start held by adhesion, ${driven} drive, °`, source, expected, got: degrees, within: 0.006 / expected });
  });
});

describe('a grade at speed', () => {
  // Type of F. Mannering, S. Washburn, Principles of Highway Engineering and Traffic Analysis, ch. 2 (read in a copy): 2000 lb, Cd 0.40,
  // 20 ft², 0.002045 slug/ft³, 70 mph, tractive effort 255 lb, rolling coefficient 0.01 (1 + V/147): 6.74 % by small angle, 6.756 % exactly.
  const weightN = 2000 * POUND_FORCE_N;
  const speedFtPerS = (70 * 5280) / 3600;
  const dragN = 0.5 * 0.002045 * 0.4 * 20 * speedFtPerS ** 2 * POUND_FORCE_N;
  const rollingN = 0.01 * (1 + speedFtPerS / 147) * weightN;
  const speedMPerS = 70 * MPH;

  const source = 'type of Mannering & Washburn, ch. 2 (read in a copy)';

  it('has the drag and rolling resistance of the book, and its grade', () => {
    compare({ check: 'road exercise, drag, lb', source, expected: 86.22, got: dragN / POUND_FORCE_N, within: 1e-4 });
    compare({ check: 'road exercise, rolling resistance, lb', source, expected: 33.97, got: rollingN / POUND_FORCE_N, within: 2e-4 });
    // The book takes rolling resistance of the full weight, as on the level: here it goes with the drag, which does not know the slope.
    const vehicle = plainVehicle({ massKg: weightN / 9.80665, forceN: 255 * POUND_FORCE_N, dragNS2PerM2: (dragN + rollingN) / speedMPerS ** 2 });
    const { grade } = solveGradeability(vehicle, { speedMPerS, rating: 'peak' });
    compare({ check: 'road exercise, grade held at 70 mph, %', source, expected: 6.756, got: 100 * grade, within: 1e-4 });
  });
});

describe('integrals that can be written down', () => {
  /** To the digits given. */
  const integral = (check: string, expected: number, got: number) =>
    compare({ check, source: 'elementary integration, to the digits given', expected, got, within: 1e-7 });

  it('falls towards 40 m/s: 30 m/s after 3.967197 s and 67.41517 m', () => {
    const vehicle = plainVehicle({ massKg: 1000, forceN: 9810, dragNS2PerM2: 9810 / 1600 });
    const { timeS, distanceM } = accelerate(vehicle, 30);
    integral('free fall towards 40 m/s, to 30 m/s, s', 3.967197, timeS);
    integral('free fall towards 40 m/s, to 30 m/s, m', 67.41517, distanceM);
  });

  /** Constant power from next to standstill. */
  const byPower = (powerW: number, massKg: number, resistanceN = 0) =>
    plainVehicle({ massKg, resistanceN, forceN: powerW / 1e-3, fullForceToMPerS: 1e-3, topMPerS: 60 });

  it('takes 5.787037 s and 107.16735 m to 100 km/h with 100 kW and 1500 kg', () => {
    const { timeS, distanceM } = accelerate(byPower(100_000, 1500), 100 / 3.6);
    integral('100 kW, 1500 kg, 0-100 km/h, s', 5.787037, timeS);
    integral('100 kW, 1500 kg, 0-100 km/h, m', 107.16735, distanceM);
  });

  it('takes 10.493827 s and 158.32190 m to 100 km/h with 4800 N, then 80 kW, and 1600 kg', () => {
    const { timeS, distanceM } = accelerate(plainVehicle({ massKg: 1600, forceN: 4800, fullForceToMPerS: 80_000 / 4800, topMPerS: 60 }), 100 / 3.6);
    integral('4800 N then 80 kW, 1600 kg, 0-100 km/h, s', 10.493827, timeS);
    integral('4800 N then 80 kW, 1600 kg, 0-100 km/h, m', 158.3219, distanceM);
  });

  it('takes 11.606985 s and 176.83252 m to 30 m/s with 4000 N against 0.4 v² and 1500 kg', () => {
    const { timeS, distanceM } = accelerate(plainVehicle({ massKg: 1500, forceN: 4000, dragNS2PerM2: 0.4 }), 30);
    integral('4000 N against 0.4 v², 1500 kg, 0-30 m/s, s', 11.606985, timeS);
    integral('4000 N against 0.4 v², 1500 kg, 0-30 m/s, m', 176.83252, distanceM);
  });

  it('takes 8.092977 s to 100 km/h with 80 kW against 200 N and 1600 kg', () => {
    integral('80 kW against 200 N, 1600 kg, 0-100 km/h, s', 8.092977, accelerate(byPower(80_000, 1600, 200), 100 / 3.6).timeS);
  });

  it('starts on 40.2158 % with 6000 N, 1600 kg and a rolling coefficient of 0.01', () => {
    const vehicle = plainVehicle({ massKg: 1600, forceN: 6000, resistanceN: 0.01 * 1600 * 9.80665 });
    const { grade } = solveHillStart(vehicle, { startAccelerationMPerS2: 0, rating: 'peak' });
    compare({
      check: 'hill start, 6000 N, 1600 kg, c0 0.01, %',
      source: 'plain statics, to the digits given',
      expected: 40.2158,
      got: 100 * grade,
      within: 1.3e-6,
    });
  });

  it('tops out at 50.98936 m/s with 60 kW, 0.66 m², 1.2 kg/m³, c0 0.01, 1500 kg and g 9.81', () => {
    const vehicle = plainVehicle({
      massKg: 1500,
      forceN: 6000,
      fullForceToMPerS: 10,
      topMPerS: 80,
      resistanceN: 0.01 * 1500 * 9.81,
      dragNS2PerM2: 0.5 * 1.2 * 0.66,
    });
    const { speedMPerS } = solveTopSpeed(vehicle, levelPeak);
    compare({
      check: 'top speed, 60 kW, 1500 kg, m/s',
      source: 'cubic solved elsewhere, to the digits given',
      expected: 50.98936,
      got: speedMPerS,
      within: 1.1e-7,
    });
  });
});
