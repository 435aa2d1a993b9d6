/** Runs whose designs are drawn: the same from threads, alone and after JSON; raising their number only adds. */
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { DuckDBInstance } from '@duckdb/node-api';
import { afterAll, describe, expect, test } from 'vitest';
import type { ReportData } from '../../src/charts/report-data.ts';
import { createBench, machineSheet } from '../../src/core/search/design-bench.ts';
import { readStudyJson } from '../../src/core/study/study.ts';
import { runStudy } from '../../src/run/run-study.ts';
import { runOptions, smallStudyText, studyOf } from './small-study.ts';

const folder = mkdtempSync(join(tmpdir(), 'layshaft-drawn-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** A study of every kind of axis: a list, a range without steps, one with steps, options. */
function drawnText(search: string): string {
  const text = smallStudyText().replace('gearing.ratio: { from: 7, to: 13, steps: 7 }', 'gearing.ratio: { from: 7, to: 13 }');
  return `${text}options:
  body: [ { name: low, set: { vehicle.dragArea: 0.75 m² } }, { name: high, set: { vehicle.dragArea: 0.9 m² } } ]
search: ${search}
`;
}

function filesOf(run: string): Record<string, Buffer> {
  const names = ['designs', 'charts'].flatMap((part) => readdirSync(join(run, part)).map((name) => `${part}/${name}`));
  return Object.fromEntries(['front.csv', ...names].sort().map((name) => [name, readFileSync(join(run, name))]));
}

/** Rows of the parts of a run in order of number, by an independent reader. */
async function rowsOf(run: string): Promise<Record<string, unknown>[]> {
  const instance = await DuckDBInstance.create(':memory:');
  const connection = await instance.connect();
  const result = await connection.runAndReadAll(`SELECT * FROM '${join(run, 'designs', '*.parquet')}' ORDER BY number`);
  connection.closeSync();
  instance.closeSync();
  return result.getRowObjects() as Record<string, unknown>[];
}

describe.each(['sobol', 'random'])('a run by method %s', (method) => {
  const path = (name: string) => join(folder, `${method}-${name}`);
  const text = (designs: number, seed = 7) => drawnText(`{ method: ${method}, designs: ${designs}, seed: ${seed} }`);

  test('writes the same bytes with 1 and 3 workers, and says in run.json how designs were drawn', async () => {
    await runStudy(runOptions(text(400), path('one'), 1));
    await runStudy(runOptions(text(400), path('three'), 3));
    expect(filesOf(path('three'))).toEqual(filesOf(path('one')));
    const record = JSON.parse(readFileSync(join(path('one'), 'run.json'), 'utf8'));
    expect(record).toMatchObject({ search: { method, designs: 400, seed: 7 }, counts: { designs: 400 } });
  });

  test('stores of every design what a sheet computes from its number alone, in the page too', async () => {
    const report: ReportData = JSON.parse(readFileSync(join(path('one'), 'report.html'), 'utf8'));
    const benches = [createBench(studyOf(text(400))), createBench(readStudyJson(report.study))];
    const rows = await rowsOf(path('one'));
    expect(rows).toHaveLength(400);
    for (const stored of [rows[0], rows[57], rows[399]]) {
      for (const bench of benches) {
        const { inputs, metrics } = machineSheet(bench.compute(Number(stored.number))!);
        for (const [key, value] of Object.entries(inputs)) if (key in stored) expect([key, stored[key]]).toEqual([key, value]);
        expect(stored['round.batteryEnergy_Wh_per_km']).toBe(metrics['round.batteryEnergy_Wh_per_km']);
        expect(stored['gearing.ratio']).toBe(inputs['gearing.ratio']);
      }
    }
    expect(new Set(rows.map((row) => row['gearing.ratio'])).size).toBe(400);
    expect(new Set(rows.map((row) => row['motor.peakTorque_Nm']))).toEqual(new Set([140, 160, 180, 200, 220]));
    expect(new Set(rows.map((row) => row.body))).toEqual(new Set(['low', 'high']));
  });

  test('keeps every design when more are asked for, and draws others for another seed', async () => {
    await runStudy(runOptions(text(700), path('more'), 2));
    await runStudy(runOptions(text(400, 8), path('seed'), 1));
    const [few, more, other] = await Promise.all([rowsOf(path('one')), rowsOf(path('more')), rowsOf(path('seed'))]);
    expect(more).toHaveLength(700);
    expect(more.slice(0, 400)).toEqual(few);
    const ratios = new Set(few.map((row) => row['gearing.ratio']));
    expect(other.filter((row) => ratios.has(row['gearing.ratio']))).toEqual([]);
  });
});
