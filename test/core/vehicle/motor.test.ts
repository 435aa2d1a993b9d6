/** Motor: torque limits over speed and losses, against the laws written out plainly. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { curveMaxSpeedRadPerS, fullLoadCurve } from '../../../src/core/vehicle/full-load-curve.ts';
import { lossOfEfficiencyW } from '../../../src/core/vehicle/loss-map.ts';
import {
  continuousCornerLossW,
  continuousCornerRadPerS,
  continuousTorqueLimitNm,
  isOutsideMap,
  motorLossW,
  peakTorqueLimitNm,
} from '../../../src/core/vehicle/motor.ts';
import type { Motor } from '../../../src/core/vehicle/vehicle.ts';
import { coefficientMotors, curveMotors, mapMotors, mapOf, sampleMotor } from './sample-vehicle.ts';

const shares = fc.double({ min: 0, max: 1, noNaN: true });

/** The loss law as printed, with its own φ and τ. */
function printedLossW(motor: Motor, torqueNm: number, speed: number): number {
  const { hysteresis, eddyS, windageS2, copperWPerNm, acCopperS2, fieldWeakening, inverterFixed, inverterLinear, inverterSquare } = motor.losses;
  const tau = Math.abs(torqueNm) / motor.peakTorqueNm;
  const phi = speed === 0 ? 0 : Math.max(0, 1 - motor.baseSpeedRadPerS / speed);
  const current = tau ** 2 + fieldWeakening ** 2 * phi ** 2;
  const machine = hysteresis * speed + eddyS * speed ** 2 + windageS2 * speed ** 3 + copperWPerNm * (1 + acCopperS2 * speed ** 2) * current;
  return motor.peakTorqueNm * machine + motor.peakPowerW * (inverterFixed + inverterLinear * Math.sqrt(current) + inverterSquare * current);
}

describe('peakTorqueLimitNm', () => {
  const motor = sampleMotor();

  it('is constant torque, constant power, then falls with the square of speed, and ends at maximum speed', () => {
    expect(peakTorqueLimitNm(motor, 0)).toBe(270);
    expect(peakTorqueLimitNm(motor, 450)).toBe(270);
    expect(peakTorqueLimitNm(motor, 900)).toBe(135);
    expect(peakTorqueLimitNm(motor, 1200) * 1200).toBeCloseTo(motor.peakPowerW, 8);
    expect(peakTorqueLimitNm(motor, 1300)).toBeCloseTo((motor.peakPowerW * 1200) / 1300 ** 2, 10);
    expect(peakTorqueLimitNm(motor, 1360)).toBeGreaterThan(78);
    expect(peakTorqueLimitNm(motor, 1360 * (1 + 0.9e-12))).toBeGreaterThan(78);
    expect(peakTorqueLimitNm(motor, 1360 * (1 + 1.1e-12))).toBe(0);
  });

  it('never rises with speed, never jumps before its end and never gives more than peak power', () => {
    fc.assert(
      fc.property(coefficientMotors, shares, (drawn, share) => {
        const speed = share * drawn.maxSpeedRadPerS;
        const here = peakTorqueLimitNm(drawn, speed);
        const beyond = peakTorqueLimitNm(drawn, Math.min(speed * (1 + 1e-9), drawn.maxSpeedRadPerS));
        expect(beyond).toBeLessThanOrEqual(here);
        expect(here - beyond).toBeLessThanOrEqual(3e-9 * here);
        expect(here * speed).toBeLessThanOrEqual(drawn.peakPowerW * (1 + 1e-12));
      }),
    );
  });

  it('reads a measured curve linearly, held below its first point, up to its last', () => {
    const fullLoad = fullLoadCurve([100, 500, 1000], [200, 180, 60]);
    const measured = sampleMotor({ peakTorqueNm: 200, baseSpeedRadPerS: 450, maxSpeedRadPerS: 1000, fullLoad });
    expect(fullLoad).toMatchObject({ referencePeakTorqueNm: 200, referenceBaseSpeedRadPerS: 450 });
    expect([0, 100, 300, 500, 750, 1000].map((speed) => peakTorqueLimitNm(measured, speed))).toEqual([200, 200, 190, 180, 120, 60]);
    expect(peakTorqueLimitNm(measured, 1000.001)).toBe(0);
  });

  it('stretches a measured curve with peak torque and base speed', () => {
    fc.assert(
      fc.property(
        curveMotors,
        shares,
        fc.double({ min: 0.5, max: 2, noNaN: true }),
        fc.double({ min: 0.5, max: 2, noNaN: true }),
        (drawn, share, torque, speed) => {
          const baseSpeedRadPerS = drawn.baseSpeedRadPerS * speed;
          const maxSpeedRadPerS = curveMaxSpeedRadPerS(drawn.fullLoad as NonNullable<Motor['fullLoad']>, baseSpeedRadPerS);
          const varied = sampleMotor({ ...drawn, peakTorqueNm: drawn.peakTorqueNm * torque, baseSpeedRadPerS, maxSpeedRadPerS });
          const at = share * drawn.maxSpeedRadPerS;
          expect(maxSpeedRadPerS).toBeCloseTo(drawn.maxSpeedRadPerS * speed, 8);
          expect(peakTorqueLimitNm(varied, at * speed)).toBeCloseTo(peakTorqueLimitNm(drawn, at) * torque, 8);
        },
      ),
    );
  });

  it('takes the stated reference of a curve before its own points', () => {
    const stated = fullLoadCurve([100, 500], [200, 180], 250, 400);
    expect(stated).toMatchObject({ referencePeakTorqueNm: 250, referenceBaseSpeedRadPerS: 400 });
    // Largest power 90 kW over the largest torque of the points, whatever peak torque is stated.
    expect(fullLoadCurve([100, 500], [200, 180], 250)).toMatchObject({ referencePeakTorqueNm: 250, referenceBaseSpeedRadPerS: 450 });
  });
});

