/** The built program says each warning once: in check, before and after a run, in run.json and in the report. */
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { JSDOM } from 'jsdom';
import { afterAll, describe, expect, it } from 'vitest';
import { edited } from '../core/study/study-from-disk.ts';
import { smallStudyText } from '../run/small-study.ts';
import { emptyFolder, layshaft } from './built-program.ts';

const folder = emptyFolder();
afterAll(() => folder.remove());

/** Two warnings that the study alone gives cause for, and four more that results do. */
const text = edited(
  smallStudyText('ramp.grade: { atLeast: 18 % }\n  sprint.time: { atMost: 40 s }'),
  ['efficiency: 97 %', 'efficiency: 99.5 %'],
  ['cycle: nycc, payload', 'cycle: nycc, capSpeed: 40 km/h, payload'],
  ['discharge: 100 kW', 'discharge: 60 kW'],
);
const fromStudy = ['efficiency', 'speed cap'];
const fromResults = ['battery limit', 'range edge', 'range edge', 'idle requirement'];
writeFileSync(join(folder.path, 'quay.yaml'), text);

interface Told {
  readonly rule: string;
  readonly line: number;
  readonly path: string;
  readonly found: string;
  readonly expected: string;
  readonly whatToDo: string;
}

/** How often each of some warnings is found in what people read. */
function timesIn(words: string, warnings: readonly Told[]): number[] {
  return warnings.map(({ found, expected }) => words.toLowerCase().split(`${found}; expected ${expected}`.toLowerCase()).length - 1);
}

const rules = (warnings: readonly Told[]) => warnings.map(({ rule }) => rule).sort();

describe('warnings of the built program', () => {
  const outcomes = Promise.all([
    layshaft(['check', 'quay.yaml'], { cwd: folder.path }),
    layshaft(['check', 'quay.yaml', '--json'], { cwd: folder.path }),
    layshaft(['run', 'quay.yaml', '--json'], { cwd: folder.path }),
  ]);

  it('stand in the machine output of check and of run and in run.json, the same, with rule and place', async () => {
    const [, checked, ran] = await outcomes;
    const told = JSON.parse(checked.stdout).studies[0].warnings as Told[];
    expect(rules(told)).toEqual([...fromStudy, ...fromResults].sort());
    expect(told.map(({ line }) => line)).toEqual(told.map(({ line }) => line).sort((a, b) => a - b));
    for (const { path, whatToDo } of told) expect(`${path} ${whatToDo}`).toMatch(/^\S.* \S.*\.$/u);
    expect(JSON.parse(ran.stdout).runs[0].warnings).toEqual(told);
    expect(JSON.parse(readFileSync(join(folder.path, 'out/quay/run.json'), 'utf8')).warnings).toEqual(told);
  });

  it('are said once to people by check and by run, and do not change the status', async () => {
    const [check, checked, run] = await outcomes;
    const told = JSON.parse(checked.stdout).studies[0].warnings as Told[];
    expect([check.status, checked.status, run.status]).toEqual([0, 0, 0]);
    expect(timesIn(check.stderr, told)).toEqual(told.map(() => 1));
    expect(timesIn(run.stderr, told)).toEqual(told.map(() => 1));
    expect(check.stderr).toContain('What to keep an eye on');
  });

  it('are said by run before it begins where the study is the reason, and after it where results are', async () => {
    const [, checked, run] = await outcomes;
    const told = JSON.parse(checked.stdout).studies[0].warnings as Told[];
    const ofStudy = told.filter(({ rule }) => fromStudy.includes(rule));
    const head = run.stderr.slice(0, run.stderr.indexOf('Designs put forward'));
    expect(timesIn(head, ofStudy)).toEqual([1, 1]);
    expect(head).not.toContain('What to keep an eye on');
    expect(run.stderr.slice(head.length)).toContain('What to keep an eye on');
  });

  it('stand once in the report, each by its rule', async () => {
    const [, checked] = await outcomes;
    const told = JSON.parse(checked.stdout).studies[0].warnings as Told[];
    const page = new JSDOM(readFileSync(join(folder.path, 'out/quay/report.html'), 'utf8')).window.document;
    expect([...page.querySelectorAll('.watch dt')].map((head) => head.firstChild?.textContent?.trim().toLowerCase()).sort()).toEqual(rules(told));
    for (const script of page.querySelectorAll('script')) script.remove();
    expect(timesIn(page.querySelector('main')?.textContent ?? '', told)).toEqual(told.map(() => 1));
  });
});
