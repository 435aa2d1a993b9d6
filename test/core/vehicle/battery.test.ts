/** Battery: current at the terminals, and the torque at which its limit is used up. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { batteryTorqueLimitNm, clipToBatteryNm, dischargeLimitW, packCurrentA } from '../../../src/core/vehicle/battery.ts';
import { motorLossW } from '../../../src/core/vehicle/motor.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { coefficientMotors, mapMotors, mapOf, sampleBattery, sampleMotor, sampleVehicle, vehicles } from './sample-vehicle.ts';

const shares = fc.double({ min: 0, max: 1, noNaN: true });

/** Terminal power left over by a torque (W); negative: beyond the limit. */
function leftW(vehicle: Vehicle, torqueNm: number, speed: number): number {
  return dischargeLimitW(vehicle.battery) - torqueNm * speed - motorLossW(vehicle.motor, torqueNm, speed) - vehicle.auxiliariesW;
}

describe('dischargeLimitW', () => {
  it('is the stated limit or the most that the pack can give, whichever is less', () => {
    expect(dischargeLimitW(sampleBattery())).toBe(110_000);
    expect(dischargeLimitW(sampleBattery({ voltageV: 100 }))).toBeCloseTo(10_000 / 0.36, 8);
    expect(dischargeLimitW(sampleBattery({ resistanceOhm: 0 }))).toBe(110_000);
    expect(dischargeLimitW(sampleBattery({ resistanceOhm: 0, dischargeW: Infinity }))).toBe(Infinity);
  });
});

describe('packCurrentA', () => {
  it('gives the terminal power back: V I − R I²', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 100, max: 900, noNaN: true }),
        fc.double({ min: 1e-6, max: 0.3, noNaN: true }),
        fc.double({ min: -1, max: 0.99, noNaN: true }),
        (V, R, share) => {
          const terminalW = (share * V * V) / (4 * R);
          const current = packCurrentA(sampleBattery({ voltageV: V, resistanceOhm: R }), terminalW);
          expect(Math.abs(V * current - R * current * current - terminalW)).toBeLessThan(1e-13 * V * Math.abs(current) + 1e-9);
          expect(current).toBeLessThanOrEqual(V / (2 * R));
        },
      ),
    );
  });

  it('is P/V without resistance, and close to it with very little', () => {
    expect(packCurrentA(sampleBattery({ resistanceOhm: 0 }), 39_000)).toBe(100);
    expect(packCurrentA(sampleBattery({ resistanceOhm: 1e-12 }), 39_000)).toBeCloseTo(100, 9);
  });

  it('holds the power at V²/(4R)', () => {
    const battery = sampleBattery();
    const most = 390 / (2 * 0.09);
    expect(packCurrentA(battery, 390 ** 2 / (4 * 0.09))).toBeCloseTo(most, 4);
    expect(packCurrentA(battery, 1e9)).toBeCloseTo(most, 9);
  });
});

