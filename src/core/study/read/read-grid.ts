/** The grid of a measured map from CSV, in long form or as a table: axes rising strictly, every node there once. */
import { quantityRow, toSi, type Unit } from '../../units/units.ts';
import { type CsvColumn, type CsvLine, type CsvTable, cellAt, cellText, columnToSi, findColumn, headsOf, readCell, readColumn } from '../text/csv-table.ts';
import { clip, type IssueList } from '../text/issue.ts';

/** A full grid; `values[i * torques + j]` belongs to speed i and torque j. */
export interface Grid {
  readonly speedsRadPerS: readonly number[];
  readonly torquesNm: readonly number[];
  /** Losses in W, or efficiencies as fractions. */
  readonly values: readonly number[];
  readonly efficiency: boolean;
  /** A row per node, not a table. */
  readonly long: boolean;
  /** Head of the values. */
  readonly head: string;
  /** Offset of a node's cell. */
  nodeAt(node: number): number;
}

const speedColumn: CsvColumn = { base: 'speed', quantity: 'rotationalSpeed' };
const torqueColumn: CsvColumn = { base: 'torque', quantity: 'torque' };
const valueColumns: readonly CsvColumn[] = [
  { base: 'loss', quantity: 'auxiliaryPower' },
  { base: 'efficiency', quantity: 'share' },
  { base: 'efficiency', quantity: 'number' },
];
const TABLE_CORNER = /^(\S+) by (\S+) and (\S+)$/u;

/** Reads a grid; null with issues that name the cells. */
export function readGrid(table: CsvTable, issues: IssueList): Grid | null {
  const corner = cellText(table.head, 0) ?? '';
  return / by /u.test(corner) ? readTable(table, corner, issues) : readLong(table, issues);
}

function readLong(table: CsvTable, issues: IssueList): Grid | null {
  const speed = findColumn(table, [speedColumn], issues);
  const torque = findColumn(table, [torqueColumn], issues);
  const value = findColumn(table, valueColumns, issues);
  if (speed === null || torque === null || value === null) return null;
  const speeds = readColumn(table, speed, issues);
  const torques = readColumn(table, torque, issues);
  const written = readColumn(table, value, issues);
  if (issues.failed || !sorted(table, speeds, torques, issues)) return null;
  const [speedAxis, torqueAxis] = [axisOf(speeds), axisOf(torques)];
  if (!axesLongEnough(table.head.at, speedAxis, torqueAxis, issues)) return null;
  if (!((speedAxis[0] as number) >= 0))
    issues.error(table.rows[0]?.at ?? 0, speed.head, {
      expected: 'speeds of at least 0',
      found: `${speedAxis[0]}`,
      hint: 'A map is stated for one sense of rotation.',
    });
  const rowOf = nodesOf(table, speeds, torques, speedAxis, torqueAxis, issues);
  if (issues.failed) return null;
  return {
    speedsRadPerS: columnToSi(speedAxis, speed.unit),
    torquesNm: columnToSi(torqueAxis, torque.unit),
    values: rowOf.map((row) => toSi(written[row] as number, value.unit)),
    efficiency: value.base === 'efficiency',
    long: true,
    head: value.head,
    nodeAt: (node) => cellAt(table.rows[rowOf[node] as number] as CsvLine, value.index),
  };
}

/** Rows in the order of one axis, then the other: an order that jumps about hides a slip of the pen. */
function sorted(table: CsvTable, speeds: readonly number[], torques: readonly number[], issues: IssueList): boolean {
  const firstFall = (outer: readonly number[], inner: readonly number[]) =>
    outer.findIndex(
      (value, row) => row > 0 && (value < (outer[row - 1] as number) || (value === outer[row - 1] && (inner[row] as number) < (inner[row - 1] as number))),
    );
  const [bySpeed, byTorque] = [firstFall(speeds, torques), firstFall(torques, speeds)];
  if (bySpeed < 0 || byTorque < 0) return true;
  const row = Math.max(bySpeed, byTorque);
  const line = table.rows[row] as CsvLine;
  const found = `speed ${speeds[row]} with torque ${torques[row]} after speed ${speeds[row - 1]} with torque ${torques[row - 1]}`;
  issues.error(line.at, '', {
    expected: 'rows sorted by speed and then torque, both rising',
    found,
    hint: 'Sort the rows, or correct the figure that is out of place.',
  });
  return false;
}

function axisOf(values: readonly number[]): number[] {
  return [...new Set(values)].sort((a, b) => a - b);
}

function axesLongEnough(at: number, speeds: readonly number[], torques: readonly number[], issues: IssueList): boolean {
  if (speeds.length >= 2 && torques.length >= 2) return true;
  issues.error(at, '', {
    expected: 'at least two speeds and two torques',
    found: `${speeds.length} and ${torques.length}`,
    hint: 'Losses are interpolated on a grid: add the missing rows.',
  });
  return false;
}

