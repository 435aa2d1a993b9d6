/** The designs at the ends of what varies: they show how far a figure goes that rises or falls with each of its numbers. */
import type { Axis, Study } from '../study.ts';

/** The numbers of one design, SI, by dotted name; one that an option leaves without a part to play is not there. */
export type DesignValues = Readonly<Record<string, number>>;

/** Enough for a long list of options crossed with the ends of a few ranges; axes that would lead beyond keep to the reference. */
const MOST_CORNERS = 8_192;

/** The numbers with a point of an axis in them. */
export function valuesAt(values: DesignValues, { sets }: Pick<Axis, 'sets'>, point: readonly number[]): DesignValues {
  const design = { ...values };
  for (const [k, name] of sets.entries()) {
    const value = point[k] as number;
    if (Number.isNaN(value)) delete design[name];
    else design[name] = value;
  }
  return design;
}

/** Every combination of the lowest and the highest value of each number under `vary`, of all its pairs, and of all options, where `matters` says yes to a name they set. */
export function cornersOf(study: Pick<Study, 'axes' | 'values'>, matters: (name: string) => boolean): DesignValues[] {
  return study.axes
    .filter(({ sets }) => sets.some(matters))
    .reduce<DesignValues[]>(
      (corners, axis) => {
        const ends = endsOf(axis);
        if (corners.length * ends.length > MOST_CORNERS) return corners;
        return corners.flatMap((values) => ends.map((point) => valuesAt(values, axis, point)));
      },
      [study.values],
    );
}

/** The points of an axis that hold its extremes: lowest and highest of a number under `vary`, all of pairs and options. */
export function endsOf({ points, labels, sets }: Axis): readonly (readonly number[])[] {
  if (labels !== null || sets.length > 1) return points;
  const rising = [...points].sort((a, b) => (a[0] as number) - (b[0] as number));
  return [rising[0] as readonly number[], rising.at(-1) as readonly number[]];
}

/** Least and largest of some figures, NaN left out; null where there is none. */
export function extentOf(figures: readonly number[]): { readonly low: number; readonly high: number } | null {
  const there = figures.filter((figure) => !Number.isNaN(figure));
  if (there.length === 0) return null;
  return { low: there.reduce((a, b) => Math.min(a, b)), high: there.reduce((a, b) => Math.max(a, b)) };
}

/** Where an axis stands in the file: `vary.gearing.ratio`, `options.motor on offer`. */
export function axisPath({ name, labels }: Axis): string {
  return `${labels === null ? 'vary' : 'options'}.${name}`;
}

/**
 * How near to an end of a range, SI, a design counts as lying there: at the end itself where that is a point; within 1 % of the
 * range where any value is drawn, since hardly a design lies on the very end.
 */
export function endReach({ from, to, stepped }: NonNullable<Axis['range']>): number {
  return stepped ? 0 : 0.01 * (to - from);
}
