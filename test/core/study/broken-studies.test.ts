/** Every mistake is answered with one message that says where, what was expected, what was found and what to do. SHOW_ISSUES=1 prints the table. */
import { describe, expect, it } from 'vitest';
import { formatIssue } from '../../../src/core/study/text/issue.ts';
import { type BrokenStudy, brokenStudies } from './broken-studies.ts';
import { check, edited, harbour } from './study-from-disk.ts';

function answer({ text, files }: BrokenStudy): string[] {
  const read = check(text, files ?? {});
  return read.ok ? [] : read.issues.map(formatIssue);
}

describe('a study with one mistake', () => {
  it.each(brokenStudies.map((broken) => [broken.mistake, broken] as const))('%s: one message that says what to do', (mistake, broken) => {
    const messages = answer(broken);
    if (process.env['SHOW_ISSUES'] !== undefined) console.log(`\n### ${mistake}\n${messages.join('\n\n')}`);
    expect(messages).toHaveLength(1);
    const [where, ...parts] = broken.says;
    expect(messages[0]).toContain(where?.includes('.csv') ? where : `study.yaml:${where}:`);
    for (const part of parts) expect(messages[0]).toContain(part);
    expect(messages[0]).toMatch(/what to do {2}\S/u);
  });

  it('has a table of at least twenty-five of them', () => {
    expect(brokenStudies.length).toBeGreaterThanOrEqual(25);
    expect(new Set(brokenStudies.map(({ mistake }) => mistake)).size).toBe(brokenStudies.length);
  });
});

describe('a study with many mistakes', () => {
  it('tells all of them at once, in the order of the file', () => {
    const text = edited(
      harbour,
      ['kerbMass: 1780 kg', 'kerbMass: 1780'],
      ['efficiency: 97 %', 'efficiency: 130 %'],
      ['cycle: hwfet', 'cycle: hwefet'],
      ['ramp.grade:  ', 'ramp.grad:  '],
    );
    const read = check(text);
    expect(read.ok ? [] : read.issues.map(({ line, path }) => [line, path])).toEqual([
      [4, 'vehicle.kerbMass'],
      [23, 'gearing.efficiency'],
      [40, 'trials.trunk.cycle'],
      [50, 'requirements.ramp.grad'],
    ]);
  });
});
