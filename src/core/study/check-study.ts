/** Study text -> a checked study in SI, or everything that is wrong with it, all at once. */
import { checkRules } from './check-rules.ts';
import { checkTrialRules } from './check-trial-rules.ts';
import { type Issue, IssueList } from './issue.ts';
import { studyLayout } from './layout.ts';
import { type Located, type LocatedMap, readLocated } from './located-text.ts';
import { metricColumns } from './metric-columns.ts';
import { readRequirements, readTradeOff } from './read-aims.ts';
import { readAxes, readSearch } from './read-axes.ts';
import { lossMapOf, readStudyFullLoad, readStudyMap } from './read-measured.ts';
import { type Found, nothingFound, readPlaces } from './read-places.ts';
import { readTrials, type StudySources, type TrialFound } from './read-trials.ts';
import { referenceValues } from './reference-values.ts';
import type { Study, Trial } from './study.ts';
import { rollingRadiusM } from './tyre-size.ts';
import { addWarnings } from './warnings.ts';

export type { StudySources } from './read-trials.ts';

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
  refuseOptions(found, issues);
  checkTyre(found, issues);
  const fullLoad = readStudyFullLoad(found, sources, issues);
  const map = readStudyMap(found, sources, issues);
  const trialsPart = found.parts.get('trials');
  const trials = trialsPart === undefined ? [] : readTrials(trialsPart.value, sources, issues);
  const varied = new Set(variedNames(found));
  checkRules({ stated: found, issues, varied, only: null, base: null, pathOf: (name) => name });
  for (const trial of trials) checkTrialRules(trial, { base: found, varied, issues, pathOf: (name) => name });
  const values = referenceValues({ found, trials, fullLoad });
  const stands = new Map([...found.stands, ...trials.flatMap((trial) => [...trial.found.stands])]);
  const aims = { issues, trials, columns: metricColumns({ trials }), broken: brokenTrials(trialsPart?.value, trials), stands: found.stands };
  const vary = found.parts.get('vary');
  const axes =
    vary === undefined
      ? []
      : readAxes(vary.value, {
          issues,
          values,
          stands,
          tried: new Set([...found.tried, ...trials.flatMap((trial) => [...trial.found.tried])]),
          broken: aims.broken,
        });
  const requirements = readRequirements(found.parts.get('requirements')?.value, aims);
  const tradeOff = readTradeOff(found.parts.get('tradeOff')?.value, aims);
  const search = readSearch(found.parts.get('search')?.value, issues);
  if (issues.failed) return null;
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
    optionCurves: [],
    optionMaps: [],
    trials: trials.map(trialOf),
    axes,
    search,
    requirements,
    ...tradeOff,
    report: { units: (texts('report.units') ?? 'SI') as Study['report']['units'] },
  };
  addWarnings({ study, found, trials, bestMapEfficiency: map?.bestEfficiency ?? Number.NaN, issues });
  return study;
}

function refuseOptions(found: Found, issues: IssueList): void {
  const options = found.stands.get('options');
  if (options === undefined) return;
  issues.error(options, 'options', {
    expected: 'numbers that vary, under vary',
    found: 'options, which are not available yet',
    hint: 'Vary the numbers one by one with oneOf for now.',
  });
}

function checkTyre({ texts }: Found, issues: IssueList): void {
  const tyre = texts.get('vehicle.tyre');
  if (tyre === undefined || rollingRadiusM(tyre.text) !== null) return;
  issues.error(tyre.at, 'vehicle.tyre', {
    expected: 'the size of a radial tyre, such as 215/65 R16',
    found: tyre.text,
    hint: 'Write width in mm / aspect ratio in % R rim in inches; or give wheelRadius instead.',
  });
}

function variedNames(found: Found): string[] {
  const vary = found.parts.get('vary')?.value;
  return vary?.kind === 'map' ? vary.entries.map(({ key }) => key) : [];
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
      expected: 'vary, with at least one number',
      found: 'a study in which nothing varies',
      hint: 'Add vary to search designs; layshaft sheet evaluates the one design there is.',
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
