/** Wheel radius from a tyre size against a published rolling circumference: 205/55 R16, 837 revolutions per mile in a maker's table (read), 1923 mm. */
import { describe, expect, it } from 'vitest';
import { rollingRadiusM } from '../../../src/core/study/read/tyre-size.ts';

describe('a tyre size', () => {
  it('205/55 R16 rolls 1927 mm by the rule, 1923 mm by the table: within 0.3 %', () => {
    const circumference = 2 * Math.PI * (rollingRadiusM('205/55 R16') as number);
    expect(circumference).toBeCloseTo(3.05 * (0.4064 + 2 * 0.205 * 0.55), 12);
    expect(Math.abs(circumference - 1609.344 / 837)).toBeLessThan(0.003 * circumference);
  });

  it.each([
    '215/65 R16',
    '215/65R16',
    '215/65 r16',
    ' 215 / 65 R 16 ',
    '215/65 R16C',
    '215/65 ZR16',
    'P215/65 R16',
    'LT215/65 R16',
    '215/65R16 98H',
    '215/65 R16 C 109/107 T',
  ])('%j is read', (size) => {
    expect(rollingRadiusM(size)).toBeCloseTo((3.05 * (0.4064 + 2 * 0.215 * 0.65)) / (2 * Math.PI), 12);
  });

  it.each(['', '215', '215/65', '215/65-16', '215/65 D16', '21/65 R16', '215/65 R16 and more', '6.00-16'])('%j is no radial size', (size) => {
    expect(rollingRadiusM(size)).toBeNull();
  });
});
