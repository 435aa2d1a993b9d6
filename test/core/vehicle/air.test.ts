/** Air density: the law against the built-in power, and how it moves with altitude and temperature. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { standardDensityKgPerM3 } from '../../../src/core/vehicle/air.ts';

const altitudes = fc.double({ min: -500, max: 9000, noNaN: true });
const temperatures = fc.double({ min: 193.15, max: 343.15, noNaN: true });

describe('standardDensityKgPerM3', () => {
  it('is the barometric formula to 1e-14', () => {
    fc.assert(
      fc.property(altitudes, temperatures, (altitudeM, temperatureK) => {
        const wanted = (101325 * (1 - (0.0065 * altitudeM) / 288.15) ** 5.25588) / (287.05287 * temperatureK);
        expect(Math.abs(standardDensityKgPerM3(altitudeM, temperatureK) / wanted - 1)).toBeLessThan(1e-14);
      }),
    );
  });

  it('falls with altitude and with temperature', () => {
    fc.assert(
      fc.property(altitudes, temperatures, (altitudeM, temperatureK) => {
        const here = standardDensityKgPerM3(altitudeM, temperatureK);
        expect(standardDensityKgPerM3(altitudeM + 1, temperatureK)).toBeLessThan(here);
        expect(standardDensityKgPerM3(altitudeM, temperatureK + 0.1)).toBeLessThan(here);
      }),
    );
  });
});
