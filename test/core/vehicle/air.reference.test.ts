/** Air density and rolling radius against published figures. */
import { describe, expect, it } from 'vitest';
import { standardDensityKgPerM3 } from '../../../src/core/vehicle/air.ts';
import { tyreRadiusM } from '../../../src/core/vehicle/tyre.ts';
import { compare } from '../../reference-table.ts';

describe('standardDensityKgPerM3', () => {
  // ISO 2533:1975, Standard Atmosphere, density at 0 to 3000 m in the standard atmosphere (figures read in a secondary copy).
  it.each([
    [0, 1.225],
    [1000, 1.1116],
    [2000, 1.0065],
    [3000, 0.9091],
  ])('gives the standard density at %i m', (altitudeM, densityKgPerM3) => {
    const standardTemperatureK = 288.15 - 0.0065 * altitudeM;
    // Half a unit of the last printed digit, and as much again for the digits the secondary copy may have cut.
    const got = standardDensityKgPerM3(altitudeM, standardTemperatureK);
    compare({
      check: `air density at ${altitudeM} m, kg/m³`,
      source: 'ISO 2533 (secondary copy; formula from memory)',
      expected: densityKgPerM3,
      got,
      within: 1e-4 / densityKgPerM3,
    });
  });

  // Gas law at sea level and 20 °C: 101325 / (287.05287 · 293.15) = 1.20411 (elementary).
  it('gives the sea-level density of warmer air', () => {
    expect(standardDensityKgPerM3(0, 293.15)).toBeCloseTo(1.20411, 5);
  });
});

describe('tyreRadiusM', () => {
  // 205/55 R16: circumference 3.05 × diameter is 1927 mm; a maker's 837 revolutions per mile give 1923 mm (read).
  const circumferenceM = 2 * Math.PI * tyreRadiusM(0.205, 0.55, 16 * 0.0254);

  it('gives the circumference of a 205/55 R16', () => {
    compare({ check: '205/55 R16: circumference, m', source: 'rule 3.05 × diameter', expected: 1.927, got: circumferenceM, within: 0.0005 / 1.927 });
  });

  it('agrees with revolutions per mile to a third of a percent', () => {
    compare({
      check: '205/55 R16: circumference, m',
      source: "a maker's 837 revolutions per mile (read)",
      expected: 1609.344 / 837,
      got: circumferenceM,
      within: 0.0033,
    });
  });
});
