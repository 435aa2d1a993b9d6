/** Top speed at full pedal. */
import { type RealFunction, signChange, signChanges } from '../numerics/roots.ts';
import type { Gear } from '../vehicle/gearing.ts';
import { type TractionLimit, tractionLimit } from '../vehicle/traction.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import { type PedalConditions, type Pull, pullInGear } from './full-pedal.ts';

/** Zero speed when the vehicle cannot start. */
export interface TopSpeedResult {
  speedMPerS: number;
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
  const at = (gear: Gear, speedMPerS: number): TopSpeedResult => ({
    speedMPerS,
    limit: tractionLimit(vehicle, gear, speedMPerS, conditions.rating, conditions.slope),
  });
  const falls = netForceFalls(vehicle);
  if (vehicle.gearing.ratioCount === 1) {
    if (!(lower.netForceN(0) > 0)) return at(0, 0);
    const lossMPerS = firstLossMPerS(lower.netForceN, falls ? [0, lower.topMPerS] : stretchEnds([lower], 0, lower.topMPerS));
    return Number.isNaN(lossMPerS) ? { speedMPerS: lower.topMPerS, limit: 'motor speed' } : at(0, lossMPerS);
  }

  const higher = pullInGear(vehicle, 1, conditions);
  const better = (speed: number) => Math.max(lower.netForceN(speed), higher.netForceN(speed));
  const atBetter = (speed: number) => at(lower.netForceN(speed) >= higher.netForceN(speed) ? 0 : 1, speed);
  if (!(better(0) > 0)) return atBetter(0);
  const lossMPerS = firstLossMPerS(better, falls ? [0, lower.topMPerS] : stretchEnds([lower, higher], 0, lower.topMPerS));
  if (!Number.isNaN(lossMPerS)) return atBetter(lossMPerS);
  // The lower gear ends here; the higher one may not hold the speed.
  if (!(higher.netForceN(lower.topMPerS) > 0)) return { speedMPerS: lower.topMPerS, limit: 'motor speed' };
  const higherLossMPerS = firstLossMPerS(higher.netForceN, falls ? [lower.topMPerS, higher.topMPerS] : stretchEnds([higher], lower.topMPerS, higher.topMPerS));
  return Number.isNaN(higherLossMPerS) ? { speedMPerS: higher.topMPerS, limit: 'motor speed' } : at(1, higherLossMPerS);
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
