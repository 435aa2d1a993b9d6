import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { machineValue, machineValues } from '../../../src/core/evaluate/result-columns.ts';

describe('stored values as machine output gives them', () => {
  it('are the same one by one and as a whole column, to the last bit; what does not exist stays NaN', () => {
    const values = fc.array(
      fc.oneof(fc.double({ min: -1e6, max: 1e6, noNaN: true }), fc.constant(Number.NaN), fc.constantFrom(7, 366.519142918809, 471.238898038469)),
    );
    fc.assert(
      fc.property(
        values,
        fc.constantFrom('input' as const, 'metric' as const),
        fc.constantFrom('rotationalSpeed' as const, 'torque' as const, 'number' as const),
        (si, role, quantity) => {
          const column = { role, quantity, labels: null };
          const one = si.map((value) => (machineValue(column, value) ?? Number.NaN) as number);
          expect(machineValues(column, Float64Array.from(si))).toEqual(Float64Array.from(one));
        },
      ),
    );
  });

  it('gives an input back as it was typed', () => {
    expect(machineValues({ role: 'input', quantity: 'rotationalSpeed', labels: null }, Float64Array.of((4700 * Math.PI) / 30))[0]).toBe(4700);
  });
});
