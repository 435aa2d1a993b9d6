/** Trials in words: their conditions, and what limits a result or keeps it from existing. */
import { givenText } from '../charts/figure-words.ts';
import { visibleText } from '../charts/visible-text.ts';
import type { LimitWord } from '../core/evaluate/evaluator.ts';
import type { MetricRow } from '../core/study/catalogue/metrics.ts';
import { findParameter, type ParameterRow, trialParameters } from '../core/study/catalogue/parameters.ts';
import { trialKindRow } from '../core/study/catalogue/trial-kinds.ts';
import type { Study, Trial } from '../core/study/study.ts';

/** `acceleration, from 0 km/h, to 80 km/h, laden mass 2800 kg, peak rating`: the conditions as given, defaults left out. */
export function trialConditions(study: Study, trial: Trial): string {
  const kind = trialKindRow(trial.kind);
  const given = kind.takes.flatMap((key) => {
    const row: ParameterRow = trialParameters[key];
    const value = study.values[`trials.${trial.name}.${key}`];
    return value === undefined || value === row.default ? [] : [`${row.label} ${givenText(value, row, study)}`];
  });
  const replaced = Object.entries(trial.with).map(([name, value]) => `${name} ${givenText(value, findParameter(name) as ParameterRow, study)}`);
  const parts = [
    trial.trace === null ? trial.kind : `cycle ${trial.trace.name}`,
    ...given,
    ...(trial.road === null ? [] : [`road ${trial.road.name}`]),
    ...(kind.rating === null ? [] : [`${trial.rating} rating`]),
    ...(replaced.length === 0 ? [] : [`with ${replaced.join(', ')}`]),
  ];
  return visibleText(parts.join(', '));
}

/** What stands beside a result: `limited by adhesion`; for one that does not exist, why. */
export function limitText(limit: LimitWord, exists: boolean, { absent = 'not reached' }: Pick<MetricRow, 'absent'>): string {
  if (limit === '') return exists ? '' : absent;
  if (exists) return limit === 'beyond 45°' ? limit : `limited by ${limit}`;
  return limit === 'motor speed' ? 'beyond maximum motor speed' : limit;
}
