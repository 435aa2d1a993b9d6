/** A report made from invented formulas, for tests of charts and page: every figure follows from the inputs by a line of arithmetic. */
import type { DesignStanding, ReportData, ReportDesign } from '../../src/charts/report-data.ts';
import type { ResultColumn } from '../../src/core/evaluate/result-columns.ts';
import { FrontFilter } from '../../src/core/front/front-filter.ts';
import { balancedDesign, bestInEach } from '../../src/core/front/proposals.ts';
import { RequirementTally } from '../../src/core/front/requirements.ts';
import { thinFront } from '../../src/core/front/thin-front.ts';
import { createSearch } from '../../src/core/search/search.ts';
import type { Study } from '../../src/core/study/study.ts';
import { inventedStudy } from './invented-study.ts';

type Figures = Readonly<Record<string, number>>;

/** Varied inputs (SI) to metrics (SI). */
function formulas(ratio: number, peakTorque: number, baseSpeed: number): Figures {
  const power = peakTorque * baseSpeed;
  const axleTorque = peakTorque * ratio;
  const topByRevs = (13000 / 60) * 2 * Math.PI * (0.333 / ratio);
  const cost = 440 + 2.4 * peakTorque + 0.0046 * power + 0.1 * axleTorque;
  return {
    'ramp.grade': (axleTorque * 0.9 * 0.97) / 0.333 / (2800 * 9.80665) - 0.011,
    'climb.grade': (0.58 * power * 0.95) / 22.22 / (2800 * 9.80665) - 0.028,
    'sprint.time': (2800 * 22.22 * 22.22) / (2 * 0.9 * power) + (2800 * 5) / axleTorque,
    'cruise.speed': Math.min(topByRevs, (power * 0.58 * 900) ** (1 / 3) / 4.3),
    'driveUnit.axleTorque': axleTorque,
    'stops.offTrace': axleTorque < 1500 ? 0.01 : 0,
    'stops.batteryEnergy': 3.6 * (186 + 0.9 * (11.6 - ratio) ** 2 - 0.03 * (peakTorque - 180) + 0.012 * (baseSpeed - 335)),
    'trunk.batteryEnergy': 3.6 * (198 + 1.4 * (ratio - 7.6) + 0.02 * (peakTorque - 180) + 0.008 * (586 - baseSpeed)),
    'driveUnit.cost': cost,
  };
}

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
  const columns = inventedColumns(study);
  const search = createSearch(study);
  const row = new Float64Array(3);
  const rows = Array.from({ length: search.count + 1 }, (_, number) => {
    if (number === 0) row.set(study.axes.map((axis) => study.values[axis.name]!));
    else search.inputs(number, row, 0);
    const figures = formulas(row[0]!, row[1]!, row[2]!);
    return columns.map((column, at) => (column.role === 'metric' ? figures[metricOf(column.name)]! : row[at]!));
  });
  const made = rows.slice(1);
  const column = (metric: string) => Float64Array.from(made, (values) => values[columns.findIndex(({ name }) => name === metric)]!);
  const numbers = Float64Array.from(made, (_, index) => index + 1);
  const objectives = study.objectives.map(({ metric }) => column(metric));
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
    (number: number): ReportDesign => ({ number, standing, values: rows[number]! });
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
      return { ...requirement, ...outcome, relaxedTo: Number.isNaN(outcome.relaxedTo) ? null : outcome.relaxedTo };
    }),
    proposals: shown.length === 0 ? [] : proposals(study, shownNumbers, bestInEach(shownObjectives), balancedDesign(shownObjectives)),
    closest:
      result.closest === null ? null : { number: result.closest.number, missed: result.closest.missed.map((index) => study.requirements[index]!.metric) },
    warnings: ['The figures of this study are invented.'],
    provenance: {
      version: '0.1.0',
      node: 'v20.20.2',
      started: '2026-12-01T05:12:00.000Z',
      seconds: 8.4,
      workers: 2,
      digests: [{ name: 'harbour-parcel-van.yaml', sha256: '9f2c7a41'.repeat(8) }],
    },
  };
}

/** Tests may rename the first trial; the formulas know it as `ramp`. */
function metricOf(name: string): string {
  return name.endsWith('.grade') && !name.startsWith('climb.') ? 'ramp.grade' : name;
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

function inventedColumns(study: Study): ResultColumn[] {
  const input = (name: string, key: string, quantity: ResultColumn['quantity'], decimals: number, label: string): ResultColumn => ({
    key,
    name,
    role: 'input',
    quantity,
    decimals,
    label,
    better: null,
    labels: null,
  });
  const metric = (name: string, key: string, quantity: ResultColumn['quantity'], decimals: number, label: string, better: 'less' | 'more'): ResultColumn => ({
    key,
    name,
    role: 'metric',
    quantity,
    decimals,
    label,
    better,
    labels: null,
  });
  const ramp = study.trials[0]!.name;
  return [
    input('gearing.ratio', 'gearing.ratio', 'number', 3, 'ratio'),
    input('motor.peakTorque', 'motor.peakTorque_Nm', 'torque', 0, 'peak torque'),
    input('motor.baseSpeed', 'motor.baseSpeed_rpm', 'rotationalSpeed', 0, 'base speed'),
    metric('stops.batteryEnergy', 'stops.batteryEnergy_Wh_per_km', 'energyPerDistance', 1, 'stops: battery energy', 'less'),
    metric('trunk.batteryEnergy', 'trunk.batteryEnergy_Wh_per_km', 'energyPerDistance', 1, 'trunk: battery energy', 'less'),
    metric('driveUnit.cost', 'driveUnit.cost', 'money', 0, 'drive unit cost', 'less'),
    metric(`${ramp}.grade`, `${ramp}.grade_pct`, 'grade', 1, `${ramp}: grade`, 'more'),
    metric('climb.grade', 'climb.grade_pct', 'grade', 1, 'climb: grade', 'more'),
    metric('sprint.time', 'sprint.time_s', 'time', 2, 'sprint: time', 'less'),
    metric('cruise.speed', 'cruise.speed_kmh', 'speed', 1, 'cruise: top speed', 'more'),
    metric('driveUnit.axleTorque', 'driveUnit.axleTorque_Nm', 'torque', 0, 'axle torque', 'less'),
    metric('stops.offTrace', 'stops.offTrace_pct', 'share', 2, 'stops: off-trace share', 'less'),
  ];
}
