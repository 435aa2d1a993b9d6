/** The marks of a chart, each a shape of its own, and the few SVG elements they are made of. */
import type { Selection } from 'd3';
import type { ChartInk } from './ink.ts';
import type { Box, LabelWish } from './label-places.ts';

/** An SVG element that takes children. */
export type SvgParent = Selection<SVGSVGElement, unknown, null, undefined> | Selection<SVGGElement, unknown, null, undefined>;

interface Place {
  readonly x: number;
  readonly y: number;
}

/** A coordinate rounded to 0.01 px. */
export function fixed(value: number): number {
  return Math.round(value * 100) / 100;
}

/** A line of text with its look as attributes. */
export function text(parent: SvgParent, x: number, y: number, words: string, look: Readonly<Record<string, string | number>>): void {
  const element = parent.append('text').attr('x', fixed(x)).attr('y', fixed(y));
  for (const [name, value] of Object.entries(look)) element.attr(name, typeof value === 'number' ? fixed(value) : value);
  element.text(words);
}

/** A thin straight line. */
export function crispLine(parent: SvgParent, x1: number, y1: number, x2: number, y2: number, stroke: string): void {
  parent.append('line').attr('x1', fixed(x1)).attr('y1', fixed(y1)).attr('x2', fixed(x2)).attr('y2', fixed(y2)).attr('stroke', stroke);
}

/** A disc: a design on the front. */
export function circle(parent: SvgParent, { x, y }: Place, radius: number) {
  return parent.append('circle').attr('cx', fixed(x)).attr('cy', fixed(y)).attr('r', radius);
}

/** Round dots as one path: designs that meet every requirement. */
export function dots(parent: SvgParent, places: readonly Place[], stroke: string): void {
  if (places.length === 0) return;
  const d = places.map(({ x, y }) => `M${fixed(x)} ${fixed(y)}h0`).join('');
  parent.append('path').attr('d', d).attr('stroke', stroke).attr('stroke-width', 2.6).attr('stroke-linecap', 'round').attr('fill', 'none');
}

/** Short slanting strokes as one path: designs that a requirement removes. */
export function strokes(parent: SvgParent, places: readonly Place[], stroke: string): void {
  if (places.length === 0) return;
  const d = places.map(({ x, y }) => `M${fixed(x - 1.8)} ${fixed(y + 1.8)}l3.6-3.6`).join('');
  parent.append('path').attr('d', d).attr('stroke', stroke).attr('stroke-width', 1.1).attr('fill', 'none');
}

/** An open square: the reference design. */
export function square(parent: SvgParent, { x, y }: Place, ink: ChartInk): void {
  const look = parent
    .append('rect')
    .attr('x', fixed(x - 5))
    .attr('y', fixed(y - 5))
    .attr('width', 10)
    .attr('height', 10);
  look.attr('fill', ink.paper).attr('fill-opacity', 0.7).attr('stroke', ink.reference).attr('stroke-width', 2.2);
}

/** An open triangle: the design that comes closest when none is feasible. */
export function triangle(parent: SvgParent, { x, y }: Place, ink: ChartInk): void {
  const look = parent.append('path').attr('d', `M${fixed(x)} ${fixed(y - 7)}l6.5 11.5h-13z`);
  look.attr('fill', ink.paper).attr('stroke', ink.proposal).attr('stroke-width', 2.2).attr('stroke-linejoin', 'round');
}

/** The tie from a mark to its label, where the label does not touch the mark's own room. */
export function dottedLine(parent: SvgParent, { markX, markY }: LabelWish, box: Box, stroke: string): void {
  const x = Math.min(Math.max(markX, box.x), box.x + box.width);
  const y = Math.min(Math.max(markY, box.y), box.y + box.height);
  const distance = Math.sqrt((x - markX) ** 2 + (y - markY) ** 2);
  if (distance < 14) return;
  const start = 7 / distance;
  crispLine(parent, markX + (x - markX) * start, markY + (y - markY) * start, x, y, stroke);
}
