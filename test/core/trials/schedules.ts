/** The built-in schedules as they ship, for tests: head lines and trace in SI. */
import { readFileSync } from 'node:fs';

export const scheduleNames = ['hd-udds', 'hwfet', 'nycc', 'udds', 'us06', 'wltc-2', 'wltc-3b'] as const;

export interface Schedule {
  head: string;
  timesS: number[];
  speedsMPerS: number[];
}

const unitsInMPerS: Record<string, number> = { speed_kmh: 1 / 3.6, speed_mph: 0.44704 };

export function readSchedule(name: string): Schedule {
  const lines = readFileSync(new URL(`../../../src/run/cycles/${name}.csv`, import.meta.url), 'utf8')
    .trim()
    .split('\n');
  const head = lines.filter((line) => line.startsWith('#'));
  const [columns, ...rows] = lines.slice(head.length);
  const unit = unitsInMPerS[columns.split(',')[1]];
  const cells = rows.map((row) => row.split(',').map(Number));
  return { head: head.join('\n'), timesS: cells.map(([time]) => time), speedsMPerS: cells.map(([, speed]) => speed * unit) };
}

export const onTheLevel = { grade: 0, road: null, capSpeedMPerS: Number.NaN };
