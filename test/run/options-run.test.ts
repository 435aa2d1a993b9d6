/** A run of a study with options: their names in parts, front.csv, charts and report, through the threads and the page's JSON. */
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { DuckDBInstance } from '@duckdb/node-api';
import { csvParse } from 'd3-dsv';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ReportData } from '../../src/charts/report-data.ts';
import { createBench, machineSheet } from '../../src/core/search/design-bench.ts';
import { readStudyJson } from '../../src/core/study/study.ts';
import { reportDocument } from '../../src/page/report-document.ts';
import { runStudy } from '../../src/run/run-study.ts';
import { runOptions, smallStudyText } from './small-study.ts';

const folder = mkdtempSync(join(tmpdir(), 'layshaft-options-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const text = smallStudyText('ramp.grade: { atLeast: 15 % }').replace(
  /vary:[\s\S]*?requirements:/u,
  `options:
  motor on offer:
    - { name: slow-wound, set: { motor.peakTorque: 215 N·m, motor.baseSpeed: 3300 rpm } }
    - { name: "=fast, wound", set: { motor.peakTorque: 160 N·m, motor.baseSpeed: 5000 rpm } }
    - { name: "<b>odd</b>", set: { motor.peakTorque: 190 N·m, motor.baseSpeed: 4100 rpm } }
  gearbox:
    - { name: single, set: { gearing.ratio: 9.1 } }
    - { name: two-speed, set: { gearing.ratios: [11.2, 6.4], gearing.shiftTime: 0.25 s } }
vary:
  vehicle.dragArea: { oneOf: [0.75 m², 0.8 m²] }
requirements:`,
);

describe('a run with options', () => {
  const path = join(folder, 'run');
  let report: ReportData;
  beforeAll(async () => {
    ({ report } = await runStudy(runOptions(text, path, 2)));
  });

  it('stores each design with the names of its options, as an independent reader sees them', async () => {
    const instance = await DuckDBInstance.create(':memory:');
    const connection = await instance.connect();
    const result = await connection.runAndReadAll(`SELECT * FROM '${join(path, 'designs', '*.parquet')}' ORDER BY number`);
    connection.closeSync();
    instance.closeSync();
    const bench = createBench(report.study);
    const rows = result.getRowObjects();
    expect(rows).toHaveLength(12);
    for (const row of rows) {
      const { inputs, metrics } = machineSheet(bench.compute(Number(row['number']))!);
      for (const name of ['motor on offer', 'gearbox', 'vehicle.dragArea_m2']) expect(row[name]).toBe(inputs[name]);
      expect(row['round.batteryEnergy_Wh_per_km']).toBe(metrics['round.batteryEnergy_Wh_per_km']);
    }
    expect(rows[0]).toMatchObject({ 'motor on offer': 'slow-wound', gearbox: 'single' });
    expect(rows.at(-1)).toMatchObject({ 'motor on offer': '<b>odd</b>', gearbox: 'two-speed' });
  });

  it('writes names into front.csv, none for the reference, and none that a spreadsheet takes for a formula', () => {
    const rows = csvParse(readFileSync(join(path, 'front.csv'), 'utf8'));
    expect(rows[0]).toMatchObject({ mark: 'reference', 'motor on offer': '', gearbox: '' });
    const names = rows.slice(1).map((row) => row['motor on offer']);
    expect(names.length).toBeGreaterThan(0);
    for (const name of names) expect(['slow-wound', "'=fast, wound", '<b>odd</b>']).toContain(name);
  });

  it('writes charts, and a report in which designs are called by their options', () => {
    expect(readdirSync(join(path, 'charts'))).toEqual(['driveUnit.cost-over-round.batteryEnergy.svg']);
    expect(readFileSync(join(path, 'charts', 'driveUnit.cost-over-round.batteryEnergy.svg'), 'utf8')).toMatch(/motor on offer \S/u);
    const page = reportDocument(report, { script: '', style: '' }, () => '');
    const shown = page.slice(0, page.indexOf('<script type="application/json"'));
    expect(shown).toContain('motor on offer (slow-wound or =fast, wound or &lt;b&gt;odd&lt;/b&gt;)');
    expect(shown).toContain('<dt>gearbox</dt><dd>two-speed</dd>');
    expect(shown).toContain('<dt>gearbox</dt><dd>the study&#39;s own</dd>');
    expect(shown).not.toContain('<b>odd</b>');
    expect(shown).not.toMatch(/NaN|undefined/u);
  });

  it('gives the page a study that computes the same designs after its way through JSON', () => {
    const carried = JSON.parse(readFileSync(join(path, 'report.html'), 'utf8')) as ReportData;
    const bench = createBench(readStudyJson(carried.study));
    for (const { number, values } of report.designs) {
      const metrics = new Map(bench.compute(number)?.metrics.map(({ column, value }) => [column.name, value]));
      for (const [k, column] of report.columns.entries()) if (column.role === 'metric') expect(metrics.get(column.name)).toBe(values[k] ?? Number.NaN);
    }
  });
});
