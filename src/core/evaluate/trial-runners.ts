/** One runner per kind of trial: reads the trial's own numbers, calls its solver, writes its metrics in catalogue order. */

import { type TrialKind, trialKindRow } from '../study/catalogue/trial-kinds.ts';
import type { Trial } from '../study/study.ts';
import { solveAcceleration } from '../trials/acceleration.ts';
import { type CompiledCycle, compileCycle } from '../trials/compiled-cycle.ts';
import { type CycleResult, createCycleResult, runCycle } from '../trials/cycle.ts';
import { solveGradeability } from '../trials/gradeability.ts';
import { solveHillStart } from '../trials/hill-start.ts';
import { solveStandingDistance } from '../trials/standing-distance.ts';
import { solveTopSpeed } from '../trials/top-speed.ts';
import type { Gear } from '../vehicle/gearing.ts';
import { slopeOf } from '../vehicle/road-load.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import { type LimitWord, limitWords } from './evaluator.ts';
import { orZero, type ReadCell } from './read-figures.ts';

/** Where trials write: one row of metrics (SI) and of limits (index into limitWords); the trial in hand from `at` on. */
export interface MetricSlots {
  metrics: Float64Array;
  limits: Uint8Array;
  at: number;
}

/** Runs one trial on a vehicle that carries its load. The payload, first metric of every kind, is written by the caller. */
export type TrialRunner = (vehicle: Vehicle, figures: Float64Array, out: MetricSlots) => void;

/** Is a metric of the trial asked for? By its name within the trial. */
export type IsWanted = (metric: string) => boolean;

/** Writes which gear a trial uses behind its other metrics: the ratio it ends in and the speed of its shift, as far as the kind tells them. */
type WriteGears = (out: MetricSlots, vehicle: Vehicle, gear: Gear, shiftMPerS?: number) => void;

type CompileRunner = (trial: Trial, own: ReadCell, writeGears: WriteGears, isWanted: IsWanted) => TrialRunner;

const runners: Record<TrialKind, CompileRunner> = {
  acceleration: ({ rating }, own, writeGears) => {
    const [from, to, grade] = [own('from'), own('to'), own('grade')];
    return (vehicle, figures, out) => {
      const result = solveAcceleration(vehicle, { fromMPerS: figures[from], toMPerS: figures[to], slope: slopeOf(orZero(figures[grade])), rating });
      out.metrics[out.at + 1] = result.timeS;
      out.metrics[out.at + 2] = result.distanceM;
      if (!Number.isNaN(result.timeS)) writeGears(out, vehicle, result.gear, result.shiftMPerS);
    };
  },
  'standing distance': ({ rating }, own, writeGears) => {
    const [distance, grade] = [own('distance'), own('grade')];
    return (vehicle, figures, out) => {
      const result = solveStandingDistance(vehicle, { distanceM: figures[distance], slope: slopeOf(orZero(figures[grade])), rating });
      out.metrics[out.at + 1] = result.timeS;
      out.metrics[out.at + 2] = result.endSpeedMPerS;
      if (!Number.isNaN(result.timeS)) writeGears(out, vehicle, result.gear, result.shiftMPerS);
    };
  },
  'top speed': ({ rating }, own, writeGears) => {
    const grade = own('grade');
    return (vehicle, figures, out) => {
      const result = solveTopSpeed(vehicle, { slope: slopeOf(orZero(figures[grade])), rating });
      writeLimited(out, result.speedMPerS, result.limit);
      writeGears(out, vehicle, result.gear);
    };
  },
  gradeability: ({ rating }, own, writeGears) => {
    const at = own('at');
    return (vehicle, figures, out) => {
      const result = solveGradeability(vehicle, { speedMPerS: figures[at], rating });
      writeLimited(out, result.grade, result.limit);
      if (!Number.isNaN(result.grade)) writeGears(out, vehicle, result.gear);
    };
  },
  'hill start': ({ rating }, own, writeGears) => {
    const acceleration = own('startAcceleration');
    return (vehicle, figures, out) => {
      const result = solveHillStart(vehicle, { startAccelerationMPerS2: orZero(figures[acceleration]), rating });
      writeLimited(out, result.grade, result.limit);
      if (!Number.isNaN(result.grade)) writeGears(out, vehicle, result.gear);
    };
  },
  cycle: (trial, own, _, isWanted) => {
    const cycleOf = cycleReader(trial, own);
    const result = createCycleResult();
    const withAccount = [...cycleMetrics, lowerGearShare].some((metric) => isWanted(metric) && !metricsWithoutAccount.has(metric));
    const withGears = isWanted(lowerGearShare);
    return (vehicle, figures, out) => {
      const cycle = cycleOf(figures);
      runCycle(vehicle, cycle, result, withAccount);
      for (let k = 0; k < cycleFigures.length; k++) out.metrics[out.at + 1 + k] = cycleFigures[k](result);
      if (withGears) out.metrics[out.at + 1 + cycleFigures.length] = shareInLowerGear(cycle);
    };
  },
};

