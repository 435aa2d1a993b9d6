/** The measured curve and map that a study names: reads the files, and settles what they cover and which motor they state. */
import type { FullLoadCurve } from '../../vehicle/full-load-curve.ts';
import type { LossMap } from '../../vehicle/loss-map.ts';
import { clip, type Issue, type IssueList } from '../text/issue.ts';
import { type Covering, type MapData, type ReferenceMotor, readFullLoad, readLossMap } from './read-motor-data.ts';
import type { Found } from './read-places.ts';
import type { StudySources } from './read-trials.ts';

/** A measured map with what it brings along. */
export interface MeasuredMap {
  readonly file: string;
  readonly data: MapData['map'];
  readonly motorAlone: boolean;
  readonly stated: Partial<ReferenceMotor>;
  readonly bestEfficiency: number;
  readonly at: number;
}

/** The measured files of one study, each read once; its mistakes are told once, however many options name it. */
export interface MotorFiles {
  curve(file: NamedFile, issues: IssueList): FullLoadCurve | null;
  map(file: NamedFile, issues: IssueList): MapData | null;
}

/** A file as the study names it. */
interface NamedFile {
  readonly name: string;
  readonly at: number;
  readonly path: string;
}

/** Reads measured files from the study's sources. */
export function createMotorFiles(sources: StudySources): MotorFiles {
  const once = <Data>(read: (csv: string, name: string) => { readonly ok: true; readonly data: Data } | { readonly ok: false; readonly problems: Issue[] }) => {
    const known = new Map<string, Data | null>();
    return (file: NamedFile, issues: IssueList): Data | null => {
      const before = known.get(file.name);
      if (before !== undefined) return before;
      const csv = fileText(file, sources, issues);
      if (csv === null) return null;
      const result = read(csv, file.name);
      if (!result.ok) issues.take(result.problems);
      const data = result.ok ? result.data : null;
      known.set(file.name, data);
      return data;
    };
  };
  return {
    curve: once(readFullLoad),
    map: once(readLossMap),
  };
}

/** The full-load curve of a study at the motor it states, or null where it has none or cannot be read. */
export function readStudyFullLoad(found: Found, files: MotorFiles, issues: IssueList): FullLoadCurve | null {
  const file = namedFile('motor.fullLoad', found, issues);
  const curve = file && files.curve(file, issues);
  if (curve === null) return null;
  const { peakTorqueNm, baseSpeedRadPerS } = statedMotor('motor.fullLoad', found);
  return {
    ...curve,
    referencePeakTorqueNm: peakTorqueNm ?? curve.referencePeakTorqueNm,
    referenceBaseSpeedRadPerS: baseSpeedRadPerS ?? curve.referenceBaseSpeedRadPerS,
  };
}

/** The map of a study; what it covers is put among the names that stand, so that losses beside it are told. */
export function readStudyMap(found: Found, files: MotorFiles, issues: IssueList): MeasuredMap | null {
  const text = namedFile('motor.map', found, issues);
  const data = text && files.map(text, issues);
  if (text === null || data === null) return null;
  const covers = coveringOf(data, found, text, issues);
  if (covers === null) return null;
  found.stands.set(covers === 'motor' ? 'motor.map.motorAlone' : 'motor.map.wholeDrive', text.at);
  if (covers === 'motor') checkInverterLosses(found, text.at, issues);
  return {
    file: text.name,
    data: data.map,
    motorAlone: covers === 'motor',
    stated: statedMotor('motor.map', found),
    bestEfficiency: data.bestEfficiency,
    at: text.at,
  };
}

/** The map at its reference motor: what it states, else the study's own before anything is varied. */
export function lossMapOf(measured: MeasuredMap, values: Readonly<Record<string, number>>): LossMap {
  const { data, motorAlone, stated } = measured;
  const referencePeakTorqueNm = stated.peakTorqueNm ?? (values['motor.peakTorque'] as number);
  const referenceBaseSpeedRadPerS = stated.baseSpeedRadPerS ?? (values['motor.baseSpeed'] as number);
  return { ...data, motorAlone, referencePeakTorqueNm, referenceBaseSpeedRadPerS };
}

function namedFile(path: string, found: Found, issues: IssueList): NamedFile | null {
  const at = found.stands.get(path);
  if (at === undefined) return null;
  const named = found.texts.get(`${path}.file`);
  if (named !== undefined) return { name: named.text, at: named.at, path: `${path}.file` };
  if (!found.stands.has(`${path}.file`))
    issues.error(at, `${path}.file`, { expected: 'the name of a CSV file', found: 'no file', hint: 'Add "file: data/some-file.csv".' });
  return null;
}

function fileText({ name, at, path }: NamedFile, sources: StudySources, issues: IssueList): string | null {
  const file = sources.file(name);
  if ('text' in file) return file.text;
  issues.error(at, path, { expected: 'a CSV file', found: `${clip(name)}: ${file.problem}`, hint: 'Paths start at the folder of the study file.' });
  return null;
}

function statedMotor(path: string, { figures }: Found): Partial<ReferenceMotor> {
  const peakTorqueNm = figures.get(`${path}.peakTorque`)?.value;
  const baseSpeedRadPerS = figures.get(`${path}.baseSpeed`)?.value;
  return { ...(peakTorqueNm === undefined ? {} : { peakTorqueNm }), ...(baseSpeedRadPerS === undefined ? {} : { baseSpeedRadPerS }) };
}

function coveringOf(data: MapData, found: Found, { name, at }: NamedFile, issues: IssueList): Covering | null {
  const inStudy = found.texts.get('motor.map.covers');
  const expected = 'what the map covers: motor, or motor and inverter';
  if (data.covers === 'unknown') {
    issues.error(at, 'motor.map', {
      expected,
      found: `other words after "# covers:" in ${name}`,
      hint: 'Write "# covers: motor" or "# covers: motor and inverter" in the CSV file.',
    });
    return null;
  }
  if (inStudy !== undefined && data.covers !== null && inStudy.text !== data.covers) {
    issues.error(inStudy.at, 'motor.map.covers', {
      expected: `${data.covers}, as ${name} says of itself`,
      found: inStudy.text,
      hint: 'Correct one of the two.',
    });
    return null;
  }
  const covers = data.covers ?? (inStudy?.text as Covering | undefined);
  if (covers !== undefined) return covers;
  if (found.stands.has('motor.map.covers')) return null;
  const hint = `Write "map: { file: ${clip(name)}, covers: motor and inverter }", or "# covers: motor and inverter" above the head of the CSV file.`;
  if (!data.plain) {
    issues.error(at, 'motor.map', { expected, found: 'no word of it', hint });
    return null;
  }
  const silence = 'no word of it: the losses are taken as those of motor and inverter together';
  issues.warn(at, 'motor.map', { rule: 'what a map covers', expected, found: silence, hint });
  return 'motor and inverter';
}

function checkInverterLosses({ stands }: Found, at: number, issues: IssueList): void {
  const own = ['inverterFixed', 'inverterLinear', 'inverterSquare'];
  if (own.some((key) => stands.has(`motor.losses.${key}`))) return;
  issues.error(at, 'motor.losses', {
    expected: `the inverter's losses beside a map of the motor alone: ${own.join(', ')}`,
    found: 'none',
    hint: 'Add them under motor: "losses: { inverterFixed: …, inverterLinear: …, inverterSquare: … }".',
  });
}
