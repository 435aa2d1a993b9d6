/** Integral and first moment of a smooth function, with no more of its values than the accuracy asks for. */
import type { RealFunction } from './roots.ts';

/** What `addMoments` adds to: ∫ f dx and ∫ x f dx. */
export interface Moments {
  integral: number;
  moment: number;
}

// Four rules inside one another, of 3, 7, 15 and 31 points: each keeps the points of the one before. Listed are the points of [−1, 1] from
// the middle up, in the order in which they join, and the weights that go with them. They are exact for polynomials up to degree 5, 11, 23
// and 47. Source: T. N. L. Patterson, The optimum addition of points to quadrature formulae, Mathematics of Computation 22 (1968)
// 847-856 (from memory); the figures are computed anew, to 60 digits, from its condition that added points raise the degree the most.
const POINTS = [
  0, 0.7745966692414834, 0.43424374934680254, 0.9604912687080203, 0.2233866864289669, 0.6211029467372264, 0.888459232872257, 0.993831963212755,
  0.11248894313318662, 0.3311353932579768, 0.5313197436443756, 0.7024962064915271, 0.8367259381688688, 0.9296548574297401, 0.9815311495537401,
  0.9990981249676676,
];
const WEIGHTS = [
  [0.8888888888888888, 0.5555555555555556],
  [0.45091653865847414, 0.26848808986833345, 0.40139741477596225, 0.10465622602646726],
  [
    0.2255104997982067, 0.13441525524378423, 0.20062852937698902, 0.05160328299707974, 0.2191568584015875, 0.1715119091363914, 0.09292719531512454,
    0.01700171962994026,
  ],
  [
    0.11275525672076869, 0.0672077542959907, 0.10031427861179558, 0.025807598096176654, 0.10957842105592464, 0.08575592004999034, 0.04646289326175799,
    0.008434565739321106, 0.11195687302095346, 0.1056698935802348, 0.09362710998126447, 0.07687962049900353, 0.05697950949412336, 0.03595710330712932,
    0.01644604985438781, 0.0025447807915618746,
  ],
];

/**
 * Largest difference, as a share, between two rules one after the other. The later one has twice the degree, so that its own error is about
 * the square of the difference: 1e-12.
 */
const AGREEMENT = 1e-6;
/** The same between the two rules before. */
const NEAR = 1e-2;
/** Halvings of an interval, one inside the other, after which it is taken as it is. */
const DEEPEST = 50;
/** Halvings of a whole integral after which it is: a guard against values that are rougher than they claim. */
const MOST = 500;

// Values at the two points of a pair, added and taken apart. Shared by all calls: `f` must not integrate itself.
const sums = new Float64Array(POINTS.length);
const differences = new Float64Array(POINTS.length);
let halvingsLeft = MOST;

/**
 * Adds ∫ f dx and ∫ x f dx from `from` to `to` (0 or more, either may be the greater) to `total`. For f of one sign that is smooth on the
 * interval and may have a pole close to it: the interval is halved where 31 points do not settle it. Relative error about 1e-12, and what
 * `noise` makes: values of f are taken to be uncertain by the share noise · |f|, and no more is asked of them. A NaN of f, wherever it is
 * met, makes both NaN at once.
 */
export function addMoments(f: RealFunction, from: number, to: number, noise: number, total: Moments): void {
  if (from === to) return;
  halvingsLeft = MOST;
  addPart(f, from, to, noise, total, DEEPEST);
}

function addPart(f: RealFunction, from: number, to: number, noise: number, total: Moments, depthLeft: number): void {
  const middle = 0.5 * (from + to);
  const half = 0.5 * (to - from);
  let integral = Number.NaN;
  let moment = Number.NaN;
  let points = 0;
  let settled = false;
  // Two rules may agree by chance, where the error of the former passes through zero: those before must have come near already.
  let near = true;
  for (let rule = 0; rule < WEIGHTS.length && !settled; rule++) {
    const weights = WEIGHTS[rule];
    for (; points < weights.length; points++) evaluatePair(f, middle, half, points);
    const lastIntegral = integral;
    const lastMoment = moment;
    integral = half * weighted(weights, sums);
    moment = middle * integral + half * half * weighted(weights, differences);
    if (Number.isNaN(integral)) break;
    if (rule === 0) continue;
    const apart = Math.max(Math.abs((integral - lastIntegral) / integral), Math.abs((moment - lastMoment) / moment));
    settled = near && apart <= AGREEMENT + noise * Math.abs(integral / half);
    near = apart <= NEAR;
  }
  if (settled || Number.isNaN(integral) || depthLeft === 0 || halvingsLeft === 0) {
    total.integral += integral;
    total.moment += moment;
    return;
  }
  halvingsLeft--;
  addPart(f, from, middle, noise, total, depthLeft - 1);
  if (!Number.isNaN(total.integral)) addPart(f, middle, to, noise, total, depthLeft - 1);
}

function evaluatePair(f: RealFunction, middle: number, half: number, k: number): void {
  if (k === 0) {
    sums[0] = f(middle);
    differences[0] = 0;
    return;
  }
  const away = half * POINTS[k];
  const upper = f(middle + away);
  const lower = f(middle - away);
  sums[k] = upper + lower;
  differences[k] = POINTS[k] * (upper - lower);
}

function weighted(weights: readonly number[], values: Float64Array): number {
  let sum = 0;
  for (let k = 0; k < weights.length; k++) sum += weights[k] * values[k];
  return sum;
}
