/** Which figures of a design a run stores and shows: varied inputs, objectives, required metrics, and what `keep` names. */
import { type MetricColumn, type MetricRow, machineKey } from '../study/catalogue/metrics.ts';
import { findParameter, type ParameterRow } from '../study/catalogue/parameters.ts';
import type { Axis, Study } from '../study/study.ts';
import { fromSi, machineUnit, type Quantity } from '../units/units.ts';

/** One stored column. `option` columns hold the index of the point on their axis, whose names are `labels`. */
export interface ResultColumn {
  /** Column name in parts and front.csv, with its unit: `gearing.ratio`, `motor.peakTorque_Nm`, `ramp.grade_pct`. */
  readonly key: string;
  /** Name in the study file: `motor.peakTorque`, `ramp.grade`, `motor on offer`. */
  readonly name: string;
  readonly role: 'input' | 'option' | 'metric';
  /** Meaningless for options. */
  readonly quantity: Quantity;
  readonly decimals: number;
  /** For axes and tables: `ramp: grade`, `peak torque`. */
  readonly label: string;
  readonly better: 'less' | 'more' | null;
  readonly labels: readonly string[] | null;
}

/** The columns of a study's results, inputs first; each metric once, in the order objectives, requirements, keep. */
export function resultColumns(study: Study, metrics: readonly MetricColumn[]): ResultColumn[] {
  const wanted = new Set([...study.objectives.map((o) => o.metric), ...study.requirements.map((r) => r.metric), ...study.keep]);
  const byName = new Map(metrics.map((column) => [column.name, column]));
  return [...study.axes.flatMap(inputColumns), ...[...wanted].map((name) => metricColumn(byName.get(name), name))];
}

/** Options are one column with their names; numbers that vary together (two ratios) have one each. */
function inputColumns({ name, sets, labels }: Axis): ResultColumn[] {
  if (labels !== null) return [{ key: name, name, role: 'option', quantity: 'number', decimals: 0, label: name, better: null, labels }];
  return sets.map((set) => {
    const { quantity, decimals, label } = findParameter(set) as ParameterRow;
    const shown = set.startsWith('trials.') ? set.slice('trials.'.length) : label;
    return { key: machineKey(set, quantity), name: set, role: 'input', quantity, decimals, label: shown, better: null, labels: null };
  });
}

/** The axis that a column of inputs or options belongs to; undefined for a metric. */
export function axisOf({ name, role }: Pick<ResultColumn, 'name' | 'role'>, { axes }: Pick<Study, 'axes'>): Axis | undefined {
  if (role === 'metric') return undefined;
  return axes.find((axis) => (role === 'option' ? axis.labels !== null && axis.name === name : axis.labels === null && axis.sets.includes(name)));
}

/**
 * A stored value as machine output gives it: in the machine unit of its quantity, an option by its name, null where it does not
 * exist. Inputs are rounded to 15 digits, so that a figure typed in that unit comes back as typed; metrics keep every bit.
 */
export function machineValue({ role, quantity, labels }: Pick<ResultColumn, 'role' | 'quantity' | 'labels'>, si: number): number | string | null {
  if (role === 'option') return labels?.[si] ?? null;
  if (Number.isNaN(si)) return null;
  const written = fromSi(si, machineUnit(quantity));
  return role === 'input' ? Number(written.toPrecision(15)) : written;
}

/** The same for a whole column of numbers; NaN stays NaN. */
export function machineValues(column: Pick<ResultColumn, 'role' | 'quantity' | 'labels'>, si: Float64Array): Float64Array {
  const written = new Float64Array(si.length);
  if (column.role === 'metric') {
    const unit = machineUnit(column.quantity);
    for (let i = 0; i < si.length; i++) written[i] = fromSi(si[i], unit);
    return written;
  }
  // Rounding goes by way of text, and inputs repeat: the points of an axis, often one after another.
  const known = new Map<number, number>();
  for (let i = 0; i < si.length; i++) {
    if (i > 0 && si[i] === si[i - 1]) {
      written[i] = written[i - 1];
      continue;
    }
    let value = known.get(si[i]);
    if (value === undefined) {
      value = (machineValue(column, si[i]) ?? Number.NaN) as number;
      known.set(si[i], value);
    }
    written[i] = value;
  }
  return written;
}

/** The label people read for a metric: the trial in front of it. */
export function metricLabel(trial: string | null, row: MetricRow): string {
  return trial === null ? row.label : `${trial}: ${row.label}`;
}

function metricColumn(column: MetricColumn | undefined, name: string): ResultColumn {
  if (column === undefined) throw new Error(`no metric named ${name}`);
  const { quantity, decimals, better } = column.row;
  return { key: column.key, name, role: 'metric', quantity, decimals, label: metricLabel(column.trial, column.row), better, labels: null };
}
