/** Shift speed of two ratios, against a fine scan and where the answer is known. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { maxVehicleSpeedMPerS } from '../../../src/core/vehicle/gearing.ts';
import { slopeOf } from '../../../src/core/vehicle/road-load.ts';
import { shiftSpeedMPerS } from '../../../src/core/vehicle/shift.ts';
import { tractiveForceN } from '../../../src/core/vehicle/traction.ts';
import type { DrivingRating } from '../../../src/core/vehicle/traction-breaks.ts';
import { sampleAxles, sampleBattery, sampleGearing, sampleMotor, sampleVehicle, vehicles } from './sample-vehicle.ts';

const flat = slopeOf(0);
const ratings = fc.constantFrom<DrivingRating>('peak', 'continuous');
const unlimited = sampleBattery({ resistanceOhm: 0, dischargeW: Infinity });
const noGrip = sampleAxles({ adhesion: Number.NaN });
const twoRatios = sampleGearing({ ratioCount: 2, efficiencies: [0.97, 0.97], dragFixedNm: 0, dragPerSpeedNms: 0 });
const ideal = sampleVehicle({ gearing: twoRatios, battery: unlimited, axles: noGrip });

describe('shiftSpeedMPerS', () => {
  it('waits for the end of the lower gear where both gears give the same power', () => {
    const motor = sampleMotor({ constantPowerToRadPerS: 1360 });
    expect(shiftSpeedMPerS({ ...ideal, motor }, 'peak', flat)).toBe(maxVehicleSpeedMPerS(ideal, 0));
  });

  it('comes where constant power of the lower gear ends, as the higher one still has it', () => {
    // From there the lower gear falls with 1/v²: a billionth more force is reached a billionth beyond it.
    const end = (1200 * 0.333) / 9.5;
    const found = shiftSpeedMPerS(ideal, 'peak', flat);
    expect(found).toBeGreaterThan(end);
    expect(found).toBeLessThan(end * (1 + 2e-9));
  });

  it('comes as soon as the higher gear has full power where the drag falls with the ratio', () => {
    const gearing = { ...twoRatios, dragFixedNm: 0.5 };
    // Drag only: the higher gear wins once it runs at constant power, at 450 · 0.333 / 5.8 m/s.
    const found = shiftSpeedMPerS({ ...ideal, gearing }, 'peak', flat);
    const atFullPower = (450 * 0.333) / 5.8;
    expect(found).toBeLessThan(atFullPower);
    expect(found).toBeGreaterThan(atFullPower * 0.99);
  });

  it('is 0 where the higher gear always pulls more, and infinite with one ratio', () => {
    expect(shiftSpeedMPerS({ ...ideal, gearing: { ...twoRatios, efficiencies: [0.5, 0.99] } }, 'peak', flat)).toBe(0);
    expect(shiftSpeedMPerS(sampleVehicle(), 'peak', flat)).toBe(Infinity);
  });

  it('waits while adhesion holds both gears down alike', () => {
    const slippery = { ...ideal, gearing: { ...twoRatios, dragFixedNm: 0.5 }, axles: sampleAxles({ adhesion: 0.2 }) };
    const found = shiftSpeedMPerS(slippery, 'peak', flat);
    expect(found).toBeGreaterThan(0);
    expect(tractiveForceN(slippery, 0, 0.5 * found, 'peak', flat)).toBe(tractiveForceN(slippery, 1, 0.5 * found, 'peak', flat));
  });

  it('is the lowest speed of clearly more force, as a fine scan sees it', () => {
    fc.assert(
      fc.property(vehicles, ratings, (vehicle, rating) => {
        const end = maxVehicleSpeedMPerS(vehicle, 0);
        const shift = shiftSpeedMPerS(vehicle, rating, flat);
        const gain = (v: number) => tractiveForceN(vehicle, 1, v, rating, flat) / tractiveForceN(vehicle, 0, v, rating, flat) - 1;
        const steps = 500;
        for (let k = 0; k < steps; k++) {
          const v = (k * end) / steps;
          if (v < shift * (1 - 1e-9)) expect(gain(v)).toBeLessThanOrEqual(1.001e-9);
        }
        if (shift > 0 && shift < end) expect(gain(shift + 1e-6)).toBeGreaterThan(0.999e-9);
      }),
      { numRuns: 200 },
    );
  });
});
