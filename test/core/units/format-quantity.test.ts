/** Numbers for people: the unit of their system, and no missed limit that looks met. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatAgainstLimit, formatFigure, formatLimit, formatQuantity, readingDecimals } from '../../../src/core/units/format-quantity.ts';
import { readQuantity } from '../../../src/core/units/read-quantity.ts';
import { type Quantity, quantities, readingUnit, toSi } from '../../../src/core/units/units.ts';

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

describe('decimals in US customary units', () => {
  const us = (si: number, quantity: Quantity, decimals: number) => plain(formatQuantity(si, quantity, { decimals, system: 'US' }));

  it('tell about as much as those of SI: fewer for small units, more for large ones', () => {
    expect(us(1780, 'mass', 0)).toBe('3924 lb');
    expect(us(1.12, 'area', 3)).toBe('12.06 ft²');
    expect(us(3.06, 'length', 2)).toBe('120.5 in');
    expect(us(0.3333, 'length', 4)).toBe('13.122 in');
    expect(us(270, 'torque', 0)).toBe('199 lbf·ft');
    expect(us(121_580, 'power', 1)).toBe('163.0 hp');
    expect(us(160_000, 'batteryPower', 0)).toBe('160 kW');
    expect(us(185 * 3.6, 'energyPerDistance', 1)).toBe('297.7 Wh/mi');
    expect(us(156.9, 'force', 2)).toBe('35.273 lbf');
    expect(us(1.2041, 'density', 3)).toBe('0.0752 lb/ft³');
    expect(us(0.0405, 'inertia', 4)).toBe('0.961 lb·ft²');
    expect(us(266.15, 'temperature', 0)).toBe('19 °F');
    expect(us(0.2, 'grade', 1)).toBe('20.0 %');
  });

  it.each(Object.keys(quantities) as Quantity[])('%s: the last digit is worth at most twice that of SI, and one digit less would be too coarse', (quantity) => {
    const [own, si] = [readingUnit(quantity, 'US'), readingUnit(quantity, 'SI')];
    const worth = (decimals: number, unit: typeof own) => toSi(10 ** -decimals, unit) - toSi(0, unit);
    for (let decimals = 0; decimals <= 8; decimals++) {
      const shown = readingDecimals(decimals, quantity, 'US');
      const most = 2 * worth(decimals, si) * (1 + 1e-6);
      expect(worth(shown, own)).toBeLessThanOrEqual(most);
      if (shown > 0) expect(worth(shown - 1, own)).toBeGreaterThan(most * (1 - 2e-6));
      expect(readingDecimals(decimals, quantity, 'SI')).toBe(decimals);
    }
  });

  it('leave a limit as exact as it was written, in whichever system that was', () => {
    expect(plain(formatLimit(toSi(60, readingUnit('speed', 'US')), 'speed', { decimals: 1, system: 'US' }))).toBe('60 mph');
    expect(plain(formatLimit(toSi(12.75, readingUnit('area', 'US')), 'area', { decimals: 3, system: 'US' }))).toBe('12.75 ft²');
    expect(plain(formatLimit(1500, 'mass', { decimals: 0, system: 'US' }))).toBe('3306.9 lb');
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
    expect(plain(formatAgainstLimit(0.2 - 3e-17, 0.2, 'atLeast', 'grade', { decimals: 1 }))).toBe('< 20 %');
  });

  it('shows the limit as exactly as it was written', () => {
    expect(plain(formatLimit(11.525, 'time', { decimals: 1 }))).toBe('11.525 s');
    expect(plain(formatLimit(130 / 3.6, 'speed', { decimals: 1, system: 'US' }))).toBe('80.78 mph');
  });

  it.each(['speed', 'mass', 'area', 'force', 'length'] as const)('never prints a missed limit as met: %s', (quantity) => {
    const bound = fc.constantFrom('atLeast' as const, 'atMost' as const);
    const system = fc.constantFrom('SI' as const, 'US' as const);
    fc.assert(
      fc.property(fc.double({ min: 1, max: 100, noNaN: true }), fc.double({ min: -1e-3, max: 1e-3, noNaN: true }), bound, system, (limit, off, side, units) => {
        const value = limit * (1 + off);
        const missed = side === 'atLeast' ? value < limit : value > limit;
        const format = { decimals: 1, system: units } as const;
        const printed = formatAgainstLimit(value, limit, side, quantity, format);
        const shownLimit = numberIn(formatLimit(limit, quantity, format));
        const looksMet = !/^[<>]/u.test(printed) && (side === 'atLeast' ? numberIn(printed) >= shownLimit : numberIn(printed) <= shownLimit);
        expect(looksMet).toBe(!missed);
      }),
      { numRuns: 1000 },
    );
  });
});
