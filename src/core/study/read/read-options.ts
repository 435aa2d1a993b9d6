/** Reads `options`: lists of named alternatives, each with the numbers and files it sets; written in the study, or a table in a CSV file. */

import { parameters } from '../catalogue/parameters.ts';
import { clip, type IssueList } from '../text/issue.ts';
import type { Located, LocatedEntry, LocatedMap } from '../text/located-text.ts';
import { type Place, studyLayout, trialLayout } from './layout.ts';
import { checkOptionNames, readOptionTable } from './read-option-table.ts';
import { type Found, nothingFound, readPlace } from './read-places.ts';
import type { StudySources, TrialFound } from './read-trials.ts';

/** One option: what it states, by the dotted names of the study. */
export interface OptionFound {
  readonly name: string;
  readonly at: number;
  readonly found: Found;
}

/** A list of options; names distinct, at least one of them. */
export interface OptionList {
  readonly name: string;
  readonly at: number;
  readonly options: readonly OptionFound[];
}

/** What options are read against. */
export interface OptionsContext {
  readonly issues: IssueList;
  readonly trials: readonly TrialFound[];
  /** Trials that could not be read: their numbers are not judged. */
  readonly broken: ReadonlySet<string>;
  readonly sources: StudySources;
}

const LONGEST_LIST_NAME = 60;
const MOST_LISTS = 20;
const MOST_OPTIONS = 500;
const MOST_IN_ALL = 1000;
/** Columns of stored results that a list would collide with. */
const RESERVED = ['number', 'mark', 'feasible'];
/** Curve and map: named by a file, or a section with the file and what it states. */
const filePlaces: readonly string[] = ['motor.fullLoad', 'motor.map'];
const EXAMPLE = 'Write "options: { motor on offer: [ { name: slow-wound, set: { motor.peakTorque: 310 N·m } }, … ] }".';

/** Reads `options`; lists with mistakes in them are left out, with their issues. */
export function readOptions(part: Located, context: OptionsContext): OptionList[] {
  const { issues } = context;
  if (part.kind !== 'map' || part.entries.length === 0 || part.entries.length > MOST_LISTS) {
    const found = part.kind === 'map' ? `${part.entries.length} lists` : wordOf(part);
    issues.error(part.at, 'options', { expected: `lists of options by name, at most ${MOST_LISTS}`, found, hint: `${EXAMPLE} Or remove options.` });
    return [];
  }
  const seen = new Map<string, number>();
  const lists = part.entries.flatMap((entry) => {
    const before = issues.errorCount;
    checkListName(entry, seen, issues);
    const options = readList(entry, context);
    if (fileOf(entry.value) === null) checkOptionNames(options, `options.${entry.key}`, issues);
    return issues.errorCount > before ? [] : [{ name: entry.key, at: entry.at, options }];
  });
  const count = lists.reduce((sum, { options }) => sum + options.length, 0);
  if (count <= MOST_IN_ALL) return lists;
  issues.error(part.at, 'options', {
    expected: `at most ${MOST_IN_ALL} options in all lists`,
    found: String(count),
    hint: 'Leave out what is no real alternative.',
  });
  return [];
}

/** A list's name is a column of the results and stands before `=` on the command line; results know no case. */
function checkListName({ key, at }: LocatedEntry, seen: Map<string, number>, issues: IssueList): void {
  const folded = key.toLowerCase();
  const first = seen.get(folded);
  const path = `options.${key}`;
  const hint = 'Choose another name for the list, such as "motor on offer".';
  if (first !== undefined) {
    issues.error(at, path, { expected: 'list names that differ in more than capitals', found: `${clip(key)}, as on line ${issues.lineOf(first)}`, hint });
  } else if (RESERVED.includes(folded)) {
    issues.error(at, path, { expected: `a list name other than ${RESERVED.join(', ')}`, found: key, hint: `These are columns of the results. ${hint}` });
  } else if (key.length > LONGEST_LIST_NAME || /[.=\p{Cc}]/u.test(key) || key !== key.trim()) {
    const expected = `a list name of at most ${LONGEST_LIST_NAME} printable characters, without dot and equals sign`;
    issues.error(at, path, { expected, found: clip(key, 80), hint });
  }
  seen.set(folded, at);
}

