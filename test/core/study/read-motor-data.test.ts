/** Measured curves and maps from CSV: losses at the nodes, a full grid, and answers that name the cell. */
import { describe, expect, it } from 'vitest';
import { readFullLoad, readLossMap } from '../../../src/core/study/read/read-motor-data.ts';
import { formatIssues } from '../../../src/core/study/text/issue.ts';

const rpm = (2 * Math.PI) / 60;

function mapProblems(csv: string): string {
  const read = readLossMap(csv, 'm.csv');
  return read.ok ? '' : formatIssues(read.problems);
}

function lossesOf(csv: string): readonly number[] {
  const read = readLossMap(csv, 'm.csv');
  if (!read.ok) throw new Error(formatIssues(read.problems));
  return read.data.map.lossesW;
}

const long = 'speed_rpm,torque_Nm,loss_W\n1000,10,50\n1000,90,300\n6000,10,110\n6000,90,700\n';

describe('a loss map', () => {
  it('reads rows sorted by speed, rows sorted by torque and a table alike', () => {
    const byTorque = 'torque_Nm,speed_rpm,loss_W\n10,1000,50\n10,6000,110\n90,1000,300\n90,6000,700\n';
    const table = 'loss_W by speed_rpm and torque_Nm,10,90\n1000,50,300\n6000,110,700\n';
    expect(lossesOf(long)).toEqual([50, 300, 110, 700]);
    expect(lossesOf(byTorque)).toEqual(lossesOf(long));
    expect(lossesOf(table)).toEqual(lossesOf(long));
    expect(lossesOf(long.replace('loss_W', 'loss_kW')).map((loss) => loss / 1000)).toEqual(lossesOf(long));
  });

  it('turns an efficiency into the loss at its node: T ω (1/e − 1) motoring, |T| ω (1 − e) generating', () => {
    const csv = 'speed_rpm,torque_Nm,efficiency_pct\n1000,-40,90\n1000,40,80\n6000,-40,95\n6000,40,92\n';
    const [generating, motoring] = lossesOf(csv) as [number, number];
    expect(generating).toBeCloseTo(40 * 1000 * rpm * 0.1, 9);
    expect(motoring).toBeCloseTo(40 * 1000 * rpm * (1 / 0.8 - 1), 9);
    const read = readLossMap(csv, 'm.csv');
    expect(read.ok && read.data).toMatchObject({ plain: false, bestEfficiency: 0.95, map: { motoringOnly: false } });
    expect(lossesOf(csv.replace('efficiency_pct', 'efficiency').replaceAll(/,(\d\d)\n/gu, ',0.$1\n'))[1]).toBeCloseTo(motoring, 9);
  });

  it('says what it covers where its head does', () => {
    const covers = (note: string) => {
      const read = readLossMap(`${note}\n${long}`, 'm.csv');
      return read.ok && read.data.covers;
    };
    expect(covers('# covers: motor')).toBe('motor');
    expect(covers('# source: bench 3\n# Covers: motor and inverter')).toBe('motor and inverter');
    expect(covers('# covers: everything')).toBe('unknown');
    expect(covers('# source: bench 3')).toBeNull();
  });

  it.each([
    ['speed_rpm,torque_Nm,loss_W\n1000,10,50\n1000,90,300\n6000,10,110\n', 'm.csv:1:1', 'none at speed 6000, torque 90'],
    ['speed_rpm,torque_Nm,loss_W\n1000,10,50\n1000,10,60\n1000,90,300\n6000,10,1\n6000,90,3\n', 'm.csv:3:1', 'speed 1000, torque 10 again, after line 2'],
    ['speed_rpm,torque_Nm,loss_W\n6000,10,50\n6000,90,300\n1000,10,110\n1000,90,3\n', 'm.csv:4:1', 'rows sorted'],
    ['speed_rpm,torque_Nm,loss_W\n1000,10,50\n1000,90,300\n6000,10,\n6000,90,3\n', 'm.csv:4:9', 'an empty cell'],
    ['speed_rpm,torque_Nm,loss_W\n1000,10,50\n1000,90,-300\n6000,10,5\n6000,90,3\n', 'm.csv:3:9', 'a loss of at least 0'],
    ['speed_rpm,torque_Nm,loss_W\n1000,10,50\n1000,90,300\n', 'm.csv:1:1', 'at least two speeds and two torques'],
    ['speed_rpm,torque_Nm,loss\n1000,10,50\n1000,90,300\n', 'm.csv:1:1', 'loss_W or loss_kW'],
    ['speed_rpm,torque_Nm,efficiency_pct\n0,10,50\n0,90,60\n6000,10,80\n6000,90,90\n', 'm.csv:2:6', 'a node at zero speed'],
    ['speed_rpm,torque_Nm,efficiency_pct\n100,0,50\n100,90,60\n6000,0,80\n6000,90,90\n', 'm.csv:2:7', 'a node at zero torque'],
    ['speed_rpm,torque_Nm,efficiency_pct\n100,10,50\n100,90,60\n6000,10,80\n6000,90,190\n', 'm.csv:5:9', '190 %'],
    ['speed_rpm,torque_Nm,efficiency\n100,10,0.5\n100,90,0.6\n6000,10,80\n6000,90,0.9\n', 'm.csv:4:9', '8000 %'],
    ['loss_W by torque_Nm and speed_rpm,10,90\n1000,50,300\n6000,110,700\n', 'm.csv:1:1', 'loss_W by speed_rpm and torque_Nm'],
    ['loss_W by speed_rpm and torque_Nm,90,10\n1000,50,300\n6000,110,700\n', 'm.csv:1:38', '10 after 90'],
    ['loss_W by speed_rpm and torque_Nm,10,90\n6000,50,300\n1000,110,700\n', 'm.csv:3:1', '1000 after 6000'],
    ['loss_W by speed_rpm and torque_Nm,10,90\n1000,50\n6000,110,700\n', 'm.csv:2:8', 'an empty cell'],
  ])('%j is answered with its cell', (csv, place, part) => {
    expect(mapProblems(csv)).toContain(`${place}:`);
    expect(mapProblems(csv)).toContain(part);
  });

  it('of scattered points is refused as no grid, in bounded time', () => {
    const rows = Array.from({ length: 3000 }, (_, k) => `${1000 + k},${10 + k * 0.01},5`).join('\n');
    expect(mapProblems(`speed_rpm,torque_Nm,loss_W\n${rows}\n`)).toContain('Bring the measured points onto a grid');
  });
});

describe('a full-load curve', () => {
  it('states the largest torque, and the largest power over it', () => {
    const csv = 'speed_rpm,torque_Nm\n0,300\n3000,280\n9000,120\n';
    const read = readFullLoad(csv, 'c.csv');
    expect(read.ok && read.data.referencePeakTorqueNm).toBe(300);
    expect(read.ok && read.data.referenceBaseSpeedRadPerS).toBeCloseTo((9000 * rpm * 120) / 300, 9);
  });

  it.each([
    ['speed_rpm,torque_Nm\n0,300\n0,280\n', 'c.csv:3:1'],
    ['speed_rpm,torque_Nm\n0,300\n3000,-5\n', 'c.csv:3:6'],
    ['speed_rpm,torque_Nm\n0,0\n3000,0\n', 'c.csv:1:1'],
    ['speed_rpm,torque\n0,9\n3000,9\n', 'c.csv:1:1'],
    ['speed_rpm,torque_Nm\n0,9\n', 'c.csv:1:1'],
  ])('%j is answered with its place', (csv, place) => {
    const read = readFullLoad(csv, 'c.csv');
    expect(read.ok ? '' : formatIssues(read.problems)).toContain(`${place}:`);
  });
});
