/** The built program in an empty folder, as a person or a script uses it: what it prints where, what it writes, its exit status. */
import { copyFileSync, existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { emptyFolder, layshaft, type Start } from './built-program.ts';

// Each test starts the program anew, several times over: slow where the machine is busy.
vi.setConfig({ testTimeout: 180_000 });

const folder = emptyFolder();
const at = (...names: string[]) => join(folder.path, ...names);
const run = (args: string, more: Partial<Start> = {}) => layshaft(args === '' ? [] : args.split(' '), { cwd: folder.path, ...more });
const smallVan = readFileSync(new URL('data/small-van.yaml', import.meta.url), 'utf8');

/** Narrow no-break spaces as plain ones. */
function plain(text: string): string {
  return text.replaceAll('\u202f', ' ');
}

beforeAll(() => {
  writeFileSync(at('small-van.yaml'), smallVan);
  writeFileSync(at('too-steep.yaml'), smallVan.replace('atLeast: 20 %', 'atLeast: 45 %'));
  writeFileSync(at('plain.yaml'), smallVan.slice(0, smallVan.indexOf('vary:')));
  writeFileSync(at('wrong.yaml'), smallVan.replace('1780 kg', '1780').replace('dragArea', 'dragAera').replace('ramp.grade', 'ramp.slope'));
  writeFileSync(at('us.yaml'), `${smallVan}report: { units: US }\n`);
});
afterAll(() => folder.remove());

describe('help and mistakes of the command line', () => {
  it('prints the first screen on stdout when asked, status 0', async () => {
    const { status, stdout, stderr } = await run('--help');
    expect(stdout).toContain('from one study file to the trade-off front');
    expect(stdout).toContain('layshaft run my-van.yaml');
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
  });

  it('prints the first screen on stderr when nothing was asked, status 2', async () => {
    const { status, stdout, stderr } = await run('');
    expect(stderr).toContain('Commands, in the order of first use');
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
  });

  it.each(['run', 'check', 'sheet', 'charts', 'compare', 'cycles', 'schema', 'new'])('explains %s with an example', async (command) => {
    const { status, stdout } = await run(`${command} --help`);
    expect(stdout).toMatch(new RegExp(`^Usage: layshaft ${command}`));
    expect(stdout).toMatch(new RegExp(`Examples\n {2}layshaft ${command}`));
    expect(status).toBe(0);
  });

  it.each([
    ['rnu small-van.yaml', /unknown command 'rnu'.*Did you mean run\?/s],
    ['sheet small-van.yaml --sett a=1', /unknown option '--sett'.*Did you mean --set\?.*layshaft sheet --help/s],
    ['sheet', /missing required argument 'STUDY'/],
    ['sheet small-van.yaml us.yaml', /too many arguments/],
    ['sheet small-van.yaml --design 1.5', /whole number, at least 0/],
    ['run small-van.yaml --workers 0', /whole number, at least 1/],
    ['charts out/small-van', /not available yet.*charts folder/s],
    ['compare out/a out/b', /not available yet.*front\.csv/s],
  ])('answers "%s" with what to do, status 2', async (args, says) => {
    const { status, stdout, stderr } = await run(args);
    expect(stderr).toMatch(says);
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
  });
});

describe('sheet', () => {
  it('gives inputs, metrics and limits as JSON and nothing else', async () => {
    const { status, stdout, stderr } = await run('sheet small-van.yaml --json');
    const sheet = JSON.parse(stdout);
    expect(Object.keys(sheet)).toEqual(['inputs', 'metrics', 'limits']);
    expect(sheet.inputs).toEqual({ 'gearing.ratio': 9.5, 'motor.peakTorque_Nm': 270 });
    expect(sheet.metrics['driveUnit.axleTorque_Nm']).toBeCloseTo(2565, 9);
    expect(sheet.metrics['battery.cost']).toBeNull();
    expect(Object.keys(sheet.limits)).toEqual(['ramp.grade_pct', 'cruise.speed_kmh']);
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
  });

  it('gives every number as input where the study varies nothing', async () => {
    const { inputs } = JSON.parse((await run('sheet plain.yaml --json')).stdout);
    expect(inputs['vehicle.kerbMass_kg']).toBe(1780);
    expect(inputs['trials.sprint.laden_kg']).toBe(2800);
  });

  it('takes settings before the figures of the study, and a design by its number', async () => {
    const set = JSON.parse((await run('sheet small-van.yaml --json --set gearing.ratio=12 --set vehicle.auxiliaries=1kW')).stdout);
    expect(set.inputs).toEqual({ 'gearing.ratio': 12, 'motor.peakTorque_Nm': 270, 'vehicle.auxiliaries_W': 1000 });
    const last = JSON.parse((await run('sheet small-van.yaml --json --design 35')).stdout);
    expect(last.inputs).toEqual({ 'gearing.ratio': 12, 'motor.peakTorque_Nm': 330 });
    const same = JSON.parse((await run('sheet small-van.yaml --json --set gearing.ratio=12 --set motor.peakTorque=330Nm')).stdout);
    expect(same).toEqual(last);
  });

  it('shows people the trials with what limits them, the requirements with their margins, and the caution, on stderr', async () => {
    const { status, stdout, stderr } = await run('sheet small-van.yaml --set gearing.ratio=7');
    expect(plain(stderr)).toMatch(/ramp: hill start, start acceleration 0\.3 m\/s², laden mass 2800 kg/);
    expect(plain(stderr)).toMatch(/ramp\.grade +at least 20 % +\d+\.\d+ % +MISSED by \d/);
    expect(plain(stderr)).toMatch(/sprint\.time +at most 14 s +\d+\.\d+ s +met, \d/);
    expect(stderr).toContain('limited by motor torque');
    expect(stderr).toContain('Concept-stage estimates');
    expect({ status, stdout }).toEqual({ status: 0, stdout: '' });
  });

  it('reads in US units where the study asks for them, and keeps SI for programs', async () => {
    expect((await run('sheet us.yaml')).stderr).toMatch(/battery energy +Wh\/mi/);
    expect(JSON.parse((await run('sheet us.yaml --json')).stdout)).toEqual(JSON.parse((await run('sheet small-van.yaml --json')).stdout));
  });

  it('tells all wrong settings at once, with the nearest name and the unit, status 2', async () => {
    const { status, stdout, stderr } = await run('sheet small-van.yaml --set gearing.rato=3 --set motor.peakTorque=5 --set x');
    expect(stderr).toContain('Did you mean gearing.ratio?');
    expect(stderr).toContain('5 N·m.');
    expect(stderr).toContain('write name=value');
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
  });

  it('says which designs there are, status 2', async () => {
    const beyond = await run('sheet small-van.yaml --design 36');
    expect(beyond.stderr).toContain('designs 1 to 35');
    const nothing = await run('sheet plain.yaml --design 1');
    expect(nothing.stderr).toContain('Nothing varies in this study');
    expect([beyond.status, nothing.status]).toEqual([2, 2]);
  });
});

describe('check', () => {
  it('says what a run would do', async () => {
    const { status, stdout, stderr } = await run('check small-van.yaml');
    expect(stderr).toContain('no mistakes');
    expect(stderr).toMatch(/A run evaluates 35 designs, every combination of what varies: about .* with \d+ workers?, about .* of results/);
    expect(plain(stderr)).toMatch(/All 35 designs: 21 \(60 %\) meet every requirement/);
    expect(plain(stderr)).toMatch(/ramp\.grade +at least 20 % +removes 40 %/);
    expect({ status, stdout }).toEqual({ status: 0, stdout: '' });
  });

  it('says which requirement removes everything', async () => {
    const { status, stderr } = await run('check too-steep.yaml');
    expect(plain(stderr)).toMatch(/ramp\.grade +at least 45 % +removes everything/);
    expect(status).toBe(0);
  });

  it('says what a run still needs of a study that is complete for a sheet', async () => {
    const { status, stderr } = await run('check plain.yaml');
    expect(stderr).toMatch(/A run needs vary/);
    expect(status).toBe(0);
  });

  it('tells every mistake with its place, status 2, beside the studies that are right', async () => {
    const { status, stdout, stderr } = await run('check wrong.yaml small-van.yaml');
    expect(stderr).toMatch(/wrong\.yaml:4:\d+: error in vehicle\.kerbMass/);
    expect(stderr).toMatch(/wrong\.yaml:5:\d+/);
    expect(stderr).toContain('dragArea');
    expect(stderr).toMatch(/wrong\.yaml:\d+:\d+: error in requirements/);
    expect(stderr).toMatch(/\d mistakes in wrong\.yaml/);
    expect(stderr).toMatch(/small-van\.yaml has no mistakes/);
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
  });

  it('gives the same as JSON', async () => {
    const { status, stdout } = await run('check wrong.yaml small-van.yaml plain.yaml --json');
    const [wrong, right, single] = JSON.parse(stdout).studies;
    expect(wrong).toMatchObject({ study: 'wrong.yaml', valid: false });
    expect(wrong.issues[0]).toMatchObject({ file: 'wrong.yaml', line: 4, path: 'vehicle.kerbMass' });
    expect(right).toMatchObject({ valid: true, run: { possible: true, designs: 35, sample: { designs: 35, feasible: 21 } } });
    expect(right.run.sample.requirements[0]).toEqual({ metric: 'ramp.grade_pct', atLeast: 20, implied: false, failing: 14 });
    expect(single.run).toMatchObject({ possible: false });
    expect(status).toBe(2);
  });
});

describe('run', () => {
  it('writes the run folder and sums it up, status 0', async () => {
    const { status, stdout, stderr } = await run('run small-van.yaml --workers 1');
    expect(readdirSync(at('out', 'small-van')).sort()).toEqual(['charts', 'designs', 'front.csv', 'report.html', 'run.json', 'study.yaml']);
    expect(readFileSync(at('out', 'small-van', 'study.yaml'), 'utf8')).toBe(smallVan);
    expect(readFileSync(at('out', 'small-van', 'report.html'), 'utf8')).toContain('<title>Small harbour van');
    expect(stderr).toMatch(/^0 of 35 designs$/m);
    expect(stderr).toMatch(/^35 of 35 designs, .*60 % feasible, \d+ on the front$/m);
    expect(plain(stderr)).toContain('21 (60 %) meet every requirement');
    expect(stderr).toMatch(/A {2}design \d+: least battery energy in stops/);
    expect(stderr).toMatch(/design \d+: .*balanced/);
    expect(stderr).toMatch(/grade in ramp +at least 20.% +14 \(40 %\)/);
    expect(stderr).toContain('Report: out/small-van/report.html');
    expect({ status, stdout }).toEqual({ status: 0, stdout: '' });
  });

  it('gives the summary as JSON, its proposals the same bits as sheet gives', async () => {
    const { status, stdout } = await run('run small-van.yaml --out elsewhere --json');
    const [summary] = JSON.parse(stdout).runs;
    expect(summary).toMatchObject({ study: 'small-van.yaml', status: 0, counts: { designs: 35, feasible: 21 } });
    expect(existsSync(join(folder.path, summary.folder, 'front.csv'))).toBe(true);
    const [best] = summary.proposals;
    const sheet = JSON.parse((await run(`sheet small-van.yaml --design ${best.number} --json`)).stdout);
    for (const key of ['stops.batteryEnergy_Wh_per_km', 'driveUnit.cost', 'ramp.grade_pct']) expect(best[key]).toBe(sheet.metrics[key]);
    expect(sheet.inputs).toEqual({ 'gearing.ratio': best['gearing.ratio'], 'motor.peakTorque_Nm': best['motor.peakTorque_Nm'] });
    expect(status).toBe(0);
  });

  it('says first that nothing is feasible, what comes closest and what easing would bring, status 3', async () => {
    const { status, stderr } = await run('run too-steep.yaml');
    const text = plain(stderr);
    expect(text).toContain('No design meets every requirement.');
    expect(text).toMatch(/design \d+: closest to passing; misses grade in ramp \(\d+\.\d+ %, at least 45 % asked\)/);
    expect(text).toMatch(/grade in ramp +at least 45 % +35 \(100 %\) +\d+ \(\d+ %\) +a first passes at \d+\.\d+ %/);
    expect(existsSync(at('out', 'too-steep', 'report.html'))).toBe(true);
    expect(status).toBe(3);
  });

  it('runs several studies one after another; a wrong one stops none, and the worst status is given', async () => {
    const { status, stdout, stderr } = await run('run wrong.yaml too-steep.yaml plain.yaml small-van.yaml --out several --json');
    expect(readdirSync(at('several')).sort()).toEqual(['small-van', 'too-steep']);
    expect(JSON.parse(stdout).runs.map(({ study, status: each }: { study: string; status: number }) => [study, each])).toEqual([
      ['wrong.yaml', 2],
      ['too-steep.yaml', 3],
      ['plain.yaml', 2],
      ['small-van.yaml', 0],
    ]);
    expect(stderr).toMatch(/plain\.yaml: .*vary/);
    expect(status).toBe(2);
  });

  it('prints nothing on stdout where no study can run', async () => {
    const { status, stdout } = await run('run wrong.yaml --json');
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
  });

  it('refuses two studies that would write to one folder, before either runs', async () => {
    const { status, stderr } = await run('run small-van.yaml ./small-van.yaml --out twice');
    expect(stderr).toContain('same folder');
    expect(existsSync(at('twice'))).toBe(false);
    expect(status).toBe(2);
  });

  it('leaves a folder alone that holds other things, status 1', async () => {
    copyFileSync(at('small-van.yaml'), at('a-file'));
    const { status, stderr } = await run('run small-van.yaml --out a-file');
    expect(stderr).toMatch(/error: small-van\.yaml: .*--out/);
    expect(status).toBe(1);
  });

  it('ends an interrupted run with status 130', async () => {
    writeFileSync(at('long.yaml'), smallVan.replace('steps: 7', 'steps: 2000').replace('steps: 5', 'steps: 2000'));
    const { status, stderr } = await run('run long.yaml', { signal: { name: 'SIGINT', when: /0 of 4.000.000 designs/ } });
    expect(stderr).toContain('Interrupted');
    expect(status).toBe(130);
  });
});

describe('cycles, schema and new', () => {
  it('lists the built-in cycles for people and for programs', async () => {
    const people = await run('cycles');
    expect(people.stderr).toMatch(/^wltc-3b +1800.s +23\.27.km +131\.3.km\/h +46\.5.km\/h +WLTC class 3b/m);
    expect(people.stdout).toBe('');
    const { cycles } = JSON.parse((await run('cycles --json')).stdout);
    expect(cycles.map(({ name }: { name: string }) => name)).toEqual(['hd-udds', 'hwfet', 'nycc', 'udds', 'us06', 'wltc-2', 'wltc-3b']);
    expect(cycles[3]).toMatchObject({ name: 'udds', duration_s: 1369 });
    expect(people.status).toBe(0);
  });

  it('prints the JSON Schema on stdout', async () => {
    const { status, stdout, stderr } = await run('schema');
    expect(JSON.parse(stdout)).toMatchObject({ properties: { vehicle: {}, motor: {}, trials: {} } });
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
  });

  it('writes a starter that passes its own check and runs', async () => {
    expect((await run('new mine.yaml')).status).toBe(0);
    expect((await run('check mine.yaml')).stderr).toContain('mine.yaml has no mistakes');
    expect((await run('run mine.yaml')).status).toBe(0);
  });

  it('never overwrites a file, status 2', async () => {
    const { status, stderr } = await run('new small-van.yaml');
    expect(stderr).toContain('small-van.yaml exists already');
    expect(readFileSync(at('small-van.yaml'), 'utf8')).toBe(smallVan);
    expect(status).toBe(2);
    expect((await run('new no/such/folder.yaml')).status).toBe(2);
  });
});

describe('streams', () => {
  it('prints no colour codes off a terminal, even where the environment knows colours', async () => {
    const { stderr } = await run('sheet small-van.yaml', { env: { TERM: 'xterm-256color', COLORTERM: 'truecolor' } });
    expect(stderr).not.toContain('\u001b');
  });

  it('colours and moves on a terminal; NO_COLOR takes the colour away and leaves the bar', async () => {
    const terminal =
      'data:text/javascript,import tty from "node:tty";const{getColorDepth}=tty.WriteStream.prototype;Object.assign(process.stderr,{isTTY:true,columns:80,getColorDepth})';
    const onTerminal = (env: Record<string, string>) => run('run small-van.yaml', { node: ['--import', terminal], env: { TERM: 'xterm-256color', ...env } });
    const coloured = (await onTerminal({})).stderr;
    expect(coloured).toContain('\u001b[1mDesigns put forward\u001b[22m');
    expect(coloured).toMatch(/\r[█░]{10} +\d+ %/);
    const plainInk = (await onTerminal({ NO_COLOR: '1' })).stderr;
    expect(plainInk).toContain('\nDesigns put forward\n');
    expect(plainInk).toMatch(/\r[█░]{10} +\d+ %/);
  });

  it('says nothing when the reader closes stdout early', async () => {
    const { status, stderr } = await run('schema', { closeStdoutAfter: 1 });
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
  });

  it('calls a fault of its own a fault, with details, status 1', async () => {
    const broken = 'data:text/javascript,JSON.stringify=()=>{throw new Error("made to fail")}';
    const { status, stdout, stderr } = await run('sheet small-van.yaml --json', { node: ['--import', broken] });
    expect(stderr).toMatch(/This is a fault in layshaft.*layshaft \d+\.\d+\.\d+, Node v.*made to fail/s);
    expect({ status, stdout }).toEqual({ status: 1, stdout: '' });
  });
});
