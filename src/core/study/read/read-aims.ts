/** Reads `requirements` and `tradeOff`: limits and objectives on metrics that the study's trials give. */
import { readQuantity } from '../../units/read-quantity.ts';
import type { MetricColumn } from '../catalogue/metrics.ts';
import type { Objective, Requirement } from '../study.ts';
import { clip, type IssueList } from '../text/issue.ts';
import type { Located, LocatedMap } from '../text/located-text.ts';
import { CUT_OFF_HINT, isCutOff } from './read-places.ts';
import type { TrialFound } from './read-trials.ts';

/** What aims are checked against. */
export interface AimsContext {
  readonly issues: IssueList;
  readonly trials: readonly TrialFound[];
  /** Every metric of the study. */
  readonly columns: readonly MetricColumn[];
  /** Names of trials that have mistakes of their own: their metrics are not judged. */
  readonly broken: ReadonlySet<string>;
  /** Every name that the study states, and what each trial adds. */
  readonly stands: ReadonlyMap<string, number>;
}

/** Figures without which a metric exists for no design: one name of the list must stand (or begin a name that stands). */
const metricNeeds: Readonly<Record<string, readonly string[]>> = {
  gridEnergy: ['battery.chargingEfficiency'],
  range: ['battery.usable'],
  torqueLoad: ['motor.continuous.torque'],
  lossLoad: ['motor.continuous.torque'],
  worstLossLoad: ['motor.continuous.torque'],
  outsideMap: ['motor.map'],
  'driveUnit.mass': ['massAndCost.mass.motor', 'massAndCost.mass.inverter', 'massAndCost.mass.gearing'],
  'driveUnit.cost': ['massAndCost.cost.motor', 'massAndCost.cost.inverter', 'massAndCost.cost.gearing'],
  'battery.mass': ['massAndCost.mass.battery'],
  'battery.cost': ['massAndCost.cost.battery'],
};

type Bound = Requirement['bound'];
const BOUNDS: readonly Bound[] = ['atLeast', 'atMost'];

/** Reads `requirements` (may be absent) and adds the implied one of every cycle: it is followed, unless the file limits that metric itself. */
export function readRequirements(part: Located | undefined, context: AimsContext): Requirement[] {
  const written = part === undefined ? [] : readWritten(part, context);
  const own = new Set(written.map(({ metric }) => metric));
  const cycles = context.trials.filter(({ kind }) => kind === 'cycle').map(({ name }) => `${name}.offTrace`);
  const implied = cycles.filter((metric) => !own.has(metric)).map((metric): Requirement => ({ metric, bound: 'atMost', limit: 0, implied: true }));
  return [...written, ...implied];
}

function readWritten(part: Located, context: AimsContext): Requirement[] {
  const { issues } = context;
  if (part.kind !== 'map') {
    issues.error(part.at, 'requirements', {
      expected: 'limits by metric',
      found: part.kind === 'list' ? 'a list' : clip(part.text) || 'nothing',
      hint: 'Write "requirements: { ramp.grade: { atLeast: 20 % } }", or remove it.',
    });
    return [];
  }
  return part.entries.flatMap(({ key, at, value }) => {
    const column = findMetric(key, at, `requirements.${key}`, context);
    if (column === null) return [];
    if (value.kind === 'map') return readLimits(column, value, issues);
    const found = value.kind === 'list' ? 'a list' : clip(value.text) || 'nothing';
    const { bound, limit } = limitMeant(value.kind === 'text' ? value.text : '', column);
    issues.error(value.at, `requirements.${key}`, { expected: 'atLeast, atMost or both', found, hint: `Write "${key}: { ${bound}: ${limit} }".` });
    return [];
  });
}

/** What a limit without a bound, or with a sign such as `>=`, most likely means. */
function limitMeant(text: string, column: MetricColumn): { bound: Bound; limit: string } {
  const [, sign = '', figure = ''] = /^\s*([<>≤≥]?)=?\s*(.*)$/su.exec(text) ?? [];
  const usual: Bound = column.row.better === 'more' ? 'atLeast' : 'atMost';
  return { bound: sign === '' ? usual : /[>≥]/u.test(sign) ? 'atLeast' : 'atMost', limit: clip(figure) || '…' };
}

function readLimits(column: MetricColumn, map: LocatedMap, issues: IssueList): Requirement[] {
  const path = `requirements.${column.name}`;
  if (map.entries.length === 0) issues.error(map.at, path, { expected: 'atLeast, atMost or both', found: 'no limit', hint: 'Add a limit or remove the line.' });
  const limits = map.entries.flatMap((entry, index): Requirement[] => {
    const { key, at, value } = entry;
    if (key !== 'atLeast' && key !== 'atMost') {
      const near = issues.nearest(key, BOUNDS);
      const named = near === null ? 'Write atLeast for the lower limit, atMost for the upper.' : `Did you mean ${near}?`;
      issues.error(at, `${path}.${key}`, { expected: 'atLeast or atMost', found: clip(key), hint: isCutOff(entry) ? CUT_OFF_HINT : named });
      return [];
    }
    const next = map.entries[index + 1];
    if (next !== undefined && isCutOff(next)) return [];
    const limit = readLimit(column, value, `${path}.${key}`, issues);
    return limit === null ? [] : [{ metric: column.name, bound: key, limit, implied: false }];
  });
  const [least, most] = BOUNDS.map((bound) => limits.find((limit) => limit.bound === bound)?.limit);
  if (least !== undefined && most !== undefined && least > most) {
    issues.error(map.at, path, { expected: 'atLeast below atMost', found: 'nothing between the two', hint: 'Exchange the two limits, or correct one.' });
  }
  return limits;
}

