/** What limits the full-pedal trials of moving vehicles where they begin and where they end: their times do not tell. */
import type { Study, Trial } from '../study/study.ts';
import { slopeOf } from '../vehicle/road-load.ts';
import { shiftSpeedMPerS } from '../vehicle/shift.ts';
import { type TractionLimit, tractionLimit } from '../vehicle/traction.ts';
import { createAssembler } from './assemble.ts';
import { layOutFigures } from './figures.ts';
import { orZero } from './read-figures.ts';

/** One trial of one design; null where there is no such design or speed: too heavy, out of order, not standing, never reached. */
export interface PedalLimits {
  /** At a start from rest. */
  readonly start: TractionLimit | null;
  /** At the speed that the trial ends with. */
  readonly end: TractionLimit | null;
}

/** Looks at full-pedal trials of single designs. */
export interface PedalProbe {
  /** Accelerations and standing distances, in the order of the study. */
  readonly trials: readonly Trial[];
  /** Limits of `trials[index]`; `inputs` in the order of the axes' `sets`, SI; the speed (m/s) that a standing distance ends with. */
  limitsOf(index: number, inputs: Float64Array, endSpeedMPerS: number): PedalLimits;
}

const NO_LIMITS: PedalLimits = { start: null, end: null };

/** Compiles the trials of a study. Not shared between threads. */
export function createPedalProbe(study: Study): PedalProbe {
  const trials = study.trials.filter(({ kind }) => kind === 'acceleration' || kind === 'standing distance');
  const names = study.axes.flatMap(({ sets }) => sets);
  const { cells, figures: reference } = layOutFigures(study.values, [...names, ...trials.flatMap((trial) => Object.keys(trial.with))]);
  const inputCells = names.map((name) => cells.cell(name));
  const assembler = createAssembler(study, cells);
  const figures = new Float64Array(reference.length);
  const of = trials.map(({ name, with: replaced }) => ({
    from: cells.cell(`trials.${name}.from`),
    to: cells.cell(`trials.${name}.to`),
    grade: cells.cell(`trials.${name}.grade`),
    replaced: Object.entries(replaced).map(([key, value]) => ({ cell: cells.cell(key), value })),
  }));
  return {
    trials,
    limitsOf(index, inputs, endSpeedMPerS) {
      const { name, kind, rating } = trials[index];
      const { from, to, grade, replaced } = of[index];
      figures.set(reference);
      for (let k = 0; k < inputCells.length; k++) figures[inputCells[k]] = inputs[k];
      for (const { cell, value } of replaced) figures[cell] = value;
      if (!assembler.fillDrive(figures) || assembler.fillLoad(figures, name).tooHeavy) return NO_LIMITS;
      const { vehicle } = assembler;
      const slope = slopeOf(orZero(figures[grade]));
      const shiftMPerS = shiftSpeedMPerS(vehicle, rating, slope);
      const limitAt = (speedMPerS: number, gear: 0 | 1) => tractionLimit(vehicle, gear, speedMPerS, rating, slope);
      const endMPerS = kind === 'acceleration' ? figures[to] : endSpeedMPerS;
      return {
        start: orZero(figures[from]) === 0 ? limitAt(0, shiftMPerS > 0 ? 0 : 1) : null,
        end: Number.isNaN(endMPerS) ? null : limitAt(endMPerS, endMPerS <= shiftMPerS ? 0 : 1),
      };
    },
  };
}
