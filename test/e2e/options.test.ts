/** Options at the command line: the built program names them in check, run and sheet. */
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { csvParse } from 'd3-dsv';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { openBrowser } from '../browser.ts';
import { emptyFolder, layshaft } from './built-program.ts';
import { openReport } from './report-page.ts';

// Each test starts the program anew: slow where the machine is busy.
vi.setConfig({ testTimeout: 180_000 });

const folder = emptyFolder();
const run = (...args: string[]) => layshaft(args, { cwd: folder.path });
const smallVan = readFileSync(new URL('data/small-van.yaml', import.meta.url), 'utf8');

beforeAll(() => {
  const options = `options:
  motor on offer: motors.csv
  gearbox:
    - { name: single, set: { gearing.ratio: 9.5 } }
    - { name: two-speed, set: { gearing.ratios: [11.2, 6.4], gearing.shiftTime: 0.25 s } }
`;
  writeFileSync(join(folder.path, 'offer.yaml'), smallVan.replace(/vary:\n(?: .*\n)+/u, options));
  writeFileSync(join(folder.path, 'motors.csv'), '# quotes of spring\nname,motor.peakTorque_Nm\nslow-wound,310\nfast-wound,250\n');
});
afterAll(() => folder.remove());

describe('a study with options', () => {
  it('is counted by check, list by list', async () => {
    const { status, stderr } = await run('check', 'offer.yaml');
    expect(stderr).toMatch(/motor on offer +2 options +slow-wound, fast-wound/);
    expect(stderr).toMatch(/gearbox +2 options +single, two-speed/);
    expect(stderr).toContain('4 designs');
    expect(status).toBe(0);
  });

  it('is run with the names in front.csv and in the summary, the digest of the table in run.json', async () => {
    const { status, stdout, stderr } = await run('run', 'offer.yaml', '--json', '--workers', '1');
    expect(status).toBe(0);
    const rows = csvParse(readFileSync(join(folder.path, 'out', 'offer', 'front.csv'), 'utf8'));
    expect(rows[0]).toMatchObject({ number: '0', mark: 'reference', 'motor on offer': '', gearbox: '' });
    for (const row of rows.slice(1)) {
      expect(['slow-wound', 'fast-wound']).toContain(row['motor on offer']);
      expect(['single', 'two-speed']).toContain(row['gearbox']);
    }
    expect(stderr).toMatch(/motor on offer +(?:slow-wound|fast-wound)/);
    expect(JSON.parse(stdout).runs[0].proposals[0]['motor on offer']).toMatch(/^(?:slow|fast)-wound$/u);
    const record = JSON.parse(readFileSync(join(folder.path, 'out', 'offer', 'run.json'), 'utf8'));
    expect(record.digests.map(({ name }: { name: string }) => name)).toContain('motors.csv');
  });

  it('shows the options of a design on its sheet, and takes others by name with figures on top', async () => {
    expect((await run('sheet', 'offer.yaml', '--design', '4')).stderr).toMatch(
      /motor on offer +fast-wound\n +motor\.peakTorque +250 +N·m\n +gearbox +two-speed/,
    );
    const design = JSON.parse((await run('sheet', 'offer.yaml', '--design', '4', '--json')).stdout);
    const chosen = JSON.parse((await run('sheet', 'offer.yaml', '--json', '--set', 'motor on offer=fast-wound', '--set', 'gearbox=two-speed')).stdout);
    expect(chosen).toEqual(design);
    expect(design.inputs).toEqual({
      'motor on offer': 'fast-wound',
      'motor.peakTorque_Nm': 250,
      gearbox: 'two-speed',
      'gearing.ratios.1': 11.2,
      'gearing.ratios.2': 6.4,
      'gearing.shiftTime_s': 0.25,
    });
    const onTop = JSON.parse((await run('sheet', 'offer.yaml', '--json', '--design', '4', '--set', 'gearing.ratios.1=12')).stdout);
    expect(onTop.metrics['driveUnit.axleTorque_Nm']).toBe(3000);
    expect(JSON.parse((await run('sheet', 'offer.yaml', '--json')).stdout).inputs).toMatchObject({
      'motor on offer': null,
      gearbox: null,
      'gearing.ratio': 9.5,
    });
  });

  it('has a report whose page computes each design as sheet does, names options on an axis and says what each sets', async () => {
    const browser = await openBrowser();
    const { page, said } = await openReport(browser, pathToFileURL(join(folder.path, 'out', 'offer', 'report.html')).href);
    for (const number of [0, 1, 4]) {
      const inPage = await page.evaluate((asked) => window.layshaft.evaluateDesign(asked), number);
      const { stdout } = await run('sheet', 'offer.yaml', '--design', String(number), '--json');
      expect(inPage).toStrictEqual(JSON.parse(stdout));
    }
    await page.selectOption('#axis-x', { label: 'Motor on offer' });
    for (const name of ['reference', 'slow-wound', 'fast-wound']) expect(await page.locator('#chart text', { hasText: name }).count()).toBeGreaterThan(0);
    await page.fill('#design-number', '4');
    await page.press('#design-number', 'Enter');
    expect(await page.textContent('#design .inputs')).toMatch(/motor on offer\s*fast-wound.*gearbox\s*two-speed/su);
    const table = page.locator('details', { hasText: 'gearbox: what each option sets' }).locator('tbody tr');
    expect((await table.allTextContents()).map((row) => row.replace(/\s+/gu, ' '))).toEqual(['single9.5———', 'two-speed—11.26.40.25 s']);
    expect(said).toEqual([]);
    await browser.close();
  });

  it('is answered with the nearest name where an option is misspelt, status 2', async () => {
    const { status, stderr } = await run('sheet', 'offer.yaml', '--set', 'motor on offer=fast-wond');
    expect(stderr).toContain('Did you mean fast-wound?');
    expect(status).toBe(2);
  });
});
