/** Mass and cost that follow the design, and the mass factor. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type BudgetTerms, budgetTotal, driveBudget } from '../../../src/core/vehicle/budget.ts';
import { massFactor } from '../../../src/core/vehicle/mass.ts';

const size = { peakTorqueNm: 270, peakPowerW: 121_500, largestRatio: 12.4, ratioCount: 2 as const, usableJ: 58 * 3.6e6 };
const terms: BudgetTerms = {
  motorFixed: 8,
  motorPerNm: 0.11,
  inverterFixed: 3,
  inverterPerW: 4.5e-5,
  gearingFixed: 6,
  gearingPerNm: 0.008,
  gearingPerExtraRatio: 11,
  batteryPerJ: 6.2 / 3.6e6,
};
const no = Number.NaN;
const none: BudgetTerms = {
  motorFixed: no,
  motorPerNm: no,
  inverterFixed: no,
  inverterPerW: no,
  gearingFixed: no,
  gearingPerNm: no,
  gearingPerExtraRatio: no,
  batteryPerJ: no,
};

describe('driveBudget', () => {
  it('adds fixed terms and terms that follow torque, power, output torque, ratios and energy', () => {
    const budget = driveBudget(terms, size);
    expect(budget.driveUnit).toBeCloseTo(8 + 0.11 * 270 + 3 + 0.045 * 121.5 + 6 + 0.008 * 270 * 12.4 + 11, 10);
    expect(budget.battery).toBeCloseTo(6.2 * 58, 10);
    expect(budgetTotal(budget)).toBeCloseTo(budget.driveUnit + budget.battery, 12);
  });

  it('charges an extra ratio only where there is one', () => {
    expect(driveBudget(terms, size).driveUnit - driveBudget(terms, { ...size, ratioCount: 1 }).driveUnit).toBeCloseTo(11, 10);
  });

  it('does not exist without terms, and adds nothing to the vehicle then', () => {
    expect(driveBudget(none, size)).toEqual({ driveUnit: no, battery: no });
    expect(budgetTotal(driveBudget(none, size))).toBe(0);
  });

  it('counts terms that are not stated as zero beside stated ones, whichever they are', () => {
    fc.assert(
      fc.property(fc.subarray(Object.keys(terms) as (keyof BudgetTerms)[]), (stated) => {
        const some = { ...none };
        const zeroed = { ...none };
        for (const key of Object.keys(terms) as (keyof BudgetTerms)[]) {
          some[key] = stated.includes(key) ? terms[key] : no;
          zeroed[key] = stated.includes(key) ? terms[key] : 0;
        }
        const [budget, full] = [driveBudget(some, size), driveBudget(zeroed, size)];
        if (stated.some((key) => key !== 'batteryPerJ')) expect(budget.driveUnit).toBeCloseTo(full.driveUnit, 10);
        else expect(budget.driveUnit).toBeNaN();
        if (stated.includes('batteryPerJ')) expect(budget.battery).toBe(full.battery);
        else expect(budget.battery).toBeNaN();
      }),
    );
  });

  it('does not ask for usable energy where no term does', () => {
    expect(driveBudget({ ...terms, batteryPerJ: no }, { ...size, usableJ: no }).driveUnit).toBeGreaterThan(0);
  });
});

describe('massFactor', () => {
  it('stays where it is without inertia and follows the square of the ratio', () => {
    expect(massFactor(0, 0, 9.5, 1500, 0.3)).toBe(1);
    expect(massFactor(4, 0.04, 10, 1500, 0.3) - 1).toBeCloseTo((4 + 0.04 * 100) / (1500 * 0.09), 14);
    expect(massFactor(0, 0.04, 20, 1500, 0.3) - 1).toBeCloseTo(4 * (massFactor(0, 0.04, 10, 1500, 0.3) - 1), 14);
  });

  it('makes the effective mass that has the same kinetic energy as the vehicle and all that turns', () => {
    const [v, massKg, radiusM, ratio, wheels, rotor] = [20, 1500, 0.3, 9.5, 4, 0.04];
    const turning = 0.5 * wheels * (v / radiusM) ** 2 + 0.5 * rotor * ((v * ratio) / radiusM) ** 2;
    expect(0.5 * massFactor(wheels, rotor, ratio, massKg, radiusM) * massKg * v * v).toBeCloseTo(0.5 * massKg * v * v + turning, 6);
  });

  // Common practice places the mass factor of road vehicles between about 1.01 and 1.4.
  it('lies between 1.01 and 1.4 from a light car in a high gear to a low gear with a heavy rotor', () => {
    expect(massFactor(2, 0.01, 4, 1600, 0.32)).toBeGreaterThan(1.01);
    expect(massFactor(4, 0.06, 14, 1200, 0.3)).toBeLessThan(1.4);
  });
});
