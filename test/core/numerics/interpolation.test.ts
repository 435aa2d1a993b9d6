/** Linear interpolation: exact at the points, held outside, against plain formulas. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cellOf, interpolateBilinear, interpolateLinear, placeInCell } from '../../../src/core/numerics/interpolation.ts';

const axes = fc
  .uniqueArray(fc.integer({ min: -1000, max: 1000 }), { minLength: 2, maxLength: 12 })
  .map((points) => points.map((point) => point / 4).sort((a, b) => a - b));
const places = fc.double({ min: -300, max: 300, noNaN: true });

/** Hat functions: each point's value times its tent over the held place. */
function tent(axis: number[], k: number, x: number): number {
  const held = Math.min(Math.max(x, axis[0]), axis[axis.length - 1]);
  if (k > 0 && held >= axis[k - 1] && held <= axis[k]) return (held - axis[k - 1]) / (axis[k] - axis[k - 1]);
  if (k < axis.length - 1 && held >= axis[k] && held <= axis[k + 1]) return (axis[k + 1] - held) / (axis[k + 1] - axis[k]);
  return held === axis[k] ? 1 : 0;
}

describe('cellOf', () => {
  it('finds the cell that a plain walk finds, and the end cells outside', () => {
    fc.assert(
      fc.property(axes, places, (axis, x) => {
        let walked = 0;
        while (walked < axis.length - 2 && axis[walked + 1] <= x) walked++;
        expect(cellOf(axis, x)).toBe(walked);
      }),
    );
  });

  it('places a point in its cell between 0 and 1', () => {
    expect(placeInCell([2, 4], 0, 2.5)).toBe(0.25);
    expect(placeInCell([2, 4], 0, 1)).toBe(0);
    expect(placeInCell([2, 4], 0, 9)).toBe(1);
  });
});

describe('interpolateLinear', () => {
  it('gives the points themselves and holds the end values outside', () => {
    fc.assert(
      fc.property(axes, (axis) => {
        const values = axis.map((x) => x * x - 3);
        axis.forEach((x, k) => {
          expect(interpolateLinear(axis, values, x)).toBe(values[k]);
        });
        expect(interpolateLinear(axis, values, axis[0] - 5)).toBe(values[0]);
        expect(interpolateLinear(axis, values, axis[axis.length - 1] + 5)).toBe(values[values.length - 1]);
      }),
    );
  });

  it('is the sum of tents over the points', () => {
    fc.assert(
      fc.property(axes, places, (axis, x) => {
        const values = axis.map((point) => Math.abs(point) + 1);
        const wanted = values.reduce((sum, value, k) => sum + value * tent(axis, k, x), 0);
        expect(Math.abs(interpolateLinear(axis, values, x) - wanted)).toBeLessThan(1e-12 * wanted);
      }),
    );
  });
});

describe('interpolateBilinear', () => {
  it('is the sum of products of tents over the grid', () => {
    fc.assert(
      fc.property(axes, axes, places, places, (xAxis, yAxis, x, y) => {
        const grid = xAxis.flatMap((a) => yAxis.map((b) => 1 + Math.abs(a) + b * b));
        let wanted = 0;
        for (let i = 0; i < xAxis.length; i++)
          for (let j = 0; j < yAxis.length; j++) wanted += grid[i * yAxis.length + j] * tent(xAxis, i, x) * tent(yAxis, j, y);
        expect(Math.abs(interpolateBilinear(xAxis, yAxis, grid, x, y) - wanted)).toBeLessThan(1e-12 * wanted);
      }),
    );
  });

  it('gives the grid points themselves, bit for bit', () => {
    const [xAxis, yAxis] = [
      [0, 0.1, 0.7],
      [-1, 0.3],
    ];
    const grid = [0.1, 0.2, 0.3, 0.4, 0.7, 0.9];
    xAxis.forEach((x, i) => {
      yAxis.forEach((y, j) => {
        expect(interpolateBilinear(xAxis, yAxis, grid, x, y)).toBe(grid[i * 2 + j]);
      });
    });
  });
});
