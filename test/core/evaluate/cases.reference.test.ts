/**
 * Twelve invented designs with every metric and limit from a separate implementation of the model in SciPy 1.10 (adaptive
 * quadrature and DOP853 that agree to 3e-10, Brent's method, plain loops over the cycle; energy sinks closed to 1e-11).
 * Accepted: 1e-6 for times and distances, 1e-9 for top speed and cycle figures, 2e-6 for cycles with a loss map and the rest.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { compileStudy } from '../../../src/core/evaluate/compile.ts';
import { limitWords } from '../../../src/core/evaluate/evaluator.ts';
import type { MetricColumn } from '../../../src/core/study/catalogue/metrics.ts';
import { checkStudy, type StudySources } from '../../../src/core/study/check-study.ts';
import type { Study } from '../../../src/core/study/study.ts';
import { fromSi, machineUnit } from '../../../src/core/units/units.ts';
import { compare, type ReferenceRow } from '../../reference-table.ts';

interface Expected {
  readonly metrics: Record<string, number | null>;
  readonly limits: Record<string, string>;
}

const folder = new URL('../../data/cases/', import.meta.url);
const cycles = new URL('../../../src/run/cycles/', import.meta.url);
const cases = readdirSync(folder)
  .filter((name) => name.endsWith('.yaml'))
  .map((name) => name.slice(0, -'.yaml'.length));

const sources: StudySources = {
  cycleNames: readdirSync(cycles).map((name) => name.slice(0, -'.csv'.length)),
  cycle: (name) => readFileSync(new URL(`${name}.csv`, cycles), 'utf8'),
  file: (path) => ({ text: readFileSync(new URL(path, folder), 'utf8') }),
};

/** What studies with two ratios tell besides. */
const ofGears = /\.(?:ratio|shiftSpeed_kmh|lowerGearShare_pct)$/u;

const separate = 'separate implementation of the model in SciPy 1.10';
type Group = 'time and distance' | 'top speed' | 'cycle' | 'cycle with a map' | 'rest';
const tolerances: Record<Group, number> = { 'time and distance': 1e-6, 'top speed': 1e-9, cycle: 1e-9, 'cycle with a map': 2e-6, rest: 2e-6 };

function groupOf(column: MetricColumn, study: Study): Group {
  const kind = study.trials.find(({ name }) => name === column.trial)?.kind;
  if (column.row.name === 'payload') return 'rest';
  if (kind === 'cycle') return study.lossMap === null ? 'cycle' : 'cycle with a map';
  if (column.row.name === 'time' || column.row.name === 'distance') return 'time and distance';
  return kind === 'top speed' ? 'top speed' : 'rest';
}

/** A sink that is nothing but rounding is weighed against the energy of its cycle. */
function scaleOf(key: string, expected: Expected): number {
  const value = Math.abs(expected.metrics[key] as number);
  const trial = key.slice(0, key.indexOf('.energy.'));
  if (!key.includes('.energy.')) return value === 0 ? 1 : value;
  return Math.max(value, 1e-6 * (expected.metrics[`${trial}.wheelDemand_Wh_per_km`] as number));
}

function readStudy(name: string): Study {
  const check = checkStudy(readFileSync(new URL(`${name}.yaml`, folder), 'utf8'), `${name}.yaml`, sources);
  if (!check.ok) throw new Error(JSON.stringify(check.issues));
  return check.study;
}

describe('designs from a separate implementation of the model', () => {
  it.each(cases)('%s', (name) => {
    const expected = JSON.parse(readFileSync(new URL(`${name}.expect.json`, folder), 'utf8')) as Expected;
    const study = readStudy(name);
    const evaluator = compileStudy(study);
    const row = new Float64Array(evaluator.metrics.length);
    const limits = new Uint8Array(row.length);
    evaluator.evaluate(evaluator.reference, 0, row, 0, limits);

    const worst = new Map<Group, ReferenceRow & { readonly off: number }>();
    const faults: string[] = [];
    evaluator.metrics.forEach((column, k) => {
      const { key } = column;
      const value = fromSi(row[k], machineUnit(column.row.quantity));
      if (ofGears.test(key)) return;
      const wanted = expected.metrics[key];
      const limit = limitWords[limits[k]];
      if (limit !== (expected.limits[key] ?? '')) faults.push(`${key} is limited by '${limit}', not by '${expected.limits[key] ?? ''}'`);
      if (wanted === null || wanted === undefined || Number.isNaN(value)) {
        if (wanted !== null || !Number.isNaN(value)) faults.push(`${key} is ${value}, not ${wanted}`);
        return;
      }
      const group = groupOf(column, study);
      const off = Math.abs(value - wanted) / scaleOf(key, expected);
      if (!(off <= tolerances[group])) faults.push(`${key} is ${value}, not ${wanted}: off by ${off.toExponential(1)}`);
      if (off <= (worst.get(group)?.off ?? -1)) return;
      const check = `design ${name}: worst of group '${group}': ${key}`;
      worst.set(group, { check, source: separate, expected: wanted, got: value, within: tolerances[group], scale: scaleOf(key, expected), off });
    });
    expect(faults).toEqual([]);
    for (const row of worst.values()) compare(row);
    const told = evaluator.metrics.map(({ key }) => key).filter((key) => !ofGears.test(key));
    expect(told.sort()).toEqual(Object.keys(expected.metrics).sort());
  });
});
