import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Box, placeLabels } from '../../src/charts/label-places.ts';

const frame: Box = { x: 40, y: 20, width: 700, height: 400 };
const mark = fc.record({ markX: fc.double({ min: 60, max: 720, noNaN: true }), markY: fc.double({ min: 40, max: 400, noNaN: true }) });

function overlap(a: Box, b: Box): boolean {
  return a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height;
}

describe('places for labels', () => {
  it('do not overlap for up to ten marks anywhere in the frame, even on top of one another', () => {
    fc.assert(
      fc.property(fc.array(mark, { minLength: 1, maxLength: 10 }), fc.boolean(), (marks, gathered) => {
        const wishes = marks.map((each, index) => ({ ...(gathered ? marks[0]! : each), width: index === 0 ? 70 : 20, height: 20 }));
        const boxes = placeLabels(wishes, [], frame);
        expect(boxes).toHaveLength(wishes.length);
        for (const [index, box] of boxes.entries()) {
          expect(box.x).toBeGreaterThanOrEqual(frame.x);
          expect(box.x + box.width).toBeLessThanOrEqual(frame.x + frame.width);
          expect(box.y).toBeGreaterThanOrEqual(frame.y);
          expect(box.y + box.height).toBeLessThanOrEqual(frame.y + frame.height);
          for (const other of boxes.slice(index + 1)) expect(overlap(box, other)).toBe(false);
          for (const { markX, markY } of wishes) expect(overlap(box, { x: markX - 4, y: markY - 4, width: 8, height: 8 })).toBe(false);
        }
      }),
    );
  });

  it('prefer a place that covers no other mark', () => {
    const [box] = placeLabels(
      [{ markX: 300, markY: 200, width: 20, height: 20 }],
      [
        { x: 318, y: 180 },
        { x: 322, y: 184 },
      ],
      frame,
    );
    expect(overlap(box!, { x: 317, y: 179, width: 6, height: 6 })).toBe(false);
  });
});
