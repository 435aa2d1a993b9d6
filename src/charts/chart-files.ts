/** The charts of a run as files: one drawing for every pair of objectives. */
import { select } from 'd3';
import { cautionLine } from '../core/study/catalogue/cautions.ts';
import { formatFigure } from '../core/units/format-quantity.ts';
import { drawTradeOff } from './draw-trade-off.ts';
import { capitalised, columnPhrase, valueText } from './figure-words.ts';
import { fileInk } from './ink.ts';
import { proposalRules } from './proposal-words.ts';
import type { ReportData } from './report-data.ts';
import { proposalLetter, tradeOffView } from './trade-off-view.ts';
import { shortText } from './visible-text.ts';

/** A chart as a file: its name and its text. */
export interface ChartFile {
  readonly name: string;
  readonly svg: string;
}

/**
 * A stand-alone SVG of two columns, given by their index in `data.columns`: white ground, title, key, letters and caution.
 * `document` is any DOM document with a window (jsdom in Node, the page's own there). The same data give the same bytes.
 */
export function renderTradeOffSvg(data: ReportData, xColumn: number, yColumn: number, document: Document): string {
  const window = document.defaultView;
  if (window === null) throw new Error('a chart needs a document that belongs to a window');
  const element = document.createElementNS('http://www.w3.org/2000/svg', 'svg');
  const height = 660 + 20 * data.proposals.length;
  const view = tradeOffView(data, xColumn, yColumn, { width: 960, height, ink: fileInk, removed: true, wide: false }, fileWords(data, xColumn, yColumn));
  const svg = select(element).attr('width', view.width).attr('height', view.height).attr('role', 'img');
  drawTradeOff(svg, view);
  return `${new window.XMLSerializer().serializeToString(element)}\n`;
}

/** A chart of every pair of objectives; with a single objective, of that one over each varied input. Names are fit for any file system. */
export function chartFiles(data: ReportData, document: Document): ChartFile[] {
  const taken = new Set<string>();
  return columnPairs(data).map(([x, y]) => {
    const stem = `${fileWord(data.columns[y]!.name)}-over-${fileWord(data.columns[x]!.name)}`;
    let name = `${stem}.svg`;
    for (let copy = 2; taken.has(name.toLowerCase()); copy++) name = `${stem}-${copy}.svg`;
    taken.add(name.toLowerCase());
    return { name, svg: renderTradeOffSvg(data, x, y, document) };
  });
}

/** Indices of the columns to draw, x then y. */
export function columnPairs({ study, columns }: ReportData): [number, number][] {
  const objectives = study.objectives.map(({ metric }) => columns.findIndex((column) => column.role === 'metric' && column.name === metric));
  if (objectives.length === 1) return columns.flatMap((column, index): [number, number][] => (column.role === 'metric' ? [] : [[index, objectives[0]!]]));
  return objectives.flatMap((x, first) => objectives.slice(first + 1).map((y): [number, number] => [x, y]));
}

/** Letters, digits, dots and dashes only, not starting with a dot, at most 60 of them. */
function fileWord(name: string): string {
  return (
    name
      .replace(/[^A-Za-z0-9.]+/gu, '-')
      .replace(/^[.-]+/u, '')
      .slice(0, 60) || 'column'
  );
}

function fileWords(data: ReportData, xColumn: number, yColumn: number) {
  const { study, counts, columns, designs } = data;
  const inputs = columns.flatMap((column, index) => (column.role === 'metric' ? [] : [{ column, index }]));
  const letters = data.proposals.map((proposal, index) => {
    const design = designs.find(({ number }) => number === proposal.number);
    const figures = inputs.map(({ column, index: at }) => `${columnPhrase(column, study)} ${valueText(design?.values[at] ?? null, column, study)}`);
    return `${proposalLetter(index)}: ${proposalRules(proposal, data).join(', ')} – ${figures.join(', ')} (design ${formatFigure(proposal.number, 0)})`;
  });
  const passing =
    counts.feasible === 0
      ? `none of ${formatFigure(counts.designs, 0)} designs meets every requirement`
      : `${formatFigure(counts.feasible, 0)} of ${formatFigure(counts.designs, 0)} designs meet every requirement, ${formatFigure(counts.front, 0)} are on the front${counts.shownFront < counts.front ? `, ${formatFigure(counts.shownFront, 0)} of them shown` : ''}`;
  return {
    title: `${capitalised(columnPhrase(columns[yColumn]!, study))} over ${columnPhrase(columns[xColumn]!, study)}`,
    subtitle: `${shortText(study.title, 60)}: ${passing}`,
    letters,
    foot: cautionLine,
  };
}
