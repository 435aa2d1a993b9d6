import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { builtInCycles } from '../../src/run/built-in-cycles.ts';
import { estimateRun } from '../../src/run/estimate-run.ts';
import { readStudyFile, studySources } from '../../src/run/study-files.ts';
import { smallStudyText, studyOf } from './small-study.ts';

const folder = mkdtempSync(join(tmpdir(), 'layshaft-files-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function written(name: string, content: string | Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

describe('reading a study file', () => {
  test.each([
    ['a missing file', () => join(folder, 'none.yaml'), /no such file/u],
    ['a folder', () => folder, /it is a folder/u],
    ['a file that is too large', () => written('large.yaml', 'x'.repeat(1_000_001)), /at most 1,000,000 are read/u],
    ['bytes that are no UTF-8', () => written('binary.yaml', new Uint8Array([0xff, 0xfe, 0x41])), /not a text file in UTF-8/u],
    ['a NUL', () => written('nul.yaml', 'title: a\0b'), /not a text file/u],
  ])('%s ends in a sentence', (_, path, sentence) => {
    expect(readStudyFile(path())).toEqual({ problem: expect.stringMatching(sentence) });
  });

  test('a text comes back unchanged', () => {
    expect(readStudyFile(written('a.yaml', 'title: é\n'))).toEqual({ text: 'title: é\n' });
  });
});

test('the sources of a study read beside it and remember what they read', () => {
  written('round.csv', 'time_s,speed_kmh\n0,0\n');
  const sources = studySources(join(folder, 'study.yaml'));
  expect(sources.file('round.csv')).toEqual({ text: 'time_s,speed_kmh\n0,0\n' });
  expect(sources.cycle('nycc')).toContain('time_s,speed_mph');
  expect(sources.digests().map(({ name }) => name)).toEqual(['built-in cycle nycc', 'round.csv']);
});

test('seven cycles are built in, each with its source in the notes', () => {
  const cycles = builtInCycles();
  expect(cycles.map(({ name }) => name)).toEqual(['hd-udds', 'hwfet', 'nycc', 'udds', 'us06', 'wltc-2', 'wltc-3b']);
  for (const { notes } of cycles) expect(notes.join(' ')).toMatch(/CFR|GTR/u);
});

test('an estimate counts the designs and samples what the requirements remove', () => {
  const estimate = estimateRun(studyOf(smallStudyText('ramp.grade: { atLeast: 1 % }\n  sprint.time: { atMost: 0.5 s }')), 2);
  expect(estimate).toMatchObject({ designs: 105, sampled: 105, feasible: 0 });
  expect(estimate.failing).toEqual([0, 105, expect.any(Number)]);
  expect(estimate.seconds).toBeGreaterThan(0);
  expect(estimate.bytes).toBeGreaterThan(105 * 8);
});
