import { describe, expect, it } from 'vitest';
import { createBench, machineSheet } from '../../src/page/design-bench.ts';
import { inventedReport } from '../charts/invented-report.ts';

const data = inventedReport();
const bench = createBench(data.study);

describe('designs computed in the page', () => {
  it('equal the stored figures of the run to the last bit', () => {
    for (const { number, values } of data.designs.filter((_, index) => index % 40 === 0)) {
      const design = bench.compute(number);
      const computed = data.columns.map((column) => {
        const value = [...(design?.inputs ?? []), ...(design?.metrics ?? []).map((metric) => ({ name: metric.column.name, value: metric.value }))].find(
          ({ name }) => name === column.name,
        )?.value;
        return value === undefined || Number.isNaN(value) ? null : value;
      });
      expect(computed).toEqual(values);
    }
  });

  it('exist from the reference to the last of the search and nowhere else', () => {
    expect(bench.compute(0)?.inputs.map(({ value }) => value)).toEqual([9.5, 270, data.study.values['motor.baseSpeed']]);
    expect(bench.compute(bench.last)).not.toBeNull();
    for (const number of [-1, bench.last + 1, 1.5, Number.NaN]) expect(bench.compute(number)).toBeNull();
  });

  it('have the keys of machine output, null where there is no value, and a limit only where there is one', () => {
    const sheet = machineSheet(bench.compute(7)!, data.study);
    expect(Object.keys(sheet.inputs)).toEqual(['gearing.ratio', 'motor.peakTorque_Nm', 'motor.baseSpeed_rpm']);
    expect(sheet.metrics['stops.outsideMap_pct']).toBeNull();
    expect(sheet.metrics['ramp.grade_pct']).toBeGreaterThan(0);
    expect(sheet.limits['ramp.grade_pct']).toBe('motor torque');
    expect(sheet.limits['sprint.time_s']).toBeUndefined();
  });

  it('take every number of a study that varies none as an input', () => {
    const still = { ...data.study, axes: [] };
    const sheet = machineSheet(createBench(still).compute(0)!, still);
    expect(Object.keys(sheet.inputs)).toContain('vehicle.kerbMass_kg');
    expect(sheet.inputs['vehicle.regeneration.from_kmh']).toBeCloseTo(5, 12);
  });
});
