/** Warnings about the motor: speeds that do not suffice, a map far from its motor, losses too small to be true. */
import { formatLimit } from '../../units/format-quantity.ts';
import { curveMaxSpeedRadPerS } from '../../vehicle/full-load-curve.ts';
import type { LossMap } from '../../vehicle/loss-map.ts';
import { motorLossW, peakTorqueLimitNm } from '../../vehicle/motor.ts';
import type { Motor } from '../../vehicle/vehicle.ts';
import type { Axis, SpeedTrace, Study } from '../study.ts';
import { axisPath, cornersOf, type DesignValues, endsOf, extentOf, valuesAt } from './design-corners.ts';
import { beside, type Sight, shown, someOf, type WarningContext } from './warning-row.ts';

const RATIOS: readonly string[] = ['gearing.ratio', 'gearing.ratios.2', 'gearing.ratios.1'];
/** What the highest speed of a vehicle follows from. */
const REACH: readonly string[] = [...RATIOS, 'motor.maxSpeed', 'motor.baseSpeed', 'motor.fullLoad', 'vehicle.wheelRadius'];

function maxSpeedRadPerS({ fullLoad, optionCurves }: Study, values: DesignValues): number {
  const own = values['motor.fullLoad'];
  const curve = own === undefined ? fullLoad : (optionCurves[own]?.data ?? null);
  return curve === null ? (values['motor.maxSpeed'] ?? Number.NaN) : curveMaxSpeedRadPerS(curve, values['motor.baseSpeed'] as number);
}

/** Vehicle speed at maximum motor speed in the smallest ratio. */
function reachMPerS(study: Study, values: DesignValues): number {
  const ratio = values['gearing.ratio'] ?? Math.min(values['gearing.ratios.1'] as number, values['gearing.ratios.2'] as number);
  return (maxSpeedRadPerS(study, values) * (values['vehicle.wheelRadius'] as number)) / ratio;
}

/** A speed that a trial asks for, and where on the axis of the ratio no motor of the study allows it. */
interface SpeedShortfall {
  readonly wantedMPerS: number;
  readonly axis: Axis | undefined;
  /** Of a range or list of ratios only the lowest and the highest: between them the highest speed falls. */
  readonly points: readonly (readonly number[])[];
  /** Highest speed at each of the points; one where the ratio does not vary. */
  readonly reachesMPerS: readonly number[];
  /** Indices of those where it does not suffice. */
  readonly short: readonly number[];
}

/** Beyond so many motors at so many ratios nothing is said. */
const MOST_REACHES = 50_000;

function speedShortfall(study: Study, { name, kind, trace, with: replaced }: Study['trials'][number]): SpeedShortfall | null {
  const wantedMPerS = speedWanted(study, name, kind, trace);
  if (!(wantedMPerS > 0)) return null;
  const axis = RATIOS.filter((ratio) => replaced[ratio] === undefined)
    .map((ratio) => study.axes.find(({ sets }) => sets.includes(ratio)))
    .find((each) => each !== undefined);
  const own = Object.fromEntries(REACH.flatMap((key) => (study.values[key] === undefined ? [] : [[key, study.values[key]]])));
  const others = cornersOf({ values: own, axes: study.axes.filter((each) => each !== axis) }, (each) => REACH.includes(each));
  const points = axis === undefined ? [] : endsOf(axis);
  if (others.length * points.length > MOST_REACHES) return null;
  const best = (at: (values: DesignValues) => DesignValues) =>
    others.reduce((most, values) => Math.max(most, reachMPerS(study, { ...at(values), ...replaced })), 0);
  const reachesMPerS = axis === undefined ? [best((values) => values)] : points.map((point) => best((values) => valuesAt(values, axis, point)));
  const short = reachesMPerS.flatMap((reach, index) => (reach < wantedMPerS * (1 - 1e-12) ? [index] : []));
  return { wantedMPerS, axis, points, reachesMPerS, short };
}

/** Does a trial ask for more speed than any design has? */
export function isBeyondEveryMotor(study: Study, trial: Study['trials'][number]): boolean {
  const shortfall = speedShortfall(study, trial);
  return shortfall !== null && shortfall.short.length === shortfall.reachesMPerS.length;
}

