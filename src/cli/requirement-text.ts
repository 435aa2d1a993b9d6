/** Requirements in words: the bound, the value beside it, and by how much it is met or missed. */
import type { MetricRow } from '../core/study/metrics.ts';
import type { Requirement, Study } from '../core/study/study.ts';
import { formatAgainstLimit, formatFigure, formatLimit } from '../core/units/format-quantity.ts';
import { fromSi, readingUnit } from '../core/units/units.ts';
import { figureText, formatOf, unitText, withCurrency } from './figure-text.ts';

/** `at least 20 %`. */
export function boundText({ bound, limit }: Pick<Requirement, 'bound' | 'limit'>, row: MetricRow, study: Study): string {
  const printed = formatLimit(limit, row.quantity, formatOf(row.decimals, study));
  return `${bound === 'atLeast' ? 'at least' : 'at most'} ${withCurrency(printed, row.quantity, study)}`;
}

/** The value in as many decimals as keep it on its own side of the limit. */
export function valueBesideLimit(value: number, { bound, limit }: Requirement, row: MetricRow, study: Study): string {
  if (Number.isNaN(value)) return figureText(value, row, study);
  return withCurrency(formatAgainstLimit(value, limit, bound, row.quantity, formatOf(row.decimals, study)), row.quantity, study);
}

/** Does a value meet a requirement? A metric that does not exist (NaN) never does; limits are inclusive. */
export function meets(value: number, { bound, limit }: Requirement): boolean {
  return bound === 'atLeast' ? value >= limit : value <= limit;
}

/** `met, 4.5 percentage points to spare`, `MISSED by 0.53 s`, `MISSED: it does not exist`. */
export function verdictText(value: number, requirement: Requirement, row: MetricRow, study: Study): string {
  const asked = requirement.implied ? ' (asked of every cycle)' : '';
  if (Number.isNaN(value)) return `MISSED: there is no value${asked}`;
  const unit = readingUnit(row.quantity, study.report.units);
  const margin = Math.abs(fromSi(value, unit) - fromSi(requirement.limit, unit));
  if (!meets(value, requirement)) return `MISSED by ${marginText(margin, row, study)}${asked}`;
  if (requirement.implied) return `met${asked}`;
  // Rounding of the conversion alone is no margin.
  return margin <= 1e-9 * Math.abs(fromSi(requirement.limit, unit)) ? 'met, nothing to spare' : `met, ${marginText(margin, row, study)} to spare`;
}

/** A difference that is not zero never prints as zero. Differences of percentages are percentage points. */
function marginText(margin: number, row: MetricRow, study: Study): string {
  const rounded = formatFigure(margin, row.decimals);
  const figure = Number(margin.toFixed(row.decimals)) === 0 ? margin.toPrecision(1) : rounded;
  const unit = unitText(row.quantity, study);
  if (unit === '%') return `${figure} percentage points`;
  return unit === '' ? figure : `${figure} ${unit}`;
}
