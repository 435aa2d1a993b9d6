/** What a rule of warnings is: what it looks at, and what it says. */
import { formatAgainstLimit, formatQuantity } from '../../units/format-quantity.ts';
import type { Quantity } from '../../units/units.ts';
import type { Found } from '../read/read-places.ts';
import type { TrialFound } from '../read/read-trials.ts';
import type { Study } from '../study.ts';
import type { IssueList } from '../text/issue.ts';

/** What the rules that need the study alone look at. */
export interface WarningContext {
  readonly study: Study;
  readonly found: Found;
  readonly trials: readonly TrialFound[];
  /** Largest efficiency in an efficiency map; 0 without one. */
  readonly bestMapEfficiency: number;
  readonly issues: IssueList;
}

/** One thing seen: where (a dotted name, or an offset), what was found, and what to do if it is not meant. */
export interface Sight {
  readonly path: string;
  readonly at?: number;
  readonly found: string;
  readonly hint: string;
}

/** One rule. What it says reads `{found}; expected {expected}. {hint}`, behind its place. */
export interface WarningRow<Context> {
  readonly rule: string;
  /** What would be common practice. */
  readonly expected: string;
  look(context: Context): Sight[];
}

/** A figure in the units of the study's reader. */
export function shown(value: number, quantity: Quantity, decimals: number, { report }: Pick<Study, 'report'>): string {
  return formatQuantity(value, quantity, { decimals, system: report.units });
}

/** A figure in decimals enough to stand on its own side of a limit. */
export function beside(
  value: number,
  limit: number,
  bound: 'atLeast' | 'atMost',
  quantity: Quantity,
  decimals: number,
  { report }: Pick<Study, 'report'>,
): string {
  return formatAgainstLimit(value, limit, bound, quantity, { decimals, system: report.units });
}

/** `a`, `a and b`, `a, b and 7 more`. */
export function someOf(names: readonly string[], most = 3): string {
  if (names.length > most + 1) return `${names.slice(0, most).join(', ')} and ${names.length - most} more`;
  return names.length < 2 ? (names[0] ?? '') : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
}
