/** Reads the trials of a study: each by the layout of its kind, its `with`, its trace and its road. */
import { machineUnit } from '../../units/units.ts';
import { findParameter, parameters, type TrialParameter, trialParameters } from '../catalogue/parameters.ts';
import { type TrialKind, trialKindRow, trialKinds } from '../catalogue/trial-kinds.ts';
import type { RoadProfile, SpeedTrace } from '../study.ts';
import { clip, type IssueList } from '../text/issue.ts';
import type { Located, LocatedMap } from '../text/located-text.ts';
import { requiredKeys, trialLayout, whyNotTaken } from './layout.ts';
import { type Figure, type Found, nothingFound, readFigure, readPlaces } from './read-places.ts';
import { readRoad, readTrace } from './read-trace.ts';

/** Where a study's files come from. The host decides where paths lead and how large a file may be. */
export interface StudySources {
  readonly cycleNames: readonly string[];
  /** CSV text of a built-in cycle. */
  cycle(name: string): string;
  /** Text of a file named in the study, or why there is none (a sentence without full stop). */
  file(path: string): { readonly text: string } | { readonly problem: string };
}

/** A trial as the file states it. */
export interface TrialFound {
  readonly name: string;
  readonly at: number;
  readonly kind: TrialKind;
  readonly rating: 'peak' | 'continuous';
  /** Its own numbers and texts, by `trials.<name>.<key>`. */
  readonly found: Found;
  readonly with: ReadonlyMap<string, Figure>;
  /** Every name in `with`, readable or not. */
  readonly withStands: ReadonlyMap<string, number>;
  readonly trace: SpeedTrace | null;
  readonly road: RoadProfile | null;
}

/** First parts of the names of a design's own metrics: no trial may be called so. */
const RESERVED = ['driveUnit', 'battery', 'vehicle'];
const MOST_TRIALS = 200;
const LONGEST_NAME = 60;

/** Reads `trials`; trials with mistakes in kind or name are left out, with their issues. */
export function readTrials(part: Located, sources: StudySources, issues: IssueList): TrialFound[] {
  if (part.kind !== 'map' || part.entries.length === 0) {
    const found = part.kind === 'map' ? 'none' : part.kind === 'list' ? 'a list' : clip(part.text) || 'nothing';
    issues.error(part.at, 'trials', { expected: 'at least one trial', found, hint: 'Write trials by name, such as "climb: { kind: hill start }".' });
    return [];
  }
  if (part.entries.length > MOST_TRIALS) {
    issues.error(part.at, 'trials', { expected: `at most ${MOST_TRIALS} trials`, found: String(part.entries.length), hint: 'Split the study.' });
    return [];
  }
  const reading: TrialReading = { sources, issues, readFile: filesReadOnce(sources), traces: new Map(), roads: new Map() };
  return part.entries.flatMap(({ key, at, value }) => {
    const path = `trials.${key}`;
    if (!usableName(key, at, path, issues)) return [];
    if (value.kind === 'map') return readTrial(key, at, value, reading) ?? [];
    issues.error(value.at, path, {
      expected: 'a trial with its kind',
      found: value.kind === 'list' ? 'a list' : clip(value.text) || 'nothing',
      hint: `Write "${clip(key)}: { kind: hill start }" or another kind.`,
    });
    return [];
  });
}

function usableName(name: string, at: number, path: string, issues: IssueList): boolean {
  if (name.includes('.')) {
    issues.error(at, path, {
      expected: 'a trial name without a dot',
      found: clip(name),
      hint: `Dots separate trial and metric; write ${clip(name.replaceAll('.', ' '))}.`,
    });
  } else if (RESERVED.includes(name)) {
    issues.error(at, path, {
      expected: `a trial name other than ${RESERVED.join(', ')}`,
      found: name,
      hint: 'These begin the metrics of the whole design; choose another name.',
    });
  } else if (name.length > LONGEST_NAME || /\p{Cc}/u.test(name)) {
    issues.error(at, path, { expected: `a trial name of at most ${LONGEST_NAME} printable characters`, found: clip(name, 30), hint: 'Shorten the name.' });
  } else {
    return true;
  }
  return false;
}

