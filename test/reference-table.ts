/** Comparisons with published values: each asserts, and each becomes a row of the one table that ends the test output. */
import { appendFileSync } from 'node:fs';
import { expect, inject } from 'vitest';

declare module 'vitest' {
  interface ProvidedContext {
    /** File that collects the rows of all test files, one JSON text a line. */
    referenceRows: string;
  }
}

/** One comparison with a value from outside. */
export interface ReferenceRow {
  /** What is compared, with its unit: `EV1, 0-60 mph, s`. */
  readonly check: string;
  /** Author or standard, and whether the figure was read, or is from memory. */
  readonly source: string;
  readonly expected: number;
  readonly got: number;
  /** Largest relative difference accepted; against `scale` where the expected value is near zero. */
  readonly within: number;
  readonly scale?: number;
}

/** Asserts a comparison and enters it in the table. */
export function compare(row: ReferenceRow): void {
  const difference = relativeDifference(row);
  appendFileSync(inject('referenceRows'), `${JSON.stringify({ ...row, difference })}\n`);
  expect(difference, `${row.check}: ${row.got} where ${row.expected} is published (${row.source})`).toBeLessThanOrEqual(row.within);
}

function relativeDifference({ expected, got, scale }: ReferenceRow): number {
  return Math.abs(got - expected) / (scale ?? Math.abs(expected));
}
