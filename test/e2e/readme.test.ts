/** What README promises of the main job: the worked study of the parcel van in full, its answer, and the picture README shows of it. */
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, expect, it } from 'vitest';
import { emptyFolder, layshaft } from './built-program.ts';

const root = fileURLToPath(new URL('../../', import.meta.url));
const folder = emptyFolder();
afterAll(() => folder.remove());

it('runs the parcel van in full: the designs, the files and the picture that README shows', async () => {
  const readme = readFileSync(join(root, 'README.md'), 'utf8');
  const { status, stdout } = await layshaft(['run', join(root, 'studies/harbour-parcel-van.yaml'), '--json'], { cwd: folder.path });
  expect(status).toBe(0);
  const [{ counts }] = JSON.parse(stdout).runs;
  expect(counts.designs).toBeGreaterThanOrEqual(60_000);
  expect(readme).toContain(`evaluates ${counts.designs.toLocaleString('en')} drive units`);

  const run = join(folder.path, 'out', 'harbour-parcel-van');
  expect(readdirSync(run).sort()).toEqual(['charts', 'designs', 'front.csv', 'report.html', 'run.json', 'study.yaml']);
  const chart = readFileSync(join(run, 'charts', 'trunk.batteryEnergy-over-stops.batteryEnergy.svg'), 'utf8');
  expect(chart).toBe(readFileSync(join(root, 'studies/pictures/harbour-parcel-van.svg'), 'utf8'));
}, 240_000);