/** A limit, SI, in a unit of the metric's quantity. */
function readLimit(column: MetricColumn, value: Located, path: string, issues: IssueList): number | null {
  if (value.kind !== 'text') {
    issues.error(value.at, path, { expected: 'one figure', found: value.kind === 'list' ? 'a list' : 'a section', hint: column.row.sentence });
    return null;
  }
  const read = readQuantity(value.text, column.row.quantity);
  if (read.ok) return read.value;
  issues.error(value.at, path, read);
  return null;
}

/** The metric of a name; null with an issue that says which there are. */
function findMetric(name: string, at: number, path: string, context: AimsContext): MetricColumn | null {
  const { issues, trials, broken, columns } = context;
  const trial = name.slice(0, Math.max(0, name.indexOf('.')));
  if (broken.has(trial)) return null;
  const column = columns.find((candidate) => candidate.name === name);
  if (column !== undefined) return canExist(column, at, path, context) ? column : null;
  // Without any trial the missing trials are told already.
  if (trials.length === 0) return null;
  issues.error(at, path, {
    expected: 'a metric of this study: <trial>.<metric>, or one of the whole design',
    found: clip(name),
    hint: metricHint(name, context),
  });
  return null;
}

/** What may be meant by a name that is no metric: the trial is looked for first, then its metric. */
function metricHint(name: string, { issues, columns }: AimsContext): string {
  if (issues.full) return '';
  const withUnit = columns.find(({ key }) => key === name);
  if (withUnit !== undefined) return `Write ${withUnit.name}: the figure carries the unit.`;
  const brace = /^(\S+)\s*\{/u.exec(name)?.[1];
  if (brace !== undefined) return `A colon is missing: write "${clip(brace)}: { … }".`;
  const owners = [...new Set(columns.map((column) => column.name.slice(0, column.name.indexOf('.'))))];
  const [wantedOwner, wantedMetric] = [name.slice(0, Math.max(0, name.indexOf('.'))), name.slice(name.indexOf('.') + 1)];
  const sameMetric = columns.map((column) => column.name).filter((each) => each.slice(each.indexOf('.') + 1) === wantedMetric);
  const owner = owners.includes(wantedOwner) ? wantedOwner : issues.nearest(wantedOwner || name, owners);
  if (owner === null && sameMetric.length > 0) return `Did you mean ${sameMetric.slice(0, 3).join(' or ')}?`;
  if (owner === null) return `Metrics belong to ${owners.slice(0, 12).join(', ')}${owners.length > 12 ? ' and so on' : ''}.`;
  const metrics = columns.filter((column) => column.name.startsWith(`${owner}.`)).map((column) => column.name.slice(owner.length + 1));
  const gives = `${owner} gives ${metrics.join(', ')}`;
  if (owner === name)
    return `Write its metric with it, in one piece, such as ${owner}.${metrics.find((metric) => metric !== 'payload') ?? metrics[0]}: ${gives}.`;
  const metric = metrics.includes(wantedMetric) ? wantedMetric : issues.nearest(wantedMetric, metrics);
  if (metric !== null) return `Did you mean ${owner}.${metric}?`;
  return sameMetric.length === 0 ? `${gives}.` : `${gives}; there is ${sameMetric.slice(0, 3).join(', ')}.`;
}

function canExist(column: MetricColumn, at: number, path: string, { issues, trials, stands }: AimsContext): boolean {
  const short = column.trial === null ? column.name : column.name.slice(column.trial.length + 1);
  const wanted = metricNeeds[short];
  if (wanted === undefined) return true;
  const added = trials.find(({ name }) => name === column.trial)?.withStands ?? new Map<string, number>();
  const there = [...stands.keys(), ...added.keys()].some((name) => wanted.some((need) => name === need || name.startsWith(`${need}.`)));
  if (!there) {
    issues.error(at, path, {
      expected: 'a metric that this study can give',
      found: `${column.name}, which no design has`,
      hint: `It needs ${wanted.join(' or ')}: add that, or remove this line.`,
    });
  }
  return there;
}

/** Reads `tradeOff`. */
export function readTradeOff(part: Located | undefined, context: AimsContext): { objectives: Objective[]; keep: string[] } {
  const nothing = { objectives: [], keep: [] };
  if (part === undefined) return nothing;
  const { issues } = context;
  if (part.kind !== 'map') {
    issues.error(part.at, 'tradeOff', {
      expected: 'minimise, maximise, resolution, keep',
      found: part.kind === 'list' ? 'a list' : clip(part.text) || 'nothing',
      hint: 'Write "tradeOff: { minimise: [ … ] }", or remove it.',
    });
    return nothing;
  }
  const before = issues.errorCount;
  const keys = ['minimise', 'maximise', 'resolution', 'keep'];
  for (const { key, at } of part.entries) {
    if (keys.includes(key)) continue;
    const near = issues.nearest(key, keys);
    issues.error(at, `tradeOff.${key}`, { expected: keys.join(', '), found: clip(key), hint: near === null ? 'Remove it.' : `Did you mean ${near}?` });
  }
  const entry = (name: string) => part.entries.find(({ key }) => key === name)?.value;
  const aimed = [...readMetricList(entry('minimise'), 'minimise', context), ...readMetricList(entry('maximise'), 'maximise', context)];
  const once = aimed.filter((metric, index) => isFirst(metric, index, aimed, issues));
  const written = ['minimise', 'maximise'].map(entry).reduce((sum, list) => sum + (list?.kind === 'list' ? list.items.length : 0), 0);
  // An item may be left out without an error of its own: its trial has one.
  const listsHold = issues.errorCount === before && written === aimed.length;
  if (aimed.length === 0 && listsHold) {
    issues.error(part.at, 'tradeOff', { expected: 'at least one objective', found: 'none', hint: 'List metrics under minimise or maximise.' });
  }
  const sizes = readResolution(entry('resolution'), once, listsHold, issues);
  const objectives = once.map(({ column, list }) => ({ metric: column.name, aim: list as Objective['aim'], resolution: sizes.get(column.name) ?? 0 }));
  return { objectives, keep: [...new Set(readMetricList(entry('keep'), 'keep', context).map(({ column }) => column.name))] };
}

interface ListedMetric {
  readonly column: MetricColumn;
  readonly list: string;
  readonly at: number;
}

function isFirst(metric: ListedMetric, index: number, all: readonly ListedMetric[], issues: IssueList): boolean {
  const first = all.findIndex(({ column }) => column.name === metric.column.name);
  if (first === index) return true;
  const other = all[first] as ListedMetric;
  const found =
    other.list === metric.list
      ? `${metric.column.name} twice`
      : `${metric.column.name} under ${other.list} (line ${issues.lineOf(other.at)}) and ${metric.list}`;
  issues.error(metric.at, `tradeOff.${metric.list}`, { expected: 'each objective once', found, hint: 'Keep one of the two.' });
  return false;
}

function readMetricList(value: Located | undefined, list: string, context: AimsContext): ListedMetric[] {
  if (value === undefined) return [];
  const path = `tradeOff.${list}`;
  if (value.kind !== 'list') {
    const found = value.kind === 'map' ? 'a section' : clip(value.text) || 'nothing';
    context.issues.error(value.at, path, {
      expected: 'a list of metrics',
      found,
      hint: `Write "${list}: [${value.kind === 'text' && value.text !== '' ? clip(value.text) : ' … '}]".`,
    });
    return [];
  }
  return value.items.flatMap((item) => {
    if (item.kind !== 'text') {
      context.issues.error(item.at, path, {
        expected: 'the name of a metric',
        found: item.kind === 'map' ? 'a section' : 'a list',
        hint: 'Write names alone; sizes stand under resolution.',
      });
      return [];
    }
    const column = findMetric(item.text, item.at, path, context);
    return column === null ? [] : [{ column, list, at: item.at }];
  });
}

/** Sizes by objective; a name that is none is told only where the lists of objectives were read without mistakes. */
function readResolution(value: Located | undefined, objectives: readonly ListedMetric[], listsHold: boolean, issues: IssueList): Map<string, number> {
  const sizes = new Map<string, number>();
  if (value === undefined) return sizes;
  if (value.kind !== 'map') {
    issues.error(value.at, 'tradeOff.resolution', {
      expected: 'sizes by objective',
      found: value.kind === 'list' ? 'a list' : clip(value.text) || 'nothing',
      hint: 'Write "resolution: { stops.batteryEnergy: 2 Wh/km }".',
    });
    return sizes;
  }
  for (const { key, at, value: size } of value.entries) {
    const path = `tradeOff.resolution.${key}`;
    const objective = objectives.find(({ column }) => column.name === key);
    if (objective === undefined && !listsHold) continue;
    if (objective === undefined) {
      const names = objectives.map(({ column }) => column.name);
      const near = issues.nearest(key, names);
      issues.error(at, path, {
        expected: `an objective: ${names.join(', ') || 'none yet'}`,
        found: clip(key),
        hint: near === null ? 'Add it to minimise or maximise, or remove it here.' : `Did you mean ${near}?`,
      });
      continue;
    }
    const read = readLimit(objective.column, size, path, issues);
    if (read !== null && !(read > 0))
      issues.error(size.at, path, {
        expected: 'a size above zero',
        found: clip(size.kind === 'text' ? size.text : ''),
        hint: 'Leave the line out to see every design.',
      });
    else if (read !== null) sizes.set(key, read);
  }
  return sizes;
}