function readList({ key, at, value }: LocatedEntry, context: OptionsContext): OptionFound[] {
  const path = `options.${key}`;
  const file = fileOf(value);
  if (file !== null) return readFile(file, path, at, context);
  if (value.kind !== 'list' || value.items.length === 0) {
    const found = value.kind === 'list' ? 'an empty list' : wordOf(value);
    const hint = 'Write each option on a line of its own: "- { name: …, set: { motor.peakTorque: … } }"; or the name of a CSV file.';
    context.issues.error(value.at, path, { expected: 'a list of options, or a CSV file', found, hint });
    return [];
  }
  if (tooMany(value.items.length, value.at, path, context.issues)) return [];
  return value.items.flatMap((item, index) => {
    if (item.kind === 'map') return readOption(item, `${path}[${index + 1}]`, path, context) ?? [];
    context.issues.error(item.at, `${path}[${index + 1}]`, { expected: 'name and set', found: wordOf(item), hint: 'Write "{ name: …, set: { … } }".' });
    return [];
  });
}

/** The file of a list: its name alone, or under `file`. */
function fileOf(value: Located): { readonly name: string; readonly at: number } | null {
  if (value.kind === 'text' && value.text.trim() !== '') return { name: value.text.trim(), at: value.at };
  const only = value.kind === 'map' && value.entries.length === 1 ? value.entries[0] : undefined;
  return only?.key === 'file' && only.value.kind === 'text' && only.value.text.trim() !== '' ? { name: only.value.text.trim(), at: only.value.at } : null;
}

function readFile(file: { readonly name: string; readonly at: number }, path: string, at: number, context: OptionsContext): OptionFound[] {
  const { issues, sources, trials } = context;
  const source = sources.file(file.name);
  if ('problem' in source) {
    const hint = 'Paths start at the folder of the study file. Options may also be written as a list, each with name and set.';
    issues.error(file.at, path, { expected: 'a list of options, or a CSV file', found: `${clip(file.name)}: ${source.problem}`, hint });
    return [];
  }
  const read = readOptionTable(source.text, file.name, { at, trials });
  if (!read.ok) issues.take(read.problems);
  return !read.ok || tooMany(read.options.length, file.at, path, issues) ? [] : [...read.options];
}

function tooMany(count: number, at: number, path: string, issues: IssueList): boolean {
  if (count <= MOST_OPTIONS) return false;
  issues.error(at, path, { expected: `at most ${MOST_OPTIONS} options in one list`, found: String(count), hint: 'Leave out what is no real alternative.' });
  return true;
}

function readOption(map: LocatedMap, place: string, listPath: string, context: OptionsContext): OptionFound | null {
  const { issues } = context;
  const keys = ['name', 'set'];
  for (const { key, at } of map.entries) {
    if (keys.includes(key)) continue;
    const near = issues.nearest(key, keys);
    const hint = near !== null ? `Did you mean ${near}?` : 'Numbers stand under set: "set: { motor.peakTorque: … }".';
    issues.error(at, `${place}.${key}`, { expected: 'name and set', found: clip(key), hint });
  }
  const name = map.entries.find(({ key }) => key === 'name');
  if (name?.value.kind !== 'text') {
    const found = name === undefined ? 'an option without a name' : wordOf(name.value);
    issues.error(name?.value.at ?? map.at, `${place}.name`, { expected: 'the name of the option', found, hint: 'Add "name: …": results call it so.' });
    return null;
  }
  const set = map.entries.find(({ key }) => key === 'set')?.value;
  const text = name.value.text.trim();
  return { name: text, at: name.value.at, found: set === undefined ? nothingFound() : readSet(set, `${listPath}.${text}.`, context) };
}

