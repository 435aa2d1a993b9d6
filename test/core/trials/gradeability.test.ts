/** Gradeability: the grade found is the grade held. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { solveGradeability } from '../../../src/core/trials/gradeability.ts';
import { maxVehicleSpeedMPerS } from '../../../src/core/vehicle/gearing.ts';
import { resistanceN, slopeOf } from '../../../src/core/vehicle/road-load.ts';
import { type Rating, tractiveForceN } from '../../../src/core/vehicle/traction.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { pedalVehicles, plainVehicle, shares } from './pedal-vehicles.ts';

const ratings = fc.constantFrom('peak' as const, 'continuous' as const);

/** F − R on a grade (N). */
function netN(vehicle: Vehicle, gear: 0 | 1, speed: number, rating: Rating, grade: number): number {
  const slope = slopeOf(grade);
  return tractiveForceN(vehicle, gear, speed, rating, slope) - resistanceN(vehicle.road, speed, slope);
}

describe('gradeability', () => {
  it('leaves the vehicle as it was', () => {
    const [vehicle] = fc.sample(pedalVehicles, { numRuns: 1, seed: 4 });
    const before = structuredClone(vehicle);
    solveGradeability(vehicle, { speedMPerS: 5, rating: 'peak' });
    expect(vehicle).toMatchObject(before);
  });

  it('holds its speed on the grade found and on none steeper, whatever limits', () => {
    const seen = new Set<string>();
    fc.assert(
      fc.property(pedalVehicles, shares, ratings, (vehicle, share, rating) => {
        const gears = vehicle.gearing.ratioCount === 1 ? ([0] as const) : ([0, 1] as const);
        const speedMPerS = 0.01 + share * maxVehicleSpeedMPerS(vehicle, gears[gears.length - 1]) * 0.99;
        const { grade, limit } = solveGradeability(vehicle, { speedMPerS, rating });
        seen.add(limit);
        const usable = gears.filter((gear) => speedMPerS <= maxVehicleSpeedMPerS(vehicle, gear));
        const net = (at: number) => Math.max(...usable.map((gear) => netN(vehicle, gear, speedMPerS, rating, at)));
        const weightN = vehicle.road.weightN;
        if (limit === 'beyond 45°') {
          expect(grade).toBe(1);
          expect(net(1)).toBeGreaterThan(0);
          return;
        }
        if (Number.isNaN(grade)) {
          // Air drag beyond the weight: not even a fall would hold the speed.
          for (const steep of [-1e6, -10, -1, 0, 1]) expect(net(steep)).toBeLessThan(0);
          return;
        }
        expect(grade).toBeLessThanOrEqual(1);
        expect(Math.abs(net(grade))).toBeLessThan(1e-11 * weightN);
        expect(net(grade + 1e-6)).toBeLessThan(0);
        expect(net(grade - 1e-6)).toBeGreaterThan(0);
      }),
      { numRuns: 1000 },
    );
    expect([...seen].sort()).toMatchObject(['adhesion', 'battery power', 'beyond 45°', 'motor power', 'motor torque']);
  });

  it('is missing above maximum motor speed, with that for a reason', () => {
    const vehicle = plainVehicle({ topMPerS: 40 });
    expect(solveGradeability(vehicle, { speedMPerS: 40.001, rating: 'peak' })).toMatchObject({ grade: Number.NaN, limit: 'motor speed' });
    expect(solveGradeability(vehicle, { speedMPerS: 40, rating: 'peak' }).grade).toBeGreaterThan(0);
    const two: Vehicle = { ...vehicle, gearing: { ...vehicle.gearing, ratioCount: 2 } };
    expect(solveGradeability(two, { speedMPerS: 80, rating: 'peak' }).grade).toBeGreaterThan(0);
    expect(solveGradeability(two, { speedMPerS: 80.001, rating: 'peak' })).toMatchObject({ grade: Number.NaN, limit: 'motor speed' });
  });

  it('is negative where the vehicle holds the speed only downhill', () => {
    const { grade, limit } = solveGradeability(plainVehicle({ forceN: 1000, massKg: 1500, dragNS2PerM2: 1 }), { speedMPerS: 40, rating: 'peak' });
    expect(grade).toBeCloseTo(Math.tan(Math.asin(-600 / (1500 * 9.80665))), 12);
    expect(limit).toBe('motor torque');
  });

  it('is missing where no slope at all would hold the speed', () => {
    const vehicle = plainVehicle({ forceN: 1000, massKg: 1000, dragNS2PerM2: 20 });
    expect(solveGradeability(vehicle, { speedMPerS: 30, rating: 'peak' })).toMatchObject({ grade: Number.NaN, limit: 'motor torque' });
  });

  it('takes the ratio that climbs more', () => {
    // 8000 N to 10 m/s, then 80 kW to 20 m/s; the higher gear 4000 N to 20 m/s, then 80 kW to 40 m/s.
    const vehicle = plainVehicle({ forceN: 8000, fullForceToMPerS: 10, topMPerS: 20, massKg: 2000 });
    const two: Vehicle = { ...vehicle, gearing: { ...vehicle.gearing, ratioCount: 2 } };
    const gradeOf = (forceN: number) => Math.tan(Math.asin(forceN / (2000 * 9.80665)));
    expect(solveGradeability(two, { speedMPerS: 5, rating: 'peak' }).grade).toBeCloseTo(gradeOf(8000), 12);
    expect(solveGradeability(two, { speedMPerS: 25, rating: 'peak' }).grade).toBeCloseTo(gradeOf(3200), 12);
    const lossy: Vehicle = { ...two, gearing: { ...two.gearing, efficiencies: [0.8, 1] } };
    expect(solveGradeability(lossy, { speedMPerS: 20, rating: 'peak' }).grade).toBeCloseTo(gradeOf(4000), 12);
  });
});
