/** The rules for the study that a trial makes of the study's numbers, its `with` and its own. */

import { trialKindRow } from '../catalogue/trial-kinds.ts';
import type { Found } from '../read/read-places.ts';
import type { TrialFound } from '../read/read-trials.ts';
import type { IssueList } from '../text/issue.ts';
import { checkOrders, checkRules, type Stated } from './check-rules.ts';

/** What the check of a trial looks at. */
export interface TrialCheck {
  readonly base: Found;
  /** Names whose order against others is left to each design. */
  readonly varied: ReadonlySet<string>;
  readonly issues: IssueList;
  /** Where a name of the base stands, as messages say it. */
  readonly pathOf: (name: string) => string;
}

/** Everything that a trial's own numbers and its `with` say twice, leave incomplete or put out of order; the order alone where the rest is known to hold. */
export function checkTrialRules(trial: TrialFound, { base, varied, issues, pathOf }: TrialCheck, orderAlone = false): void {
  const stated: Stated = {
    figures: new Map([...base.figures, ...trial.with, ...trial.found.figures]),
    stands: new Map([...base.stands, ...trial.withStands, ...trial.found.stands]),
    tried: new Set([...base.tried, ...trial.withStands.keys(), ...trial.found.tried]),
  };
  const only = new Set([...trial.withStands.keys(), ...trial.found.stands.keys()]);
  const left = new Set([...varied].filter((name) => !trial.withStands.has(name)));
  const path = (name: string) => (trial.withStands.has(name) ? `trials.${trial.name}.with.${name}` : pathOf(name));
  const check = { stated, issues, varied: left, only, base: base.stands, pathOf: path };
  if (orderAlone) {
    checkOrders(check);
  } else {
    checkRules(check);
    checkContinuous(trial, stated, issues);
  }
}

function checkContinuous({ name, kind, rating, at, found }: TrialFound, stated: Stated, issues: IssueList): void {
  if (trialKindRow(kind).rating === null || rating !== 'continuous' || stated.stands.has('motor.continuous')) return;
  if (stated.stands.has('motor.continuous.torque')) return;
  const said = found.texts.get(`trials.${name}.rating`);
  const what = said === undefined ? `a ${kind} trial, which is rated continuous by default,` : 'rating: continuous';
  issues.error(said?.at ?? at, `trials.${name}.rating`, {
    expected: 'rating: peak in a study without motor.continuous',
    found: `${what} without a continuous limit`,
    hint: 'Add "continuous: { torque: 50 %, power: 50 % }" under motor, or write "rating: peak" in the trial.',
  });
}