/** Speeds that requirements, objectives and cycles ask for, against the highest that any motor of the study allows at each ratio. */
export function seeMotorSpeed({ study }: WarningContext): Sight[] {
  return study.trials.flatMap((trial): Sight[] => {
    const shortfall = speedShortfall(study, trial);
    if (shortfall === null || shortfall.short.length === 0) return [];
    const wanted = formatLimit(shortfall.wantedMPerS, 'speed', { decimals: 0, system: study.report.units });
    return [
      {
        path: `trials.${trial.name}`,
        found: `${wanted} wanted, beyond maximum motor speed at ${partOf(shortfall, study)}`,
        hint: 'Those designs cannot meet it: raise motor.maxSpeed, lower the ratio, or cap the speed of the cycle.',
      },
    ];
  });
}

/** Where on an axis the speed does not suffice. */
function partOf({ wantedMPerS, axis, points, reachesMPerS, short }: SpeedShortfall, study: Study): string {
  if (axis === undefined) return 'the ratio of the study';
  if (short.length === points.length) return `every ${axis.name}`;
  if (axis.labels !== null) return `${someOf(short.map((index) => axis.labels?.[index] as string))} of ${axis.name}`;
  if (axis.sets.length > 1) return `${short.length} of the ${points.length} values of ${axis.name}`;
  const last = points.length - 1;
  const most = ((points[last]?.[0] as number) * (reachesMPerS[last] as number)) / wantedMPerS;
  return `${axis.name} above ${shown(most, 'number', 2, study)}`;
}

function speedWanted(study: Study, name: string, kind: Study['trials'][number]['kind'], trace: SpeedTrace | null): number {
  const required = study.requirements.filter(({ metric }) => metric.startsWith(`${name}.`));
  if (kind === 'cycle') {
    const follows = required.some(({ metric, limit }) => metric === `${name}.offTrace` && limit === 0);
    return follows && trace !== null ? fastestStepMPerS(trace, study.values[`trials.${name}.capSpeed`] ?? Number.POSITIVE_INFINITY) : 0;
  }
  if (kind === 'top speed') return required.find(({ bound, metric }) => bound === 'atLeast' && metric.endsWith('.speed'))?.limit ?? 0;
  const asked = required.length > 0 || study.objectives.some(({ metric }) => metric.startsWith(`${name}.`));
  const key = kind === 'acceleration' ? 'to' : kind === 'gradeability' ? 'at' : null;
  return asked && key !== null ? (study.values[`trials.${name}.${key}`] ?? 0) : 0;
}

/** Steps are driven at their mean speed. */
function fastestStepMPerS({ speedsMPerS }: SpeedTrace, cap: number): number {
  return speedsMPerS.slice(1).reduce((fastest, speed, k) => Math.max(fastest, (Math.min(speed, cap) + Math.min(speedsMPerS[k] as number, cap)) / 2), 0);
}

/** Base speed above maximum speed, where either varies. */
export function seeSpeedOrder({ study }: WarningContext): Sight[] {
  const varied = study.axes.find(({ sets }) => sets.includes('motor.baseSpeed') || sets.includes('motor.maxSpeed'));
  if (varied === undefined) return [];
  const designs = cornersOf(study, (name) => REACH.includes(name)).map((values) => ({
    base: values['motor.baseSpeed'] as number,
    top: maxSpeedRadPerS(study, values),
  }));
  const out = designs.filter(({ base, top }) => base > top);
  const base = extentOf(out.map((design) => design.base));
  const top = extentOf(out.map((design) => design.top));
  if (base === null || top === null) return [];
  return [
    {
      path: axisPath(varied),
      found: `base speed up to ${shown(base.high, 'rotationalSpeed', 0, study)} and maximum speed from ${shown(top.low, 'rotationalSpeed', 0, study)}`,
      hint: `In ${out.length === designs.length ? 'every design' : 'some designs'} the base speed lies above the maximum speed: they have no metrics and are not feasible.`,
    },
  ];
}

function mapOf({ lossMap, optionMaps }: Study, values: DesignValues): LossMap | null {
  const own = values['motor.map'];
  return own === undefined ? lossMap : (optionMaps[own]?.data ?? null);
}

