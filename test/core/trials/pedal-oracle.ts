/**
 * A slow, plain reference for motion at full pedal: Newton's law stepped through time by a general-purpose ODE solver (odex, method of
 * Gragg, Bulirsch and Stoer), events found by halving the step in which they fall. Shares with the trials only the forces themselves.
 */
import { createRequire } from 'node:module';
import type { PedalConditions } from '../../../src/core/trials/full-pedal.ts';
import { resistanceN } from '../../../src/core/vehicle/road-load.ts';
import { tractiveForceN } from '../../../src/core/vehicle/traction.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';

// Required, not imported: the package's types are its source, which stricter compilers refuse.
interface Solver {
  absoluteTolerance: number;
  relativeTolerance: number;
  initialStepSize: number;
  solve(rates: (x: number, y: number[]) => number[], from: number, start: number[], to: number): { y: number[] };
}
const require = createRequire(import.meta.url);
const odex = require('odex') as { Solver: new (size: number) => Solver };

export interface OracleMotion {
  timeS: number;
  speedMPerS: number;
  distanceM: number;
}

type Gear = 0 | 1;
type Event = (motion: OracleMotion) => boolean;

const STEP_S = 0.1;
const LONGEST_S = 900;

/** Lowest speed at which the higher gear pulls more than the lower by 1e-9 of it: a walk in small steps, then halving. */
export function oracleShiftMPerS(vehicle: Vehicle, { slope, rating }: PedalConditions): number {
  if (vehicle.gearing.ratioCount === 1) return Infinity;
  const end = (vehicle.motor.maxSpeedRadPerS * vehicle.wheelRadiusM) / vehicle.gearing.ratios[0];
  const clearlyMore = (speed: number) => {
    const lower = tractiveForceN(vehicle, 0, speed, rating, slope);
    return tractiveForceN(vehicle, 1, speed, rating, slope) > lower + 1e-9 * Math.abs(lower);
  };
  if (clearlyMore(0)) return 0;
  const steps = 20_000;
  for (let k = 1; k <= steps; k++) {
    if (!clearlyMore((end * k) / steps)) continue;
    let [low, high] = [(end * (k - 1)) / steps, (end * k) / steps];
    for (let halving = 0; halving < 60; halving++) {
      const middle = 0.5 * (low + high);
      if (clearlyMore(middle)) high = middle;
      else low = middle;
    }
    return high;
  }
  return end;
}

/** The motion from `from` until `ends`; null when the vehicle stands still or takes longer than 15 minutes. */
export function oracleDrive(vehicle: Vehicle, conditions: PedalConditions, from: OracleMotion, ends: Event): OracleMotion | null {
  const shift = oracleShiftMPerS(vehicle, conditions);
  let motion = from;
  if (vehicle.gearing.ratioCount === 2 && motion.speedMPerS < shift) {
    const before = stepUntil(vehicle, motion, pedalForce(vehicle, 0, shift, conditions), 0, (now) => ends(now) || now.speedMPerS >= shift);
    if (before === null || ends(before)) return before;
    const pauseEnds = before.timeS + vehicle.gearing.shiftTimeS;
    const coast = (speed: number) => -resistanceN(vehicle.road, Math.max(0, speed), conditions.slope);
    const after = vehicle.gearing.shiftTimeS === 0 ? before : stepUntil(vehicle, before, coast, 1, (now) => ends(now) || now.timeS >= pauseEnds);
    if (after === null || ends(after)) return after;
    motion = after;
  }
  const gear = vehicle.gearing.ratioCount === 1 ? 0 : 1;
  const top = (vehicle.motor.maxSpeedRadPerS * vehicle.wheelRadiusM) / vehicle.gearing.ratios[gear];
  const end = stepUntil(vehicle, motion, pedalForce(vehicle, gear, top, conditions), gear, (now) => ends(now) || now.speedMPerS >= top);
  if (end === null || ends(end)) return end;
  return stepUntil(vehicle, { ...end, speedMPerS: top }, () => 0, gear, ends);
}

/** F − R, held below rest and above the greatest speed at which it counts, so that a step beyond meets no jump. */
function pedalForce(vehicle: Vehicle, gear: Gear, upTo: number, { slope, rating }: PedalConditions): (speed: number) => number {
  return (speed) => {
    const counted = Math.max(0, Math.min(speed, upTo));
    return tractiveForceN(vehicle, gear, counted, rating, slope) - resistanceN(vehicle.road, counted, slope);
  };
}

function stepUntil(vehicle: Vehicle, from: OracleMotion, force: (speed: number) => number, gear: Gear, ends: Event): OracleMotion | null {
  const mass = vehicle.effectiveMassKg[gear];
  const solver = new odex.Solver(2);
  solver.initialStepSize = STEP_S;
  solver.absoluteTolerance = solver.relativeTolerance = 1e-13;
  const after = (motion: OracleMotion, timeS: number): OracleMotion => {
    const { y } = solver.solve((_t, [speed]) => [force(speed) / mass, speed], 0, [motion.speedMPerS, motion.distanceM], timeS);
    return { timeS: motion.timeS + timeS, speedMPerS: y[0], distanceM: y[1] };
  };
  let motion = from;
  if (ends(motion)) return motion;
  while (motion.timeS < LONGEST_S) {
    const next = after(motion, STEP_S);
    if (!(next.speedMPerS > 0)) return null;
    if (ends(next)) {
      let [low, high] = [0, STEP_S];
      for (let halving = 0; halving < 45; halving++) {
        const middle = 0.5 * (low + high);
        if (ends(after(motion, middle))) high = middle;
        else low = middle;
      }
      return after(motion, high);
    }
    motion = next;
  }
  return null;
}
