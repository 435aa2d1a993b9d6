/**
 * The catalogue of metrics: everything a design is judged by. A trial kind lists the ones it gives (trial-kinds.ts);
 * the metrics of the whole design stand here too. Names in requirements are `<trial>.<name>`, in machine output
 * `<trial>.<name>_<unit>`.
 */
import { machineUnit, type Quantity } from '../../units/units.ts';

/** One metric. */
export interface MetricRow {
  /** Without trial and unit: `batteryEnergy`, `energy.rolling`. */
  readonly name: string;
  readonly quantity: Quantity;
  /** What a buyer wants; null where neither is better in itself. */
  readonly better: 'less' | 'more' | null;
  /** Decimals for people who read SI; others get as many as tell about the same (units/format-quantity.ts). */
  readonly decimals: number;
  /** Short label for axes and tables. */
  readonly label: string;
  readonly sentence: string;
  /** What people read where the metric does not exist and no limit says why; `not reached` unless stated. */
  readonly absent?: string;
  /** The metric also says what limits it. */
  readonly limited?: boolean;
}

function row(name: string, quantity: Quantity, better: MetricRow['better'], decimals: number, label: string, sentence: string): MetricRow {
  return { name, quantity, better, decimals, label, sentence };
}

/** Metrics that trials give, by name. */
export const trialMetrics = {
  payload: row('payload', 'mass', 'more', 0, 'payload', 'Payload carried on the trial, driver included.'),
  time: row('time', 'time', 'less', 2, 'time', 'Time at full pedal.'),
  distance: row('distance', 'distance', 'less', 1, 'distance', 'Distance covered meanwhile.'),
  endSpeed: row('endSpeed', 'speed', 'more', 1, 'end speed', 'Speed at the end of the distance.'),
  speed: { ...row('speed', 'speed', 'more', 1, 'top speed', 'Highest speed held, as the rating of the trial allows.'), limited: true },
  grade: { ...row('grade', 'grade', 'more', 1, 'grade', 'Steepest grade, rise over run.'), limited: true },
  batteryEnergy: row('batteryEnergy', 'energyPerDistance', 'less', 1, 'battery energy', 'Energy drawn from the pack per distance, at open-circuit voltage.'),
  gridEnergy: row('gridEnergy', 'energyPerDistance', 'less', 1, 'grid energy', 'Battery energy over the charging efficiency.'),
  range: row('range', 'range', 'more', 0, 'range', 'Usable energy over battery energy.'),
  wheelDemand: row('wheelDemand', 'energyPerDistance', null, 1, 'wheel demand', 'Energy that the trace asks for at the wheels while pulling.'),
  wheelBraking: row('wheelBraking', 'energyPerDistance', null, 1, 'wheel braking', 'Energy that the trace takes out at the wheels while braking.'),
  rmsTorque: row('rmsTorque', 'torque', 'less', 1, 'RMS torque', 'Root mean square motor torque over the whole time.'),
  torqueLoad: row('torqueLoad', 'share', 'less', 1, 'torque load', 'RMS torque over continuous torque.'),
  lossLoad: row('lossLoad', 'share', 'less', 1, 'loss load', 'Mean motor and inverter loss over the loss at the continuous corner.'),
  worstLossLoad: row(
    'worstLossLoad',
    'share',
    'less',
    1,
    'worst loss load',
    'The same over the worst ten minutes on end; a cycle little longer than that may show less than its mean.',
  ),
  offTrace: row('offTrace', 'share', 'less', 2, 'off-trace share', 'Share of the time in which the drive cannot follow the trace.'),
  recovered: row('recovered', 'share', 'more', 1, 'recovered share', 'Share of the braking energy at the wheels that returns to the pack.'),
  outsideMap: row('outsideMap', 'share', 'less', 2, 'outside the map', 'Share of the time in which the motor works outside its measured map.'),
  ratio: row('ratio', 'number', null, 2, 'ratio in use', 'Ratio of the gear that the trial ends in; for studies with two ratios.'),
  shiftSpeed: {
    ...row('shiftSpeed', 'speed', null, 1, 'shift speed', 'Speed at which the trial shifts; missing where it needs no shift.'),
    absent: 'no shift',
  },
  lowerGearShare: row('lowerGearShare', 'share', null, 1, 'time in the lower gear', 'Share of the moving time in the lower of two gears.'),
  'energy.rolling': row('energy.rolling', 'energyPerDistance', null, 1, 'rolling', 'Energy lost to rolling resistance.'),
  'energy.air': row('energy.air', 'energyPerDistance', null, 1, 'air', 'Energy lost to air drag.'),
  'energy.grade': row('energy.grade', 'energyPerDistance', null, 1, 'grade', 'Energy spent on climbing, net.'),
  'energy.inertia': row('energy.inertia', 'energyPerDistance', null, 1, 'inertia', 'Energy left in the moving mass, net.'),
  'energy.gearing': row('energy.gearing', 'energyPerDistance', null, 1, 'gearing', 'Energy lost in the gearing.'),
  'energy.motor': row('energy.motor', 'energyPerDistance', null, 1, 'motor and inverter', 'Energy lost in motor and inverter.'),
  'energy.battery': row('energy.battery', 'energyPerDistance', null, 1, 'battery', 'Energy lost in the resistance of the pack.'),
  'energy.auxiliaries': row('energy.auxiliaries', 'energyPerDistance', null, 1, 'auxiliaries', 'Energy of the auxiliaries.'),
  'energy.brakes': row('energy.brakes', 'energyPerDistance', null, 1, 'friction brakes', 'Energy turned to heat in the friction brakes.'),
  'energy.unmet': row('energy.unmet', 'energyPerDistance', null, 1, 'unmet demand', 'Negative: what clipped steps did not deliver at the wheels.'),
} as const satisfies Record<string, MetricRow>;

