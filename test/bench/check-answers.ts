/** Before anything is timed: the quick answers beside the slow plain ones. Throws where they differ by more than accepted. */
import { FrontFilter } from '../../src/core/front/front-filter.ts';
import type { Vehicle } from '../../src/core/vehicle/vehicle.ts';
import { plainFront, randomStream } from '../core/front/oracles.ts';
import { drawnByKernel, drawnExactly, drawnPlainly, type KernelBench } from './kernel-bench.ts';

/** One comparison. */
export interface AnswerCheck {
  readonly name: string;
  readonly cases: number;
  /** Largest relative difference; 0: the same. */
  readonly largest: number;
  readonly accepted: number;
}

/** The cycle kernel beside the plain loop and beside the exact step, on designs within and beyond their limits. */
export function checkKernel(bench: KernelBench): AnswerCheck[] {
  const weak = bench.vehicles.map((vehicle) => weakened(vehicle));
  return [
    kernelAgainst('cycle kernel against the plain loop', bench, [...bench.vehicles, ...weak], drawnPlainly),
    kernelAgainst('cycle kernel against the exact step', bench, [...bench.vehicles, ...weak], drawnExactly),
  ];
}

/** A third of the torque, a pack for a third of the power: most designs then miss steps. */
function weakened(vehicle: Vehicle): Vehicle {
  const { motor, battery } = vehicle;
  const peakTorqueNm = motor.peakTorqueNm / 3;
  return { ...vehicle, motor: { ...motor, peakTorqueNm, peakPowerW: peakTorqueNm * motor.baseSpeedRadPerS }, battery: { ...battery, dischargeW: 25_000 } };
}

function kernelAgainst(name: string, bench: KernelBench, vehicles: readonly Vehicle[], slow: typeof drawnPlainly): AnswerCheck {
  let largest = 0;
  for (const vehicle of vehicles) {
    const quick = drawnByKernel(vehicle, bench);
    const plain = slow(vehicle, bench);
    if (quick.missedS !== plain.missedS) throw new Error(`${name}: ${quick.missedS} s missed, not ${plain.missedS}`);
    largest = Math.max(largest, Math.abs(quick.drawnJ / plain.drawnJ - 1));
  }
  return accepted({ name, cases: vehicles.length, largest, accepted: 1e-12 });
}

/** The front filter beside all pairs: the same designs. */
export function checkFront(): AnswerCheck {
  const random = randomStream(11);
  const points = 1500;
  const widths = [1, 2, 3, 4, 6, 8];
  for (const width of widths) {
    const rows = Array.from({ length: points }, () => Array.from({ length: width }, () => Math.floor(random() * 50)));
    const filter = new FrontFilter(width);
    const columns = Array.from({ length: width }, (_, j) => Float64Array.from(rows, (row) => row[j]));
    filter.add(points, Float64Array.from(rows.keys()), columns, new Uint8Array(points).fill(1));
    const found = [...filter.front().numbers];
    const plain = plainFront(rows);
    if (found.length !== plain.length || found.some((number, k) => number !== plain[k]))
      throw new Error(`the front of ${width} objectives is another one than by all pairs`);
  }
  return accepted({ name: 'front filter against all pairs', cases: points * widths.length, largest: 0, accepted: 0 });
}

function accepted(check: AnswerCheck): AnswerCheck {
  if (!(check.largest <= check.accepted)) throw new Error(`${check.name}: off by ${check.largest}, accepted is ${check.accepted}`);
  return check;
}
