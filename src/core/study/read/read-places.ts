/** Reads the entries of a section by its layout: figures to SI with their bounds checked, texts with their choices, free parts as they stand. */
import { type ReadFigure, readQuantity } from '../../units/read-quantity.ts';
import type { Unit } from '../../units/units.ts';
import { type ParameterRow, parameters } from '../catalogue/parameters.ts';
import { clip, type IssueList } from '../text/issue.ts';
import type { Located, LocatedList, LocatedMap } from '../text/located-text.ts';
import { boundsMissed } from './bounds.ts';
import type { Place, TextRow } from './layout.ts';

/** A figure of the file. */
export interface Figure {
  readonly at: number;
  /** SI. */
  readonly value: number;
  readonly written: number;
  readonly unit: Unit;
}

/** What a file (or a trial) states, by dotted name. */
export interface Found {
  readonly figures: Map<string, Figure>;
  readonly texts: Map<string, { readonly at: number; readonly text: string }>;
  readonly parts: Map<string, { readonly at: number; readonly value: Located }>;
  /** Offset of every name and section that stands in the file, readable or not. */
  readonly stands: Map<string, number>;
  /** Names that stand, or most likely stand misspelt: whatever is wrong with them is told, so that they are not missing as well. */
  readonly tried: Set<string>;
}

/** Nothing found yet. */
export function nothingFound(): Found {
  return { figures: new Map(), texts: new Map(), parts: new Map(), stands: new Map(), tried: new Set() };
}

/** What a reader needs to know of where it is. */
export interface Reading {
  readonly issues: IssueList;
  readonly found: Found;
  /** In front of every dotted name: `trials.ramp.`; empty at the root. */
  readonly prefix: string;
  /** Says more about an unknown key than the nearest name could. */
  readonly explain?: (key: string) => string | null;
}

/** Reads a section; everything goes into `reading.found`, every mistake into `reading.issues`. */
export function readPlaces(map: LocatedMap, place: Place, reading: Reading): void {
  map.entries.forEach(({ key, at, value }, index) => {
    const child = place.children.get(key);
    const next = map.entries[index + 1];
    if (child === undefined) unknownKey(key, at, value, place, reading);
    else if (next !== undefined && isCutOff(next)) reading.found.tried.add(reading.prefix + child.path);
    else readPlace(at, value, child, reading);
  });
}

/** Reads one value at its place of the layout. */
export function readPlace(at: number, value: Located, place: Place, reading: Reading): void {
  const { issues, found, prefix } = reading;
  const path = prefix + place.path;
  found.tried.add(path);
  // A figure that may also be a section (motor.inertia) stands only as a figure: below it stand other ways of saying it.
  if (value.kind === 'text' || place.parameter === null) found.stands.set(path, at);
  if (place.free !== null) {
    found.parts.set(path, { at, value });
  } else if (value.kind === 'text') {
    readScalar(value, place, reading);
  } else if (value.kind === 'list') {
    readPair(value, place, reading);
  } else if (hasSection(place)) {
    readPlaces(value, place, reading);
    if (value.entries.length === 0) issues.error(value.at, path, { expected: keysOf(place), found: 'an empty section', hint: 'Fill it in or remove it.' });
  } else {
    issues.error(value.at, path, {
      expected: place.text === null ? 'one figure' : 'a text',
      found: 'a section',
      hint: `Write "${lastKey(path)}: value" on one line.`,
    });
  }
}

function readScalar(value: Located & { kind: 'text' }, place: Place, reading: Reading): void {
  const { issues, found, prefix } = reading;
  const path = prefix + place.path;
  const file = place.children.get('file');
  if (place.parameter !== null) {
    const figure = readFigure(value, place.parameter, path, issues);
    if (figure !== null) found.figures.set(path, figure);
  } else if (place.text !== null) {
    readText(value, place.text, path, reading);
  } else if (file?.text) {
    found.stands.set(`${path}.file`, value.at);
    readText(value, file.text, `${path}.file`, reading);
  } else if (hasPair(place)) {
    issues.error(value.at, path, {
      expected: 'a list of two, such as [11.2, 6.4]',
      found: clip(value.text) || 'nothing',
      hint: 'For a single ratio write "ratio: 9.5".',
    });
  } else {
    const found = value.text === '' ? 'nothing' : clip(value.text);
    issues.error(value.at, path, {
      expected: keysOf(place),
      found,
      hint: value.text === '' ? 'Fill the section in, indented below its name, or remove it.' : 'Write its entries indented below its name.',
    });
  }
}

/** Reads one figure and checks its bounds; null with an issue where it is none. */
export function readFigure(value: Located, row: ParameterRow, path: string, issues: IssueList): Figure | null {
  if (value.kind !== 'text') {
    issues.error(value.at, path, { expected: 'one figure', found: value.kind === 'list' ? 'a list' : 'a section', hint: `Write one figure: ${row.sentence}` });
    return null;
  }
  const read = readQuantity(value.text, row.quantity);
  if (!read.ok) {
    issues.error(value.at, path, read);
    return null;
  }
  return withinBounds(read, value, row, path, issues) ? { at: value.at, value: read.value, written: read.written, unit: read.unit } : null;
}

function withinBounds(read: ReadFigure, value: Located & { kind: 'text' }, row: ParameterRow, path: string, issues: IssueList): boolean {
  const expected = boundsMissed(row, read.value, read.unit);
  if (expected !== null)
    issues.error(value.at, path, { expected: `${row.label}, ${expected}`, found: clip(value.text), hint: `Check the figure and its unit. ${row.sentence}` });
  return expected === null;
}

