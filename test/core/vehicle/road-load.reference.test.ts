/** Road load against published examples. */
import { describe, expect, it } from 'vitest';
import {
  airResistanceN,
  resistanceN,
  roadLoadFromCoastDown,
  roadLoadFromCoefficients,
  rollingResistanceN,
  slopeOf,
} from '../../../src/core/vehicle/road-load.ts';
import { compare } from '../../reference-table.ts';

const POUND_KG = 0.45359237;
const POUND_FORCE_N = POUND_KG * 9.80665;
const FOOT_M = 0.3048;

describe('coast-down coefficients', () => {
  // UN Regulation No. 83, Annex 4a, table of dynamometer settings: a (N), b (N/(km/h)²) and the load at 80 km/h (read in a copy).
  it.each([
    [1360, 7.1, 0.0481, 315],
    [1590, 7.6, 0.0515, 338],
    [1700, 7.9, 0.0536, 351],
    [2040, 8.7, 0.0591, 387],
  ])('give the dynamometer load of a %i kg car at 80 km/h', (massKg, a, b, loadN) => {
    const road = roadLoadFromCoastDown({
      f0N: a,
      f1NSPerM: 0,
      f2NS2PerM2: b * 3.6 * 3.6,
      referenceMassKg: massKg,
      movedMassKg: massKg,
      carriedMassKg: massKg,
    });
    // The table rounds the load to whole newtons and a, b to three figures.
    const got = resistanceN(road, 80 / 3.6, slopeOf(0));
    compare({
      check: `dynamometer load at 80 km/h, ${massKg} kg, N`,
      source: 'UN Regulation No. 83, table of settings (read in a copy)',
      expected: loadN,
      got,
      within: 1 / loadN,
    });
  });
});

describe('a car at speed on a grade', () => {
  // Of the type of Mannering & Washburn, Principles of Highway Engineering and Traffic Analysis, ch. 2 (read in a copy):
  // 2000 lb, drag coefficient 0.40, 20 ft², 0.002045 slug/ft³, 70 mph, f = 0.01 (1 + V/147) with V in ft/s, tractive effort 255 lb.
  const feetPerSecond = (70 * 5280) / 3600;
  const speedMPerS = feetPerSecond * FOOT_M;
  const slugKg = POUND_FORCE_N / FOOT_M;
  const road = roadLoadFromCoefficients({
    movedMassKg: 2000 * POUND_KG,
    carriedMassKg: 2000 * POUND_KG,
    rollingC0: 0.01 * (1 + feetPerSecond / 147),
    rollingC1S2PerM2: 0,
    dragAreaM2: 0.4 * 20 * FOOT_M * FOOT_M,
    trailerDragAreaM2: 0,
    airDensityKgPerM3: (0.002045 * slugKg) / (FOOT_M * FOOT_M * FOOT_M),
    headWindMPerS: 0,
  });

  it('meets the published drag and rolling resistance', () => {
    const source = 'type of Mannering & Washburn, ch. 2 (read in a copy)';
    compare({ check: 'car at 70 mph: drag, lbf', source, expected: 86.22, got: airResistanceN(road, speedMPerS) / POUND_FORCE_N, within: 0.01 / 86.22 });
    compare({
      check: 'car at 70 mph: rolling, lbf',
      source,
      expected: 33.97,
      got: rollingResistanceN(road, speedMPerS, 1) / POUND_FORCE_N,
      within: 0.01 / 33.97,
    });
  });

  // The published balance takes the rolling resistance at its level value; ours falls with the cosine of the slope, 0.2 % of it.
  const spareN = 255 * POUND_FORCE_N - airResistanceN(road, speedMPerS) - rollingResistanceN(road, speedMPerS, 1);

  it('meets the published grade by small angle and exactly', () => {
    const source = 'type of Mannering & Washburn, ch. 2 (read in a copy)';
    compare({ check: 'car at 70 mph: grade by small angle, %', source, expected: 6.74, got: (100 * spareN) / road.weightN, within: 0.005 / 6.74 });
    expect(spareN).toBeGreaterThan(road.weightN * slopeOf(0.067555).sin);
    expect(spareN).toBeLessThan(road.weightN * slopeOf(0.067565).sin);
  });

  it('is in balance within the cosine of the rolling resistance of that grade', () => {
    const leftN = 255 * POUND_FORCE_N - resistanceN(road, speedMPerS, slopeOf(0.06756));
    expect(Math.abs(leftN)).toBeLessThan(0.0025 * rollingResistanceN(road, speedMPerS, 1));
  });
});
