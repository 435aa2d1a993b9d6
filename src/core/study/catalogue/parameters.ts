/**
 * The catalogue of parameters: every number a study can state, vary or set, by its dotted name. Schema, help, labels,
 * checks and the page are made from these rows; a new parameter is a row here and its reading in evaluate/assemble.ts.
 */
import type { Quantity } from '../../units/units.ts';

/** One parameter. Bounds are in SI and inclusive unless `above`/`below` says otherwise. */
export interface ParameterRow {
  /** Dotted name in the study file. */
  readonly name: string;
  readonly quantity: Quantity;
  /** What it is and where such a figure comes from, in one sentence. */
  readonly sentence: string;
  /** Short label for axes and tables. */
  readonly label: string;
  /** Must be given; otherwise `default` (SI) or nothing holds. */
  readonly required?: boolean;
  readonly default?: number;
  readonly atLeast?: number;
  readonly atMost?: number;
  readonly above?: number;
  readonly below?: number;
  /** Decimals for people who read SI; others get as many as tell about the same (units/format-quantity.ts). */
  readonly decimals: number;
}

type Bounds = Pick<ParameterRow, 'required' | 'default' | 'atLeast' | 'atMost' | 'above' | 'below'>;

function row(name: string, quantity: Quantity, decimals: number, label: string, sentence: string, bounds: Bounds = {}): ParameterRow {
  return { name, quantity, decimals, label, sentence, ...bounds };
}

const given = { required: true } as const;
const notNegative = { atLeast: 0 } as const;
const coefficient = { atLeast: 0, default: 0 } as const;

