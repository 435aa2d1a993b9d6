/** Every metric a study's designs have, in the order of result rows. */

import type { Study } from '../study.ts';
import { designMetrics, type MetricColumn, machineKey, type TrialMetric, trialMetrics } from './metrics.ts';
import { trialKindRow } from './trial-kinds.ts';

/** What decides which metrics there are: the trials, and whether any design has two ratios. */
export interface MetricSource {
  readonly trials: readonly Pick<Study['trials'][number], 'name' | 'kind'>[];
  readonly values: Study['values'];
  readonly axes: readonly Pick<Study['axes'][number], 'sets'>[];
}

const secondRatio = 'gearing.ratios.2';

/** Does the study, or an option of it, have two ratios? Then trials also tell which of them they use. */
export function hasTwoRatios({ values, axes }: Pick<MetricSource, 'values' | 'axes'>): boolean {
  return values[secondRatio] !== undefined || axes.some(({ sets }) => sets.includes(secondRatio));
}

/** Trials in file order, each kind's metrics in the order of the catalogue; then the metrics of the whole design. */
export function metricColumns(study: MetricSource): MetricColumn[] {
  const twoRatios = hasTwoRatios(study);
  const ofTrials = study.trials.flatMap(({ name, kind }) => {
    const { metrics, gearMetrics } = trialKindRow(kind);
    return [...metrics, ...(twoRatios ? gearMetrics : [])].map((metric) => trialColumn(name, metric));
  });
  const ofDesign = Object.values(designMetrics).map((row): MetricColumn => ({ name: row.name, key: machineKey(row.name, row.quantity), trial: null, row }));
  return [...ofTrials, ...ofDesign];
}

function trialColumn(trial: string, metric: TrialMetric): MetricColumn {
  const row = trialMetrics[metric];
  return { name: `${trial}.${metric}`, key: machineKey(`${trial}.${metric}`, row.quantity), trial, row };
}
