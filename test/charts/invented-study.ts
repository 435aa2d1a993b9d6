/** The invented study behind the invented report: a parcel van, checked and in SI, as the study room would give it. */
import type { Axis, Requirement, Study, Trial } from '../../src/core/study/study.ts';

const REV_PER_MIN = (2 * Math.PI) / 60;

function steps(from: number, to: number, count: number): number[][] {
  return Array.from({ length: count }, (_, index) => [from + ((to - from) * index) / (count - 1)]);
}

function axis(name: string, from: number, to: number, count: number): Axis {
  return { name, sets: [name], points: steps(from, to, count), labels: null, range: { from, to, stepped: true } };
}

function trial(name: string, kind: Trial['kind'], more: Partial<Trial> = {}): Trial {
  return { name, kind, rating: kind === 'top speed' || kind === 'gradeability' ? 'continuous' : 'peak', with: {}, trace: null, road: null, ...more };
}

function requirement(metric: string, bound: Requirement['bound'], limit: number, implied = false): Requirement {
  return { metric, bound, limit, implied };
}

/** A short town round: away, along, and to rest again. */
const round = { name: 'quay round', timesS: [0, 4, 14, 40, 52, 60], speedsMPerS: [0, 0, 9, 13, 0, 0], notes: ['Invented for a test.'] };
const leg = { name: 'trunk leg', timesS: [0, 20, 200, 220], speedsMPerS: [0, 24, 25, 0], notes: ['Invented for a test.'] };

/** The study; `rampName` is the name of its hill start, which a test may fill with anything. */
export function inventedStudy({ title = 'Harbour parcel van', rampName = 'ramp' }: { title?: string; rampName?: string } = {}): Study {
  return {
    title,
    about: 'Cheapest drive unit that starts on the quay ramp fully laden and keeps the town round and the trunk leg frugal.',
    driven: 'front',
    tyre: '215/65 R16',
    currency: 'EUR',
    values: {
      'vehicle.kerbMass': 1780,
      'vehicle.dragArea': 1.12,
      'vehicle.rolling.c0': 0.0098,
      'vehicle.rolling.c1': 2.1e-6,
      'vehicle.wheelRadius': 0.333,
      'vehicle.wheelInertia': 5.2,
      'vehicle.axles.frontShare': 0.57,
      'vehicle.axles.centreHeight': 0.71,
      'vehicle.axles.wheelbase': 3.06,
      'vehicle.axles.adhesion': 0.85,
      'vehicle.regeneration.share': 0.7,
      'vehicle.regeneration.from': 5 / 3.6,
      'vehicle.regeneration.full': 15 / 3.6,
      'vehicle.auxiliaries': 420,
      'motor.peakTorque': 270,
      'motor.baseSpeed': 4300 * REV_PER_MIN,
      'motor.maxSpeed': 13000 * REV_PER_MIN,
      'motor.continuous.torque': 0.52,
      'motor.continuous.power': 0.58,
      'motor.standstill': 0.9,
      'motor.inertia.perTorque': 1.5e-4,
      'motor.losses.hysteresis': 1.2e-3,
      'motor.losses.eddy': 8e-7,
      'motor.losses.windage': 2e-10,
      'motor.losses.copper': 42,
      'motor.losses.acCopper': 1e-6,
      'motor.losses.fieldWeakening': 0.2,
      'motor.losses.inverterFixed': 0.0014,
      'motor.losses.inverterLinear': 0.018,
      'motor.losses.inverterSquare': 0.01,
      'gearing.ratio': 9.5,
      'gearing.efficiency': 0.97,
      'gearing.dragTorque.fixed': 0.4,
      'gearing.dragTorque.perSpeed': 0.0006,
      'battery.voltage': 390,
      'battery.resistance': 0.09,
      'battery.discharge': 160_000,
      'battery.regenerative': 90_000,
      'battery.usable': 58 * 3.6e6,
      'battery.chargingEfficiency': 0.89,
      'massAndCost.mass.motor.fixed': 12,
      'massAndCost.mass.motor.perTorque': 0.14,
      'massAndCost.mass.inverter.fixed': 5,
      'massAndCost.mass.inverter.perPower': 0.06e-3,
      'massAndCost.mass.gearing.fixed': 8,
      'massAndCost.mass.gearing.perTorque': 0.007,
      'massAndCost.cost.motor.fixed': 150,
      'massAndCost.cost.motor.perTorque': 2.4,
      'massAndCost.cost.inverter.fixed': 180,
      'massAndCost.cost.inverter.perPower': 4.6e-3,
      'massAndCost.cost.gearing.fixed': 110,
      'massAndCost.cost.gearing.perTorque': 0.1,
      'air.temperature': 293.15,
      'air.altitude': 0,
      [`trials.${rampName}.laden`]: 2800,
      [`trials.${rampName}.startAcceleration`]: 0.3,
      'trials.climb.at': 80 / 3.6,
      'trials.climb.laden': 2800,
      'trials.sprint.from': 0,
      'trials.sprint.to': 80 / 3.6,
      'trials.sprint.laden': 2800,
      'trials.cruise.laden': 2800,
      'trials.stops.payload': 400,
      'trials.trunk.payload': 400,
    },
    fullLoad: null,
    lossMap: null,
    optionCurves: [],
    optionMaps: [],
    trials: [
      trial(rampName, 'hill start', { with: { 'vehicle.axles.frontShare': 0.44 } }),
      trial('climb', 'gradeability'),
      trial('sprint', 'acceleration'),
      trial('cruise', 'top speed'),
      trial('stops', 'cycle', { trace: round }),
      trial('trunk', 'cycle', { trace: leg }),
    ],
    axes: [axis('gearing.ratio', 7.5, 12.25, 20), axis('motor.peakTorque', 180, 330, 11), axis('motor.baseSpeed', 3200 * REV_PER_MIN, 5600 * REV_PER_MIN, 9)],
    search: { method: 'grid' },
    requirements: [
      requirement(`${rampName}.grade`, 'atLeast', 0.2),
      requirement('climb.grade', 'atLeast', 0.06),
      requirement('sprint.time', 'atMost', 11.5),
      requirement('cruise.speed', 'atLeast', 130 / 3.6),
      requirement('driveUnit.axleTorque', 'atMost', 2900),
      requirement('stops.offTrace', 'atMost', 0, true),
    ],
    objectives: [
      { metric: 'stops.batteryEnergy', aim: 'minimise', resolution: 0.3 * 3.6 },
      { metric: 'trunk.batteryEnergy', aim: 'minimise', resolution: 0.3 * 3.6 },
      { metric: 'driveUnit.cost', aim: 'minimise', resolution: 10 },
    ],
    keep: [],
    report: { units: 'SI' },
  };
}
