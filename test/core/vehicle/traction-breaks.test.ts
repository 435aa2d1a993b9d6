/** Break speeds: where they must be, and that nothing bends between them. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { signChange } from '../../../src/core/numerics/roots.ts';
import { maxVehicleSpeedMPerS } from '../../../src/core/vehicle/gearing.ts';
import { resistanceN, slopeOf } from '../../../src/core/vehicle/road-load.ts';
import { tractiveForceN } from '../../../src/core/vehicle/traction.ts';
import { type DrivingRating, tractionBreakSpeeds } from '../../../src/core/vehicle/traction-breaks.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { gaussLegendre } from './plain-quadrature.ts';
import { mapOf, sampleAxles, sampleBattery, sampleMotor, sampleRoad, sampleVehicle, vehicles } from './sample-vehicle.ts';

const flat = slopeOf(0);
const gears = fc.constantFrom(0 as const, 1 as const);
const ratings = fc.constantFrom<DrivingRating>('peak', 'continuous');
const unlimited = sampleBattery({ resistanceOhm: 0, dischargeW: Infinity });
const noGrip = sampleAxles({ adhesion: Number.NaN });
const free = sampleVehicle({ battery: unlimited, axles: noGrip });
const speedAt = (motorSpeed: number) => (motorSpeed * 0.333) / 9.5;

function expectSpeeds(found: number[], wanted: number[]): void {
  expect(found).toHaveLength(wanted.length);
  found.forEach((speed, k) => {
    expect(speed).toBeCloseTo(wanted[k], 9);
  });
}

describe('tractionBreakSpeeds', () => {
  it('finds the ends of the branches inside the range asked for, and no others', () => {
    expectSpeeds(tractionBreakSpeeds(free, 0, 'peak', flat, 0, 60), [speedAt(450), speedAt(1200), speedAt(1360)]);
    expectSpeeds(tractionBreakSpeeds(free, 0, 'peak', flat, 20, 45), [speedAt(1200)]);
    expectSpeeds(tractionBreakSpeeds(free, 0, 'peak', flat, 0, speedAt(1200)), [speedAt(450)]);
  });

  it('finds the continuous corner, and where the peak limit cuts in', () => {
    const corner = (450 * 0.58) / 0.52;
    // 0.58 P/ω passes P ω_k/ω² at ω_k / 0.58, beyond maximum speed: the peak limit never cuts in.
    expectSpeeds(tractionBreakSpeeds(free, 0, 'continuous', flat, 0, 40), [speedAt(corner)]);
    const strong = sampleVehicle({ battery: unlimited, axles: noGrip, motor: sampleMotor({ continuousTorqueShare: 0.8, continuousPowerShare: 0.95 }) });
    const wanted = [(450 * 0.95) / 0.8, 1200 / 0.95, 1360].map(speedAt);
    expectSpeeds(tractionBreakSpeeds(strong, 0, 'continuous', flat, 0, 60), wanted);
  });

  it('finds where the battery starts and stops to bind along constant power', () => {
    // Iron and windage losses rise, winding losses fall along constant power: the electrical power is least between the two crossings.
    const losses = { ...sampleMotor().losses, windageS2: 4e-8, fieldWeakening: 0 };
    const motor = sampleMotor({ losses, constantPowerToRadPerS: 1360 });
    const vehicle = sampleVehicle({ motor, axles: noGrip, battery: sampleBattery({ resistanceOhm: 0, dischargeW: 137_000 }) });
    const found = tractionBreakSpeeds(vehicle, 0, 'peak', flat, 0, 47);
    expect(found).toHaveLength(4);
    const [starts, , stops, startsAgain] = found;
    expect(starts).toBeLessThan(speedAt(450));
    expect(found[1]).toBeCloseTo(speedAt(450), 9);
    expect(stops).toBeGreaterThan(speedAt(450));
    expect(startsAgain).toBeGreaterThan(stops);
  });

  it('finds where adhesion stops to bind', () => {
    const vehicle = sampleVehicle({ battery: unlimited, axles: sampleAxles({ adhesion: 0.4 }) });
    const found = tractionBreakSpeeds(vehicle, 0, 'peak', flat, 0, 30);
    expect(found).toHaveLength(2);
    const wider = tractiveForceN({ ...vehicle, axles: noGrip }, 0, found[1], 'peak', flat);
    expect(tractiveForceN(vehicle, 0, found[1], 'peak', flat)).toBeCloseTo(wider, 6);
  });

  it('finds it also where adhesion holds back only a little', () => {
    // Front drive: 0.9 of the force of full torque, of which drag takes 0.3 %.
    const fullN = (270 * 9.5 * 0.97) / 0.333;
    const perAdhesion = (share: number) => tractiveForceN({ ...free, axles: sampleAxles({ adhesion: share }) }, 0, 0, 'peak', flat);
    const adhesion = signChange((share) => perAdhesion(share) - 0.9 * fullN, 0.2, 0.9);
    expect(tractionBreakSpeeds({ ...free, axles: sampleAxles({ adhesion }) }, 0, 'peak', flat, 0, 30)).toHaveLength(2);
  });

  it('finds the speed at which a tail wind and the vehicle are level', () => {
    expect(tractionBreakSpeeds({ ...free, road: sampleRoad(2800, 2800, -12) }, 0, 'peak', flat, 0, 14)).toEqual([12]);
  });

  it('leaves out the grid lines of a loss map while the battery does not bind', () => {
    const lossMap = mapOf([0, 200, 400, 600, 800, 1000, 1400], [0, 90, 180, 280], (speed, torque) => 200 + speed + 20 * torque);
    const motor = sampleMotor({ lossMap });
    const strong = sampleVehicle({ motor, axles: noGrip, battery: sampleBattery({ resistanceOhm: 0, dischargeW: 400_000 }) });
    expectSpeeds(tractionBreakSpeeds(strong, 0, 'peak', flat, 0, 60), [speedAt(450), speedAt(1200), speedAt(1360)]);
    const weak = sampleVehicle({ motor, axles: noGrip, battery: sampleBattery({ resistanceOhm: 0, dischargeW: 62_000 }) });
    const found = tractionBreakSpeeds(weak, 0, 'peak', flat, 0, 46);
    for (const line of [400, 600, 800, 1000]) expect(found.some((speed) => Math.abs(speed - speedAt(line)) < 1e-9)).toBe(true);
    expect(found.some((speed) => Math.abs(speed - speedAt(200)) < 1e-9)).toBe(false);
  });

  it('rises strictly inside the range and depends on no more than the range', () => {
    fc.assert(
      fc.property(vehicles, gears, ratings, fc.double({ min: 0, max: 1, noNaN: true }), (vehicle, gear, rating, part) => {
        const end = maxVehicleSpeedMPerS(vehicle, gear);
        const found = tractionBreakSpeeds(vehicle, gear, rating, flat, part * end, end);
        const inOrder = [part * end, ...found, end];
        for (let k = 1; k < inOrder.length; k++) if (part < 1) expect(inOrder[k]).toBeGreaterThan(inOrder[k - 1]);
      }),
    );
  });

  it('bends the force at a break but never makes it jump, up to maximum motor speed', () => {
    fc.assert(
      fc.property(vehicles, gears, ratings, (vehicle, gear, rating) => {
        // Rough maps may have two torques that use the battery up, and then the lowest may jump.
        fc.pre(vehicle.motor.lossMap === null);
        const end = maxVehicleSpeedMPerS(vehicle, gear);
        const forceN = (v: number) => tractiveForceN(vehicle, gear, v, rating, flat);
        for (const v of tractionBreakSpeeds(vehicle, gear, rating, flat, 0, end)) {
          expect(Math.abs(forceN(v * (1 + 1e-9)) - forceN(v * (1 - 1e-9)))).toBeLessThan(1e-7 * Math.abs(forceN(0)) + 1e-4);
        }
      }),
    );
  });

  it('leaves force and resistance so smooth between them that 32 Gauss points integrate them to 1e-10', () => {
    const rule = gaussLegendre(32);
    const worst = (vehicle: Vehicle, gear: 0 | 1, rating: DrivingRating, grade: number) => {
      const slope = slopeOf(grade);
      const end = maxVehicleSpeedMPerS(vehicle, gear);
      const spareN = (v: number) => tractiveForceN(vehicle, gear, v, rating, slope) - resistanceN(vehicle.road, v, slope);
      const points = [0, ...tractionBreakSpeeds(vehicle, gear, rating, slope, 0, end), end];
      const scale = end * Math.abs(tractiveForceN(vehicle, gear, 0, rating, slope));
      return Math.max(...points.slice(1).map((to, k) => roughness(spareN, points[k], to, rule) / scale));
    };
    fc.assert(
      fc.property(vehicles, gears, ratings, fc.double({ min: -0.1, max: 0.2, noNaN: true }), (vehicle, gear, rating, grade) => {
        expect(worst(vehicle, gear, rating, grade)).toBeLessThan(1e-10);
      }),
      { numRuns: 150 },
    );
  });
});

/** How far one rule over [from, to] is from sixteen rules over its sixteenths. */
function roughness(f: (x: number) => number, from: number, to: number, rule: ReturnType<typeof gaussLegendre>): number {
  const part = (to - from) / 16;
  let fine = 0;
  for (let k = 0; k < 16; k++) fine += rule(f, from + k * part, from + (k + 1) * part);
  return Math.abs(rule(f, from, to) - fine);
}
