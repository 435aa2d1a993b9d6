/** A distance from rest at full pedal. */
import { signChanges } from '../numerics/roots.ts';
import { shiftSpeedMPerS } from '../vehicle/shift.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import { afterShift } from './coasting.ts';
import { afterSpeedChange, highestGear, type Motion, type PedalConditions, type Pull, pullInGear } from './full-pedal.ts';

/** The distance to cover, m. */
export interface StandingDistanceConditions extends PedalConditions {
  distanceM: number;
}

/** NaN both when the distance is not covered. */
export interface StandingDistanceResult {
  timeS: number;
  endSpeedMPerS: number;
}

/** Pieces in which a stretch is searched for the speed at which net force vanishes. */
const PIECES = 8;
/** A speed as close as this share to the one it approaches for ever is taken as that. */
const SETTLED = 1e-10;
/** Share of the way to that speed that one step goes. */
const STRIDE = 0.75;
/** Share of the distance within which the end is found by its last slope, and rounds of coming closer at most. */
const CLOSE = 1e-7;
const ROUNDS = 50;

/**
 * Time and end speed over a distance from rest, with two ratios over the shift. Speed is held at maximum motor speed; where net
 * force vanishes before, speed settles there. Not covered when the vehicle cannot start, or comes to rest after a shift.
 * Relative error of both below 1e-9.
 */
export function solveStandingDistance(vehicle: Vehicle, conditions: StandingDistanceConditions): StandingDistanceResult {
  const end = atDistance(vehicle, conditions);
  return end === null ? { timeS: Number.NaN, endSpeedMPerS: Number.NaN } : { timeS: end.timeS, endSpeedMPerS: end.speedMPerS };
}

function atDistance(vehicle: Vehicle, conditions: StandingDistanceConditions): Motion | null {
  const { distanceM, slope, rating } = conditions;
  const shiftMPerS = shiftSpeedMPerS(vehicle, rating, slope);
  const lastGear = highestGear(vehicle);
  let start: Motion = { speedMPerS: 0, timeS: 0, distanceM: 0 };
  if (lastGear === 1 && shiftMPerS > 0) {
    const before = pullAlong(pullInGear(vehicle, 0, conditions), start, shiftMPerS, distanceM);
    if (before === null || before.distanceM >= distanceM) return before;
    const shifted = afterShift(vehicle, slope, before, (motion) => motion.distanceM - distanceM);
    if (shifted.trialEnded) return shifted;
    if (shifted.speedMPerS === 0) return null;
    start = shifted;
  }
  const last = pullInGear(vehicle, lastGear, conditions);
  const end = pullAlong(last, start, last.topMPerS, distanceM);
  return end === null || end.distanceM >= distanceM ? end : held(end, last.topMPerS, distanceM);
}

/** On to the distance at that speed. */
function held(from: Motion, speedMPerS: number, distanceM: number): Motion {
  return { speedMPerS, timeS: from.timeS + (distanceM - from.distanceM) / speedMPerS, distanceM };
}

/**
 * The motion at the distance or, where that comes first, at the greater speed `untilMPerS`; null when the vehicle does not start, or comes
 * to rest. Against a negative net force (after a shift to a gear that cannot hold the speed) speed falls.
 */
function pullAlong(pull: Pull, from: Motion, untilMPerS: number, distanceM: number): Motion | null {
  const rises = pull.netForceN(from.speedMPerS) > 0;
  if (rises && from.speedMPerS >= untilMPerS) return from;
  const ends = rises ? [...pull.breaksMPerS(from.speedMPerS, untilMPerS), untilMPerS] : [0, ...pull.breaksMPerS(0, from.speedMPerS)].reverse();
  const keepsSign = (speedMPerS: number) => (rises ? pull.netForceN(speedMPerS) > 0 : pull.netForceN(speedMPerS) < 0);
  let motion = from;
  for (const end of ends) {
    if (!keepsSign(motion.speedMPerS)) return settled(pull, motion, motion.speedMPerS, distanceM);
    const ahead = keepsSign(end) ? afterSpeedChange(pull, motion, end) : { speedMPerS: end, timeS: Number.NaN, distanceM: Number.NaN };
    if (Number.isNaN(ahead.timeS)) return settled(pull, motion, balanceMPerS(pull, motion.speedMPerS, ahead.speedMPerS), distanceM);
    if (ahead.distanceM >= distanceM) return between(pull, motion, ahead, distanceM);
    motion = ahead;
  }
  return rises ? motion : null;
}

