/** A study in US customary units from head to foot, its files too: the same study as in SI, figure by figure and design by design. */
import { describe, expect, it } from 'vitest';
import type { Study } from '../../../src/core/study/study.ts';
import { map, metricsOf } from './options.ts';
import { studyOf } from './study-from-disk.ts';

/** By definition: the international yard and pound agreement of 1959 and standard gravity; horsepower as the study file states it. */
const LB = 0.45359237;
const FT = 0.3048;
const IN = FT / 12;
const MI = 5280 * FT;
const MPH = MI / 3600;
const LBF = LB * 9.80665;
const HP = 745.69987;
const RPM = (2 * Math.PI) / 60;

/** Figures of the vehicle and its drive: dotted name, as written in US units, SI. */
const figures: readonly (readonly [name: string, written: string, si: number])[] = [
  ['vehicle.kerbMass', '4200 lb', 4200 * LB],
  ['vehicle.wheelRadius', '13.5 in', 13.5 * IN],
  ['vehicle.wheelInertia', '120 lb·ft²', 120 * LB * FT * FT],
  ['vehicle.coastDown.f0', '38.5 lbf', 38.5 * LBF],
  ['vehicle.coastDown.f1', '0.21 lbf/mph', (0.21 * LBF) / MPH],
  ['vehicle.coastDown.f2', '0.0205 lbf/mph²', (0.0205 * LBF) / MPH ** 2],
  ['vehicle.coastDown.at', '4750 lb', 4750 * LB],
  ['vehicle.axles.centreHeight', '27 in', 27 * IN],
  ['vehicle.axles.wheelbase', '9.75 ft', 9.75 * FT],
  ['vehicle.regeneration.from', '3 mph', 3 * MPH],
  ['vehicle.auxiliaries', '0.6 hp', 0.6 * HP],
  ['motor.peakTorque', '210 lbf·ft', 210 * LBF * FT],
  ['motor.baseSpeed', '4300 rpm', 4300 * RPM],
  ['motor.inertia.perTorque', '0.0048 lb·ft²/(lbf·ft)', (0.0048 * LB * FT) / LBF],
  ['gearing.dragTorque.fixed', '0.3 lb·ft', 0.3 * LBF * FT],
  ['gearing.dragTorque.perSpeed', '4e-5 lbf·ft/rpm', (4e-5 * LBF * FT) / RPM],
  ['battery.discharge', '215 hp', 215 * HP],
  ['massAndCost.mass.motor.fixed', '26 lbs', 26 * LB],
  ['massAndCost.mass.motor.perTorque', '0.42 lb/(lbf·ft)', (0.42 * LB) / (LBF * FT)],
  ['massAndCost.mass.inverter.perPower', '0.1 lb/hp', (0.1 * LB) / HP],
  ['massAndCost.mass.battery.perEnergy', '13 lb/kWh', (13 * LB) / 3.6e6],
  ['massAndCost.cost.motor.perTorque', '3.2 /(lb·ft)', 3.2 / (LBF * FT)],
  ['massAndCost.cost.inverter.perPower', '3.5 /hp', 3.5 / HP],
  ['trials.sprint.to', '50 mph', 50 * MPH],
  ['trials.sprint.trailer.mass', '1500 lb', 1500 * LB],
  ['trials.quarter.distance', '0.25 mi', 0.25 * MI],
  ['trials.hill.startAcceleration', '1 ft/s²', FT],
  ['trials.round.payload', '650 lb', 650 * LB],
  ['trials.round.capSpeed', '41 mph', 41 * MPH],
];

