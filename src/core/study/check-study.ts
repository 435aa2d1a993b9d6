/** Study text -> a checked study in SI, or everything that is wrong with it, all at once. */

import { metricColumns } from './catalogue/metric-columns.ts';
import { studyLayout } from './read/layout.ts';
import { namesOf, type OptionAxes, type OptionBase, optionAxes } from './read/option-axes.ts';
import { readRequirements, readTradeOff } from './read/read-aims.ts';
import { readAxes } from './read/read-axes.ts';
import { createMotorFiles, lossMapOf, readStudyFullLoad, readStudyMap } from './read/read-measured.ts';
import { type OptionList, readOptions } from './read/read-options.ts';
import { type Found, nothingFound, readPlaces } from './read/read-places.ts';
import { readSearch } from './read/read-search.ts';
import { readTrials, type StudySources, type TrialFound } from './read/read-trials.ts';
import { referenceValues } from './read/reference-values.ts';
import { checkTyre } from './read/tyre-size.ts';
import { checkAxes, placedOptions } from './rules/check-axes.ts';
import { checkRules } from './rules/check-rules.ts';
import { checkTrialRules } from './rules/check-trial-rules.ts';
import type { Axis, Search, Study, Trial } from './study.ts';
import { type Issue, IssueList } from './text/issue.ts';
import { type Located, type LocatedMap, readLocated } from './text/located-text.ts';
import { addWarnings } from './warn/warnings.ts';

export type { StudySources } from './read/read-trials.ts';

/** A study that can be used, with what to keep an eye on; or every mistake in it, in the order of the file. */
export type StudyCheck = { readonly ok: true; readonly study: Study; readonly warnings: Issue[] } | { readonly ok: false; readonly issues: Issue[] };

/**
 * Checks the text of a study file. Never throws for a person's mistake and reads nothing but what `sources` hands out; any text is
 * answered in bounded time and memory. `fileName` stands in front of every issue.
 */
export function checkStudy(text: string, fileName: string, sources: StudySources): StudyCheck {
  const plain = text.startsWith('\ufeff') ? text.slice(1) : text;
  const issues = new IssueList(fileName, plain);
  const root = readLocated(plain, issues);
  const study = root === null ? null : readStudy(root, fileName, sources, issues);
  return study === null || issues.failed ? { ok: false, issues: issues.list('error') } : { ok: true, study, warnings: issues.list('warning') };
}

/** Everything in a readable tree; null where mistakes leave no study. */
function readStudy(root: LocatedMap, fileName: string, sources: StudySources, issues: IssueList): Study | null {
  const found = nothingFound();
  readPlaces(root, studyLayout, { issues, found, prefix: '' });
  checkTyre(found, 'vehicle.tyre', issues);
  const files = createMotorFiles(sources);
  const fullLoad = readStudyFullLoad(found, files, issues);
  const map = readStudyMap(found, files, issues);
  const trialsPart = found.parts.get('trials');
  const trials = trialsPart === undefined ? [] : readTrials(trialsPart.value, sources, issues);
  const broken = brokenTrials(trialsPart?.value, trials);
  const varied = new Set(variedNames(found));
  const before = issues.errorCount;
  checkRules({ stated: found, issues, varied, only: null, base: null, pathOf: (name) => name });
  for (const trial of trials) checkTrialRules(trial, { base: found, varied, issues, pathOf: (name) => name });
  const sound = issues.errorCount === before;
  const values = referenceValues({ found, trials, fullLoad });
  const search = readSearch(found.parts.get('search')?.value, issues);
  const { axes, options, known } = readAllAxes({ found, trials, fullLoad, values, files, issues, varied, sound }, { broken, sources, search });
  const aims = { issues, trials, columns: metricColumns({ trials, values, axes }), broken, stands: known };
  const requirements = readRequirements(found.parts.get('requirements')?.value, aims);
  const tradeOff = readTradeOff(found.parts.get('tradeOff')?.value, aims);
  if (search === null || issues.failed) return null;
  const texts = (name: string) => found.texts.get(name)?.text;
  const study: Study = {
    title: texts('title') ?? fileName.replace(/^.*[/\\]/u, '').replace(/\.ya?ml$/iu, ''),
    about: texts('about') ?? '',
    driven: texts('vehicle.axles.driven') as Study['driven'],
    tyre: texts('vehicle.tyre') ?? null,
    currency: texts('massAndCost.cost.currency') ?? null,
    values,
    fullLoad,
    lossMap: map === null ? null : lossMapOf(map, values),
    optionCurves: options.curves,
    optionMaps: options.maps,
    trials: trials.map(trialOf),
    axes,
    search,
    requirements,
    ...tradeOff,
    report: { units: (texts('report.units') ?? 'SI') as Study['report']['units'] },
  };
  const bestMapEfficiency = Math.max(map?.bestEfficiency || 0, options.bestMapEfficiency);
  addWarnings({ study, found, trials, bestMapEfficiency, issues });
  return study;
}

