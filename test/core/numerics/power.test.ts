/** The project's own logarithm, exponential and power against values and against the built-in ones of this engine. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exponential, naturalLogarithm, power } from '../../../src/core/numerics/power.ts';

const relative = (got: number, wanted: number) => Math.abs(got - wanted) / Math.abs(wanted);

describe('power', () => {
  it('agrees with exact powers', () => {
    expect(relative(power(2, 10), 1024)).toBeLessThan(1e-14);
    expect(relative(power(0.5, 3), 0.125)).toBeLessThan(1e-14);
    expect(relative(power(2, 0.5), Math.SQRT2)).toBeLessThan(1e-14);
    expect(relative(power(81, 0.25), 3)).toBeLessThan(1e-14);
    expect(power(1, 5.25588)).toBe(1);
    expect(power(7, 0)).toBe(1);
  });

  it('has a relative error of at most 1e-14 while the result stays within e to the 20', () => {
    const exponents = fc.tuple(fc.double({ min: 0.01, max: 100, noNaN: true }), fc.double({ min: -20, max: 20, noNaN: true }));
    fc.assert(
      fc.property(exponents, ([base, lnResult]) => {
        const lnBase = Math.log(base);
        fc.pre(Math.abs(lnBase) > 1e-3);
        const exponent = lnResult / lnBase;
        expect(relative(power(base, exponent), base ** exponent)).toBeLessThan(1e-14);
      }),
      { numRuns: 2000 },
    );
  });

  it('turns a product of bases into a product of powers', () => {
    const bases = fc.double({ min: 0.2, max: 5, noNaN: true });
    fc.assert(
      fc.property(bases, bases, (a, b) => {
        expect(relative(power(a * b, 5.25588), power(a, 5.25588) * power(b, 5.25588))).toBeLessThan(2e-14);
      }),
    );
  });

  it('refuses a base that has no real logarithm', () => {
    expect(() => power(0, 2)).toThrow('logarithm of 0');
    expect(() => power(-1, 2)).toThrow('logarithm of -1');
  });
});

describe('naturalLogarithm', () => {
  it('agrees with the built-in one to 4e-16 of the larger of 1 and itself, from the smallest to the largest doubles', () => {
    fc.assert(
      fc.property(fc.double({ min: 5e-324, max: 1.7e308, noNaN: true }), (x) => {
        const wanted = Math.log(x);
        expect(Math.abs(naturalLogarithm(x) - wanted)).toBeLessThanOrEqual(4e-16 * Math.max(1, Math.abs(wanted)));
      }),
      { numRuns: 2000 },
    );
  });

  it('is close to x − 1 around 1', () => {
    expect(naturalLogarithm(1)).toBe(0);
    expect(relative(naturalLogarithm(1 + 1e-9), Math.log1p(1e-9))).toBeLessThan(1e-7);
  });
});

describe('exponential', () => {
  it('agrees with the built-in one to 1e-15', () => {
    fc.assert(
      fc.property(fc.double({ min: -700, max: 700, noNaN: true }), (t) => {
        expect(relative(exponential(t), Math.exp(t))).toBeLessThan(1e-15);
      }),
      { numRuns: 2000 },
    );
  });

  it('runs into infinity and zero at the ends of the doubles', () => {
    expect(exponential(720)).toBe(Infinity);
    expect(exponential(-760)).toBe(0);
  });
});
