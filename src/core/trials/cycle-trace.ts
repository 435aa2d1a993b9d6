/** One design on one cycle step by step, for drawing operating points. */
import { mostPowerW } from '../vehicle/battery.ts';
import { motorSpeedRadPerS } from '../vehicle/gearing.ts';
import type { Vehicle } from '../vehicle/vehicle.ts';
import type { CompiledCycle } from './compiled-cycle.ts';
import { createCycleResult, runCycle } from './cycle.ts';

/** One entry per step of the trace, standing steps included. */
export interface CycleTrace {
  readonly speedMPerS: Float64Array;
  readonly torqueNm: Float64Array;
  readonly motorSpeedRadPerS: Float64Array;
  /** 0 the lower or only gear, 1 the higher. */
  readonly gear: Uint8Array;
  /** At the terminals of the pack, charging negative. */
  readonly terminalW: Float64Array;
  /** 1: the drive cannot follow the trace. */
  readonly missed: Uint8Array;
}

/** Drives the cycle once more and spreads its steps over the trace. A standing step draws the auxiliaries alone. */
export function traceCycle(vehicle: Vehicle, cycle: CompiledCycle): CycleTrace {
  runCycle(vehicle, cycle, createCycleResult());
  const { battery, auxiliariesW } = vehicle;
  const { driven, speedMPerS, stepOfTrace, traceSteps } = cycle;
  const mostW = mostPowerW(battery);
  const trace: CycleTrace = {
    speedMPerS: new Float64Array(traceSteps),
    torqueNm: new Float64Array(traceSteps),
    motorSpeedRadPerS: new Float64Array(traceSteps),
    gear: new Uint8Array(traceSteps),
    terminalW: new Float64Array(traceSteps).fill(Math.min(auxiliariesW, mostW)),
    missed: new Uint8Array(traceSteps).fill(auxiliariesW > mostW ? 1 : 0),
  };
  for (let i = 0; i < stepOfTrace.length; i++) {
    const k = stepOfTrace[i];
    const gear = driven.gear[i] === 0 ? 0 : 1;
    trace.speedMPerS[k] = speedMPerS[i];
    trace.torqueNm[k] = driven.torqueNm[i];
    trace.motorSpeedRadPerS[k] = motorSpeedRadPerS(vehicle, gear, speedMPerS[i]);
    trace.gear[k] = gear;
    trace.terminalW[k] = Math.min(Math.max(driven.shaftW[i] + driven.lossW[i] + auxiliariesW, -battery.chargeW), mostW);
    trace.missed[k] = driven.missed[i];
  }
  return trace;
}