/** The axes of the search in the order of the file, what options bring, and every name that the study or an option states. */
function readAllAxes(
  base: OptionBase,
  { broken, sources, search }: { readonly broken: ReadonlySet<string>; readonly sources: StudySources; readonly search: Search | null },
): { axes: Axis[]; options: OptionAxes; known: Map<string, number> } {
  const { found, trials, values, issues } = base;
  const [vary, optionsPart] = [found.parts.get('vary'), found.parts.get('options')];
  const lists = optionsPart === undefined ? [] : readOptions(optionsPart.value, { issues, trials, broken, sources });
  const options = optionAxes(lists, base);
  const stands = new Map([...found.stands, ...trials.flatMap((trial) => [...trial.found.stands])]);
  const tried = new Set([...found.tried, ...trials.flatMap((trial) => [...trial.found.tried])]);
  const ranges = vary === undefined ? [] : readAxes(vary.value, { issues, search, values, stands, tried, broken });
  const placed = [...ranges, ...options.axes.map((axis, index) => placedOptions(axis, lists[index] as OptionList))].sort((a, b) => a.at - b.at);
  checkAxes(placed, search, issues);
  const known = new Map([...lists.flatMap((list) => namesOf(list).map((name) => [name, list.at] as const)), ...found.stands]);
  return { axes: placed.map(({ axis }) => axis), options, known };
}

/** Every name under `vary`, the two of a pair by their own. */
function variedNames(found: Found): string[] {
  const vary = found.parts.get('vary')?.value;
  return vary?.kind === 'map' ? vary.entries.flatMap(({ key }) => [key, `${key}.1`, `${key}.2`]) : [];
}

/** Names of trials that stand in the file but could not be read. */
function brokenTrials(part: Located | undefined, trials: readonly TrialFound[]): Set<string> {
  const read = new Set(trials.map(({ name }) => name));
  return new Set(part?.kind === 'map' ? part.entries.map(({ key }) => key).filter((name) => !read.has(name)) : []);
}

function trialOf({ name, kind, rating, with: figures, trace, road }: TrialFound): Trial {
  return { name, kind, rating, with: Object.fromEntries([...figures].map(([key, { value }]) => [key, value])), trace, road };
}

/** What a run needs beyond a sheet: something that varies and something to trade off; null where both are there. */
export function whatRunNeeds(study: Pick<Study, 'axes' | 'objectives'>): { readonly expected: string; readonly found: string; readonly hint: string } | null {
  if (study.axes.length === 0) {
    return {
      expected: 'vary, with at least one number, or options',
      found: 'a study in which nothing varies',
      hint: 'Add vary or options to search designs; layshaft sheet evaluates the one design there is.',
    };
  }
  if (study.objectives.length === 0) {
    return {
      expected: 'tradeOff, with at least one objective',
      found: 'a study without objectives',
      hint: 'Add tradeOff with metrics under minimise or maximise.',
    };
  }
  return null;
}