/** The speed, first on the way from one to another, at which net force vanishes; it has different signs at the two. */
function balanceMPerS(pull: Pull, fromMPerS: number, toMPerS: number): number {
  const changes = signChanges(pull.netForceN, Math.min(fromMPerS, toMPerS), Math.max(fromMPerS, toMPerS), PIECES);
  return changes[fromMPerS < toMPerS ? 0 : changes.length - 1];
}

/** The motion at the distance while speed approaches `balanceMPerS`, at which net force vanishes; null when that is rest. */
function settled(pull: Pull, from: Motion, balanceMPerS: number, distanceM: number): Motion | null {
  let motion = from;
  while (Math.abs(balanceMPerS - motion.speedMPerS) > SETTLED * Math.max(balanceMPerS, 1e-3)) {
    const ahead = afterSpeedChange(pull, motion, motion.speedMPerS + STRIDE * (balanceMPerS - motion.speedMPerS));
    // Rounding hides the sign of net force: as close as it gets.
    if (Number.isNaN(ahead.timeS)) break;
    if (ahead.distanceM >= distanceM) return between(pull, motion, ahead, distanceM);
    motion = ahead;
  }
  return balanceMPerS > 0 ? held(motion, balanceMPerS, distanceM) : null;
}

/**
 * The motion at the distance, between two of the same stretch: a guess from the square of speed as a cubic of distance through both ends
 * and their slopes d(v²)/dx = 2 (F − R)/m_e, the nearer end moved there exactly, and again.
 */
function between(pull: Pull, from: Motion, to: Motion, distanceM: number): Motion {
  let [before, beyond] = [from, to];
  for (let round = 1; ; round++) {
    const guess = guessMPerS(pull, before, beyond, distanceM);
    const nearer = distanceM - before.distanceM < beyond.distanceM - distanceM ? before : beyond;
    const motion = afterSpeedChange(pull, nearer, guess, to.speedMPerS > from.speedMPerS);
    const leftM = distanceM - motion.distanceM;
    if (Math.abs(leftM) <= CLOSE * distanceM || round === ROUNDS) {
      const timeS = leftM / guess;
      return { speedMPerS: guess + (timeS * pull.netForceN(guess)) / pull.effectiveMassKg, timeS: motion.timeS + timeS, distanceM };
    }
    if (leftM > 0) before = motion;
    else beyond = motion;
  }
}

function guessMPerS(pull: Pull, before: Motion, beyond: Motion, distanceM: number): number {
  const spanM = beyond.distanceM - before.distanceM;
  const share = (distanceM - before.distanceM) / spanM;
  const rest = 1 - share;
  const slope = (motion: Motion) => (2 * spanM * pull.netForceN(motion.speedMPerS)) / pull.effectiveMassKg;
  const [low, high] = [before.speedMPerS * before.speedMPerS, beyond.speedMPerS * beyond.speedMPerS];
  const rise = slope(before);
  const cubic = rest * rest * (low * (1 + 2 * share) + rise * share) + share * share * (high * (1 + 2 * rest) - slope(beyond) * rest);
  const inside = (square: number) => (square - low) * (high - square) > 0;
  if (inside(cubic)) return Math.sqrt(cubic);
  // Far into the approach to a steady speed the cubic overshoots.
  const line = low + rise * share;
  return inside(line) ? Math.sqrt(line) : 0.5 * (before.speedMPerS + beyond.speedMPerS);
}
