/** The starter study is right, without warnings, and says what the formats are for. */
import { describe, expect, it } from 'vitest';
import { compileStudy } from '../../../src/core/evaluate/compile.ts';
import { createSearch } from '../../../src/core/search/search.ts';
import { whatRunNeeds } from '../../../src/core/study/check-study.ts';
import { starterStudy } from '../../../src/core/study/starter.ts';
import { studyOf, warningsOf } from './study-from-disk.ts';

describe('the starter study', () => {
  const study = studyOf(starterStudy());

  it('is accepted without a warning and complete for a run', () => {
    expect(warningsOf(starterStudy())).toBe('');
    expect(whatRunNeeds(study)).toBeNull();
  });

  it('has the number of designs that its comment states', () => {
    expect(createSearch(study).count).toBe(770);
    expect(starterStudy()).toContain('= 770 designs');
  });

  it('leaves a choice: many designs meet every requirement, and every requirement removes some', () => {
    const evaluator = compileStudy(study);
    const search = createSearch(study);
    const column = new Map(evaluator.metrics.map(({ name }, index) => [name, index]));
    const [inputs, metrics] = [new Float64Array(evaluator.inputs.length), new Float64Array(evaluator.metrics.length)];
    const failing = study.requirements.map(() => 0);
    let feasible = 0;
    for (let design = 1; design <= search.count; design++) {
      search.inputs(design, inputs, 0);
      evaluator.evaluate(inputs, 0, metrics, 0);
      const missed = study.requirements.map(({ metric, bound, limit }) => {
        const value = metrics[column.get(metric) as number] as number;
        return !(bound === 'atLeast' ? value >= limit : value <= limit);
      });
      missed.forEach((is, index) => {
        if (is) failing[index] = (failing[index] as number) + 1;
      });
      if (!missed.includes(true)) feasible += 1;
    }
    expect(feasible).toBeGreaterThan(100);
    expect(feasible).toBeLessThan(600);
    for (const count of failing) expect(count).toBeGreaterThan(20);
  });
});
