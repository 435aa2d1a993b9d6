/** Figures for the terminal: cells of tables, counts, durations, shares and sizes. The words of a study's figures are those of the charts. */
import { figureAlone, type Measured, neededDecimals, unitWord } from '../charts/figure-words.ts';
import type { Study } from '../core/study/study.ts';
import { formatFigure, readingDecimals } from '../core/units/format-quantity.ts';

/** Figure and unit as two cells, so that a table can align them; money carries the study's currency, NaN is a dash. */
export function figureCells(si: number, measured: Measured, study: Study): [string, string] {
  const decimals = readingDecimals(measured.decimals, measured.quantity, study.report.units);
  return [figureAlone(si, measured, decimals, study), Number.isNaN(si) ? '' : unitWord(measured.quantity, study)];
}

/** The same for an input, exactly as far as a person would type it again: up to three decimals more than usual, and none that it does not need. */
export function inputCells(si: number, { quantity, decimals }: Measured, study: Study): [string, string] {
  const exact = { quantity, decimals: decimals + 3 };
  return [figureAlone(si, exact, neededDecimals(si, exact, study), study), Number.isNaN(si) ? '' : unitWord(quantity, study)];
}

/** A whole number of things: `62 400`. */
export function count(value: number): string {
  return formatFigure(value, 0);
}

/** `1 design`, `2 designs`, `62 400 designs`. */
export function countOf(value: number, noun: string): string {
  return `${count(value)} ${value === 1 ? noun : `${noun}s`}`;
}

/** A duration as people say it: `0.8 s`, `42 s`, `3 min 05 s`, `2 h 10 min`. */
export function durationText(seconds: number): string {
  if (seconds < 9.95) return `${seconds.toFixed(1)} s`;
  const whole = Math.round(seconds);
  if (whole < 60) return `${whole} s`;
  if (whole < 3600) return `${Math.floor(whole / 60)} min ${String(whole % 60).padStart(2, '0')} s`;
  const minutes = Math.round(seconds / 60);
  return `${Math.floor(minutes / 60)} h ${String(minutes % 60).padStart(2, '0')} min`;
}

/** A share in per cent that shows 0 only for none and 100 only for all: `0.02 %`, `31 %`, `99.9 %`. */
export function shareText(share: number): string {
  const percent = share * 100;
  if (percent === 0 || percent === 100) return `${percent} %`;
  if (percent < 0.01) return 'below 0.01 %';
  if (percent > 99.9) return 'above 99.9 %';
  return percent < 1 ? `${percent.toPrecision(1)} %` : `${percent.toFixed(percent > 99 || percent < 10 ? 1 : 0)} %`;
}

/** A size on disk: `840 kB`, `3.2 MB`. */
export function sizeText(bytes: number): string {
  if (bytes < 999_500) return `${Math.max(1, Math.round(bytes / 1000))} kB`;
  const [size, symbol] = bytes < 999_500_000 ? [bytes / 1e6, 'MB'] : [bytes / 1e9, 'GB'];
  return `${size.toFixed(size < 9.95 ? 1 : 0)} ${symbol}`;
}
