/** Acceleration: closed forms, the time-stepping oracle, the laws it must obey, and what is not reached. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { solveAcceleration } from '../../../src/core/trials/acceleration.ts';
import { fullLoadCurve } from '../../../src/core/vehicle/full-load-curve.ts';
import { maxVehicleSpeedMPerS } from '../../../src/core/vehicle/gearing.ts';
import { slopeOf } from '../../../src/core/vehicle/road-load.ts';
import { shiftSpeedMPerS } from '../../../src/core/vehicle/shift.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { oracleDrive } from './pedal-oracle.ts';
import { freeVehicles, levelPeak, pedalConditions, pedalVehicles, plainVehicle, shares } from './pedal-vehicles.ts';

const relative = (found: number, wanted: number) => Math.abs(found - wanted) / wanted;
const notReached = { timeS: Number.NaN, distanceM: Number.NaN };

function level(vehicle: Vehicle, fromMPerS: number, toMPerS: number) {
  return solveAcceleration(vehicle, { ...levelPeak, fromMPerS, toMPerS });
}

describe('acceleration beside closed forms', () => {
  it('is the area tangent of speed under constant force, rolling resistance and drag, to 1e-9', () => {
    const arbitrary = fc.record({
      forceN: fc.integer({ min: 1000, max: 12_000 }),
      massKg: fc.integer({ min: 800, max: 4000 }),
      rollingN: fc.integer({ min: 50, max: 500 }),
      drag: fc.integer({ min: 100, max: 1500 }).map((k) => k / 1000),
      ends: fc.tuple(shares, shares).map(([a, b]) => [Math.min(a, b) * 0.98, Math.max(a, b) * 0.98 + 0.01]),
    });
    fc.assert(
      fc.property(arbitrary, ({ forceN, massKg, rollingN, drag, ends }) => {
        const terminal = Math.sqrt((forceN - rollingN) / drag);
        const [from, to] = ends.map((share) => share * terminal);
        const vehicle = plainVehicle({ forceN, massKg, resistanceN: rollingN, dragNS2PerM2: drag, fullForceToMPerS: 500, topMPerS: 500 });
        const time = (speed: number) => (massKg / Math.sqrt((forceN - rollingN) * drag)) * Math.atanh(speed / terminal);
        const distance = (speed: number) => -(massKg / (2 * drag)) * Math.log1p(-((speed / terminal) ** 2));
        const { timeS, distanceM } = level(vehicle, from, to);
        expect(relative(timeS, time(to) - time(from))).toBeLessThan(1e-9);
        expect(relative(distanceM, distance(to) - distance(from))).toBeLessThan(1e-9);
      }),
    );
  });

  it('keeps 1e-6 up to a thousand-millionth from the speed at which force and resistance balance', () => {
    const vehicle = plainVehicle({ forceN: 3000, massKg: 1500, resistanceN: 200, dragNS2PerM2: 0.7, fullForceToMPerS: 500, topMPerS: 500 });
    const terminal = Math.sqrt(2800 / 0.7);
    for (const share of [1e-3, 1e-6, 1e-9]) {
      // (F − R)/F is about twice the gap in speed.
      const to = terminal * (1 - share);
      const { timeS, distanceM } = level(vehicle, 0, to);
      const gap = 1 - (to / terminal) ** 2;
      expect(relative(timeS, (1500 / Math.sqrt(2800 * 0.7)) * Math.atanh(to / terminal))).toBeLessThan(1e-6);
      expect(relative(distanceM, -(1500 / 1.4) * Math.log(gap))).toBeLessThan(1e-6);
    }
  });
});

describe('acceleration beside time stepping', () => {
  it('agrees to 1e-8 for random vehicles with every limit, one ratio and two, and on what is not reached', () => {
    const cases = fc.sample(fc.record({ vehicle: pedalVehicles, conditions: pedalConditions, from: shares, share: shares }), { numRuns: 120, seed: 5 });
    let [reached, shifted, missed] = [0, 0, 0];
    for (const [k, { vehicle, conditions, from, share }] of cases.entries()) {
      const top = maxVehicleSpeedMPerS(vehicle, vehicle.gearing.ratioCount === 1 ? 0 : 1);
      const fromMPerS = k % 2 === 0 ? 0 : 0.4 * from * top;
      const toMPerS = fromMPerS + (top - fromMPerS) * (0.02 + 0.6 * share);
      const found = solveAcceleration(vehicle, { ...conditions, fromMPerS, toMPerS });
      const wanted = oracleDrive(vehicle, conditions, { timeS: 0, speedMPerS: fromMPerS, distanceM: 0 }, (now) => now.speedMPerS >= toMPerS);
      if (wanted === null) {
        missed++;
        expect(found, `vehicle ${k}`).toMatchObject(notReached);
        continue;
      }
      reached++;
      const shift = shiftSpeedMPerS(vehicle, conditions.rating, conditions.slope);
      if (shift > fromMPerS && shift < toMPerS) shifted++;
      expect(relative(found.timeS, wanted.timeS), `time of vehicle ${k}`).toBeLessThan(1e-8);
      expect(relative(found.distanceM, wanted.distanceM), `distance of vehicle ${k}`).toBeLessThan(1e-8);
    }
    expect([reached > 60, shifted > 10, missed > 5]).toMatchObject([true, true, true]);
  });
});

describe('laws of acceleration', () => {
  const cases = fc.record({ vehicle: freeVehicles, conditions: pedalConditions, from: shares, to: shares, more: shares });

  it('is never slower with more torque', () => {
    fc.assert(
      fc.property(cases, ({ vehicle, conditions, from, to, more }) => {
        const top = maxVehicleSpeedMPerS(vehicle, 0);
        const [fromMPerS, toMPerS] = [0.5 * from * top, top * (0.5 * from + 0.4 * to + 0.01)];
        const { motor } = vehicle;
        const peakTorqueNm = motor.peakTorqueNm * (1 + more);
        const stronger = { ...vehicle, motor: { ...motor, peakTorqueNm, peakPowerW: peakTorqueNm * motor.baseSpeedRadPerS } };
        const before = solveAcceleration(vehicle, { ...conditions, fromMPerS, toMPerS });
        const after = solveAcceleration(stronger, { ...conditions, fromMPerS, toMPerS });
        if (!Number.isNaN(before.timeS)) expect(after.timeS).toBeLessThanOrEqual(before.timeS * (1 + 1e-11));
      }),
    );
  });

  it('is never faster with more mass, on the level and uphill', () => {
    fc.assert(
      fc.property(cases, ({ vehicle, conditions, from, to, more }) => {
        const slope = slopeOf(Math.abs(conditions.slope.sin));
        const top = maxVehicleSpeedMPerS(vehicle, 0);
        const trial = { slope, rating: conditions.rating, fromMPerS: 0.5 * from * top, toMPerS: top * (0.5 * from + 0.4 * to + 0.01) };
        const { road } = vehicle;
        const heavier = {
          ...vehicle,
          movedMassKg: vehicle.movedMassKg * (1 + more),
          effectiveMassKg: vehicle.effectiveMassKg.map((mass) => mass * (1 + more)) as [number, number],
          road: {
            ...road,
            weightN: road.weightN * (1 + more),
            rollingN: road.rollingN * (1 + more),
            rollingPerSpeed2NS2PerM2: road.rollingPerSpeed2NS2PerM2 * (1 + more),
          },
        };
        const light = solveAcceleration(vehicle, trial);
        const heavy = solveAcceleration(heavier, trial);
        if (!Number.isNaN(heavy.timeS)) expect(light.timeS).toBeLessThanOrEqual(heavy.timeS * (1 + 1e-11));
      }),
    );
  });

  it('adds up when its range is cut in two', () => {
    fc.assert(
      fc.property(fc.record({ vehicle: pedalVehicles, conditions: pedalConditions, from: shares, cut: shares, to: shares }), (drawn) => {
        const vehicle = { ...drawn.vehicle, gearing: { ...drawn.vehicle.gearing, ratioCount: 1 as const } };
        const top = maxVehicleSpeedMPerS(vehicle, 0);
        const fromMPerS = 0.3 * drawn.from * top;
        const toMPerS = fromMPerS + top * (0.02 + 0.5 * drawn.to);
        const middle = fromMPerS + (toMPerS - fromMPerS) * (0.01 + 0.98 * drawn.cut);
        const run = (from: number, to: number) => solveAcceleration(vehicle, { ...drawn.conditions, fromMPerS: from, toMPerS: to });
        const [whole, first, second] = [run(fromMPerS, toMPerS), run(fromMPerS, middle), run(middle, toMPerS)];
        if (Number.isNaN(whole.timeS)) expect(first.timeS + second.timeS).toBeNaN();
        else {
          expect(relative(first.timeS + second.timeS, whole.timeS)).toBeLessThan(1e-9);
          expect(relative(first.distanceM + second.distanceM, whole.distanceM)).toBeLessThan(1e-9);
        }
      }),
    );
  });

  it('leaves the vehicle as it was', () => {
    const [vehicle] = fc.sample(pedalVehicles, { numRuns: 1, seed: 3 });
    const before = structuredClone(vehicle);
    level(vehicle, 0, 20);
    expect(vehicle).toMatchObject(before);
  });
});

describe('acceleration that is not reached', () => {
  it('is missing above maximum motor speed, but not at it', () => {
    const vehicle = plainVehicle({ topMPerS: 40 });
    expect(level(vehicle, 0, 40).timeS).toBeCloseTo((1500 * 40) / 4000, 10);
    expect(level(vehicle, 0, 40 * (1 + 1e-13)).timeS).toBeCloseTo((1500 * 40) / 4000, 10);
    expect(level(vehicle, 0, 40.001)).toMatchObject(notReached);
  });

  it('is missing where force equals resistance at either end', () => {
    const vehicle = plainVehicle({ forceN: 1000, resistanceN: 100, dragNS2PerM2: 1 });
    expect(level(vehicle, 0, 29.999).timeS).toBeGreaterThan(0);
    expect(level(vehicle, 0, 30)).toMatchObject(notReached);
    expect(level(plainVehicle({ forceN: 1000, resistanceN: 1000 }), 0, 10)).toMatchObject(notReached);
    expect(level(plainVehicle({ forceN: 1000, resistanceN: 1001 }), 0, 10)).toMatchObject(notReached);
  });

  it('is missing where a measured curve dips below resistance on the way, however narrowly', () => {
    const curve = (lowNm: number) => fullLoadCurve([10, 20, 30, 60], [2000, lowNm, 2000, 1000], 2000, 30);
    const vehicle = plainVehicle({ resistanceN: 500, topMPerS: 60 });
    const withLow = (lowNm: number) => ({
      ...vehicle,
      motor: { ...vehicle.motor, peakTorqueNm: 2000, baseSpeedRadPerS: 30, peakPowerW: 60_000, fullLoad: curve(lowNm) },
    });
    expect(level(withLow(501), 0, 40).timeS).toBeGreaterThan(0);
    expect(level(withLow(500), 0, 40)).toMatchObject(notReached);
    expect(level(withLow(499.999), 0, 40)).toMatchObject(notReached);
  });

  it('is missing where a coast-down with a negative linear part makes resistance pass force between its ends', () => {
    // Falling force (constant power) meets resistance that falls first: F − R dips inside a smooth stretch and recovers.
    const vehicle = plainVehicle({ forceN: 4000, fullForceToMPerS: 10, topMPerS: 60 });
    const dips = (rollingN: number) => ({ ...vehicle, road: { ...vehicle.road, rollingN, airLinearNSPerM: -60, airSquareNS2PerM2: 0.1 } });
    // The least of 40000/v + 60 v − 0.1 v², near v = 27.
    const least = Math.min(...Array.from({ length: 60_000 }, (_, k) => 10 + k / 1200).map((v) => 40_000 / v + 60 * v - 0.1 * v * v));
    expect(level(dips(least - 1e-3), 5, 59).timeS).toBeGreaterThan(0);
    expect(level(dips(least + 1e-3), 5, 59)).toMatchObject(notReached);
    expect(level(dips(least + 1e-3), 5, 20).timeS).toBeGreaterThan(0);
  });
});

describe('acceleration with two ratios', () => {
  /** Lower gear 8000 N to 20 m/s, then the end of its speed; higher gear 4000 N to 40 m/s. */
  const twoRatios = (change: Partial<Vehicle> = {}, shiftTimeS = 0.5): Vehicle => {
    const vehicle = plainVehicle({ forceN: 8000, fullForceToMPerS: 20, topMPerS: 20, massKg: 1600 });
    return { ...vehicle, gearing: { ...vehicle.gearing, ratioCount: 2, shiftTimeS }, effectiveMassKg: [2000, 1800], ...change };
  };

  it('takes the lower gear to the shift, coasts, and goes on in the higher gear with its own effective mass', () => {
    // Without resistance speed is kept while coasting: 20 m/s for half a second.
    const { timeS, distanceM } = level(twoRatios(), 10, 30);
    expect(timeS).toBeCloseTo((2000 * 10) / 8000 + 0.5 + (1800 * 10) / 4000, 10);
    expect(distanceM).toBeCloseTo((2000 * 10 * 15) / 8000 + 10 + (1800 * 10 * 25) / 4000, 9);
  });

  it('makes up for the speed lost while coasting', () => {
    const vehicle = twoRatios({ road: { ...twoRatios().road, rollingN: 1000 } });
    const lost = (1000 / 1800) * 0.5;
    const { timeS, distanceM } = level(vehicle, 10, 30);
    expect(timeS).toBeCloseTo((2000 * 10) / 7000 + 0.5 + (1800 * (10 + lost)) / 3000, 10);
    const coasted = 0.5 * (20 - lost / 2);
    expect(distanceM).toBeCloseTo((2000 * 10 * 15) / 7000 + coasted + (1800 * (900 - (20 - lost) ** 2)) / (2 * 3000), 9);
  });

  it('needs no shift up to the shift speed, nor from it on', () => {
    expect(level(twoRatios(), 10, 20).timeS).toBeCloseTo((2000 * 10) / 8000, 10);
    expect(level(twoRatios(), 20, 30).timeS).toBeCloseTo((1800 * 10) / 4000, 10);
    expect(level(twoRatios(), 25, 30).timeS).toBeCloseTo((1800 * 5) / 4000, 10);
  });

  it('is missing when the higher gear cannot pull, or the vehicle comes to rest while it shifts', () => {
    expect(level(twoRatios({ road: { ...twoRatios().road, rollingN: 4500 } }), 10, 30)).toMatchObject(notReached);
    expect(level(twoRatios({ road: { ...twoRatios().road, rollingN: 4500 } }), 10, 20).timeS).toBeGreaterThan(0);
    expect(level(twoRatios({ road: { ...twoRatios().road, rollingN: 3900 } }, 20), 10, 30)).toMatchObject(notReached);
  });

  it('ends within the coast when the road alone brings the speed', () => {
    // Downhill 900 N: 0.5 m/s² while coasting; 20.1 m/s after 0.2 s.
    const vehicle = twoRatios({ road: { ...twoRatios().road, rollingN: -900 } });
    const { timeS, distanceM } = level(vehicle, 10, 20.1);
    expect(timeS).toBeCloseTo((2000 * 10) / 8900 + 0.2, 10);
    expect(distanceM).toBeCloseTo((2000 * 10 * 15) / 8900 + 0.2 * 20.05, 9);
  });
});
