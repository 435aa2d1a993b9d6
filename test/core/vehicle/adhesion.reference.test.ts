/** Adhesion with load transfer against a published statics exercise. */
import { describe, it } from 'vitest';
import { adhesionLimitN } from '../../../src/core/vehicle/adhesion.ts';
import { resistanceN, roadLoadFromCoefficients, slopeOf } from '../../../src/core/vehicle/road-load.ts';
import { compare } from '../../reference-table.ts';
import { sampleAxles, sampleVehicle } from './sample-vehicle.ts';

// Traction-limited grade, statics exercise in a physicsforums.com thread (339714, read): centre of gravity 0.875 m behind the front axle,
// 0.475 m high, wheelbase 2.675 m, coefficient of friction 0.5, no rolling resistance.
describe('the steepest slope that adhesion holds', () => {
  it.each([
    ['rear', 10.18],
    ['front', 17.17],
    ['all', 26.57],
  ] as const)('with %s drive is %d°', (driven, degrees) => {
    const road = roadLoadFromCoefficients({
      movedMassKg: 1500,
      carriedMassKg: 1500,
      rollingC0: 0,
      rollingC1S2PerM2: 0,
      dragAreaM2: 0.6,
      trailerDragAreaM2: 0,
      airDensityKgPerM3: 1.2,
      headWindMPerS: 0,
    });
    const axles = sampleAxles({ driven, adhesion: 0.5, frontShare: 1 - 0.875 / 2.675, centreHeightM: 0.475, wheelbaseM: 2.675 });
    const car = sampleVehicle({ axles, road, carriedMassKg: 1500, movedMassKg: 1500 });
    const spareN = (angleDegrees: number) => {
      const slope = slopeOf(Math.tan((angleDegrees * Math.PI) / 180));
      return adhesionLimitN(car, 0, slope.cos) - resistanceN(road, 0, slope);
    };
    let [held, lost] = [0, 60];
    while (lost - held > 1e-9) {
      const middle = (held + lost) / 2;
      if (spareN(middle) > 0) held = middle;
      else lost = middle;
    }
    // Printed to a hundredth of a degree.
    compare({
      check: `traction-limited slope, ${driven} drive, °`,
      source: 'statics exercise, physicsforums.com thread 339714 (read)',
      expected: degrees,
      got: held,
      within: 0.006 / degrees,
    });
  });
});
