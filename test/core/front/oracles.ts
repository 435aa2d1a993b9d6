/** Slow, plain answers that the fast code is compared with, and small ways of writing points. */

/** Rows of objectives as columns. */
export function columnsOf(rows: readonly (readonly number[])[], width: number): Float64Array[] {
  return Array.from({ length: width }, (_, j) => Float64Array.from(rows, (row) => row[j]!));
}

/** Columns of objectives as rows. */
export function rowsOf(columns: readonly Float64Array[]): number[][] {
  return Array.from(columns[0] ?? [], (_, i) => columns.map((column) => column[i]!));
}

/** Dominance, word by word: no worse in all, better in one. */
export function plainlyDominates(a: readonly number[], b: readonly number[]): boolean {
  return a.every((value, j) => value <= b[j]!) && a.some((value, j) => value < b[j]!);
}

/** Indices of the rows without NaN that no other such row dominates: all pairs. */
export function plainFront(rows: readonly (readonly number[])[]): number[] {
  const complete = rows.map((row, index) => ({ row, index })).filter(({ row }) => !row.some(Number.isNaN));
  return complete.filter(({ row }) => !complete.some((other) => plainlyDominates(other.row, row))).map(({ index }) => index);
}

/** A repeatable stream of numbers in [0, 1): xorshift (Marsaglia 2003; from memory), from a whole number above 0. */
export function randomStream(seed: number): () => number {
  let state = seed | 0;
  return () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return (state >>> 0) / 4294967296;
  };
}
