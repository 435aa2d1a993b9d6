import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test } from 'vitest';
import { openRunFolder, runFolderName } from '../../src/run/run-folder.ts';
import { writeWhole } from '../../src/run/write-whole.ts';

const folder = mkdtempSync(join(tmpdir(), 'layshaft-write-'));
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
  const run = openRunFolder(path);
  run.record({ state: 'running' });
  run.write('designs/part-00000.parquet', new Uint8Array(3));
  writeFileSync(join(path, 'designs', 'part-00001.parquet.tmp'), 'half');
  writeFileSync(join(path, 'designs', 'mine.txt'), 'mine');
  openRunFolder(path);
  expect(readdirSync(join(path, 'designs'))).toEqual(['mine.txt']);
});

test('the run folder is named after the study file', () => {
  expect(runFolderName('studies/harbour.van.yaml')).toBe('harbour.van');
});