const lowerGearShare = 'lowerGearShare';

/** Of the time in which the trace moves, in the gears of the steps as driven; NaN where it never does. */
function shareInLowerGear({ durationS, driven }: CompiledCycle): number {
  let [lowerS, movingS] = [0, 0];
  for (let k = 0; k < durationS.length; k++) {
    movingS += durationS[k];
    if (driven.gear[k] === 0) lowerS += durationS[k];
  }
  return lowerS / movingS;
}

/** What a cycle tells without the account of its energy and of the motor's load, which costs twice as much again. */
const metricsWithoutAccount: ReadonlySet<string> = new Set(['payload', 'batteryEnergy', 'gridEnergy', 'range', 'offTrace']);

/** Figures of a cycle after the payload. */
const cycleFigureOf: Record<string, (result: CycleResult) => number> = {
  batteryEnergy: (r) => r.batteryEnergyJPerM,
  gridEnergy: (r) => r.gridEnergyJPerM,
  range: (r) => r.rangeM,
  wheelDemand: (r) => r.wheelDemandJPerM,
  wheelBraking: (r) => r.wheelBrakingJPerM,
  rmsTorque: (r) => r.rmsTorqueNm,
  torqueLoad: (r) => r.torqueLoad,
  lossLoad: (r) => r.lossLoad,
  worstLossLoad: (r) => r.worstLossLoad,
  offTrace: (r) => r.offTrace,
  recovered: (r) => r.recovered,
  outsideMap: (r) => r.outsideMap,
  'energy.rolling': (r) => r.rollingJPerM,
  'energy.air': (r) => r.airJPerM,
  'energy.grade': (r) => r.gradeJPerM,
  'energy.inertia': (r) => r.inertiaJPerM,
  'energy.gearing': (r) => r.gearingJPerM,
  'energy.motor': (r) => r.motorJPerM,
  'energy.battery': (r) => r.batteryJPerM,
  'energy.auxiliaries': (r) => r.auxiliariesJPerM,
  'energy.brakes': (r) => r.brakesJPerM,
  'energy.unmet': (r) => r.unmetJPerM,
};
const cycleMetrics = trialKindRow('cycle').metrics;
const cycleFigures = cycleMetrics.slice(1).map((name) => cycleFigureOf[name]);

/**
 * The runner of a trial. Metrics that are not wanted may stay NaN; the bits of those that are do not depend on it. Without `twoRatios`
 * in the study a row has no place for the gears.
 */
export function compileRunner(trial: Trial, read: ReadCell, twoRatios: boolean, isWanted: IsWanted): TrialRunner {
  const { metrics, gearMetrics } = trialKindRow(trial.kind);
  const writeGears: WriteGears = (out, { gearing }, gear, shiftMPerS = Number.NaN) => {
    if (!twoRatios) return;
    out.metrics[out.at + metrics.length] = gearing.ratios[gear];
    if (gearMetrics.length > 1) out.metrics[out.at + metrics.length + 1] = shiftMPerS;
  };
  return runners[trial.kind](
    trial,
    (key) => read(`trials.${trial.name}.${key}`),
    writeGears,
    (metric) => (twoRatios || metric !== lowerGearShare) && isWanted(metric),
  );
}

/** The prepared cycle of a trial; prepared again only when a design changes its grade or its speed cap. */
function cycleReader(trial: Trial, own: ReadCell): (figures: Float64Array) => CompiledCycle {
  const { trace, road } = trial;
  if (trace === null) throw new Error(`cycle trial ${trial.name} has no trace`);
  const [gradeCell, capCell] = [own('grade'), own('capSpeed')];
  let grade = Number.NaN;
  let capSpeedMPerS = Number.NaN;
  let cycle: CompiledCycle | null = null;
  return (figures) => {
    const wantedGrade = orZero(figures[gradeCell]);
    const wantedCap = figures[capCell];
    if (cycle === null || wantedGrade !== grade || !Object.is(wantedCap, capSpeedMPerS)) {
      grade = wantedGrade;
      capSpeedMPerS = wantedCap;
      cycle = compileCycle(trace, { grade, road, capSpeedMPerS });
    }
    return cycle;
  };
}

function writeLimited(out: MetricSlots, value: number, limit: LimitWord): void {
  out.metrics[out.at + 1] = value;
  out.limits[out.at + 1] = limitWords.indexOf(limit);
}
