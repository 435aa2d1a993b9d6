/** From a study's numbers to one design as the laws of motion see it: its drive, its masses, its load on a trial. */
import type { Study } from '../study/study.ts';
import { type Budget, budgetTotal } from '../vehicle/budget.ts';
import { massFactor } from '../vehicle/mass.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import type { FigureCells } from './figures.ts';
import { batteryReader, budgetReader, gearingReader, type LoadCells, motorReader, orZero, type ReadCell, roadReader } from './read-figures.ts';

/** How far above zero a payload may fall short and still count as none, as a share of vehicle mass. */
const PAYLOAD_SLACK = 1e-9;

/** One trial's own load. */
export interface TrialLoad {
  payloadKg: number;
  tooHeavy: boolean;
}

/** Fills one vehicle record from the figures, as often as asked; a design that contradicts itself is said, not thrown. */
export interface Assembler {
  readonly vehicle: Vehicle;
  /** Masses (kg) and costs (the study's currency) of the last design filled. */
  readonly budget: { readonly mass: Budget; readonly cost: Budget };
  /** Kerb mass and the masses that follow the design, kg. */
  vehicleMassKg(): number;
  /** Mass factor in the largest ratio at a moved mass. */
  massFactorAt(movedMassKg: number): number;
  /** Drive, battery, axles, masses. False: base speed, constant-power end and maximum speed are out of order. */
  fillDrive(figures: Float64Array): boolean;
  /** Load, road and effective mass for the trial of that name, after fillDrive. */
  fillLoad(figures: Float64Array, trial: string): TrialLoad;
}

/** Compiles the reading of a study's figures. Not shared between threads. */
export function createAssembler(study: Study, cells: FigureCells): Assembler {
  const read = (name: string) => cells.cell(name);
  const motorOf = motorReader(study, read);
  const gearingOf = gearingReader(read);
  const batteryOf = batteryReader(read);
  const massOf = budgetReader('mass', read);
  const costOf = budgetReader('cost', read);
  const roadOf = roadReader(read);
  const loadCells = new Map(study.trials.map((trial) => [trial.name, loadCellsOf(trial.name, read)]));

  const kerbMass = read('vehicle.kerbMass');
  const radius = read('vehicle.wheelRadius');
  const wheelInertia = read('vehicle.wheelInertia');
  const fixedFactor = read('vehicle.massFactor');
  const auxiliaries = read('vehicle.auxiliaries');
  const axleCells = [
    read('vehicle.axles.adhesion'),
    read('vehicle.axles.frontShare'),
    read('vehicle.axles.centreHeight'),
    read('vehicle.axles.wheelbase'),
  ] as const;
  const regenerationCells = [read('vehicle.regeneration.share'), read('vehicle.regeneration.from'), read('vehicle.regeneration.full')] as const;

  const vehicle = blankVehicle(study.driven);
  const load: TrialLoad = { payloadKg: 0, tooHeavy: false };
  const budget = { mass: { driveUnit: Number.NaN, battery: Number.NaN }, cost: { driveUnit: Number.NaN, battery: Number.NaN } };
  let massKg = Number.NaN;
  let inertiaKgM2 = 0;
  let factor = Number.NaN;

  function factorInGear(gear: 0 | 1, movedMassKg: number): number {
    return Number.isNaN(factor)
      ? massFactor(inertiaKgM2, vehicle.motor.rotorInertiaKgM2, vehicle.gearing.ratios[gear], movedMassKg, vehicle.wheelRadiusM)
      : factor;
  }

  return {
    vehicle,
    budget,
    vehicleMassKg: () => massKg,
    massFactorAt: (movedMassKg) => factorInGear(0, movedMassKg),
    fillDrive(figures) {
      motorOf(figures, vehicle.motor);
      gearingOf(figures, vehicle.gearing);
      batteryOf(figures, vehicle.battery);
      budget.mass = massOf(figures, vehicle);
      budget.cost = costOf(figures, vehicle);
      massKg = figures[kerbMass] + budgetTotal(budget.mass);
      vehicle.wheelRadiusM = figures[radius];
      vehicle.auxiliariesW = orZero(figures[auxiliaries]);
      inertiaKgM2 = orZero(figures[wheelInertia]);
      factor = figures[fixedFactor];
      const { axles, regeneration } = vehicle;
      axles.adhesion = figures[axleCells[0]];
      axles.frontShare = figures[axleCells[1]];
      axles.centreHeightM = figures[axleCells[2]];
      axles.wheelbaseM = figures[axleCells[3]];
      regeneration.share = figures[regenerationCells[0]];
      regeneration.fromMPerS = figures[regenerationCells[1]];
      regeneration.fullMPerS = figures[regenerationCells[2]];
      const { baseSpeedRadPerS, constantPowerToRadPerS, maxSpeedRadPerS } = vehicle.motor;
      return baseSpeedRadPerS <= constantPowerToRadPerS && constantPowerToRadPerS <= maxSpeedRadPerS;
    },
    fillLoad(figures, trial) {
      const of = loadCells.get(trial) as LoadCells;
      fillPayload(load, figures, of, massKg);
      vehicle.carriedMassKg = massKg + load.payloadKg;
      vehicle.movedMassKg = vehicle.carriedMassKg + orZero(figures[of.trailerMass]);
      vehicle.road = roadOf(figures, of, vehicle);
      vehicle.effectiveMassKg[0] = factorInGear(0, vehicle.movedMassKg) * vehicle.movedMassKg;
      vehicle.effectiveMassKg[1] = factorInGear(1, vehicle.movedMassKg) * vehicle.movedMassKg;
      return load;
    },
  };
}

