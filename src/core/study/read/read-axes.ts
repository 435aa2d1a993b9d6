/** Reads `vary`: ranges and lists of a number to the points of an axis. */
import { fromSi, toSi, type Unit } from '../../units/units.ts';
import { findParameter, type ParameterRow } from '../catalogue/parameters.ts';
import { type PlacedAxis, placedRange } from '../rules/check-axes.ts';
import { asWritten } from '../rules/check-rules.ts';
import { orders, ruledOutBy } from '../rules/rules.ts';
import type { Axis, Search } from '../study.ts';
import { clip, type IssueList } from '../text/issue.ts';
import type { Located, LocatedEntry, LocatedMap } from '../text/located-text.ts';
import { CUT_OFF_HINT, type Figure, isCutOff, readFigure } from './read-places.ts';

/** More points than a person would list on one axis. */
const MOST_POINTS = 10_000;
const KEYS = ['from', 'to', 'steps', 'step', 'oneOf'];

/** What the axes are checked against. */
export interface AxesContext {
  readonly issues: IssueList;
  /** Null where the study's own could not be read. */
  readonly search: Search | null;
  /** The reference design: a varied number must have a figure in it. */
  readonly values: Readonly<Record<string, number>>;
  /** Every name that the study states, trials included. */
  readonly stands: ReadonlyMap<string, number>;
  /** Names whose own mistakes are told already, and trials that could not be read. */
  readonly tried: ReadonlySet<string>;
  readonly broken: ReadonlySet<string>;
}

/** Reads `vary`. */
export function readAxes(part: Located, context: AxesContext): PlacedAxis[] {
  const { issues } = context;
  if (part.kind !== 'map') {
    const found = part.kind === 'list' ? 'a list' : clip(part.text) || 'nothing';
    issues.error(part.at, 'vary', {
      expected: 'numbers by dotted name',
      found,
      hint: 'Write "vary: { gearing.ratio: { from: 7, to: 12, steps: 11 } }", or remove vary.',
    });
    return [];
  }
  return part.entries.flatMap((entry) => {
    const axis = readAxis(entry, context);
    return axis === null ? [] : placedRange(axis, entry);
  });
}

function readAxis(entry: LocatedEntry, context: AxesContext): Axis | null {
  const { key, at, value } = entry;
  const path = `vary.${key}`;
  if (isPair(entry)) return readPairs(entry, context);
  const row = findParameter(key);
  if (row === undefined || !hasReference(key, context)) {
    if (!toldAlready(key, context)) context.issues.error(at, path, noReference(key, row, value, context));
    return null;
  }
  if (value.kind !== 'map') {
    const found = value.kind === 'list' ? 'a list' : clip(value.text) || 'nothing';
    const hint = value.kind === 'list' ? `Write "${key}: { oneOf: […] }".` : `Write "${key}: { from: …, to: …, steps: … }".`;
    context.issues.error(value.at, path, { expected: 'a range with from, to and steps, or oneOf with a list', found, hint });
    return null;
  }
  return readAxisMap(key, row, value, context);
}

/** Ratios that vary together, and their efficiencies: `gearing.ratios: { oneOf: [[11.2, 6.4], [12, 7]] }`. */
function isPair({ key, value }: LocatedEntry): boolean {
  if (findParameter(`${key}.1`) === undefined) return false;
  const list = value.kind === 'map' ? value.entries.find((entry) => entry.key === 'oneOf')?.value : undefined;
  return findParameter(key) === undefined || (list?.kind === 'list' && list.items.some((item) => item.kind === 'list'));
}