function readText(value: Located & { kind: 'text' }, row: TextRow, path: string, { issues, found }: Reading): void {
  const { choices, longest = 300 } = row;
  if (value.text.trim() === '') {
    issues.error(value.at, path, { expected: choices?.join(', ') ?? 'a text', found: 'nothing', hint: row.sentence });
  } else if (value.text.length > longest) {
    issues.error(value.at, path, { expected: `at most ${longest} characters`, found: `${value.text.length} characters`, hint: 'Shorten the text.' });
  } else if (choices !== undefined && !choices.includes(value.text)) {
    const near = issues.nearest(value.text, choices);
    issues.error(value.at, path, {
      expected: choices.join(', '),
      found: clip(value.text),
      hint: near === null ? `Write one of these words. ${row.sentence}` : `Did you mean ${near}?`,
    });
  } else {
    found.texts.set(path, { at: value.at, text: value.text.trim() });
  }
}

/** Lists of two: ratios and their efficiencies. */
function readPair(list: LocatedList, place: Place, reading: Reading): void {
  const path = reading.prefix + place.path;
  if (!hasPair(place)) {
    const expected = place.parameter !== null ? 'one figure' : place.text !== null ? 'a text' : keysOf(place);
    const vary = `To try several values write them under vary: "${path}: { oneOf: […] }".`;
    reading.issues.error(list.at, path, { expected, found: 'a list', hint: place.parameter === null ? 'Write it without brackets.' : vary });
    return;
  }
  if (list.items.length !== 2) {
    reading.issues.error(list.at, path, {
      expected: 'a list of two',
      found: `a list of ${list.items.length}`,
      hint: 'A study has one ratio, or two with a shift.',
    });
    return;
  }
  list.items.forEach((item, index) => {
    const child = place.children.get(String(index + 1)) as Place;
    readPlace(item.at, item, child, reading);
  });
}

function unknownKey(key: string, at: number, value: Located, place: Place, reading: Reading): void {
  const names = [...place.children.keys()].filter((name) => !/^[12]$/u.test(name));
  const near = reading.issues.nearest(key, names);
  if (near !== null) reading.found.tried.add(`${reading.prefix}${place.path === '' ? '' : `${place.path}.`}${near}`);
  const inside = reading.prefix + place.path;
  const path = inside === '' || inside.endsWith('.') ? inside + key : `${inside}.${key}`;
  const hint =
    slipOf(key, value) ?? reading.explain?.(key) ?? (near !== null ? `Did you mean ${near}?` : (otherNames[key.toLowerCase()] ?? elsewhere(key, path)));
  const where = inside === '' ? 'a section or entry of a study' : `an entry of ${inside.replace(/\.$/u, '')}`;
  reading.issues.error(at, path, { expected: `${where}: ${names.join(', ')}`, found: clip(key), hint });
}

/** A key that is none because a sign is missing or too many; null for a name. */
function slipOf(key: string, value: Located): string | null {
  if (isCutOff({ key, value })) return CUT_OFF_HINT;
  const name = /^(\S+)\s*\{/u.exec(key)?.[1];
  return name === undefined ? null : `A colon is missing: write "${clip(name)}: { … }".`;
}

const DRAG = 'Write dragArea under vehicle: drag coefficient times frontal area.';
const LADEN = 'Write laden: the mass of vehicle and load together.';
/** What people in the trade call things that have another name here, in small letters. */
const otherNames: Readonly<Record<string, string>> = {
  cd: DRAG,
  cw: DRAG,
  cx: DRAG,
  cda: DRAG,
  dragcoefficient: DRAG,
  frontalarea: DRAG,
  crr: 'Write rolling: { c0: … } under vehicle.',
  rollingresistance: 'Write rolling: { c0: … } under vehicle.',
  gvw: LADEN,
  gvm: LADEN,
  grossmass: LADEN,
  grossweight: LADEN,
};

/** What to do about a number that a comma cut in two. */
export const CUT_OFF_HINT = 'Inside { } a comma starts the next entry: numbers go without commas.';

/** The rest of a number after a comma inside braces: `{ fixed: 1,200 kg }`. What stands before it is not judged. */
export function isCutOff({ key, value }: { readonly key: string; readonly value: Located }): boolean {
  return value.kind === 'text' && value.text === '' && /^\d/u.test(key);
}

/** Where a known name stands when it is not here. */
function elsewhere(key: string, path: string): string {
  const known = parameters.find(({ name }) => name === key) ?? parameters.find(({ name }) => name.endsWith(`.${key}`) || name.includes(`.${key}.`));
  if (known === undefined) return 'Remove it, or check the indentation.';
  if (key.includes('.'))
    return `Dotted names belong under vary, requirements and with; here write ${key.split('.').pop()} indented below ${key.split('.').slice(0, -1).join(', ')}.`;
  const section = known.name
    .split('.')
    .slice(0, known.name.split('.').indexOf(key.split('.').pop() as string))
    .join('.');
  return section === '' || path.startsWith(`${section}.`) ? 'Remove it, or check the indentation.' : `${key.split('.').pop()} stands under ${section}.`;
}

function hasPair(place: Place): boolean {
  return place.children.has('1') && place.children.has('2');
}

function hasSection(place: Place): boolean {
  return [...place.children.keys()].some((key) => !/^[12]$/u.test(key));
}

function keysOf(place: Place): string {
  return `a section with ${[...place.children.keys()].filter((key) => !/^[12]$/u.test(key)).join(', ')}`;
}

function lastKey(path: string): string {
  return path.split('.').pop() as string;
}
