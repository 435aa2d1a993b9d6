/** Hill start: the grade found leaves the acceleration asked for. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { solveHillStart } from '../../../src/core/trials/hill-start.ts';
import { resistanceN, slopeOf } from '../../../src/core/vehicle/road-load.ts';
import { tractiveForceN } from '../../../src/core/vehicle/traction.ts';
import { pedalVehicles, plainVehicle, shares } from './pedal-vehicles.ts';

const ratings = fc.constantFrom('peak' as const, 'continuous' as const);

describe('hill start', () => {
  it('leaves the acceleration asked for on the grade found: F = R + m_e a', () => {
    const accelerations = shares.map((share) => 2 * share);
    fc.assert(
      fc.property(pedalVehicles, accelerations, ratings, (vehicle, startAccelerationMPerS2, rating) => {
        const { grade, limit } = solveHillStart(vehicle, { startAccelerationMPerS2, rating });
        const standing = rating === 'peak' ? ('standstill' as const) : ('standstill continuous' as const);
        const reserveN = vehicle.effectiveMassKg[0] * startAccelerationMPerS2;
        const slope = slopeOf(grade);
        const net = tractiveForceN(vehicle, 0, 0, standing, slope) - resistanceN(vehicle.road, 0, slope);
        if (limit === 'beyond 45°') {
          expect(grade).toBe(1);
          expect(net).toBeGreaterThan(reserveN);
        } else expect(Math.abs(net - reserveN)).toBeLessThan(1e-11 * vehicle.road.weightN);
      }),
      { numRuns: 500 },
    );
  });

  it('is never steeper than adhesion holds, however strong the drive', () => {
    fc.assert(
      fc.property(pedalVehicles, shares, (vehicle, share) => {
        const axles = { ...vehicle.axles, adhesion: 0.2 + 0.7 * share };
        const road = { ...vehicle.road, headWindMPerS: 0 };
        const strong = {
          ...vehicle,
          axles,
          road,
          motor: { ...vehicle.motor, peakTorqueNm: 1e6, peakPowerW: 1e6 * vehicle.motor.baseSpeedRadPerS, fullLoad: null },
        };
        const unlimited = { ...strong, battery: { ...vehicle.battery, dischargeW: Number.POSITIVE_INFINITY, resistanceOhm: 0 } };
        const { grade, limit } = solveHillStart(unlimited, { startAccelerationMPerS2: 0, rating: 'peak' });
        expect(limit).toBe('adhesion');
        // No more than the whole weight grips: tan α ≤ μ.
        expect(grade).toBeLessThan(axles.adhesion);
      }),
    );
  });

  it('gives at most the standstill share of peak torque', () => {
    const vehicle = plainVehicle({ forceN: 4000, massKg: 1500 });
    const gradeOf = (forceN: number) => Math.tan(Math.asin(forceN / (1500 * 9.80665)));
    const start = (standstillShare: number) =>
      solveHillStart({ ...vehicle, motor: { ...vehicle.motor, standstillShare } }, { startAccelerationMPerS2: 0, rating: 'peak' });
    expect(start(1).grade).toBeCloseTo(gradeOf(4000), 12);
    expect(start(0.8).grade).toBeCloseTo(gradeOf(3200), 12);
    expect(start(0.8).limit).toBe('motor torque');
    const continuous = solveHillStart(vehicle, { startAccelerationMPerS2: 0, rating: 'continuous' });
    expect(continuous.grade).toBeCloseTo(gradeOf(4000 * vehicle.motor.continuousTorqueShare), 12);
  });

  it('counts a head wind against the start and a tail wind for it', () => {
    const vehicle = plainVehicle({ forceN: 4000, massKg: 1500, dragNS2PerM2: 1 });
    const start = (headWindMPerS: number) =>
      solveHillStart({ ...vehicle, road: { ...vehicle.road, headWindMPerS } }, { startAccelerationMPerS2: 0, rating: 'peak' }).grade;
    const gradeOf = (forceN: number) => Math.tan(Math.asin(forceN / (1500 * 9.80665)));
    expect(start(15)).toBeCloseTo(gradeOf(4000 - 225), 12);
    expect(start(-15)).toBeCloseTo(gradeOf(4000 + 225), 12);
  });

  it('is capped at 45°, and says so', () => {
    const vehicle = plainVehicle({ forceN: 1500 * 9.80665 * 0.72, massKg: 1500 });
    expect(solveHillStart(vehicle, { startAccelerationMPerS2: 0, rating: 'peak' })).toMatchObject({ grade: 1, limit: 'beyond 45°' });
    const stronger = plainVehicle({ forceN: 1500 * 9.80665 * 2, massKg: 1500 });
    expect(solveHillStart(stronger, { startAccelerationMPerS2: 0, rating: 'peak' })).toMatchObject({ grade: 1, limit: 'beyond 45°' });
    const weaker = plainVehicle({ forceN: 1500 * 9.80665 * 0.7, massKg: 1500 });
    expect(solveHillStart(weaker, { startAccelerationMPerS2: 0, rating: 'peak' }).grade).toBeCloseTo(Math.tan(Math.asin(0.7)), 12);
  });
});
