/**
 * Logarithm, exponential and power made of exactly specified operations only, so that every JavaScript engine gives
 * the same bits (the built-in ones differ between engines).
 */

/** ln 2 in two parts; the first has 21 trailing zero bits, so that a whole multiple of it below 2²¹ is exact. */
const LN2_HIGH = 0.6931471803691238;
const LN2_LOW = 1.9082149292705877e-10;
const SQRT2 = Math.sqrt(2);

/**
 * Natural logarithm of a positive finite number: base-2 reduction, then the area-tangent series
 * ln m = 2 (s + s³/3 + s⁵/5 + …), s = (m − 1)/(m + 1). Absolute error at most 4e-16 · max(1, |ln x|).
 * Source: Abramowitz & Stegun, Handbook of Mathematical Functions, 4.1.27 (from memory).
 */
export function naturalLogarithm(x: number): number {
  if (!(x > 0 && x < Infinity)) throw new RangeError(`logarithm of ${x}`);
  let mantissa = x;
  let halvings = 0;
  for (; mantissa > SQRT2; mantissa *= 0.5) halvings++;
  for (; mantissa * SQRT2 < 1; mantissa *= 2) halvings--;
  const s = (mantissa - 1) / (mantissa + 1);
  const square = s * s;
  let series = 0;
  // |s| ≤ 0.172: the first term left out, s²⁷/27, is below 1e-22.
  for (let odd = 25; odd >= 1; odd -= 2) series = series * square + 1 / odd;
  return halvings * LN2_HIGH + (halvings * LN2_LOW + 2 * s * series);
}

/** Exponential function: reduction by ln 2, then Taylor's series. Relative error at most 1e-15 for |t| ≤ 700. */
export function exponential(t: number): number {
  if (t > 710) return Infinity;
  if (t < -746) return 0;
  const doublings = Math.round(t / (LN2_HIGH + LN2_LOW));
  const rest = t - doublings * LN2_HIGH - doublings * LN2_LOW;
  let series = 1;
  // |rest| ≤ 0.347: the first term left out, rest¹⁶/16!, is below 1e-20.
  for (let term = 15; term >= 1; term--) series = 1 + (series * rest) / term;
  for (let k = doublings; k > 0; k--) series *= 2;
  for (let k = doublings; k < 0; k++) series *= 0.5;
  return series;
}

/** `base` to the power of `exponent`, for a positive base. Relative error at most 1e-14 while |exponent · ln base| ≤ 20. */
export function power(base: number, exponent: number): number {
  return exponential(exponent * naturalLogarithm(base));
}