interface TrialReading {
  readonly sources: StudySources;
  readonly issues: IssueList;
  readonly readFile: (path: string) => ReturnType<StudySources['file']>;
  /** Traces and roads as read, so that several trials share one and its mistakes are told once. */
  readonly traces: Map<string, SpeedTrace | null>;
  readonly roads: Map<string, RoadProfile | null>;
}

function readTrial(name: string, at: number, map: LocatedMap, reading: TrialReading): TrialFound | null {
  const { issues } = reading;
  const path = `trials.${name}`;
  const kind = kindOf(map, path, issues);
  if (kind === null) return null;
  const found = nothingFound();
  readPlaces(map, trialLayout(kind), { issues, found, prefix: `${path}.`, explain: (key) => explainKey(kind, key) });
  for (const key of requiredKeys(kind)) if (!found.stands.has(`${path}.${key}`)) missing(key, at, path, kind, issues);
  checkTrailer(found, path, issues);
  const withPart = found.parts.get(`${path}.with`);
  const { figures, stands } = withPart === undefined ? { figures: new Map(), stands: new Map() } : readWith(withPart.value, `${path}.with`, issues);
  const rating = (found.texts.get(`${path}.rating`)?.text ?? trialKindRow(kind).rating ?? 'peak') as TrialFound['rating'];
  const [trace, road] = kind === 'cycle' ? [readCycle(found, at, path, reading), readRoadFile(found, path, reading)] : [null, null];
  return { name, at, kind, rating, found, with: figures, withStands: stands, trace, road };
}

function kindOf(map: LocatedMap, path: string, issues: IssueList): TrialKind | null {
  const kinds = Object.keys(trialKinds);
  const entry = map.entries.find(({ key }) => key === 'kind');
  const text = entry?.value.kind === 'text' ? entry.value.text : undefined;
  if (text !== undefined && Object.hasOwn(trialKinds, text)) return text as TrialKind;
  const near = text === undefined ? null : issues.nearest(text, kinds);
  const hint = near === null ? 'Write what the trial is, such as "kind: acceleration".' : `Did you mean ${near}?`;
  issues.error(entry?.value.at ?? map.at, `${path}.kind`, { expected: `a kind: ${kinds.join(', ')}`, found: clip(text ?? 'no kind'), hint });
  return null;
}

function explainKey(kind: TrialKind, key: string): string | null {
  const why = whyNotTaken(kind, key);
  if (why !== null) return `Remove it: ${why}.`;
  return findParameter(key) === undefined ? null : `A number of the study is replaced under with: "with: { ${key}: … }".`;
}

function missing(key: TrialParameter, at: number, path: string, kind: TrialKind, issues: IssueList): void {
  issues.error(at, `${path}.${key}`, {
    expected: `${key}, which ${/^[aeiou]/u.test(kind) ? 'an' : 'a'} ${kind} trial needs`,
    found: 'nothing',
    hint: `Add "${key}: … ${machineUnit(trialParameters[key].quantity).symbol}": ${trialParameters[key].sentence}`,
  });
}

function checkTrailer(found: Found, path: string, issues: IssueList): void {
  const drag = found.stands.get(`${path}.trailer.dragArea`);
  if (drag === undefined || found.stands.has(`${path}.trailer.mass`)) return;
  issues.error(drag, `${path}.trailer.mass`, { expected: 'the mass of the trailer', found: 'its drag area alone', hint: 'Add mass to the trailer.' });
}