function readPairs({ key, at, value }: LocatedEntry, context: AxesContext): Axis | null {
  const { issues } = context;
  const path = `vary.${key}`;
  const sets = [`${key}.1`, `${key}.2`];
  const missing = sets.find((name) => !hasReference(name, context));
  if (missing !== undefined) {
    if (!toldAlready(missing, context)) issues.error(at, path, noReference(missing, findParameter(missing), value, context));
    return null;
  }
  const [only] = value.kind === 'map' ? value.entries : [];
  if (value.kind !== 'map' || value.entries.length !== 1 || only?.key !== 'oneOf' || only.value.kind !== 'list' || only.value.items.length === 0) {
    const found =
      value.kind === 'map' ? value.entries.map((entry) => entry.key).join(', ') || 'an empty section' : value.kind === 'list' ? 'a list' : clip(value.text);
    const hint = `Write "${key}: { oneOf: [[…, …], […, …]] }"; or vary ${sets.join(' and ')} apart.`;
    issues.error(value.at, path, { expected: 'oneOf with a list of pairs', found: found || 'nothing', hint });
    return null;
  }
  if (only.value.items.length > MOST_POINTS) return tooMany(only.value.at, path, only.value.items.length, issues);
  const points = only.value.items.map((item) => readPair(item, sets, `${path}.oneOf`, issues));
  const seen = new Set<string>();
  for (const [index, point] of points.entries()) {
    const again = { expected: 'each pair once', found: `${point?.join(', ')} again`, hint: 'Remove one of the two.' };
    if (point !== null && seen.has(point.join())) issues.error((only.value.items[index] as Located).at, `${path}.oneOf`, again);
    else if (point !== null) seen.add(point.join());
  }
  return seen.size < points.length ? null : { name: key, sets, points: points as number[][], labels: null, range: null };
}

/** A pair in order; null with its issues. */
function readPair(item: Located, sets: readonly string[], path: string, issues: IssueList): number[] | null {
  if (item.kind !== 'list' || item.items.length !== 2) {
    const found = item.kind === 'list' ? `a list of ${item.items.length}` : item.kind === 'map' ? 'a section' : clip(item.text) || 'nothing';
    issues.error(item.at, path, { expected: 'a pair, such as [11.2, 6.4]', found, hint: 'Each item is a list of two.' });
    return null;
  }
  const figures = item.items.map((figure, index) => readFigure(figure, findParameter(sets[index] as string) as ParameterRow, path, issues));
  const [first, second] = figures;
  if (first === null || first === undefined || second === null || second === undefined) return null;
  const order = orders.find(({ less, more }) => less === sets[1] && more === sets[0]);
  if (order !== undefined && !(second.value < first.value)) {
    issues.error(second.at, path, { expected: `less than ${asWritten(first)}`, found: asWritten(second), hint: `Exchange the two: ${order.why}.` });
    return null;
  }
  return [first.value, second.value];
}

function hasReference(name: string, { values, stands }: AxesContext): boolean {
  return values[name] !== undefined && ruledOutBy(name, stands.keys()) === undefined;
}

/** A figure that is there but wrong, or a trial that is: the mistake itself is told. */
function toldAlready(name: string, { values, stands, tried, broken }: AxesContext): boolean {
  if (!name.startsWith('trials.') && findParameter(name) !== undefined && !stands.has(name.split('.')[0] as string)) return true;
  if (broken.has(/^trials\.([^.]*)\./u.exec(name)?.[1] ?? '')) return true;
  return values[name] === undefined && findParameter(name) !== undefined && tried.has(name) && ruledOutBy(name, stands.keys()) === undefined;
}

function noReference(name: string, row: ParameterRow | undefined, value: Located, { issues, values, stands }: AxesContext) {
  const expected = 'a number of this study by its dotted name';
  const other = ruledOutBy(name, stands.keys());
  if (row !== undefined && other !== undefined) {
    const found = `${name}, which plays no part beside ${other.by} on line ${issues.lineOf(stands.get(other.by) ?? 0)}`;
    return { expected, found, hint: `Vary ${other.by}, or state ${name} instead: ${other.alternative.why}.` };
  }
  const names = Object.keys(values);
  const near = issues.full ? null : (issues.nearest(name, names) ?? names.find((each) => each.endsWith(`.${name}`)) ?? null);
  const known = row !== undefined && !name.startsWith('trials.');
  if (known)
    return {
      expected: 'a number that has a figure in the study',
      found: `${name} without a figure`,
      hint: `State ${name} in its section first: that figure is the reference design.`,
    };
  const section =
    value.kind === 'map' && !value.entries.some(({ key }) => KEYS.includes(key))
      ? 'Write the whole name in one piece, with dots, such as gearing.ratio.'
      : null;
  return {
    expected,
    found: clip(name),
    hint: near !== null ? `Did you mean ${near}?` : (section ?? 'Names are those of the file, section by section, with dots between.'),
  };
}

