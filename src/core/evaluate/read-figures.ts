/** Reads the parts of a design from the figures: one reader per part, its names looked up once. */
import type { Study } from '../study/study.ts';
import { standardDensityKgPerM3 } from '../vehicle/air.ts';
import { type Budget, type BudgetTerms, driveBudget } from '../vehicle/budget.ts';
import { curveMaxSpeedRadPerS } from '../vehicle/full-load-curve.ts';
import { roadLoadFromCoastDown, roadLoadFromCoefficients } from '../vehicle/road-load.ts';
import type { Battery, Gearing, Motor, RoadLoad, Vehicle } from '../vehicle/vehicle.ts';

/** Air temperature of a design that states neither it nor a density. */
const STANDARD_TEMPERATURE_K = 293.15;

/** Where the number of that name stands. */
export type ReadCell = (name: string) => number;

/** Where a trial's own load stands. */
export interface LoadCells {
  payload: number;
  laden: number;
  trailerMass: number;
  trailerDragArea: number;
  headWind: number;
}

/** The value, or 0 where none is stated. */
export function orZero(value: number): number {
  return Number.isNaN(value) ? 0 : value;
}

function orElse(value: number, otherwise: number): number {
  return Number.isNaN(value) ? otherwise : value;
}

/** The motor with its losses and measured curves: the study's own, or those that an option brings. */
export function motorReader(study: Study, read: ReadCell): (figures: Float64Array, motor: Motor) => void {
  const [curveCell, mapCell] = [read('motor.fullLoad'), read('motor.map')];
  const [torque, base, constantTo, top] = ['peakTorque', 'baseSpeed', 'constantPowerTo', 'maxSpeed'].map((key) => read(`motor.${key}`));
  const [torqueShare, powerShare, standstill] = ['continuous.torque', 'continuous.power', 'standstill'].map((key) => read(`motor.${key}`));
  const inertia = read('motor.inertia');
  const inertiaPerTorque = read('motor.inertia.perTorque');
  const losses = lossReader(read);
  return (figures, motor) => {
    motor.peakTorqueNm = figures[torque];
    motor.baseSpeedRadPerS = figures[base];
    motor.peakPowerW = motor.peakTorqueNm * motor.baseSpeedRadPerS;
    const curve = figures[curveCell];
    const map = figures[mapCell];
    motor.fullLoad = Number.isNaN(curve) ? study.fullLoad : study.optionCurves[curve].data;
    motor.lossMap = Number.isNaN(map) ? study.lossMap : study.optionMaps[map].data;
    motor.maxSpeedRadPerS = motor.fullLoad === null ? figures[top] : curveMaxSpeedRadPerS(motor.fullLoad, motor.baseSpeedRadPerS);
    motor.constantPowerToRadPerS = orElse(figures[constantTo], motor.maxSpeedRadPerS);
    motor.continuousTorqueShare = figures[torqueShare];
    motor.continuousPowerShare = figures[powerShare];
    motor.standstillShare = orElse(figures[standstill], 1);
    motor.rotorInertiaKgM2 = orElse(figures[inertia], orZero(figures[inertiaPerTorque]) * motor.peakTorqueNm);
    losses(figures, motor);
  };
}

function lossReader(read: ReadCell): (figures: Float64Array, motor: Motor) => void {
  const own = (key: string) => read(`motor.losses.${key}`);
  const hysteresis = own('hysteresis');
  const eddy = own('eddy');
  const windage = own('windage');
  const copper = own('copper');
  const acCopper = own('acCopper');
  const fieldWeakening = own('fieldWeakening');
  const inverter = [own('inverterFixed'), own('inverterLinear'), own('inverterSquare')] as const;
  return (figures, { losses }) => {
    losses.hysteresis = orZero(figures[hysteresis]);
    losses.eddyS = orZero(figures[eddy]);
    losses.windageS2 = orZero(figures[windage]);
    losses.copperWPerNm = orZero(figures[copper]);
    losses.acCopperS2 = orZero(figures[acCopper]);
    losses.fieldWeakening = orZero(figures[fieldWeakening]);
    losses.inverterFixed = orZero(figures[inverter[0]]);
    losses.inverterLinear = orZero(figures[inverter[1]]);
    losses.inverterSquare = orZero(figures[inverter[2]]);
  };
}

/** Gear 0 is the larger ratio, whichever stands first in a design whose ratios are varied apart. */
export function gearingReader(read: ReadCell): (figures: Float64Array, gearing: Gearing) => void {
  const single = read('gearing.ratio');
  const pair = [read('gearing.ratios.1'), read('gearing.ratios.2')] as const;
  const efficiency = read('gearing.efficiency');
  const efficiencies = [read('gearing.efficiency.1'), read('gearing.efficiency.2')] as const;
  const shiftTime = read('gearing.shiftTime');
  const drag = [read('gearing.dragTorque.fixed'), read('gearing.dragTorque.perSpeed')] as const;
  return (figures, gearing) => {
    const first = orElse(figures[pair[0]], figures[single]);
    const second = orElse(figures[pair[1]], first);
    const larger = first >= second ? 0 : 1;
    gearing.ratioCount = Number.isNaN(figures[pair[1]]) ? 1 : 2;
    gearing.ratios[larger] = first;
    gearing.ratios[1 - larger] = second;
    gearing.efficiencies[larger] = orElse(figures[efficiencies[0]], figures[efficiency]);
    gearing.efficiencies[1 - larger] = orElse(figures[efficiencies[1]], figures[efficiency]);
    gearing.shiftTimeS = orZero(figures[shiftTime]);
    gearing.dragFixedNm = orZero(figures[drag[0]]);
    gearing.dragPerSpeedNms = orZero(figures[drag[1]]);
  };
}

