/** Where a function of one number changes sign. */

/** A function of one number. */
export type RealFunction = (x: number) => number;

/**
 * The point at which `f` changes between positive and not positive inside [from, to], to the last bits of a double
 * (4 ulp of the point, or 1e-18 of the bracket near zero). `f` must differ in that sense at the two ends, else it throws;
 * where it jumps instead of crossing zero, the jump is found. Inverse quadratic interpolation guarded by bisection.
 * Source: T. R. Chandrupatla, Advances in Engineering Software 28 (1997) 145-149 (from memory).
 */
export function signChange(f: RealFunction, from: number, to: number): number {
  return changeBetween(f, from, f(from), to, f(to));
}

/**
 * Every point inside [from, to] at which `f` changes between positive and not positive, rising. Looks at `intervals`
 * equal pieces (2 or more) and follows dips towards zero between them, so that a pair of changes within one piece is
 * found as well unless it is narrower than the dip can show. `f` should be smooth on [from, to].
 */
export function signChanges(f: RealFunction, from: number, to: number, intervals: number): number[] {
  const found: number[] = [];
  const step = (to - from) / intervals;
  let [x0, f0] = [from, f(from)];
  let [x1, f1] = [from + step, f(from + step)];
  if (f0 > 0 !== f1 > 0) found.push(changeBetween(f, x0, f0, x1, f1));
  for (let k = 2; k <= intervals; k++) {
    const x2 = k === intervals ? to : from + k * step;
    const f2 = f(x2);
    const upright = f1 > 0 ? 1 : -1;
    const dips = f0 > 0 === f1 > 0 && f1 > 0 === f2 > 0 && upright * f1 <= upright * f0 && upright * f1 <= upright * f2;
    if (dips) dipChanges(f, [x0, x1, x2], [f0, f1, f2], upright, found);
    if (f1 > 0 !== f2 > 0) found.push(changeBetween(f, x1, f1, x2, f2));
    [x0, f0, x1, f1] = [x1, f1, x2, f2];
  }
  return found;
}

/** Slides down a dip of f · upright by parabolas; pushes the two changes beside a point beyond zero, if there is one. */
function dipChanges(f: RealFunction, xs: [number, number, number], fs: [number, number, number], upright: number, found: number[]): void {
  let [a, b, c] = xs;
  let [fa, fb, fc] = fs;
  for (let round = 0; round < 12; round++) {
    const x = bottom(a, b, c, fa, fb, fc);
    if (!(x > a && x < c) || x === b) return;
    const fx = f(x);
    if (fx > 0 !== fb > 0) {
      found.push(changeBetween(f, a, fa, x, fx), changeBetween(f, x, fx, c, fc));
      return;
    }
    const lower = upright * fx < upright * fb;
    // A bottom that no longer sinks, far from zero, will not cross it.
    if (Math.abs(fx - fb) < 0.01 * Math.abs(fb)) return;
    if (lower && x > b) [a, fa, b, fb] = [b, fb, x, fx];
    else if (lower) [c, fc, b, fb] = [b, fb, x, fx];
    else if (x > b) [c, fc] = [x, fx];
    else [a, fa] = [x, fx];
  }
}

/** Bottom (or top) of the parabola through three points; NaN where they lie on a line. */
function bottom(a: number, b: number, c: number, fa: number, fb: number, fc: number): number {
  const left = (b - a) * (fb - fc);
  const right = (b - c) * (fb - fa);
  return b - (0.5 * ((b - a) * left - (b - c) * right)) / (left - right);
}

function changeBetween(f: RealFunction, from: number, fFrom: number, to: number, fTo: number): number {
  if (fFrom > 0 === fTo > 0) throw new RangeError(`no change of sign between f(${from}) = ${fFrom} and f(${to}) = ${fTo}`);
  const finest = 1e-18 * Math.abs(to - from);
  let [a, fa, b, fb, c, fc] = [to, fTo, from, fFrom, from, fFrom];
  let share = 0.5;
  for (;;) {
    const x = a + share * (b - a);
    const fx = f(x);
    if (fx > 0 === fa > 0) [c, fc] = [a, fa];
    else [c, fc, b, fb] = [b, fb, a, fa];
    [a, fa] = [x, fx];
    const best = Math.abs(fa) < Math.abs(fb) ? a : b;
    const least = (Math.abs(best) * 4.5e-16 + finest) / Math.abs(b - a);
    if (!(least <= 0.5) || fa === 0) return fa === 0 ? a : best;
    share = Math.min(Math.max(nextShare(a, fa, b, fb, c, fc), least), 1 - least);
  }
}

/** Share of the bracket [a, b] at which to look next: inverse quadratic where Chandrupatla's test allows it, else the middle. */
function nextShare(a: number, fa: number, b: number, fb: number, c: number, fc: number): number {
  const xi = (a - b) / (c - b);
  const phi = (fa - fb) / (fc - fb);
  if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 0.5;
  return (fa / (fb - fa)) * (fc / (fb - fc)) + ((c - a) / (b - a)) * (fa / (fc - fa)) * (fb / (fc - fb));
}
