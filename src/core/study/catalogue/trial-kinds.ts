/** The catalogue of trial kinds: which numbers each takes and which metrics it gives. The solvers stand in trials/. */
import type { TrialMetric } from './metrics.ts';
import type { TrialParameter } from './parameters.ts';

/** One kind of trial. */
export interface TrialKindRow {
  readonly sentence: string;
  readonly takes: readonly TrialParameter[];
  /** May it be rated peak or continuous, and which holds by default? null: the rating plays no part. */
  readonly rating: 'peak' | 'continuous' | null;
  readonly metrics: readonly TrialMetric[];
  /** Further ones where the study has two ratios: which of them is used, and where it shifts. */
  readonly gearMetrics: readonly TrialMetric[];
}

const load = ['payload', 'laden', 'trailer.mass', 'trailer.dragArea', 'headWind'] as const;

/** Every kind of trial by the name the study file uses. */
export const trialKinds = {
  acceleration: {
    sentence: 'Full pedal from one speed to another: time and distance.',
    takes: ['from', 'to', ...load, 'grade'],
    rating: 'peak',
    metrics: ['payload', 'time', 'distance'],
    gearMetrics: ['ratio', 'shiftSpeed'],
  },
  'standing distance': {
    sentence: 'Full pedal from rest over a distance: time and end speed.',
    takes: ['distance', ...load, 'grade'],
    rating: 'peak',
    metrics: ['payload', 'time', 'endSpeed'],
    gearMetrics: ['ratio', 'shiftSpeed'],
  },
  'top speed': {
    sentence: 'The highest speed held on the road.',
    takes: [...load, 'grade'],
    rating: 'continuous',
    metrics: ['payload', 'speed'],
    gearMetrics: ['ratio'],
  },
  gradeability: {
    sentence: 'The steepest grade held at a speed.',
    takes: ['at', ...load],
    rating: 'continuous',
    metrics: ['payload', 'grade'],
    gearMetrics: ['ratio'],
  },
  'hill start': {
    sentence: 'The steepest grade on which the vehicle starts, with a reserve of acceleration where asked.',
    takes: ['startAcceleration', ...load],
    rating: 'peak',
    metrics: ['payload', 'grade'],
    gearMetrics: ['ratio'],
  },
  cycle: {
    sentence: 'A speed trace over time: energy, loads, and how well it is followed.',
    takes: [...load, 'grade', 'capSpeed'],
    rating: null,
    metrics: [
      'payload',
      'batteryEnergy',
      'gridEnergy',
      'range',
      'wheelDemand',
      'wheelBraking',
      'rmsTorque',
      'torqueLoad',
      'lossLoad',
      'worstLossLoad',
      'offTrace',
      'recovered',
      'outsideMap',
      'energy.rolling',
      'energy.air',
      'energy.grade',
      'energy.inertia',
      'energy.gearing',
      'energy.motor',
      'energy.battery',
      'energy.auxiliaries',
      'energy.brakes',
      'energy.unmet',
    ],
    gearMetrics: ['lowerGearShare'],
  },
} as const satisfies Record<string, TrialKindRow>;

/** Name of a trial kind. */
export type TrialKind = keyof typeof trialKinds;

/** The row of a kind. */
export function trialKindRow(kind: TrialKind): TrialKindRow {
  return trialKinds[kind];
}
