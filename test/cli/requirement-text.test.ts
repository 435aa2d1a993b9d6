import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { verdictText } from '../../src/cli/requirement-text.ts';
import { designMetrics, trialMetrics } from '../../src/core/study/catalogue/metrics.ts';
import type { Requirement, Study } from '../../src/core/study/study.ts';
import { boundWords, meets, valueAgainst } from '../../src/page/wording.ts';

const study: Study = {
  title: '',
  about: '',
  driven: 'front',
  tyre: null,
  currency: 'EUR',
  values: {},
  fullLoad: null,
  lossMap: null,
  optionCurves: [],
  optionMaps: [],
  trials: [],
  axes: [],
  search: { method: 'grid' },
  requirements: [],
  objectives: [],
  keep: [],
  report: { units: 'SI' },
};
const us: Study = { ...study, report: { units: 'US' } };
const grade: Requirement = { metric: 'ramp.grade', bound: 'atLeast', limit: 0.2, implied: false };
const time: Requirement = { metric: 'sprint.time', bound: 'atMost', limit: 11.5, implied: false };

/** Narrow no-break spaces as plain ones. */
function plain(text: string): string {
  return text.replaceAll('\u202f', ' ');
}

const verdictOf = (...args: Parameters<typeof verdictText>) => plain(verdictText(...args));

describe('requirements in words', () => {
  it('says the bound in the unit of the reader', () => {
    expect(plain(boundWords(grade, trialMetrics.grade, study))).toBe('at least 20 %');
    expect(plain(boundWords({ bound: 'atLeast', limit: 100 / 3.6 }, trialMetrics.speed, us))).toBe('at least 62.14 mph');
    expect(plain(boundWords({ bound: 'atMost', limit: 2000 }, designMetrics['driveUnit.cost'], study))).toBe('at most 2000 EUR');
  });

  it('says by how much a requirement is met or missed, percentages in points', () => {
    expect(verdictOf(0.245, grade, trialMetrics.grade, study)).toBe('met, 4.5 %-points to spare');
    expect(verdictOf(12.03, time, trialMetrics.time, study)).toBe('MISSED by 0.53 s');
    expect(verdictOf(11.5, time, trialMetrics.time, study)).toBe('met, nothing to spare');
  });

  it('calls a metric that does not exist a miss', () => {
    expect(meets(Number.NaN, time)).toBe(false);
    expect(verdictOf(Number.NaN, time, trialMetrics.time, study)).toBe('MISSED: there is no value');
    expect(valueAgainst(Number.NaN, time, trialMetrics.time, study)).toBe('—');
  });

  it('tells a requirement that every cycle must be followed apart from written ones', () => {
    const followed: Requirement = { metric: 'town.offTrace', bound: 'atMost', limit: 0, implied: true };
    expect(verdictOf(0, followed, trialMetrics.offTrace, study)).toBe('met (asked of every cycle)');
    expect(verdictOf(0.0055, followed, trialMetrics.offTrace, study)).toBe('MISSED by 0.55 %-points (asked of every cycle)');
  });

  it('never prints a miss as met or with a margin of zero, however small it is', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-12, max: 1, noNaN: true }), (miss) => {
        const value = 11.5 + miss;
        fc.pre(value > 11.5);
        const verdict = verdictOf(value, time, trialMetrics.time, study);
        expect(verdict).toMatch(/^MISSED by /);
        expect(Number.parseFloat(verdict.slice('MISSED by '.length))).toBeGreaterThan(0);
        const printed = plain(valueAgainst(value, time, trialMetrics.time, study));
        expect(printed.startsWith('>') || Number.parseFloat(printed) > 11.5).toBe(true);
      }),
    );
  });
});
