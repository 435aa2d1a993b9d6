/** A report of the invented study, computed by the core in the test itself: what a run would put together, without files and threads. */
import type { DesignStanding, ReportData, ReportDesign } from '../../src/charts/report-data.ts';
import { compileStudy } from '../../src/core/evaluate/compile.ts';
import { resultColumns } from '../../src/core/evaluate/result-columns.ts';
import { FrontFilter } from '../../src/core/front/front-filter.ts';
import { balancedDesign, bestInEach } from '../../src/core/front/proposals.ts';
import { RequirementTally } from '../../src/core/front/requirements.ts';
import { thinFront } from '../../src/core/front/thin-front.ts';
import { createSearch } from '../../src/core/search/search.ts';
import type { Study } from '../../src/core/study/study.ts';
import type { Issue } from '../../src/core/study/text/issue.ts';
import { inventedStudy } from './invented-study.ts';

/** What a test may ask for. */
export interface InventedWishes {
  readonly study?: Study;
  /** Adds to every required grade, so that from a certain value on no design passes. */
  readonly harder?: number;
}

/** The report of the invented study, by the rules of the front and of requirements. */
export function inventedReport({ study: given, harder = 0 }: InventedWishes = {}): ReportData {
  const base = given ?? inventedStudy();
  const study: Study = {
    ...base,
    requirements: base.requirements.map((each) => (each.metric === 'ramp.grade' ? { ...each, limit: each.limit + harder } : each)),
  };
  const { columns, rows } = computedRows(study);
  const made = rows.slice(1);
  const column = (metric: string) => Float64Array.from(made, (values) => values[columns.findIndex(({ name }) => name === metric)]!);
  const numbers = Float64Array.from(made, (_, index) => index + 1);
  const turns = study.objectives.map(({ aim }) => (aim === 'minimise' ? 1 : -1));
  const objectives = study.objectives.map(({ metric }, j) => column(metric).map((value) => value * turns[j]!));
  const tally = new RequirementTally(study.requirements, objectives.length);
  const passing = new Uint8Array(made.length);
  tally.add(
    made.length,
    numbers,
    study.requirements.map(({ metric }) => column(metric)),
    objectives,
    passing,
  );
  const filter = new FrontFilter(objectives.length);
  filter.add(made.length, numbers, objectives, passing);
  const front = filter.front();
  const shown = [
    ...thinFront(
      front.objectives,
      study.objectives.map(({ resolution }) => resolution),
    ),
  ];
  const shownNumbers = shown.map((index) => front.numbers[index]!);
  const shownObjectives = front.objectives.map((values) => Float64Array.from(shown, (index) => values[index]!));
  const result = tally.result();
  const design =
    (standing: DesignStanding) =>
    (number: number): ReportDesign => ({ number, standing, values: rows[number]!.map((value) => (Number.isNaN(value) ? null : value)) });
  const onFront = new Set(front.numbers);
  const rest = [...numbers].filter((number) => !onFront.has(number) && number % 3 === 0);
  return {
    study,
    studyFile: 'harbour-parcel-van.yaml',
    studyText: `title: ${study.title}\nabout: ${study.about}\n`,
    columns,
    counts: { designs: made.length, feasible: result.feasible, front: front.numbers.length, shownFront: shown.length },
    designs: [
      design('reference')(0),
      ...shownNumbers.map(design('front')),
      ...rest.filter((number) => passing[number - 1] === 1).map(design('feasible')),
      ...rest.filter((number) => passing[number - 1] === 0).map(design('removed')),
      ...(result.closest === null || result.closest.number % 3 === 0 ? [] : [design('removed')(result.closest.number)]),
    ],
    requirements: study.requirements.map((requirement, index) => {
      const outcome = result.requirements[index]!;
      const relaxedBest = outcome.relaxedBest.map((best, j) => (best === null ? null : { ...best, objective: best.objective * turns[j]! }));
      return { ...requirement, ...outcome, relaxedBest, relaxedTo: Number.isNaN(outcome.relaxedTo) ? null : outcome.relaxedTo };
    }),
    proposals: shown.length === 0 ? [] : proposals(study, shownNumbers, bestInEach(shownObjectives), balancedDesign(shownObjectives)),
    closest:
      result.closest === null ? null : { number: result.closest.number, missed: result.closest.missed.map((index) => study.requirements[index]!.metric) },
    warnings: [inventedWarning('the figures of this study are invented')],
    provenance: {
      version: '0.1.0',
      node: 'v20.20.2',
      started: '2026-12-01T05:12:00.000Z',
      seconds: 8.4,
      digests: [{ name: 'harbour-parcel-van.yaml', sha256: '9f2c7a41'.repeat(8) }],
    },
  };
}

/** A warning that has found this. */
export function inventedWarning(found: string): Issue {
  const place = { severity: 'warning' as const, file: 'harbour-parcel-van.yaml', line: 2, column: 1, source: '', caret: 0, path: 'about' };
  return { ...place, rule: 'invented figures', expected: 'measured ones', found, hint: 'Measure them.' };
}

/** Every design as a row of result columns, the reference first. NaN: does not exist. */
function computedRows(study: Study) {
  const evaluator = compileStudy(study);
  const search = createSearch(study);
  const columns = resultColumns(study, evaluator.metrics);
  const metrics = new Float64Array(evaluator.metrics.length);
  const inputs = Float64Array.from(evaluator.reference);
  const rows = Array.from({ length: search.count + 1 }, (_, number) => {
    if (number > 0) search.inputs(number, inputs, 0);
    evaluator.evaluate(inputs, 0, metrics, 0);
    return columns.map((column, at) => (column.role === 'metric' ? metrics[evaluator.metrics.findIndex(({ name }) => name === column.name)]! : inputs[at]!));
  });
  return { columns, rows };
}

function proposals(study: Study, numbers: readonly number[], best: readonly number[], balanced: number) {
  const rulesOf = new Map<number, string[]>();
  const chosen: [number, string][] = [
    ...best.map((index, j): [number, string] => [numbers[index]!, study.objectives[j]!.metric]),
    [numbers[balanced]!, 'balanced'],
  ];
  for (const [number, rule] of chosen) rulesOf.set(number, [...(rulesOf.get(number) ?? []), rule]);
  return [...rulesOf].map(([number, rules]) => ({ number, rules }));
}
