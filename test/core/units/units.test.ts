/** The table of units itself: complete, without contradictions, and true to the definitions of the units. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { foldUnit, readQuantity } from '../../../src/core/units/read-quantity.ts';
import { fromSi, machineUnit, type Quantity, quantities, quantityRow, readingUnit, toSi } from '../../../src/core/units/units.ts';

const all = Object.keys(quantities) as Quantity[];

describe('the table of units', () => {
  it.each(all)('%s: no spelling, suffix or symbol stands for two of its units', (quantity) => {
    const { units } = quantityRow(quantity);
    const owners = units.flatMap((unit) => [...new Set([unit.symbol, ...unit.spellings].map(foldUnit))]);
    expect(new Set(owners).size).toBe(owners.length);
    expect(new Set(units.map(({ suffix }) => suffix)).size).toBe(units.length);
  });

  it.each(all)('%s: the unit for US readers is one of its units', (quantity) => {
    const { us, units } = quantityRow(quantity);
    if (us !== undefined) expect(units.map(({ symbol }) => symbol)).toContain(us);
    expect(readingUnit(quantity, 'US').symbol).toBe(us ?? machineUnit(quantity).symbol);
  });

  it.each(all)('%s: every spelling of every unit reads back as that unit', (quantity) => {
    for (const unit of quantityRow(quantity).units) {
      for (const spelling of [unit.symbol, ...unit.spellings]) {
        const read = readQuantity(`12.5 ${spelling}`, quantity);
        expect(read).toMatchObject({ ok: true, written: 12.5, unit });
      }
    }
  });

  it.each(all)('%s: a written number comes back from SI to within rounding', (quantity) => {
    for (const unit of quantityRow(quantity).units) {
      fc.assert(
        fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), (written) => {
          const back = fromSi(toSi(written, unit), unit);
          expect(Math.abs(back - written)).toBeLessThanOrEqual(1e-15 * 8 * Math.max(Math.abs(written), Math.abs(unit.offset), 1e-290));
        }),
        { numRuns: 60 },
      );
    }
  });
});
