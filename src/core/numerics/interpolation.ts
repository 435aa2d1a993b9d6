/** Linear interpolation on rising axes; beyond the ends the nearest value holds. */

/** Index i of the cell [axis[i], axis[i + 1]] that holds `x`; the first or last cell where x lies outside. Needs two points or more. */
export function cellOf(axis: readonly number[], x: number): number {
  let low = 0;
  let high = axis.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (axis[middle] <= x) low = middle;
    else high = middle;
  }
  return low;
}

/** Place of `x` in its cell, 0 to 1: held at the ends outside it. */
export function placeInCell(axis: readonly number[], cell: number, x: number): number {
  const from = axis[cell];
  const share = (x - from) / (axis[cell + 1] - from);
  return Math.min(Math.max(share, 0), 1);
}

/** Piecewise linear `values` over a strictly rising `axis` of two points or more, held beyond its ends. Exact at the points. */
export function interpolateLinear(axis: readonly number[], values: readonly number[], x: number): number {
  const cell = cellOf(axis, x);
  return blend(values[cell], values[cell + 1], placeInCell(axis, cell, x));
}

/**
 * Bilinear interpolation on a full grid, `grid[i * yAxis.length + j]` at (xAxis[i], yAxis[j]); the nearest edge holds
 * outside. Each axis rises strictly and has two points or more. Exact at the points, continuous everywhere.
 */
export function interpolateBilinear(xAxis: readonly number[], yAxis: readonly number[], grid: readonly number[], x: number, y: number): number {
  const i = cellOf(xAxis, x);
  const j = cellOf(yAxis, y);
  const yShare = placeInCell(yAxis, j, y);
  const near = i * yAxis.length + j;
  const far = near + yAxis.length;
  return blend(blend(grid[near], grid[near + 1], yShare), blend(grid[far], grid[far + 1], yShare), placeInCell(xAxis, i, x));
}

/** `a` at share 0, `b` at share 1, both exactly. */
export function blend(a: number, b: number, share: number): number {
  return share === 1 ? b : a + (b - a) * share;
}
