/** Top speed: where force and resistance cross first, and what limits there. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { PedalConditions } from '../../../src/core/trials/full-pedal.ts';
import { solveTopSpeed } from '../../../src/core/trials/top-speed.ts';
import { fullLoadCurve } from '../../../src/core/vehicle/full-load-curve.ts';
import { maxVehicleSpeedMPerS } from '../../../src/core/vehicle/gearing.ts';
import { resistanceN, slopeOf } from '../../../src/core/vehicle/road-load.ts';
import { tractiveForceN } from '../../../src/core/vehicle/traction.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { freeVehicles, levelPeak, pedalConditions, pedalVehicles, plainVehicle, shares } from './pedal-vehicles.ts';

/** F − R in the better ratio at a speed. */
function bestNetN(vehicle: Vehicle, { slope, rating }: PedalConditions, speed: number): number {
  const gears = vehicle.gearing.ratioCount === 1 ? ([0] as const) : ([0, 1] as const);
  const usable = gears.filter((gear) => speed <= maxVehicleSpeedMPerS(vehicle, gear) * (1 + 1e-12));
  return Math.max(...usable.map((gear) => tractiveForceN(vehicle, gear, speed, rating, slope))) - resistanceN(vehicle.road, speed, slope);
}

describe('top speed', () => {
  it('is where drag and rolling resistance take the whole force', () => {
    const vehicle = plainVehicle({ forceN: 1000, resistanceN: 100, dragNS2PerM2: 0.5 });
    const { speedMPerS, limit } = solveTopSpeed(vehicle, levelPeak);
    expect(Math.abs(speedMPerS - Math.sqrt(900 / 0.5))).toBeLessThan(1e-12 * speedMPerS);
    expect(limit).toBe('motor torque');
  });

  it('is the speed of maximum motor speed where force is left over there', () => {
    expect(solveTopSpeed(plainVehicle({ topMPerS: 40 }), levelPeak)).toMatchObject({ speedMPerS: 40, limit: 'motor speed' });
  });

  it('is zero, with what holds it down, when the vehicle cannot start', () => {
    expect(solveTopSpeed(plainVehicle({ forceN: 1000, resistanceN: 1001 }), levelPeak)).toMatchObject({ speedMPerS: 0, limit: 'motor torque' });
    expect(solveTopSpeed(plainVehicle({ forceN: 1000, resistanceN: 1000 }), levelPeak)).toMatchObject({ speedMPerS: 0, limit: 'motor torque' });
    const slippery = { ...plainVehicle({ resistanceN: 200 }), axles: { ...plainVehicle().axles, driven: 'all' as const, adhesion: 0.01 } };
    expect(solveTopSpeed(slippery, levelPeak)).toMatchObject({ speedMPerS: 0, limit: 'adhesion' });
  });

  it('is the first crossing where a curve lets force exceed resistance again', () => {
    const vehicle = plainVehicle({ resistanceN: 500, topMPerS: 60 });
    const fullLoad = fullLoadCurve([10, 20, 30, 60], [2000, 400, 2000, 1000], 2000, 30);
    const { speedMPerS } = solveTopSpeed(
      { ...vehicle, motor: { ...vehicle.motor, peakTorqueNm: 2000, baseSpeedRadPerS: 30, peakPowerW: 60_000, fullLoad } },
      levelPeak,
    );
    // 2000 − 160 (v − 10) = 500.
    expect(speedMPerS).toBeCloseTo(19.375, 11);
  });

  it('is the first crossing where a coast-down falls first and force recovers within a smooth stretch', () => {
    const vehicle = plainVehicle({ forceN: 4000, fullForceToMPerS: 10, topMPerS: 60 });
    const road = { ...vehicle.road, rollingN: 3029, airLinearNSPerM: -60, airSquareNS2PerM2: 0.1 };
    const { speedMPerS } = solveTopSpeed({ ...vehicle, road }, levelPeak);
    // 40000/v + 60 v − 0.1 v² dips just below 3029 near v = 26.9 and rises again.
    expect(40_000 / speedMPerS + 60 * speedMPerS - 0.1 * speedMPerS ** 2).toBeCloseTo(3029, 8);
    expect(speedMPerS).toBeGreaterThan(25);
    expect(speedMPerS).toBeLessThan(26.9);
  });

  it('is where a walk in small steps finds F − R to turn for the first time, for vehicles of every sort', () => {
    fc.assert(
      fc.property(pedalVehicles, pedalConditions, (vehicle, conditions) => {
        const net = (speed: number) => bestNetN(vehicle, conditions, speed);
        const { speedMPerS, limit } = solveTopSpeed(vehicle, conditions);
        if (!(net(0) > 0)) {
          expect(speedMPerS).toBe(0);
          return;
        }
        const walk = Array.from({ length: 399 }, (_, k) => net((speedMPerS * (k + 1)) / 400));
        expect(Math.min(...walk)).toBeGreaterThan(0);
        expect(net(speedMPerS * (1 - 1e-9))).toBeGreaterThan(0);
        if (limit === 'motor speed') {
          const ends = [0, 1].map((gear) => maxVehicleSpeedMPerS(vehicle, gear as 0 | 1));
          expect(ends.slice(0, vehicle.gearing.ratioCount)).toContain(speedMPerS);
        } else expect(net(speedMPerS * (1 + 1e-9))).toBeLessThanOrEqual(0);
      }),
      { numRuns: 300 },
    );
  });

  it('takes the better ratio at each speed', () => {
    // 8000 N to 20 m/s in the lower gear, 4000 N to 40 m/s in the higher.
    const one = plainVehicle({ forceN: 8000, fullForceToMPerS: 20, topMPerS: 20, dragNS2PerM2: 4 });
    const two: Vehicle = { ...one, gearing: { ...one.gearing, ratioCount: 2 } };
    expect(solveTopSpeed(two, levelPeak).speedMPerS).toBeCloseTo(Math.sqrt(1000), 11);
    const dragged = (dragNS2PerM2: number) => ({ ...two, road: { ...two.road, dragNS2PerM2 } });
    expect(solveTopSpeed(dragged(1), levelPeak)).toMatchObject({ speedMPerS: 40, limit: 'motor speed' });
    // The higher gear does not hold the speed at which the lower one ends.
    expect(solveTopSpeed(dragged(12), levelPeak)).toMatchObject({ speedMPerS: 20, limit: 'motor speed' });
    expect(solveTopSpeed(dragged(32), levelPeak).speedMPerS).toBeCloseTo(Math.sqrt(250), 11);
  });

  it('is never lower with more torque, and never higher on a steeper slope', () => {
    fc.assert(
      fc.property(fc.record({ vehicle: freeVehicles, conditions: pedalConditions, more: shares }), ({ vehicle, conditions, more }) => {
        const { motor } = vehicle;
        const { speedMPerS } = solveTopSpeed(vehicle, conditions);
        const peakTorqueNm = motor.peakTorqueNm * (1 + more);
        const stronger = { ...vehicle, motor: { ...motor, peakTorqueNm, peakPowerW: peakTorqueNm * motor.baseSpeedRadPerS } };
        expect(solveTopSpeed(stronger, conditions).speedMPerS).toBeGreaterThanOrEqual(speedMPerS * (1 - 1e-12));
        const steeper = slopeOf(conditions.slope.sin / conditions.slope.cos + 0.1 * more);
        expect(solveTopSpeed(vehicle, { ...conditions, slope: steeper }).speedMPerS).toBeLessThanOrEqual(speedMPerS * (1 + 1e-12));
      }),
    );
  });
});