function readAxisMap(name: string, row: ParameterRow, map: LocatedMap, context: AxesContext): Axis | null {
  const { issues } = context;
  const path = `vary.${name}`;
  const entry = (key: string) => map.entries.find((candidate) => candidate.key === key);
  for (const each of map.entries) {
    const { key, at } = each;
    if (KEYS.includes(key)) continue;
    const near = issues.nearest(key, KEYS);
    const named = near === null ? 'Write a range as "{ from: …, to: …, steps: … }", a list as "{ oneOf: [ …, … ] }".' : `Did you mean ${near}?`;
    issues.error(at, `${path}.${key}`, { expected: KEYS.join(', '), found: clip(key), hint: isCutOff(each) ? CUT_OFF_HINT : named });
    return null;
  }
  const list = entry('oneOf');
  if (list !== undefined && map.entries.length > 1) {
    issues.error(map.at, path, { expected: 'a range or oneOf', found: 'both', hint: 'Keep one of the two.' });
    return null;
  }
  return list !== undefined ? readList(name, row, list, issues) : readRange(name, row, map, context);
}

function readList(name: string, row: ParameterRow, { value }: LocatedEntry, issues: IssueList): Axis | null {
  const path = `vary.${name}.oneOf`;
  if (value.kind !== 'list' || value.items.length === 0) {
    const found = value.kind === 'list' ? 'an empty list' : value.kind === 'map' ? 'a section' : clip(value.text) || 'nothing';
    issues.error(value.at, path, { expected: 'a list of figures', found, hint: `Write "oneOf: [ …, … ]": ${row.sentence}` });
    return null;
  }
  if (value.items.length > MOST_POINTS) return tooMany(value.at, path, value.items.length, issues);
  const figures = value.items.map((item) => readFigure(item, row, path, issues));
  const seen = new Map<number, Figure>();
  for (const figure of figures) {
    const first = figure === null ? undefined : seen.get(figure.value);
    if (figure !== null && first !== undefined)
      issues.error(figure.at, path, { expected: 'each figure once', found: `${asWritten(figure)} again`, hint: 'Remove one of the two.' });
    else if (figure !== null) seen.set(figure.value, figure);
  }
  if (figures.includes(null) || seen.size < figures.length) return null;
  return { name, sets: [name], points: figures.map((figure) => [(figure as Figure).value]), labels: null, range: null };
}

function readRange(name: string, row: ParameterRow, map: LocatedMap, { issues, search }: AxesContext): Axis | null {
  const path = `vary.${name}`;
  const entry = (key: string) => map.entries.find((candidate) => candidate.key === key)?.value;
  const [fromEntry, toEntry, stepsEntry, stepEntry] = ['from', 'to', 'steps', 'step'].map(entry);
  if (fromEntry === undefined || toEntry === undefined) {
    const found = map.entries.map(({ key }) => key).join(', ') || 'nothing';
    issues.error(map.at, path, { expected: 'from, to and steps; or oneOf', found, hint: `Write "${name}: { from: …, to: …, steps: … }".` });
    return null;
  }
  const [from, to] = [readFigure(fromEntry, row, `${path}.from`, issues), readFigure(toEntry, row, `${path}.to`, issues)];
  const steps = stepsEntry === undefined ? null : readSteps(stepsEntry, `${path}.steps`, issues);
  const stepped = stepsEntry !== undefined || stepEntry !== undefined;
  if ((stepsEntry !== undefined && stepEntry !== undefined) || (!stepped && search?.method === 'grid')) {
    issues.error(map.at, path, {
      expected: 'steps: a number of points, or step: a distance between them',
      found: stepped ? 'both' : 'a range without either',
      hint: stepped
        ? 'Keep one of the two.'
        : 'A grid needs its points: add "steps: 11"; or draw from the whole range by "search: { method: sobol, designs: 10000 }".',
    });
    return null;
  }
  if (from === null || to === null || (stepsEntry !== undefined && steps === null)) return null;
  if (from.value >= to.value) {
    issues.error(to.at, `${path}.to`, { expected: `to above from (${asWritten(from)})`, found: asWritten(to), hint: 'Exchange the two, or correct one.' });
    return null;
  }
  const range = { from: from.value, to: to.value, stepped };
  if (!stepped) return { name, sets: [name], points: [[from.value], [to.value]], labels: null, range };
  const count = steps ?? countOf(from, to, stepEntry as Located, row, `${path}.step`, issues);
  if (count === null) return null;
  if (count > MOST_POINTS) return tooMany(map.at, path, count, issues);
  return { name, sets: [name], points: gridPoints(from, to, count), labels: null, range };
}

