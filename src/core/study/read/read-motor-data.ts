/** CSV -> a motor's measured full-load curve, or its measured map of losses (or efficiency, turned into losses at the nodes). */
import { type FullLoadCurve, fullLoadCurve } from '../../vehicle/full-load-curve.ts';
import { type LossMap, lossOfEfficiencyW } from '../../vehicle/loss-map.ts';
import { type CsvTable, cellAt, cellText, columnToSi, findColumn, readColumn, readCsv } from '../text/csv-table.ts';
import { type Issue, IssueList } from '../text/issue.ts';
import type { coverings } from './layout.ts';
import { readGrid } from './read-grid.ts';
import { checkRising, checkRowCount } from './read-trace.ts';

/** Peak torque and base speed of the motor that was measured, SI. */
export interface ReferenceMotor {
  readonly peakTorqueNm: number;
  readonly baseSpeedRadPerS: number;
}

/** What a map covers. */
export type Covering = (typeof coverings)[number];

/**
 * A full-load curve: `speed_rpm,torque_Nm`, speeds rising from 0 or more, torques not negative. Its reference motor is taken from the
 * points: the largest torque, and the largest power over it.
 */
export function readFullLoad(csvText: string, name: string): { ok: true; data: FullLoadCurve } | { ok: false; problems: Issue[] } {
  const issues = new IssueList(name, csvText);
  const table = readCsv(csvText, 'speed_rpm,torque_Nm', issues);
  const speed = table && findColumn(table, [{ base: 'speed', quantity: 'rotationalSpeed' }], issues);
  const torque = table && findColumn(table, [{ base: 'torque', quantity: 'torque' }], issues);
  if (table === null || speed === null || torque === null) return { ok: false, problems: issues.list('error') };
  const speedsRadPerS = columnToSi(readColumn(table, speed, issues), speed.unit);
  const torquesNm = columnToSi(readColumn(table, torque, issues), torque.unit);
  checkRowCount(table, issues);
  checkRising(table, speedsRadPerS, speed, issues);
  checkNotNegative(table, speedsRadPerS, speed, issues);
  checkNotNegative(table, torquesNm, torque, issues);
  if (!issues.failed && !torquesNm.some((value, row) => value * (speedsRadPerS[row] as number) > 0)) {
    issues.error(table.head.at, '', { expected: 'a torque above zero at a speed above zero', found: 'no power at any point', hint: 'Check the columns.' });
  }
  if (issues.failed) return { ok: false, problems: issues.list('error') };
  return { ok: true, data: fullLoadCurve(speedsRadPerS, torquesNm) };
}

function checkNotNegative(table: CsvTable, values: readonly number[], column: { index: number; head: string }, issues: IssueList): void {
  values.forEach((value, row) => {
    if (!(value < 0)) return;
    const line = table.rows[row] as CsvTable['head'];
    issues.error(cellAt(line, column.index), column.head, {
      expected: `${column.head} of at least 0`,
      found: cellText(line, column.index) ?? '',
      hint: 'Keep the motoring side only.',
    });
  });
}

/** What the file says its map covers (`# covers: motor and inverter`), or null; 'unknown' for other words. */
export function declaredCovering(notes: readonly string[]): Covering | 'unknown' | null {
  const words = notes.map((note) => /^covers\s*:\s*(.*)$/iu.exec(note)?.[1]?.trim().toLowerCase()).find((text) => text !== undefined);
  if (words === undefined) return null;
  return words === 'motor' || words === 'motor and inverter' ? words : 'unknown';
}

/** A map as read, before anything is known of its motor. */
export interface MapData {
  readonly map: Omit<LossMap, 'motorAlone' | 'referencePeakTorqueNm' | 'referenceBaseSpeedRadPerS'>;
  readonly covers: Covering | 'unknown' | null;
  /** Losses in three columns: the plain form that may leave open what it covers. */
  readonly plain: boolean;
  /** Largest efficiency of an efficiency map; NaN otherwise. */
  readonly bestEfficiency: number;
}

/**
 * A loss map on a full grid. In long form a row per node, `speed_rpm,torque_Nm,loss_W` (or loss_kW, efficiency_pct, efficiency), sorted by
 * speed then torque or the other way round; or as a table whose corner cell says so, `loss_W by speed_rpm and torque_Nm`: torques along
 * the first row, speeds down the first column. An efficiency e becomes the loss T·ω(1/e − 1) motoring and |T|·ω(1 − e) generating; such a map
 * has no node at zero speed or torque.
 */
export function readLossMap(csvText: string, name: string): { ok: true; data: MapData } | { ok: false; problems: Issue[] } {
  const issues = new IssueList(name, csvText);
  const table = readCsv(csvText, 'speed_rpm,torque_Nm,loss_W', issues);
  const grid = table && readGrid(table, issues);
  if (table === null || grid === null || issues.failed) return { ok: false, problems: issues.list('error') };
  const { speedsRadPerS, torquesNm, values, efficiency, nodeAt } = grid;
  const lossesW = values.map((value, node) => {
    const speed = speedsRadPerS[Math.floor(node / torquesNm.length)] as number;
    const torque = torquesNm[node % torquesNm.length] as number;
    const problem = efficiency ? efficiencyProblem(value, speed, torque) : lossProblem(value);
    if (problem !== null) issues.error(nodeAt(node), grid.head, problem);
    return efficiency ? lossOfEfficiencyW(torque, speed, value) : value;
  });
  if (issues.failed) return { ok: false, problems: issues.list('error') };
  const map = { speedsRadPerS, torquesNm, lossesW, motoringOnly: torquesNm.every((torque) => torque >= 0) };
  const bestEfficiency = efficiency ? largest(values) : Number.NaN;
  return { ok: true, data: { map, covers: declaredCovering(table.notes), plain: !efficiency && grid.long, bestEfficiency } };
}

function efficiencyProblem(efficiency: number, speed: number, torque: number) {
  if (speed === 0 || torque === 0) {
    const found = `a node at zero ${speed === 0 ? 'speed' : 'torque'}`;
    return {
      expected: 'an efficiency map that starts above zero speed and torque',
      found,
      hint: 'Leave that row out: no power passes there. Or give losses instead of efficiency.',
    };
  }
  if (efficiency > 0 && efficiency <= 1) return null;
  return {
    expected: 'an efficiency above 0 and at most 100 %',
    found: `${Number((efficiency * 100).toPrecision(6))} %`,
    hint: 'Check the unit in the head: efficiency_pct in percent, efficiency as a fraction.',
  };
}

function lossProblem(loss: number) {
  return loss >= 0 ? null : { expected: 'a loss of at least 0', found: `${loss} W`, hint: 'Losses count positive in both quadrants.' };
}

function largest(values: readonly number[]): number {
  return values.reduce((most, value) => Math.max(most, value), Number.NEGATIVE_INFINITY);
}
