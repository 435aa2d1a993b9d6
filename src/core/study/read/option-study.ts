/** The study that an option makes of the study's own numbers, as a `with` does for one trial: what it states goes before what says the same thing. */
import { findParameter } from '../catalogue/parameters.ts';
import { alternatives, exclusion, matches } from '../rules/rules.ts';
import type { Found } from './read-places.ts';
import type { TrialFound } from './read-trials.ts';

/** What a study states, its trials apart. */
export interface StudyFound {
  readonly found: Found;
  readonly trials: readonly TrialFound[];
}

/** Names of the study that give way to names that an option states; files stay unless the option names its own. */
export function givenUp({ found, trials }: StudyFound, stated: readonly string[]): Set<string> {
  const touched = trials.filter(({ name }) => stated.some((own) => own.startsWith(`trials.${name}.`)));
  const names = new Set([found, ...touched.map((trial) => trial.found)].flatMap(({ stands, tried, texts }) => [...stands.keys(), ...tried, ...texts.keys()]));
  return new Set([...names].filter((name) => stated.some((own) => replaces(own, name))));
}

/** The study with an option in it, where some names give way. */
export function studyWithOption({ found, trials }: StudyFound, option: Found, gone: ReadonlySet<string>): StudyFound {
  const givesWay = (name: string) => gone.has(name);
  const ofTrials = [...option.stands.keys()].filter((name) => name.startsWith('trials.'));
  return {
    found: joined(found, option, givesWay, (name) => !name.startsWith('trials.')),
    trials: trials.map((trial) => {
      const own = (name: string) => name.startsWith(`trials.${trial.name}.`);
      return ofTrials.some(own) ? { ...trial, found: joined(trial.found, option, givesWay, own) } : trial;
    }),
  };
}

/** Whether what an option states goes before a name of the study: the same number, another way of saying it, or one without a part beside it. */
export function replaces(own: string, name: string): boolean {
  if (own === name || isPartOf(name, own)) return true;
  if (isFile(name) || own.startsWith('trials.') !== name.startsWith('trials.')) return false;
  return (
    exclusion(own, name) !== undefined || alternatives.some(({ holds, inFile }) => inFile?.includes(name) && holds.some((pattern) => matches(pattern, own)))
  );
}

/** What a file says of itself goes with it. */
function isPartOf(name: string, file: string): boolean {
  return isFile(file) && !file.endsWith('.file') && name.startsWith(`${file}.`);
}

function isFile(name: string): boolean {
  return /^motor\.(?:fullLoad|map)(?:\.|$)/u.test(name);
}

function joined(base: Found, option: Found, givesWay: (name: string) => boolean, belongs: (name: string) => boolean): Found {
  const join = <Value>(own: ReadonlyMap<string, Value>, more: ReadonlyMap<string, Value>) =>
    new Map([...[...own].filter(([name]) => !givesWay(name)), ...[...more].filter(([name]) => belongs(name))]);
  return {
    figures: join(base.figures, option.figures),
    texts: join(base.texts, option.texts),
    parts: base.parts,
    stands: withSections(join(base.stands, option.stands), base.stands),
    tried: new Set([...[...base.tried].filter((name) => !givesWay(name)), ...[...option.tried].filter(belongs)]),
  };
}

/** Sections of which nothing is left stand no more; those of which there is something now do. */
function withSections(stands: ReadonlyMap<string, number>, before: ReadonlyMap<string, number>): Map<string, number> {
  const filled = new Map<string, number>();
  for (const [name, at] of stands) for (const section of sectionsAbove(name)) if (!filled.has(section)) filled.set(section, at);
  const emptied = new Set([...before.keys()].flatMap(sectionsAbove).filter((section) => !filled.has(section)));
  return new Map([...[...filled].filter(([section]) => !stands.has(section)), ...[...stands].filter(([name]) => !emptied.has(name))]);
}

/** Sections that hold a name; one that is a figure as well (gearing.efficiency) does not count. */
function sectionsAbove(name: string): string[] {
  const keys = name.split('.');
  return keys.slice(1).flatMap((_, length) => {
    const section = keys.slice(0, length + 1).join('.');
    return findParameter(section) === undefined ? [section] : [];
  });
}