/** Name of a trial's metric. */
export type TrialMetric = keyof typeof trialMetrics;

/** Metrics of the whole design, from the study's own figures (no trial's `with`). */
export const designMetrics = {
  'driveUnit.peakPower': row('driveUnit.peakPower', 'power', null, 1, 'peak power', 'Peak torque times base speed.'),
  'driveUnit.peakTorque': row('driveUnit.peakTorque', 'torque', null, 0, 'peak torque', 'Peak torque of the motor.'),
  'driveUnit.axleTorque': row('driveUnit.axleTorque', 'torque', 'less', 0, 'axle torque', 'Peak torque times the largest ratio, nothing taken off.'),
  'driveUnit.mass': row('driveUnit.mass', 'mass', 'less', 1, 'drive unit mass', 'Motor, inverter and gearing.'),
  'driveUnit.cost': row('driveUnit.cost', 'money', 'less', 0, 'drive unit cost', 'Motor, inverter and gearing.'),
  'battery.mass': row('battery.mass', 'mass', 'less', 1, 'battery mass', 'Battery mass that follows usable energy.'),
  'battery.cost': row('battery.cost', 'money', 'less', 0, 'battery cost', 'Battery cost that follows usable energy.'),
  'vehicle.mass': row('vehicle.mass', 'mass', 'less', 0, 'vehicle mass', 'Kerb mass and the masses that follow the design.'),
  'vehicle.massFactor': row('vehicle.massFactor', 'number', 'less', 4, 'mass factor', 'Effective over actual mass in the largest ratio, without payload.'),
} as const satisfies Record<string, MetricRow>;

/** Name of a metric of the whole design. */
export type DesignMetric = keyof typeof designMetrics;

/** One column of results: a metric of one trial or of the whole design. */
export interface MetricColumn {
  /** As requirements write it: `ramp.grade`. */
  readonly name: string;
  /** As machine output writes it: `ramp.grade_pct`. */
  readonly key: string;
  /** null for a metric of the whole design. */
  readonly trial: string | null;
  readonly row: MetricRow;
}

/** Machine key of a name and quantity: the unit as suffix, none for pure numbers and money. */
export function machineKey(name: string, quantity: Quantity): string {
  const { suffix } = machineUnit(quantity);
  return suffix === '' ? name : `${name}_${suffix}`;
}