describe('continuousTorqueLimitNm', () => {
  it('is the lesser of a share of torque, a share of power and the peak limit', () => {
    fc.assert(
      fc.property(fc.oneof(coefficientMotors, curveMotors), shares, (drawn, share) => {
        const speed = share * drawn.maxSpeedRadPerS;
        const byTorque = drawn.continuousTorqueShare * drawn.peakTorqueNm;
        const byPower = (drawn.continuousPowerShare * drawn.peakPowerW) / speed;
        expect(continuousTorqueLimitNm(drawn, speed)).toBe(Math.min(byTorque, byPower, peakTorqueLimitNm(drawn, speed)));
      }),
    );
  });

  it('ends with the motor and does not exist without a rating', () => {
    expect(continuousTorqueLimitNm(sampleMotor(), 1400)).toBe(0);
    expect(continuousTorqueLimitNm(sampleMotor({ continuousTorqueShare: Number.NaN, continuousPowerShare: Number.NaN }), 100)).toBeNaN();
  });

  it('has its corner where continuous torque meets continuous power, at most at maximum speed', () => {
    const motor = sampleMotor();
    expect(continuousCornerRadPerS(motor)).toBeCloseTo((450 * 0.58) / 0.52, 10);
    expect(continuousCornerLossW(motor)).toBeCloseTo(printedLossW(motor, 0.52 * 270, (450 * 0.58) / 0.52), 8);
    const low = sampleMotor({ continuousTorqueShare: 0.1, continuousPowerShare: 0.9 });
    expect(continuousCornerRadPerS(low)).toBe(1360);
    expect(continuousCornerLossW(low)).toBeCloseTo(printedLossW(low, 27, 1360), 8);
  });
});

describe('motorLossW by coefficients', () => {
  it('is the printed law', () => {
    fc.assert(
      fc.property(coefficientMotors, shares, fc.double({ min: -1.2, max: 1.2, noNaN: true }), (motor, share, torque) => {
        const [speed, torqueNm] = [share * motor.maxSpeedRadPerS, torque * motor.peakTorqueNm];
        const wanted = printedLossW(motor, torqueNm, speed);
        expect(Math.abs(motorLossW(motor, torqueNm, speed) - wanted)).toBeLessThanOrEqual(1e-13 * wanted + 1e-300);
      }),
      { numRuns: 1000 },
    );
  });

  it('is the same pulling and braking, and rises with torque', () => {
    fc.assert(
      fc.property(coefficientMotors, shares, shares, (motor, share, torque) => {
        const [speed, torqueNm] = [share * motor.maxSpeedRadPerS, torque * motor.peakTorqueNm];
        expect(motorLossW(motor, -torqueNm, speed)).toBe(motorLossW(motor, torqueNm, speed));
        expect(motorLossW(motor, torqueNm + 1, speed)).toBeGreaterThan(motorLossW(motor, torqueNm, speed));
      }),
    );
  });

  it('has winding and inverter losses at standstill', () => {
    const motor = sampleMotor();
    expect(motorLossW(motor, 270, 0)).toBeCloseTo(270 * 42 + motor.peakPowerW * (0.0014 + 0.018 + 0.01), 8);
    expect(motorLossW(motor, 0, 0)).toBeCloseTo(motor.peakPowerW * 0.0014, 10);
  });
});

