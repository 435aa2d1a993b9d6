/** Quadrature: exact for polynomials, against closed forms near poles, and honest about what it cannot know. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addMoments, type Moments } from '../../../src/core/numerics/quadrature.ts';

function momentsOf(f: (x: number) => number, from: number, to: number, noise = 1e-15): Moments {
  const total = { integral: 0, moment: 0 };
  addMoments(f, from, to, noise, total);
  return total;
}

/** How many values of `f` an integral asks for. */
function countOf(f: (x: number) => number, from: number, to: number): number {
  let count = 0;
  momentsOf(
    (x) => {
      count++;
      return f(x);
    },
    from,
    to,
  );
  return count;
}

const relative = (found: number, wanted: number) => Math.abs(found - wanted) / Math.abs(wanted);
const ends = fc.tuple(fc.integer({ min: 0, max: 400 }), fc.integer({ min: 1, max: 400 })).map(([from, length]) => [from / 8, (from + length) / 8]);

describe('addMoments', () => {
  it('is exact for polynomials', () => {
    fc.assert(
      fc.property(ends, fc.integer({ min: 0, max: 46 }), ([from, to], degree) => {
        const { integral, moment } = momentsOf((x) => (x / to) ** degree, from, to);
        // (toⁿ − fromⁿ)/(n toⁿ⁻¹) without its cancellation where the ends are close.
        const power = (n: number) => ((to - from) / n) * Array.from({ length: n }, (_, k) => (from / to) ** k).reduce((sum, term) => sum + term, 0);
        expect(relative(integral, power(degree + 1))).toBeLessThan(2e-14);
        expect(relative(moment, to * power(degree + 2))).toBeLessThan(2e-14);
      }),
    );
  });

  it('has rules of 7, 15 and 31 points that are exact to degree 11, 23 and 47', () => {
    // Each is accepted where the rule before, of half the degree, agrees: monomials about the middle that it still gives to a millionth.
    expect(countOf((x) => 1 + 1e-9 * x ** 11, 0, 1.5)).toBe(7);
    expect(countOf((x) => 1 + 1e-2 * x ** 6, 0, 1)).toBe(15);
    expect(countOf((x) => 1 + x ** 18, 0, 1)).toBe(31);
    for (const degree of [0, 6, 10, 18, 22, 40, 46]) {
      const { integral } = momentsOf((x) => 1 + x ** degree, 0, 1);
      expect(relative(integral, 1 + 1 / (degree + 1))).toBeLessThan(1e-14);
    }
  });

  it('follows a pole beyond the end to 1e-9, and to 1e-6 where rounding leaves no more', () => {
    // 1/(1 − x²): area tangent and logarithm.
    for (const [gap, tolerance] of [
      [0.5, 1e-13],
      [1e-1, 1e-13],
      [1e-3, 1e-12],
      [1e-6, 1e-10],
      [1e-9, 1e-7],
      [1e-12, 1e-5],
    ]) {
      const end = 1 - gap;
      const { integral, moment } = momentsOf((x) => 1 / (1 - x * x), 0, end);
      expect(relative(integral, Math.atanh(end))).toBeLessThan(tolerance);
      expect(relative(moment, -0.5 * Math.log((1 - end) * (1 + end)))).toBeLessThan(tolerance);
    }
  });

  it('follows a pair of poles beside the interval', () => {
    // x − 1 is rounded to about 1e-16: a share of 1e-16 / away where it counts most.
    for (const away of [1, 0.1, 1e-3, 1e-6]) {
      const { integral } = momentsOf((x) => 1 / ((x - 1) ** 2 + away * away), 0, 3);
      expect(relative(integral, (Math.atan(2 / away) + Math.atan(1 / away)) / away)).toBeLessThan(1e-12 + 2e-15 / away);
    }
  });

  it('finds a pole inside by the sign of what is divided: a NaN makes both results NaN', () => {
    const gap = 1e-7;
    const dip = (x: number) => {
      const below = (x - 1.2345) ** 2 - gap * gap;
      return below > 0 ? 1 / below : Number.NaN;
    };
    const total = momentsOf(dip, 0, 3);
    expect([total.integral, total.moment]).toEqual([Number.NaN, Number.NaN]);
    expect(countOf((x) => (x < 1 ? 1 : Number.NaN), 0, 2)).toBeLessThan(8);
  });

  it('is not taken in by two rules that agree by chance', () => {
    // With the pole at this distance the error of 7 points passes through zero, and 15 points alone are 4e-8 off.
    const { integral } = momentsOf((x) => 1 / (94.30875 - x), 78.03, 93.375);
    expect(relative(integral, Math.log((94.30875 - 78.03) / (94.30875 - 93.375)))).toBeLessThan(1e-12);
  });

  it('adds to what is there, and takes away on the way back', () => {
    const total = { integral: 5, moment: 7 };
    addMoments((x) => 1 / (3 - x), 0, 2, 1e-15, total);
    expect(total.integral).toBeCloseTo(5 + Math.log(3), 13);
    addMoments((x) => 1 / (3 - x), 2, 0, 1e-15, total);
    expect(total.integral).toBeCloseTo(5, 13);
    expect(total.moment).toBeCloseTo(7, 13);
    expect(momentsOf((x) => x, 2, 2)).toEqual({ integral: 0, moment: 0 });
  });

  it('adds up over neighbouring intervals', () => {
    fc.assert(
      fc.property(ends, fc.integer({ min: 1, max: 99 }), ([from, to], percent) => {
        const f = (x: number) => 1 / (1.01 * to - x);
        const middle = from + ((to - from) * percent) / 100;
        const whole = momentsOf(f, from, to);
        const parts = momentsOf(f, from, middle);
        addMoments(f, middle, to, 1e-15, parts);
        expect(relative(parts.integral, whole.integral)).toBeLessThan(1e-11);
        expect(relative(parts.moment, whole.moment)).toBeLessThan(1e-11);
      }),
    );
  });

  it('comes to an end on a jump, and on values that are nothing but noise', () => {
    expect(relative(momentsOf((x) => (x < 1 / 3 ? 1 : 2), 0, 1).integral, 5 / 3)).toBeLessThan(1e-12);
    const noise = (x: number) => 1 + 0.5 * Math.sin(1e9 * x);
    expect(countOf(noise, 0, 1)).toBeLessThan(1002 * 31);
    expect(relative(momentsOf(noise, 0, 1).integral, 1)).toBeLessThan(0.1);
  });
});
