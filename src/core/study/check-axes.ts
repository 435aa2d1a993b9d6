/** Rules between the axes of a search: every number is set in one place, and what one axis sets has a part to play beside the others. */
import type { IssueList } from './issue.ts';
import type { LocatedEntry } from './located-text.ts';
import type { OptionList } from './read-options.ts';
import { exclusion, nameInFile } from './rules.ts';
import type { Axis } from './study.ts';

/** A design's number must fit an unsigned 32-bit integer. */
const MOST_DESIGNS = 4e9;

/** An axis, and where it stands. */
export interface PlacedAxis {
  readonly axis: Axis;
  /** `vary.gearing.ratio`, `options.motor on offer`. */
  readonly path: string;
  readonly at: number;
  /** Where the axis states a name; undefined where it only leaves that number without a part. */
  placeOf(name: string): number | undefined;
}

/** An axis of `vary`, with its entry. */
export function placedRange(axis: Axis, { at }: LocatedEntry): PlacedAxis {
  return { axis, path: `vary.${axis.name}`, at, placeOf: () => at };
}

/** An axis of options, with its list. */
export function placedOptions(axis: Axis, { name, at, options }: OptionList): PlacedAxis {
  const stands = (wanted: string) => options.map(({ found }) => found.stands.get(wanted)).find((place) => place !== undefined);
  const given = (wanted: string) =>
    /^motor\.(?:peakTorque|baseSpeed)$/u.test(wanted) ? stands('motor.fullLoad') : wanted === 'vehicle.wheelRadius' ? stands('vehicle.tyre') : undefined;
  return { axis, path: `options.${name}`, at, placeOf: (wanted) => stands(wanted) ?? given(wanted) };
}

/** Tells of every number that two axes set, or that one sets and another leaves without a part; and of too many designs. */
export function checkAxes(axes: readonly PlacedAxis[], issues: IssueList): void {
  for (const [index, later] of axes.entries()) for (const earlier of axes.slice(0, index)) checkPair(earlier, later, issues);
  const designs = axes.reduce((product, { axis }) => product * axis.points.length, 1);
  const last = axes.at(-1);
  if (last === undefined || designs <= MOST_DESIGNS) return;
  const found = `${axes.map(({ axis }) => axis.points.length).join(' × ')} designs`;
  issues.error(last.at, last.path.split('.')[0] as string, {
    expected: 'at most 4 000 000 000 designs',
    found,
    hint: 'Use fewer steps, or vary fewer numbers.',
  });
}

/** One message for each pair of axes, at the later of the two. */
function checkPair(a: PlacedAxis, b: PlacedAxis, issues: IssueList): void {
  const [earlier, later] = a.at <= b.at ? [a, b] : [b, a];
  const [first, second] = [statedBy(earlier), statedBy(later)];
  const twice = second.find((name) => first.includes(name));
  if (twice !== undefined) {
    issues.error(later.placeOf(twice) ?? later.at, later.path, {
      expected: `${twice} in one place`,
      found: `${twice} here and in ${placeText(twice, earlier, issues)}`,
      hint: 'Options are crossed with everything else that varies: keep it in one of the two.',
    });
    return;
  }
  // Two numbers under vary have figures in the one reference design: they go together.
  if (earlier.axis.labels === null && later.axis.labels === null) return;
  const clash = second.flatMap((name) => first.map((other) => [name, other] as const)).find(([name, other]) => exclusion(name, other) !== undefined);
  if (clash === undefined) checkParts(earlier, later, issues);
  else tellClash(...clash, earlier, later, issues);
}

function tellClash(name: string, other: string, earlier: PlacedAxis, later: PlacedAxis, issues: IssueList): void {
  issues.error(later.placeOf(name) ?? later.at, later.path, {
    expected: `${nameInFile(name)} or ${nameInFile(other)}, not both`,
    found: `${nameInFile(name)} here and ${nameInFile(other)} in ${placeText(other, earlier, issues)}`,
    hint: `Put both into one list of options: ${exclusion(name, other)?.why}.`,
  });
}

/** What one axis sets must not be without a part beside some options of the other. */
function checkParts(earlier: PlacedAxis, later: PlacedAxis, issues: IssueList): void {
  const name = later.axis.sets.find((each) => earlier.axis.sets.includes(each));
  if (name === undefined) return;
  const [setting, other] = later.placeOf(name) === undefined ? [earlier, later] : [later, earlier];
  issues.error(later.placeOf(name) ?? later.at, later.path, {
    expected: `${name} with a part to play in every design`,
    found: `${placeText(name, setting, issues)}, and ${placeText(name, other, issues)} with options that leave it none`,
    hint: 'Set it in those options themselves, or remove one of the two.',
  });
}

function statedBy({ axis, placeOf }: PlacedAxis): string[] {
  return axis.sets.filter((name) => placeOf(name) !== undefined);
}

function placeText(name: string, { path, at, placeOf }: PlacedAxis, issues: IssueList): string {
  return `${path} on line ${issues.lineOf(placeOf(name) ?? at)}`;
}
