/** What leaves common practice or misleads is said once, with its place; what does not stays silent. */
import { describe, expect, it } from 'vitest';
import { warningRows } from '../../../src/core/study/warnings.ts';
import { check, edited, harbour } from './study-from-disk.ts';

const LOSSES = / {2}losses: \{.*\n/u.exec(harbour)?.[0] as string;
const MAP = '# covers: motor and inverter\nspeed_rpm,torque_Nm,loss_W\n0,0,1\n0,300,2000\n13000,0,900\n13000,300,9000\n';
const MAP_EFFICIENCY = '# covers: motor and inverter\nspeed_rpm,torque_Nm,efficiency_pct\n500,10,80\n500,300,82\n13000,10,88\n13000,300,99.5\n';
const calm = edited(harbour, ['  vehicle.dragArea: { oneOf: [1.05 m², 1.12 m², 1.24 m²] }\n', '']);
const coast = edited(
  calm,
  ['  dragArea: 1.12 m²            # drag coefficient times frontal area\n', '  coastDown: { f0: 180 N, f1: 0.3 N/(km/h), f2: 0.05 N/(km/h)², at: 1900 kg }\n'],
  ['  rolling: { c0: 0.0098, c1: 2.1e-6 s²/m² }      # or  coastDown: { f0: …, f1: …, f2: …, at: 1900 kg }\n', ''],
);

/** Rule, a text that it speaks of, where, and a part of what it says. */
const seen: readonly (readonly [rule: string, text: string, path: string, says: string])[] = [
  [
    'no wheel inertia',
    edited(calm, ['  wheelInertia: 5.2 kg·m²      # all wheels;  or  massFactor: 1.06\n', '']),
    'vehicle',
    'neither wheelInertia nor massFactor',
  ],
  ['no rotor inertia', edited(calm, ['  inertia: { perTorque: 1.5e-4 kg·m²/(N·m) }      # or a fixed value\n', '']), 'motor', 'favours large ratios'],
  ['inertia beside mass factor', edited(calm, ['wheelInertia: 5.2 kg·m² ', 'massFactor: 1.06 ']), 'motor.inertia', 'without effect'],
  ['mass factor', edited(calm, ['wheelInertia: 5.2 kg·m²', 'wheelInertia: 120 kg·m²']), 'vehicle.wheelInertia', 'for the reference design'],
  [
    'mass factor',
    edited(calm, ['wheelInertia: 5.2 kg·m² ', 'massFactor: 1.005 '], ['  inertia: { perTorque: 1.5e-4 kg·m²/(N·m) }      # or a fixed value\n', '']),
    'vehicle.massFactor',
    '1.005',
  ],
  ['gearing efficiency', edited(calm, ['efficiency: 97 %', 'efficiency: 99.6 %']), 'gearing.efficiency', '99.6'],
  ['map efficiency', edited(calm, [LOSSES, '  map: e.csv\n']), 'motor.map', '99.5'],
  ['sustained at peak', edited(calm, ['kind: top speed, laden', 'kind: top speed, rating: peak, laden']), 'trials.cruise', 'rated peak'],
  ['unpriced circumstance', harbour, 'vary.vehicle.dragArea', 'no objective prices it'],
  ['motor speed', edited(calm, ['{ atLeast: 130 km/h }', '{ atLeast: 150 km/h }']), 'trials.cruise', 'at ratios above 10.88'],
  ['speeds out of order', edited(calm, ['to: 5600 rpm, steps: 13', 'to: 15200 rpm, steps: 13']), 'vary.motor.baseSpeed', '15 200'],
  ['map scale', edited(calm, [LOSSES, '  map: m.csv\n'], ['from: 180 N·m, to: 330 N·m', 'from: 100 N·m, to: 330 N·m']), 'vary.motor.peakTorque', '0.28 to'],
  ['map and base speed', edited(calm, [LOSSES, '  map: m.csv\n']), 'vary.motor.baseSpeed', 'with a measured map'],
  ['air beside coast-down', coast, 'air.temperature', 'without effect'],
  ['drag torque beside coast-down', coast, 'gearing.dragTorque', 'beside coast-down'],
  ['aim against the catalogue', edited(calm, ['maximise: []', 'maximise: [trunk.lossLoad]']), 'tradeOff.maximise', 'maximise trunk.lossLoad'],
  ['discharge limit', edited(calm, ['discharge: 160 kW', 'discharge: 600 kW']), 'battery.discharge', 'allow 423'],
  ['too heavy', edited(calm, ['kind: top speed, laden: 2800 kg', 'kind: top speed, laden: 1700 kg']), 'trials.cruise.laden', '1700'],
  [
    'trailer without drag',
    edited(calm, ['kind: top speed, laden', 'kind: top speed, trailer: { mass: 500 kg }, laden']),
    'trials.cruise.trailer',
    'no air resistance',
  ],
];

describe('a warning', () => {
  it.each(seen)('%s: %#', (rule, text, path, says) => {
    const read = check(text, { 'm.csv': MAP, 'e.csv': MAP_EFFICIENCY });
    const expected = warningRows.find((row) => row.rule === rule)?.expected;
    const told = read.ok ? read.warnings.filter((warning) => warning.expected === expected && warning.path === path) : [];
    expect(told.map(({ found }) => found.replaceAll('\u202f', ' '))).toEqual([expect.stringContaining(says)]);
    expect(told[0]?.hint).toMatch(/\S/u);
    expect(told[0]?.line).toBeGreaterThan(1);
  });

  it('is not given where a study keeps to common practice', () => {
    const read = check(calm);
    expect(read.ok && read.warnings).toEqual([]);
  });

  it('of every rule is shown above', () => {
    expect(new Set(seen.map(([rule]) => rule))).toEqual(new Set(warningRows.map(({ rule }) => rule)));
  });
});