/** Row of each node; issues for nodes that are missing or come twice. */
function nodesOf(
  table: CsvTable,
  speeds: readonly number[],
  torques: readonly number[],
  speedAxis: readonly number[],
  torqueAxis: readonly number[],
  issues: IssueList,
): number[] {
  const [speedIndex, torqueIndex] = [speedAxis, torqueAxis].map((axis) => new Map(axis.map((value, index) => [value, index]))) as [
    Map<number, number>,
    Map<number, number>,
  ];
  const size = speedAxis.length * torqueAxis.length;
  if (size > 4 * table.rows.length + 100) {
    issues.error(table.head.at, '', {
      expected: 'a regular grid: the same torques at every speed',
      found: `${speedAxis.length} speeds and ${torqueAxis.length} torques in ${table.rows.length} rows`,
      hint: 'Bring the measured points onto a grid first.',
    });
    return [];
  }
  const rowOf = new Array<number>(size).fill(-1);
  table.rows.forEach((line, row) => {
    const node = (speedIndex.get(speeds[row] as number) as number) * torqueAxis.length + (torqueIndex.get(torques[row] as number) as number);
    if (rowOf[node] === -1) rowOf[node] = row;
    else
      issues.error(line.at, '', {
        expected: 'each node once',
        found: `speed ${speeds[row]}, torque ${torques[row]} again, after line ${issues.lineOf(table.rows[rowOf[node] as number]?.at ?? 0)}`,
        hint: 'Keep one of the two rows.',
      });
  });
  rowOf.forEach((row, node) => {
    if (row >= 0) return;
    const [speed, torque] = [speedAxis[Math.floor(node / torqueAxis.length)], torqueAxis[node % torqueAxis.length]];
    const found = `none at speed ${speed}, torque ${torque}`;
    issues.error(table.head.at, '', { expected: 'a row for every speed with every torque', found, hint: 'Add the row; the map needs a full grid.' });
  });
  return rowOf;
}

function readTable(table: CsvTable, corner: string, issues: IssueList): Grid | null {
  const units = cornerUnits(table, corner, issues);
  if (units === null) return null;
  const width = table.head.cells.length;
  const torques = Array.from({ length: width - 1 }, (_, index) => readCell(table.head, index + 1, 'the first row of torques', issues));
  const speeds = table.rows.map((line) => readCell(line, 0, 'the first column of speeds', issues));
  const written = table.rows.flatMap((line) => torques.map((_, index) => readCell(line, index + 1, units.head, issues)));
  if (!axesLongEnough(table.head.at, speeds, torques, issues)) return null;
  checkAxis(torques, 'torque', (index) => cellAt(table.head, index + 1), issues);
  checkAxis(speeds, 'speed', (index) => (table.rows[index] as CsvLine).at, issues);
  if ((speeds[0] as number) < 0)
    issues.error(table.rows[0]?.at ?? 0, '', { expected: 'speeds of at least 0', found: `${speeds[0]}`, hint: 'A map is stated for one sense of rotation.' });
  if (issues.failed) return null;
  return {
    speedsRadPerS: columnToSi(speeds, units.speed),
    torquesNm: columnToSi(torques, units.torque),
    values: columnToSi(written, units.value),
    efficiency: units.efficiency,
    long: false,
    head: units.head,
    nodeAt: (node) => cellAt(table.rows[Math.floor(node / torques.length)] as CsvLine, (node % torques.length) + 1),
  };
}

function cornerUnits(table: CsvTable, corner: string, issues: IssueList): { value: Unit; speed: Unit; torque: Unit; efficiency: boolean; head: string } | null {
  const [, head = '', speedHead = '', torqueHead = ''] = TABLE_CORNER.exec(corner) ?? [];
  const unitOf = (column: CsvColumn, name: string) => headsOf(column).find((choice) => choice.head === name)?.unit;
  const valueColumn = valueColumns.find((column) => unitOf(column, head) !== undefined);
  const [speed, torque] = [unitOf(speedColumn, speedHead), unitOf(torqueColumn, torqueHead)];
  if (valueColumn !== undefined && speed !== undefined && torque !== undefined) {
    return { value: unitOf(valueColumn, head) as Unit, speed, torque, efficiency: valueColumn.base === 'efficiency', head };
  }
  const speedUnits = quantityRow('rotationalSpeed').units.map(({ suffix }) => `speed_${suffix}`);
  const hint = 'Torques stand along the first row and speeds down the first column; the corner cell says so.';
  issues.error(table.head.at, '', { expected: `a corner cell such as loss_W by ${speedUnits[0]} and torque_Nm`, found: clip(corner), hint });
  return null;
}

function checkAxis(values: readonly number[], noun: string, at: (index: number) => number, issues: IssueList): void {
  values.forEach((value, index) => {
    const before = values[index - 1];
    if (before === undefined || value > before || Number.isNaN(value) || Number.isNaN(before)) return;
    issues.error(at(index), '', { expected: `the ${noun} axis rising`, found: `${value} after ${before}`, hint: 'Sort the axis, and its losses with it.' });
  });
}
