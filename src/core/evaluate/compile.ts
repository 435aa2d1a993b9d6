/** Compiles a study once into an evaluator of designs. */

import { hasTwoRatios, metricColumns } from '../study/catalogue/metric-columns.ts';
import { type DesignMetric, designMetrics, type MetricColumn } from '../study/catalogue/metrics.ts';
import type { Study, Trial } from '../study/study.ts';
import { type Assembler, createAssembler } from './assemble.ts';
import { type Evaluator, limitWords } from './evaluator.ts';
import { type FigureCells, layOutFigures } from './figures.ts';
import { compileRunner, type MetricSlots, type TrialRunner } from './trial-runners.ts';

/** One trial, ready: the figures it replaces for itself, and where its metrics stand in a row. */
interface CompiledTrial {
  readonly name: string;
  readonly run: TrialRunner;
  readonly replacedCells: readonly number[];
  readonly replacements: readonly number[];
  readonly at: number;
  readonly metricCount: number;
}

const tooHeavy = limitWords.indexOf('too heavy');
const speedsOutOfOrder = limitWords.indexOf('base speed above maximum speed');

/**
 * The evaluator of a study. With `wanted` metric names, what only others need is left out, and they may stay NaN; the bits of those that
 * are wanted do not depend on it.
 */
export function compileStudy(study: Study, wanted?: ReadonlySet<string>): Evaluator {
  const inputs = study.axes.flatMap((axis) => axis.sets);
  const { cells, figures: reference } = layOutFigures(study.values, [...inputs, ...study.trials.flatMap((trial) => Object.keys(trial.with))]);
  const inputCells = inputs.map((name) => cells.cell(name));
  const columns = metricColumns(study);
  const trials = study.trials
    .filter((trial) => wanted === undefined || columns.some((column) => column.trial === trial.name && wanted.has(column.name)))
    .map((trial) => compileTrial(trial, { cells, columns, wanted, twoRatios: hasTwoRatios(study) }));
  const assembler = createAssembler(study, cells);
  const figures = new Float64Array(reference.length);
  const ownFigures = new Float64Array(reference.length);
  const out: MetricSlots = { metrics: new Float64Array(columns.length), limits: new Uint8Array(columns.length), at: 0 };

  function evaluateRow(): void {
    out.metrics.fill(Number.NaN);
    out.limits.fill(0);
    if (!assembler.fillDrive(figures)) {
      out.limits.fill(speedsOutOfOrder);
      return;
    }
    writeDesign(assembler, out.metrics, columns.length - designFigures.length);
    // Trials that replace nothing come from the drive as it stands; the others make their own.
    let ownDrive = false;
    for (const trial of trials) {
      const replaces = trial.replacedCells.length > 0;
      if (replaces) replaceFigures(ownFigures, figures, trial);
      if ((replaces || ownDrive) && !assembler.fillDrive(replaces ? ownFigures : figures)) {
        out.limits.fill(speedsOutOfOrder, trial.at, trial.at + trial.metricCount);
      } else {
        runTrial(assembler, trial, replaces ? ownFigures : figures, out);
      }
      ownDrive = replaces;
    }
  }

  return {
    inputs,
    metrics: columns,
    reference: Float64Array.from(inputCells, (cell) => reference[cell]),
    evaluate(row, rowAt, metrics, metricAt, limits) {
      figures.set(reference);
      for (let k = 0; k < inputCells.length; k++) figures[inputCells[k]] = row[rowAt + k];
      evaluateRow();
      metrics.set(out.metrics, metricAt);
      limits?.set(out.limits, metricAt);
    },
  };
}

/** What a trial is compiled with. */
interface TrialSetting {
  readonly cells: FigureCells;
  readonly columns: readonly MetricColumn[];
  readonly wanted: ReadonlySet<string> | undefined;
  readonly twoRatios: boolean;
}

function compileTrial(trial: Trial, { cells, columns, wanted, twoRatios }: TrialSetting): CompiledTrial {
  const replaced = Object.entries(trial.with);
  return {
    name: trial.name,
    run: compileRunner(trial, cells.cell, twoRatios, (metric) => wanted === undefined || wanted.has(`${trial.name}.${metric}`)),
    replacedCells: replaced.map(([name]) => cells.cell(name)),
    replacements: replaced.map(([, value]) => value),
    at: columns.findIndex((column) => column.trial === trial.name),
    metricCount: columns.filter((column) => column.trial === trial.name).length,
  };
}

function replaceFigures(own: Float64Array, figures: Float64Array, trial: CompiledTrial): void {
  own.set(figures);
  for (let k = 0; k < trial.replacedCells.length; k++) own[trial.replacedCells[k]] = trial.replacements[k];
}

function runTrial(assembler: Assembler, trial: CompiledTrial, figures: Float64Array, out: MetricSlots): void {
  const load = assembler.fillLoad(figures, trial.name);
  if (load.tooHeavy) {
    out.limits.fill(tooHeavy, trial.at, trial.at + trial.metricCount);
    return;
  }
  out.at = trial.at;
  out.metrics[trial.at] = load.payloadKg;
  trial.run(assembler.vehicle, figures, out);
}

const designFigureOf: Record<DesignMetric, (assembler: Assembler) => number> = {
  'driveUnit.peakPower': ({ vehicle }) => vehicle.motor.peakPowerW,
  'driveUnit.peakTorque': ({ vehicle }) => vehicle.motor.peakTorqueNm,
  'driveUnit.axleTorque': ({ vehicle }) => vehicle.motor.peakTorqueNm * vehicle.gearing.ratios[0],
  'driveUnit.mass': ({ budget }) => budget.mass.driveUnit,
  'driveUnit.cost': ({ budget }) => budget.cost.driveUnit,
  'battery.mass': ({ budget }) => budget.mass.battery,
  'battery.cost': ({ budget }) => budget.cost.battery,
  'vehicle.mass': (assembler) => assembler.vehicleMassKg(),
  'vehicle.massFactor': (assembler) => assembler.massFactorAt(assembler.vehicleMassKg()),
};
const designFigures = (Object.keys(designMetrics) as DesignMetric[]).map((name) => designFigureOf[name]);

/** Metrics of the whole design stand behind those of the trials. */
function writeDesign(assembler: Assembler, metrics: Float64Array, at: number): void {
  for (let k = 0; k < designFigures.length; k++) metrics[at + k] = designFigures[k](assembler);
}
