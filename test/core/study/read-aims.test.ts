/** What a person is told who writes a limit, an objective or a section in another way than the file wants it. */
import { describe, expect, it } from 'vitest';
import { complaint, edited, harbour } from './study-from-disk.ts';

const RAMP = 'ramp.grade:       { atLeast: 20 % }';
const OBJECTIVES = '[stops.batteryEnergy, trunk.batteryEnergy, driveUnit.cost]';

describe('a limit, objective or section written another way', () => {
  it.each<[string, [string, string], string]>([
    ['a sign in quotes', [RAMP, 'ramp.grade: ">= 20 %"'], 'Write "ramp.grade: { atLeast: 20 % }"'],
    ['a sign that is the other bound', [RAMP, 'ramp.grade: < 20 %'], 'Write "ramp.grade: { atMost: 20 % }"'],
    ['a bound of another name', [RAMP, 'ramp.grade: { min: 20 % }'], 'Write atLeast for the lower limit, atMost for the upper'],
    ['a decimal comma within braces', ['{ atMost: 11.5 s }', '{ atMost: 11,5 s }'], 'numbers go without commas'],
    ['no colon before the braces', ['ramp.grade:  ', 'ramp.grade  '], 'A colon is missing: write "ramp.grade: { … }"'],
    ['a trial with its metric below it', [RAMP, 'ramp: { grade: { atLeast: 20 % } }'], 'in one piece, such as ramp.grade'],
    ['a trial without a metric', [OBJECTIVES, '[stops, driveUnit.cost]'], 'in one piece, such as stops.batteryEnergy'],
    ['a metric of another kind of trial', ['sprint.time:', 'climb.time:'], 'climb gives payload, grade; there is sprint.time, overtake.time'],
    ['a metric without its owner', [OBJECTIVES, '[stops.batteryEnergy, cost]'], 'Did you mean driveUnit.cost or battery.cost?'],
    ['no colon before the braces of a section', ['  continuous: {', '  continuous {'], 'write "continuous: { … }"'],
    ['a range with min and max', ['{ from: 7.5, to: 12.25, steps: 20 }', '{ min: 7.5, max: 12.25, steps: 20 }'], '{ from: …, to: …, steps: … }'],
    ['a decimal comma in a step', ['{ from: 7.5, to: 12.25, steps: 20 }', '{ from: 7.5, to: 12.25, step: 0,25 }'], 'numbers go without commas'],
    ['a varied number without its section', ['gearing.ratio:    {', 'ratio:    {'], 'Did you mean gearing.ratio?'],
    ['a drag coefficient on its own', ['  auxiliaries: 420 W', '  auxiliaries: 420 W\n  cd: 0.31'], 'drag coefficient times frontal area'],
  ])('as %s is told once what to write', (_, edit, part) => {
    const answer = complaint(edited(harbour, edit));
    expect(answer.match(/what to do {2}\S/gu)).toHaveLength(1);
    expect(answer).toContain(part);
  });
});
