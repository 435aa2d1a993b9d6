/** Every metric a study's designs have, in the order of result rows. */

import type { Study } from '../study.ts';
import { designMetrics, type MetricColumn, machineKey, trialMetrics } from './metrics.ts';
import { trialKindRow } from './trial-kinds.ts';

/** Trials in file order, each kind's metrics in the order of the catalogue; then the metrics of the whole design. */
export function metricColumns(study: { readonly trials: readonly Pick<Study['trials'][number], 'name' | 'kind'>[] }): MetricColumn[] {
  const ofTrials = study.trials.flatMap(({ name, kind }) =>
    trialKindRow(kind).metrics.map((metric): MetricColumn => {
      const row = trialMetrics[metric];
      return { name: `${name}.${metric}`, key: machineKey(`${name}.${metric}`, row.quantity), trial: name, row };
    }),
  );
  const ofDesign = Object.values(designMetrics).map((row): MetricColumn => ({ name: row.name, key: machineKey(row.name, row.quantity), trial: null, row }));
  return [...ofTrials, ...ofDesign];
}
