/** Where a function of one number changes sign. */

/** Rounds after which only bisection is trusted: a function of mere rounding may lead the interpolation astray for long. */
const PATIENCE = 60;

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
  let x0 = from;
  let x1 = from + step;
  let f0 = f(x0);
  let f1 = f(x1);
  if (f0 > 0 !== f1 > 0) found.push(changeBetween(f, x0, f0, x1, f1));
  for (let k = 2; k <= intervals; k++) {
    const x2 = k === intervals ? to : from + k * step;
    const f2 = f(x2);
    if (f0 > 0 === f1 > 0 && f1 > 0 === f2 > 0) {
      const upright = f1 > 0 ? 1 : -1;
      const risesBefore = upright * (f1 - f0) > 0;
      const fallsBeyond = upright * (f2 - f1) < 0;
      // A dip is followed from its lowest point alone; in the first and the last piece that may be an outer one.
      if ((!risesBefore || k === 2) && (!fallsBeyond || k === intervals)) {
        const triple = { a: x0, b: x1, c: x2, fa: f0, fb: f1, fc: f2, upright };
        followDip(f, triple, fallsBeyond ? x1 : x0, risesBefore ? x1 : x2, found);
      }
    }
    if (f1 > 0 !== f2 > 0) found.push(changeBetween(f, x1, f1, x2, f2));
    x0 = x1;
    f0 = f1;
    x1 = x2;
    f1 = f2;
  }
  return found;
}

/** Three neighbouring points of one sign, `upright` 1 where they are positive, else −1. */
interface Triple {
  a: number;
  b: number;
  c: number;
  fa: number;
  fb: number;
  fc: number;
  readonly upright: number;
}

/** Slides towards zero by parabolas, inside (from, to); pushes the two changes beside a point beyond zero, if there is one. */
function followDip(f: RealFunction, t: Triple, from: number, to: number, found: number[]): void {
  for (let round = 0; round < 12; round++) {
    const x = bottom(t);
    if (!(x > from && x < to) || x === t.b) return;
    const fx = f(x);
    if (fx > 0 !== t.fb > 0) {
      found.push(changeBetween(f, t.a, t.fa, x, fx), changeBetween(f, x, fx, t.c, t.fc));
      return;
    }
    // A bottom that no longer sinks, far from zero, will not cross it.
    if (Math.abs(fx - t.fb) < 0.01 * Math.abs(t.fb)) return;
    const lower = t.upright * fx < t.upright * t.fb;
    // The higher of the two inner points becomes an end.
    if (x > t.b === lower) {
      t.a = lower ? t.b : x;
      t.fa = lower ? t.fb : fx;
    } else {
      t.c = lower ? t.b : x;
      t.fc = lower ? t.fb : fx;
    }
    if (lower) {
      t.b = x;
      t.fb = fx;
    }
  }
}

/** Bottom of the parabola through the three points (top where they are negative); NaN where it has none. */
function bottom({ a, b, c, fa, fb, fc, upright }: Triple): number {
  const left = (b - a) * (fb - fc);
  const right = (b - c) * (fb - fa);
  if (!(upright * (left - right) < 0)) return Number.NaN;
  return b - (0.5 * ((b - a) * left - (b - c) * right)) / (left - right);
}

function changeBetween(f: RealFunction, from: number, fFrom: number, to: number, fTo: number): number {
  if (fFrom > 0 === fTo > 0) throw new RangeError(`no change of sign between f(${from}) = ${fFrom} and f(${to}) = ${fTo}`);
  const finest = 1e-18 * Math.abs(to - from);
  let a = to;
  let fa = fTo;
  let b = from;
  let fb = fFrom;
  let c = from;
  let fc = fFrom;
  let share = 0.5;
  for (let round = 1; ; round++) {
    const x = a + share * (b - a);
    const fx = f(x);
    if (fx > 0 === fa > 0) {
      c = a;
      fc = fa;
    } else {
      c = b;
      fc = fb;
      b = a;
      fb = fa;
    }
    a = x;
    fa = fx;
    const best = Math.abs(fa) < Math.abs(fb) ? a : b;
    const least = (Math.abs(best) * 4.5e-16 + finest) / Math.abs(b - a);
    if (!(least <= 0.5) || fa === 0) return fa === 0 ? a : best;
    share = round < PATIENCE ? Math.min(Math.max(nextShare(a, fa, b, fb, c, fc), least), 1 - least) : 0.5;
  }
}

/** Share of the bracket [a, b] at which to look next: inverse quadratic where Chandrupatla's test allows it, else the middle. */
function nextShare(a: number, fa: number, b: number, fb: number, c: number, fc: number): number {
  const xi = (a - b) / (c - b);
  const phi = (fa - fb) / (fc - fb);
  if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 0.5;
  return (fa / (fb - fa)) * (fc / (fb - fc)) + ((c - a) / (b - a)) * (fa / (fc - fa)) * (fb / (fc - fb));
}
