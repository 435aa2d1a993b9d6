/** What `check` says of a study whose designs are drawn. */
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { checkText } from '../../src/cli/check-text.ts';
import { checkJson, checkStudyFile } from '../../src/cli/checked-study.ts';
import { smallStudyText } from '../run/small-study.ts';

const folder = mkdtempSync(join(tmpdir(), 'layshaft-check-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

async function checked(search: string, ratio = 'gearing.ratio: { from: 7, to: 13, steps: 7 }') {
  const file = join(folder, 'study.yaml');
  writeFileSync(file, `${smallStudyText().replace('gearing.ratio: { from: 7, to: 13, steps: 7 }', ratio)}${search}`);
  const result = await checkStudyFile(file);
  if (!('outlook' in result)) throw new Error(JSON.stringify(result.opened.issues));
  return { text: checkText(result).replace(/\u202f/gu, ' '), json: checkJson(result) };
}

describe('the check of a study', () => {
  test('says how many designs there are, by which method, and what is drawn from a whole range', async () => {
    const { text, json } = await checked('search: { method: sobol, designs: 20000, seed: 3 }\n', 'gearing.ratio: { from: 7, to: 13 }');
    expect(text).toMatch(/A run evaluates .*20 000 designs.*, points of a Sobol' sequence, scrambled with seed 3: about/u);
    expect(text).toMatch(/gearing\.ratio +any value +7 to 13/u);
    expect(text).toMatch(/motor\.peakTorque +5 values +140 N·m to 220 N·m/u);
    expect(json).toMatchObject({
      search: { method: 'sobol', designs: 20_000, seed: 3 },
      varied: [
        { name: 'motor.baseSpeed', values: 3 },
        { name: 'gearing.ratio', values: null },
        { name: 'motor.peakTorque', values: 5 },
      ],
      run: { possible: true, designs: 20_000 },
    });
  });

  test('calls a grid by what it is', async () => {
    const { text, json } = await checked('');
    expect(text).toMatch(/A run evaluates .*105 designs.*, every combination of what varies: about/u);
    expect(json).toMatchObject({ search: { method: 'grid' }, run: { designs: 105 } });
  });
});
