/** The model in words: as far as a study uses it, and nothing it does not use. */
import { describe, expect, it } from 'vitest';
import { modelSentences } from '../../src/page/model-words.ts';
import { map, still, withSection } from '../core/study/options.ts';
import { edited, studyOf } from '../core/study/study-from-disk.ts';

const words = (text: string, files: Readonly<Record<string, string>> = {}) => modelSentences(studyOf(text, files)).join(' ');
const gearboxes =
  'options: { gearbox: [ { name: one, set: { gearing.ratio: 9 } }, { name: two, set: { gearing.ratios: [11, 6], gearing.shiftTime: 0.2 s } } ] }\n';

describe('the model in words', () => {
  it('speaks of drag torque where the gearing has one', () => {
    expect(words(still)).toContain('a drag torque that rises with speed');
    expect(words(edited(still, ['  dragTorque: {', '  # {']))).toContain('without a drag torque of its own');
  });

  it('speaks of shifting where a design may have two ratios', () => {
    expect(words(still)).not.toContain('Two ratios');
    expect(words(withSection(gearboxes))).toContain('Two ratios: at full pedal the shift comes where the higher gear pulls more');
  });

  it('speaks of the other quadrant where a map has motoring figures alone', () => {
    const measured = 'options: { losses: [ { name: measured, set: { motor.map: map.csv } } ] }\n';
    const both = map.replaceAll(/^(\d+),0,(.*)$/gmu, '$1,-150,$2\n$1,0,$2');
    expect(words(withSection(measured), { 'map.csv': map })).toContain('generating has the losses of motoring');
    expect(words(withSection(measured), { 'map.csv': both })).not.toContain('generating has the losses of motoring');
    expect(words(still)).not.toContain('generating has the losses of motoring');
  });
});
