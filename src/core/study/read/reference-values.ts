/** The reference design: every number given, derived or defaulted, in SI, by dotted name. */
import type { FullLoadCurve } from '../../vehicle/full-load-curve.ts';
import { type ParameterRow, parameters, trialParameters } from '../catalogue/parameters.ts';
import { trialKindRow } from '../catalogue/trial-kinds.ts';
import { ruledOutBy } from '../rules/rules.ts';
import type { Found } from './read-places.ts';
import type { TrialFound } from './read-trials.ts';
import { rollingRadiusM } from './tyre-size.ts';

/** Share of the braking force that a driven axle may take, where the study says nothing. */
const REGENERATION_SHARE: Readonly<Record<string, number>> = { all: 1, front: 0.7, rear: 0.5 };
/** Defaults of these hold only where one name of the group stands: elsewhere the metric or the law does not exist. */
const GROUPS: readonly RegExp[] = [
  /^motor\.losses\./u,
  /^massAndCost\.mass\.(?:motor|inverter|gearing)\./u,
  /^massAndCost\.cost\.(?:motor|inverter|gearing)\./u,
  /^massAndCost\.mass\.battery\./u,
  /^massAndCost\.cost\.battery\./u,
];

/** What the values come from. */
export interface ValueSources {
  readonly found: Found;
  readonly trials: readonly TrialFound[];
  readonly fullLoad: FullLoadCurve | null;
}

/** The values of a study without errors; of one with errors as far as they go. */
export function referenceValues({ found, trials, fullLoad }: ValueSources): Record<string, number> {
  const values: Record<string, number> = {};
  const own = [...found.stands.keys()];
  for (const row of parameters) {
    const value = found.figures.get(row.name)?.value ?? derived(row.name, found, fullLoad) ?? defaultOf(row, own);
    if (value !== undefined) values[row.name] = value;
  }
  for (const trial of trials) addTrial(values, trial);
  return values;
}

function derived(name: string, { texts, stands }: Found, fullLoad: FullLoadCurve | null): number | undefined {
  if (stands.has(name)) return undefined;
  if (name === 'vehicle.wheelRadius') return rollingRadiusM(texts.get('vehicle.tyre')?.text ?? '') ?? undefined;
  if (name === 'vehicle.regeneration.share') return REGENERATION_SHARE[texts.get('vehicle.axles.driven')?.text ?? ''];
  if (name === 'motor.peakTorque') return fullLoad?.referencePeakTorqueNm;
  if (name === 'motor.baseSpeed') return fullLoad?.referenceBaseSpeedRadPerS;
  return undefined;
}

function defaultOf(row: ParameterRow, stands: readonly string[]): number | undefined {
  if (row.default === undefined || ruledOutBy(row.name, stands) !== undefined) return undefined;
  const group = GROUPS.find((pattern) => pattern.test(row.name));
  return group === undefined || stands.some((name) => group.test(name)) ? row.default : undefined;
}

/** All numbers that the kind takes, so that wind, grade and trailer always have a figure; a payload only where no laden mass gives it. */
function addTrial(values: Record<string, number>, { name, kind, found }: TrialFound): void {
  for (const key of trialKindRow(kind).takes) {
    const full = `trials.${name}.${key}`;
    const row: ParameterRow = trialParameters[key];
    const value = found.figures.get(full)?.value ?? (key === 'payload' && found.stands.has(`trials.${name}.laden`) ? undefined : row.default);
    if (value !== undefined) values[full] = value;
  }
}
