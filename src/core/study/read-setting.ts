/** A figure set on the command line: `motor.peakTorque=300 N·m`, checked like the file it changes. */
import { formatQuantity } from '../units/format-quantity.ts';
import { nearestName } from '../units/nearest-name.ts';
import { readQuantity } from '../units/read-quantity.ts';
import { findParameter, type ParameterRow } from './catalogue/parameters.ts';
import { boundsMissed } from './read/bounds.ts';
import { matches, orders, ruledOutBy } from './rules/rules.ts';
import type { Study } from './study.ts';
import { clip } from './text/issue.ts';

/** A study with one figure set, and what was set (SI); or what is wrong with the setting, in one or two sentences. */
export type SettingRead =
  | { readonly ok: true; readonly study: Study; readonly name: string; readonly value: number }
  | { readonly ok: false; readonly message: string };

/**
 * Reads `name=value`: any number that has a figure in the study, within its bounds, and in order with the numbers that do not vary.
 * The study given is not changed; measured curves and maps keep the motor they state.
 */
export function readSetting(study: Study, text: string): SettingRead {
  const sign = text.lastIndexOf('=');
  if (sign < 1) return { ok: false, message: `${clip(text)}: write name=value, such as gearing.ratio=9.5.` };
  const [name, written] = [text.slice(0, sign).trim(), text.slice(sign + 1).trim()];
  const row = findParameter(name);
  const other = ruledOutBy(name, statedNames(study));
  if (row !== undefined && other !== undefined)
    return { ok: false, message: `${name} plays no part in this study beside ${other.by}: ${other.alternative.why}.` };
  if (row === undefined || study.values[name] === undefined) return { ok: false, message: unknownName(name, row, study) };
  const read = readQuantity(written, row.quantity);
  if (!read.ok) return { ok: false, message: `${name}: expected ${read.expected}, found ${read.found}. ${read.hint}`.trim() };
  const bounds = boundsMissed(row, read.value, read.unit);
  if (bounds !== null) return { ok: false, message: `${name}: expected ${bounds}, found ${clip(written)}. ${row.sentence}` };
  const values = { ...study.values, [name]: read.value };
  const disorder = firstDisorder(name, values, study);
  return disorder === null ? { ok: true, study: { ...study, values }, name, value: read.value } : { ok: false, message: disorder };
}

/** An option chosen by hand: the list, and the index of the option in it. */
export interface OptionChoice {
  readonly list: string;
  readonly point: number;
}

/** Reads `list=option`; null where the text names no list of the study: it is a figure then. */
export function readChoice(
  study: Study,
  text: string,
): { readonly ok: true; readonly choice: OptionChoice } | { readonly ok: false; readonly message: string } | null {
  const sign = text.indexOf('=');
  const [list, option] = [text.slice(0, Math.max(0, sign)).trim(), text.slice(sign + 1).trim()];
  const lists = study.axes.filter(({ labels }) => labels !== null);
  const axis = lists.find(({ name }) => name === list);
  if (axis === undefined) {
    const near =
      findParameter(list) === undefined
        ? nearestName(
            list,
            lists.map(({ name }) => name),
          )
        : null;
    return near === null ? null : { ok: false, message: `${clip(list)} is neither a number nor a list of options. Did you mean ${near}?` };
  }
  const labels = axis.labels ?? [];
  const point = labels.indexOf(option);
  if (point >= 0) return { ok: true, choice: { list, point } };
  const near = nearestName(option, labels);
  const hint = near === null ? `There are ${clip(labels.slice(0, 12).join(', '), 200)}.` : `Did you mean ${near}?`;
  return { ok: false, message: `${list}: expected one of its options, found ${clip(option) || 'nothing'}. ${hint}` };
}

/** What the study states, as the rules name it: numbers, and the texts and files that stand for some. */
function statedNames({ values, fullLoad, lossMap, trials }: Study): string[] {
  const measured = [
    ...(fullLoad === null ? [] : ['motor.fullLoad.file']),
    ...(lossMap === null ? [] : [lossMap.motorAlone ? 'motor.map.motorAlone' : 'motor.map.wholeDrive']),
  ];
  const roads = trials.filter(({ road }) => road !== null).map(({ name }) => `trials.${name}.road`);
  return [...Object.keys(values), ...measured, ...roads];
}

function unknownName(name: string, row: ParameterRow | undefined, { values }: Study): string {
  if (row !== undefined && !name.startsWith('trials.')) return `${name} has no figure in this study; state it in the file first.`;
  if (name === 'vehicle.tyre') return 'vehicle.tyre is no number; set vehicle.wheelRadius instead.';
  const near = nearestName(name, Object.keys(values));
  return `${clip(name)} is no number of this study.${near === null ? ' Names are those of the file, section by section, with dots between.' : ` Did you mean ${near}?`}`;
}

function firstDisorder(name: string, values: Study['values'], study: Study): string | null {
  const varied = new Set(study.axes.flatMap(({ sets }) => sets));
  for (const { less, more, equal, why } of orders) {
    if (!matches(less, name) && !matches(more, name)) continue;
    const trial = /^trials\.[^.]*\./u.exec(name)?.[0] ?? '';
    const [lower, upper] = [less.replace('trials.*.', trial), more.replace('trials.*.', trial)];
    const [low, high] = [values[lower], values[upper]];
    const another = lower === name ? upper : lower;
    if (low === undefined || high === undefined || varied.has(another) || low < high || (equal && low === high)) continue;
    const bound = lower === name ? (equal ? 'at most' : 'below') : equal ? 'at least' : 'above';
    return `${name}: expected ${bound} ${another} (${shown(another, values, study)}), found ${shown(name, values, study)}; ${why}.`;
  }
  return null;
}

function shown(name: string, values: Study['values'], { report }: Study): string {
  const { quantity, decimals } = findParameter(name) as ParameterRow;
  return formatQuantity(values[name] as number, quantity, { decimals, system: report.units });
}
