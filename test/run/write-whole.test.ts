import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test } from 'vitest';
import { openRunFolder, runFolderName } from '../../src/run/run-folder.ts';
import { writeWhole } from '../../src/run/write-whole.ts';

const folder = mkdtempSync(join(tmpdir(), 'layshaft-write-'));
const record = { state: 'running', version: '0.0.0', node: 'v20.19.0', study: 'a.yaml', title: 'A', started: '2026-01-01T00:00:00.000Z' } as const;
afterAll(() => rmSync(folder, { recursive: true, force: true }));

test('a file is replaced as a whole and nothing is left beside it', () => {
  const path = join(folder, 'a.txt');
  writeWhole(path, 'old');
  writeWhole(path, 'new · ß');
  expect(readFileSync(path, 'utf8')).toBe('new · ß');
  expect(readdirSync(folder)).toEqual(['a.txt']);
});

test('a file that cannot be written keeps its old content and names the reason', () => {
  const path = join(folder, 'no-such-folder', 'a.txt');
  expect(() => writeWhole(path, 'x')).toThrow(/cannot be written: there is no such file or folder/u);
});

test('opening a run folder clears what a crash left of an earlier run, and only that', () => {
  const path = join(folder, 'run');
  const run = openRunFolder(path, record);
  run.write('designs/part-00000.parquet', new Uint8Array(3));
  writeFileSync(join(path, 'designs', 'part-00001.parquet.tmp'), 'half');
  writeFileSync(join(path, 'designs', 'mine.txt'), 'mine');
  writeFileSync(join(path, 'charts', 'our own.svg'), 'mine');
  openRunFolder(path, record);
  expect(readdirSync(join(path, 'designs'))).toEqual(['mine.txt']);
  expect(readdirSync(join(path, 'charts'))).toEqual(['our own.svg']);
});

test('the run folder is named after the study file', () => {
  expect(runFolderName('studies/harbour.van.yaml')).toBe('harbour.van');
});

test('a folder is ours from its first moment, so that a crash in opening it never locks the next run out', () => {
  const path = join(folder, 'opened');
  openRunFolder(path, record).write('front.csv', 'number');
  expect(JSON.parse(readFileSync(join(path, 'run.json'), 'utf8'))).toEqual({ maker: 'layshaft', ...record });
  openRunFolder(path, { ...record, title: 'Again' });
  expect(JSON.parse(readFileSync(join(path, 'run.json'), 'utf8'))).toEqual({ maker: 'layshaft', ...record, title: 'Again' });
  expect(readdirSync(path).sort()).toEqual(['charts', 'designs', 'run.json']);
});

test.each([
  ['part of the path is a file', () => writeFileSync(join(folder, 'plain'), ''), join('plain', 'a.txt')],
  ['a folder stands where the file is written aside', () => mkdirSync(join(folder, 'taken.tmp')), 'taken'],
])('a write that fails because %s is a problem in words, not an error of the clearing up', (_, prepare, name) => {
  prepare();
  expect(() => writeWhole(join(folder, name), 'x')).toThrow(expect.objectContaining({ name: 'RunProblem', hint: expect.stringContaining('--out') }));
});