/**
 * Points of a range, computed in the unit of `from` and rounded to 15 significant digits before they go to SI, so that a point
 * that a person could type has the very bits of the typed figure; the last is `to` itself.
 */
function gridPoints(from: Figure, to: Figure, count: number): number[][] {
  const end = writtenIn(to, from.unit);
  return Array.from({ length: count }, (_, index) => {
    if (index === count - 1) return [to.value];
    const written = from.written + (index * (end - from.written)) / (count - 1);
    return [toSi(Number(written.toPrecision(15)), from.unit)];
  });
}

function writtenIn(figure: Figure, unit: Unit): number {
  return figure.unit === unit ? figure.written : fromSi(figure.value, unit);
}

function readSteps(value: Located, path: string, issues: IssueList): number | null {
  const text = value.kind === 'text' ? value.text.trim() : '';
  const steps = /^\d{1,12}$/u.test(text) ? Number(text) : Number.NaN;
  if (steps >= 2) return steps;
  const found = value.kind === 'text' ? clip(text) || 'nothing' : 'no number';
  const hint = text === '1' ? 'A single point is no range: remove it from vary.' : 'Write how many points the range has, both ends included.';
  issues.error(value.at, path, { expected: 'a whole number of at least 2', found, hint });
  return null;
}

/** Points of a range with a step size; the step must lead exactly to the end. */
function countOf(from: Figure, to: Figure, stepEntry: Located, row: ParameterRow, path: string, issues: IssueList): number | null {
  const unbounded: ParameterRow = { name: row.name, quantity: row.quantity, label: row.label, sentence: row.sentence, decimals: row.decimals };
  const step = readFigure(stepEntry, unbounded, path, issues);
  if (step === null) return null;
  // A step is a difference: offsets of units (°C) play no part.
  const size = (step.written * step.unit.factor) / step.unit.divisor / (from.unit.factor / from.unit.divisor);
  const extent = writtenIn(to, from.unit) - from.written;
  const intervals = Math.round(extent / size);
  if (!(size > 0)) {
    issues.error(step.at, path, { expected: 'a step above zero', found: asWritten(step), hint: 'The range runs upwards from from to to.' });
    return null;
  }
  if (intervals >= 1 && Math.abs(extent / size - intervals) <= 1e-9 * intervals) return intervals + 1;
  const whole = Math.max(1, Math.floor(extent / size));
  const ends = [whole, whole + 1].map((many) => asWritten({ written: Number((from.written + many * size).toPrecision(12)), unit: from.unit }));
  issues.error(step.at, path, {
    expected: `a step that leads from ${asWritten(from)} to ${asWritten(to)}`,
    found: asWritten(step),
    hint: `End the range at ${ends.join(' or ')}, or write steps instead.`,
  });
  return null;
}

function tooMany(at: number, path: string, count: number, issues: IssueList): null {
  issues.error(at, path, { expected: `at most ${MOST_POINTS} points on one axis`, found: String(count), hint: 'Use fewer steps.' });
  return null;
}
