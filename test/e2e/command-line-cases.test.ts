/**
 * Whole designs through the built program, as another program would ask for them: every metric and limit of sheet --json
 * against the separate implementation of the model described in core/evaluate/cases.reference.test.ts.
 */
import { cpSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { emptyFolder, layshaft } from './built-program.ts';

const cases = fileURLToPath(new URL('../data/cases/', import.meta.url));
const names = readdirSync(cases)
  .filter((name) => name.endsWith('.yaml'))
  .map((name) => name.slice(0, -'.yaml'.length));
// Each test starts the program anew, several times over: slow where the machine is busy.
vi.setConfig({ testTimeout: 180_000 });

const folder = emptyFolder();

beforeAll(() => cpSync(cases, folder.path, { recursive: true }));
afterAll(() => folder.remove());

type Metrics = Readonly<Record<string, number | null>>;

/** Keys that differ: one exists and the other does not, or by more than 2e-6 of the value (of the wheel demand for sinks that are rounding alone). */
function differences(found: Metrics, expected: Metrics): string[] {
  return Object.entries(expected)
    .filter(([key, wanted]) => {
      const value = found[key];
      if (wanted === null || value === null || value === undefined) return value !== wanted;
      const sink = key.indexOf('.energy.');
      const floor = sink < 0 ? 0 : 1e-6 * (expected[`${key.slice(0, sink)}.wheelDemand_Wh_per_km`] as number);
      return !(Math.abs(value - wanted) <= 2e-6 * Math.max(Math.abs(wanted), floor));
    })
    .map(([key, wanted]) => `${key} is ${found[key]}, not ${wanted}`);
}

describe('sheet --json of whole designs', () => {
  it.each(names)('%s', async (name) => {
    const { status, stdout } = await layshaft(['sheet', `${name}.yaml`, '--json'], { cwd: folder.path });
    const sheet = JSON.parse(stdout);
    const expected = JSON.parse(readFileSync(join(folder.path, `${name}.expect.json`), 'utf8'));
    expect(differences(sheet.metrics, expected.metrics)).toEqual([]);
    // Studies with two ratios tell besides which of them each trial uses.
    const told = Object.keys(sheet.metrics).filter((key) => !/\.(?:ratio|shiftSpeed_kmh|lowerGearShare_pct)$/u.test(key));
    expect(told.sort()).toEqual(Object.keys(expected.metrics).sort());
    expect(sheet.limits).toEqual(expected.limits);
    expect(status).toBe(0);
  });
});
