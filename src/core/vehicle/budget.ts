/** Mass and cost that follow the design: one linear law for both. */

/** Terms of one budget, in kg or in the study's currency, per SI unit; NaN: not stated. */
export interface BudgetTerms {
  motorFixed: number;
  /** Per N·m of peak torque. */
  motorPerNm: number;
  inverterFixed: number;
  /** Per W of peak power. */
  inverterPerW: number;
  gearingFixed: number;
  /** Per N·m of peak output torque: peak torque × largest ratio. */
  gearingPerNm: number;
  gearingPerExtraRatio: number;
  /** Per J of usable energy. */
  batteryPerJ: number;
}

/** What the budget depends on. */
export interface DriveSize {
  peakTorqueNm: number;
  peakPowerW: number;
  largestRatio: number;
  ratioCount: 1 | 2;
  /** May be NaN where no term asks for it. */
  usableJ: number;
}

/** A budget, in the unit of its terms. */
export interface Budget {
  /** Motor, inverter and gearing; NaN when none of their terms is stated. */
  driveUnit: number;
  /** NaN when its term is not stated. */
  battery: number;
}

/** The budget of one design; terms that are not stated count as zero beside stated ones. */
export function driveBudget(terms: BudgetTerms, size: DriveSize): Budget {
  const motor = sum(terms.motorFixed, terms.motorPerNm * size.peakTorqueNm);
  const inverter = sum(terms.inverterFixed, terms.inverterPerW * size.peakPowerW);
  const gearingByTorque = terms.gearingPerNm * size.peakTorqueNm * size.largestRatio;
  const gearing = sum(sum(terms.gearingFixed, gearingByTorque), terms.gearingPerExtraRatio * (size.ratioCount - 1));
  return { driveUnit: sum(sum(motor, inverter), gearing), battery: terms.batteryPerJ * size.usableJ };
}

/** Everything a budget adds up to; 0 when nothing is stated. What a mass budget adds to the kerb mass. */
export function budgetTotal(budget: Budget): number {
  return sum(sum(0, budget.driveUnit), budget.battery);
}

/** a + b, a missing (NaN) one counting as nothing; missing when both are. */
function sum(a: number, b: number): number {
  return Number.isNaN(a) ? b : Number.isNaN(b) ? a : a + b;
}
