/** Top speed at full pedal. */
import { type RealFunction, signChange, signChanges } from '../numerics/roots.ts';
import type { Gear } from '../vehicle/gearing.ts';
import { type TractionLimit, tractionLimit } from '../vehicle/traction.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import { highestGear, type PedalConditions, type Pull, pullInGear } from './full-pedal.ts';

/** Zero speed when the vehicle cannot start. */
export interface TopSpeedResult {
  speedMPerS: number;
  /** The gear that holds it. */
  gear: Gear;
  limit: TractionLimit;
}

/** Pieces in which a smooth stretch is searched for the speed at which net force vanishes. */
const PIECES = 8;

/**
 * The first speed above rest at which F − R changes from positive to not positive, else that of maximum motor speed; with two ratios in the
 * better one at each speed. Later stretches in which F exceeds R again are ignored. Relative error below 1e-12 where the two cross.
 */
export function solveTopSpeed(vehicle: Vehicle, conditions: PedalConditions): TopSpeedResult {
  const lower = pullInGear(vehicle, 0, conditions);
  const higher = vehicle.gearing.ratioCount === 1 ? lower : pullInGear(vehicle, 1, conditions);
  const inLower = (speed: number) => higher === lower || (speed <= lower.topMPerS && lower.netForceN(speed) >= higher.netForceN(speed));
  const limited = (speedMPerS: number): TopSpeedResult => {
    const gear = inLower(speedMPerS) ? 0 : 1;
    return { speedMPerS, gear, limit: tractionLimit(vehicle, gear, speedMPerS, conditions.rating, conditions.slope) };
  };
  const falls = netForceFalls(vehicle);
  for (const { pulls, fromMPerS, toMPerS } of rangesOf(lower, higher)) {
    const netForceN = pulls.length === 1 ? pulls[0].netForceN : (speed: number) => Math.max(pulls[0].netForceN(speed), pulls[1].netForceN(speed));
    // Above rest: the lower gear ends there, and the higher one does not hold the speed.
    if (!(netForceN(fromMPerS) > 0)) return fromMPerS === 0 ? limited(0) : { speedMPerS: fromMPerS, gear: 0, limit: 'motor speed' };
    const lossMPerS = firstLossMPerS(netForceN, falls ? [fromMPerS, toMPerS] : stretchEnds(pulls, fromMPerS, toMPerS));
    if (!Number.isNaN(lossMPerS)) return limited(lossMPerS);
  }
  return { speedMPerS: higher.topMPerS, gear: highestGear(vehicle), limit: 'motor speed' };
}

/** Speeds in which the same gears can be used. */
interface SpeedRange {
  pulls: Pull[];
  fromMPerS: number;
  toMPerS: number;
}

function rangesOf(lower: Pull, higher: Pull): SpeedRange[] {
  if (higher === lower) return [{ pulls: [lower], fromMPerS: 0, toMPerS: lower.topMPerS }];
  return [
    { pulls: [lower, higher], fromMPerS: 0, toMPerS: lower.topMPerS },
    { pulls: [higher], fromMPerS: lower.topMPerS, toMPerS: higher.topMPerS },
  ];
}

/**
 * Is F − R sure to fall with speed? Then one look at its end shows whether it changes sign. The laws of motor, losses from coefficients,
 * adhesion (which rises by less than rolling resistance does) and road load make it so; measured curves, maps and coast-downs may not.
 */
function netForceFalls({ motor, road }: Vehicle): boolean {
  return motor.fullLoad === null && motor.lossMap === null && road.airLinearNSPerM >= 0 && road.airSquareNS2PerM2 >= 0;
}

/** Ends of the stretches of a speed range on which the net force in every one of the gears, and in the best of them, is smooth. */
function stretchEnds(pulls: Pull[], fromMPerS: number, toMPerS: number): number[] {
  const breaks = pulls.flatMap((pull) => pull.breaksMPerS(fromMPerS, toMPerS));
  const ends = [fromMPerS, ...breaks.sort((a, b) => a - b), toMPerS];
  if (pulls.length === 1) return ends;
  const gain = (speed: number) => pulls[1].netForceN(speed) - pulls[0].netForceN(speed);
  return [...ends, ...ends.slice(1).flatMap((end, k) => signChanges(gain, ends[k], end, PIECES))].sort((a, b) => a - b);
}

/** The first speed at which a net force that starts positive no longer is; NaN where it stays so. */
function firstLossMPerS(netForceN: RealFunction, ends: number[]): number {
  if (ends.length === 2) return netForceN(ends[1]) > 0 ? Number.NaN : signChange(netForceN, ends[0], ends[1]);
  for (let k = 1; k < ends.length; k++) {
    const [first] = signChanges(netForceN, ends[k - 1], ends[k], PIECES);
    if (first !== undefined) return first;
  }
  return Number.NaN;
}
