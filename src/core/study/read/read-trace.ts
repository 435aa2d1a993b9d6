/** CSV -> the speed trace of a cycle, or the grade of a road; whatever cannot have been driven is refused with its line. */

import type { RoadProfile, SpeedTrace } from '../study.ts';
import { type CsvTable, cellAt, columnToSi, findColumn, readColumn, readCsv } from '../text/csv-table.ts';
import { type Issue, IssueList } from '../text/issue.ts';

/** Faster than any road vehicle of a study: a slip of units. */
const ABSURD_SPEED_M_PER_S = 450 / 3.6;
/**
 * A longer step whose ends differ in speed hides how the vehicle got from one to the other (a gap in a recording). A long step at one
 * speed is a steady stretch, and standing is standing: both are fully told by their ends.
 */
const LONGEST_CHANGE_S = 60;
const STEEPEST_GRADE = 1;

/**
 * A speed trace from CSV: lines `# …` are notes (the source first), the head `time_s,speed_kmh` (or speed_mph, speed_m_per_s), then a row per time.
 * Refused: missing columns, gaps, time that stands still or runs backwards, a negative speed or one above 450 km/h, a change of
 * speed within one step of more than 60 s, fewer than two rows, a trace that never moves.
 */
export function readTrace(csvText: string, name: string): { ok: true; trace: SpeedTrace } | { ok: false; problems: Issue[] } {
  const issues = new IssueList(name, csvText);
  const table = readCsv(csvText, 'time_s,speed_kmh', issues);
  const time = table && findColumn(table, [{ base: 'time', quantity: 'time' }], issues);
  const speed = table && findColumn(table, [{ base: 'speed', quantity: 'speed' }], issues);
  if (table === null || time === null || speed === null) return { ok: false, problems: issues.list('error') };
  const timesS = columnToSi(readColumn(table, time, issues), time.unit);
  const written = readColumn(table, speed, issues);
  const speedsMPerS = columnToSi(written, speed.unit);
  checkRowCount(table, issues);
  checkRising(table, timesS, time, issues);
  checkSpeeds(table, speedsMPerS, speed, issues);
  checkGaps(table, timesS, speedsMPerS, time, issues);
  if (!issues.failed && speedsMPerS.every((value) => value === 0)) {
    issues.error(cellAt(table.head, speed.index), speed.head, {
      expected: 'a trace that moves',
      found: 'zero speed in every row',
      hint: 'Check the column of speeds.',
    });
  }
  if (issues.failed) return { ok: false, problems: issues.list('error') };
  return { ok: true, trace: { name, timesS, speedsMPerS, notes: table.notes } };
}

/** A road profile from CSV: `time_s,grade_pct` or `distance_m,grade_pct`; places rising strictly, grades from −100 % to 100 %. */
export function readRoad(csvText: string, name: string): { ok: true; road: RoadProfile } | { ok: false; problems: Issue[] } {
  const issues = new IssueList(name, csvText);
  const table = readCsv(csvText, 'distance_m,grade_pct', issues);
  const place =
    table &&
    findColumn(
      table,
      [
        { base: 'distance', quantity: 'distance' },
        { base: 'time', quantity: 'time' },
      ],
      issues,
    );
  const grade = table && findColumn(table, [{ base: 'grade', quantity: 'grade' }], issues);
  if (table === null || place === null || grade === null) return { ok: false, problems: issues.list('error') };
  const at = columnToSi(readColumn(table, place, issues), place.unit);
  const grades = columnToSi(readColumn(table, grade, issues), grade.unit);
  checkRowCount(table, issues);
  checkRising(table, at, place, issues);
  grades.forEach((value, row) => {
    if (Math.abs(value) <= STEEPEST_GRADE || Number.isNaN(value)) return;
    const line = table.rows[row] as CsvTable['head'];
    issues.error(cellAt(line, grade.index), grade.head, {
      expected: 'a grade from −100 % to 100 %',
      found: `${Number((value * 100).toPrecision(6))} %`,
      hint: 'Write rise over run in percent.',
    });
  });
  if (issues.failed) return { ok: false, problems: issues.list('error') };
  return { ok: true, road: { name, over: place.base === 'time' ? 'time' : 'distance', at, grades } };
}

interface Column {
  readonly index: number;
  readonly head: string;
}

/** Two rows at least. */
export function checkRowCount(table: CsvTable, issues: IssueList): void {
  if (table.rows.length >= 2) return;
  const found = table.rows.length === 0 ? 'none' : 'one';
  issues.error(table.head.at, '', { expected: 'at least two rows of numbers', found, hint: 'Add the rows below the head.' });
}

/** Values rise from row to row; NaN is already told. */
export function checkRising(table: CsvTable, values: readonly number[], column: Column, issues: IssueList): void {
  for (let row = 1; row < values.length; row++) {
    const [before, value] = [values[row - 1] as number, values[row] as number];
    if (value > before || Number.isNaN(value) || Number.isNaN(before)) continue;
    const line = table.rows[row] as CsvTable['head'];
    const found = `${line.cells[column.index]?.trim()} after ${table.rows[row - 1]?.cells[column.index]?.trim()}: it ${value === before ? 'stands still' : 'runs backwards'}`;
    issues.error(cellAt(line, column.index), column.head, {
      expected: `${column.head} rising from row to row`,
      found,
      hint: 'Sort the rows and keep one row for each.',
    });
  }
}

function checkSpeeds(table: CsvTable, speedsMPerS: readonly number[], column: Column, issues: IssueList): void {
  speedsMPerS.forEach((speed, row) => {
    if ((speed >= 0 && speed <= ABSURD_SPEED_M_PER_S) || Number.isNaN(speed)) return;
    const line = table.rows[row] as CsvTable['head'];
    const hint = speed < 0 ? 'A trace drives forward only: correct the sign.' : 'Check the unit in the head of the column.';
    issues.error(cellAt(line, column.index), column.head, {
      expected: 'a speed from 0 to 450 km/h',
      found: `${line.cells[column.index]?.trim()} in ${column.head}`,
      hint,
    });
  });
}

function checkGaps(table: CsvTable, timesS: readonly number[], speedsMPerS: readonly number[], column: Column, issues: IssueList): void {
  for (let row = 1; row < timesS.length; row++) {
    const step = (timesS[row] as number) - (timesS[row - 1] as number);
    if (!(step > LONGEST_CHANGE_S) || speedsMPerS[row] === speedsMPerS[row - 1]) continue;
    const line = table.rows[row] as CsvTable['head'];
    const found = `${Number(step.toPrecision(6))} s from one speed to another`;
    const hint = 'Rows seem to be missing: add them. A steady stretch has the same speed in both rows.';
    issues.error(cellAt(line, column.index), column.head, { expected: `steps of at most ${LONGEST_CHANGE_S} s while the speed changes`, found, hint });
  }
}
