/** Changes of sign: found to the last bits, all of them, also where two lie close together. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { signChange, signChanges } from '../../../src/core/numerics/roots.ts';

const numbers = (from: number, to: number) => fc.double({ min: from, max: to, noNaN: true });

describe('signChange', () => {
  it('finds known roots to the last bits', () => {
    expect(Math.abs(signChange((x) => x * x - 2, 0, 2) - Math.SQRT2)).toBeLessThan(1e-15);
    expect(Math.abs(signChange(Math.cos, 0, 3) - Math.PI / 2)).toBeLessThan(2e-15);
    expect(Math.abs(signChange((x) => x * x * x - 1e-30, -1, 1) - 1e-10)).toBeLessThan(1e-17);
    expect(signChange((x) => 5 - x, 0, 20)).toBe(5);
  });

  it('finds the root of any cubic with one root, wherever the bracket lies', () => {
    fc.assert(
      fc.property(numbers(-50, 50), numbers(0.01, 10), numbers(1, 100), numbers(1, 100), (root, stiffness, below, above) => {
        const found = signChange((x) => (x - root) * ((x - root) * (x - root) + stiffness), root - below, root + above);
        expect(Math.abs(found - root)).toBeLessThanOrEqual(1e-15 * Math.abs(root) + 1e-16 * (below + above));
      }),
    );
  });

  it('finds a jump and keeps to the bracket', () => {
    fc.assert(
      fc.property(numbers(-1, 1), numbers(-1e6, -1e-6), numbers(1e-6, 1e6), (step, low, high) => {
        fc.pre(Math.abs(step) < 1);
        const found = signChange((x) => (x < step ? low : high), -1, 1);
        expect(Math.abs(found - step)).toBeLessThanOrEqual(1e-15);
      }),
    );
  });

  it('works from a zero at the bracket and through infinite values', () => {
    expect(signChange((x) => x, 0, 1)).toBeLessThan(1e-15);
    expect(Math.abs(signChange((x) => (x < 0.3 ? -Infinity : x), 0, 1) - 0.3)).toBeLessThan(1e-15);
  });

  it('comes to an end on flat, steep, stepped and noisy functions', () => {
    const rough = (x: number) => 1e-16 * (1.5 + Math.sin(1e9 * x));
    const functions: ((x: number) => number)[] = [
      (x) => (x - 0.3) ** 31,
      (x) => Math.sign(x - 0.7) * Math.exp(-1 / Math.abs(x - 0.7)),
      (x) => (x < 0.9 ? -rough(x) : 1),
      (x) => (x < 0.9 ? -1 : rough(x)),
      (x) => (x < 1 - 1e-15 ? -rough(x) : rough(x)),
      (x) => Math.tan(3.14 * (x - 0.5)),
    ];
    for (const f of functions) {
      let looks = 0;
      const found = signChange(
        (x) => {
          looks++;
          return f(x);
        },
        0,
        1,
      );
      expect(looks).toBeLessThan(150);
      expect(f(found - 1e-2) > 0).not.toBe(f(Math.min(found + 1e-2, 1)) > 0);
    }
  });

  it('throws with its numbers when nothing changes', () => {
    expect(() => signChange((x) => x, 1, 2)).toThrow('f(1) = 1 and f(2) = 2');
  });
});

describe('signChanges', () => {
  it('finds every root of a sine, rising', () => {
    const found = signChanges((x) => Math.sin(x), 0.5, 13, 16);
    expect(found).toHaveLength(4);
    found.forEach((root, k) => {
      expect(Math.abs(root - (k + 1) * Math.PI)).toBeLessThan(4e-15);
    });
  });

  it('finds nothing where the function keeps its sign or only touches zero from below', () => {
    expect(signChanges((x) => x * x + 1, -2, 3, 8)).toEqual([]);
    expect(signChanges(() => 0, 0, 1, 8)).toEqual([]);
    expect(signChanges((x) => -(x - 0.3) * (x - 0.3), 0, 1, 8)).toEqual([]);
  });

  it('finds a close pair of roots between two of the points it looks at', () => {
    const pairs = fc.record({ at: numbers(0.01, 0.89), apart: numbers(1e-5, 0.1), bend: numbers(-0.5, 0.5), upright: fc.constantFrom(1, -1) });
    fc.assert(
      fc.property(pairs, ({ at, apart, bend, upright }) => {
        const f = (x: number) => upright * (x - at) * (x - at - apart) * (1 + bend * x);
        const found = signChanges(f, 0, 1, 8);
        expect(found).toHaveLength(2);
        expect(Math.abs(found[0] - at)).toBeLessThan(1e-11);
        expect(Math.abs(found[1] - at - apart)).toBeLessThan(1e-11);
      }),
    );
  });

  it('finds every change of sign of a quartic that a fine scan finds', () => {
    const tenths = fc.array(
      fc.integer({ min: -30, max: 30 }).map((n) => n / 10),
      { minLength: 5, maxLength: 5 },
    );
    fc.assert(
      fc.property(tenths, (c) => {
        const f = (x: number) => c[0] + x * (c[1] + x * (c[2] + x * (c[3] + x * c[4])));
        const found = signChanges(f, -1, 1, 16);
        for (let k = 1; k <= 2000; k++) {
          const [left, right] = [-1 + (k - 1) / 1000, -1 + k / 1000];
          if (f(left) > 0 !== f(right) > 0) expect(found.some((root) => root >= left - 1e-9 && root <= right + 1e-9)).toBe(true);
        }
      }),
      { numRuns: 500 },
    );
  });
});
