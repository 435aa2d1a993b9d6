/** Lists of options -> axes of the search: each option makes a study of its own, complete and in order, and its numbers are a point of the axis. */
import type { FullLoadCurve } from '../../vehicle/full-load-curve.ts';
import type { LossMap } from '../../vehicle/loss-map.ts';
import { parameters } from '../catalogue/parameters.ts';
import { checkOrders, checkRules } from '../rules/check-rules.ts';
import { checkTrialRules } from '../rules/check-trial-rules.ts';
import { matches, orders, ruledOutBy } from '../rules/rules.ts';
import type { Axis, OptionFile } from '../study.ts';
import { clip, type IssueList } from '../text/issue.ts';
import { givenUp, replaces, type StudyFound, studyWithOption } from './option-study.ts';
import { lossMapOf, type MotorFiles, readStudyFullLoad, readStudyMap } from './read-measured.ts';
import type { OptionFound, OptionList } from './read-options.ts';
import type { TrialFound } from './read-trials.ts';
import { referenceValues } from './reference-values.ts';
import { checkTyre } from './tyre-size.ts';

/** What options are set into. */
export interface OptionBase extends StudyFound {
  readonly fullLoad: FullLoadCurve | null;
  /** The reference design. */
  readonly values: Readonly<Record<string, number>>;
  readonly files: MotorFiles;
  readonly issues: IssueList;
  /** Names under `vary`. */
  readonly varied: ReadonlySet<string>;
  /** The rules hold for the study itself, so that what an option breaks is its own mistake. */
  readonly sound: boolean;
}

/** The axes with all that options bring. */
export interface OptionAxes {
  readonly axes: readonly Axis[];
  readonly curves: readonly OptionFile<FullLoadCurve>[];
  readonly maps: readonly OptionFile<LossMap>[];
  /** Largest efficiency in the efficiency maps among them; 0 without one. */
  readonly bestMapEfficiency: number;
}

interface Brought {
  readonly curves: OptionFile<FullLoadCurve>[];
  readonly maps: OptionFile<LossMap>[];
  bestMapEfficiency: number;
}

/** One option's study: every number of it, and which it states or gets from what it states. */
interface OptionStudy {
  readonly values: Readonly<Record<string, number>>;
  readonly stated: ReadonlySet<string>;
}

/** What options that state the same names have in common: most options of a list do. */
interface Shape {
  /** Names of the study that give way to them. */
  readonly gone: ReadonlySet<string>;
  /** All rules held for the first of them: for the others only the order of their figures is left to look at. */
  sound: boolean;
}

/** Shapes by the names that options state, made when first asked for. */
type Shapes = (stated: readonly string[]) => Shape;

function shapesOf(base: OptionBase): Shapes {
  const known = new Map<string, Shape>();
  return (stated) => {
    const key = stated.join('\n');
    const shape = known.get(key) ?? { gone: givenUp(base, stated), sound: false };
    known.set(key, shape);
    return shape;
  };
}

/** Makes an axis of every list, in their order. Mistakes go into the issues of the study, or of the files that options name. */
export function optionAxes(lists: readonly OptionList[], base: OptionBase): OptionAxes {
  const brought: Brought = { curves: [], maps: [], bestMapEfficiency: 0 };
  const axes = lists.map((list) => {
    const others = lists.filter((other) => other !== list).flatMap(namesOf);
    const varied = new Set([...base.varied, ...others]);
    const shapes = shapesOf(base);
    const studies = list.options.map((option) => optionStudy(option, `options.${list.name}.${option.name}`, { ...base, varied }, shapes, brought));
    warnOfGaps(list, base, shapes);
    return axisOf(list, studies, base);
  });
  return { axes, ...brought };
}

/** Every name that an option of the list states. */
export function namesOf({ options }: OptionList): string[] {
  return [...new Set(options.flatMap(({ found }) => [...found.stands.keys()]))];
}

function optionStudy({ at, found }: OptionFound, path: string, base: OptionBase, shapes: Shapes, brought: Brought): OptionStudy {
  const { issues } = base;
  checkTyre(found, `${path}.vehicle.tyre`, issues);
  const named = studyWithOption(base, found, shapes([...found.stands.keys()]).gone);
  const curve = found.stands.has('motor.fullLoad') ? readStudyFullLoad(named.found, base.files, issues) : null;
  const measured = found.stands.has('motor.map') ? readStudyMap(named.found, base.files, issues) : null;
  // Only the file says what it covers, and so which coefficients give way to it.
  if (measured !== null) found.stands.set(measured.motorAlone ? 'motor.map.motorAlone' : 'motor.map.wholeDrive', measured.at);
  const shape = shapes([...found.stands.keys()]);
  const own = measured === null ? named : studyWithOption(base, found, shape.gone);
  if (base.sound) checkOption({ at, found }, path, own, base, shape);
  const fullLoad = curve === null ? base.fullLoad : curveAtOption(curve, found, named.found);
  const values = referenceValues({ found: own.found, trials: own.trials, fullLoad });
  if (curve !== null && fullLoad !== null) values['motor.fullLoad'] = brought.curves.push({ file: fileOf(found, 'motor.fullLoad'), data: fullLoad }) - 1;
  if (measured !== null) {
    values['motor.map'] = brought.maps.push({ file: measured.file, data: lossMapOf(measured, values) }) - 1;
    brought.bestMapEfficiency = Math.max(brought.bestMapEfficiency, measured.bestEfficiency || 0);
  }
  return { values, stated: statedBy(found) };
}

