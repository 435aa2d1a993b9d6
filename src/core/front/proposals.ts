/** The designs put forward from a front: the best in each objective and the balanced one. */

/**
 * Index of the balanced design: the least sum of objectives, each scaled from 0 to 1 over the front (an objective
 * without extent counts 0); ties to the lowest index, which is the lowest design number where the front is in order.
 * Columns of objectives, less is better; -1 for an empty front.
 */
export function balancedDesign(objectives: readonly Float64Array[]): number {
  return leastSum(scaledColumns(objectives), () => true);
}

/**
 * For each objective the index of its best design; among equals the one with the least sum of the other objectives,
 * each scaled from 0 to 1 over the front, then the lowest index. Columns of objectives, less is better; -1 for each
 * where the front is empty.
 */
export function bestInEach(objectives: readonly Float64Array[]): number[] {
  const scaled = scaledColumns(objectives);
  return objectives.map((column) => {
    const best = extent(column).low;
    // The objective itself counts 0 for each of its best.
    return leastSum(scaled, (i) => column[i] === best);
  });
}

/** Index of the least sum over the columns among the rows allowed; the first of equals, -1 where no row is. */
function leastSum(columns: readonly Float64Array[], allowed: (index: number) => boolean): number {
  const count = columns[0]?.length ?? 0;
  let found = -1;
  let least = Number.POSITIVE_INFINITY;
  for (let i = 0; i < count; i++) {
    if (!allowed(i)) continue;
    let sum = 0;
    for (const column of columns) sum += column[i]!;
    if (sum < least) {
      least = sum;
      found = i;
    }
  }
  return found;
}

function scaledColumns(objectives: readonly Float64Array[]): Float64Array[] {
  return objectives.map((column) => {
    const { low, high } = extent(column);
    return column.map((value) => scaledValue(value, low, high));
  });
}

/** 0 at the low end, 1 at the high end; the ends themselves first, because one of them may be infinite. */
function scaledValue(value: number, low: number, high: number): number {
  if (value === low) return 0;
  if (value === high) return 1;
  if (low === Number.NEGATIVE_INFINITY) return high === Number.POSITIVE_INFINITY ? 0.5 : 1;
  return (value - low) / (high - low);
}

function extent(column: Float64Array): { low: number; high: number } {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const value of column) {
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return { low, high };
}