/** The study with every one of these figures written by `write`; the same names may come in any order. */
function studyText(write: (name: string, written: string, si: number) => string, files: { round: string; road: string; map: string }, limits: string): string {
  const texts = new Map(figures.map(([name, written, si]) => [name, write(name, written, si)]));
  const at = (name: string) => texts.get(name) ?? '';
  const section = (prefix: string, ...keys: string[]) => `{ ${keys.map((key) => `${key}: ${at(`${prefix}.${key}`)}`).join(', ')} }`;
  return `
title: Pier tender
about: Invented for a test.
vehicle:
  kerbMass: ${at('vehicle.kerbMass')}
  wheelRadius: ${at('vehicle.wheelRadius')}
  wheelInertia: ${at('vehicle.wheelInertia')}
  coastDown: ${section('vehicle.coastDown', 'f0', 'f1', 'f2', 'at')}
  axles: { driven: front, adhesion: 0.8, frontShare: 55 %, centreHeight: ${at('vehicle.axles.centreHeight')}, wheelbase: ${at('vehicle.axles.wheelbase')} }
  regeneration: { from: ${at('vehicle.regeneration.from')} }
  auxiliaries: ${at('vehicle.auxiliaries')}
motor:
  peakTorque: ${at('motor.peakTorque')}
  baseSpeed: ${at('motor.baseSpeed')}
  maxSpeed: 12000 rpm
  continuous: { torque: 52 %, power: 58 % }
  inertia: { perTorque: ${at('motor.inertia.perTorque')} }
  map: ${files.map}
gearing: { ratio: 9.5, efficiency: 97 %, dragTorque: ${section('gearing.dragTorque', 'fixed', 'perSpeed')} }
battery: { voltage: 390 V, resistance: 0.09 Ω, discharge: ${at('battery.discharge')}, regenerative: 90 kW, usable: 58 kWh, chargingEfficiency: 89 % }
massAndCost:
  mass:
    motor: ${section('massAndCost.mass.motor', 'fixed', 'perTorque')}
    inverter: ${section('massAndCost.mass.inverter', 'perPower')}
    battery: ${section('massAndCost.mass.battery', 'perEnergy')}
  cost:
    currency: USD
    motor: ${section('massAndCost.cost.motor', 'perTorque')}
    inverter: ${section('massAndCost.cost.inverter', 'perPower')}
trials:
  sprint: { kind: acceleration, from: 0 mph, to: ${at('trials.sprint.to')}, trailer: { mass: ${at('trials.sprint.trailer.mass')} } }
  quarter: { kind: standing distance, distance: ${at('trials.quarter.distance')} }
  hill: { kind: hill start, startAcceleration: ${at('trials.hill.startAcceleration')} }
  round: { kind: cycle, cycle: ${files.round}, road: ${files.road}, payload: ${at('trials.round.payload')}, capSpeed: ${at('trials.round.capSpeed')} }
${limits}
`;
}

/** Columns of a CSV file converted, each by its factor. */
function converted(csv: string, head: string, factors: readonly number[]): string {
  const [, ...rows] = csv.trim().split('\n');
  return [head, ...rows.map((row) => row.split(',').map((cell, index) => Number(cell) / (factors[index] as number)))].join('\n');
}

const round = 'time_s,speed_kmh\n0,0\n10,36\n30,72\n50,72\n70,0\n80,0\n';
const road = 'distance_m,grade_pct\n0,0\n200,6\n500,-4\n900,0\n';
const plainMap = map.split('\n').slice(1).join('\n');
const covers = '# covers: motor and inverter\n';
const files = {
  'round.csv': round,
  'road.csv': road,
  'map.csv': map,
  'round-us.csv': converted(round, 'time_s,speed_mph', [1, MPH * 3.6]),
  'road-us.csv': converted(road, 'distance_ft,grade_pct', [FT, 1]),
  'map-us.csv': covers + converted(plainMap, 'speed_rpm,torque_lbf_ft,loss_hp', [1, LBF * FT, HP]),
};

