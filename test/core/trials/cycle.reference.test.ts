/** Cycle trials against numbers from outside. */
import { readFileSync } from 'node:fs';
import { csvParse } from 'd3-dsv';
import { describe, expect, it } from 'vitest';
import { compileCycle } from '../../../src/core/trials/compiled-cycle.ts';
import { type CycleResult, createCycleResult, runCycle } from '../../../src/core/trials/cycle.ts';
import { roadLoadFromCoastDown } from '../../../src/core/vehicle/road-load.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { compare } from '../../reference-table.ts';
import { sampleBattery, sampleGearing, sampleMotor, sampleVehicle } from '../vehicle/sample-vehicle.ts';
import { onTheLevel, readSchedule, scheduleNames } from './schedules.ts';

const KG_PER_LB = 0.45359237;
const N_PER_LBF = 4.4482216152605;
const M_PER_S_PER_MPH = 0.44704;
const J_PER_M_PER_WH_PER_KM = 3.6;

/** The test car rows of test/data/epa-bev.csv: source, units and conditions stand in its head. */
function readCars(): Record<string, string>[] {
  const text = readFileSync(new URL('../../data/epa-bev.csv', import.meta.url), 'utf8');
  return csvParse(
    text
      .split('\n')
      .filter((line) => !line.startsWith('#'))
      .join('\n'),
  );
}

/** A car of the list with an invented drive of usual losses: single ratio, about 100 kW per tonne of its test weight. */
function carWithUsualDrive(car: Record<string, string>): Vehicle {
  const massKg = Number(car.etw_lb) * KG_PER_LB;
  const road = roadLoadFromCoastDown({
    f0N: Number(car.A_lbf) * N_PER_LBF,
    f1NSPerM: (Number(car.B_lbf_per_mph) * N_PER_LBF) / M_PER_S_PER_MPH,
    f2NS2PerM2: (Number(car.C_lbf_per_mph2) * N_PER_LBF) / M_PER_S_PER_MPH ** 2,
    referenceMassKg: massKg,
    movedMassKg: massKg,
    carriedMassKg: massKg,
  });
  return sampleVehicle({
    motor: sampleMotor({ peakTorqueNm: 0.15 * massKg, baseSpeedRadPerS: 500, constantPowerToRadPerS: 1600, maxSpeedRadPerS: 1600 }),
    gearing: sampleGearing({ ratios: [9, Number.NaN], dragFixedNm: 0, dragPerSpeedNms: 0 }),
    battery: sampleBattery({ dischargeW: Number.POSITIVE_INFINITY }),
    regeneration: { share: 1, fromMPerS: 5 / 3.6, fullMPerS: 15 / 3.6 },
    road,
    auxiliariesW: 300,
    carriedMassKg: massKg,
    movedMassKg: massKg,
    effectiveMassKg: [massKg, massKg],
  });
}

describe('battery-electric cars of the annual test car lists', () => {
  const cars = readCars();
  const [udds, hwfet] = ['udds', 'hwfet'].map((name) => compileCycle(readSchedule(name), onTheLevel));

  function driven(car: Record<string, string>, cycle: typeof udds): CycleResult {
    const result = createCycleResult();
    runCycle(carWithUsualDrive(car), cycle, result);
    return result;
  }

  it('asks at the wheels what was computed independently from test weight and road load', () => {
    expect(cars.length).toBe(60);
    for (const car of cars) {
      for (const [name, cycle] of [
        ['udds', udds],
        ['hwfet', hwfet],
      ] as const) {
        const result = driven(car, cycle);
        const [demand, braking] = [Number(car[`${name}_pos_Wh_km`]), Number(car[`${name}_brake_Wh_km`])];
        const source = 'EPA, Data on Cars used for Testing Fuel Economy: A, B, C; wheel energy computed independently';
        const of = `${car.make} ${car.model} ${car.test_vehicle}, ${name}`;
        compare({ check: `${of}: wheel demand, Wh/km`, source, expected: demand, got: result.wheelDemandJPerM / J_PER_M_PER_WH_PER_KM, within: 1e-5 });
        compare({ check: `${of}: wheel braking, Wh/km`, source, expected: braking, got: result.wheelBrakingJPerM / J_PER_M_PER_WH_PER_KM, within: 1e-5 });
      }
    }
  });

  // What the wall pays for: all losses between wall and wheels, and on the schedule in town what braking does not return.
  const highwayBand = [0.73, 0.95];
  const townBand = [0.41, 0.61];
  const within = (share: number, [from, to]: number[]) => share >= from && share <= to;

  it('finds nine in ten of the published wall figures in the bands of wheel energy over wall energy', () => {
    const highway = cars.filter((car) => within(Number(car.hwfet_pos_Wh_km) / Number(car.hwfet_wall_Wh_km), highwayBand));
    const town = cars.filter((car) => within((Number(car.udds_pos_Wh_km) - Number(car.udds_brake_Wh_km)) / Number(car.udds_wall_Wh_km), townBand));
    expect(highway.length / cars.length).toBeGreaterThanOrEqual(0.9);
    expect(town.length / cars.length).toBeGreaterThanOrEqual(0.9);
  });

  it('lands inside both bands with a usual drive on the road load of every car', () => {
    for (const car of cars) {
      const [highway, town] = [driven(car, hwfet), driven(car, udds)];
      expect([highway.offTrace, town.offTrace], car.model).toEqual([0, 0]);
      expect(within(highway.wheelDemandJPerM / highway.gridEnergyJPerM, highwayBand), `${car.model} on the highway`).toBe(true);
      expect(within((town.wheelDemandJPerM - town.wheelBrakingJPerM) / town.gridEnergyJPerM, townBand), `${car.model} in town`).toBe(true);
    }
  });
});

