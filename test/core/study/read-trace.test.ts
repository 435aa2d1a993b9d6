/** Speed traces and road profiles from CSV, and what is said of files that cannot be right. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readRoad, readTrace } from '../../../src/core/study/read/read-trace.ts';
import { formatIssues } from '../../../src/core/study/text/issue.ts';

function problems(csv: string): string {
  const read = readTrace(csv, 'my.csv');
  return read.ok ? '' : formatIssues(read.problems);
}

function roadProblems(csv: string): string {
  const read = readRoad(csv, 'hill.csv');
  return read.ok ? '' : formatIssues(read.problems);
}

describe('a speed trace', () => {
  it('has its times and speeds in SI and what the file says of itself', () => {
    const read = readTrace('# measured on the quay\r\n# by hand\r\ntime_s,speed_kmh\r\n0,0\r\n1.5,3.6\r\n3,0\r\n', 'my.csv');
    expect(read).toEqual({ ok: true, trace: { name: 'my.csv', timesS: [0, 1.5, 3], speedsMPerS: [0, 1, 0], notes: ['measured on the quay', 'by hand'] } });
  });

  it.each([
    ['speed_mph', 0.44704],
    ['speed_m_per_s', 1],
    ['speed_kmh', 1 / 3.6],
  ])('in %s is converted', (head, factor) => {
    const read = readTrace(`time_s,${head}\n0,0\n1,10\n`, 'my.csv');
    expect(read.ok && read.trace.speedsMPerS[1]).toBeCloseTo(10 * factor, 12);
  });

  it('may have further columns, in any order, and quoted heads', () => {
    const read = readTrace('"gear","speed_kmh","time_s"\n1,0,0\n2,36,9\n', 'my.csv');
    expect(read.ok && [read.trace.timesS, read.trace.speedsMPerS]).toEqual([
      [0, 9],
      [0, 10],
    ]);
  });

  it('may hold one speed for longer than a minute, or stand', () => {
    expect(problems('time_s,speed_kmh\n0,0\n600,0\n630,80\n4000,80\n4020,0\n')).toBe('');
  });

  it.each([
    ['time_s,speed\n0,0\n1,3\n', 'my.csv:1:1', 'a column speed_kmh or speed_mph or speed_m_per_s'],
    ['0,0\n1,3\n', 'my.csv:1:1', 'Write a head above the numbers'],
    ['time_s;speed_kmh\n0;0\n', 'my.csv:1:1', 'Separate columns by commas'],
    ['time_s,speed_kmh\n0,0\n1,\n2,4\n', 'my.csv:3:3', 'an empty cell'],
    ['time_s,speed_kmh\n0,0\n1\n2,4\n', 'my.csv:3:2', 'an empty cell'],
    ['time_s,speed_kmh\n0,0\n1,fast\n2,4\n', 'my.csv:3:3', 'fast'],
    ['time_s,speed_kmh\n0,0\n2,3\n1,4\n', 'my.csv:4:1', 'runs backwards'],
    ['time_s,speed_kmh\n0,0\n1,3\n1,4\n', 'my.csv:4:1', 'stands still'],
    ['time_s,speed_kmh\n0,0\n1,-3\n2,0\n', 'my.csv:3:3', 'correct the sign'],
    ['time_s,speed_kmh\n0,0\n1,3600\n2,0\n', 'my.csv:3:3', 'from 0 to 450 km/h'],
    ['time_s,speed_mph\n0,0\n1,280\n2,0\n', 'my.csv:3:3', '280 in speed_mph'],
    ['time_s,speed_kmh\n0,0\n10,30\n90,60\n100,0\n', 'my.csv:4:1', '80 s from one speed to another'],
    ['time_s,speed_kmh\n0,0\n', 'my.csv:1:1', 'at least two rows'],
    ['time_s,speed_kmh\n0,0\n5,0\n', 'my.csv:1:8', 'a trace that moves'],
    ['', 'my.csv:1:1', 'no lines'],
    ['time_s,speed_kmh,speed_mph\n0,0,0\n1,3,2\n', 'my.csv:1:18', 'Keep one of them'],
    ['time_s,speed_kmh\n0,0\n1,\u0000\n', 'my.csv:3:3', 'no text'],
  ])('%j is answered with its place and reason', (csv, place, part) => {
    expect(problems(csv)).toContain(`${place}:`);
    expect(problems(csv)).toContain(part);
  });

  it('with a thousand gaps tells a bounded number of them', () => {
    const csv = `time_s,speed_kmh\n${Array.from({ length: 1000 }, (_, second) => `${second},`).join('\n')}\n`;
    expect(problems(csv).split('\n\n').length).toBe(41);
    expect(problems(csv)).toMatch(/and at least \d+ more$/u);
  });
});

describe('the built-in cycles', () => {
  const folder = new URL('../../../src/run/cycles/', import.meta.url);

  it.each(readdirSync(folder))('%s reads without a word, with its source first', (name) => {
    const read = readTrace(readFileSync(new URL(name, folder), 'utf8'), name);
    expect(read.ok ? read.trace.notes[0] : formatIssues(read.problems)).toMatch(/^(WLTC|EPA)/u);
  });
});

describe('a road profile', () => {
  it('goes over time or over distance', () => {
    expect(readRoad('distance_m,grade_pct\n0,0\n500,6\n', 'hill.csv')).toEqual({
      ok: true,
      road: { name: 'hill.csv', over: 'distance', at: [0, 500], grades: [0, 0.06] },
    });
    expect(readRoad('time_s,grade_pct\n0,-2\n60,0\n', 'hill.csv')).toMatchObject({ ok: true, road: { over: 'time', grades: [-0.02, 0] } });
  });

  it('is refused where it cannot be a road', () => {
    expect(roadProblems('distance_m,grade_pct\n0,0\n0,5\n')).toContain('hill.csv:3:1');
    expect(roadProblems('distance_m,grade_pct\n0,0\n9,150\n')).toContain('from −100 % to 100 %');
    expect(roadProblems('place,grade_pct\n0,0\n9,1\n')).toContain('distance_m');
    expect(roadProblems('distance_m,time_s,grade_pct\n0,0,0\n9,1,1\n')).toContain('Keep one of them');
  });
});
