/** Ranges and lists of `vary`: the points are the figures a person would type. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readQuantity } from '../../../src/core/units/read-quantity.ts';
import { complaint, edited, harbour, studyOf } from './study-from-disk.ts';

const RATIO = 'gearing.ratio:    { from: 7.5, to: 12.25, steps: 20 }';
const TORQUE = 'motor.peakTorque: { from: 180 N·m, to: 330 N·m, steps: 16 }';

function pointsOf(name: string, text: string): number[] {
  return (
    studyOf(text)
      .axes.find((axis) => axis.name === name)
      ?.points.map((point) => point[0] as number) ?? []
  );
}

function ratios(axis: string): number[] {
  return pointsOf('gearing.ratio', edited(harbour, [RATIO, `gearing.ratio: ${axis}`]));
}

describe('a range', () => {
  it('has its points evenly from end to end, both included', () => {
    expect(ratios('{ from: 8, to: 10, steps: 5 }')).toEqual([8, 8.5, 9, 9.5, 10]);
    expect(ratios('{ from: 8, to: 10, step: 0.5 }')).toEqual([8, 8.5, 9, 9.5, 10]);
  });

  it('has the bits of typed figures, also where the spacing is no binary number', () => {
    const points = pointsOf('motor.baseSpeed', edited(harbour, ['{ from: 3200 rpm, to: 5600 rpm, steps: 13 }', '{ from: 3100 rpm, to: 3800 rpm, steps: 8 }']));
    const typed = [3100, 3200, 3300, 3400, 3500, 3600, 3700, 3800].map((written) => readQuantity(`${written} rpm`, 'rotationalSpeed'));
    expect(points).toEqual(typed.map((read) => (read.ok ? read.value : Number.NaN)));
    expect(ratios('{ from: 7.1, to: 8, step: 0.1 }')).toEqual([7.1, 7.2, 7.3, 7.4, 7.5, 7.6, 7.7, 7.8, 7.9, 8]);
  });

  it('rises strictly from its start to its very end, whatever they are', () => {
    const figures = fc.tuple(fc.integer({ min: 10, max: 400 }), fc.integer({ min: 1, max: 400 }), fc.integer({ min: 2, max: 60 }));
    fc.assert(
      fc.property(figures, ([start, extent, steps]) => {
        const [from, to] = [start / 10, (start + extent) / 10];
        const points = ratios(`{ from: ${from}, to: ${to}, steps: ${steps} }`);
        expect(points).toHaveLength(steps);
        expect(points[0]).toBe(from);
        expect(points.at(-1)).toBe(to);
        for (let k = 1; k < steps; k++) expect(points[k]).toBeGreaterThan(points[k - 1] as number);
      }),
      { numRuns: 25 },
    );
  });

  it('may have its two ends in different units: the end is met exactly', () => {
    const points = pointsOf('motor.peakTorque', edited(harbour, [TORQUE, 'motor.peakTorque: { from: 180 N·m, to: 240 lbf·ft, steps: 4 }']));
    const end = readQuantity('240 lbf·ft', 'torque');
    expect(points.at(-1)).toBe(end.ok ? end.value : Number.NaN);
    expect(points[0]).toBe(180);
  });

  it('of a temperature has steps that are differences', () => {
    const text = edited(harbour, [RATIO, 'air.temperature: { from: -20 °C, to: 40 °C, step: 20 °C }']);
    expect(pointsOf('air.temperature', text)).toEqual([-20, 0, 20, 40].map((written) => written + 273.15));
  });

  it.each([
    ['{ from: 7.5, to: 12.25 }', 'add "steps: 11"'],
    ['{ from: 7.5, to: 12.25, steps: 20, step: 0.25 }', 'found       both'],
    ['{ from: 7.5, to: 12.25, steps: 1 }', 'A single point is no range'],
    ['{ from: 7.5, to: 12.25, steps: 2.5 }', 'a whole number of at least 2'],
    ['{ from: 12.25, to: 12.25, steps: 3 }', 'to above from (12.25)'],
    ['{ from: 7.5, to: 12.25, step: -1 }', 'a step above zero'],
    ['{ from: 7.5, to: 200, steps: 3 }', 'at most 100'],
    ['{ from: 7.5, to: 12.25, steps: 200000 }', 'at most 10000 points'],
    ['{ from: 7.5, till: 12.25, steps: 3 }', 'from, to, steps, step, oneOf'],
    ['{ to: 12.25, steps: 3 }', 'from, to and steps; or oneOf'],
    ['{ oneOf: [8, 9], steps: 3 }', 'a range or oneOf'],
    ['{ oneOf: [8, 9, 8.0] }', 'each figure once'],
    ['{ oneOf: [] }', 'an empty list'],
    ['{ oneOf: 8 }', 'a list of figures'],
    ['[8, 9]', 'gearing.ratio: { oneOf'],
    ['9', 'from, to and steps, or oneOf'],
  ])('%s is answered with what to write', (axis, part) => {
    expect(complaint(edited(harbour, [RATIO, `gearing.ratio: ${axis}`]))).toContain(part);
  });

  it('that makes too many designs is refused with its product', () => {
    const text = edited(harbour, ['steps: 20', 'steps: 10000'], ['steps: 16', 'steps: 10000'], ['steps: 13', 'steps: 20']);
    expect(complaint(text)).toContain('10000 × 10000 × 20 × 3 designs');
  });
});

describe('a varied number', () => {
  const vary = (line: string) => complaint(edited(harbour, [RATIO, line]));

  it('may belong to a trial', () => {
    expect(pointsOf('trials.climb.laden', edited(harbour, [RATIO, 'trials.climb.laden: { oneOf: [2500 kg, 2800 kg] }']))).toEqual([2500, 2800]);
    expect(pointsOf('trials.sprint.headWind', edited(harbour, [RATIO, 'trials.sprint.headWind: { oneOf: [0 m/s, 5 m/s] }']))).toEqual([0, 5]);
  });

  it('must have a figure in the study, the reference design', () => {
    expect(vary('motor.constantPowerTo: { oneOf: [9000 rpm, 11000 rpm] }')).toContain('State motor.constantPowerTo');
    expect(vary('trials.sprnt.laden: { oneOf: [2500 kg, 2800 kg] }')).toContain('Did you mean trials.sprint.laden?');
    expect(vary('gearing: { ratio: { from: 7, to: 9, steps: 3 } }')).toContain('whole name in one piece');
  });

  it('must have a part to play', () => {
    expect(vary('trials.sprint.payload: { oneOf: [200 kg, 300 kg] }')).toContain('beside trials.sprint.laden');
    expect(vary('motor.inertia: { oneOf: [0.03 kg·m², 0.04 kg·m²] }')).toContain('beside motor.inertia.perTorque');
    const density = edited(harbour, ['air: { temperature: 20 °C, altitude: 0 m } ', 'air: { density: 1.2 kg/m³ } '], [', air.temperature: -7 °C', '']);
    expect(complaint(edited(density, [RATIO, 'air.temperature: { oneOf: [0 °C, 20 °C] }']))).toContain('beside air.density');
  });

  it('may be the wheel radius that a tyre size gives', () => {
    expect(pointsOf('vehicle.wheelRadius', edited(harbour, [RATIO, 'vehicle.wheelRadius: { oneOf: [0.32 m, 0.34 m] }']))).toEqual([0.32, 0.34]);
  });
});

describe('ratios that vary together', () => {
  const two = edited(harbour, ['ratio: 9.5 ', 'ratios: [11.2, 6.4]\n  shiftTime: 0.25 s #']);
  const varied = (axis: string) => edited(two, [RATIO, axis]);

  it('are one axis that sets both, from a list of pairs', () => {
    const [axis] = studyOf(varied('gearing.ratios: { oneOf: [[11.2, 6.4], [12, 7], [10, 6.4]] }')).axes;
    expect(axis).toEqual({
      name: 'gearing.ratios',
      sets: ['gearing.ratios.1', 'gearing.ratios.2'],
      points: [
        [11.2, 6.4],
        [12, 7],
        [10, 6.4],
      ],
      labels: null,
      range: null,
    });
  });

  it('may be varied apart as well', () => {
    const study = studyOf(varied('gearing.ratios.1: { oneOf: [10, 11, 12] }\n  gearing.ratios.2: { from: 6, to: 8, steps: 3 }'));
    expect(study.axes.slice(0, 2).map(({ name, points }) => [name, points.length])).toEqual([
      ['gearing.ratios.1', 3],
      ['gearing.ratios.2', 3],
    ]);
  });

  it('and their efficiencies, which may be one figure too', () => {
    const pair = edited(two, ['efficiency: 97 %', 'efficiency: [96 %, 97 %]'], [RATIO, 'gearing.efficiency: { oneOf: [[96 %, 97 %], [97 %, 98 %]] }']);
    expect(studyOf(pair).axes[0]?.points[1]).toEqual([0.97, 0.98]);
    expect(pointsOf('gearing.efficiency', varied('gearing.efficiency: { oneOf: [96 %, 97 %] }'))).toEqual([0.96, 0.97]);
  });

  it.each([
    ['the wrong way round', 'gearing.ratios: { oneOf: [[6.4, 11.2]] }', 'Exchange the two'],
    ['twice', 'gearing.ratios: { oneOf: [[11, 6], [11, 6]] }', 'each pair once'],
    ['not as pairs', 'gearing.ratios: { oneOf: [11, 6] }', 'a pair, such as [11.2, 6.4]'],
    ['three of them', 'gearing.ratios: { oneOf: [[11, 6, 4]] }', 'a list of 3'],
    ['as a range', 'gearing.ratios: { from: 6, to: 9, steps: 4 }', 'vary gearing.ratios.1 and gearing.ratios.2 apart'],
    ['with a slip in a figure', 'gearing.ratios: { oneOf: [[11, 6 m]] }', 'a plain number'],
    ['together and apart', 'gearing.ratios: { oneOf: [[11, 6]] }\n  gearing.ratios.1: { oneOf: [10, 11] }', 'gearing.ratios.1 in one place'],
  ])('are refused %s', (_, axis, says) => {
    const text = complaint(varied(axis));
    expect(text).toContain(says);
    expect(text.match(/error in/gu)).toHaveLength(axis.includes('oneOf: [11, 6]') ? 2 : 1);
  });

  it('are refused in a study with one ratio', () => {
    expect(complaint(edited(harbour, [RATIO, 'gearing.ratios: { oneOf: [[11.2, 6.4]] }']))).toContain('gearing.ratio');
  });
});