/** Numbers of the vehicle and its drive, in the order of the study file. Upper bounds are far beyond any road vehicle: they catch slips of units. */
export const parameters: readonly ParameterRow[] = [
  row('vehicle.kerbMass', 'mass', 0, 'kerb mass', 'Mass of the vehicle without driver and payload, and without the parts that massAndCost adds.', {
    ...given,
    above: 0,
    atMost: 100_000,
  }),
  row('vehicle.dragArea', 'area', 3, 'drag area', 'Drag coefficient times frontal area.', { atLeast: 0, atMost: 20 }),
  row('vehicle.rolling.c0', 'number', 5, 'rolling coefficient', 'Rolling resistance per weight at low speed.', { atLeast: 0, atMost: 0.2 }),
  row('vehicle.rolling.c1', 'perSpeedSquared', 8, 'rolling rise', 'Rise of the rolling coefficient with the square of speed.', {
    ...coefficient,
    atMost: 1e-3,
  }),
  row('vehicle.coastDown.f0', 'force', 2, 'coast-down f0', 'Constant coefficient of the coast-down road load, at its reference mass.', {
    atLeast: 0,
    atMost: 20_000,
  }),
  row('vehicle.coastDown.f1', 'forcePerSpeed', 4, 'coast-down f1', 'Linear coefficient of the coast-down road load; a fit may make it negative.', {
    atLeast: -500,
    atMost: 500,
  }),
  row('vehicle.coastDown.f2', 'forcePerSpeedSquared', 5, 'coast-down f2', 'Square coefficient of the coast-down road load.', { atLeast: 0, atMost: 50 }),
  row('vehicle.coastDown.at', 'mass', 0, 'coast-down reference mass', 'Mass at which the coast-down coefficients were measured.', {
    above: 0,
    atMost: 100_000,
  }),
  row('vehicle.wheelRadius', 'length', 4, 'wheel radius', 'Dynamic rolling radius of the driven wheels; a tyre size may stand instead.', {
    above: 0.05,
    atMost: 2,
  }),
  row('vehicle.wheelInertia', 'inertia', 2, 'wheel inertia', 'Moment of inertia of all wheels of the vehicle together, with what turns with them.', {
    ...notNegative,
    default: 0,
    atMost: 1000,
  }),
  row('vehicle.massFactor', 'number', 4, 'mass factor', 'Effective over actual mass, fixed for every ratio and load instead of the inertias.', {
    atLeast: 1,
    atMost: 3,
  }),
  row('vehicle.axles.adhesion', 'number', 2, 'adhesion', 'Coefficient of adhesion between driven tyres and road.', { above: 0, atMost: 2 }),
  row('vehicle.axles.frontShare', 'share', 0, 'front axle share', 'Static share of the weight on the front axle.', { atLeast: 0, atMost: 1 }),
  row('vehicle.axles.centreHeight', 'length', 2, 'centre of gravity height', 'Height of the centre of gravity above the road.', { atLeast: 0, atMost: 5 }),
  row('vehicle.axles.wheelbase', 'length', 2, 'wheelbase', 'Distance between front and rear axle.', { above: 0.3, atMost: 15 }),
  row(
    'vehicle.regeneration.share',
    'share',
    0,
    'regeneration share',
    'Share of the braking force that the driven axle may take; by default 100 % all-wheel, 70 % front, 50 % rear drive.',
    { atLeast: 0, atMost: 1 },
  ),
  row('vehicle.regeneration.from', 'speed', 1, 'regeneration from', 'Speed at which regeneration starts to fade in.', {
    ...notNegative,
    default: 5 / 3.6,
    atMost: 60,
  }),
  row('vehicle.regeneration.full', 'speed', 1, 'regeneration full', 'Speed from which the whole share is regenerated.', {
    ...notNegative,
    default: 15 / 3.6,
    atMost: 60,
  }),
  row('vehicle.auxiliaries', 'auxiliaryPower', 0, 'auxiliaries', 'Constant electrical power of everything that is not the drive.', {
    ...notNegative,
    default: 0,
    atMost: 100_000,
  }),
  row('motor.peakTorque', 'torque', 0, 'peak torque', 'Largest motor torque, held up to base speed.', { above: 0, atMost: 20_000 }),
  row('motor.baseSpeed', 'rotationalSpeed', 0, 'base speed', 'Motor speed at which peak torque meets peak power.', { above: 0, atMost: 10_000 }),
  row('motor.constantPowerTo', 'rotationalSpeed', 0, 'constant power to', 'Motor speed at which constant power ends; maximum speed where it is not stated.', {
    above: 0,
    atMost: 10_000,
  }),
  row('motor.maxSpeed', 'rotationalSpeed', 0, 'maximum motor speed', 'Motor speed never exceeded.', { above: 0, atMost: 10_000 }),
  row('motor.continuous.torque', 'share', 0, 'continuous torque', 'Continuous torque as a share of peak torque.', { above: 0, atMost: 1 }),
  row('motor.continuous.power', 'share', 0, 'continuous power', 'Continuous power as a share of peak power.', { above: 0, atMost: 1 }),
  row('motor.standstill', 'share', 0, 'standstill torque', 'Share of peak torque that the motor gives at a hill start.', { above: 0, atMost: 1, default: 1 }),
  row('motor.inertia', 'inertia', 4, 'rotor inertia', 'Moment of inertia of the rotor and all that turns with it.', {
    ...notNegative,
    atMost: 100,
  }),
  row('motor.inertia.perTorque', 'inertiaPerTorque', 6, 'rotor inertia per torque', 'Rotor inertia per peak torque.', {
    ...notNegative,
    atMost: 0.01,
  }),
  row('motor.losses.hysteresis', 'number', 5, 'hysteresis loss', 'Hysteresis loss per peak torque and motor speed.', { ...coefficient, atMost: 0.1 }),
  row('motor.losses.eddy', 'time', 8, 'eddy-current loss', 'Eddy-current loss per peak torque and motor speed squared.', { ...coefficient, atMost: 1e-3 }),
  row('motor.losses.windage', 'timeSquared', 11, 'windage loss', 'Windage and friction loss per peak torque and motor speed cubed.', {
    ...coefficient,
    atMost: 1e-6,
  }),
  row('motor.losses.copper', 'lossPerTorque', 1, 'copper loss', 'Winding loss at peak torque, over peak torque.', { ...coefficient, atMost: 1000 }),
  row('motor.losses.acCopper', 'timeSquared', 8, 'ac copper rise', 'Rise of winding loss with the square of motor speed (skin and proximity effect).', {
    ...coefficient,
    atMost: 1e-3,
  }),
  row('motor.losses.fieldWeakening', 'number', 2, 'field-weakening current', 'Field-weakening current as a share of peak current, far above base speed.', {
    ...coefficient,
    atMost: 2,
  }),
  row('motor.losses.inverterFixed', 'number', 4, 'inverter fixed loss', 'Inverter loss per peak power that is always there.', { ...coefficient, atMost: 0.2 }),
  row('motor.losses.inverterLinear', 'number', 4, 'inverter linear loss', 'Inverter loss per peak power, rising with current.', {
    ...coefficient,
    atMost: 0.2,
  }),
  row('motor.losses.inverterSquare', 'number', 4, 'inverter square loss', 'Inverter loss per peak power, rising with current squared.', {
    ...coefficient,
    atMost: 0.2,
  }),
  row('gearing.ratio', 'number', 3, 'ratio', 'Motor speed over wheel speed.', { above: 0.1, atMost: 100 }),
  row('gearing.ratios.1', 'number', 3, 'first ratio', 'Larger of two ratios (the lower gear).', { above: 0.1, atMost: 100 }),
  row('gearing.ratios.2', 'number', 3, 'second ratio', 'Smaller of two ratios (the higher gear).', { above: 0.1, atMost: 100 }),
  row('gearing.shiftTime', 'time', 2, 'shift time', 'Time without tractive force while shifting.', { ...notNegative, default: 0, atMost: 10 }),
  row('gearing.efficiency', 'share', 1, 'gearing efficiency', 'Mesh efficiency between motor and wheels, drag apart.', { above: 0.3, atMost: 1 }),
  row('gearing.efficiency.1', 'share', 1, 'first ratio efficiency', 'Mesh efficiency in the first of two ratios.', { above: 0.3, atMost: 1 }),
  row('gearing.efficiency.2', 'share', 1, 'second ratio efficiency', 'Mesh efficiency in the second of two ratios.', { above: 0.3, atMost: 1 }),
  row('gearing.dragTorque.fixed', 'torque', 2, 'gearing drag', 'Drag torque of the turning gearing at the motor shaft, at standstill.', {
    ...coefficient,
    atMost: 1000,
  }),
  row('gearing.dragTorque.perSpeed', 'torquePerSpeed', 5, 'gearing drag rise', 'Rise of that drag torque with motor speed.', { ...coefficient, atMost: 10 }),
  row('battery.voltage', 'voltage', 0, 'battery voltage', 'Open-circuit voltage of the pack, taken as constant.', { above: 10, atMost: 2000 }),
  row('battery.resistance', 'resistance', 3, 'battery resistance', 'Internal resistance of the pack.', { ...notNegative, atMost: 10 }),
  row(
    'battery.resistance.perEnergy',
    'resistanceEnergy',
    2,
    'battery resistance',
    'Internal resistance times usable energy: a larger pack of the same cells has less resistance.',
    { ...notNegative, atMost: 1e9 },
  ),
  row('battery.discharge', 'batteryPower', 0, 'discharge limit', 'Largest terminal power of the pack.', { above: 0, atMost: 5e6 }),
  row('battery.regenerative', 'batteryPower', 0, 'charge limit', 'Largest terminal power the pack takes back while driving.', { ...notNegative, atMost: 5e6 }),
  row('battery.usable', 'energy', 1, 'usable energy', 'Usable energy of the pack at open-circuit voltage.', { above: 0, atMost: 3.6e10 }),
  row('battery.chargingEfficiency', 'share', 0, 'charging efficiency', 'Energy into the pack over energy from the grid.', { above: 0.3, atMost: 1 }),
  row('massAndCost.mass.motor.fixed', 'mass', 1, 'motor mass', 'Motor mass that does not follow the design.', { ...notNegative, atMost: 10_000 }),
  row('massAndCost.mass.motor.perTorque', 'massPerTorque', 3, 'motor mass per torque', 'Motor mass per peak torque.', {
    ...notNegative,
    atMost: 100,
  }),
  row('massAndCost.mass.inverter.fixed', 'mass', 1, 'inverter mass', 'Inverter mass that does not follow the design.', { ...notNegative, atMost: 10_000 }),
  row('massAndCost.mass.inverter.perPower', 'massPerPower', 3, 'inverter mass per power', 'Inverter mass per peak power.', { ...notNegative, atMost: 1 }),
  row('massAndCost.mass.gearing.fixed', 'mass', 1, 'gearing mass', 'Gearing mass that does not follow the design.', { ...notNegative, atMost: 10_000 }),
  row('massAndCost.mass.gearing.perTorque', 'massPerTorque', 4, 'gearing mass per torque', 'Gearing mass per peak output torque.', {
    ...notNegative,
    atMost: 100,
  }),
  row('massAndCost.mass.gearing.perExtraRatio', 'mass', 1, 'mass per extra ratio', 'Mass that a second ratio adds.', { ...notNegative, atMost: 10_000 }),
  row('massAndCost.mass.battery.perEnergy', 'massPerEnergy', 2, 'battery mass per energy', 'Battery mass per usable energy.', { ...notNegative, atMost: 1e-3 }),
  row('massAndCost.cost.motor.fixed', 'money', 0, 'motor cost', 'Motor cost that does not follow the design.', notNegative),
  row('massAndCost.cost.motor.perTorque', 'moneyPerTorque', 2, 'motor cost per torque', 'Motor cost per peak torque.', notNegative),
  row('massAndCost.cost.inverter.fixed', 'money', 0, 'inverter cost', 'Inverter cost that does not follow the design.', notNegative),
  row('massAndCost.cost.inverter.perPower', 'moneyPerPower', 2, 'inverter cost per power', 'Inverter cost per peak power.', notNegative),
  row('massAndCost.cost.gearing.fixed', 'money', 0, 'gearing cost', 'Gearing cost that does not follow the design.', notNegative),
  row('massAndCost.cost.gearing.perTorque', 'moneyPerTorque', 3, 'gearing cost per torque', 'Gearing cost per peak output torque.', notNegative),
  row('massAndCost.cost.gearing.perExtraRatio', 'money', 0, 'cost per extra ratio', 'Cost that a second ratio adds.', notNegative),
  row('massAndCost.cost.battery.perEnergy', 'moneyPerEnergy', 1, 'battery cost per energy', 'Battery cost per usable energy.', notNegative),
  row('air.temperature', 'temperature', 0, 'air temperature', 'Ambient temperature, at the altitude of the study.', {
    default: 293.15,
    atLeast: 193.15,
    atMost: 343.15,
  }),
  row('air.altitude', 'distance', 0, 'altitude', 'Altitude above sea level.', { default: 0, atLeast: -500, atMost: 9000 }),
  row('air.density', 'density', 3, 'air density', 'Air density, instead of temperature and altitude.', { above: 0, atMost: 3 }),
];