/** Without a battery section nothing limits and nothing is lost: any voltage does. */
export function batteryReader(read: ReadCell): (figures: Float64Array, battery: Battery) => void {
  const [voltage, resistance, perEnergy, discharge, charge, usable, efficiency] = [
    'voltage',
    'resistance',
    'resistance.perEnergy',
    'discharge',
    'regenerative',
    'usable',
    'chargingEfficiency',
  ].map((key) => read(`battery.${key}`));
  return (figures, battery) => {
    battery.voltageV = orElse(figures[voltage], 1);
    battery.resistanceOhm = orElse(figures[resistance], orZero(figures[perEnergy] / figures[usable]));
    battery.dischargeW = orElse(figures[discharge], Number.POSITIVE_INFINITY);
    battery.chargeW = orElse(figures[charge], Number.POSITIVE_INFINITY);
    battery.usableJ = figures[usable];
    battery.chargingEfficiency = figures[efficiency];
  };
}

/** Masses or costs that follow the design. */
export function budgetReader(kind: 'mass' | 'cost', read: ReadCell): (figures: Float64Array, vehicle: Vehicle) => Budget {
  const own = (key: string) => read(`massAndCost.${kind}.${key}`);
  const cellOf: Record<keyof BudgetTerms, number> = {
    motorFixed: own('motor.fixed'),
    motorPerNm: own('motor.perTorque'),
    inverterFixed: own('inverter.fixed'),
    inverterPerW: own('inverter.perPower'),
    gearingFixed: own('gearing.fixed'),
    gearingPerNm: own('gearing.perTorque'),
    gearingPerExtraRatio: own('gearing.perExtraRatio'),
    batteryPerJ: own('battery.perEnergy'),
  };
  return (figures, { motor, gearing, battery }) => {
    // Written out: records of one fixed shape never come into being.
    const terms: BudgetTerms = {
      motorFixed: figures[cellOf.motorFixed],
      motorPerNm: figures[cellOf.motorPerNm],
      inverterFixed: figures[cellOf.inverterFixed],
      inverterPerW: figures[cellOf.inverterPerW],
      gearingFixed: figures[cellOf.gearingFixed],
      gearingPerNm: figures[cellOf.gearingPerNm],
      gearingPerExtraRatio: figures[cellOf.gearingPerExtraRatio],
      batteryPerJ: figures[cellOf.batteryPerJ],
    };
    return driveBudget(terms, {
      peakTorqueNm: motor.peakTorqueNm,
      peakPowerW: motor.peakPowerW,
      largestRatio: gearing.ratios[0],
      ratioCount: gearing.ratioCount,
      usableJ: battery.usableJ,
    });
  };
}

/** The road load of the whole train, from coefficients or from a coast-down; the last air density is remembered. */
export function roadReader(read: ReadCell): (figures: Float64Array, of: LoadCells, vehicle: Vehicle) => RoadLoad {
  const coast = [read('vehicle.coastDown.f0'), read('vehicle.coastDown.f1'), read('vehicle.coastDown.f2'), read('vehicle.coastDown.at')] as const;
  const rolling = [read('vehicle.rolling.c0'), read('vehicle.rolling.c1')] as const;
  const dragArea = read('vehicle.dragArea');
  const airDensity = densityReader(read);
  return (figures, of, { movedMassKg, carriedMassKg }) => {
    if (!Number.isNaN(figures[coast[0]])) {
      return roadLoadFromCoastDown({
        f0N: figures[coast[0]],
        f1NSPerM: orZero(figures[coast[1]]),
        f2NS2PerM2: orZero(figures[coast[2]]),
        referenceMassKg: figures[coast[3]],
        movedMassKg,
        carriedMassKg,
      });
    }
    return roadLoadFromCoefficients({
      movedMassKg,
      carriedMassKg,
      rollingC0: figures[rolling[0]],
      rollingC1S2PerM2: orZero(figures[rolling[1]]),
      dragAreaM2: figures[dragArea],
      trailerDragAreaM2: orZero(figures[of.trailerDragArea]),
      airDensityKgPerM3: airDensity(figures),
      headWindMPerS: orZero(figures[of.headWind]),
    });
  };
}

function densityReader(read: ReadCell): (figures: Float64Array) => number {
  const density = read('air.density');
  const altitude = read('air.altitude');
  const temperature = read('air.temperature');
  let lastAltitudeM = Number.NaN;
  let lastTemperatureK = Number.NaN;
  let lastDensity = Number.NaN;
  return (figures) => {
    const given = figures[density];
    if (!Number.isNaN(given)) return given;
    const altitudeM = orZero(figures[altitude]);
    const temperatureK = orElse(figures[temperature], STANDARD_TEMPERATURE_K);
    if (altitudeM !== lastAltitudeM || temperatureK !== lastTemperatureK) {
      lastDensity = standardDensityKgPerM3(altitudeM, temperatureK);
      lastAltitudeM = altitudeM;
      lastTemperatureK = temperatureK;
    }
    return lastDensity;
  };
}
