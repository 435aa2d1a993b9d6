import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { highestMeanW, tenMinuteWindows } from '../../../src/core/trials/loss-window.ts';

/** Worst mean loss over a trace, with its standing steps, written to be read. */
function plainWorstW(timesS: number[], lossJ: number[]): number {
  const last = lossJ.length;
  const means: number[] = [];
  for (let start = 0; start < last; start++) {
    const end = timesS.findIndex((time, k) => k > start && time - timesS[start] >= 600 * (1 - 1e-9));
    if (end === -1) continue;
    means.push(lossJ.slice(start, end).reduce((sum, joule) => sum + joule, 0) / (timesS[end] - timesS[start]));
  }
  if (means.length > 0) return Math.max(...means);
  return lossJ.reduce((sum, joule) => sum + joule, 0) / (timesS[last] - timesS[0]);
}

/** The same through the code under test: only moving steps have losses and stand in its sums. */
function worstW(timesS: number[], lossJ: number[], moves: boolean[]): number {
  const moving = Int32Array.from(moves.flatMap((move, k) => (move ? [k] : [])));
  const before = new Float64Array(moving.length + 1);
  moving.forEach((k, i) => {
    before[i + 1] = before[i] + lossJ[k];
  });
  return highestMeanW(tenMinuteWindows(timesS, moving), before);
}

const steps = fc.array(
  fc.record({ durationS: fc.double({ min: 0.1, max: 250, noNaN: true }), lossW: fc.double({ min: 0, max: 9000, noNaN: true }), move: fc.boolean() }),
  {
    minLength: 1,
    maxLength: 60,
  },
);

describe('worst ten minutes', () => {
  it('is the highest mean over all runs of steps that just reach ten minutes, for any trace', () => {
    fc.assert(
      fc.property(steps, (drawn) => {
        const timesS = [0];
        for (const { durationS } of drawn) timesS.push(timesS[timesS.length - 1] + durationS);
        const lossJ = drawn.map(({ durationS, lossW, move }) => (move ? durationS * lossW : 0));
        const expected = plainWorstW(timesS, lossJ);
        const found = worstW(
          timesS,
          lossJ,
          drawn.map(({ move }) => move),
        );
        expect(Math.abs(found - expected)).toBeLessThanOrEqual(1e-9 * Math.max(expected, 1));
      }),
    );
  });

  it('takes the whole trace where that is shorter than ten minutes', () => {
    expect(worstW([0, 100, 599], [5000, 998], [true, true])).toBeCloseTo(5998 / 599, 12);
  });

  it('counts a run of ten minutes in decimal fractions of a second as ten minutes', () => {
    const timesS = Array.from({ length: 7001 }, (_, k) => 0.3 + k * 0.1);
    const lossJ = timesS.slice(1).map((_, k) => (k < 6000 ? 100 : 0));
    expect(
      worstW(
        timesS,
        lossJ,
        lossJ.map(() => true),
      ),
    ).toBeCloseTo(1000, 6);
  });

  it('takes the shortest of runs that differ by standing time only', () => {
    // 550 s of driving with 50 s of standing before it and 100 s after: the ten minutes that start at once hold it all.
    expect(worstW([0, 50, 600, 700], [0, 5500, 0], [false, true, false])).toBeCloseTo(5500 / 600, 12);
  });
});