/** Numbers of a trial; in a study's own table they stand as `trials.<name>.<key>`. Which kind takes which: trial-kinds.ts. */
export const trialParameters = {
  payload: row('payload', 'mass', 0, 'payload', 'Mass carried beside the vehicle, driver included.', { ...notNegative, default: 0, atMost: 100_000 }),
  laden: row('laden', 'mass', 0, 'laden mass', 'Mass of vehicle and payload together; the payload follows.', { above: 0, atMost: 200_000 }),
  'trailer.mass': row('trailer.mass', 'mass', 0, 'trailer mass', 'Mass of the trailer.', { ...notNegative, default: 0, atMost: 200_000 }),
  'trailer.dragArea': row('trailer.dragArea', 'area', 2, 'trailer drag area', 'Drag area that the trailer adds.', { ...notNegative, default: 0, atMost: 30 }),
  headWind: row('headWind', 'speed', 0, 'head wind', 'Wind against the vehicle; a tail wind is negative.', { default: 0, atLeast: -60, atMost: 60 }),
  grade: row('grade', 'grade', 1, 'grade', 'Slope of the road, rise over run; downhill is negative.', { default: 0, atLeast: -1, atMost: 1 }),
  from: row('from', 'speed', 0, 'from', 'Speed at the start.', { ...given, atLeast: 0, atMost: 200 }),
  to: row('to', 'speed', 0, 'to', 'Speed to be reached.', { ...given, above: 0, atMost: 200 }),
  distance: row('distance', 'distance', 0, 'distance', 'Distance covered from rest.', { ...given, above: 0, atMost: 100_000 }),
  at: row('at', 'speed', 0, 'at', 'Speed that is held on the grade; for a grade at standstill use a hill start.', { ...given, above: 0, atMost: 200 }),
  startAcceleration: row('startAcceleration', 'acceleration', 2, 'start acceleration', 'Acceleration kept in reserve at the start.', {
    ...notNegative,
    default: 0,
    atMost: 20,
  }),
  capSpeed: row('capSpeed', 'speed', 0, 'speed cap', 'Speed at which the trace of the cycle is clipped.', { above: 0, atMost: 200 }),
} as const satisfies Record<string, ParameterRow>;

/** Key of a trial's number. */
export type TrialParameter = keyof typeof trialParameters;

const byName = new Map(parameters.map((parameter) => [parameter.name, parameter]));

/**
 * The row of a dotted name, `trials.<name>.<key>` included; undefined for a name that is none.
 * A trial's name has no dot, so that the key is all that follows the second one.
 */
export function findParameter(name: string): ParameterRow | undefined {
  const own = byName.get(name);
  if (own !== undefined || !name.startsWith('trials.')) return own;
  const key = name.slice(name.indexOf('.', 'trials.'.length) + 1);
  return Object.hasOwn(trialParameters, key) ? trialParameters[key as TrialParameter] : undefined;
}