const SI_UNITS: Readonly<Record<string, string>> = {
  lb: 'kg',
  lbs: 'kg',
  in: 'm',
  ft: 'm',
  mi: 'm',
  'lb·ft²': 'kg·m²',
  lbf: 'N',
  'lbf/mph': 'N/(m/s)',
  'lbf/mph²': 'N/(m/s)²',
  mph: 'm/s',
  hp: 'W',
  lbf·ft: 'N·m',
  lb·ft: 'N·m',
  rpm: 'rad/s',
  'lb·ft²/(lbf·ft)': 'kg·m²/(N·m)',
  'lbf·ft/rpm': 'N·m·s',
  'lb/(lbf·ft)': 'kg/(N·m)',
  '/(lb·ft)': '/(N·m)',
  'ft/s²': 'm/s²',
};
/** Units whose SI counterpart in a study file is not the plain SI unit: symbol and its size. */
const SCALED: Readonly<Record<string, readonly [symbol: string, size: number]>> = {
  'lb/hp': ['kg/kW', 1e-3],
  'lb/kWh': ['kg/kWh', 1 / 3.6e6],
  '/hp': ['/kW', 1e-3],
};

function inSi(_: string, written: string, si: number): string {
  const unit = written.slice(written.indexOf(' ') + 1);
  const [symbol, size] = SCALED[unit] ?? [SI_UNITS[unit] as string, 1];
  return `${si / size} ${symbol}`;
}

const limits = (units: 'US' | 'SI') =>
  units === 'US'
    ? 'requirements: { round.batteryEnergy: { atMost: 500 Wh/mi }, quarter.endSpeed: { atLeast: 60 mph }, driveUnit.mass: { atMost: 300 lb } }\nreport: { units: US }'
    : `requirements: { round.batteryEnergy: { atMost: ${(500 * 1000) / MI} Wh/km }, quarter.endSpeed: { atLeast: ${60 * MPH} m/s }, driveUnit.mass: { atMost: ${300 * LB} kg } }`;
const us = studyOf(
  studyText((_, written) => written, { round: 'round-us.csv', road: 'road-us.csv', map: 'map-us.csv' }, limits('US')),
  files,
);
const si = studyOf(studyText(inSi, { round: 'round.csv', road: 'road.csv', map: 'map.csv' }, limits('SI')), files);

function expectClose(value: number | undefined, wanted: number, within = 1e-14): void {
  expect(Math.abs((value ?? Number.NaN) - wanted)).toBeLessThanOrEqual(within * Math.abs(wanted));
}

describe('a study in US customary units', () => {
  it.each(figures)('has %s of %s by the definition of its unit', (name, _, wanted) => {
    expectClose(us.values[name], wanted);
  });

  it('has the traces, the road, the map and the limits of the same study in SI', () => {
    const measured = ({ trials, lossMap, requirements }: Study): number[] => {
      const { trace, road: profile } = trials.find(({ name }) => name === 'round') as Study['trials'][number];
      const limitsOf = requirements.map(({ limit }) => limit);
      return [trace?.speedsMPerS, profile?.at, profile?.grades, lossMap?.torquesNm, lossMap?.lossesW, limitsOf].flatMap((values) => values ?? [Number.NaN]);
    };
    const [inUs, wanted] = [measured(us), measured(si)];
    expect(inUs).toHaveLength(wanted.length);
    expect(wanted).not.toContain(Number.NaN);
    for (const [index, value] of wanted.entries()) expectClose(inUs[index], value);
    expect(us.requirements.map(({ metric }) => metric)).toEqual(si.requirements.map(({ metric }) => metric));
  });

  it('computes the same design', () => {
    const [inUs, wanted] = [us, si].map((study) => metricsOf(study)[0] as number[]);
    expect(inUs).toHaveLength(wanted?.length ?? Number.NaN);
    for (const [index, value] of (wanted ?? []).entries()) {
      if (Number.isNaN(value)) expect(inUs?.[index]).toBeNaN();
      // Sums of gains and losses that cancel keep the rounding of their parts.
      else expect(Math.abs((inUs?.[index] as number) - value)).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(value)));
    }
  });

  it('is only read in US units where it asks for that', () => {
    expect([us.report.units, si.report.units]).toEqual(['US', 'SI']);
  });
});
