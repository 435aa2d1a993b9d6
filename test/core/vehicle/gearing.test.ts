/** Gearing: torque and force there and back. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { dragTorqueNm, maxVehicleSpeedMPerS, motorSpeedRadPerS, motorTorqueNm, wheelForceN } from '../../../src/core/vehicle/gearing.ts';
import { sampleGearing, sampleVehicle, vehicles } from './sample-vehicle.ts';

const gears = fc.constantFrom(0 as const, 1 as const);
const motorSpeeds = fc.double({ min: 0, max: 1500, noNaN: true });

describe('gearing', () => {
  it('has its drag torque at the motor shaft, also at standstill', () => {
    expect(dragTorqueNm(sampleGearing(), 0)).toBe(0.4);
    expect(dragTorqueNm(sampleGearing(), 1000)).toBeCloseTo(1, 12);
  });

  it('returns the wheel force that a pulling torque was found for', () => {
    fc.assert(
      fc.property(vehicles, gears, fc.double({ min: 0, max: 20_000, noNaN: true }), motorSpeeds, (vehicle, gear, forceN, speed) => {
        const back = wheelForceN(vehicle, gear, motorTorqueNm(vehicle, gear, forceN, speed), speed);
        expect(Math.abs(back - forceN)).toBeLessThan(1e-11 * (forceN + 100));
      }),
    );
  });

  it('loses the mesh loss on the side the power comes from, and the drag always', () => {
    const vehicle = sampleVehicle();
    expect(motorTorqueNm(vehicle, 0, 1000, 500)).toBeCloseTo((1000 * 0.333) / (9.5 * 0.97) + 0.7, 12);
    expect(motorTorqueNm(vehicle, 0, -1000, 500)).toBeCloseTo((-1000 * 0.333 * 0.97) / 9.5 + 0.7, 12);
    expect(motorTorqueNm(vehicle, 1, 1000, 500)).toBeCloseTo((1000 * 0.333) / (5.8 * 0.975) + 0.7, 12);
  });

  it('multiplies the mesh efficiency also where the drag is larger than the torque', () => {
    expect(wheelForceN(sampleVehicle(), 0, 0, 500)).toBeCloseTo((-0.7 * 9.5 * 0.97) / 0.333, 12);
  });

  it('never returns more power than it takes', () => {
    fc.assert(
      fc.property(
        vehicles,
        gears,
        fc.double({ min: -20_000, max: 20_000, noNaN: true }),
        fc.double({ min: 0.1, max: 60, noNaN: true }),
        (vehicle, gear, forceN, v) => {
          const speed = motorSpeedRadPerS(vehicle, gear, v);
          expect(motorTorqueNm(vehicle, gear, forceN, speed) * speed).toBeGreaterThanOrEqual(forceN * v * (1 - 1e-12 * Math.sign(forceN)));
        },
      ),
    );
  });

  it('reaches maximum motor speed at the maximum vehicle speed', () => {
    fc.assert(
      fc.property(vehicles, gears, (vehicle, gear) => {
        const speed = motorSpeedRadPerS(vehicle, gear, maxVehicleSpeedMPerS(vehicle, gear));
        expect(Math.abs(speed / vehicle.motor.maxSpeedRadPerS - 1)).toBeLessThan(1e-15);
      }),
    );
  });
});
