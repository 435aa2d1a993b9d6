/** Requirements in words: the bound, the value beside it, and by how much it is met or missed. */
import { differenceText, figureText, neededDecimals, withCurrency } from '../charts/figure-words.ts';
import type { MetricRow } from '../core/study/metrics.ts';
import type { Requirement, Study } from '../core/study/study.ts';
import { type Format, formatAgainstLimit, formatLimit } from '../core/units/format-quantity.ts';

/** `at least 20 %`. */
export function boundText({ bound, limit }: Pick<Requirement, 'bound' | 'limit'>, row: MetricRow, study: Study): string {
  const printed = formatLimit(limit, row.quantity, formatOf({ decimals: neededDecimals(limit, row, study) }, study));
  return `${bound === 'atLeast' ? 'at least' : 'at most'} ${withCurrency(printed, row.quantity, study)}`;
}

/** The value in as many decimals as keep it on its own side of the limit. */
export function valueBesideLimit(value: number, { bound, limit }: Requirement, row: MetricRow, study: Study): string {
  if (Number.isNaN(value)) return figureText(value, row, study);
  return withCurrency(formatAgainstLimit(value, limit, bound, row.quantity, formatOf(row, study)), row.quantity, study);
}

/** Does a value meet a requirement? A metric that does not exist (NaN) never does; limits are inclusive. */
export function meets(value: number, { bound, limit }: Requirement): boolean {
  return bound === 'atLeast' ? value >= limit : value <= limit;
}

/** `met, 4.5 %-points to spare`, `MISSED by 0.53 s`, `MISSED: it does not exist`. */
export function verdictText(value: number, requirement: Requirement, row: MetricRow, study: Study): string {
  const asked = requirement.implied ? ' (asked of every cycle)' : '';
  if (Number.isNaN(value)) return `MISSED: there is no value${asked}`;
  const margin = value - requirement.limit;
  if (!meets(value, requirement)) return `MISSED by ${differenceText(margin, row, study)}${asked}`;
  if (requirement.implied) return `met${asked}`;
  // Rounding of the conversion alone is no margin.
  return Math.abs(margin) <= 1e-9 * Math.abs(requirement.limit) ? 'met, nothing to spare' : `met, ${differenceText(margin, row, study)} to spare`;
}

function formatOf({ decimals }: Pick<MetricRow, 'decimals'>, study: Study): Format {
  return { decimals, system: study.report.units };
}
