/** By how much a requirement is met or missed, in words. */
import { differenceText, type Measured } from '../charts/figure-words.ts';
import type { Requirement, Study } from '../core/study/study.ts';
import { meets } from '../page/wording.ts';

/** `met, 4.5 %-points to spare`, `MISSED by 0.53 s`, `MISSED: it does not exist`. */
export function verdictText(value: number, requirement: Requirement, row: Measured, study: Study): string {
  const asked = requirement.implied ? ' (asked of every cycle)' : '';
  if (Number.isNaN(value)) return `MISSED: there is no value${asked}`;
  const margin = value - requirement.limit;
  if (!meets(value, requirement)) return `MISSED by ${differenceText(margin, row, study)}${asked}`;
  if (requirement.implied) return `met${asked}`;
  // Rounding of the conversion alone is no margin.
  return Math.abs(margin) <= 1e-9 * Math.abs(requirement.limit) ? 'met, nothing to spare' : `met, ${differenceText(margin, row, study)} to spare`;
}