// UN GTR No. 15 Annex 1; 40 CFR Part 86 Appendix I and Part 600 Appendix I: the totals as the heads of the files give them.
describe('schedules', () => {
  /** Half of the last digit printed. */
  const rounding = (printed: string) => 0.5 * 10 ** -(printed.split('.')[1] ?? '').length;
  const units: [string, RegExp, number][] = [
    ['distance', /([\d.]+) km,/, 1000],
    ['distance', /([\d.]+) mi,/, 1609.344],
    ['top speed', /, ([\d.]+) km\/h/, 1 / 3.6],
    ['top speed', /, ([\d.]+) mph/, M_PER_S_PER_MPH],
    ['mean speed', /mean ([\d.]+) mph/, M_PER_S_PER_MPH],
    ['time', /([\d.]+) s,/, 1],
  ];

  it.each(scheduleNames)('have the published totals: %s', (name) => {
    const schedule = readSchedule(name);
    const checked = schedule.head.split('Checked: ')[1];
    const { totalS, distanceM } = compileCycle(schedule, onTheLevel);
    // The file of US06 runs on for 4 s at rest after the 596 s that are published.
    const publishedS = name === 'us06' ? 596 : totalS;
    const totals: Record<string, number> = {
      time: totalS,
      distance: distanceM,
      'top speed': Math.max(...schedule.speedsMPerS),
      'mean speed': distanceM / publishedS,
    };
    let compared = 0;
    for (const [what, pattern, unit] of units) {
      const printed = pattern.exec(checked)?.[1];
      if (printed === undefined) continue;
      compared++;
      const [expected, got] = [Number(printed), totals[what] / unit];
      compare({
        check: `schedule ${name}: ${what}`,
        source: 'UN GTR No. 15 Annex 1 or 40 CFR Parts 86 and 600 Appendix I',
        expected,
        got,
        within: rounding(printed) / expected,
      });
    }
    expect(compared).toBeGreaterThanOrEqual(3);
  });

  it.each([
    ['wltc-2', [11162.2, 17054.3, 24450.6, 28869.8]],
    ['wltc-3b', [11140.3, 17121.2, 25782.2, 29714.9]],
  ])('have the published sums of speed by phase: %s', (name, published) => {
    const cycle = compileCycle(readSchedule(name), onTheLevel);
    const ends = [589, 1022, 1477, 1800];
    const sums = [0, 0, 0, 0];
    cycle.stepOfTrace.forEach((step, i) => {
      sums[ends.findIndex((end) => step < end)] += cycle.speedMPerS[i] * cycle.durationS[i] * 3.6;
    });
    published.forEach((sum, phase) => {
      compare({
        check: `schedule ${name}: sum of speed in phase ${phase + 1}, km/h`,
        source: 'UN GTR No. 15 Annex 1',
        expected: sum,
        got: sums[phase],
        within: 0.05 / sum,
      });
    });
  });
});

// Conservation of energy.
describe('a closed cycle without losses in the drive', () => {
  it.each(scheduleNames)('needs at the wheels, net, what the road takes: %s', (name) => {
    const losses = {
      hysteresis: 0,
      eddyS: 0,
      windageS2: 0,
      copperWPerNm: 0,
      acCopperS2: 0,
      fieldWeakening: 0,
      inverterFixed: 0,
      inverterLinear: 0,
      inverterSquare: 0,
    };
    const vehicle = sampleVehicle({
      motor: sampleMotor({ losses, peakTorqueNm: 900 }),
      gearing: sampleGearing({ efficiencies: [1, 1], dragFixedNm: 0, dragPerSpeedNms: 0 }),
      battery: sampleBattery({ resistanceOhm: 0, dischargeW: Number.POSITIVE_INFINITY, chargeW: Number.POSITIVE_INFINITY }),
      regeneration: { share: 1, fromMPerS: 0, fullMPerS: 0 },
      auxiliariesW: 0,
    });
    const result = createCycleResult();
    runCycle(vehicle, compileCycle(readSchedule(name), onTheLevel), result);
    const roadJPerM = result.rollingJPerM + result.airJPerM;
    expect(result.offTrace).toBe(0);
    const source = 'conservation of energy';
    compare({
      check: `closed ${name} without losses: net wheel energy, J/m`,
      source,
      expected: roadJPerM,
      got: result.wheelDemandJPerM - result.wheelBrakingJPerM,
      within: 1e-9,
    });
    compare({ check: `closed ${name} without losses: battery energy, J/m`, source, expected: roadJPerM, got: result.batteryEnergyJPerM, within: 1e-9 });
    expect(result.recovered).toBeCloseTo(1, 12);
  });
});