function readWith(part: Located, path: string, issues: IssueList): { figures: Map<string, Figure>; stands: Map<string, number> } {
  const [figures, stands] = [new Map<string, Figure>(), new Map<string, number>()];
  if (part.kind !== 'map') {
    issues.error(part.at, path, {
      expected: 'numbers by dotted name',
      found: part.kind === 'list' ? 'a list' : clip(part.text) || 'nothing',
      hint: 'Write "with: { vehicle.auxiliaries: 2.5 kW }".',
    });
    return { figures, stands };
  }
  for (const { key, at, value } of part.entries) {
    const row = key.startsWith('trials.') ? undefined : findParameter(key);
    if (row === undefined) {
      issues.error(at, `${path}.${key}`, { expected: 'a number of the study by its dotted name', found: clip(key), hint: withHint(key, value, issues) });
      continue;
    }
    stands.set(key, at);
    const figure = readFigure(value, row, `${path}.${key}`, issues);
    if (figure !== null) figures.set(key, figure);
  }
  return { figures, stands };
}

function withHint(key: string, value: Located, issues: IssueList): string {
  if (key.startsWith('trials.')) return 'Write the numbers of a trial in the trial itself.';
  if (key === 'vehicle.tyre') return 'State wheelRadius under vehicle instead of tyre; a trial may then replace vehicle.wheelRadius.';
  const names = parameters.map(({ name }) => name);
  if (value.kind === 'map') {
    const inside = value.entries[0]?.key ?? '';
    return `Write the whole name in one piece, such as ${issues.nearest(`${key}.${inside}`, names) ?? 'vehicle.auxiliaries'}.`;
  }
  const near = issues.nearest(key, names) ?? names.find((name) => name.endsWith(`.${key}`));
  return near === undefined ? 'Names are those of the file, section by section, with dots between.' : `Did you mean ${near}?`;
}

function readCycle(found: Found, at: number, path: string, { sources, issues, readFile, traces }: TrialReading): SpeedTrace | null {
  const cycle = found.texts.get(`${path}.cycle`);
  if (cycle === undefined) {
    if (!found.stands.has(`${path}.cycle`)) {
      issues.error(at, `${path}.cycle`, {
        expected: 'the cycle to drive',
        found: 'nothing',
        hint: `Add "cycle: …": a CSV file, or one of ${sources.cycleNames.join(', ')}.`,
      });
    }
    return null;
  }
  const known = traces.get(cycle.text);
  if (known !== undefined) return known;
  const builtIn = sources.cycleNames.includes(cycle.text);
  const file = builtIn ? { text: sources.cycle(cycle.text) } : readFile(cycle.text);
  if ('problem' in file) {
    const near = issues.nearest(cycle.text, sources.cycleNames);
    const looksLikeFile = /[./\\]/u.test(cycle.text);
    const hint =
      near !== null ? `Did you mean ${near}?` : looksLikeFile ? 'Paths start at the folder of the study file.' : 'layshaft cycles lists the built-in cycles.';
    issues.error(cycle.at, `${path}.cycle`, {
      expected: `a CSV file, or one of ${sources.cycleNames.join(', ')}`,
      found: `${clip(cycle.text)}: ${file.problem}`,
      hint,
    });
    return null;
  }
  const read = readTrace(file.text, cycle.text);
  if (!read.ok) issues.take(read.problems);
  traces.set(cycle.text, read.ok ? read.trace : null);
  return read.ok ? read.trace : null;
}

function readRoadFile(found: Found, path: string, { issues, readFile, roads }: TrialReading): RoadProfile | null {
  const road = found.texts.get(`${path}.road`);
  if (road === undefined) return null;
  const known = roads.get(road.text);
  if (known !== undefined) return known;
  const file = readFile(road.text);
  if ('problem' in file) {
    issues.error(road.at, `${path}.road`, {
      expected: 'a CSV file of the grade',
      found: `${clip(road.text)}: ${file.problem}`,
      hint: 'Paths start at the folder of the study file.',
    });
    return null;
  }
  const read = readRoad(file.text, road.text);
  if (!read.ok) issues.take(read.problems);
  roads.set(road.text, read.ok ? read.road : null);
  return read.ok ? read.road : null;
}

function filesReadOnce(sources: StudySources): TrialReading['readFile'] {
  const known = new Map<string, ReturnType<StudySources['file']>>();
  return (path) => {
    const file = known.get(path) ?? sources.file(path);
    known.set(path, file);
    return file;
  };
}
