/** The layout of a study file: which names stand in which section, made from the tables of parameters and from the few texts that are no numbers. */
import { type ParameterRow, parameters, type TrialParameter, trialParameters } from '../catalogue/parameters.ts';
import { type TrialKind, trialKindRow, trialKinds } from '../catalogue/trial-kinds.ts';

/** One text of the study file (not a number). */
export interface TextRow {
  /** Dotted name. */
  readonly name: string;
  readonly sentence: string;
  /** The words it may be; any text where absent. */
  readonly choices?: readonly string[];
  readonly longest?: number;
}

/** A part of the file that has its own reader; the layout only knows that it may stand there. */
export interface FreeRow {
  readonly name: string;
  readonly sentence: string;
}

/** One place of the file: a number, a text, a section of further places, or several of these (a figure or a section). */
export interface Place {
  readonly path: string;
  readonly children: Map<string, Place>;
  parameter: ParameterRow | null;
  text: TextRow | null;
  free: FreeRow | null;
}

/** What a map says of itself. */
export const coverings = ['motor', 'motor and inverter'] as const;
/** The driven axles. */
export const drivenAxles = ['front', 'rear', 'all'] as const;

/** Texts outside the trials. */
export const studyTexts: readonly TextRow[] = [
  { name: 'title', sentence: 'Title of the study, shown above every result.', longest: 120 },
  { name: 'about', sentence: 'What is to be decided, in a sentence or two.', longest: 2000 },
  { name: 'vehicle.tyre', sentence: 'Size of the driven tyres, such as 215/65 R16; the wheel radius follows from it.' },
  { name: 'vehicle.axles.driven', sentence: 'Which axle the motor drives.', choices: drivenAxles },
  { name: 'motor.fullLoad.file', sentence: 'CSV file of a measured full-load curve: speed_rpm,torque_Nm.' },
  { name: 'motor.map.file', sentence: 'CSV file of a measured map of losses or efficiency over speed and torque.' },
  { name: 'motor.map.covers', sentence: 'What the map covers; a map of the motor alone takes the inverter coefficients on top.', choices: coverings },
  { name: 'massAndCost.cost.currency', sentence: 'Currency of all costs, shown beside them.', longest: 12 },
  { name: 'report.units', sentence: 'Units that people read in report, sheet and charts.', choices: ['SI', 'US'] },
];

/** What a measured curve or map states of its own motor: numbers that are neither varied nor set. */
export const statedParameters: readonly ParameterRow[] = ['motor.fullLoad', 'motor.map'].flatMap((measured) =>
  parameters
    .filter(({ name }) => name === 'motor.peakTorque' || name === 'motor.baseSpeed')
    .map((parameter) => ({ ...parameter, name: parameter.name.replace('motor', measured), sentence: `${parameter.sentence} Of the motor that was measured.` })),
);

/** Parts with readers of their own. */
export const freeParts: readonly FreeRow[] = [
  { name: 'trials', sentence: 'What every design is put through, by name.' },
  { name: 'vary', sentence: 'Numbers that vary, by dotted name: a range or a list.' },
  { name: 'options', sentence: 'Named alternatives that set several numbers together.' },
  { name: 'search', sentence: 'How designs are chosen.' },
  { name: 'requirements', sentence: 'Limits on metrics that a design must meet to enter the front.' },
  { name: 'tradeOff', sentence: 'What is minimised and maximised, and how finely the front is shown.' },
];

/** Texts and free parts of trials; `kinds` where only some take them. */
const trialTexts: readonly (TextRow & { readonly kinds?: readonly TrialKind[]; readonly free?: true })[] = [
  { name: 'kind', sentence: 'Kind of the trial.', choices: Object.keys(trialKinds) },
  { name: 'cycle', sentence: 'A built-in cycle by name, or a CSV file: time_s and speed_kmh or speed_mph.', kinds: ['cycle'] },
  { name: 'road', sentence: 'CSV file of the grade: time_s,grade_pct or distance_m,grade_pct.', kinds: ['cycle'] },
  { name: 'rating', sentence: 'Which torque limit holds.', choices: ['peak', 'continuous'] },
  { name: 'with', sentence: 'Numbers of the study that this trial replaces for itself, by dotted name.', free: true },
];

/** The whole file. */
export const studyLayout: Place = layOut([...parameters, ...statedParameters], studyTexts, freeParts);

/** One trial of a kind. */
export function trialLayout(kind: TrialKind): Place {
  const { takes, rating } = trialKindRow(kind);
  const texts = trialTexts.filter(({ name, kinds }) => (kinds?.includes(kind) ?? true) && (name !== 'rating' || rating !== null));
  return layOut(
    takes.map((key) => trialParameters[key]),
    texts.filter(({ free }) => free === undefined),
    texts.filter(({ free }) => free !== undefined),
  );
}

/** Why a key of some trials has no place in a kind; null for a key that no trial has. */
export function whyNotTaken(kind: TrialKind, key: string): string | null {
  if (key === 'grade' && (kind === 'gradeability' || kind === 'hill start')) return `the grade is what a ${kind} trial finds`;
  if (key === 'rating') return 'a cycle always uses peak torque; watch its torque load and loss load instead';
  const known = key === 'trailer' || trialTexts.some(({ name }) => name === key) || Object.hasOwn(trialParameters, key);
  if (!known) return null;
  const kinds = (Object.keys(trialKinds) as TrialKind[]).filter((other) => trialLayout(other).children.has(key));
  return `${key} belongs to ${kinds.join(', ')}`;
}

/** Keys of the numbers a kind cannot do without. */
export function requiredKeys(kind: TrialKind): TrialParameter[] {
  return trialKindRow(kind).takes.filter((key) => (trialParameters[key] as ParameterRow).required === true);
}

function layOut(numbers: readonly ParameterRow[], texts: readonly TextRow[], free: readonly FreeRow[]): Place {
  const root = emptyPlace('');
  for (const row of numbers) placeOf(root, row.name).parameter = row;
  for (const row of texts) placeOf(root, row.name).text = row;
  for (const row of free) placeOf(root, row.name).free = row;
  return root;
}

function placeOf(root: Place, name: string): Place {
  let place = root;
  for (const key of name.split('.')) {
    const path = place.path === '' ? key : `${place.path}.${key}`;
    const next = place.children.get(key) ?? emptyPlace(path);
    place.children.set(key, next);
    place = next;
  }
  return place;
}

function emptyPlace(path: string): Place {
  return { path, children: new Map(), parameter: null, text: null, free: null };
}
