/** The worked studies through the built program: without mistakes, without gaps in their figures, every joule booked, and answered as they should be. */
import { cpSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { JSDOM } from 'jsdom';
import { afterAll, describe, expect, it, vi } from 'vitest';
import { createBench, type MachineSheet } from '../../src/core/search/design-bench.ts';
import { checkStudy } from '../../src/core/study/check-study.ts';
import type { Study } from '../../src/core/study/study.ts';
import { studySources } from '../../src/run/study-files.ts';
import { emptyFolder, layshaft, type Outcome } from './built-program.ts';

vi.setConfig({ testTimeout: 180_000 });

const studies = fileURLToPath(new URL('../../studies', import.meta.url));
const files = readdirSync(studies).filter((name) => name.endsWith('.yaml'));
const folder = emptyFolder();
cpSync(studies, folder.path, { recursive: true });
afterAll(() => folder.remove());

const run = (...args: string[]): Promise<Outcome> => layshaft(args, { cwd: folder.path });

function read(file: string): Study {
  const path = join(studies, file);
  const checked = checkStudy(readFileSync(path, 'utf8'), file, studySources(path));
  if (!checked.ok) throw new Error(`${file} has mistakes`);
  return checked.study;
}

/** Metrics that a study has no figures for: no map, no battery that follows the design. */
function gapsOf({ trials, lossMap, values }: Study): string[] {
  const cycles = trials.filter(({ kind }) => kind === 'cycle');
  return [
    ...(lossMap === null ? cycles.map(({ name }) => `${name}.outsideMap_pct`) : []),
    ...(values['massAndCost.mass.battery.perEnergy'] === undefined ? ['battery.mass_kg'] : []),
    ...(values['massAndCost.cost.battery.perEnergy'] === undefined ? ['battery.cost'] : []),
  ];
}

describe.each(files)('%s', (file) => {
  const study = read(file);

  it('has no mistakes, and says what a run would do', async () => {
    const { status, stdout, stderr } = await run('check', file, '--json');
    const [{ valid, run: outlook }] = JSON.parse(stdout).studies;
    expect({ status, stderr, valid, possible: outlook.possible }).toEqual({ status: 0, stderr: '', valid: true, possible: true });
  });

  it('gives every figure of its reference design', async () => {
    const { status, stdout } = await run('sheet', file, '--json');
    const { metrics } = JSON.parse(stdout) as MachineSheet;
    expect(status).toBe(0);
    expect(
      Object.entries(metrics)
        // A trial that needs no shift has no shift speed.
        .filter(([name, value]) => value === null && !name.endsWith('.shiftSpeed_kmh'))
        .map(([name]) => name)
        .sort(),
    ).toEqual(gapsOf(study).sort());
  });

  it('says how many designs it makes in the comment above what varies', () => {
    const counts = study.axes.map(({ points }) => points.length);
    const said = /^# (\d+(?: [\w ]+?)?(?: × \d+(?: [\w ]+?)?)+) = ([\d,]+) /mu.exec(readFileSync(join(studies, file), 'utf8'));
    expect(said?.[1]?.match(/\d+/gu)?.map(Number)).toEqual(counts);
    expect(Number(said?.[2]?.replace(',', ''))).toBe(counts.reduce((product, count) => product * count, 1));
  });

  it('books every joule: the sinks of each cycle add up to the drawn energy', () => {
    const bench = createBench(study);
    const cycles = study.trials.filter(({ kind }) => kind === 'cycle').map(({ name }) => name);
    expect(cycles.length).toBeGreaterThan(0);
    let booked = 0;
    // The reference, and designs spread over the search; a prime keeps the step from following an axis.
    for (let number = 0; number <= bench.last; number += number === 0 ? 1 : Math.max(1, Math.floor(bench.last / 23))) {
      const metrics = bench.compute(number)?.metrics ?? [];
      for (const cycle of cycles) {
        const own = metrics.filter(({ column }) => column.trial === cycle);
        const drawn = own.find(({ column }) => column.row.name === 'batteryEnergy')?.value ?? Number.NaN;
        const sinks = own.filter(({ column }) => column.row.name.startsWith('energy.')).map(({ value }) => value);
        expect(sinks).toHaveLength(10);
        const sum = sinks.reduce((total, sink) => total + sink, 0);
        expect(Math.abs(sum - drawn)).toBeLessThanOrEqual(1e-9 * drawn);
        booked++;
      }
    }
    expect(booked).toBeGreaterThanOrEqual(20);
  });

  it('comes to its answer in a run of few of its designs', async () => {
    const thinned = `few-${file}`;
    writeFileSync(join(folder.path, thinned), thin(file, study));
    const { status, stderr } = await run('run', thinned);
    const nothingPasses = file === 'ferry-ramp-shuttle.yaml';
    expect(stderr).toMatch(nothingPasses ? /No design meets every requirement/u : /Designs put forward/u);
    expect(status).toBe(nothingPasses ? 3 : 0);
  });
});

/** The text of a study with its ranges in fewer steps, so that it has at most 650 designs; one that has no more stays as it is. */
function thin(file: string, { axes }: Study): string {
  const designs = (most: number) => axes.reduce((product, { range, points }) => product * (range === null ? points.length : Math.min(points.length, most)), 1);
  let most = 50;
  while (most > 2 && designs(most) > 650) most--;
  const text = readFileSync(join(studies, file), 'utf8');
  return text.replace(/steps: (\d+)/gu, (_, steps: string) => `steps: ${Math.min(Number(steps), most)}`);
}

/** A figure, or a head of a table, in a unit that US readers have another one for. */
const siUnit = /(?:\d|, ) ?(?:kg|t|m|km|mm|cm|km\/h|m\/s|m\/s²|m²|N|kN|N·m|N·m·s|Wh\/km|kWh\/100km|°C|K|kg\/m³|kg·m²|N\/\(km\/h\)|s²\/m²)(?![\w·/²(])/u;

/** What people read of a command. */
async function wordsOf(...args: string[]): Promise<string> {
  const { stdout, stderr } = await run(...args);
  return `${stdout}${stderr}`.replaceAll('\u202f', ' ');
}

/** What people read of a page: no script, no style, not the study as it was written, no sources of traces. */
function visibleWords(document: Document): string {
  for (const hidden of document.querySelectorAll('script, style, pre, dl.run, title, desc')) hidden.remove();
  return (document.documentElement.textContent ?? '').replaceAll('\u202f', ' ');
}

describe('a study read in US units', () => {
  const file = 'few-boat-trailer-tug.yaml';
  const out = join(folder.path, 'out', 'few-boat-trailer-tug');

  it('shows no figure in SI units: sheet, check, run, report and charts', async () => {
    writeFileSync(join(folder.path, file), thin('boat-trailer-tug.yaml', read('boat-trailer-tug.yaml')));
    const told = [await wordsOf('sheet', file), await wordsOf('check', file), await wordsOf('run', file)];
    const report = visibleWords(new JSDOM(readFileSync(join(out, 'report.html'), 'utf8')).window.document);
    const charts = readdirSync(join(out, 'charts')).map((name) => visibleWords(new JSDOM(readFileSync(join(out, 'charts', name), 'utf8')).window.document));
    for (const text of [...told, report, ...charts]) expect(text).not.toMatch(siUnit);
    expect(await wordsOf('sheet', 'ferry-ramp-shuttle.yaml')).toMatch(siUnit);
    expect(told[0]).toMatch(/peak torque +300 +lbf·ft/u);
    expect(told[0]).toMatch(/top speed +63\.2 +mph/u);
    expect(told[1]).toMatch(/trailer mass 9000 lb, trailer drag area 24 ft²/u);
    expect(told[2]).toMatch(/battery energy in errands +Wh\/mi/u);
    expect(report).toContain('with 600 lb on board and a trailer of 9000 lb');
    expect(charts.join(' ')).toContain('Wh/mi (less is better)');
  });

  it('stays metric for programs: sheet --json, front.csv', async () => {
    const { metrics, inputs } = JSON.parse((await run('sheet', file, '--json')).stdout) as MachineSheet;
    expect(inputs['motor.peakTorque_Nm']).toBeCloseTo(406.745, 3);
    expect(Object.keys(metrics)).toEqual(expect.arrayContaining(['coast road.speed_kmh', 'haul.batteryEnergy_Wh_per_km', 'vehicle.mass_kg']));
    const heads = readFileSync(join(out, 'front.csv'), 'utf8').split('\n')[0]?.split(',') ?? [];
    expect(heads).toEqual(expect.arrayContaining(['motor.peakTorque_Nm', 'errands.batteryEnergy_Wh_per_km', 'coast road.speed_kmh', 'driveUnit.peakPower_kW']));
  });
});
