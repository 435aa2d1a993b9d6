/** The words around a chart: what the marks mean, and in a file its title, letters and caution. */
import { textLines, textWidth } from './axis-ticks.ts';
import { circle, dots, type SvgParent, square, strokes, text, triangle } from './marks.ts';
import type { TradeOffView } from './trade-off-view.ts';

interface KeyItem {
  readonly words: string;
  readonly draw: (parent: SvgParent, x: number, y: number) => void;
}

function keyItems({ ink, ...view }: TradeOffView): KeyItem[] {
  const sample = view.sampled ? ' (sample)' : '';
  const item = (shown: boolean, words: string, draw: KeyItem['draw']): KeyItem[] => (shown ? [{ words, draw }] : []);
  return [
    ...item(view.lettered.length > 0, 'put forward', (parent, x, y) => circle(parent, { x, y }, 6).attr('fill', ink.proposal)),
    ...item(view.front.length > 0, 'on the front', (parent, x, y) => circle(parent, { x, y }, 4.2).attr('fill', ink.front)),
    ...item(view.feasible.length > 0, `meets every requirement${sample}`, (parent, x, y) => dots(parent, [{ x, y }], ink.feasible)),
    ...item(view.removed.length > 0, `removed${sample}`, (parent, x, y) => strokes(parent, [{ x, y }], ink.removed)),
    ...item(view.reference !== null, 'reference', (parent, x, y) => square(parent, { x, y }, ink)),
    ...item(view.closest !== null, 'closest to passing', (parent, x, y) => triangle(parent, { x, y }, ink)),
  ];
}

interface PlacedItem extends KeyItem {
  readonly x: number;
  readonly row: number;
}

function placedItems(view: TradeOffView, width: number, type: number): PlacedItem[] {
  let x = 0;
  let row = 0;
  return keyItems(view).map((item) => {
    const needed = type * 1.4 + textWidth(item.words, type);
    if (x > 0 && x + needed > width) {
      x = 0;
      row++;
    }
    const placed = { ...item, x, row };
    x += needed + type * 1.2;
    return placed;
  });
}

/** Rows that the key takes in a width. */
export function keyRows(view: TradeOffView, width: number, type: number): number {
  return (placedItems(view, width, type).at(-1)?.row ?? -1) + 1;
}

/** Draws the key: each kind of mark with its meaning. */
export function drawKey(svg: SvgParent, view: TradeOffView, top: number, type: number): void {
  const edge = view.words === null ? 1 : 24;
  for (const { words, draw, x, row } of placedItems(view, view.width - 2 * edge, type)) {
    const middle = top + (row + 0.5) * type * 1.4;
    draw(svg, edge + x + 6, middle);
    text(svg, edge + x + type * 1.4, middle + type * 0.35, words, { 'font-size': type, fill: view.ink.quiet });
  }
}

/** Ground, title, letters and caution of a drawing that stands alone; wording for screen readers goes first. */
export function drawCaption(svg: SvgParent, view: TradeOffView, type: number): void {
  const { words, ink, width, height } = view;
  if (words === null) return;
  const across = width - 48;
  svg.append('title').text(words.title);
  svg.append('desc').text([words.subtitle, ...words.letters, words.foot].join(' '));
  svg.append('rect').attr('width', width).attr('height', height).attr('fill', ink.paper);
  text(svg, 24, 24 + type * 1.2, textLines(words.title, type * 1.35, across, 1)[0] ?? '', { 'font-size': type * 1.35, 'font-weight': 600, fill: ink.text });
  text(svg, 24, 24 + type * 2.8, textLines(words.subtitle, type, across, 1)[0] ?? '', { 'font-size': type, fill: ink.quiet });
  const footType = type * 0.8;
  const foot = textLines(words.foot, footType, across, 2);
  for (const [row, line] of words.letters.entries()) {
    const y = height - 24 - (words.letters.length + 2 - row - 0.6) * type * 1.4;
    text(svg, 24, y, textLines(line, type, across, 1)[0] ?? '', { 'font-size': type, fill: ink.text });
  }
  for (const [row, line] of foot.entries())
    text(svg, 24, height - 22 - (foot.length - 1 - row) * footType * 1.35, line, { 'font-size': footType, fill: ink.quiet });
}
