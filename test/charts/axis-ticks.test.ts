import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { axisScale, axisTicks, textLines, textWidth } from '../../src/charts/axis-ticks.ts';
import type { ChartAxis } from '../../src/charts/trade-off-view.ts';

const numbers: ChartAxis = { title: 'x', better: null, names: null };

describe('ticks', () => {
  it('never collide, whatever the values and the width', () => {
    const value = fc.double({ min: -1e9, max: 1e9, noNaN: true });
    fc.assert(
      fc.property(fc.array(value, { minLength: 1, maxLength: 5 }), fc.integer({ min: 120, max: 1200 }), fc.boolean(), (values, length, lying) => {
        const scale = axisScale(values, numbers, lying ? 0 : length, lying ? length : 0);
        const ticks = axisTicks(scale, numbers, length, 13, lying);
        for (const [index, tick] of ticks.entries()) {
          const next = ticks[index + 1];
          if (next === undefined) continue;
          const apart = Math.abs(scale(next.value) - scale(tick.value));
          expect(apart).toBeGreaterThanOrEqual(lying ? (textWidth(tick.text, 13) + textWidth(next.text, 13)) / 2 : 13);
        }
      }),
    );
  });

  it('tell their values apart', () => {
    fc.assert(
      fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), fc.double({ min: 1e-6, max: 1e6, noNaN: true }), (low, size) => {
        const ticks = axisTicks(axisScale([low, low + size], numbers, 0, 600), numbers, 600, 13, true);
        expect(new Set(ticks.map(({ text }) => text)).size).toBe(ticks.length);
      }),
    );
  });

  it('keep all values inside the scale with room at both ends', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 8 }), (values) => {
        const scale = axisScale(values, numbers, 0, 600);
        for (const value of values) {
          expect(scale(value)).toBeGreaterThan(0);
          expect(scale(value)).toBeLessThan(600);
        }
      }),
    );
  });

  it('drop names of options that find no room', () => {
    const names = Array.from({ length: 40 }, (_, index) => `motor number ${index}`);
    const axis: ChartAxis = { title: 'motor', better: null, names };
    const scale = axisScale([], axis, 0, 600);
    const ticks = axisTicks(scale, axis, 600, 13, true);
    expect(ticks.length).toBeGreaterThan(1);
    for (const [index, tick] of ticks.slice(1).entries()) {
      expect(scale(tick.value) - scale(ticks[index]!.value)).toBeGreaterThan(textWidth('motor number 39', 13));
    }
  });
});

describe('an axis of options', () => {
  const axis: ChartAxis = { title: 'motor', better: null, names: ['slow', 'fast'] };

  it('has a tick with its name for each', () => {
    const scale = axisScale([0, 1, 1], axis, 0, 600);
    expect(axisTicks(scale, axis, 600, 13, true).map(({ value, text }) => [value, text])).toEqual([
      [0, 'slow'],
      [1, 'fast'],
    ]);
  });

  it('never has names that collide, however long they are', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 24 }), { minLength: 1, maxLength: 60 }), fc.integer({ min: 120, max: 900 }), (lengths, width) => {
        const named: ChartAxis = { title: 'motor', better: null, names: lengths.map((long) => 'm'.repeat(long)) };
        const scale = axisScale([-1], named, 0, width);
        const ticks = axisTicks(scale, named, width, 13, true);
        for (const [index, tick] of ticks.slice(1).entries()) {
          const room = (textWidth(tick.text, 13) + textWidth(ticks[index]!.text, 13)) / 2;
          expect(scale(tick.value) - scale(ticks[index]!.value)).toBeGreaterThanOrEqual(room);
        }
        expect(ticks[0]?.text).toBe('reference');
      }),
    );
  });

  it('has a place of its own for the reference, which chose none of them', () => {
    const scale = axisScale([-1, 0, 1], axis, 0, 600);
    expect(scale(-1)).toBeGreaterThan(0);
    expect(axisTicks(scale, axis, 600, 13, true).map(({ value, text }) => [value, text])).toEqual([
      [-1, 'reference'],
      [0, 'slow'],
      [1, 'fast'],
    ]);
  });
});

describe('lines of text', () => {
  it('break between words and stay within their width', () => {
    const lines = textLines('Battery energy in a trial with a rather long name, Wh/km', 13, 200, 3);
    expect(lines.length).toBeGreaterThan(1);
    for (const line of lines) expect(textWidth(line, 13)).toBeLessThanOrEqual(220);
  });

  it('cut a word that is longer than a line', () => {
    const [line] = textLines('x'.repeat(400), 13, 200, 1);
    expect(textWidth(line ?? '', 13)).toBeLessThanOrEqual(200);
    expect(line).toMatch(/…$/u);
  });
});
