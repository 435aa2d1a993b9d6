/** Tractive force at full pedal: the least of three limits, and the word for the one that holds. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { adhesionLimitN } from '../../../src/core/vehicle/adhesion.ts';
import { batteryTorqueLimitNm } from '../../../src/core/vehicle/battery.ts';
import { fullLoadCurve } from '../../../src/core/vehicle/full-load-curve.ts';
import { maxVehicleSpeedMPerS, motorSpeedRadPerS, wheelForceN } from '../../../src/core/vehicle/gearing.ts';
import { continuousTorqueLimitNm, motorLossW, peakTorqueLimitNm } from '../../../src/core/vehicle/motor.ts';
import { slopeOf } from '../../../src/core/vehicle/road-load.ts';
import { driveForceN, type Rating, torqueLimitNm, tractionLimit, tractiveForceN } from '../../../src/core/vehicle/traction.ts';
import { sampleAxles, sampleBattery, sampleMotor, sampleVehicle, vehicles } from './sample-vehicle.ts';

const shares = fc.double({ min: 0, max: 1, noNaN: true });
const gears = fc.constantFrom(0 as const, 1 as const);
const ratings = fc.constantFrom<Rating>('peak', 'continuous', 'standstill', 'standstill continuous');
const slopes = fc.double({ min: -0.5, max: 1, noNaN: true }).map(slopeOf);
const flat = slopeOf(0);
const unlimited = sampleBattery({ resistanceOhm: 0, dischargeW: Infinity });
const noGrip = sampleAxles({ adhesion: Number.NaN });

describe('torqueLimitNm', () => {
  it('caps the peak or the continuous limit at the standstill share of peak torque', () => {
    const motor = sampleMotor({ standstillShare: 0.4 });
    expect(torqueLimitNm(motor, 0, 'peak')).toBe(270);
    expect(torqueLimitNm(motor, 0, 'continuous')).toBeCloseTo(0.52 * 270, 12);
    expect(torqueLimitNm(motor, 0, 'standstill')).toBeCloseTo(0.4 * 270, 12);
    expect(torqueLimitNm(motor, 0, 'standstill continuous')).toBeCloseTo(0.4 * 270, 12);
    expect(torqueLimitNm(sampleMotor({ standstillShare: 0.9 }), 0, 'standstill continuous')).toBeCloseTo(0.52 * 270, 12);
  });
});

describe('tractiveForceN', () => {
  it('is the least of what motor, battery and adhesion allow', () => {
    fc.assert(
      fc.property(vehicles, gears, shares, ratings, slopes, (vehicle, gear, share, rating, slope) => {
        const v = share * maxVehicleSpeedMPerS(vehicle, gear);
        const speed = motorSpeedRadPerS(vehicle, gear, v);
        let motorNm = rating.endsWith('continuous') ? continuousTorqueLimitNm(vehicle.motor, speed) : peakTorqueLimitNm(vehicle.motor, speed);
        if (rating.startsWith('standstill')) motorNm = Math.min(motorNm, 0.9 * vehicle.motor.peakTorqueNm);
        const motorN = wheelForceN(vehicle, gear, motorNm, speed);
        const batteryN = wheelForceN(vehicle, gear, batteryTorqueLimitNm(vehicle, speed), speed);
        const wanted = Math.min(motorN, batteryN, adhesionLimitN(vehicle, v, slope.cos));
        const forceN = tractiveForceN(vehicle, gear, v, rating, slope);
        expect(Math.abs(forceN - wanted)).toBeLessThanOrEqual(1e-11 * (Math.abs(wanted) + 100));
      }),
      { numRuns: 1000 },
    );
  });

  it('never exceeds adhesion, nor draws more than the battery gives', () => {
    fc.assert(
      fc.property(vehicles, gears, shares, slopes, (vehicle, gear, share, slope) => {
        const v = share * maxVehicleSpeedMPerS(vehicle, gear);
        const forceN = tractiveForceN(vehicle, gear, v, 'peak', slope);
        expect(forceN).toBeLessThanOrEqual(adhesionLimitN(vehicle, v, slope.cos));
        expect(forceN).toBeLessThanOrEqual(driveForceN(vehicle, gear, v, 'peak'));
      }),
    );
  });

  it('never pulls less with more peak torque, all losses kept', () => {
    fc.assert(
      fc.property(shares, fc.double({ min: 1, max: 1.5, noNaN: true }), fc.constantFrom<Rating>('peak', 'continuous'), (share, more, rating) => {
        const weak = sampleVehicle({ battery: unlimited });
        const strong = sampleVehicle({ battery: unlimited, motor: sampleMotor({ peakTorqueNm: 270 * more }) });
        const v = share * maxVehicleSpeedMPerS(weak, 0);
        expect(tractiveForceN(strong, 0, v, rating, flat)).toBeGreaterThanOrEqual(tractiveForceN(weak, 0, v, rating, flat));
      }),
    );
  });

  it('has no continuous force above the peak force', () => {
    fc.assert(
      fc.property(vehicles, gears, shares, (vehicle, gear, share) => {
        const v = share * maxVehicleSpeedMPerS(vehicle, gear);
        expect(tractiveForceN(vehicle, gear, v, 'continuous', flat)).toBeLessThanOrEqual(tractiveForceN(vehicle, gear, v, 'peak', flat) + 1e-9);
      }),
    );
  });

  it('only drags above maximum motor speed', () => {
    const van = sampleVehicle();
    const v = 1.01 * maxVehicleSpeedMPerS(van, 0);
    expect(tractiveForceN(van, 0, v, 'peak', flat)).toBeCloseTo((-(0.4 + 0.0006 * 1360 * 1.01) * 9.5 * 0.97) / 0.333, 9);
  });
});

describe('tractionLimit', () => {
  const speedAt = (motorSpeed: number) => (motorSpeed * 0.333) / 9.5;
  const free = sampleVehicle({ battery: unlimited, axles: noGrip });

  it('names the flat branch motor torque and the falling ones motor power', () => {
    expect(tractionLimit(free, 0, 0, 'peak', flat)).toBe('motor torque');
    expect(tractionLimit(free, 0, speedAt(440), 'peak', flat)).toBe('motor torque');
    expect(tractionLimit(free, 0, speedAt(460), 'peak', flat)).toBe('motor power');
    expect(tractionLimit(free, 0, speedAt(1300), 'peak', flat)).toBe('motor power');
    expect(tractionLimit(free, 0, speedAt(1370), 'peak', flat)).toBe('motor speed');
  });

  it('goes by the branch of the continuous limit where that is in force', () => {
    // The corner lies at 450 · 0.58 / 0.52 = 501.9 rad/s, above base speed.
    expect(tractionLimit(free, 0, speedAt(490), 'continuous', flat)).toBe('motor torque');
    expect(tractionLimit(free, 0, speedAt(510), 'continuous', flat)).toBe('motor power');
    const whole = sampleVehicle({ battery: unlimited, axles: noGrip, motor: sampleMotor({ continuousTorqueShare: 1, continuousPowerShare: 0.5 }) });
    expect(tractionLimit(whole, 0, speedAt(200), 'continuous', flat)).toBe('motor torque');
    expect(tractionLimit(whole, 0, speedAt(300), 'continuous', flat)).toBe('motor power');
    const beyond = sampleVehicle({ battery: unlimited, axles: noGrip, motor: sampleMotor({ continuousTorqueShare: 0.9, continuousPowerShare: 1 }) });
    expect(tractionLimit(beyond, 0, speedAt(440), 'continuous', flat)).toBe('motor torque');
    expect(tractionLimit(beyond, 0, speedAt(1300), 'continuous', flat)).toBe('motor power');
  });

  it('calls a measured curve motor torque up to base speed and motor power above', () => {
    const fullLoad = fullLoadCurve([100, 400, 1000], [270, 240, 90], 270, 450);
    const motor = sampleMotor({ fullLoad, maxSpeedRadPerS: 1000, constantPowerToRadPerS: 1000 });
    const measured = sampleVehicle({ battery: unlimited, axles: noGrip, motor });
    expect(tractionLimit(measured, 0, speedAt(430), 'peak', flat)).toBe('motor torque');
    expect(tractionLimit(measured, 0, speedAt(470), 'peak', flat)).toBe('motor power');
    expect(tractionLimit(measured, 0, speedAt(470), 'continuous', flat)).toBe('motor torque');
  });

  it('names battery and adhesion where they hold', () => {
    expect(tractionLimit(sampleVehicle({ axles: noGrip, battery: sampleBattery({ dischargeW: 60_000 }) }), 0, speedAt(600), 'peak', flat)).toBe(
      'battery power',
    );
    expect(tractionLimit(sampleVehicle({ axles: sampleAxles({ adhesion: 0.3 }) }), 0, 0, 'peak', flat)).toBe('adhesion');
    expect(tractionLimit(sampleVehicle(), 0, 0, 'standstill', flat)).toBe('motor torque');
    expect(tractionLimit(sampleVehicle(), 0, 0, 'standstill continuous', flat)).toBe('motor torque');
  });

  it('names a limit that the force really touches', () => {
    fc.assert(
      fc.property(vehicles, gears, shares, fc.constantFrom<Rating>('peak', 'continuous'), slopes, (vehicle, gear, share, rating, slope) => {
        const v = share * maxVehicleSpeedMPerS(vehicle, gear);
        const speed = motorSpeedRadPerS(vehicle, gear, v);
        const forceN = tractiveForceN(vehicle, gear, v, rating, slope);
        const word = tractionLimit(vehicle, gear, v, rating, slope);
        const torqueNm = (forceN * vehicle.wheelRadiusM) / (vehicle.gearing.ratios[gear] * vehicle.gearing.efficiencies[gear]) + 0.4;
        if (word === 'adhesion') expect(forceN).toBe(adhesionLimitN(vehicle, v, slope.cos));
        if (word.startsWith('motor')) expect(forceN).toBeCloseTo(wheelForceN(vehicle, gear, torqueLimitNm(vehicle.motor, speed, rating), speed), 6);
        if (word === 'battery power' && torqueNm > 1) {
          const usedNm = torqueNm + vehicle.gearing.dragPerSpeedNms * speed;
          const usedW = usedNm * speed + motorLossW(vehicle.motor, usedNm, speed) + vehicle.auxiliariesW;
          expect(usedW / vehicle.battery.dischargeW).toBeLessThan(1 + 1e-9);
        }
      }),
      { numRuns: 1000 },
    );
  });
});
