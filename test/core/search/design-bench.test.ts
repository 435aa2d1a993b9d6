import { describe, expect, it } from 'vitest';
import { createBench, machineSheet } from '../../../src/core/search/design-bench.ts';
import type { Axis } from '../../../src/core/study/study.ts';
import { inventedReport } from '../../charts/invented-report.ts';

const data = inventedReport();
const bench = createBench(data.study);

describe('designs computed on the spot', () => {
  it('equal the stored figures of the run to the last bit', () => {
    for (const { number, values } of data.designs.filter((_, index) => index % 40 === 0)) {
      const design = bench.compute(number);
      const computed = data.columns.map((column) => {
        const input = design?.inputs.find(({ name }) => name === column.name);
        const value = input?.row ? input.value : (design?.metrics.find((metric) => metric.column.name === column.name)?.value ?? Number.NaN);
        return Number.isNaN(value) ? null : value;
      });
      expect(computed).toEqual(values);
    }
  });

  it('exist from the reference to the last of the search and nowhere else', () => {
    expect(bench.compute(0)?.inputs.map((input) => input.row && input.value)).toEqual([9.5, 270, data.study.values['motor.baseSpeed']]);
    expect(bench.compute(bench.last)).not.toBeNull();
    for (const number of [-1, bench.last + 1, 1.5, Number.NaN]) expect(bench.compute(number)).toBeNull();
  });

  it('have the keys of machine output, null where there is no value, and a limit only where there is one', () => {
    const sheet = machineSheet(bench.compute(7)!);
    expect(Object.keys(sheet.inputs)).toEqual(['gearing.ratio', 'motor.peakTorque_Nm', 'motor.baseSpeed_rpm']);
    expect(sheet.metrics['stops.outsideMap_pct']).toBeNull();
    expect(sheet.metrics['ramp.grade_pct']).toBeGreaterThan(0);
    expect(sheet.limits['ramp.grade_pct']).toBe('motor torque');
    expect(sheet.limits['sprint.time_s']).toBeUndefined();
  });

  it('take every number of a study that varies none as an input', () => {
    const still = { ...data.study, axes: [] };
    const sheet = machineSheet(createBench(still).compute(0)!);
    expect(Object.keys(sheet.inputs)).toContain('vehicle.kerbMass_kg');
    expect(sheet.inputs['vehicle.regeneration.from_kmh']).toBeCloseTo(5, 12);
  });

  it('take what is set before their own figures, and tell it among the inputs', () => {
    const { study } = data;
    const held = { ...study, values: { ...study.values, 'vehicle.auxiliaries': 1000 } };
    const settings = [
      { name: 'gearing.ratio', value: 11 },
      { name: 'vehicle.auxiliaries', value: 1000 },
    ];
    const set = machineSheet(createBench(held).compute(7, settings)!);
    const own = machineSheet(bench.compute(7)!);
    expect(set.inputs).toEqual({ ...own.inputs, 'gearing.ratio': 11, 'vehicle.auxiliaries_W': 1000 });
    const axle = (sheet: typeof set) => sheet.metrics['driveUnit.axleTorque_Nm'] as number;
    expect(axle(set) / axle(own)).toBeCloseTo(11 / (own.inputs['gearing.ratio'] as number), 12);
  });

  it('name the option that a design chose, beside the numbers that it sets', () => {
    const offer: Axis = {
      name: 'motor on offer',
      sets: ['motor.peakTorque', 'gearing.ratio'],
      points: [
        [200, 9],
        [300, Number.NaN],
      ],
      labels: ['small', 'large'],
      range: null,
    };
    const choice = createBench({ ...data.study, axes: [offer] });
    expect(machineSheet(choice.compute(1)!).inputs).toEqual({ 'motor on offer': 'small', 'motor.peakTorque_Nm': 200, 'gearing.ratio': 9 });
    expect(machineSheet(choice.compute(2)!).inputs).toEqual({ 'motor on offer': 'large', 'motor.peakTorque_Nm': 300 });
    expect(machineSheet(choice.compute(0)!).inputs['motor on offer']).toBeNull();
  });
});