function loadCellsOf(trial: string, read: ReadCell): LoadCells {
  const own = (key: string) => read(`trials.${trial}.${key}`);
  return {
    payload: own('payload'),
    laden: own('laden'),
    trailerMass: own('trailer.mass'),
    trailerDragArea: own('trailer.dragArea'),
    headWind: own('headWind'),
  };
}

/** The payload as given, or what the laden mass leaves; short of nothing by rounding counts as none. */
function fillPayload(load: TrialLoad, figures: Float64Array, of: LoadCells, massKg: number): void {
  const ladenKg = figures[of.laden];
  const payloadKg = Number.isNaN(ladenKg) ? orZero(figures[of.payload]) : ladenKg - massKg;
  load.tooHeavy = payloadKg < -PAYLOAD_SLACK * massKg;
  load.payloadKg = Math.max(0, payloadKg);
}

/** A record with every field there, so that all designs share one shape; fillDrive and fillLoad write each of them. */
function blankVehicle(driven: Study['driven']): Vehicle {
  const no = Number.NaN;
  return {
    motor: {
      peakTorqueNm: no,
      baseSpeedRadPerS: no,
      constantPowerToRadPerS: no,
      maxSpeedRadPerS: no,
      peakPowerW: no,
      continuousTorqueShare: no,
      continuousPowerShare: no,
      standstillShare: no,
      rotorInertiaKgM2: no,
      losses: {
        hysteresis: no,
        eddyS: no,
        windageS2: no,
        copperWPerNm: no,
        acCopperS2: no,
        fieldWeakening: no,
        inverterFixed: no,
        inverterLinear: no,
        inverterSquare: no,
      },
      lossMap: null,
      fullLoad: null,
    },
    gearing: { ratioCount: 1, ratios: [no, no], efficiencies: [no, no], shiftTimeS: no, dragFixedNm: no, dragPerSpeedNms: no },
    battery: { voltageV: no, resistanceOhm: no, dischargeW: no, chargeW: no, usableJ: no, chargingEfficiency: no },
    axles: { driven, adhesion: no, frontShare: no, centreHeightM: no, wheelbaseM: no },
    regeneration: { share: no, fromMPerS: no, fullMPerS: no },
    road: {
      rollingN: no,
      rollingPerSpeed2NS2PerM2: no,
      airLinearNSPerM: no,
      airSquareNS2PerM2: no,
      dragNS2PerM2: no,
      headWindMPerS: no,
      weightN: no,
      carriedRollingN: no,
      carriedRollingPerSpeed2NS2PerM2: no,
    },
    wheelRadiusM: no,
    auxiliariesW: no,
    carriedMassKg: no,
    movedMassKg: no,
    effectiveMassKg: [no, no],
  };
}
