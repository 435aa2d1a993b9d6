/** The cycle of the common workload, driven by the kernel, by the plain loop and by the exact step. */
import { createAssembler } from '../../src/core/evaluate/assemble.ts';
import { layOutFigures } from '../../src/core/evaluate/figures.ts';
import { createSearch } from '../../src/core/search/search.ts';
import type { Study } from '../../src/core/study/study.ts';
import { type CompiledCycle, compileCycle } from '../../src/core/trials/compiled-cycle.ts';
import { type CycleResult, createCycleResult, runCycle } from '../../src/core/trials/cycle.ts';
import { addDrawn, addStanding, clearDrawn, packHeatJ } from '../../src/core/trials/drawn-sums.ts';
import { driveStep } from '../../src/core/trials/drive-step.ts';
import { calmResistance, writeDemand } from '../../src/core/trials/wheel-demand.ts';
import type { Vehicle } from '../../src/core/vehicle/vehicle.ts';
import { drivePlainly, type PlainSums, type PlainTrace, plainTrace } from './plain-cycle.ts';

/** Designs of a study, each a vehicle of its own, and its cycle both ways. */
export interface KernelBench {
  readonly vehicles: readonly Vehicle[];
  readonly cycle: CompiledCycle;
  readonly trace: PlainTrace;
  readonly result: CycleResult;
  readonly sums: PlainSums;
}

/** So many designs from all over the search of a study with one cycle. */
export function kernelBench(study: Study, designs: number): KernelBench {
  const trial = study.trials.find(({ kind }) => kind === 'cycle');
  if (trial === undefined || trial.trace === null) throw new Error('the workload has no cycle');
  const search = createSearch(study);
  const inputs = study.axes.flatMap(({ sets }) => sets);
  const { cells, figures } = layOutFigures(study.values, inputs);
  const row = new Float64Array(inputs.length);
  const vehicles = Array.from({ length: designs }, (_, i) => {
    search.inputs(1 + ((i * 104_729) % search.count), row, 0);
    inputs.forEach((name, k) => {
      figures[cells.cell(name)] = row[k];
    });
    const assembler = createAssembler(study, cells);
    if (!assembler.fillDrive(figures) || assembler.fillLoad(figures, trial.name).tooHeavy) throw new Error(`design ${i} of the workload is none`);
    return assembler.vehicle;
  });
  const cycle = compileCycle(trial.trace, { grade: 0, road: null, capSpeedMPerS: Number.NaN });
  return { vehicles, cycle, trace: plainTrace(trial.trace), result: createCycleResult(), sums: { drawnJ: 0, missedS: 0 } };
}

/** By the kernel: energy (J) and missed time (s) of the whole trace. */
export function drawnByKernel(vehicle: Vehicle, { cycle, result }: KernelBench): PlainSums {
  runCycle(vehicle, cycle, result, false);
  return { drawnJ: result.batteryEnergyJPerM * cycle.distanceM, missedS: cycle.drawn.missedS };
}

/** By the plain loop. */
export function drawnPlainly(vehicle: Vehicle, { trace }: KernelBench): PlainSums {
  const sums = { drawnJ: 0, missedS: 0 };
  drivePlainly(vehicle, trace, sums);
  return sums;
}

/** Every step word for word. */
export function drawnExactly(vehicle: Vehicle, { cycle }: KernelBench): PlainSums {
  const { drawn, driven, durationS, speedMPerS, standingS } = cycle;
  clearDrawn(drawn);
  writeDemand(
    { effectiveMassKg: vehicle.effectiveMassKg[0], calm: calmResistance(vehicle.road, cycle) },
    vehicle.road,
    cycle,
    0,
    durationS.length,
    driven.demandN,
  );
  for (let k = 0; k < durationS.length; k++) driveStep(vehicle, 0, speedMPerS[k], Number.NEGATIVE_INFINITY, k, driven);
  addDrawn(vehicle, durationS, driven, 0, durationS.length, drawn);
  addStanding(vehicle, standingS, drawn);
  return { drawnJ: drawn.terminalJ + packHeatJ(vehicle, drawn), missedS: drawn.missedS };
}
