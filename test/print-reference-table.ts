/** Collects what the reference tests compare and prints it once, as one table, when all tests are through. */
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import Table from 'cli-table3';
import type { TestProject } from 'vitest/node';
import type { ReferenceRow } from './reference-table.ts';

/** Runs before all tests; the function it returns, after them. */
export default function setup(project: TestProject): () => void {
  const folder = mkdtempSync(join(tmpdir(), 'layshaft-reference-'));
  const file = join(folder, 'rows.jsonl');
  writeFileSync(file, '');
  project.provide('referenceRows', file);
  return () => {
    const rows = readFileSync(file, 'utf8').split('\n').filter(Boolean);
    rmSync(folder, { recursive: true });
    if (rows.length > 0) process.stdout.write(`\n${table(rows.map((row) => JSON.parse(row)))}\n`);
  };
}

function table(rows: readonly (ReferenceRow & { readonly difference: number })[]): string {
  const printed = new Table({
    head: ['check', 'source', 'expected', 'got', 'difference', 'accepted'],
    style: { head: [], border: [] },
    chars: { mid: '', 'left-mid': '', 'mid-mid': '', 'right-mid': '' },
  });
  for (const { check, source, expected, got, difference, within } of [...rows].sort((a, b) => (a.check < b.check ? -1 : 1))) {
    printed.push([check, source, figure(expected), figure(got), difference.toExponential(1), within.toExponential(0)]);
  }
  return `Comparisons with values from outside\n${printed.toString()}`;
}

function figure(value: number): string {
  return String(Number(value.toPrecision(9)));
}
