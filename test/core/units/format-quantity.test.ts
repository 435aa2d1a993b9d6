/** Numbers for people: the unit of their system, and no missed limit that looks met. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatAgainstLimit, formatFigure, formatLimit, formatQuantity } from '../../../src/core/units/format-quantity.ts';
import { readQuantity } from '../../../src/core/units/read-quantity.ts';

const narrow = '\u202f';

function plain(text: string): string {
  return text.replaceAll(narrow, ' ');
}

/** The number in a printed figure. */
function numberIn(text: string): number {
  return Number(text.replace(/[^\d.\u2212e-]/gu, '').replace('\u2212', '-'));
}

describe('a printed figure', () => {
  it('stands with its unit behind a narrow no-break space', () => {
    expect(formatQuantity(15.2 / 3.6, 'speed', { decimals: 1 })).toBe(`15.2${narrow}km/h`);
    expect(formatQuantity(26.8224, 'speed', { decimals: 1, system: 'US' })).toBe(`60.0${narrow}mph`);
    expect(formatQuantity(0.97, 'share', { decimals: 0 })).toBe(`97${narrow}%`);
    expect(formatQuantity(1210, 'money', { decimals: 0 })).toBe('1210');
  });

  it('has a real minus sign, thin thousands from 10 000 up, and no negative zero', () => {
    expect(formatFigure(-7.25, 1)).toBe('\u22127.3');
    expect(plain(formatFigure(1234.5, 1))).toBe('1234.5');
    expect(plain(formatFigure(1234567.891, 2))).toBe('1 234 567.89');
    expect(formatFigure(-0.0004, 2)).toBe('0.00');
    expect(formatFigure(Number.NaN, 2)).toBe('—');
  });

  it('can be read again as the figure it shows', () => {
    fc.assert(
      fc.property(fc.double({ min: -1e7, max: 1e7, noNaN: true }), (value) => {
        const read = readQuantity(formatQuantity(value, 'mass', { decimals: 3 }), 'mass');
        expect(read.ok && Math.abs(read.value - value) <= 0.0005000001).toBe(true);
      }),
    );
  });
});

describe('a value beside its limit', () => {
  it('gets decimals until it shows on which side it lies', () => {
    const format = { decimals: 1 } as const;
    expect(plain(formatAgainstLimit(11.5003, 11.5, 'atMost', 'time', format))).toBe('11.5003 s');
    expect(plain(formatAgainstLimit(11.4997, 11.5, 'atMost', 'time', format))).toBe('11.5 s');
    expect(plain(formatAgainstLimit(0.19996, 0.2, 'atLeast', 'grade', format))).toBe('19.996 %');
    expect(plain(formatAgainstLimit(0.2, 0.2, 'atLeast', 'grade', format))).toBe('20.0 %');
  });

  it('says < or > where no decimals tell them apart', () => {
    expect(plain(formatAgainstLimit(0.2 - 3e-17, 0.2, 'atLeast', 'grade', { decimals: 1 }))).toBe('< 20.0 %');
  });

  it('shows the limit as exactly as it was written', () => {
    expect(plain(formatLimit(11.525, 'time', { decimals: 1 }))).toBe('11.525 s');
    expect(plain(formatLimit(130 / 3.6, 'speed', { decimals: 1, system: 'US' }))).toBe('80.78 mph');
  });

  it('never prints a missed limit as met', () => {
    const bound = fc.constantFrom('atLeast' as const, 'atMost' as const);
    const system = fc.constantFrom('SI' as const, 'US' as const);
    fc.assert(
      fc.property(fc.double({ min: 1, max: 100, noNaN: true }), fc.double({ min: -1e-3, max: 1e-3, noNaN: true }), bound, system, (limit, off, side, units) => {
        const value = limit * (1 + off);
        const missed = side === 'atLeast' ? value < limit : value > limit;
        const format = { decimals: 1, system: units } as const;
        const printed = formatAgainstLimit(value, limit, side, 'speed', format);
        const shownLimit = numberIn(formatLimit(limit, 'speed', format));
        const looksMet = !/^[<>]/u.test(printed) && (side === 'atLeast' ? numberIn(printed) >= shownLimit : numberIn(printed) <= shownLimit);
        expect(looksMet).toBe(!missed);
      }),
      { numRuns: 2000 },
    );
  });
});
