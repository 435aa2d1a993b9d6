/** Draws a trade-off view as SVG with d3: the same drawing in a file and in the page. */
import type { ScaleLinear, Selection } from 'd3';
import { axisScale, axisTicks, type Tick, textLines, textWidth } from './axis-ticks.ts';
import { drawCaption, drawKey, keyRows } from './chart-words.ts';
import { type Box, type LabelWish, placeLabels } from './label-places.ts';
import { circle, crispLine, dots, dottedLine, fixed, type SvgParent, square, strokes, text, triangle } from './marks.ts';
import type { ChartAxis, ChartPoint, TradeOffView } from './trade-off-view.ts';

/** Where things came to stand, px: for pointing at designs. */
export interface ChartPlaces {
  readonly frame: Box;
  readonly x: ScaleLinear<number, number>;
  readonly y: ScaleLinear<number, number>;
}

/** The room that is left for marks, and what stands around it. */
interface Plan extends ChartPlaces {
  readonly type: number;
  readonly xTicks: readonly Tick[];
  readonly yTicks: readonly Tick[];
  readonly xTitle: readonly string[];
  readonly yTitle: readonly string[];
  /** Top of the title of the y axis. */
  readonly yTitleTop: number;
  readonly keyTop: number;
}

/** Empties the SVG element and draws the view into it. Coordinates are rounded to 0.01 px; sizes are stated, never measured. */
export function drawTradeOff(svg: Selection<SVGSVGElement, unknown, null, undefined>, view: TradeOffView): ChartPlaces {
  svg.selectAll('*').remove();
  svg.attr('viewBox', `0 0 ${view.width} ${view.height}`).attr('font-family', 'ui-sans-serif, system-ui, sans-serif');
  const plan = planChart(view);
  if (view.words !== null) drawCaption(svg, view, plan.type);
  drawKey(svg, view, plan.keyTop, plan.type);
  drawAxes(svg, view, plan);
  drawDesigns(svg, view, plan);
  drawLabels(svg, view, plan);
  return plan;
}

/** Type size of a view, px. */
function typeSize(view: TradeOffView): number {
  return view.words === null ? 13 : 14;
}

function planChart(view: TradeOffView): Plan {
  const type = typeSize(view);
  const line = type * 1.4;
  const edge = view.words === null ? 1 : 24;
  const across = view.width - 2 * edge;
  const captionRows = view.words === null ? 0 : 3.1;
  const footRows = view.words === null ? 0 : view.words.letters.length + 2.6;
  const xTitle = textLines(titleWords(view.x), type, across, 2);
  const yTitle = textLines(titleWords(view.y), type, across, 2);
  const keyTop = edge + captionRows * line;
  const yTitleTop = keyTop + keyRows(view, across, type) * line + 0.5 * line;
  const top = yTitleTop + yTitle.length * line + 0.4 * line;
  const bottom = view.height - edge - footRows * line - (xTitle.length + 1.6) * line;

  const shown = framedPoints(view);
  const y = axisScale(
    shown.map((point) => point.y),
    view.y,
    bottom,
    top,
  );
  const yTicks = axisTicks(y, view.y, bottom - top, type, false);
  const beside = Math.ceil(Math.max(0, ...yTicks.map((tick) => textWidth(tick.text, type))) + 8);
  // The outermost texts under the frame reach half their width beyond it, so they are known before the frame is.
  const xValues = shown.map((point) => point.x);
  const trial = axisScale(xValues, view.x, beside, across);
  const half = Math.min(across / 6, Math.max(4, ...axisTicks(trial, view.x, across - beside, type, true).map((tick) => textWidth(tick.text, type) / 2)));
  const left = edge + Math.max(beside, half);
  const right = view.width - edge - half;
  const x = axisScale(xValues, view.x, left, right);
  const xTicks = axisTicks(x, view.x, right - left, type, true);
  return { frame: { x: left, y: top, width: right - left, height: bottom - top }, x, y, type, xTicks, yTicks, xTitle, yTitle, yTitleTop, keyTop };
}

/** The frame fits what there is to choose from; other designs are drawn as far as they lie inside. Where nothing passes it fits all there is. */
function framedPoints(view: TradeOffView): ChartPoint[] {
  const named = [...view.lettered, view.reference, view.closest].filter((point) => point !== null);
  if (view.front.length === 0) return [...view.feasible, ...view.removed, ...named];
  return [...view.front, ...(view.wide ? view.feasible : []), ...named];
}

function titleWords(axis: ChartAxis): string {
  return axis.better === null ? axis.title : `${axis.title} (${axis.better === 'less' ? 'less' : 'more'} is better)`;
}

