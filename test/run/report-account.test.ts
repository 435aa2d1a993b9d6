import { expect, test } from 'vitest';
import type { ReportData } from '../../src/charts/report-data.ts';
import type { DesignEvaluator } from '../../src/core/search/evaluate-designs.ts';
import { studyColumns } from '../../src/core/search/evaluate-designs.ts';
import { type Issue, warningWords } from '../../src/core/study/text/issue.ts';
import { findingsOf } from '../../src/run/report-account.ts';
import { RunAccount } from '../../src/run/run-account.ts';
import { smallStudyText, studyOf } from './small-study.ts';

const provenance = { version: '0.0.0', node: 'v20', started: '2026-01-01T00:00:00Z', seconds: 1, digests: [] };
const said: Issue = {
  severity: 'warning',
  rule: 'said before',
  file: 'quay-shuttle.yaml',
  line: 1,
  column: 1,
  source: '',
  caret: 0,
  path: 'title',
  expected: 'nothing',
  found: 'something',
  hint: '',
};
const source = { studyFile: 'quay-shuttle.yaml', studyText: smallStudyText(), warnings: [said], provenance };

/** A study without requirements in which design n costs n and uses −n: every design is on the front. */
function lineOf(count: number, without: (number: number) => boolean = () => false, resolution = 0) {
  const base = studyOf(smallStudyText());
  const study = { ...base, requirements: [], objectives: base.objectives.map((objective) => ({ ...objective, resolution })) };
  const columns = studyColumns(study);
  const at = (name: string) => columns.findIndex((column) => column.name === name);
  const [energy, cost, speed] = ['round.batteryEnergy', 'driveUnit.cost', 'gearing.ratio'].map(at);
  const lowest = study.axes[1].points[0][0];
  const designs: DesignEvaluator = {
    columns,
    count,
    evaluate(number, out, from, stride) {
      for (const k of columns.keys()) out[from + k * stride] = 0;
      out[from + energy * stride] = without(number) ? Number.NaN : -number;
      out[from + cost * stride] = number;
      out[from + speed * stride] = number === 1 ? lowest : lowest + 1e-3;
    },
  };
  const account = new RunAccount(study, columns);
  const values = new Float64Array(count * columns.length);
  for (let i = 0; i < count; i++) designs.evaluate(i + 1, values, i, count);
  account.add(
    1,
    count,
    columns.map((_, k) => values.subarray(k * count, (k + 1) * count)),
  );
  return findingsOf({ ...source, study }, account, designs);
}

test('of a front too large to show, people see a sample from all over it, its ends and every proposal included', () => {
  const { report, front } = lineOf(25_000);
  expect(front).toHaveLength(25_000);
  expect(report.counts).toMatchObject({ front: 25_000, shownFront: 20_000 });
  const shown = report.designs.filter(({ standing }) => standing === 'front').map(({ number }) => number);
  expect(shown).toHaveLength(20_000);
  expect(shown).toEqual([...shown].sort((a, b) => a - b));
  for (const { number } of report.proposals) expect(shown).toContain(number);
  expect([...report.proposals.map(({ number }) => number)]).toEqual(expect.arrayContaining([1, 25_000]));
  // A fifth is left out; no stretch is left out more than a fair sample would.
  for (let from = 1; from < 25_000; from += 5_000) {
    const kept = shown.filter((number) => number >= from && number < from + 5_000).length;
    expect(kept).toBeGreaterThan(3_800);
    expect(kept).toBeLessThan(4_200);
  }
});

test('proposals come from the exact front and are shown whatever the resolution', () => {
  const { report } = lineOf(100, undefined, 30);
  expect(report.proposals).toContainEqual({ number: 100, rules: ['round.batteryEnergy'] });
  expect(report.proposals).toContainEqual({ number: 1, rules: ['driveUnit.cost', 'balanced'] });
  expect(report.counts.shownFront).toBeLessThan(10);
  for (const { number } of report.proposals) expect(report.designs).toContainEqual(expect.objectContaining({ number, standing: 'front' }));
});

const sentences = ({ warnings }: ReportData) => warnings.map((warning) => `${warning.path}: ${warningWords(warning)}`);

test('a proposal at the end of a range is told, among what was known before in the order of the file', () => {
  const { report } = lineOf(5);
  expect(report.warnings[0]).toBe(said);
  expect(sentences(report)).toContainEqual(
    expect.stringContaining('vary.gearing.ratio: 7, the lowest searched, in the design put forward as least drive unit cost and balanced;'),
  );
});

test('designs that meet everything but lack an objective are told, and are not on the front', () => {
  const { report, front } = lineOf(5, (number) => number === 2);
  expect([...front]).toEqual([1, 3, 4, 5]);
  expect(sentences(report)).toContainEqual(expect.stringContaining('tradeOff: 1 design that meets every requirement but has no value for an objective;'));
  expect(sentences(lineOf(5, (number) => number < 4).report)).toContainEqual(
    expect.stringContaining('tradeOff: 3 designs that meet every requirement but have no value for an objective;'),
  );
});
