/** The tables that everything else is made from are complete and hang together. */
import { describe, expect, it } from 'vitest';
import { designMetrics, machineKey, trialMetrics } from '../../../src/core/study/catalogue/metrics.ts';
import { findParameter, type ParameterRow, parameters, trialParameters } from '../../../src/core/study/catalogue/parameters.ts';
import { type TrialKind, trialKinds } from '../../../src/core/study/catalogue/trial-kinds.ts';
import { studyLayout, trialLayout } from '../../../src/core/study/read/layout.ts';
import { alternatives, groups, needs, orders } from '../../../src/core/study/rules/rules.ts';
import { warningRows } from '../../../src/core/study/warn/warnings.ts';
import { quantities } from '../../../src/core/units/units.ts';

const numbers: readonly ParameterRow[] = [...parameters, ...Object.values(trialParameters)];

describe('the catalogue of parameters', () => {
  it.each(numbers.map((row) => [row.name, row] as const))('%s has a sentence, a label, a quantity and bounds that its default meets', (_, row) => {
    expect(row.sentence).toMatch(/^[A-Z].{9,}[.]$/u);
    expect(row.label.length).toBeGreaterThan(1);
    expect(Object.hasOwn(quantities, row.quantity)).toBe(true);
    const low = row.atLeast ?? row.above ?? Number.NEGATIVE_INFINITY;
    const high = row.atMost ?? row.below ?? Number.POSITIVE_INFINITY;
    expect(low).toBeLessThan(high);
    if (!row.name.startsWith('massAndCost.cost')) expect(high).toBeLessThan(Number.POSITIVE_INFINITY);
    if (row.default !== undefined) {
      expect(row.default).toBeGreaterThanOrEqual(low);
      expect(row.default).toBeLessThanOrEqual(high);
    }
  });

  it('has every name once, and finds each', () => {
    expect(new Set(parameters.map(({ name }) => name)).size).toBe(parameters.length);
    for (const row of parameters) expect(findParameter(row.name)).toBe(row);
    for (const [key, row] of Object.entries(trialParameters)) expect(findParameter(`trials.some trial.${key}`)).toBe(row);
    expect(findParameter('trials.some trial.constructor')).toBeUndefined();
  });
});

describe('the catalogue of metrics', () => {
  it.each([...Object.entries(trialMetrics), ...Object.entries(designMetrics)])('%s stands under its own name with sentence and label', (name, row) => {
    expect(row.name).toBe(name);
    expect(row.sentence).toMatch(/^[A-Z].{9,}[.]$/u);
    expect(row.label.length).toBeGreaterThan(1);
  });

  it('has the machine names that programs read', () => {
    expect(machineKey('ramp.grade', 'grade')).toBe('ramp.grade_pct');
    expect(machineKey('town.batteryEnergy', 'energyPerDistance')).toBe('town.batteryEnergy_Wh_per_km');
    expect(machineKey('town.rmsTorque', 'torque')).toBe('town.rmsTorque_Nm');
    expect(machineKey('cruise.speed', 'speed')).toBe('cruise.speed_kmh');
    expect(machineKey('driveUnit.cost', 'money')).toBe('driveUnit.cost');
    expect(machineKey('driveUnit.peakPower', 'power')).toBe('driveUnit.peakPower_kW');
  });
});

describe('the tables of rules', () => {
  const stands = new Set([
    'trials',
    ...places(studyLayout),
    ...(Object.keys(trialKinds) as TrialKind[]).flatMap((kind) => places(trialLayout(kind)).map((path) => `trials.*.${path}`)),
  ]);
  const marks = ['motor.map.wholeDrive', 'motor.map.motorAlone'];
  const named = [
    ...alternatives.flatMap(({ holds, rulesOut, inFile }) => [...holds, ...rulesOut, ...(inFile ?? [])]),
    ...groups.flatMap(({ names }) => names),
    ...needs.flatMap(({ names, when }) => [...names, ...(when === undefined ? [] : [when])]),
    ...orders.flatMap(({ less, more }) => [less, more]),
  ];

  it.each([...new Set(named)])('%s is a place of the study file', (name) => {
    const plain = name.replace(/\.\*$/u, '');
    expect(marks.includes(plain) || stands.has(plain)).toBe(true);
  });

  it('say why in every row', () => {
    for (const { why } of [...alternatives, ...groups, ...orders]) expect(why.length).toBeGreaterThan(10);
    for (const { hint } of needs) expect(hint).toMatch(/^(Add|Resistance|The battery)/u);
    expect(new Set(warningRows.map(({ rule }) => rule)).size).toBe(warningRows.length);
  });
});

function places(place: typeof studyLayout): string[] {
  return [...place.children.values()].flatMap((child) => [child.path, ...places(child)]);
}
