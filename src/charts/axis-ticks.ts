/** Ticks that read well and never collide: as many as there is room for, in steps of 1, 2 or 5. */
import { type ScaleLinear, scaleLinear, tickStep } from 'd3';
import { formatFigure } from '../core/units/format-quantity.ts';
import { noOption } from './figure-words.ts';
import type { ChartAxis } from './trade-off-view.ts';

/** Mean width of a character as a share of the type size; on the wide side of common sans-serif faces. */
const meanCharacter = 0.62;

/** Extent of an axis below which its values count as one, as a share of their size. */
const leastExtent = 1e-9;

/** Width of a line of text, estimated: the same on every machine. */
export function textWidth(text: string, size: number): number {
  return Array.from(text).length * size * meanCharacter;
}

/** Breaks text between words into at most `most` lines of a width; what does not fit is cut with an ellipsis. */
export function textLines(text: string, size: number, width: number, most: number): string[] {
  const room = Math.max(4, Math.floor(width / (size * meanCharacter)));
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    if (line !== '' && line.length + 1 + word.length > room) {
      lines.push(line);
      line = word;
    } else {
      line = line === '' ? word : `${line} ${word}`;
    }
  }
  lines.push(line);
  const kept = lines.slice(0, most);
  if (lines.length > most) kept[most - 1] = `${kept[most - 1]} …`;
  return kept.map((each) => (each.length > room ? `${each.slice(0, room - 1)}…` : each));
}

/** One tick: where, and what stands there. */
export interface Tick {
  readonly value: number;
  readonly text: string;
}

/** The scale over what is shown with a little room at both ends; values that differ by rounding alone get room as one. */
export function axisScale(values: readonly number[], axis: ChartAxis, from: number, to: number): ScaleLinear<number, number> {
  if (axis.names !== null) return scaleLinear([values.includes(noOption) ? noOption - 0.5 : -0.5, axis.names.length - 0.5], [from, to]);
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const value of values) {
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  if (low > high) return scaleLinear([0, 1], [from, to]);
  const size = Math.max(Math.abs(low), Math.abs(high));
  // Values that differ only by rounding are one value: no tick could tell them apart.
  const room = high - low > Math.max(size, 0.01) * leastExtent ? (high - low) * 0.07 : Math.max(size * 0.05, leastExtent);
  return scaleLinear([low - room, high + room], [from, to]);
}

/** Ticks of an axis along `length` pixels; `lying` when texts stand side by side, otherwise one above the other. */
export function axisTicks(scale: ScaleLinear<number, number>, axis: ChartAxis, length: number, size: number, lying: boolean): Tick[] {
  if (axis.names !== null) return nameTicks(scale, axis.names, length, size, lying);
  for (let count = Math.max(2, Math.floor(length / (lying ? 70 : 56))); count > 1; count--) {
    const ticks = numberTicks(scale, count);
    const widest = Math.max(0, ...ticks.map(({ text }) => textWidth(text, size)));
    const apart = ticks.length < 2 ? length : Math.abs(scale(ticks[1]!.value) - scale(ticks[0]!.value));
    if (apart >= (lying ? widest + size : size * 1.6)) return ticks;
  }
  return numberTicks(scale, 1).slice(0, 1);
}

function numberTicks(scale: ScaleLinear<number, number>, count: number): Tick[] {
  const [low, high] = scale.domain() as [number, number];
  const step = tickStep(low, high, count);
  const decimals = Math.min(12, Math.max(0, -Math.floor(Math.log10(step) + 1e-9)));
  return scale.ticks(count).map((value) => ({ value, text: formatFigure(value, decimals) }));
}

/** Every name where there is room for all, else every second, third, …; the reference, where it has a place, first. */
function nameTicks(scale: ScaleLinear<number, number>, names: readonly string[], length: number, size: number, lying: boolean): Tick[] {
  const places = [...(scale.domain()[0]! < noOption ? [{ value: noOption, text: 'reference' }] : []), ...names.map((text, value) => ({ value, text }))];
  const apart = length / places.length;
  const needed = (a: string, b: string) => (lying ? (textWidth(a, size) + textWidth(b, size)) / 2 + size : size * 1.6);
  for (let every = 1; every < places.length; every++) {
    const kept = places.filter((_, index) => index % every === 0);
    if (kept.slice(1).every(({ text }, index) => every * apart >= needed(kept[index]!.text, text))) return kept;
  }
  return places.slice(0, 1);
}
