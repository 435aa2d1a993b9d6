/** Road load: its parts, slopes, wind, and the two ways of stating it. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  airResistanceN,
  resistanceN,
  roadLoadFromCoastDown,
  roadLoadFromCoefficients,
  rollingResistanceN,
  slopeOf,
} from '../../../src/core/vehicle/road-load.ts';
import { sampleRoad } from './sample-vehicle.ts';

const grades = fc.double({ min: -1, max: 1, noNaN: true });
const speeds = fc.double({ min: 0, max: 60, noNaN: true });
const winds = fc.double({ min: -30, max: 30, noNaN: true });
const flat = slopeOf(0);

const van = {
  movedMassKg: 3550,
  carriedMassKg: 2800,
  rollingC0: 0.0098,
  rollingC1S2PerM2: 2.1e-6,
  dragAreaM2: 1.12,
  trailerDragAreaM2: 0.8,
  airDensityKgPerM3: 1.2,
  headWindMPerS: 4,
};

describe('slopeOf', () => {
  it('gives sine and cosine of the angle of the grade', () => {
    fc.assert(
      fc.property(grades, (grade) => {
        const { sin, cos } = slopeOf(grade);
        expect(Math.abs(sin - Math.sin(Math.atan(grade)))).toBeLessThan(1e-15);
        expect(Math.abs(cos - Math.cos(Math.atan(grade)))).toBeLessThan(1e-15);
      }),
    );
  });
});

describe('resistanceN', () => {
  it('is the textbook sum, written out with angles', () => {
    fc.assert(
      fc.property(grades, speeds, winds, (grade, v, wind) => {
        const angle = Math.atan(grade);
        const [m, g] = [van.movedMassKg, 9.80665];
        const rolling = m * g * Math.cos(angle) * (0.0098 + 2.1e-6 * v * v);
        const air = 0.5 * 1.2 * (1.12 + 0.8) * (v + wind) * (v + wind) * Math.sign(v + wind);
        const climbing = m * g * Math.sin(angle);
        const road = roadLoadFromCoefficients({ ...van, headWindMPerS: wind });
        expect(Math.abs(resistanceN(road, v, slopeOf(grade)) - (rolling + air + climbing))).toBeLessThan(1e-10);
        expect(Math.abs(rollingResistanceN(road, v, slopeOf(grade).cos) - rolling)).toBeLessThan(1e-11);
        expect(Math.abs(airResistanceN(road, v) - air)).toBeLessThan(1e-11);
      }),
    );
  });

  it('is pushed by a tail wind faster than the vehicle', () => {
    const road = sampleRoad(2800, 2800, -20);
    expect(airResistanceN(road, 5)).toBeLessThan(0);
    expect(airResistanceN(road, 20)).toBe(0);
    expect(airResistanceN(road, 25)).toBeGreaterThan(0);
  });

  it('rises with speed against any wind that is not behind', () => {
    fc.assert(
      fc.property(speeds, fc.double({ min: 0, max: 30, noNaN: true }), (v, wind) => {
        const road = sampleRoad(2800, 2800, wind);
        expect(resistanceN(road, v + 0.01, flat)).toBeGreaterThan(resistanceN(road, v, flat));
      }),
    );
  });
});

describe('roadLoadFromCoefficients', () => {
  it('keeps the rolling resistance of the towing vehicle apart from the train', () => {
    const road = roadLoadFromCoefficients(van);
    expect(road.carriedRollingN / road.rollingN).toBeCloseTo(2800 / 3550, 14);
    expect(road.carriedRollingPerSpeed2NS2PerM2 / road.rollingPerSpeed2NS2PerM2).toBeCloseTo(2800 / 3550, 14);
  });

  it('does not change what it is given', () => {
    const given = Object.freeze({ ...van });
    expect(() => roadLoadFromCoefficients(given)).not.toThrow();
  });
});

describe('roadLoadFromCoastDown', () => {
  const coefficients = { f0N: 128, f1NSPerM: 0.95, f2NS2PerM2: 0.381, referenceMassKg: 1540 };

  it('gives the measured polynomial at the reference mass on the level', () => {
    const road = roadLoadFromCoastDown({ ...coefficients, movedMassKg: 1540, carriedMassKg: 1540 });
    fc.assert(
      fc.property(speeds, (v) => {
        expect(Math.abs(resistanceN(road, v, flat) - (128 + 0.95 * v + 0.381 * v * v))).toBeLessThan(1e-11);
      }),
    );
  });

  it('scales only the constant term with mass and with the cosine of the slope', () => {
    const road = roadLoadFromCoastDown({ ...coefficients, movedMassKg: 2200, carriedMassKg: 1700 });
    const slope = slopeOf(0.3);
    const wanted = (2200 / 1540) * 128 * slope.cos + 0.95 * 20 + 0.381 * 400 + 2200 * 9.80665 * slope.sin;
    expect(resistanceN(road, 20, slope)).toBeCloseTo(wanted, 9);
    expect(road.carriedRollingN).toBeCloseTo((1700 / 1540) * 128, 12);
    expect(airResistanceN(road, 20)).toBeCloseTo(0.95 * 20 + 0.381 * 400, 12);
  });

  it('is the same vehicle as one stated by coefficients, where both can say it', () => {
    const byCoefficients = sampleRoad(1800, 1800);
    const byCoastDown = roadLoadFromCoastDown({
      f0N: byCoefficients.rollingN,
      f1NSPerM: 0,
      f2NS2PerM2: byCoefficients.dragNS2PerM2 + byCoefficients.rollingPerSpeed2NS2PerM2,
      referenceMassKg: 1800,
      movedMassKg: 1800,
      carriedMassKg: 1800,
    });
    for (const v of [0, 7, 31]) expect(resistanceN(byCoastDown, v, flat)).toBeCloseTo(resistanceN(byCoefficients, v, flat), 10);
  });
});
