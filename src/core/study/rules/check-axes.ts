/** Rules between the axes of a search: every number is set in one place, and what one axis sets has a part to play beside the others. */
import { sobolDimensions } from '../../numerics/sobol.ts';
import type { OptionList } from '../read/read-options.ts';
import { mostDesigns } from '../read/read-search.ts';
import type { Axis, Search } from '../study.ts';
import type { IssueList } from '../text/issue.ts';
import type { LocatedEntry } from '../text/located-text.ts';
import { exclusion, nameInFile } from './rules.ts';

/** An axis, and where it stands. */
export interface PlacedAxis {
  readonly axis: Axis;
  /** `vary.gearing.ratio`, `options.motor on offer`. */
  readonly path: string;
  readonly at: number;
  /** Offset of every name that it states, and of those that follow from one; what it only leaves without a part is not among them. */
  readonly states: ReadonlyMap<string, number>;
}

/** An axis of `vary`, with its entry. */
export function placedRange(axis: Axis, { at }: LocatedEntry): PlacedAxis {
  return { axis, path: `vary.${axis.name}`, at, states: new Map(axis.sets.map((name) => [name, at])) };
}

/** An axis of options, with its list. */
export function placedOptions(axis: Axis, { name, at, options }: OptionList): PlacedAxis {
  const states = new Map<string, number>();
  for (const [stated, place] of options.flatMap(({ found }) => [...found.stands]))
    for (const own of [stated, ...(givenBy[stated] ?? [])]) if (!states.has(own)) states.set(own, place);
  return { axis, path: `options.${name}`, at, states };
}

/** What follows from a curve or a tyre size. */
const givenBy: Readonly<Record<string, readonly string[]>> = {
  'motor.fullLoad': ['motor.peakTorque', 'motor.baseSpeed'],
  'vehicle.tyre': ['vehicle.wheelRadius'],
};

/**
 * Tells of every number that two axes set, or that one sets and another leaves without a part; and of more than the search (null:
 * unknown) can take. Axes come in the order of the file.
 */
export function checkAxes(axes: readonly PlacedAxis[], search: Search | null, issues: IssueList): void {
  for (const [index, later] of axes.entries()) for (const earlier of axes.slice(0, index)) checkPair(earlier, later, issues);
  if (search?.method === 'grid') checkGridSize(axes, issues);
  if (search?.method === 'sobol') checkDimensions(axes, issues);
}

function checkGridSize(axes: readonly PlacedAxis[], issues: IssueList): void {
  const designs = axes.reduce((product, { axis }) => product * axis.points.length, 1);
  const last = axes.at(-1);
  if (last === undefined || designs <= mostDesigns) return;
  const found = `${axes.map(({ axis }) => axis.points.length).join(' × ')} designs`;
  issues.error(last.at, last.path.split('.')[0] as string, {
    expected: 'at most 4 000 000 000 designs',
    found,
    hint: 'Use fewer steps, vary fewer numbers, or draw designs by "search: { method: sobol, designs: 1000000 }".',
  });
}

function checkDimensions(axes: readonly PlacedAxis[], issues: IssueList): void {
  const beyond = axes[sobolDimensions];
  if (beyond === undefined) return;
  issues.error(beyond.at, beyond.path, {
    expected: `at most ${sobolDimensions} axes under method sobol`,
    found: `${axes.length} under vary and options`,
    hint: 'Vary fewer numbers, or use "method: random".',
  });
}

/** One message for each pair of axes, at the later of the two. */
function checkPair(earlier: PlacedAxis, later: PlacedAxis, issues: IssueList): void {
  const [first, second] = [[...earlier.states.keys()], [...later.states.keys()]];
  const twice = second.find((name) => earlier.states.has(name) && later.axis.sets.includes(name));
  if (twice !== undefined) {
    issues.error(later.states.get(twice) ?? later.at, later.path, {
      expected: `${twice} in one place`,
      found: `${twice} here and in ${placeText(twice, earlier, issues)}`,
      hint: 'Options are crossed with everything else that varies: keep it in one of the two.',
    });
    return;
  }
  // Two numbers under vary have figures in the one reference design: they go together.
  if (earlier.axis.labels === null && later.axis.labels === null) return;
  const clash = second.flatMap((name) => first.map((other) => [name, other] as const)).find(([name, other]) => exclusion(name, other) !== undefined);
  if (clash !== undefined) tellClash(...clash, earlier, later, issues);
}

function tellClash(name: string, other: string, earlier: PlacedAxis, later: PlacedAxis, issues: IssueList): void {
  issues.error(later.states.get(name) ?? later.at, later.path, {
    expected: `${nameInFile(name)} or ${nameInFile(other)}, not both`,
    found: `${nameInFile(name)} here and ${nameInFile(other)} in ${placeText(other, earlier, issues)}`,
    hint: `Put both into one list of options: ${exclusion(name, other)?.why}.`,
  });
}

function placeText(name: string, { path, at, states }: PlacedAxis, issues: IssueList): string {
  return `${path} on line ${issues.lineOf(states.get(name) ?? at)}`;
}
