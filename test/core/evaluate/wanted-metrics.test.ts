import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { compileStudy } from '../../../src/core/evaluate/compile.ts';
import type { Evaluator } from '../../../src/core/evaluate/evaluator.ts';
import { checkStudy, type StudySources } from '../../../src/core/study/check-study.ts';
import type { Study } from '../../../src/core/study/study.ts';

const folder = new URL('../../data/cases/', import.meta.url);
const cycles = new URL('../../../src/run/cycles/', import.meta.url);
const sources: StudySources = {
  cycleNames: readdirSync(cycles).map((name) => name.slice(0, -'.csv'.length)),
  cycle: (name) => readFileSync(new URL(`${name}.csv`, cycles), 'utf8'),
  file: (path) => ({ text: readFileSync(new URL(path, folder), 'utf8') }),
};

function readStudy(name: string): Study {
  const check = checkStudy(readFileSync(new URL(name, folder), 'utf8'), name, sources);
  if (!check.ok) throw new Error(JSON.stringify(check.issues));
  return check.study;
}

function evaluated(evaluator: Evaluator): { metrics: Float64Array; limits: Uint8Array } {
  const metrics = new Float64Array(evaluator.metrics.length);
  const limits = new Uint8Array(metrics.length);
  evaluator.evaluate(evaluator.reference, 0, metrics, 0, limits);
  return { metrics, limits };
}

describe('metrics asked for', () => {
  // One and two ratios, a loss map, a coast-down, a pack and a motor at their limits.
  it.each(readdirSync(folder).filter((name) => name.endsWith('.yaml')))('%s: each has the same bits, and limit, alone as beside all others', (name) => {
    const study = readStudy(name);
    const whole = compileStudy(study);
    const { metrics, limits } = evaluated(whole);
    for (const [k, { name: metric }] of whole.metrics.entries()) {
      const alone = evaluated(compileStudy(study, new Set([metric])));
      expect(alone.metrics[k], metric).toBe(metrics[k]);
      expect(alone.limits[k], metric).toBe(limits[k]);
    }
  });

  it('leaves the account of a cycle out where only its energy or its missed time is wanted', () => {
    const study = readStudy('52-harbour-parcel-van.yaml');
    const cycle = study.trials.find(({ kind }) => kind === 'cycle')!.name;
    const evaluator = compileStudy(study, new Set([`${cycle}.batteryEnergy`, `${cycle}.offTrace`]));
    const { metrics } = evaluated(evaluator);
    const of = (metric: string) => metrics[evaluator.metrics.findIndex(({ name }) => name === `${cycle}.${metric}`)];
    expect(of('batteryEnergy')).toBeGreaterThan(0);
    expect(of('offTrace')).toBeGreaterThanOrEqual(0);
    expect(of('rmsTorque')).toBeNaN();
    expect(of('energy.motor')).toBeNaN();
  });
});