describe('motorLossW by a map', () => {
  // Bilinear interpolation gives back any law of the form a + bω + cT + dωT.
  const lossW = (speed: number, torque: number) => 80 + 1.5 * speed + 4 * torque + 0.02 * speed * torque;
  const lossMap = mapOf([0, 300, 1400], [0, 100, 280], lossW);
  const motor = sampleMotor({ lossMap });

  it('interpolates losses on the grid and holds the nearest edge outside', () => {
    expect(motorLossW(motor, 60, 700)).toBeCloseTo(lossW(700, 60), 9);
    expect(motorLossW(motor, 270, 1360)).toBeCloseTo(lossW(1360, 270), 9);
    expect(motorLossW(motor, 400, 1500)).toBeCloseTo(lossW(1400, 280), 9);
  });

  it('reads a motoring map at |T| and a four-quadrant map as it is', () => {
    expect(motorLossW(motor, -60, 700)).toBe(motorLossW(motor, 60, 700));
    const both = sampleMotor({ lossMap: mapOf([0, 1400], [-280, 0, 280], (speed, torque) => 100 + speed + (torque < 0 ? 2 : 3) * Math.abs(torque)) });
    expect(motorLossW(both, -100, 500)).toBeCloseTo(800, 9);
    expect(motorLossW(both, 100, 500)).toBeCloseTo(900, 9);
  });

  it('adds the inverter to a map of the motor alone', () => {
    const alone = sampleMotor({ lossMap: { ...lossMap, motorAlone: true } });
    const inverterOnly = { ...alone.losses, hysteresis: 0, eddyS: 0, windageS2: 0, copperWPerNm: 0 };
    const inverterW = printedLossW({ ...alone, losses: inverterOnly }, 60, 700);
    expect(motorLossW(alone, 60, 700)).toBeCloseTo(lossW(700, 60) + inverterW, 8);
  });

  it('scales its axes and its losses with the motor', () => {
    fc.assert(
      fc.property(
        mapMotors,
        shares,
        shares,
        fc.double({ min: 0.5, max: 2, noNaN: true }),
        fc.double({ min: 0.5, max: 2, noNaN: true }),
        (drawn, share, load, torque, speed) => {
          const varied = sampleMotor({ ...drawn, peakTorqueNm: drawn.peakTorqueNm * torque, baseSpeedRadPerS: drawn.baseSpeedRadPerS * speed });
          const [at, torqueNm] = [share * drawn.maxSpeedRadPerS, load * drawn.peakTorqueNm];
          const wanted = motorLossW(drawn, torqueNm, at) * torque * speed;
          expect(Math.abs(motorLossW(varied, torqueNm * torque, at * speed) / wanted - 1)).toBeLessThan(1e-12);
        },
      ),
    );
  });

  it('says when the motor works outside it, rounding at its edges apart', () => {
    expect(isOutsideMap(motor, 280, 1400)).toBe(false);
    expect(isOutsideMap(motor, -280 * (1 + 1e-13), 0)).toBe(false);
    expect(isOutsideMap(motor, 280.001, 700)).toBe(true);
    expect(isOutsideMap(motor, 100, 1400.001)).toBe(true);
    expect(isOutsideMap(sampleMotor(), 1e6, 1e6)).toBe(false);
    const fromEfficiency = sampleMotor({ lossMap: mapOf([50, 1400], [10, 280], lossW) });
    expect(isOutsideMap(fromEfficiency, 5, 700)).toBe(true);
    expect(isOutsideMap(fromEfficiency, -20, 20)).toBe(true);
    expect(isOutsideMap(fromEfficiency, -20, 60)).toBe(false);
  });

  it('takes its losses from efficiencies on both sides', () => {
    // 100 N·m at 500 rad/s is 50 kW at the shaft: 90 % motoring draws 55.6 kW, 90 % generating returns 45 kW.
    expect(lossOfEfficiencyW(100, 500, 0.9)).toBeCloseTo(50_000 / 0.9 - 50_000, 9);
    expect(lossOfEfficiencyW(-100, 500, 0.9)).toBeCloseTo(5000, 9);
  });
});