function checkOption({ at, found }: Omit<OptionFound, 'name'>, path: string, own: StudyFound, { issues, varied }: OptionBase, shape: Shape): void {
  const pathOf = (name: string) => (found.stands.has(name) ? `${path}.${name}` : name);
  const check = { stated: own.found, issues, varied, only: null, base: null, pathOf, option: { at, path } };
  const trialCheck = { base: own.found, varied, issues, pathOf };
  if (shape.sound) {
    checkOrders(check);
    for (const trial of own.trials) if (hasOrder(trial)) checkTrialRules(trial, trialCheck, true);
    return;
  }
  const before = issues.errorCount;
  checkRules(check);
  for (const trial of own.trials) if (meets(trial, found)) checkTrialRules(trial, trialCheck);
  shape.sound = issues.errorCount === before;
}

/** Whether a trial's numbers can meet those of an option in a rule: by its `with`, its own numbers set, or its conditions beside the road load. */
function meets({ name, withStands }: TrialFound, { stands }: OptionFound['found']): boolean {
  return withStands.size > 0 || [...stands.keys()].some((own) => own.startsWith(`trials.${name}.`) || own.startsWith('vehicle.coastDown.'));
}

/** Whether a trial has numbers of its own that stand in an order with others. */
function hasOrder({ with: replaced, found }: TrialFound): boolean {
  return [...replaced.keys(), ...found.figures.keys()].some((name) => orders.some(({ less, more }) => matches(less, name) || matches(more, name)));
}

function fileOf({ texts }: OptionFound['found'], name: string): string {
  return texts.get(`${name}.file`)?.text ?? '';
}

/** A curve belongs to the motor it states, else to that of its option. */
function curveAtOption(curve: FullLoadCurve, option: OptionFound['found'], { figures }: OptionFound['found']): FullLoadCurve {
  const own = (key: string) => (figures.has(`motor.fullLoad.${key}`) ? undefined : option.figures.get(`motor.${key}`)?.value);
  return {
    ...curve,
    referencePeakTorqueNm: own('peakTorque') ?? curve.referencePeakTorqueNm,
    referenceBaseSpeedRadPerS: own('baseSpeed') ?? curve.referenceBaseSpeedRadPerS,
  };
}

/** Numbers that an option states, and those that follow from its curve or its tyre. */
function statedBy({ figures, stands }: OptionFound['found']): Set<string> {
  const names = new Set([...figures.keys()].filter((name) => !/^motor\.(?:fullLoad|map)\./u.test(name)));
  if (stands.has('motor.fullLoad')) for (const name of ['motor.fullLoad', 'motor.peakTorque', 'motor.baseSpeed']) names.add(name);
  if (stands.has('motor.map')) names.add('motor.map');
  if (stands.has('vehicle.tyre')) names.add('vehicle.wheelRadius');
  return names;
}

/** What options state comes first; then what gives way to one of them. Coefficients stay beside a map: they have no part in its design anyway. */
function axisOf({ name, options }: OptionList, studies: readonly OptionStudy[], { values: reference }: OptionBase): Axis {
  const stated = new Set(studies.flatMap((study) => [...study.stated]));
  const giveWay = Object.keys(reference).filter(
    (key) => !stated.has(key) && !key.startsWith('motor.losses.') && studies.some(({ values }) => values[key] === undefined),
  );
  const sets = [...stated, ...giveWay];
  const points = studies.map(({ values }) => sets.map((key) => values[key] ?? Number.NaN));
  return { name, sets, points, labels: options.map((option) => option.name), range: null };
}

/** Options are compared: what some state and another leaves to the study may be a slip. An option that states nothing is the study's own. */
function warnOfGaps({ name, options }: OptionList, { values, issues }: OptionBase, shapes: Shapes): void {
  const all = new Set(options.flatMap(({ found }) => [...found.stands.keys()].filter(isSetting)));
  const open = options.map(({ found }) => opennessOf([...found.stands.keys()], Object.keys(values), shapes));
  for (const wanted of all) {
    const without = options.filter((_, index) => open[index]?.(wanted));
    const [first] = without;
    if (first === undefined) continue;
    const named = without.slice(0, 3).map((option) => clip(option.name, 40));
    const found = `${named.join(', ')}${without.length > 3 ? ` and ${without.length - 3} more` : ''} without ${wanted}: what the study itself says holds`;
    const expected = 'options of one list that set the same numbers';
    const hint = 'Set it in every option of the list, so that it is plain what is compared.';
    issues.warn(first.at, `options.${name}`, { rule: 'uneven options', expected, found, hint });
  }
}

function isSetting(name: string): boolean {
  return parameters.some((row) => row.name === name) || name.startsWith('trials.') || ['motor.fullLoad', 'motor.map', 'vehicle.tyre'].includes(name);
}

/** Whether an option leaves a number to the study: it does not state it, and the number has a part to play beside what it states. */
function opennessOf(stated: readonly string[], reference: readonly string[], shapes: Shapes): (wanted: string) => boolean {
  const { gone } = shapes(stated);
  const kept = reference.filter((name) => !gone.has(name));
  return (wanted) => stated.length > 0 && !stated.includes(wanted) && !stated.some((own) => replaces(own, wanted)) && ruledOutBy(wanted, kept) === undefined;
}
