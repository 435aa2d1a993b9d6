/** The chart in the page: drawn at the width there is, pointed at with pointer or keys, a design chosen by click or Enter. */
import { select } from 'd3';
import { type ChartPlaces, drawTradeOff } from '../charts/draw-trade-off.ts';
import { capitalised, columnPhrase, valueText } from '../charts/figure-words.ts';
import { pageInk } from '../charts/ink.ts';
import { fixed } from '../charts/marks.ts';
import { proposalRules } from '../charts/proposal-words.ts';
import type { DesignStanding, ReportData } from '../charts/report-data.ts';
import { type ChartPoint, proposalLetter, type TradeOffView, tradeOffView } from '../charts/trade-off-view.ts';
import { formatFigure } from '../core/units/format-quantity.ts';
import { html, type Markup } from './markup.ts';
import type { PageState } from './page-state.ts';
import { designOf } from './wording.ts';

/** How near a pointer must come to a mark, px. */
const reach = 24;

/** Draws into `host` and writes what is pointed at into `reading`. */
export function bindChart(host: HTMLElement, reading: HTMLElement, data: ReportData, state: PageState): void {
  const svg = select(host).append('svg').attr('aria-hidden', 'true').attr('focusable', 'false');
  let view: TradeOffView;
  let places: ChartPlaces;
  let pointed: number | null = null;

  function draw(): void {
    const width = Math.max(280, Math.round(host.clientWidth));
    const height = Math.round(Math.min(640, Math.max(400, width * 0.72)));
    const { x, y, wide } = state.choices;
    view = tradeOffView(data, x, y, { width, height, ink: pageInk, removed: wide, wide });
    places = drawTradeOff(svg.attr('width', width).attr('height', height) as Parameters<typeof drawTradeOff>[0], view);
    host.setAttribute('aria-label', `${view.y.title} over ${view.x.title}. Arrow keys walk along the front, Enter shows a design in full.`);
    host.setAttribute('aria-valuemax', String(Math.max(0, walk().length - 1)));
    rings();
  }

  /** Designs in the order in which arrow keys pass them: those of the front from left to right, or all there are without a front. */
  function walk(): ChartPoint[] {
    const single = [view.reference, view.closest].filter((point) => point !== null);
    const along = view.front.length > 0 ? view.front : single;
    return [...along].sort((a, b) => a.x - b.x || a.y - b.y || a.number - b.number);
  }

  function points(): ChartPoint[] {
    return [...view.front, ...[view.reference, view.closest].filter((point) => point !== null), ...view.feasible, ...view.removed];
  }

  function rings(): void {
    svg.selectAll('.ring').remove();
    const marked = [
      { number: state.choices.pinned, look: 'ring pinned', radius: 11 },
      { number: pointed, look: 'ring pointed', radius: 9 },
    ];
    for (const { number, look, radius } of marked) {
      const point = number === null ? undefined : points().find((candidate) => candidate.number === number);
      if (point === undefined) continue;
      svg
        .append('circle')
        .attr('class', look)
        .attr('cx', fixed(places.x(point.x)))
        .attr('cy', fixed(places.y(point.y)))
        .attr('r', radius);
    }
  }

  function point(number: number | null): void {
    if (number === pointed) return;
    pointed = number;
    host.classList.toggle('at-design', number !== null);
    reading.innerHTML = readingWords(number, data).text;
    rings();
  }

  function nearest(event: PointerEvent | MouseEvent): number | null {
    const box = (svg.node() as SVGSVGElement).getBoundingClientRect();
    let found: number | null = null;
    let least = reach * reach;
    for (const candidate of points()) {
      const away = (places.x(candidate.x) + box.left - event.clientX) ** 2 + (places.y(candidate.y) + box.top - event.clientY) ** 2;
      if (away >= least) continue;
      least = away;
      found = candidate.number;
    }
    return found;
  }

  function step(by: number): void {
    const along = walk();
    if (along.length === 0) return;
    const at = along.findIndex(({ number }) => number === pointed);
    const next = at < 0 ? (by > 0 ? 0 : along.length - 1) : Math.min(along.length - 1, Math.max(0, at + by));
    point(along[next]!.number);
    host.setAttribute('aria-valuenow', String(next));
    host.setAttribute('aria-valuetext', reading.textContent ?? '');
  }

  host.tabIndex = 0;
  host.setAttribute('role', 'slider');
  host.setAttribute('aria-valuemin', '0');
  host.setAttribute('aria-valuenow', '0');
  host.setAttribute('aria-valuetext', 'no design chosen');
  host.addEventListener('pointermove', (event) => point(nearest(event)));
  host.addEventListener('pointerleave', () => point(null));
  host.addEventListener('click', (event) => {
    const number = nearest(event);
    if (number === null) return;
    point(number);
    state.change({ pinned: number });
  });
  host.addEventListener('focus', () => {
    if (pointed === null && host.matches(':focus-visible')) step(1);
  });
  host.addEventListener('keydown', (event) => {
    const by = steps[event.key];
    if (by !== undefined) step(by);
    else if ((event.key === 'Enter' || event.key === ' ') && pointed !== null) state.change({ pinned: pointed });
    else return;
    event.preventDefault();
  });
  state.onChange(draw);
  new ResizeObserver(() => {
    if (Math.abs(host.clientWidth - view.width) > 1) draw();
  }).observe(host);
  reading.innerHTML = readingWords(null, data).text;
  draw();
}

const steps: Readonly<Record<string, number>> = {
  ArrowRight: 1,
  ArrowUp: 1,
  ArrowLeft: -1,
  ArrowDown: -1,
  Home: Number.NEGATIVE_INFINITY,
  End: Number.POSITIVE_INFINITY,
};

const standings: Readonly<Record<DesignStanding, string>> = {
  reference: 'the reference',
  front: 'on the front',
  feasible: 'meets every requirement',
  removed: 'removed by a requirement',
};

/** What a design is called beside its number: letter and standing. */
export function standingWords(number: number, data: ReportData): string {
  const index = data.proposals.findIndex((proposal) => proposal.number === number);
  const standing = designOf(data, number)?.standing;
  const words = [...(index < 0 ? [] : [proposalLetter(index)]), ...(standing === undefined ? [] : [standings[standing]])];
  return words.join(', ');
}

function readingWords(number: number | null, data: ReportData): Markup {
  const design = number === null ? undefined : designOf(data, number);
  if (design === undefined) {
    const letters = data.proposals.map(
      (proposal, index) => html`<p><b class="letter">${proposalLetter(index)}</b> ${proposalRules(proposal, data).join(', ')}</p>`,
    );
    const several = data.study.objectives.length > 2 && data.counts.feasible > 0;
    return html`${letters}${several && html`<p class="hint">The front weighs ${data.study.objectives.length} objectives: a design on it that looks beaten in two of them is better in another.</p>`}<p class="hint">Point at a design to read it, click it to see all its figures. With the keyboard: arrow keys and Enter.</p>`;
  }
  const rows = data.columns.map((column, index) => {
    return html`<div><dt>${capitalised(columnPhrase(column, data.study))}</dt><dd>${valueText(design.values[index] ?? null, column, data.study)}</dd></div>`;
  });
  return html`<p><b>Design ${formatFigure(design.number, 0)}</b>, ${standingWords(design.number, data)}</p><dl>${rows}</dl>`;
}
