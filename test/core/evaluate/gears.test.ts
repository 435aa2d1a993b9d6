/** Which gear each trial uses, and where it shifts: told by the metrics of a study with two ratios, and only there. */
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { createBench, machineSheet } from '../../../src/core/search/design-bench.ts';
import { checkStudy } from '../../../src/core/study/check-study.ts';
import { studySources } from '../../../src/run/study-files.ts';

const path = fileURLToPath(new URL('../../data/cases/09-two-speed-car.yaml', import.meta.url));

function metricsWith(edit: (text: string) => string): Record<string, number | null> {
  const checked = checkStudy(edit(readFileSync(path, 'utf8')), path, studySources(path));
  if (!checked.ok) throw new Error(JSON.stringify(checked.issues));
  const design = createBench(checked.study).compute(0);
  if (design === null) throw new Error('no reference design');
  return machineSheet(design).metrics;
}

describe('a car with ratios of 13.5 and 7.6', () => {
  const metrics = metricsWith((text) => text);

  it('stays in the first ratio where the trial ends below the shift speed', () => {
    expect(metrics['accel-1.ratio']).toBe(13.5);
    expect(metrics['accel-1.shiftSpeed_kmh']).toBeNull();
  });

  it('shifts on the way from 0 to 100 km/h and over 400 m, at the same speed', () => {
    expect(metrics['accel-2.ratio']).toBe(7.6);
    expect(metrics['accel-2.shiftSpeed_kmh']).toBeGreaterThan(50);
    expect(metrics['accel-2.shiftSpeed_kmh']).toBeLessThan(100);
    expect(metrics['stand-4.ratio']).toBe(7.6);
    expect(metrics['stand-4.shiftSpeed_kmh']).toBe(metrics['accel-2.shiftSpeed_kmh']);
  });

  it('starts in the second ratio above the shift speed, without a shift', () => {
    expect(metrics['accel-3.ratio']).toBe(7.6);
    expect(metrics['accel-3.shiftSpeed_kmh']).toBeNull();
  });

  it('starts and climbs in the first ratio, and reaches its top speed in the second', () => {
    expect([metrics['start-8.ratio'], metrics['climb-10.ratio'], metrics['top-7.ratio']]).toEqual([13.5, 13.5, 7.6]);
  });

  it('tells how much of a cycle is driven in the lower gear', () => {
    expect(metrics['round-12.lowerGearShare_pct']).toBeGreaterThan(0);
    expect(metrics['round-12.lowerGearShare_pct']).toBeLessThan(100);
  });

  it('tells nothing of gears with one ratio', () => {
    const single = metricsWith((text) => text.replace(/ratios:\n {2}- 13.5\n {2}- 7.6/u, 'ratio: 9').replace(/ {2}shiftTime: .*\n/u, ''));
    expect(Object.keys(single).filter((key) => /ratio|shift|lowerGear/u.test(key))).toEqual([]);
  });

  it('names no ratio where the trial is not done', () => {
    const heavy = metricsWith((text) => text.replace('kerbMass: 1600 kg', 'kerbMass: 90000 kg'));
    expect([heavy['accel-2.time_s'], heavy['accel-2.ratio'], heavy['accel-2.shiftSpeed_kmh']]).toEqual([null, null, null]);
  });
});
