/** The sample of designs: spread, repeatable, and what it counts. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compileStudy } from '../../src/core/evaluate/compile.ts';
import { sampleNumbers } from '../../src/run/design-sample.ts';
import { observeDesigns } from '../../src/run/observe-designs.ts';
import { edited } from '../core/study/study-from-disk.ts';
import { smallStudyText, studyOf } from './small-study.ts';

describe('a sample of designs', () => {
  it('holds distinct numbers, one from each of equal stretches, and all of a small search', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 4e9 }), fc.integer({ min: 1, max: 500 }), (count, size) => {
        const numbers = sampleNumbers(count, size);
        expect(numbers).toHaveLength(Math.min(count, size));
        expect(new Set(numbers).size).toBe(numbers.length);
        expect(numbers.every((number, k) => number >= 1 && number <= count && (k === 0 || number > (numbers[k - 1] ?? 0)))).toBe(true);
        if (count > size) expect(numbers.every((number, k) => Math.abs(number - ((k + 0.5) * count) / size) <= count / size)).toBe(true);
      }),
    );
  });
});

describe('what a sample shows', () => {
  const large = edited(smallStudyText(), ['from: 140 N·m, to: 220 N·m, steps: 5', 'from: 140 N·m, to: 220 N·m, steps: 400']);

  it('is the same every time', () => {
    const study = studyOf(large);
    const seen = observeDesigns(study);
    expect(seen.designs).toBe(1000);
    expect(seen.whole).toBe(false);
    expect(observeDesigns(study)).toEqual(seen);
  });

  it('is what a plain count over every design gives, where all are in it', () => {
    const study = studyOf(edited(smallStudyText(), ['discharge: 100 kW', 'discharge: 24 kW']));
    const free = compileStudy(studyOf(edited(smallStudyText(), [', resistance: 0.1 Ω, discharge: 100 kW', ', resistance: 0 Ω, discharge: 900 kW'])));
    const bound = compileStudy(study);
    const at = (metric: string) => bound.metrics.findIndex(({ name }) => name === metric);
    const [withPack, without] = [new Float64Array(bound.metrics.length), new Float64Array(free.metrics.length)];
    const expected = { clipped: 0, passing: 0 };
    const [speeds, ratios, torques] = study.axes.map(({ points }) => points.map(([value]) => value as number)) as [number[], number[], number[]];
    for (const speed of speeds) {
      for (const ratio of ratios) {
        for (const torque of torques) {
          const inputs = Float64Array.of(speed, ratio, torque);
          bound.evaluate(inputs, 0, withPack, 0);
          free.evaluate(inputs, 0, without, 0);
          if ((withPack[at('round.offTrace')] as number) > (without[at('round.offTrace')] as number)) expected.clipped++;
          const meets = (withPack[at('ramp.grade')] as number) >= 0.18 && (withPack[at('sprint.time')] as number) <= 9 && withPack[at('round.offTrace')] === 0;
          if (meets) expected.passing++;
        }
      }
    }
    const seen = observeDesigns(study);
    expect(expected.clipped).toBeGreaterThan(0);
    expect(seen).toMatchObject({ designs: 105, whole: true, passing: expected.passing });
    expect(seen.trials.find(({ trial }) => trial.name === 'round')).toMatchObject({ designs: 105, byBattery: expected.clipped });
  });

  it('shrinks where the cycles are long, so that it stays cheap', () => {
    const long = edited(large, [
      '  ramp:',
      `${Array.from({ length: 40 }, (_, k) => `  day ${k}: { kind: cycle, cycle: wltc-3b, payload: 300 kg }`).join('\n')}\n  ramp:`,
    ]);
    // 40 · 1801 + 599 points of traces and twice 300 for the other trials, of four million in all.
    expect(observeDesigns(studyOf(long)).designs).toBe(54);
  });
});
