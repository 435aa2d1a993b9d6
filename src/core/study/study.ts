/** A checked study in SI: plain data that travels unchanged to worker threads and, as JSON, into the report. */
import type { FullLoadCurve } from '../vehicle/full-load-curve.ts';
import type { LossMap } from '../vehicle/loss-map.ts';
import type { TrialKind } from './catalogue/trial-kinds.ts';

/** A speed trace, as written: times in s, rising strictly; speeds in m/s, not negative. */
export interface SpeedTrace {
  readonly name: string;
  readonly timesS: readonly number[];
  readonly speedsMPerS: readonly number[];
  /** What the file says of itself, its source first. */
  readonly notes: readonly string[];
}

/** Grade over time (s) or over distance (m), piecewise linear, held beyond its ends. */
export interface RoadProfile {
  readonly name: string;
  readonly over: 'time' | 'distance';
  readonly at: readonly number[];
  readonly grades: readonly number[];
}

/** One trial; its numbers stand in `Study.values` as `trials.<name>.<key>`. */
export interface Trial {
  readonly name: string;
  readonly kind: TrialKind;
  readonly rating: 'peak' | 'continuous';
  /** Figures of the study that this trial replaces for itself, SI, by dotted name. */
  readonly with: Readonly<Record<string, number>>;
  /** Cycle trials only. */
  readonly trace: SpeedTrace | null;
  readonly road: RoadProfile | null;
}

/** One axis of the search: a varied number, or a list of named options that set several together. */
export interface Axis {
  /** Dotted name of the number, or name of the options list. */
  readonly name: string;
  /** Dotted names that a point of the axis sets. */
  readonly sets: readonly string[];
  /**
   * Points in the order of the study file, of a range without steps its two ends: one SI value per name in `sets`. A number that an
   * option leaves without a part to play (one ratio beside two) is NaN there; the numbers `motor.fullLoad` and `motor.map` are an index
   * into `optionCurves` and `optionMaps`, NaN for the study's own. JSON writes NaN as null: `readStudyJson` brings it back.
   */
  readonly points: readonly (readonly number[])[];
  /** Names of the points where they are options. */
  readonly labels: readonly string[] | null;
  /** The two ends of a range, SI; any value between them may be drawn where it is not stepped, else its points. Null for lists and options. */
  readonly range: { readonly from: number; readonly to: number; readonly stepped: boolean } | null;
}

/** What an option brings in a file. */
export interface OptionFile<Data> {
  readonly file: string;
  readonly data: Data;
}

/** A requirement on one metric, SI, inclusive. One metric may have both ends: two requirements. */
export interface Requirement {
  readonly metric: string;
  readonly bound: 'atLeast' | 'atMost';
  readonly limit: number;
  /** Not written in the file: every cycle must be followed unless the study says otherwise (off-trace share at most 0). */
  readonly implied: boolean;
}

/** One objective of the trade-off. */
export interface Objective {
  readonly metric: string;
  readonly aim: 'minimise' | 'maximise';
  /** Size of the box within which people see one design, SI; 0: every design. */
  readonly resolution: number;
}

/** How designs are chosen: every combination of the points of all axes, … */
export interface GridSearch {
  readonly method: 'grid';
}

/** … or as many as asked for, drawn by seed from points and whole ranges; more of them leave those before as they are. */
export interface SampledSearch {
  readonly method: 'sobol' | 'random';
  /** 1 to 4e9. */
  readonly designs: number;
  /** 0 to 2^53 - 1. */
  readonly seed: number;
}

/** How designs are chosen. */
export type Search = GridSearch | SampledSearch;

/** A complete, checked study. Dotted names as in the catalogue of parameters. */
export interface Study {
  readonly title: string;
  readonly about: string;
  readonly driven: 'front' | 'rear' | 'all';
  /** The tyre size as written, where the radius follows from it. */
  readonly tyre: string | null;
  readonly currency: string | null;
  /**
   * The reference design: every number given or defaulted, SI, by dotted name; `trials.<name>.<key>` for the trials' own.
   * A default stands here only where it plays a part: none of air.temperature and air.altitude beside air.density, of
   * vehicle.wheelInertia beside massFactor, of rolling beside coastDown, of motor.losses without that section, of a trial's
   * payload beside laden; massAndCost terms of drive unit or battery only where one term of that group is given (its metric exists then).
   * A trial's headWind, grade, trailer.mass and trailer.dragArea always stand, 0 unless given. From elsewhere come
   * vehicle.wheelRadius (tyre size), vehicle.regeneration.share (driven axle), motor.peakTorque and baseSpeed (full-load curve).
   */
  readonly values: Readonly<Record<string, number>>;
  readonly fullLoad: FullLoadCurve | null;
  readonly lossMap: LossMap | null;
  /** Measured curves and maps that options bring, in the order of the options. */
  readonly optionCurves: readonly OptionFile<FullLoadCurve>[];
  readonly optionMaps: readonly OptionFile<LossMap>[];
  readonly trials: readonly Trial[];
  readonly axes: readonly Axis[];
  readonly search: Search;
  readonly requirements: readonly Requirement[];
  readonly objectives: readonly Objective[];
  /** Further metrics to store with every design. */
  readonly keep: readonly string[];
  readonly report: { readonly units: 'SI' | 'US' };
}

/** A study that came as JSON, which knows no NaN: what options leave out is NaN again. */
export function readStudyJson(study: Study): Study {
  const axes = study.axes.map((axis) => ({ ...axis, points: axis.points.map((point) => point.map((value: number | null) => value ?? Number.NaN)) }));
  return { ...study, axes };
}
