import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { DuckDBInstance } from '@duckdb/node-api';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { ReportData } from '../../src/charts/report-data.ts';
import { machineValue } from '../../src/core/evaluate/result-columns.ts';
import { createDesignEvaluator } from '../../src/core/search/evaluate-designs.ts';
import { designsPerPart, PartRows, partBytes } from '../../src/run/part-file.ts';
import { type RunOutcome, type RunProgress, runStudy } from '../../src/run/run-study.ts';
import { builtThread, runOptions, smallStudyText, studyOf } from './small-study.ts';

const folder = mkdtempSync(join(tmpdir(), 'layshaft-run-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function filesOf(run: string): Record<string, Buffer> {
  const names = ['designs', 'charts'].flatMap((part) => readdirSync(join(run, part)).map((name) => `${part}/${name}`));
  return Object.fromEntries(['front.csv', ...names].sort().map((name) => [name, readFileSync(join(run, name))]));
}

/** Rows of a query over the parts of a run, by an independent reader. */
async function query(sql: string): Promise<Record<string, unknown>[]> {
  const instance = await DuckDBInstance.create(':memory:');
  const connection = await instance.connect();
  const result = await connection.runAndReadAll(sql);
  connection.closeSync();
  instance.closeSync();
  return result.getRowObjects() as Record<string, unknown>[];
}

describe('a run of 105 designs', () => {
  const progress: RunProgress[] = [];
  let outcome: RunOutcome;
  const path = join(folder, 'two');

  beforeAll(async () => {
    expect(existsSync(builtThread), 'dist/thread.js is missing: run npm run build').toBe(true);
    outcome = await runStudy({ ...runOptions(smallStudyText(), path, 2), onProgress: (event) => progress.push(event) });
  });

  test('writes the same bytes with 1, 2 and 3 workers', async () => {
    const files = filesOf(path);
    for (const workers of [1, 3]) {
      const other = join(folder, `workers-${workers}`);
      await runStudy(runOptions(smallStudyText(), other, workers));
      expect(filesOf(other)).toEqual(files);
    }
    expect(Object.keys(files)).toEqual(['charts/driveUnit.cost-over-round.batteryEnergy.svg', 'designs/part-00000.parquet', 'front.csv']);
  });

  test('leaves nothing half-written and says in run.json that it is finished', () => {
    expect(readdirSync(path).sort()).toEqual(['charts', 'designs', 'front.csv', 'report.html', 'run.json', 'study.yaml']);
    const record = JSON.parse(readFileSync(join(path, 'run.json'), 'utf8'));
    expect(record).toMatchObject({ maker: 'layshaft', state: 'finished', counts: outcome.report.counts });
    expect(record.digests[0].sha256).toMatch(/^[0-9a-f]{64}$/u);
  });

  test('stores every design with the figures that a direct evaluation gives, as an independent reader sees them', async () => {
    const study = studyOf(smallStudyText());
    const { columns } = outcome.report;
    const designs = createDesignEvaluator(study, columns);
    const rows = await query(`SELECT * FROM '${join(path, 'designs', '*.parquet')}' ORDER BY number`);
    expect(rows).toHaveLength(105);
    const row = new Float64Array(columns.length);
    for (const stored of rows) {
      designs.evaluate(Number(stored.number), row, 0, 1);
      for (const [k, column] of columns.entries()) expect(stored[column.key]).toBe(machineValue(column, row[k]));
    }
    const inputs = rows.map((stored) => stored['motor.baseSpeed_rpm']);
    expect([...new Set(inputs)]).toEqual([3300, 4000, 4700]);
  });

  test('counts and marks as feasible what meets every requirement', async () => {
    const [{ feasible, met }] = await query(`SELECT count(*) FILTER (feasible) AS feasible,
      count(*) FILTER ("ramp.grade_pct" >= 18 AND "sprint.time_s" <= 9 AND "round.offTrace_pct" <= 0 AND "round.batteryEnergy_Wh_per_km" IS NOT NULL) AS met
      FROM '${join(path, 'designs', '*.parquet')}'`);
    expect(Number(feasible)).toBe(outcome.report.counts.feasible);
    expect(Number(feasible)).toBe(Number(met));
    expect(Number(feasible)).toBeGreaterThan(0);
    expect(Number(feasible)).toBeLessThan(105);
  });

  test('has on the front exactly the feasible designs that no other dominates', async () => {
    const stored = `'${join(path, 'designs', '*.parquet')}'`;
    const front = await query(`SELECT a.number FROM ${stored} a WHERE feasible AND NOT EXISTS (SELECT 1 FROM ${stored} b WHERE b.feasible
      AND b."round.batteryEnergy_Wh_per_km" <= a."round.batteryEnergy_Wh_per_km" AND b."driveUnit.cost" <= a."driveUnit.cost"
      AND (b."round.batteryEnergy_Wh_per_km" < a."round.batteryEnergy_Wh_per_km" OR b."driveUnit.cost" < a."driveUnit.cost")) ORDER BY number`);
    const lines = readFileSync(join(path, 'front.csv'), 'utf8').trimEnd().split('\n');
    expect(lines[1]).toMatch(/^0,reference,/u);
    expect(lines.slice(2).map((line) => Number(line.split(',')[0]))).toEqual(front.map(({ number }) => Number(number)));
  });

  test('tells how far it is, up to the last design', () => {
    expect(progress.at(-1)).toMatchObject({ done: 105, total: 105, feasible: outcome.report.counts.feasible, front: outcome.report.counts.front });
  });

  test('gives the report every design of the front, a proposal for each objective and the reference first', () => {
    const report: ReportData = JSON.parse(readFileSync(join(path, 'report.html'), 'utf8'));
    expect(report.designs[0]).toMatchObject({ number: 0, standing: 'reference' });
    expect(report.designs.filter(({ standing }) => standing === 'front')).toHaveLength(report.counts.shownFront);
    expect(report.proposals.flatMap(({ rules }) => rules).sort()).toEqual(['balanced', 'driveUnit.cost', 'round.batteryEnergy']);
  });
});

test('a report holds what its contract lists and nothing of the machine that made it', () => {
  const text = readFileSync(join(folder, 'two', 'report.html'), 'utf8');
  const listed = ['closest', 'columns', 'counts', 'designs', 'proposals', 'provenance', 'requirements', 'study', 'studyFile', 'studyText', 'warnings'];
  expect(Object.keys(JSON.parse(text)).sort()).toEqual(listed);
  expect(text).not.toContain(folder);
  expect(text).not.toContain('thread.js');
});

test('front.csv marks as best what no other row of it beats, however coarse the resolution people are shown', async () => {
  const aims = 'minimise: [sprint.time, driveUnit.cost]\n  resolution: { sprint.time: 3 s, driveUnit.cost: 120 }';
  const text = smallStudyText('ramp.grade: { atLeast: 1 % }').replace('minimise: [round.batteryEnergy, driveUnit.cost]', aims);
  const path = join(folder, 'coarse');
  const { report } = await runStudy(runOptions(text, path, 1));
  expect(report.counts.shownFront).toBeLessThan(report.counts.front);
  const [head, , ...rows] = readFileSync(join(path, 'front.csv'), 'utf8')
    .trimEnd()
    .split('\n')
    .map((line) => line.split(','));
  for (const [metric, key] of [
    ['sprint.time', 'sprint.time_s'],
    ['driveUnit.cost', 'driveUnit.cost'],
  ]) {
    const figures = rows.map((row) => Number(row[head.indexOf(key)]));
    expect(figures[rows.findIndex((row) => row[1].includes(`best in ${metric}`))]).toBe(Math.min(...figures));
  }
});

test('a run in which nothing is feasible says how near each requirement is and which design comes closest', async () => {
  const { report } = await runStudy(runOptions(smallStudyText('ramp.grade: { atLeast: 90 % }'), join(folder, 'none'), 1));
  expect(report.counts).toMatchObject({ feasible: 0, front: 0 });
  const [ramp] = report.requirements;
  expect(ramp).toMatchObject({ metric: 'ramp.grade', failing: 105 });
  expect(ramp.relaxedTo).toBeLessThan(0.9);
  expect(report.closest?.missed).toEqual(['ramp.grade']);
  expect(report.designs.some(({ number }) => number === report.closest?.number)).toBe(true);
});

test('a second run replaces the first and leaves what is not its own', async () => {
  const path = join(folder, 'again');
  await runStudy(runOptions(smallStudyText(), path, 1));
  writeFileSync(join(path, 'notes of mine.txt'), 'keep');
  await runStudy(runOptions(smallStudyText(), path, 1));
  expect(readFileSync(join(path, 'notes of mine.txt'), 'utf8')).toBe('keep');
});

test('a folder that holds something else is refused and left as it is', async () => {
  const path = mkdtempSync(join(folder, 'foreign-'));
  writeFileSync(join(path, 'front.csv'), 'mine');
  await expect(runStudy(runOptions(smallStudyText(), path, 1))).rejects.toThrow('holds files that no run of this program has written');
  expect(readFileSync(join(path, 'front.csv'), 'utf8')).toBe('mine');
});

test('an output folder that cannot be made ends in a problem with a hint', async () => {
  const file = join(folder, 'a-file');
  writeFileSync(file, '');
  await expect(runStudy(runOptions(smallStudyText(), join(file, 'run'), 1))).rejects.toMatchObject({
    name: 'RunProblem',
    hint: expect.stringContaining('--out'),
  });
});

test('a thread that cannot start ends in a problem, not in a hang', async () => {
  const options = { ...runOptions(smallStudyText(), join(folder, 'no-thread'), 2), threadUrl: new URL('file:///no/such/thread.js') };
  await expect(runStudy(options)).rejects.toMatchObject({ name: 'RunProblem', message: expect.stringContaining('worker thread stopped') });
});

test('parts have the same bytes whenever they are made', () => {
  const columns = createDesignEvaluator(studyOf(smallStudyText()), []).columns;
  const rows = new PartRows(3, 0);
  rows.append(designsPerPart, 0, 3, [], new Uint8Array([1, 0, 1]));
  expect(partBytes(rows, columns)).toEqual(partBytes(rows, columns));
});