/** What an option sets: every name in one piece, its value as the study would have it. */
function readSet(set: Located, prefix: string, context: OptionsContext): Found {
  const { issues } = context;
  const found = nothingFound();
  if (set.kind !== 'map') {
    const hint = 'Write "set: { motor.peakTorque: 310 N·m, motor.baseSpeed: 3600 rpm }".';
    issues.error(set.at, `${prefix}set`, { expected: 'numbers by dotted name', found: wordOf(set), hint });
    return found;
  }
  for (const entry of set.entries) {
    const target = settable(entry.key, context.trials);
    if (target === null || (entry.value.kind === 'map' && !filePlaces.includes(entry.key))) refuse(entry, prefix, target !== null, context);
    else readPlace(entry.at, entry.value, target.place, { issues, found, prefix: prefix + target.above });
  }
  return withoutPrefix(found, prefix);
}

/** The place of a name that an option may set, and what stands above it; null where there is none. */
function settable(name: string, trials: readonly TrialFound[]): { readonly place: Place; readonly above: string } | null {
  const above = /^trials\.[^.]*\./u.exec(name)?.[0] ?? '';
  const trial = trials.find((each) => above === `trials.${each.name}.`);
  const layout = above === '' ? studyLayout : trial === undefined ? undefined : trialLayout(trial.kind);
  const place = name
    .slice(above.length)
    .split('.')
    .reduce<Place | undefined>((at, key) => at?.children.get(key), layout);
  if (place === undefined || filePlaces.some((file) => name.startsWith(`${file}.`))) return null;
  const can = place.parameter !== null || place.children.has('1') || filePlaces.includes(name) || name === 'vehicle.tyre';
  return can ? { place, above } : null;
}

function refuse({ key, at, value }: LocatedEntry, prefix: string, known: boolean, { issues, trials, broken }: OptionsContext): void {
  if (broken.has(/^trials\.([^.]*)\./u.exec(key)?.[1] ?? '')) return;
  const expected = known ? 'one figure' : 'a number of the study by its dotted name, or a file for motor.map or motor.fullLoad';
  issues.error(at, prefix + key, { expected, found: known ? 'a section' : clip(key), hint: refusalHint(key, value, issues, trials) });
}

function refusalHint(key: string, value: Located, issues: IssueList, trials: readonly TrialFound[]): string {
  if (key === 'vehicle.axles.driven') return 'All designs of a study drive the same axle; write a second study for another one.';
  const file = filePlaces.find((name) => key.startsWith(`${name}.`));
  if (file !== undefined) return `Write "${file}: { file: …, ${key.slice(file.length + 1)}: … }".`;
  const names = [
    ...parameters.map(({ name }) => name),
    ...filePlaces,
    'vehicle.tyre',
    'gearing.ratios',
    ...trials.flatMap(({ name }) => trialNames(name, trials)),
  ];
  const inside = value.kind === 'map' ? `${key}.${value.entries[0]?.key ?? ''}` : null;
  if (inside !== null) return `Write the whole name in one piece, such as ${issues.nearest(inside, names) ?? 'motor.peakTorque'}.`;
  const near = issues.nearest(key, names) ?? names.find((name) => name.endsWith(`.${key}`));
  return near === undefined ? 'Names are those of the file, section by section, with dots between.' : `Did you mean ${near}?`;
}

function trialNames(name: string, trials: readonly TrialFound[]): string[] {
  const trial = trials.find((each) => each.name === name);
  return trial === undefined ? [] : [...trialLayout(trial.kind).children.keys()].map((key) => `trials.${name}.${key}`);
}

function withoutPrefix({ figures, texts, parts, stands, tried }: Found, prefix: string): Found {
  const cut = <Value>(map: ReadonlyMap<string, Value>) => new Map([...map].map(([name, value]) => [name.slice(prefix.length), value] as const));
  return {
    figures: cut(figures),
    texts: cut(texts),
    parts: cut(parts),
    stands: cut(stands),
    tried: new Set([...tried].map((name) => name.slice(prefix.length))),
  };
}

function wordOf(value: Located): string {
  return value.kind === 'map' ? 'a section' : value.kind === 'list' ? 'a list' : clip(value.text) || 'nothing';
}