/** A map used for motors of less than half or more than twice the power it was measured at. */
export function seeMapScale({ study }: WarningContext): Sight[] {
  const names = ['motor.peakTorque', 'motor.baseSpeed', 'motor.map'];
  const scales = cornersOf(study, (name) => names.includes(name)).map((values) => {
    const map = mapOf(study, values);
    const powerW = (values['motor.peakTorque'] as number) * (values['motor.baseSpeed'] as number);
    return map === null ? Number.NaN : powerW / (map.referencePeakTorqueNm * map.referenceBaseSpeedRadPerS);
  });
  const extent = extentOf(scales);
  if (extent === null || (extent.low >= 0.5 && extent.high <= 2)) return [];
  const axis = names.map((name) => study.axes.find(({ sets }) => sets.includes(name))).find((each) => each !== undefined);
  const [least, most] = [beside(extent.low, 0.5, 'atLeast', 'number', 2, study), beside(extent.high, 2, 'atMost', 'number', 2, study)];
  return [
    {
      path: axis === undefined ? 'motor.map' : axisPath(axis),
      found: `a map used for ${extent.low === extent.high ? (extent.low < 0.5 ? least : most) : `${least} to ${most}`} times the power it was measured at`,
      hint: 'Losses are scaled with peak power; beyond that range measure or compute another map.',
    },
  ];
}

/** One map for motors of different base speed. */
export function seeMapAndBaseSpeed({ study }: WarningContext): Sight[] {
  const axis = study.axes.find(({ sets }) => sets.includes('motor.baseSpeed'));
  if (axis === undefined) return [];
  const motors = axis.points
    .map((point) => valuesAt(study.values, axis, point))
    .flatMap((values) => {
      const map = mapOf(study, values);
      return map === null ? [] : [{ map, baseSpeed: values['motor.baseSpeed'] as number }];
    });
  if (!motors.some((motor) => motors.some((other) => other.map === motor.map && other.baseSpeed !== motor.baseSpeed))) return [];
  return [
    {
      path: axisPath(axis),
      found: 'base speed varied with a measured map',
      hint: 'A rewound motor keeps its losses at a given torque and speed; the scaled map does not. Read small differences with care.',
    },
  ];
}

/** Points of torque and of speed at which the reference motor is looked at. */
const POINTS = 24;

/** Losses from coefficients that leave more than 99 % at some point. */
export function seeMotorEfficiency({ study }: WarningContext): Sight[] {
  const { values } = study;
  const matters = study.trials.some(({ kind }) => kind === 'cycle') || values['battery.discharge'] !== undefined;
  if (study.lossMap !== null || study.axes.some(({ sets }) => sets.includes('motor.map')) || !matters) return [];
  const best = bestEfficiency(referenceMotor(study));
  if (!(best > 0.99)) return [];
  return [
    {
      path: 'motor.losses',
      found: `${beside(best, 0.99, 'atMost', 'share', 1, study)} at the best point of motor and inverter together`,
      hint: 'About 94 to 97 % is common practice; check the coefficients and their units.',
    },
  ];
}

function bestEfficiency(motor: Motor): number {
  let best = 0;
  for (let k = 1; k <= POINTS; k++) {
    const speedRadPerS = (motor.maxSpeedRadPerS * k) / POINTS;
    const limitNm = peakTorqueLimitNm(motor, speedRadPerS);
    for (let j = 1; j <= POINTS; j++) {
      const powerW = ((limitNm * j) / POINTS) * speedRadPerS;
      best = Math.max(best, powerW / (powerW + motorLossW(motor, (limitNm * j) / POINTS, speedRadPerS)));
    }
  }
  return best;
}

function referenceMotor(study: Study): Motor {
  const { values, fullLoad } = study;
  const figure = (name: string) => values[`motor.${name}`] ?? Number.NaN;
  const loss = (key: string) => values[`motor.losses.${key}`] ?? 0;
  const maxSpeed = maxSpeedRadPerS(study, values);
  return {
    peakTorqueNm: figure('peakTorque'),
    baseSpeedRadPerS: figure('baseSpeed'),
    constantPowerToRadPerS: values['motor.constantPowerTo'] ?? maxSpeed,
    maxSpeedRadPerS: maxSpeed,
    peakPowerW: figure('peakTorque') * figure('baseSpeed'),
    continuousTorqueShare: figure('continuous.torque'),
    continuousPowerShare: figure('continuous.power'),
    standstillShare: 1,
    rotorInertiaKgM2: 0,
    losses: {
      hysteresis: loss('hysteresis'),
      eddyS: loss('eddy'),
      windageS2: loss('windage'),
      copperWPerNm: loss('copper'),
      acCopperS2: loss('acCopper'),
      fieldWeakening: loss('fieldWeakening'),
      inverterFixed: loss('inverterFixed'),
      inverterLinear: loss('inverterLinear'),
      inverterSquare: loss('inverterSquare'),
    },
    lossMap: null,
    fullLoad,
  };
}
