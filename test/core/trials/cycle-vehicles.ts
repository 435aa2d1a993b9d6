/** Random vehicles and conditions that reach every branch of a cycle: weak packs, short motors, two ratios, maps, curves, wind. */
import fc from 'fast-check';
import type { CycleConditions } from '../../../src/core/trials/compiled-cycle.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { vehicles } from '../vehicle/sample-vehicle.ts';

/** Evenly spread: fc.double draws bit patterns, most of them next to nothing. */
const share = (from: number, to: number) => fc.integer({ min: 0, max: 1_000_000 }).map((k) => from + ((to - from) * k) / 1_000_000);

/** Vehicles as the cycle sees them. */
export const cycleVehicles: fc.Arbitrary<Vehicle> = fc
  .record({
    vehicle: vehicles,
    ratioCount: fc.constantFrom(1 as const, 2 as const),
    share: fc.constantFrom(0, 0.5, 0.7, 1),
    from: share(0, 3),
    fade: fc.constantFrom(0, 0.5, 4),
    chargeW: fc.oneof(share(2000, 40_000), fc.constant(Number.POSITIVE_INFINITY)),
    dischargeW: fc.oneof(share(5000, 60_000), share(30_000, 200_000), fc.constant(Number.POSITIVE_INFINITY)),
    mostW: fc.oneof(fc.constant(Number.NaN), share(1500, 50_000)),
    airLinearNSPerM: fc.constantFrom(0, -3, 4),
    calm: fc.boolean(),
    topShare: fc.constantFrom(1, 1, 0.5),
    dragFixedNm: fc.constantFrom(0, 0.4, 3),
  })
  .map(({ vehicle, ...drawn }) => {
    const { motor, battery } = vehicle;
    const maxSpeedRadPerS = motor.fullLoad === null ? Math.max(motor.baseSpeedRadPerS, motor.maxSpeedRadPerS * drawn.topShare) : motor.maxSpeedRadPerS;
    const constantPowerToRadPerS = Math.min(motor.constantPowerToRadPerS, maxSpeedRadPerS);
    const resistanceOhm = Number.isNaN(drawn.mostW) ? battery.resistanceOhm : battery.voltageV ** 2 / (4 * drawn.mostW);
    const headWindMPerS = drawn.calm ? 0 : vehicle.road.headWindMPerS;
    return {
      ...vehicle,
      motor: { ...motor, maxSpeedRadPerS, constantPowerToRadPerS },
      gearing: { ...vehicle.gearing, ratioCount: drawn.ratioCount, dragFixedNm: drawn.dragFixedNm },
      battery: { ...battery, resistanceOhm, chargeW: drawn.chargeW, dischargeW: drawn.dischargeW },
      regeneration: { share: drawn.share, fromMPerS: drawn.from, fullMPerS: drawn.from + drawn.fade },
      road: { ...vehicle.road, airLinearNSPerM: drawn.airLinearNSPerM, headWindMPerS },
    };
  });

/** Conditions of a cycle trial: level, sloped, a road over time or over distance, with and without a cap. */
export const cycleConditions: fc.Arbitrary<CycleConditions> = fc.record({
  grade: fc.oneof(fc.constant(0), share(-0.06, 0.06)),
  road: fc.oneof(
    fc.constant(null),
    fc.record({
      over: fc.constantFrom('time' as const, 'distance' as const),
      at: fc.constant([20, 150, 400, 900, 2500]),
      grades: fc.array(share(-0.08, 0.08), { minLength: 5, maxLength: 5 }),
    }),
  ),
  capSpeedMPerS: fc.constantFrom(Number.NaN, Number.NaN, 12),
});
