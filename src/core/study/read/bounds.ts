/** Whether a figure makes physical sense: the bounds of the catalogue, told in the unit it was written in. */
import { formatFigure } from '../../units/format-quantity.ts';
import { fromSi, type Unit } from '../../units/units.ts';
import type { ParameterRow } from '../catalogue/parameters.ts';

/** What is expected of a figure out of bounds, such as `0 kg to 100 000 kg`; null where the value (SI) is within them. */
export function boundsMissed(row: ParameterRow, value: number, unit: Unit): string | null {
  const low = (row.atLeast === undefined || value >= row.atLeast) && (row.above === undefined || value > row.above);
  const high = (row.atMost === undefined || value <= row.atMost) && (row.below === undefined || value < row.below);
  return low && high ? null : boundsText(row, unit);
}

/** The bounds of a parameter in words; empty where it has none. */
export function boundsText(row: ParameterRow, unit: Unit): string {
  const parts = [
    ['at least', row.atLeast],
    ['above', row.above],
    ['at most', row.atMost],
    ['below', row.below],
  ] as const;
  return parts.flatMap(([word, bound]) => (bound === undefined ? [] : [`${word} ${inUnit(bound, unit)}`])).join(' and ');
}

function inUnit(si: number, unit: Unit): string {
  const written = Number(fromSi(si, unit).toPrecision(6));
  const decimals = (String(written).split('.')[1] ?? '').length;
  const small = written !== 0 && Math.abs(written) < 1e-4;
  const digits = small ? String(written) : formatFigure(written, Math.min(decimals, 20));
  return unit.symbol === '' ? digits : `${digits} ${unit.symbol}`;
}
