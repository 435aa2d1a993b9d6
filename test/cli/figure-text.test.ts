import { describe, expect, it } from 'vitest';
import { count, countOf, durationText, shareText, sizeText } from '../../src/cli/figure-text.ts';

describe('figures of a run for people', () => {
  it('says durations in the unit a person would', () => {
    expect([0, 0.84, 9.94, 9.96, 42.4, 59.6, 185, 3599.6, 7800].map(durationText)).toEqual([
      '0.0 s',
      '0.8 s',
      '9.9 s',
      '10 s',
      '42 s',
      '1 min 00 s',
      '3 min 05 s',
      '1 h 00 min',
      '2 h 10 min',
    ]);
  });

  it('shows a share as 0 % only when it is none and as 100 % only when it is all', () => {
    expect([0, 1e-7, 0.0002, 0.004, 0.031, 0.31, 0.9949, 0.9999999, 1].map(shareText)).toEqual([
      '0 %',
      'below 0.01 %',
      '0.02 %',
      '0.4 %',
      '3.1 %',
      '31 %',
      '99.5 %',
      'above 99.9 %',
      '100 %',
    ]);
  });

  it('counts things in singular and plural, thousands told apart', () => {
    expect([countOf(1, 'design'), countOf(0, 'design'), count(62400)]).toEqual(['1 design', '0 designs', '62\u202f400']);
  });

  it('gives sizes on disk in kB, MB or GB', () => {
    expect([12, 840_000, 3_240_000, 120_000_000, 1.5e9].map(sizeText)).toEqual(['1 kB', '840 kB', '3.2 MB', '120 MB', '1.5 GB']);
  });
});
