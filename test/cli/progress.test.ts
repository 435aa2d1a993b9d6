import { describe, expect, it } from 'vitest';
import { progressLine, progressText } from '../../src/cli/progress.ts';

const halfway = { done: 30_000, total: 60_000, feasible: 9_000, front: 41 };

describe('progress', () => {
  it('says rate, time left, feasible share and front size', () => {
    expect(progressText(halfway, 10_000)).toBe('30\u202f000 of 60\u202f000 designs, 3000/s, 10 s left, 30 % feasible, 41 on the front');
  });

  it('says nothing about shares before the first design', () => {
    expect(progressText({ done: 0, total: 60_000, feasible: 0, front: 0 }, 0)).toBe('0 of 60\u202f000 designs');
  });

  it('says how long it took once all is done', () => {
    expect(progressText({ ...halfway, done: 60_000 }, 20_000)).toContain('20 s in all');
  });

  it('fills the bar as far as the run is, with rate, time left, feasible share and front size in 80 columns', () => {
    expect(progressLine({ done: 5_000_000, total: 10_000_000, feasible: 123_456, front: 12_345 }, 7_000_000, 80)).toBe(
      '█████░░░░░  50 %  714/s, 1 h 57 min left, 2.5 % feasible, 12\u202f345 on the front',
    );
  });

  it('never exceeds the width of the terminal', () => {
    expect(progressLine(halfway, 10_000, 50)).toHaveLength(49);
  });
});
