/** What a trade-off chart shows: two columns of a report's designs, in the units people read. */
import type { ResultColumn } from '../core/evaluate/result-columns.ts';
import type { Study } from '../core/study/study.ts';
import { capitalised, columnPhrase, readingValue, unitWord } from './figure-words.ts';
import type { ChartInk } from './ink.ts';
import type { DesignStanding, ReportData, ReportDesign } from './report-data.ts';
import { shortText } from './visible-text.ts';

/** One axis. */
export interface ChartAxis {
  /** What is measured, and its unit; without unit where it has none. */
  readonly title: string;
  readonly better: 'less' | 'more' | null;
  /** Names of the places on an axis of options, which stand at 0, 1, 2, …; null for an axis of numbers. */
  readonly names: readonly string[] | null;
}

/** One design on the chart, in the units of the axes. */
export interface ChartPoint {
  readonly number: number;
  readonly x: number;
  readonly y: number;
}

/** A design put forward. */
export interface LetteredPoint extends ChartPoint {
  readonly letter: string;
}

/** Text around the drawing when it stands alone in a file. */
export interface ChartWords {
  readonly title: string;
  readonly subtitle: string;
  /** What each letter stands for. */
  readonly letters: readonly string[];
  readonly foot: string;
}

/** Everything that one drawing needs. Points whose figures do not exist are not in it. */
export interface TradeOffView {
  readonly width: number;
  readonly height: number;
  readonly ink: ChartInk;
  /** Only some of the designs off the front are here. */
  readonly sampled: boolean;
  /** Frames all designs that pass; otherwise the front, the reference and those put forward. */
  readonly wide: boolean;
  readonly x: ChartAxis;
  readonly y: ChartAxis;
  readonly removed: readonly ChartPoint[];
  readonly feasible: readonly ChartPoint[];
  readonly front: readonly ChartPoint[];
  readonly reference: ChartPoint | null;
  readonly lettered: readonly LetteredPoint[];
  /** When nothing is feasible: the design that comes closest. */
  readonly closest: ChartPoint | null;
  /** Null in the page, which says these things itself. */
  readonly words: ChartWords | null;
}

/** Where and how a view is to be drawn. */
export interface ChartLook {
  readonly width: number;
  readonly height: number;
  readonly ink: ChartInk;
  /** Draw removed designs too. */
  readonly removed: boolean;
  /** Frame all designs that pass, not only the front, the reference and those put forward. */
  readonly wide: boolean;
}

/** The letter of a proposal by its place in the list. */
export function proposalLetter(index: number): string {
  return String.fromCharCode('A'.charCodeAt(0) + index);
}

/** The view of two columns, given by their index. */
export function tradeOffView(data: ReportData, xColumn: number, yColumn: number, look: ChartLook, words: ChartWords | null = null): TradeOffView {
  const { study, columns } = data;
  const x = columns[xColumn] as ResultColumn;
  const y = columns[yColumn] as ResultColumn;
  const point = (design: ReportDesign): ChartPoint[] => {
    const across = design.values[xColumn];
    const up = design.values[yColumn];
    if (across === null || across === undefined || up === null || up === undefined) return [];
    return [{ number: design.number, x: readingValue(across, x, study), y: readingValue(up, y, study) }];
  };
  const points = (standing: DesignStanding) => data.designs.filter((design) => design.standing === standing).flatMap(point);
  const only = (number: number) => data.designs.filter((design) => design.number === number).flatMap(point)[0] ?? null;
  return {
    width: look.width,
    height: look.height,
    ink: look.ink,
    sampled: data.designs.length <= data.counts.designs,
    wide: look.wide,
    x: chartAxis(x, study),
    y: chartAxis(y, study),
    removed: look.removed || data.counts.feasible === 0 ? points('removed') : [],
    feasible: points('feasible'),
    front: points('front'),
    reference: points('reference')[0] ?? null,
    lettered: data.proposals.flatMap(({ number }, index) => {
      const found = only(number);
      return found === null ? [] : [{ ...found, letter: proposalLetter(index) }];
    }),
    closest: data.closest === null ? null : only(data.closest.number),
    words,
  };
}

function chartAxis(column: ResultColumn, study: Study): ChartAxis {
  const unit = column.labels === null ? unitWord(column.quantity, study) : '';
  const title = capitalised(columnPhrase(column, study));
  const aim = study.objectives.find(({ metric }) => column.role === 'metric' && metric === column.name)?.aim;
  const better = aim === undefined ? column.better : aim === 'minimise' ? 'less' : 'more';
  return { title: unit === '' ? title : `${title}, ${unit}`, better, names: column.labels?.map((name) => shortText(name, 24)) ?? null };
}
