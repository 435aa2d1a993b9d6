/** A distance from rest at full pedal. */
import { signChanges } from '../numerics/roots.ts';
import { shiftSpeedMPerS } from '../vehicle/shift.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import { afterShift } from './coasting.ts';
import { afterSpeedChange, type GearUse, highestGear, type Motion, type PedalConditions, type Pull, pullInGear } from './full-pedal.ts';

/** The distance to cover, m. */
export interface StandingDistanceConditions extends PedalConditions {
  distanceM: number;
}

/** NaN all three when the distance is not covered. */
export interface StandingDistanceResult extends GearUse {
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
const CLOSE = 2e-6;
const ROUNDS = 50;

/**
 * Time and end speed over a distance from rest, with two ratios over the shift. Speed is held at maximum motor speed; where net
 * force vanishes before, speed settles there. Not covered when the vehicle cannot start, or comes to rest after a shift.
 * Relative error of both below 1e-9.
 */
export function solveStandingDistance(vehicle: Vehicle, conditions: StandingDistanceConditions): StandingDistanceResult {
  const use: GearUse = { gear: 0, shiftMPerS: Number.NaN };
  const end = atDistance(vehicle, conditions, use);
  if (end === null) return { timeS: Number.NaN, endSpeedMPerS: Number.NaN, gear: 0, shiftMPerS: Number.NaN };
  return { timeS: end.timeS, endSpeedMPerS: end.speedMPerS, ...use };
}

function atDistance(vehicle: Vehicle, conditions: StandingDistanceConditions, use: GearUse): Motion | null {
  const { distanceM, slope, rating } = conditions;
  const shiftMPerS = shiftSpeedMPerS(vehicle, rating, slope);
  const lastGear = highestGear(vehicle);
  let start: Motion = { speedMPerS: 0, timeS: 0, distanceM: 0 };
  use.gear = lastGear;
  if (lastGear === 1 && shiftMPerS > 0) {
    const before = pullAlong(pullInGear(vehicle, 0, conditions), start, shiftMPerS, distanceM);
    if (before === null || before.distanceM >= distanceM) {
      use.gear = 0;
      return before;
    }
    use.shiftMPerS = shiftMPerS;
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
  let here = pointAt(from, pull.netForceN(from.speedMPerS));
  const rises = here.netN > 0;
  if (rises && from.speedMPerS >= untilMPerS) return from;
  if (here.netN === 0) return settled(pull, here, from.speedMPerS, distanceM);
  const ends = rises ? [...pull.breaksMPerS(from.speedMPerS, untilMPerS), untilMPerS] : [0, ...pull.breaksMPerS(0, from.speedMPerS)].reverse();
  for (const end of ends) {
    const netN = pull.netForceN(end);
    const keepsSign = rises ? netN > 0 : netN < 0;
    const ahead = keepsSign ? afterSpeedChange(pull, here, end) : null;
    if (ahead === null || Number.isNaN(ahead.timeS)) {
      return settled(pull, here, balanceMPerS(pull, here.speedMPerS, ahead === null ? end : ahead.speedMPerS), distanceM);
    }
    const there = pointAt(ahead, netN);
    if (there.distanceM >= distanceM) return between(pull, here, there, distanceM);
    here = there;
  }
  return rises ? here : null;
}

/** A motion with the net force at its speed. */
interface Point extends Motion {
  netN: number;
}

function pointAt({ speedMPerS, timeS, distanceM }: Motion, netN: number): Point {
  return { speedMPerS, timeS, distanceM, netN };
}

/** The speed, first on the way from one to another, at which net force vanishes; it has different signs at the two. */
function balanceMPerS(pull: Pull, fromMPerS: number, toMPerS: number): number {
  const changes = signChanges(pull.netForceN, Math.min(fromMPerS, toMPerS), Math.max(fromMPerS, toMPerS), PIECES);
  return changes[fromMPerS < toMPerS ? 0 : changes.length - 1];
}

/** The motion at the distance while speed approaches `balanceMPerS`, at which net force vanishes; null when that is rest. */
function settled(pull: Pull, from: Point, balanceMPerS: number, distanceM: number): Motion | null {
  let here = from;
  while (Math.abs(balanceMPerS - here.speedMPerS) > SETTLED * Math.max(balanceMPerS, 1e-3)) {
    const ahead = afterSpeedChange(pull, here, here.speedMPerS + STRIDE * (balanceMPerS - here.speedMPerS));
    // Rounding hides the sign of net force: as close as it gets.
    if (Number.isNaN(ahead.timeS)) break;
    const there = pointAt(ahead, pull.netForceN(ahead.speedMPerS));
    if (there.distanceM >= distanceM) return between(pull, here, there, distanceM);
    here = there;
  }
  return balanceMPerS > 0 ? held(here, balanceMPerS, distanceM) : null;
}

/**
 * The motion at the distance, between two of one stretch: guesses the speed, moves the nearer end there exactly, and again; the last
 * little way is a straight line.
 */
function between(pull: Pull, from: Point, to: Point, distanceM: number): Motion {
  let [before, beyond] = [from, to];
  for (let round = 1; ; round++) {
    const guess = guessMPerS(pull, before, beyond, distanceM);
    const nearer = distanceM - before.distanceM < beyond.distanceM - distanceM ? before : beyond;
    const there = pointAt(afterSpeedChange(pull, nearer, guess, to.speedMPerS > from.speedMPerS), pull.netForceN(guess));
    const leftM = distanceM - there.distanceM;
    if (Math.abs(leftM) <= CLOSE * distanceM || round === ROUNDS) {
      const leftS = leftM / guess;
      return { speedMPerS: guess + (leftS * there.netN) / pull.effectiveMassKg, timeS: there.timeS + leftS, distanceM };
    }
    if (leftM > 0) before = there;
    else beyond = there;
  }
}

/** A speed at which the distance might be reached: the square of speed as a cubic of distance with the slopes 2 (F − R)/m_e at both ends. */
function guessMPerS({ effectiveMassKg }: Pull, before: Point, beyond: Point, distanceM: number): number {
  const spanM = beyond.distanceM - before.distanceM;
  const share = (distanceM - before.distanceM) / spanM;
  const rest = 1 - share;
  const [low, high] = [before.speedMPerS * before.speedMPerS, beyond.speedMPerS * beyond.speedMPerS];
  const rise = (2 * spanM * before.netN) / effectiveMassKg;
  const lastRise = (2 * spanM * beyond.netN) / effectiveMassKg;
  const inside = (square: number) => (square - low) * (high - square) > 0;
  const cubic = rest * rest * (low * (1 + 2 * share) + rise * share) + share * share * (high * (1 + 2 * rest) - lastRise * rest);
  if (inside(cubic)) return Math.sqrt(cubic);
  // Far into the approach to a steady speed the cubic overshoots.
  const line = low + rise * share;
  return inside(line) ? Math.sqrt(line) : 0.5 * (before.speedMPerS + beyond.speedMPerS);
}
