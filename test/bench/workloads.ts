/** The studies that are timed: the common workload, variants of it, and the parcel van. */
import { readFileSync } from 'node:fs';
import { checkStudy, type StudySources } from '../../src/core/study/check-study.ts';
import type { Study } from '../../src/core/study/study.ts';
import { studySources } from '../../src/run/study-files.ts';

/** A study that varies something, and its text. */
export interface Workload {
  readonly name: string;
  readonly text: string;
  readonly study: Study;
}

const commonText = readText('test/bench/common-workload.yaml');

/** The workload that all figures are told for. */
export const commonWorkload = workload('common workload', commonText);

/** About so many of its designs: the steps of each axis are thinned out alike. */
export function smallerCommon(designs: number): Workload {
  const steps = (design: number) => Math.max(2, Math.round(design * (designs / 1_000_000) ** 0.2));
  return workload(
    `common workload, about ${designs} designs`,
    commonText.replace(/steps: (\d+)/gu, (_, count: string) => `steps: ${steps(Number(count))}`),
  );
}

/** What costs more: two ratios and a measured loss map; and a worked study. */
export function otherWorkloads(): Workload[] {
  return [
    workload('parcel van (worked study)', readText('studies/harbour-parcel-van.yaml')),
    workload(
      'common workload with two ratios',
      commonText
        .replace('  ratio: 9.2', '  ratios: [13, 7]\n  shiftTime: 0.3 s')
        .replace('  gearing.ratio: { from: 7, to: 12, steps: 25 }', '  gearing.ratios: { oneOf: [[11, 6], [12, 7], [13, 8], [14, 9]] }'),
    ),
    workload('common workload with a loss map', commonText.replace(/ {2}losses: .*/u, '  map: map.csv'), { 'map.csv': lossMapCsv() }),
    workload(
      'common workload with the account of the cycle',
      commonText.replace('driveUnit.cost]', 'driveUnit.cost]\n  keep: [day.rmsTorque, day.energy.motor]'),
    ),
  ];
}

/** A path within the project, from which the benchmark is started. */
function readText(path: string): string {
  return readFileSync(path, 'utf8');
}

function workload(name: string, text: string, files: Readonly<Record<string, string>> = {}): Workload {
  const own = studySources('workload.yaml');
  const sources: StudySources = { ...own, file: (path) => (path in files ? { text: files[path] } : own.file(path)) };
  const checked = checkStudy(text, 'workload.yaml', sources);
  if (!checked.ok) throw new Error(`${name}: ${JSON.stringify(checked.issues, null, 1)}`);
  return { name, text, study: checked.study };
}

/** Losses of an invented motor of 230 N·m and 4500 rpm on a grid of 15 speeds and 12 torques. */
function lossMapCsv(): string {
  const rows = ['speed_rpm,torque_Nm,loss_W'];
  for (let speed = 0; speed <= 14_000; speed += 1000) {
    for (let torque = 0; torque <= 231; torque += 21) {
      const radPerS = (speed * Math.PI) / 30;
      const lossW = 150 + 0.9 * radPerS + 4e-4 * radPerS * radPerS + 0.17 * torque * torque * (1 + 1e-7 * radPerS * radPerS) + 8 * torque;
      rows.push(`${speed},${torque},${lossW.toFixed(1)}`);
    }
  }
  return `${rows.join('\n')}\n`;
}
