/** A distance from rest: closed forms, the time-stepping oracle, steady speeds, and shifts. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { solveAcceleration } from '../../../src/core/trials/acceleration.ts';
import { solveStandingDistance } from '../../../src/core/trials/standing-distance.ts';
import { solveTopSpeed } from '../../../src/core/trials/top-speed.ts';
import { slopeOf } from '../../../src/core/vehicle/road-load.ts';
import { shiftSpeedMPerS } from '../../../src/core/vehicle/shift.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { oracleDrive } from './pedal-oracle.ts';
import { freeVehicles, levelPeak, pedalConditions, pedalVehicles, plainVehicle, shares } from './pedal-vehicles.ts';

const relative = (found: number, wanted: number) => Math.abs(found - wanted) / wanted;
const notCovered = { timeS: Number.NaN, endSpeedMPerS: Number.NaN };

function level(vehicle: Vehicle, distanceM: number) {
  return solveStandingDistance(vehicle, { ...levelPeak, distanceM });
}

describe('standing distance beside closed forms', () => {
  it('is the square root law under constant force', () => {
    const { timeS, endSpeedMPerS } = level(plainVehicle({ forceN: 3000, massKg: 1500, topMPerS: 200, fullForceToMPerS: 200 }), 400);
    expect(relative(timeS, Math.sqrt(400))).toBeLessThan(1e-11);
    expect(relative(endSpeedMPerS, 2 * Math.sqrt(400))).toBeLessThan(1e-11);
  });

  it('follows the approach to terminal speed: v² = v_t² (1 − exp(−2 k x / m)), whatever the distance', () => {
    const terminal = 40;
    const drag = 1500 / terminal ** 2;
    const vehicle = plainVehicle({ forceN: 1500, massKg: 1200, dragNS2PerM2: drag, topMPerS: 200, fullForceToMPerS: 200 });
    for (const distanceM of [1, 50, 400, 1000, 5000, 12_000, 20_000, 100_000]) {
      const speed = terminal * Math.sqrt(-Math.expm1((-2 * drag * distanceM) / 1200));
      const { timeS, endSpeedMPerS } = level(vehicle, distanceM);
      expect(relative(endSpeedMPerS, speed), `end speed after ${distanceM} m`).toBeLessThan(1e-9);
      // t = (m / (k v_t)) arcosh(exp(k x / m)); far out the exponential overflows and its logarithm remains.
      const exponent = (drag * distanceM) / 1200;
      const time = (1200 / (drag * terminal)) * (exponent < 300 ? Math.acosh(Math.exp(exponent)) : exponent + Math.LN2);
      expect(relative(timeS, time), `time over ${distanceM} m`).toBeLessThan(1e-9);
    }
  });

  it('holds the speed of maximum motor speed', () => {
    // 2 m/s² to 30 m/s in 225 m, then on at that speed.
    const vehicle = plainVehicle({ forceN: 3000, massKg: 1500, fullForceToMPerS: 30, topMPerS: 30 });
    expect(level(vehicle, 225).timeS).toBeCloseTo(15, 9);
    const { timeS, endSpeedMPerS } = level(vehicle, 1000);
    expect(endSpeedMPerS).toBe(30);
    expect(timeS).toBeCloseTo(15 + 775 / 30, 9);
  });
});

describe('standing distance beside time stepping', () => {
  it('agrees to 1e-8 for random vehicles with every limit, one ratio and two', () => {
    const cases = fc.sample(fc.record({ vehicle: pedalVehicles, conditions: pedalConditions, share: shares }), { numRuns: 120, seed: 6 });
    let [covered, shifted, steady, missed] = [0, 0, 0, 0];
    for (const [k, { vehicle, conditions, share }] of cases.entries()) {
      const distanceM = 20 + 1500 * share;
      const found = solveStandingDistance(vehicle, { ...conditions, distanceM });
      const wanted = oracleDrive(vehicle, conditions, { timeS: 0, speedMPerS: 0, distanceM: 0 }, (now) => now.distanceM >= distanceM);
      if (wanted === null) {
        missed++;
        expect(found, `vehicle ${k}`).toMatchObject(notCovered);
        continue;
      }
      covered++;
      if (found.endSpeedMPerS > shiftSpeedMPerS(vehicle, conditions.rating, conditions.slope)) shifted++;
      if (relative(found.endSpeedMPerS, solveTopSpeed(vehicle, conditions).speedMPerS) < 1e-6) steady++;
      expect(relative(found.timeS, wanted.timeS), `time of vehicle ${k}`).toBeLessThan(1e-8);
      expect(relative(found.endSpeedMPerS, wanted.speedMPerS), `end speed of vehicle ${k}`).toBeLessThan(1e-8);
    }
    expect([covered > 80, shifted > 10, steady > 5, missed > 1]).toMatchObject([true, true, true, true]);
  });
});

describe('laws of standing distance', () => {
  it('ends an acceleration to its end speed with that very time and distance', () => {
    fc.assert(
      fc.property(fc.record({ vehicle: pedalVehicles, conditions: pedalConditions, share: shares }), ({ vehicle, conditions, share }) => {
        const distanceM = 10 + 1000 * share;
        const { timeS, endSpeedMPerS } = solveStandingDistance(vehicle, { ...conditions, distanceM });
        const shift = shiftSpeedMPerS(vehicle, conditions.rating, conditions.slope);
        const top = solveTopSpeed(vehicle, conditions).speedMPerS;
        // Away from steady speeds, where speed says nothing of time, and from shifts, after which a speed may be passed again.
        const reachedM = solveAcceleration(vehicle, { ...conditions, fromMPerS: 0, toMPerS: 0.99 * Math.min(shift, top) }).distanceM;
        fc.pre(endSpeedMPerS < 0.99 * top && (distanceM < reachedM || endSpeedMPerS > 1.01 * shift));
        const run = solveAcceleration(vehicle, { ...conditions, fromMPerS: 0, toMPerS: endSpeedMPerS });
        expect(relative(run.timeS, timeS)).toBeLessThan(1e-8);
        expect(relative(run.distanceM, distanceM)).toBeLessThan(1e-8);
      }),
    );
  });

  it('takes longer over a longer distance, and is never slower with more torque', () => {
    fc.assert(
      fc.property(fc.record({ vehicle: freeVehicles, conditions: pedalConditions, share: shares, more: shares }), (drawn) => {
        const { vehicle, conditions, share, more } = drawn;
        const distanceM = 10 + 1000 * share;
        const time = (of: Vehicle, over: number) => solveStandingDistance(of, { ...conditions, distanceM: over }).timeS;
        const seconds = time(vehicle, distanceM);
        fc.pre(!Number.isNaN(seconds));
        expect(time(vehicle, distanceM * (1.001 + more))).toBeGreaterThan(seconds);
        const peakTorqueNm = vehicle.motor.peakTorqueNm * (1 + more);
        const stronger = { ...vehicle, motor: { ...vehicle.motor, peakTorqueNm, peakPowerW: peakTorqueNm * vehicle.motor.baseSpeedRadPerS } };
        expect(time(stronger, distanceM)).toBeLessThanOrEqual(seconds * (1 + 1e-9));
      }),
    );
  });
});

describe('standing distance in the end', () => {
  it('is not covered by a vehicle that cannot start', () => {
    expect(level(plainVehicle({ forceN: 1000, resistanceN: 1001 }), 100)).toMatchObject(notCovered);
    expect(level(plainVehicle({ forceN: 1000, resistanceN: 1000 }), 100)).toMatchObject(notCovered);
    expect(level(plainVehicle({ forceN: 1000, resistanceN: 999.99 }), 100).timeS).toBeGreaterThan(0);
  });

  it('is covered at a crawl on the steepest slope that the vehicle starts on', () => {
    const vehicle = plainVehicle({ forceN: 4000, massKg: 1500, fullForceToMPerS: 2, topMPerS: 40 });
    const slope = slopeOf(0.27);
    const crawl = solveTopSpeed(vehicle, { slope, rating: 'peak' }).speedMPerS;
    const { timeS, endSpeedMPerS } = solveStandingDistance(vehicle, { slope, rating: 'peak', distanceM: 1000 });
    expect(relative(endSpeedMPerS, crawl)).toBeLessThan(1e-9);
    expect(timeS).toBeGreaterThan(1000 / crawl);
    expect(timeS).toBeLessThan(1000 / crawl + 20);
  });

  /** Lower gear 8000 N to 20 m/s, then the end of its speed; higher gear 4000 N to 40 m/s. */
  const twoRatios = (rollingN: number, shiftTimeS = 0.5): Vehicle => {
    const vehicle = plainVehicle({ forceN: 8000, fullForceToMPerS: 20, topMPerS: 20, massKg: 1600, resistanceN: rollingN });
    return { ...vehicle, gearing: { ...vehicle.gearing, ratioCount: 2, shiftTimeS }, effectiveMassKg: [2000, 1800] };
  };

  it('may end before, within and after the coast of a shift', () => {
    // 4 m/s²: 20 m/s after 5 s and 50 m; half a second at 20 m/s; then 4000/1800 m/s².
    expect(level(twoRatios(0), 32).timeS).toBeCloseTo(4, 9);
    const within = level(twoRatios(0), 54);
    expect(within.timeS).toBeCloseTo(5.2, 9);
    expect(within.endSpeedMPerS).toBeCloseTo(20, 9);
    const after = level(twoRatios(0), 60 + 42);
    const gain = 4000 / 1800;
    const rest = (-20 + Math.sqrt(400 + 2 * gain * 42)) / gain;
    expect(after.timeS).toBeCloseTo(5.5 + rest, 9);
    expect(after.endSpeedMPerS).toBeCloseTo(20 + gain * rest, 9);
  });

  it('slows down to rest, or to a steady speed, after a shift to a gear that cannot hold the speed', () => {
    expect(level(twoRatios(4500), 20).timeS).toBeGreaterThan(0);
    expect(level(twoRatios(4500), 2000)).toMatchObject(notCovered);
    // Drag alone: the lower gear reaches 20 m/s with 8000 N, the higher holds 4000 N = k v².
    const vehicle = twoRatios(0);
    const dragged = { ...vehicle, road: { ...vehicle.road, dragNS2PerM2: 12 } };
    const { timeS, endSpeedMPerS } = level(dragged, 5000);
    expect(relative(endSpeedMPerS, Math.sqrt(4000 / 12))).toBeLessThan(1e-9);
    const wanted = oracleDrive(dragged, levelPeak, { timeS: 0, speedMPerS: 0, distanceM: 0 }, (now) => now.distanceM >= 5000);
    expect(relative(timeS, wanted?.timeS ?? Number.NaN)).toBeLessThan(1e-9);
    const early = oracleDrive(dragged, levelPeak, { timeS: 0, speedMPerS: 0, distanceM: 0 }, (now) => now.distanceM >= 160);
    expect(relative(level(dragged, 160).endSpeedMPerS, early?.speedMPerS ?? Number.NaN)).toBeLessThan(1e-9);
  });

  it('settles at the first balance that a falling speed meets', () => {
    // Higher gear 4000 N against 4500 − 200 v + 9 v²: balance at 2.87 and at 19.35 m/s.
    const vehicle = twoRatios(4500, 0);
    const road = { ...vehicle.road, airLinearNSPerM: -200, airSquareNS2PerM2: 9 };
    const { endSpeedMPerS } = level({ ...vehicle, road }, 5000);
    expect(relative(endSpeedMPerS, (200 + Math.sqrt(200 ** 2 - 4 * 9 * 500)) / 18)).toBeLessThan(1e-9);
  });

  it('is not covered when the vehicle comes to rest while it shifts', () => {
    expect(level(twoRatios(3900, 20), 1000)).toMatchObject(notCovered);
  });
});
