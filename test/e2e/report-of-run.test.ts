import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ReportData } from '../../src/charts/report-data.ts';
import type { MachineSheet } from '../../src/core/search/design-bench.ts';
import { openBrowser } from '../browser.ts';
import { emptyFolder, layshaft } from './built-program.ts';
import { openReport } from './report-page.ts';

/** A shuttle small enough for a test, with every kind of trial, a list of base speeds, and an objective to raise. */
const study = `
title: Pier shuttle
about: Invented for a test.
vehicle:
  kerbMass: 2350 kg
  dragArea: 1.9 m²
  rolling: { c0: 0.0102, c1: 1.8e-6 s²/m² }
  wheelRadius: 0.351 m
  wheelInertia: 6.4 kg·m²
  axles: { driven: rear, adhesion: 0.8, frontShare: 48 %, centreHeight: 0.82 m, wheelbase: 3.4 m }
  auxiliaries: 900 W
motor:
  peakTorque: 300 N·m
  baseSpeed: 3900 rpm
  maxSpeed: 12000 rpm
  continuous: { torque: 55 %, power: 60 % }
  losses: { hysteresis: 1.2e-3, eddy: 8e-7 s, windage: 2e-10 s², copper: 42 W/(N·m), fieldWeakening: 0.2, inverterFixed: 0.0014, inverterLinear: 0.018, inverterSquare: 0.010 }
gearing: { ratio: 10, efficiency: 96.5 % }
battery: { voltage: 400 V, resistance: 0.08 Ω, discharge: 180 kW, regenerative: 90 kW, usable: 70 kWh, chargingEfficiency: 90 % }
trials:
  sprint: { kind: acceleration, from: 0 km/h, to: 60 km/h, payload: 600 kg }
  from rest 400 m: { kind: standing distance, distance: 400 m, payload: 600 kg }
  pier ramp: { kind: hill start, payload: 900 kg, startAcceleration: 0.2 m/s² }
  hill: { kind: gradeability, at: 60 km/h, payload: 900 kg }
  ring road: { kind: top speed, payload: 300 kg }
  stops: { kind: cycle, cycle: nycc, payload: 500 kg }
vary:
  gearing.ratio: { from: 8, to: 13, steps: 11 }
  motor.peakTorque: { from: 240 N·m, to: 360 N·m, steps: 7 }
  motor.baseSpeed: { oneOf: [3300 rpm, 3900 rpm, 4500 rpm] }
requirements:
  pier ramp.grade: { atLeast: 22 % }
  sprint.time: { atMost: 9 s }
tradeOff:
  minimise: [stops.batteryEnergy, driveUnit.axleTorque]
  maximise: [hill.grade]
`;

const folder = emptyFolder();
const out = join(folder.path, 'out', 'pier-shuttle');
let browser: Browser;

beforeAll(async () => {
  writeFileSync(join(folder.path, 'pier-shuttle.yaml'), study);
  const outcome = await layshaft(['run', 'pier-shuttle.yaml'], { cwd: folder.path });
  expect(outcome, outcome.stderr).toMatchObject({ status: 0 });
  browser = await openBrowser();
}, 120_000);
afterAll(async () => {
  await browser?.close();
  folder.remove();
});

describe('the report of a run', () => {
  it('computes in the page what sheet prints, to the last bit', async () => {
    const { page, said, asked } = await openReport(browser, pathToFileURL(join(out, 'report.html')).href);
    const data = JSON.parse((await page.textContent('#report-data')) ?? '') as ReportData;
    const numbers = [0, 1, 231, ...data.proposals.map(({ number }) => number)];
    for (const number of numbers) {
      const inPage = await page.evaluate((asked) => window.layshaft.evaluateDesign(asked), number);
      const { stdout } = await layshaft(['sheet', 'pier-shuttle.yaml', '--design', String(number), '--json'], { cwd: folder.path });
      expect(inPage).toStrictEqual(JSON.parse(stdout) as MachineSheet);
    }
    expect(said).toEqual([]);
    expect(asked).toEqual([]);
    await page.context().close();
  });

  it('shows the front that front.csv lists and the counts of the run', async () => {
    const { page } = await openReport(browser, pathToFileURL(join(out, 'report.html')).href);
    const data = JSON.parse((await page.textContent('#report-data')) ?? '') as ReportData;
    // The reference stands in front.csv too, as number 0.
    const csv = readFileSync(join(out, 'front.csv'), 'utf8')
      .trim()
      .split('\n')
      .slice(1)
      .filter((line) => !line.startsWith('0,'));
    expect(data.counts.designs).toBe(231);
    expect(data.counts.front).toBe(csv.length);
    expect(data.designs.filter(({ standing }) => standing === 'front')).toHaveLength(data.counts.shownFront);
    expect(((await page.textContent('.headline')) ?? '').replace(/\s+/gu, ' ')).toContain(`${data.counts.feasible} of 231 designs`);
    expect(await page.locator('#chart text', { hasText: '(less is better)' }).count()).toBe(2);
    await page.selectOption('#axis-y', { label: 'Grade in hill' });
    expect(await page.locator('#chart text', { hasText: 'Grade in hill, % (more is better)' }).count()).toBe(1);
    await page.context().close();
  });

  it('has its charts beside it, one for each pair of objectives', () => {
    expect(readdirSync(join(out, 'charts')).sort()).toEqual([
      'driveUnit.axleTorque-over-stops.batteryEnergy.svg',
      'hill.grade-over-driveUnit.axleTorque.svg',
      'hill.grade-over-stops.batteryEnergy.svg',
    ]);
  });
});
