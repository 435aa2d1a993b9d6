import { describe, expect, it } from 'vitest';
import { type DesignSheet, sheetText } from '../../src/cli/sheet-text.ts';
import type { LimitWord } from '../../src/core/evaluate/evaluator.ts';
import { metricColumns } from '../../src/core/study/catalogue/metric-columns.ts';
import { findParameter, type ParameterRow } from '../../src/core/study/catalogue/parameters.ts';
import type { Study, Trial } from '../../src/core/study/study.ts';

const trace = { name: 'town', timesS: [0, 1], speedsMPerS: [0, 1], notes: [] };
const trials: Trial[] = [
  { name: 'sprint', kind: 'acceleration', rating: 'peak', with: {}, trace: null, road: null },
  { name: 'ramp', kind: 'hill start', rating: 'peak', with: { 'vehicle.axles.adhesion': 0.5 }, trace: null, road: null },
  { name: 'stops', kind: 'cycle', rating: 'peak', with: {}, trace, road: null },
];
const study: Study = {
  title: 'Small van \u202eodd',
  about: '',
  driven: 'front',
  tyre: null,
  currency: 'EUR',
  values: { 'trials.sprint.from': 0, 'trials.sprint.to': 80 / 3.6, 'trials.sprint.laden': 2800, 'gearing.ratio': 9.5 },
  fullLoad: null,
  lossMap: null,
  optionCurves: [],
  optionMaps: [],
  trials,
  axes: [{ name: 'gearing.ratio', sets: ['gearing.ratio'], points: [[8], [9.5]], labels: null, range: null }],
  search: { method: 'grid' },
  requirements: [
    { metric: 'sprint.time', bound: 'atMost', limit: 11.5, implied: false },
    { metric: 'ramp.grade', bound: 'atLeast', limit: 0.2, implied: false },
    { metric: 'stops.offTrace', bound: 'atMost', limit: 0, implied: true },
  ],
  objectives: [],
  keep: [],
  report: { units: 'SI' },
};

function sheetWith(results: Readonly<Record<string, [number, LimitWord?]>>, of: Study = study): DesignSheet {
  const metrics = metricColumns(of).map((column) => {
    const [value, limit] = results[column.name] ?? [Number.NaN];
    return { column, value, limit: limit ?? ('' as const) };
  });
  const inputs = [{ name: 'gearing.ratio', row: findParameter('gearing.ratio') as ParameterRow, value: 9.5 }];
  return { study: of, number: 0, settings: [], choices: [], inputs, metrics };
}

const usual = {
  'sprint.payload': [1016],
  'sprint.time': [9.5304],
  'sprint.distance': [123.04],
  'ramp.payload': [0],
  'ramp.grade': [0.19996, 'adhesion'],
  'stops.batteryEnergy': [181.21 * 3.6],
  'stops.offTrace': [0],
  'stops.energy.rolling': [42 * 3.6],
  'driveUnit.cost': [1984.2],
  'driveUnit.peakPower': [121_580],
} satisfies Record<string, [number, LimitWord?]>;

/** Narrow no-break spaces as plain ones. */
function plain(text: string): string {
  return text.replaceAll('\u202f', ' ');
}

describe('a sheet for people', () => {
  const text = plain(sheetText(sheetWith(usual), ['A figure is unusual.']));

  it('says which design it is and its inputs by the names that --set takes', () => {
    expect(text).toContain("Design 0, the reference: the study's own figures");
    expect(text).toMatch(/gearing\.ratio +9\.5$/m);
  });

  it('shows each trial with its conditions, its results and what limits them', () => {
    expect(text).toContain('sprint: acceleration, from 0 km/h, to 80 km/h, laden mass 2800 kg, peak rating');
    expect(text).toContain('ramp: hill start, peak rating, with vehicle.axles.adhesion 0.5');
    expect(text).toMatch(/^ +time +9\.53 {2}s$/m);
    expect(text).toMatch(/^ +grade +19\.996 {2}% +limited by adhesion$/m);
  });

  it('puts cycles side by side, energy by sink under them, without metrics that none of them has', () => {
    expect(text).toMatch(/battery energy +Wh\/km +181\.2$/m);
    expect(text).toMatch(/of the battery energy\n +rolling +Wh\/km +42\.0$/m);
    expect(text).not.toContain('outside the map');
  });

  it('says in words whether each requirement is met, and never shows a miss as met', () => {
    expect(text).toMatch(/sprint\.time +at most 11\.5 s +9\.53 s +met, 1\.97 s to spare$/m);
    expect(text).toMatch(/ramp\.grade +at least 20 % +19\.996 % +MISSED by 0\.004 /m);
    expect(text).toContain('met (asked of every cycle)');
  });

  it('shows cost with its currency, warnings, and the caution', () => {
    expect(text).toMatch(/drive unit cost +1984 {2}EUR$/m);
    expect(text).toContain('A figure is unusual.');
    expect(text).toContain('Concept-stage estimates');
  });

  it('shows characters that would reorder the terminal by their code', () => {
    expect(text).toContain('Small van [U+202E]odd');
  });

  it('says why a result does not exist', () => {
    const poor = plain(sheetText(sheetWith({ ...usual, 'sprint.time': [Number.NaN], 'ramp.grade': [Number.NaN, 'too heavy'] }), []));
    expect(poor).toMatch(/time +— +not reached$/m);
    expect(poor).toMatch(/grade +— +too heavy$/m);
    expect(poor).toMatch(/sprint\.time .* — +MISSED: there is no value$/m);
  });

  it('reads in US units where the study asks for them', () => {
    const text = plain(sheetText(sheetWith(usual, { ...study, report: { units: 'US' } }), []));
    expect(text).toContain('from 0 mph, to 49.7 mph');
    expect(text).toMatch(/battery energy +Wh\/mi +291\.6$/m);
  });
});
