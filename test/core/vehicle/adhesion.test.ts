/** Adhesion: the closed form against the balance of axle loads that it solves. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { adhesionBreakSpeedsMPerS, adhesionLimitN } from '../../../src/core/vehicle/adhesion.ts';
import { sampleAxles, sampleRoad, sampleVehicle } from './sample-vehicle.ts';

const numbers = (min: number, max: number) => fc.double({ min, max, noNaN: true });
/** One vehicle and one moment. */
interface Moment {
  driven: 'front' | 'rear' | 'all';
  adhesion: number;
  frontShare: number;
  centreHeightM: number;
  wheelbaseM: number;
  speed: number;
  cos: number;
}

const cases: fc.Arbitrary<Moment> = fc.record({
  driven: fc.constantFrom('front' as const, 'rear' as const, 'all' as const),
  adhesion: numbers(0.1, 1.6),
  frontShare: numbers(0.3, 0.7),
  centreHeightM: numbers(0, 1.4),
  wheelbaseM: numbers(2, 4),
  speed: numbers(0, 60),
  cos: numbers(0.7, 1),
});

function vehicleOf({ driven, adhesion, frontShare, centreHeightM, wheelbaseM }: Omit<Moment, 'speed' | 'cos'>) {
  const axles = sampleAxles({ driven, adhesion, frontShare, centreHeightM, wheelbaseM });
  return sampleVehicle({ axles, road: sampleRoad(3550, 2800), carriedMassKg: 2800, movedMassKg: 3550 });
}

/** Load on the driven axle (N) while it pulls with `forceN`: the force less the rolling resistance lifts the front axle and loads the rear. */
function drivenLoadN(drawn: Moment, forceN: number): number {
  const weightN = 2800 * 9.80665 * drawn.cos;
  const rollingN = weightN * (0.0098 + 2.1e-6 * drawn.speed * drawn.speed);
  const movedN = ((forceN - rollingN) * drawn.centreHeightM) / drawn.wheelbaseM;
  if (drawn.driven === 'all') return weightN;
  return drawn.driven === 'front' ? drawn.frontShare * weightN - movedN : (1 - drawn.frontShare) * weightN + movedN;
}

describe('adhesionLimitN', () => {
  it('is the force at which the driven axle, loaded by that very force, just grips', () => {
    fc.assert(
      fc.property(cases, (drawn) => {
        const limitN = adhesionLimitN(vehicleOf(drawn), drawn.speed, drawn.cos);
        const gripN = drawn.adhesion * drivenLoadN(drawn, limitN);
        const wholeN = drawn.adhesion * 2800 * 9.80665 * drawn.cos;
        if (limitN >= wholeN * (1 - 1e-12)) expect(gripN).toBeGreaterThan(limitN * (1 - 1e-11));
        else if (limitN === 0) expect(gripN).toBeLessThanOrEqual(0);
        else expect(Math.abs(gripN / limitN - 1)).toBeLessThan(1e-11);
      }),
      { numRuns: 1000 },
    );
  });

  it('never exceeds the whole weight and never pulls backwards', () => {
    fc.assert(
      fc.property(cases, (drawn) => {
        const limitN = adhesionLimitN(vehicleOf(drawn), drawn.speed, drawn.cos);
        expect(limitN).toBeGreaterThanOrEqual(0);
        if (drawn.driven !== 'front') expect(limitN).toBeLessThanOrEqual(drawn.adhesion * 2800 * 9.80665 * drawn.cos * (1 + 1e-12));
      }),
    );
  });

  it('is proportional to the cosine of the slope', () => {
    fc.assert(
      fc.property(cases, (drawn) => {
        const vehicle = vehicleOf(drawn);
        expect(adhesionLimitN(vehicle, drawn.speed, drawn.cos)).toBeCloseTo(drawn.cos * adhesionLimitN(vehicle, drawn.speed, 1), 7);
      }),
    );
  });

  it('is the whole weight for a rear axle that gains load faster than it uses it', () => {
    const tall = vehicleOf({ driven: 'rear', adhesion: 1.5, frontShare: 0.5, centreHeightM: 1.4, wheelbaseM: 2.1 });
    expect(adhesionLimitN(tall, 10, 1)).toBe(1.5 * 2800 * 9.80665);
  });

  it('is not looked at where no adhesion is stated', () => {
    expect(adhesionLimitN(sampleVehicle({ axles: sampleAxles({ adhesion: Number.NaN }) }), 10, 1)).toBe(Infinity);
  });
});

describe('adhesionBreakSpeedsMPerS', () => {
  const tall = vehicleOf({ driven: 'rear', adhesion: 1.2, frontShare: 0.4, centreHeightM: 1.04, wheelbaseM: 3 });

  it('is where a rear axle stops to carry the whole weight', () => {
    const wholeN = 1.2 * 2800 * 9.80665;
    const [speed] = adhesionBreakSpeedsMPerS(tall);
    expect(adhesionLimitN(tall, speed * 0.999, 1)).toBe(wholeN);
    expect(adhesionLimitN(tall, speed * 1.001, 1)).toBeLessThan(wholeN);
    expect(adhesionLimitN(tall, speed * (1 + 1e-9), 1) / wholeN).toBeCloseTo(1, 9);
  });

  it('is where it stops to carry any', () => {
    const light = vehicleOf({ driven: 'rear', adhesion: 0.5, frontShare: 0.99, centreHeightM: 1, wheelbaseM: 3 });
    const [speed] = adhesionBreakSpeedsMPerS(light);
    expect(adhesionLimitN(light, speed * 0.999, 1)).toBeGreaterThan(0);
    expect(adhesionLimitN(light, speed * 1.001, 1)).toBe(0);
  });

  it('is nowhere for other drives and without a rise of rolling resistance', () => {
    expect(adhesionBreakSpeedsMPerS(vehicleOf({ driven: 'front', adhesion: 1.2, frontShare: 0.4, centreHeightM: 1.04, wheelbaseM: 3 }))).toEqual([]);
    expect(adhesionBreakSpeedsMPerS({ ...tall, road: { ...tall.road, carriedRollingPerSpeed2NS2PerM2: 0 } })).toEqual([]);
    expect(adhesionBreakSpeedsMPerS(sampleVehicle({ axles: sampleAxles({ driven: 'rear', adhesion: Number.NaN }) }))).toEqual([]);
  });
});
