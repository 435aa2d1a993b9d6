import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type CompiledCycle, compileCycle } from '../../../src/core/trials/compiled-cycle.ts';
import { addDrawn, clearDrawn, createDrawnSums, type DrawnSums } from '../../../src/core/trials/drawn-sums.ts';
import { driveBySpeed } from '../../../src/core/trials/drive-by-speed.ts';
import { driveStep } from '../../../src/core/trials/drive-step.ts';
import { createDrivenSteps } from '../../../src/core/trials/driven-steps.ts';
import { calmResistance, writeDemand } from '../../../src/core/trials/wheel-demand.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';
import { sampleMotor, sampleVehicle } from '../vehicle/sample-vehicle.ts';
import { cycleConditions, cycleVehicles } from './cycle-vehicles.ts';
import { onTheLevel, readSchedule, scheduleNames } from './schedules.ts';

const schedules = new Map(scheduleNames.map((name) => [name, readSchedule(name)]));
const scheduleOf = (name: (typeof scheduleNames)[number]) => schedules.get(name)!;

/** Every step word for word, added in the same order; and the terminal energy that flows either way. */
function drawnExactly(vehicle: Vehicle, { bySpeed }: CompiledCycle): { sums: DrawnSums; grossJ: number } {
  const steps = bySpeed.speedMPerS.length;
  const driven = createDrivenSteps(steps);
  const sums = createDrawnSums();
  clearDrawn(sums);
  writeDemand({ effectiveMassKg: vehicle.effectiveMassKg[0], calm: calmResistance(vehicle.road, bySpeed) }, vehicle.road, bySpeed, 0, steps, driven.demandN);
  let grossJ = 0;
  for (let k = 0; k < steps; k++) {
    driveStep(vehicle, 0, bySpeed.speedMPerS[k], Number.NEGATIVE_INFINITY, k, driven);
    grossJ += Math.abs(driven.demandN[k] * bySpeed.speedMPerS[k] * bySpeed.durationS[k]) + (driven.lossW[k] + vehicle.auxiliariesW) * bySpeed.durationS[k];
    addDrawn(vehicle, bySpeed.durationS, driven, k, k + 1, sums);
  }
  return { sums, grossJ };
}

function drawnQuickly(vehicle: Vehicle, cycle: CompiledCycle): DrawnSums {
  clearDrawn(cycle.drawn);
  driveBySpeed(vehicle, cycle);
  return cycle.drawn;
}

/** One ratio and losses by coefficients; measured full-load curves among them. */
const quickVehicles = cycleVehicles
  .filter(({ motor }) => motor.lossMap === null)
  .map((vehicle): Vehicle => ({ ...vehicle, gearing: { ...vehicle.gearing, ratioCount: 1 } }));

describe('energy drawn over a cycle, by the quick loops', () => {
  it('is that of the exact step on every step, and the same steps are missed', () => {
    const stopped = { vehicles: 0, missed: 0 };
    fc.assert(
      fc.property(quickVehicles, cycleConditions, fc.constantFrom(...scheduleNames), (vehicle, conditions, name) => {
        const cycle = compileCycle(scheduleOf(name), conditions);
        const { sums, grossJ } = drawnExactly(vehicle, cycle);
        const quick = drawnQuickly(vehicle, cycle);
        const voltageSquare = vehicle.battery.voltageV * vehicle.battery.voltageV;
        expect(quick.missedS).toBe(sums.missedS);
        expect(Math.abs(quick.terminalJ - sums.terminalJ)).toBeLessThanOrEqual(1e-12 * grossJ);
        expect(Math.abs(quick.dropSquareV2S - sums.dropSquareV2S)).toBeLessThanOrEqual(1e-12 * (sums.dropSquareV2S + voltageSquare));
        stopped.vehicles++;
        if (sums.missedS > 0) stopped.missed++;
      }),
      { numRuns: 150, seed: 21 },
    );
    // Both kinds were there: designs that follow, and designs whose limits stop the loops.
    expect(stopped.missed).toBeGreaterThan(30);
    expect(stopped.vehicles - stopped.missed).toBeGreaterThan(10);
  });

  it('holds where power falls above constant power, and where the motor ends below the schedule', () => {
    const { timesS, speedsMPerS } = scheduleOf('us06');
    const cycle = compileCycle({ timesS, speedsMPerS }, onTheLevel);
    for (const [constantPowerToRadPerS, maxSpeedRadPerS] of [
      [500, 1360],
      [700, 800],
      [450, 450],
    ]) {
      const vehicle = sampleVehicle({ motor: sampleMotor({ constantPowerToRadPerS, maxSpeedRadPerS }) });
      const { sums, grossJ } = drawnExactly(vehicle, cycle);
      const quick = drawnQuickly(vehicle, cycle);
      expect(quick.missedS).toBe(sums.missedS);
      expect(Math.abs(quick.terminalJ - sums.terminalJ)).toBeLessThanOrEqual(1e-12 * grossJ);
    }
  });

  it('orders the steps by the schedule: three runs by how they slow down, slow ones first, equal ones taken together', () => {
    const cycle = compileCycle(scheduleOf('udds'), onTheLevel);
    const { bySpeed } = cycle;
    const { steady, braking, speedMPerS, accelerationMPerS2 } = bySpeed;
    speedMPerS.forEach((speed, k) => {
      const slowing = -accelerationMPerS2[k];
      expect(slowing <= 0.04 + 5e-5 * speed * speed).toBe(k < steady);
      expect(slowing > 0.15 + 4e-4 * speed * speed).toBe(k >= braking);
      if (k > 0 && k !== steady && k !== braking) expect(speed).toBeGreaterThanOrEqual(speedMPerS[k - 1]);
    });
    const timeOf = (steps: typeof bySpeed | CompiledCycle) => {
      const times: Record<string, number> = {};
      steps.speedMPerS.forEach((speed, k) => {
        const kind = `${speed} ${steps.accelerationMPerS2[k]}`;
        times[kind] = (times[kind] ?? 0) + steps.durationS[k];
      });
      return times;
    };
    expect(timeOf(bySpeed)).toEqual(timeOf(cycle));
    expect(speedMPerS.length).toBe(Object.keys(timeOf(cycle)).length);
    expect(speedMPerS.length).toBeLessThan(cycle.speedMPerS.length);
  });
});