describe('batteryTorqueLimitNm', () => {
  it('solves the power balance', () => {
    fc.assert(
      fc.property(vehicles, shares, (vehicle, share) => {
        const speed = share * vehicle.motor.maxSpeedRadPerS;
        const limit = batteryTorqueLimitNm(vehicle, speed);
        fc.pre(limit < 1000 * vehicle.motor.peakTorqueNm);
        const atLimit = leftW(vehicle, limit, speed);
        if (limit === 0) expect(atLimit).toBeLessThanOrEqual(0);
        else expect(Math.abs(atLimit)).toBeLessThan(1e-13 * dischargeLimitW(vehicle.battery) + 1e-13 * limit * speed);
      }),
      { numRuns: 1000 },
    );
  });

  it('is the lowest such torque: every smaller one leaves power', () => {
    fc.assert(
      fc.property(vehicles, shares, fc.array(shares, { minLength: 20, maxLength: 20 }), (vehicle, share, below) => {
        const speed = share * vehicle.motor.maxSpeedRadPerS;
        const limit = Math.min(batteryTorqueLimitNm(vehicle, speed), 2 * vehicle.motor.peakTorqueNm);
        for (const part of below) {
          const torqueNm = part * limit * (1 - 1e-9);
          if (limit > 0) expect(leftW(vehicle, torqueNm, speed)).toBeGreaterThan(-1e-13 * dischargeLimitW(vehicle.battery));
        }
      }),
      { numRuns: 300 },
    );
  });

  it('agrees with bisection on the loss law', () => {
    fc.assert(
      fc.property(coefficientMotors, shares, fc.double({ min: 0.2, max: 1.2, noNaN: true }), (motor, share, power) => {
        const vehicle = sampleVehicle({ motor, battery: sampleBattery({ resistanceOhm: 0, dischargeW: motor.peakPowerW * power }) });
        const speed = (0.05 + 0.95 * share) * motor.maxSpeedRadPerS;
        let [low, high] = [0, 100 * motor.peakTorqueNm];
        for (let k = 0; k < 100; k++) {
          const middle = (low + high) / 2;
          if (leftW(vehicle, middle, speed) > 0) low = middle;
          else high = middle;
        }
        expect(Math.abs(batteryTorqueLimitNm(vehicle, speed) - low)).toBeLessThan(1e-12 * low + 1e-9);
      }),
    );
  });

  it('is 0 where losses and auxiliaries alone use the battery up', () => {
    expect(batteryTorqueLimitNm(sampleVehicle({ auxiliariesW: 120_000 }), 500)).toBe(0);
    const lossMap = mapOf([0, 1400], [0, 280], () => 200_000);
    expect(batteryTorqueLimitNm(sampleVehicle({ motor: sampleMotor({ lossMap }) }), 500)).toBe(0);
  });

  it('is infinite where nothing limits, and where no torque uses the limit up', () => {
    const free = sampleBattery({ resistanceOhm: 0, dischargeW: Infinity });
    expect(batteryTorqueLimitNm(sampleVehicle({ battery: free }), 500)).toBe(Infinity);
    const lossMap = mapOf([0, 1400], [0, 280], () => 500);
    expect(batteryTorqueLimitNm(sampleVehicle({ motor: sampleMotor({ lossMap }) }), 0)).toBe(Infinity);
  });

  it('finds the lowest of several torques where measured losses dip', () => {
    // At 10 rad/s the loss hump of 9 kW at 100 N·m alone passes 8 kW; beyond the dip the balance is met once more.
    const lossMap = mapOf([0, 1400], [0, 100, 150, 280], (_, torque) => (torque === 100 ? 9000 : torque * 10));
    const vehicle = sampleVehicle({ motor: sampleMotor({ lossMap }), battery: sampleBattery({ dischargeW: 8420 }) });
    const limit = batteryTorqueLimitNm(vehicle, 10);
    expect(limit).toBeCloseTo((100 * 8000) / 10_000, 9);
    expect(clipToBatteryNm(vehicle, 200, 10)).toBe(limit);
    expect(clipToBatteryNm(vehicle, 150, 10)).toBe(limit);
    expect(clipToBatteryNm(vehicle, 50, 10)).toBe(50);
  });

  it('holds beyond the last torque of a map, whose losses stay', () => {
    const lossMap = mapOf([0, 1400], [0, 50, 100], (_, torque) => 10 * torque);
    const vehicle = sampleVehicle({ motor: sampleMotor({ lossMap }) });
    expect(batteryTorqueLimitNm(vehicle, 500)).toBeCloseTo((110_000 - 420 - 1000) / 500, 9);
  });

  it('rises with the limit of the pack and falls with auxiliaries', () => {
    fc.assert(
      fc.property(fc.oneof(coefficientMotors, mapMotors), shares, (motor, share) => {
        const speed = (0.1 + 0.9 * share) * motor.maxSpeedRadPerS;
        const limitOf = (dischargeW: number, auxiliariesW: number) =>
          batteryTorqueLimitNm(sampleVehicle({ motor, auxiliariesW, battery: sampleBattery({ resistanceOhm: 0, dischargeW }) }), speed);
        expect(limitOf(80_000, 500)).toBeGreaterThanOrEqual(limitOf(70_000, 500));
        expect(limitOf(80_000, 500)).toBeGreaterThanOrEqual(limitOf(80_000, 1500));
      }),
    );
  });
});

describe('clipToBatteryNm', () => {
  it('is the lesser of torque and limit', () => {
    fc.assert(
      fc.property(vehicles, shares, fc.double({ min: 0, max: 1.5, noNaN: true }), (vehicle, share, load) => {
        const speed = share * vehicle.motor.maxSpeedRadPerS;
        const torqueNm = load * vehicle.motor.peakTorqueNm;
        const wanted = Math.min(torqueNm, batteryTorqueLimitNm(vehicle, speed));
        expect(Math.abs(clipToBatteryNm(vehicle, torqueNm, speed) - wanted)).toBeLessThanOrEqual(1e-12 * wanted);
      }),
      { numRuns: 1000 },
    );
  });
});
