/** Designs with options: their names in stored results, their files in sheets, single figures on top of them. */
import { describe, expect, it } from 'vitest';
import { axisOf, machineValue } from '../../../src/core/evaluate/result-columns.ts';
import { chooseDesign } from '../../../src/core/search/choose-design.ts';
import { createBench, machineSheet } from '../../../src/core/search/design-bench.ts';
import { createDesignEvaluator, studyColumns } from '../../../src/core/search/evaluate-designs.ts';
import { readChoice, readSetting } from '../../../src/core/study/read-setting.ts';
import { readStudyJson, type Study } from '../../../src/core/study/study.ts';
import { curve, map, still, withSection } from '../study/options.ts';
import { edited, studyOf } from '../study/study-from-disk.ts';

const study = studyOf(
  withSection(`vary:
  vehicle.dragArea: { oneOf: [1 m², 1.2 m²] }
options:
  motor on offer:
    - { name: slow-wound, set: { motor.peakTorque: 310 N·m, motor.baseSpeed: 3600 rpm, motor.map: map.csv } }
    - { name: measured, set: { motor.fullLoad: curve.csv, motor.map: { file: map.csv, peakTorque: 300 N·m, baseSpeed: 3800 rpm } } }
  gearbox:
    - { name: single, set: { gearing.ratio: 9.1 } }
    - { name: two-speed, set: { gearing.ratios: [11.2, 6.4], gearing.shiftTime: 0.25 s } }
tradeOff:
  minimise: [stops.batteryEnergy, driveUnit.cost]
`),
  { 'curve.csv': curve, 'map.csv': map },
);
const bench = createBench(study);

function metricsOf(of: Study, number: number): number[] {
  return createBench(of)
    .compute(number)!
    .metrics.map(({ value }) => value);
}

describe('stored results', () => {
  const columns = studyColumns(study);
  const designs = createDesignEvaluator(study, columns);
  const row = (number: number) => {
    const out = new Float64Array(columns.length);
    designs.evaluate(number, out, 0, 1);
    return columns.map((column, k) => machineValue(column, out[k]!));
  };

  it('have one column for each list, with the names; the reference has none', () => {
    expect(columns.slice(0, 4).map(({ key }) => key)).toEqual(['vehicle.dragArea_m2', 'motor on offer', 'gearbox', 'stops.batteryEnergy_Wh_per_km']);
    expect([1, 2, 3, 4, 5, 8].map((number) => row(number).slice(0, 3))).toEqual([
      [1, 'slow-wound', 'single'],
      [1, 'slow-wound', 'two-speed'],
      [1, 'measured', 'single'],
      [1, 'measured', 'two-speed'],
      [1.2, 'slow-wound', 'single'],
      [1.2, 'measured', 'two-speed'],
    ]);
    expect(row(0).slice(0, 3)).toEqual([1.12, null, null]);
  });

  it('hold the figures of the same design computed alone', () => {
    for (let number = 0; number <= designs.count; number++) {
      const { metrics } = machineSheet(bench.compute(number)!);
      expect(row(number).slice(3)).toEqual(columns.slice(3).map(({ key }) => metrics[key]));
    }
  });
});

describe('pairs of ratios', () => {
  it('have a column for each ratio', () => {
    const two = edited(still, ['ratio: 9.5 ', 'ratios: [11.2, 6.4] #']);
    const pairs = studyOf(`${two}vary: { gearing.ratios: { oneOf: [[11, 6], [12, 7]] } }\n`);
    const columns = studyColumns(pairs);
    expect(columns.slice(0, 2).map(({ key, role }) => [key, role])).toEqual([
      ['gearing.ratios.1', 'input'],
      ['gearing.ratios.2', 'input'],
    ]);
    const out = new Float64Array(columns.length);
    createDesignEvaluator(pairs, columns).evaluate(2, out, 0, 1);
    expect([...out.subarray(0, 2)]).toEqual([12, 7]);
    expect(columns.slice(0, 2).map((column) => axisOf(column, pairs))).toEqual([pairs.axes[0], pairs.axes[0]]);
  });
});