function drawAxes(svg: SvgParent, view: TradeOffView, plan: Plan): void {
  const { frame, type, x, y } = plan;
  const { ink } = view;
  const bottom = frame.y + frame.height;
  for (const { value, text: words } of plan.xTicks) {
    const at = x(value);
    crispLine(svg, at, frame.y, at, bottom, ink.line);
    text(svg, at, bottom + type * 1.3, words, { 'font-size': type, fill: ink.quiet, 'text-anchor': 'middle' });
  }
  for (const { value, text: words } of plan.yTicks) {
    const at = y(value);
    crispLine(svg, frame.x, at, frame.x + frame.width, at, ink.line);
    text(svg, frame.x - 8, at + type * 0.35, words, { 'font-size': type, fill: ink.quiet, 'text-anchor': 'end' });
  }
  drawBetter(svg, view, plan);
  for (const [row, words] of plan.yTitle.entries()) {
    text(svg, view.words === null ? 0 : 24, plan.yTitleTop + (row + 0.9) * type * 1.4, words, { 'font-size': type, fill: ink.text });
  }
  for (const [row, words] of plan.xTitle.entries()) {
    const end = frame.x + frame.width;
    text(svg, end, bottom + type * 1.4 * (row + 2.1), words, { 'font-size': type, fill: ink.text, 'text-anchor': 'end' });
  }
}

/** The two edges of the frame, drawn as arrows towards the better end where there is one. */
function drawBetter(svg: SvgParent, view: TradeOffView, { frame, x, y }: Plan): void {
  const { ink } = view;
  const bottom = frame.y + frame.height;
  const [left, right] = x.range() as [number, number];
  crispLine(svg, frame.x, bottom, right, bottom, ink.quiet);
  crispLine(svg, frame.x, frame.y, frame.x, bottom, ink.quiet);
  const arrow = (tipX: number, tipY: number, dx: number, dy: number) =>
    svg
      .append('path')
      .attr('d', `M${fixed(tipX)} ${fixed(tipY)}l${9 * dx - 4 * dy} ${9 * dy - 4 * dx}v0l${8 * dy} ${8 * dx}z`)
      .attr('fill', ink.quiet);
  if (view.x.better === 'less') arrow(left + 2, bottom, 1, 0);
  if (view.x.better === 'more') arrow(right, bottom, -1, 0);
  if (view.y.better === 'less') arrow(frame.x, y.range()[0]! - 2, 0, -1);
  if (view.y.better === 'more') arrow(frame.x, frame.y, 0, 1);
}

function drawDesigns(svg: SvgParent, view: TradeOffView, { frame, x, y }: Plan): void {
  const { ink } = view;
  const place = (point: ChartPoint) => ({ x: x(point.x), y: y(point.y) });
  const inside = ({ x: px, y: py }: { x: number; y: number }) => px >= frame.x && px <= frame.x + frame.width && py >= frame.y && py <= frame.y + frame.height;
  strokes(svg, view.removed.map(place).filter(inside), ink.removed);
  dots(svg, view.feasible.map(place).filter(inside), ink.feasible);
  const front = svg.append('g').attr('fill', ink.front).attr('stroke', ink.paper).attr('stroke-width', 0.8);
  const lettered = new Set(view.lettered.map(({ number }) => number));
  for (const point of view.front) if (!lettered.has(point.number)) circle(front, place(point), 4.2);
  if (view.closest !== null) triangle(svg, place(view.closest), ink);
  for (const point of view.lettered) circle(svg, place(point), 6).attr('fill', ink.proposal).attr('stroke', ink.paper).attr('stroke-width', 1.5);
  if (view.reference !== null) square(svg, place(view.reference), ink);
}

/** Letters in boxes of their own and the names of single designs, tied to their marks by a line where they stand apart. */
function drawLabels(svg: SvgParent, view: TradeOffView, plan: Plan): void {
  const { ink } = view;
  const { frame, type, x, y } = plan;
  const labels = [
    ...view.lettered.map((point) => ({ point, words: point.letter, boxed: true, fill: ink.onProposal })),
    ...(view.reference === null ? [] : [{ point: view.reference, words: 'reference', boxed: false, fill: ink.reference }]),
    ...(view.closest === null ? [] : [{ point: view.closest, words: 'closest', boxed: false, fill: ink.proposal }]),
  ];
  const wishes: LabelWish[] = labels.map(({ point, words, boxed }) => ({
    markX: x(point.x),
    markY: y(point.y),
    width: boxed ? type * 1.5 : textWidth(words, type) + 4,
    height: type * 1.5,
  }));
  const crowd = view.front.map((point) => ({ x: x(point.x), y: y(point.y) }));
  for (const [index, box] of placeLabels(wishes, crowd, frame).entries()) {
    const { words, boxed, fill } = labels[index]!;
    const wish = wishes[index]!;
    dottedLine(svg, wish, box, ink.text);
    const back = svg
      .append('rect')
      .attr('x', fixed(box.x))
      .attr('y', fixed(box.y))
      .attr('width', fixed(box.width))
      .attr('height', fixed(box.height))
      .attr('rx', 3);
    back.attr('fill', boxed ? ink.proposal : ink.paper).attr('fill-opacity', boxed ? 1 : 0.85);
    const look = { 'font-size': type, 'font-weight': 600, fill, 'text-anchor': 'middle' };
    text(svg, box.x + box.width / 2, box.y + box.height / 2 + type * 0.36, words, look);
  }
}
