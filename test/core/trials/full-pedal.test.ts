/** The pieces that full-pedal trials share: the quick net force, a change of speed between breaks, the coast of a shift. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { afterShift } from '../../../src/core/trials/coasting.ts';
import { afterSpeedChange, isBeyondMotorSpeed, pullInGear } from '../../../src/core/trials/full-pedal.ts';
import { fullLoadCurve } from '../../../src/core/vehicle/full-load-curve.ts';
import { maxVehicleSpeedMPerS } from '../../../src/core/vehicle/gearing.ts';
import { resistanceN, slopeOf } from '../../../src/core/vehicle/road-load.ts';
import { tractiveForceN } from '../../../src/core/vehicle/traction.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { levelPeak, pedalConditions, pedalVehicles, plainVehicle, shares } from './pedal-vehicles.ts';

const start = { speedMPerS: 20, timeS: 3, distanceM: 50 };
const never = () => -1;

describe('net force at full pedal', () => {
  it('has the bits of tractive force less resistance, with battery and adhesion asked or not', () => {
    const gears = fc.constantFrom(0 as const, 1 as const);
    fc.assert(
      fc.property(pedalVehicles, pedalConditions, gears, fc.array(shares, { minLength: 20, maxLength: 20 }), (vehicle, conditions, gear, places) => {
        const pull = pullInGear(vehicle, gear, conditions);
        for (const speed of [0, ...places.map((share) => share * pull.topMPerS), pull.topMPerS]) {
          const slow = tractiveForceN(vehicle, gear, speed, conditions.rating, conditions.slope) - resistanceN(vehicle.road, speed, conditions.slope);
          expect(pull.netForceN(speed)).toBe(slow);
        }
      }),
      { numRuns: 300 },
    );
  });

  it('asks the battery about a curve that rises above its stated peak torque', () => {
    const vehicle = plainVehicle({ forceN: 2000, fullForceToMPerS: 30, topMPerS: 60 });
    const motor = { ...vehicle.motor, fullLoad: fullLoadCurve([10, 20, 60], [2000, 5000, 1000], 2000, 30) };
    // Copper loss 30 W per N·m of peak torque, times the square of the torque share: 375 kW at 5000 N·m.
    const losses = { ...motor.losses, copperWPerNm: 30, acCopperS2: 0 };
    const limited = { ...vehicle, motor: { ...motor, losses }, battery: { ...vehicle.battery, dischargeW: 200_000 } };
    const pull = pullInGear(limited, 0, levelPeak);
    for (const speed of [5, 15, 20, 25, 40]) expect(pull.netForceN(speed)).toBe(tractiveForceN(limited, 0, speed, 'peak', levelPeak.slope));
    expect(pull.netForceN(20)).toBeLessThan(4900);
  });

  it('ends at maximum motor speed, with room for the rounding of a speed that is meant to be it', () => {
    const vehicle = plainVehicle({ topMPerS: 33.3 });
    expect(isBeyondMotorSpeed(vehicle, 0, maxVehicleSpeedMPerS(vehicle, 0))).toBe(false);
    expect(isBeyondMotorSpeed(vehicle, 0, 33.3 * (1 + 5e-13))).toBe(false);
    expect(isBeyondMotorSpeed(vehicle, 0, 33.3 * (1 + 5e-12))).toBe(true);
  });
});

describe('afterSpeedChange', () => {
  const pull = pullInGear(plainVehicle({ forceN: 3000, massKg: 1500 }), 0, levelPeak);

  it('adds to where the motion was', () => {
    expect(afterSpeedChange(pull, start, 30)).toEqual({ speedMPerS: 30, timeS: 8, distanceM: 175 });
    expect(afterSpeedChange(pull, start, 20)).toEqual(start);
  });

  it('goes back in time when told that speed rises', () => {
    expect(afterSpeedChange(pull, start, 18, true)).toEqual({ speedMPerS: 18, timeS: 2, distanceM: 31 });
  });

  it('says at which speed it found net force against the change', () => {
    const { speedMPerS, timeS, distanceM } = afterSpeedChange(pull, start, 10);
    expect([timeS, distanceM]).toEqual([Number.NaN, Number.NaN]);
    expect(speedMPerS).toBeGreaterThan(10);
    expect(speedMPerS).toBeLessThan(20);
  });

  it('follows a falling speed against a negative net force', () => {
    const braked = pullInGear(plainVehicle({ forceN: 1000, resistanceN: 4000, massKg: 1500 }), 0, levelPeak);
    expect(afterSpeedChange(braked, start, 10)).toEqual({ speedMPerS: 10, timeS: 8, distanceM: 125 });
  });
});

describe('the coast of a shift', () => {
  const shifting = (shiftTimeS: number, vehicle = plainVehicle()): Vehicle => ({
    ...vehicle,
    gearing: { ...vehicle.gearing, ratioCount: 2, shiftTimeS },
    effectiveMassKg: [2000, 1600],
  });

  it('takes no time when the shift takes none', () => {
    expect(afterShift(shifting(0), slopeOf(0), start, never)).toEqual({ ...start, trialEnded: false });
  });

  it('slows down by drag as v = v₀ / (1 + k v₀ t / m_e), with the effective mass of the higher gear', () => {
    for (const timeS of [0.2, 1, 5]) {
      const { speedMPerS, timeS: until, distanceM } = afterShift(shifting(timeS, plainVehicle({ dragNS2PerM2: 2 })), slopeOf(0), start, never);
      const slowed = 1 + (2 * 20 * timeS) / 1600;
      expect(speedMPerS).toBeCloseTo(20 / slowed, 10);
      expect(distanceM).toBeCloseTo(50 + (1600 / 2) * Math.log(slowed), 9);
      expect(until).toBe(3 + timeS);
    }
  });

  it('speeds up where the road falls, and comes to rest where it rises too much', () => {
    const down = slopeOf(-0.1);
    const gain = (-1500 * 9.80665 * down.sin) / 1600;
    expect(afterShift(shifting(1), down, start, never).speedMPerS).toBeCloseTo(20 + gain, 10);
    expect(afterShift(shifting(1), slopeOf(0.3), { ...start, speedMPerS: 1 }, never).speedMPerS).toBe(0);
  });

  it('ends the trial where asked to, in time', () => {
    const shifted = afterShift(shifting(1), slopeOf(0), start, (motion) => motion.distanceM - 58);
    expect(shifted.trialEnded).toBe(true);
    expect(shifted.timeS).toBeCloseTo(3.4, 12);
    expect(shifted.distanceM).toBeCloseTo(58, 12);
  });
});