describe('a design with options', () => {
  it('is told by the names of its options, the files they bring and the numbers they set', () => {
    const { inputs } = machineSheet(bench.compute(8)!);
    expect(Object.entries(inputs)).toEqual([
      ['vehicle.dragArea_m2', 1.2],
      ['motor on offer', 'measured'],
      ['motor.peakTorque_Nm', 300],
      ['motor.baseSpeed_rpm', expect.closeTo(3800, 9)],
      ['motor.map', 'map.csv'],
      ['motor.fullLoad', 'curve.csv'],
      ['gearbox', 'two-speed'],
      ['gearing.ratios.1', 11.2],
      ['gearing.ratios.2', 6.4],
      ['gearing.shiftTime_s', 0.25],
    ]);
  });

  it('survives JSON, which knows no missing numbers', () => {
    const carried = readStudyJson(JSON.parse(JSON.stringify(study)) as Study);
    expect(carried).toEqual(study);
    for (const number of [0, 1, 4, 8]) expect(metricsOf(carried, number)).toEqual(metricsOf(study, number));
  });

  it('becomes a study of its own with the same figures', () => {
    for (let number = 0; number <= bench.last; number++) expect(metricsOf(chooseDesign(study, number), 0)).toEqual(metricsOf(study, number));
    expect(chooseDesign(study, 2).values['gearing.ratio']).toBeUndefined();
    expect(chooseDesign(study, 2).values['gearing.ratios.1']).toBe(11.2);
    expect(study.values['gearing.ratio']).toBe(9.5);
  });

  it('may have another option instead of its own, and single figures on top', () => {
    const chosen = [{ list: 'gearbox', point: 1 }];
    expect(bench.compute(1, [], chosen)?.metrics).toEqual(bench.compute(2)?.metrics);
    expect(machineSheet(bench.compute(1, [], chosen)!).inputs['gearbox']).toBe('two-speed');
    expect(metricsOf(chooseDesign(study, 1, chosen), 0)).toEqual(metricsOf(study, 2));
    const set = bench.compute(1, [{ name: 'gearing.ratios.1', value: 12 }], chosen)!;
    expect(set.metrics.find(({ column }) => column.name === 'driveUnit.axleTorque')?.value).toBe(310 * 12);
  });

  it('of the reference, chosen by hand, is the design of the search with the figures of the study', () => {
    const chosen = chooseDesign(study, 0, [{ list: 'motor on offer', point: 0 }]);
    expect(chosen.lossMap).toBe(study.optionMaps[0]?.data);
    expect(chosen.values['vehicle.dragArea']).toBe(1.12);
    expect(bench.compute(0, [], [{ list: 'motor on offer', point: 0 }])?.metrics.map(({ value }) => value)).toEqual(metricsOf(chosen, 0));
  });
});

describe('an option on the command line', () => {
  it('is read by the names of its list and of itself', () => {
    expect(readChoice(study, 'motor on offer=measured')).toEqual({ ok: true, choice: { list: 'motor on offer', point: 1 } });
    expect(readChoice(study, ' gearbox = two-speed ')).toEqual({ ok: true, choice: { list: 'gearbox', point: 1 } });
  });

  it('is no figure: numbers and unknown names are left to the reading of figures', () => {
    expect(readChoice(study, 'vehicle.dragArea=1.3 m²')).toBeNull();
    expect(readChoice(study, 'nonsense')).toBeNull();
  });

  it('answers a wrong option or list with the nearest one', () => {
    expect(readChoice(study, 'motor on offer=slow-wond')).toMatchObject({ ok: false, message: expect.stringContaining('Did you mean slow-wound?') });
    expect(readChoice(study, 'gearbox=manual')).toMatchObject({ ok: false, message: expect.stringContaining('There are single, two-speed.') });
    expect(readChoice(study, 'motors on offer=measured')).toMatchObject({ ok: false, message: expect.stringContaining('Did you mean motor on offer?') });
  });

  it('lets figures be set that only its option knows', () => {
    expect(readSetting(study, 'gearing.ratios.1=12')).toMatchObject({ ok: false });
    expect(readSetting(chooseDesign(study, 0, [{ list: 'gearbox', point: 1 }]), 'gearing.ratios.1=12')).toMatchObject({ ok: true, value: 12 });
  });
});
