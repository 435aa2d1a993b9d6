/** SI numbers -> text that people read: the unit of their system, signs as in print, and never a missed limit that looks met. */
import { fromSi, type Quantity, readingUnit, toSi } from './units.ts';

/** How a number is to be shown. */
export interface Format {
  readonly system?: 'SI' | 'US';
  /** From the catalogue, for the SI reading unit; the unit of another system gets `readingDecimals`. */
  readonly decimals: number;
}

/** A space that holds number and unit together. */
const NARROW_NO_BREAK = '\u202f';
const MINUS = '\u2212';
/** toFixed is exact up to here; beyond, an exponent. */
const LARGEST_FIXED = 1e21;
const MOST_DECIMALS = 20;
/** A last digit may be worth so much more in another unit than in SI before one more is shown: mph stand as km/h do, inches with one digit less than metres. */
const COARSENING = 2;

/** A number without its unit: a real minus sign, thin spaces between thousands from 10 000 up, no negative zero; — for NaN. */
export function formatFigure(value: number, decimals: number): string {
  if (Number.isNaN(value)) return '—';
  const size = Math.abs(value);
  const digits = size === Number.POSITIVE_INFINITY ? '∞' : size >= LARGEST_FIXED ? String(size) : groupThousands(size.toFixed(decimals));
  const zero = Number(size.toFixed(Math.min(decimals, MOST_DECIMALS))) === 0;
  return value < 0 && !zero ? `${MINUS}${digits}` : digits;
}

function groupThousands(fixed: string): string {
  const [whole = '', fraction] = fixed.split('.');
  const grouped = whole.length < 5 ? whole : whole.replace(/\B(?=(\d{3})+$)/gu, NARROW_NO_BREAK);
  return fraction === undefined ? grouped : `${grouped}.${fraction}`;
}

/** The fewest decimals whose last digit is worth at most twice what the last of `decimals` is worth in the SI reading unit. */
export function readingDecimals(decimals: number, quantity: Quantity, system: 'SI' | 'US'): number {
  const [own, si] = [readingUnit(quantity, system), readingUnit(quantity, 'SI')];
  let digit = (own.factor / own.divisor) * (si.divisor / si.factor);
  let shown = decimals;
  for (; digit > COARSENING; digit /= 10) shown++;
  for (; shown > 0 && digit * 10 <= COARSENING; digit *= 10) shown--;
  return shown;
}

/** `15.2 km/h` with a narrow no-break space; — for NaN, no unit for pure numbers and money. */
export function formatQuantity(si: number, quantity: Quantity, format: Format): string {
  return inUnit(si, quantity, format, readingDecimals(format.decimals, quantity, format.system ?? 'SI'));
}

function inUnit(si: number, quantity: Quantity, { system = 'SI' }: Format, decimals: number): string {
  const unit = readingUnit(quantity, system);
  return withUnit(formatFigure(fromSi(si, unit), decimals), Number.isNaN(si) ? '' : unit.symbol);
}

function withUnit(digits: string, symbol: string): string {
  return symbol === '' ? digits : `${digits}${NARROW_NO_BREAK}${symbol}`;
}

/** A limit as people read it: in as many decimals as show it exactly, up to three more than usual; in one more than usual where those do not. */
export function formatLimit(limit: number, quantity: Quantity, format: Format): string {
  return inUnit(limit, quantity, format, decimalsOfLimit(limit, quantity, format));
}

function decimalsOfLimit(limit: number, quantity: Quantity, { system = 'SI', decimals }: Format): number {
  const usual = readingDecimals(decimals, quantity, system);
  return exactDecimals(fromSi(limit, readingUnit(quantity, system)), usual + 3) ?? usual + 1;
}

/** The fewest decimals, at most `most`, that show a number exactly, to twelve digits; null where none do. */
export function exactDecimals(written: number, most: number): number | null {
  if (!Number.isFinite(written)) return 0;
  const exact = Number(written.toPrecision(12));
  for (let decimals = 0; decimals <= most; decimals++) if (Number(exact.toFixed(decimals)) === exact) return decimals;
  return null;
}

/**
 * A value beside its limit (formatLimit): decimals are added until the printed value is on the same side of the printed limit
 * as the real one. Where no decimals tell them apart, `<` or `>` stands in front. Limits are inclusive.
 */
export function formatAgainstLimit(value: number, limit: number, bound: 'atLeast' | 'atMost', quantity: Quantity, format: Format): string {
  const unit = readingUnit(quantity, format.system ?? 'SI');
  const written = fromSi(value, unit);
  if (!Number.isFinite(written) || Math.abs(written) >= LARGEST_FIXED) return formatQuantity(value, quantity, format);
  const printedLimit = Number(fromSi(limit, unit).toFixed(decimalsOfLimit(limit, quantity, format)));
  const met = meets(value, limit, bound);
  for (let decimals = readingDecimals(format.decimals, quantity, format.system ?? 'SI'); decimals <= MOST_DECIMALS; decimals++) {
    const printed = Number(written.toFixed(decimals));
    if (meets(printed, printedLimit, bound) === met && meets(toSi(printed, unit), limit, bound) === met)
      return withUnit(formatFigure(written, decimals), unit.symbol);
  }
  const sign = met ? '' : bound === 'atLeast' ? '< ' : '> ';
  return `${sign}${formatLimit(limit, quantity, format)}`;
}

function meets(value: number, limit: number, bound: 'atLeast' | 'atMost'): boolean {
  return bound === 'atLeast' ? value >= limit : value <= limit;
}
