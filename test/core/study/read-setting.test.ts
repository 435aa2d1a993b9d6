/** A figure set on the command line is checked like the file it changes. */
import { describe, expect, it } from 'vitest';
import { readSetting } from '../../../src/core/study/read-setting.ts';
import { edited, harbour, studyOf } from './study-from-disk.ts';

const study = studyOf(harbour);
const fixed = studyOf(edited(harbour, ['  motor.baseSpeed:  { from: 3200 rpm, to: 5600 rpm, steps: 13 }\n', '']));

function message(setting: string, of = study): string {
  const read = readSetting(of, setting);
  return read.ok ? 'set' : read.message;
}

describe('a setting', () => {
  it('replaces one number and leaves the study it came from as it was', () => {
    const before = structuredClone(study);
    const read = readSetting(study, ' motor.peakTorque = 300 N*m ');
    expect(read).toMatchObject({ ok: true, name: 'motor.peakTorque', value: 300, study: { values: { ...study.values, 'motor.peakTorque': 300 } } });
    expect(study).toEqual(before);
  });

  it('may set a number of a trial, and a number that has its figure by default or from elsewhere', () => {
    expect(message('trials.from rest 400 m.payload=500 kg')).toBe('set');
    expect(message('trials.sprint.headWind=20 km/h')).toBe('set');
    expect(message('gearing.dragTorque.fixed=0 N·m')).toBe('set');
    expect(message('vehicle.wheelRadius=0.34 m')).toBe('set');
  });

  it.each([
    ['gearing.ratio', 'write name=value'],
    ['=5', 'write name=value'],
    ['gearing.ration=9', 'Did you mean gearing.ratio?'],
    ['motor.peakTorque=300', '300 without a unit'],
    ['motor.peakTorque=300 kW', 'a unit of power'],
    ['motor.peakTorque=-3 N·m', 'above 0 N·m'],
    ['gearing.efficiency=130 %', 'at most 100 %'],
    ['motor.constantPowerTo=9000 rpm', 'no figure in this study'],
    ['vehicle.tyre=205/55 R16', 'set vehicle.wheelRadius'],
    ['motor.inertia=0.03 kg·m²', 'beside motor.inertia.perTorque'],
    ['trials.sprint.payload=300 kg', 'beside trials.sprint.laden'],
    ['trials.sprint.to=0.5 m/s', 'set'],
    ['trials.overtake.to=50 km/h', 'above trials.overtake.from'],
    ['trials.nowhere.to=50 km/h', 'is no number of this study'],
    ['toString=1', 'is no number of this study'],
    ['', 'write name=value'],
  ])('%j is answered with what is wrong', (setting, part) => {
    expect(message(setting)).toContain(part);
  });

  it('keeps base speed below maximum speed, unless the search varies one of the two', () => {
    expect(message('motor.maxSpeed=4000 rpm', fixed)).toContain('at least motor.baseSpeed');
    expect(message('motor.maxSpeed=4000 rpm', study)).toBe('set');
    expect(message('motor.baseSpeed=14000 rpm', study)).toContain('at most motor.maxSpeed');
  });
});
