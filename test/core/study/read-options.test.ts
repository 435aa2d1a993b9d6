/** Options: what a list of alternatives becomes, and that each of its designs is the study that one would write by hand. */
import { describe, expect, it } from 'vitest';
import { metricColumns } from '../../../src/core/study/catalogue/metric-columns.ts';
import type { Study } from '../../../src/core/study/study.ts';
import { curve, map, metricsOf, motorMap, still, withSection } from './options.ts';
import { complaint, edited, studyOf, warningsOf } from './study-from-disk.ts';

const LOSSES = still.slice(still.indexOf('  losses: {'), still.indexOf('                               # or  map'));
const files = { 'curve.csv': curve, 'map.csv': map, 'motor-map.csv': motorMap };

describe('a list of options', () => {
  const motors = `options:
  motor on offer:
    - { name: slow-wound, set: { motor.peakTorque: 310 N·m, motor.baseSpeed: 3600 rpm } }
    - { name: fast-wound, set: { motor.peakTorque: 230 N·m, motor.baseSpeed: 5400 rpm } }
`;

  it('is an axis whose points carry the names and all numbers of an option', () => {
    const [axis] = studyOf(withSection(motors)).axes;
    expect(axis).toMatchObject({ name: 'motor on offer', sets: ['motor.peakTorque', 'motor.baseSpeed'], labels: ['slow-wound', 'fast-wound'], range: null });
    expect(axis?.points[0]?.[0]).toBe(310);
    expect(axis?.points[1]?.[1]).toBeCloseTo((5400 * 2 * Math.PI) / 60, 12);
  });

  it('makes of each option the very design that one writes by hand, and leaves the reference alone', () => {
    const byHand = [
      still,
      edited(still, ['peakTorque: 270 N·m', 'peakTorque: 310 N·m'], ['baseSpeed: 4300 rpm', 'baseSpeed: 3600 rpm']),
      edited(still, ['peakTorque: 270 N·m', 'peakTorque: 230 N·m'], ['baseSpeed: 4300 rpm', 'baseSpeed: 5400 rpm']),
    ];
    expect(metricsOf(studyOf(withSection(motors)))).toEqual(byHand.map((text) => metricsOf(studyOf(text))[0]));
  });

  it('is crossed with ranges and with other lists, in the order of the file', () => {
    const vary = 'vary:\n  vehicle.dragArea: { oneOf: [1 m², 1.1 m², 1.2 m²] }\n';
    const tyres = '  tyre on offer:\n    - { name: wide, set: { vehicle.rolling.c0: 0.0105 } }\n    - { name: narrow, set: { vehicle.rolling.c0: 0.0092 } }\n';
    const study = studyOf(withSection(vary + motors + tyres));
    expect(study.axes.map(({ name, points }) => [name, points.length])).toEqual([
      ['vehicle.dragArea', 3],
      ['motor on offer', 2],
      ['tyre on offer', 2],
    ]);
    expect(studyOf(withSection(motors + vary)).axes.map(({ name }) => name)).toEqual(['motor on offer', 'vehicle.dragArea']);
  });

  it('may have a single option, and one that sets nothing: the study as it is', () => {
    const own = studyOf(withSection('options: { motor on offer: [ { name: as drawn }, { name: small, set: { motor.peakTorque: 200 N·m } } ] }\n'));
    const [reference, drawn, small] = metricsOf(own);
    expect(drawn).toEqual(reference);
    expect(small).not.toEqual(reference);
    expect(studyOf(withSection('options: { body: [ { name: van, set: { vehicle.dragArea: 1.3 m² } } ] }\n')).axes[0]?.points).toEqual([[1.3]]);
  });

  it('sets the numbers of trials, a tyre size, and figures that the study leaves to their defaults', () => {
    const section = `options:
  body:
    - { name: box, set: { trials.ramp.laden: 3000 kg, vehicle.tyre: 205/65 R16, motor.constantPowerTo: 9000 rpm } }
    - { name: flat, set: { trials.ramp.laden: 2600 kg, vehicle.tyre: 225/65 R16, motor.constantPowerTo: 8000 rpm } }
`;
    const boxed = edited(
      still,
      ['ramp:   { kind: hill start, laden: 2800 kg }', 'ramp:   { kind: hill start, laden: 3000 kg }'],
      ['215/65 R16  ', '205/65 R16  '],
      ['maxSpeed: 13000 rpm          # optional constantPowerTo: … rpm', 'maxSpeed: 13000 rpm\n  constantPowerTo: 9000 rpm'],
    );
    expect(metricsOf(studyOf(withSection(section)))[1]).toEqual(metricsOf(studyOf(boxed))[0]);
  });
});

describe('what an option states goes before what says the same thing', () => {
  it.each([
    ['two ratios beside one', 'gearing.ratios: [11.2, 6.4], gearing.shiftTime: 0.25 s', [['ratio: 9.5 ', 'ratios: [11.2, 6.4]\n  shiftTime: 0.25 s #']]],
    [
      'an efficiency for each',
      'gearing.ratios: [11.2, 6.4], gearing.efficiency: [96 %, 97.5 %]',
      [
        ['ratio: 9.5 ', 'ratios: [11.2, 6.4] #'],
        ['efficiency: 97 %', 'efficiency: [96 %, 97.5 %]'],
      ],
    ],
    ['a mass factor', 'vehicle.massFactor: 1.07', [['wheelInertia: 5.2 kg·m² ', 'massFactor: 1.07 #']]],
    ['a rotor inertia', 'motor.inertia: 0.05 kg·m²', [['inertia: { perTorque: 1.5e-4 kg·m²/(N·m) } ', 'inertia: 0.05 kg·m² #']]],
    ['a wheel radius', 'vehicle.wheelRadius: 0.34 m', [['tyre: 215/65 R16 ', 'wheelRadius: 0.34 m #']]],
    ['an air density', 'air.density: 1.1 kg/m³', [['air: { temperature: 20 °C, altitude: 0 m } ', 'air: { density: 1.1 kg/m³ } #']]],
    ['a resistance per energy', 'battery.resistance.perEnergy: 6 Ω·kWh', [['resistance: 0.09 Ω', 'resistance: { perEnergy: 6 Ω·kWh }']]],
    [
      'a payload from a laden mass',
      'trials.stops.laden: 2500 kg',
      [['stops:  { kind: cycle, cycle: nycc, payload: 400 kg }', 'stops:  { kind: cycle, cycle: nycc, laden: 2500 kg }']],
    ],
    [
      'coast-down coefficients',
      'vehicle.coastDown.f0: 180 N, vehicle.coastDown.f1: 0.3 N/(km/h), vehicle.coastDown.f2: 0.05 N/(km/h)², vehicle.coastDown.at: 1900 kg',
      [
        ['  dragArea: 1.12 m² ', '  coastDown: { f0: 180 N, f1: 0.3 N/(km/h), f2: 0.05 N/(km/h)², at: 1900 kg } #'],
        ['  rolling: {', '  # rolling: {'],
      ],
    ],
    ['a measured map', 'motor.map: map.csv', [[LOSSES, '  map: map.csv\n']]],
    [
      'a map of the motor alone, with the inverter of the study',
      'motor.map: motor-map.csv',
      [[LOSSES, '  map: motor-map.csv\n  losses: { fieldWeakening: 0.20, inverterFixed: 0.0014, inverterLinear: 0.018, inverterSquare: 0.010 }\n']],
    ],
    [
      'a full-load curve',
      'motor.fullLoad: curve.csv',
      [
        ['peakTorque: 270 N·m\n', 'fullLoad: curve.csv\n'],
        ['  baseSpeed: 4300 rpm\n  maxSpeed: 13000 rpm ', '  #'],
      ],
    ],
    [
      'a curve with the motor it belongs to',
      'motor.fullLoad: { file: curve.csv, peakTorque: 250 N·m, baseSpeed: 4000 rpm }',
      [
        ['peakTorque: 270 N·m\n', 'fullLoad: { file: curve.csv, peakTorque: 250 N·m, baseSpeed: 4000 rpm }\n'],
        ['  baseSpeed: 4300 rpm\n  maxSpeed: 13000 rpm ', '  #'],
      ],
    ],
  ] as const)('%s', (_, set, edits) => {
    const read = studyOf(withSection(`options: { choice: [ { name: other, set: { ${set} } }, { name: own } ] }\n`), files);
    const [reference, other, own] = metricsOf(read);
    const [byHand] = metricsOf(studyOf(edited(still, ...(edits as readonly (readonly [string, string])[])), files));
    expect(other).toEqual(byHand);
    expect(own).toEqual(reference);
    expect(other).not.toEqual(reference);
  });

  it('one ratio beside the two of the study', () => {
    const two = edited(still, ['ratio: 9.5 ', 'ratios: [11.2, 6.4]\n  shiftTime: 0.25 s #']);
    const read = studyOf(`${two}options: { gearbox: [ { name: single, set: { gearing.ratio: 9.5 } }, { name: two-speed } ] }\n`);
    // Which gear a trial uses is only told where a study has two ratios, and differs between one ratio and two.
    const names = (study: Study) => metricColumns(study).map(({ name }) => name);
    const shared = names(studyOf(still));
    const sharedOf = (study: Study) => metricsOf(study).map((row) => shared.map((name) => row[names(study).indexOf(name)]));
    expect(sharedOf(read)).toEqual([two, still, two].map((text) => sharedOf(studyOf(text))[0]));
    const told = names(read).filter((name) => !shared.includes(name));
    const toldOf = (study: Study) => metricsOf(study).map((row) => told.map((name) => row[names(study).indexOf(name)]));
    expect(told).toContain('sprint.shiftSpeed');
    expect(toldOf(read)[2]).toEqual(toldOf(studyOf(two))[0]);
    expect(toldOf(read)[1]?.[told.indexOf('sprint.ratio')]).toBe(9.5);
  });
});

describe('the motor that a measured file belongs to', () => {
  it('is that of the option it stands with, for a map and for a curve', () => {
    const set = 'motor.peakTorque: 310 N·m, motor.baseSpeed: 3600 rpm, motor.map: map.csv, motor.fullLoad: curve.csv';
    const study = studyOf(withSection(`options: { motor: [ { name: a, set: { ${set} } } ] }\n`), files);
    const base = (3600 * 2 * Math.PI) / 60;
    expect(study.optionMaps.map(({ file }) => file)).toEqual(['map.csv']);
    expect(study.optionMaps[0]?.data.referencePeakTorqueNm).toBe(310);
    expect(study.optionMaps[0]?.data.referenceBaseSpeedRadPerS).toBeCloseTo(base, 12);
    expect(study.optionCurves[0]).toMatchObject({ file: 'curve.csv', data: { referencePeakTorqueNm: 310 } });
    expect(study.optionCurves[0]?.data.referenceBaseSpeedRadPerS).toBeCloseTo(base, 12);
  });

  it('is the study’s own where the option says nothing of it, and what the file form states where it does', () => {
    const study = studyOf(
      withSection(
        'options: { motor: [ { name: a, set: { motor.map: map.csv } }, { name: b, set: { motor.map: { file: map.csv, peakTorque: 280 N·m } } } ] }\n',
      ),
      files,
    );
    expect(study.optionMaps.map(({ data }) => data.referencePeakTorqueNm)).toEqual([270, 280]);
  });

  it('does not change when the motor is scaled by what varies', () => {
    const section =
      'vary: { motor.peakTorque: { oneOf: [240 N·m, 300 N·m] } }\noptions: { losses: [ { name: measured, set: { motor.map: map.csv } }, { name: computed } ] }\n';
    const study = studyOf(withSection(section), files);
    const measured = (torque: number) =>
      edited(still, [LOSSES, '  map: { file: map.csv, peakTorque: 270 N·m }\n'], ['peakTorque: 270 N·m\n', `peakTorque: ${torque} N·m\n`]);
    const computed = (torque: number) => edited(still, ['peakTorque: 270 N·m', `peakTorque: ${torque} N·m`]);
    const byHand = [still, measured(240), computed(240), measured(300), computed(300)];
    expect(metricsOf(study)).toEqual(byHand.map((text) => metricsOf(studyOf(text, files))[0]));
  });
});

describe('a table of options', () => {
  const table = `# quotes of spring
name,motor.peakTorque_Nm,motor.baseSpeed_rpm,motor.maxSpeed_rpm,motor.map
slow-wound,310,3600,11000,map.csv
fast-wound,230,5400,15000,map.csv
`;

  it.each(['motors.csv', '{ file: motors.csv }'])('named as %s is read like a list in the study', (form) => {
    const study = studyOf(withSection(`options:\n  motor on offer: ${form}\n`), { ...files, 'motors.csv': table });
    const inline = `options:
  motor on offer:
    - { name: slow-wound, set: { motor.peakTorque: 310 N·m, motor.baseSpeed: 3600 rpm, motor.maxSpeed: 11000 rpm, motor.map: map.csv } }
    - { name: fast-wound, set: { motor.peakTorque: 230 N·m, motor.baseSpeed: 5400 rpm, motor.maxSpeed: 15000 rpm, motor.map: map.csv } }
`;
    const written = studyOf(withSection(inline), files);
    expect(study.axes).toEqual(written.axes);
    expect(study.optionMaps).toEqual(written.optionMaps);
  });

  it('takes every unit of a number, and leaves an empty cell to the study', () => {
    const csv = 'name,motor.peakTorque_lbf_ft,gearing.ratios.1,gearing.ratios.2\none,200,,\ntwo,200,12,7\n';
    const [axis] = studyOf(withSection('options: { drive: drives.csv }\n'), { 'drives.csv': csv }).axes;
    expect(axis?.sets).toEqual(['motor.peakTorque', 'gearing.ratios.1', 'gearing.ratios.2', 'gearing.ratio']);
    expect(axis?.points[0]?.[0]).toBeCloseTo(271.16, 2);
    expect(axis?.points.map(([, ...ratios]) => ratios)).toEqual([
      [Number.NaN, Number.NaN, 9.5],
      [12, 7, Number.NaN],
    ]);
  });

  it.each([
    ['a head without unit', 'name,motor.peakTorque\na,300\n', ['motors.csv:1:6', 'Add the unit: motor.peakTorque_Nm']],
    ['a misspelt head', 'name,motor.peekTorque_Nm\na,300\n', ['motors.csv:1:6', 'Did you mean motor.peakTorque_Nm?']],
    ['no names', 'motor.peakTorque_Nm\n300\n', ['motors.csv:1:1', 'a column name']],
    ['one number in two columns', 'name,motor.peakTorque_Nm,motor.peakTorque_lbf_ft\na,300,220\n', ['motors.csv:1:26', 'each number in one column']],
    ['a text for a number', 'name,motor.peakTorque_Nm\na,300\nb,ca. 250\n', ['motors.csv:3:3', 'ca. 250']],
    ['a figure out of bounds', 'name,motor.peakTorque_Nm\na,-300\n', ['motors.csv:2:3', 'peak torque, above 0 N·m', '-300']],
    ['the same name twice', 'name,motor.peakTorque_Nm\na,300\na,250\n', ['motors.csv:3:1', 'a again, after line 2']],
    ['a name missing', 'name,motor.peakTorque_Nm\n,300\n', ['motors.csv:2:1', '1 to 80 printable characters']],
    ['a comma in a name', 'name,motor.peakTorque_Nm\nlarge, long,300\n', ['motors.csv:2:13', '1 more']],
    ['no rows', 'name,motor.peakTorque_Nm\n', ['motors.csv:1:1', 'a row for each option']],
  ])('says where a table is wrong: %s', (_, csv, parts) => {
    const text = complaint(withSection('options: { motor on offer: motors.csv }\n'), { 'motors.csv': csv });
    for (const part of parts) expect(text).toContain(part);
    expect(text.match(/error/gu)).toHaveLength(1);
  });
});

describe('a mistake in options is answered with one message', () => {
  const offer = (text: string) => `options:\n  motor on offer:\n${text}`;
  const option = (set: string, name = 'a') => `    - { name: ${name}, set: { ${set} } }\n`;
  it.each([
    ['an unknown number', offer(option('motor.peekTorque: 300 N·m')), ['options.motor on offer.a.motor.peekTorque', 'Did you mean motor.peakTorque?']],
    ['a number without its section', offer(option('peakTorque: 300 N·m')), ['Did you mean motor.peakTorque?']],
    ['a nested section', offer(option('motor: { peakTorque: 300 N·m }')), ['Write the whole name in one piece, such as motor.peakTorque']],
    ['a figure without unit', offer(option('motor.peakTorque: 300')), ['options.motor on offer.a.motor.peakTorque', '300 without a unit']],
    ['a figure out of bounds', offer(option('motor.peakTorque: -3 N·m')), ['peak torque, above 0 N·m']],
    ['a list for one figure', offer(option('motor.peakTorque: [300 N·m, 310 N·m]')), ['one figure']],
    ['another driven axle', offer(option('vehicle.axles.driven: rear')), ['drive the same axle']],
    ['a name that is missing', offer('    - { set: { motor.peakTorque: 300 N·m } }\n'), ['options.motor on offer[1].name', 'an option without a name']],
    ['an empty name', offer(option('motor.peakTorque: 300 N·m', '""')), ['1 to 80 printable characters']],
    ['a name that is too long', offer(option('motor.peakTorque: 300 N·m', 'x'.repeat(81))), ['1 to 80 printable characters']],
    ['the same name twice', offer(option('motor.peakTorque: 300 N·m') + option('motor.peakTorque: 310 N·m')), ['each option name once']],
    ['a misspelt key', offer('    - { name: a, sett: { motor.peakTorque: 300 N·m } }\n'), ['Did you mean set?']],
    ['numbers outside set', offer('    - { name: a, motor.peakTorque: 300 N·m }\n'), ['Numbers stand under set']],
    ['one option instead of a list', 'options:\n  motor on offer: { name: a, set: { motor.peakTorque: 300 N·m } }\n', ['a list of options, or a CSV file']],
    ['a list of texts', offer('    - slow-wound\n'), ['name and set']],
    ['an empty list', 'options: { motor on offer: [] }\n', ['an empty list']],
    ['no list', 'options: {}\n', ['lists of options by name']],
    ['a file that is not there', 'options: { motor on offer: motors.csv }\n', ['motors.csv: there is no such file']],
    ['a list name with a dot', 'options: { motor.offer: [ { name: a, set: { motor.peakTorque: 300 N·m } } ] }\n', ['without dot and equals sign']],
    ['a list name that is a column', 'options: { Number: [ { name: a, set: { motor.peakTorque: 300 N·m } } ] }\n', ['a list name other than number']],
    [
      'two lists told apart by capitals alone',
      'options:\n  motor: [ { name: a, set: { motor.peakTorque: 300 N·m } } ]\n  Motor: [ { name: a, set: { gearing.ratio: 9 } } ]\n',
      ['differ in more than capitals'],
    ],
    ['base speed above maximum speed', offer(option('motor.baseSpeed: 14000 rpm')), ['options.motor on offer.a.motor.baseSpeed', 'maxSpeed (13000 rpm']],
    ['ratios the wrong way round', offer(option('gearing.ratios: [6.4, 11.2]')), ['the first ratio is the larger one']],
    ['one ratio of two', offer(option('gearing.ratios.1: 11.2')), ['ratios.1 without ratios.2']],
    ['one and two ratios', offer(option('gearing.ratios: [11.2, 6.4], gearing.ratio: 9')), ['gearing.ratio or gearing.ratios', 'not both']],
    ['coast-down coefficients half given', offer(option('vehicle.coastDown.f0: 180 N')), ['f0 without f1, f2, at']],
    [
      'losses beside the map of the option',
      offer(option('motor.map: map.csv, motor.losses.copper: 40 W/(N·m)')),
      ['motor.map or motor.losses.copper, not both'],
    ],
    ['a map that is not there', offer(option('motor.map: maps/none.csv')), ['maps/none.csv: there is no such file']],
    ['a curve and a maximum speed', offer(option('motor.fullLoad: curve.csv, motor.maxSpeed: 9000 rpm')), ['motor.fullLoad or motor.maxSpeed, not both']],
    ['what a map states in a name of its own', offer(option('motor.map.peakTorque: 300 N·m')), ['Write "motor.map: { file: …, peakTorque: … }"']],
    [
      'a number in vary and in options',
      `vary:\n  motor.peakTorque: { oneOf: [240 N·m, 300 N·m] }\n${offer(option('motor.peakTorque: 300 N·m'))}`,
      ['motor.peakTorque here and in vary.motor.peakTorque on line 37'],
    ],
    [
      'a number in two lists',
      `${offer(option('motor.peakTorque: 300 N·m'))}  other: [ { name: b, set: { motor.peakTorque: 310 N·m } } ]\n`,
      ['motor.peakTorque here and in options.motor on offer on line 38'],
    ],
    [
      'a ratio that varies beside two ratios on offer',
      `vary:\n  gearing.ratio: { oneOf: [8, 9] }\n${offer(option('gearing.ratios: [11.2, 6.4]'))}`,
      ['gearing.ratios[1] here and gearing.ratio in vary.gearing.ratio on line 37', 'Put both into one list'],
    ],
    [
      'a torque that varies beside curves on offer',
      `vary:\n  motor.peakTorque: { oneOf: [240 N·m, 300 N·m] }\n${offer(option('motor.fullLoad: curve.csv'))}`,
      ['motor.peakTorque here and in vary.motor.peakTorque'],
    ],
    [
      'a loss that varies beside a map on offer',
      `vary:\n  motor.losses.copper: { oneOf: [40 W/(N·m), 44 W/(N·m)] }\n${offer(option('motor.map: map.csv'))}`,
      ['motor.map or motor.losses.copper, not both', 'vary.motor.losses.copper on line 37'],
    ],
  ])('%s', (_, section, parts) => {
    const text = complaint(withSection(section), files);
    for (const part of parts) expect(text).toContain(part);
    expect(text.match(/error/gu)).toHaveLength(1);
    expect(text).toContain('study.yaml:');
    expect(text).toMatch(/what to do {2}\S/u);
  });

  it('also where an option does not go together with a trial', () => {
    const windy = edited(still, ['cruise: { kind: top speed,', 'cruise: { kind: top speed, headWind: 5 m/s,']);
    const set = 'vehicle.coastDown.f0: 180 N, vehicle.coastDown.f1: 0.3 N/(km/h), vehicle.coastDown.f2: 0.05 N/(km/h)², vehicle.coastDown.at: 1900 kg';
    expect(complaint(`${windy}${offer(option(set))}`)).toContain('trials.cruise.headWind on line');
    const geared = edited(still, ['cruise: { kind: top speed,', 'cruise: { kind: top speed, with: { gearing.ratio: 8 },']);
    expect(complaint(`${geared}${offer(option('gearing.ratios: [11.2, 6.4]'))}`)).toContain('gearing.ratio on line');
  });

  it('all at once, with those of the rest of the study', () => {
    const text = complaint(
      withSection(offer(option('motor.peekTorque: 300 N·m') + option('motor.baseSpeed: 3000', 'b')), ['kerbMass: 1780 kg', 'kerbMass: 1780']),
    );
    expect(text.match(/error/gu)).toHaveLength(3);
  });
});

describe('options that set different numbers', () => {
  it('are told once for each number, where the study’s own figure holds instead', () => {
    const section = `options:
  motor on offer:
    - { name: slow, set: { motor.peakTorque: 310 N·m, motor.baseSpeed: 3600 rpm } }
    - { name: fast, set: { motor.peakTorque: 230 N·m } }
    - { name: own }
`;
    const text = warningsOf(withSection(section));
    expect(text).toContain('fast without motor.baseSpeed: what the study itself says holds');
    expect(text.match(/options of one list/gu)).toHaveLength(1);
  });

  it('are not where the number has no part to play: one ratio beside two, a curve beside a torque', () => {
    const gearboxes =
      'options: { gearbox: [ { name: one, set: { gearing.ratio: 9 } }, { name: two, set: { gearing.ratios: [11, 6], gearing.shiftTime: 0.2 s } } ] }\n';
    expect(warningsOf(withSection(gearboxes))).not.toContain('options of one list');
    const motors =
      'options: { motor: [ { name: a, set: { motor.fullLoad: curve.csv } }, { name: b, set: { motor.peakTorque: 250 N·m, motor.baseSpeed: 4000 rpm, motor.fullLoad: curve.csv } } ] }\n';
    expect(warningsOf(withSection(motors), files)).not.toContain('options of one list');
  });
});

describe('many options', () => {
  const rows = Array.from({ length: 500 }, (_, k) => `m${k},${200 + k / 10},${3000 + k}`);
  const table = (count: number) => ['name,motor.peakTorque_Nm,motor.baseSpeed_rpm', ...rows.slice(0, count)].join('\n');

  it('are read up to five hundred in a list', () => {
    const [axis] = studyOf(withSection('options: { motor on offer: m.csv }\n'), { 'm.csv': table(500) }).axes;
    expect(axis?.labels).toHaveLength(500);
    expect(complaint(withSection('options: { motor on offer: m.csv }\n'), { 'm.csv': `${table(500)}\nlast,200,3000` })).toContain('at most 500 options');
  });

  it('of the same names are each looked at for the order of their figures', () => {
    const csv = `${table(20)}\nslip a,200,14000\nslip b,200,15000`;
    const text = complaint(withSection('options: { motor on offer: m.csv }\n'), { 'm.csv': csv });
    expect(text.match(/error in/gu)).toHaveLength(2);
    expect(text).toContain('options.motor on offer.slip b.motor.baseSpeed');
    const capped = edited(still, ['cruise: { kind: top speed,', 'cruise: { kind: top speed, with: { motor.maxSpeed: 4310 rpm },']);
    const fast = ['name,motor.baseSpeed_rpm', ...Array.from({ length: 20 }, (_, k) => `m${k},${4301 + k}`)].join('\n');
    expect(complaint(`${capped}options: { motor on offer: m.csv }\n`, { 'm.csv': fast }).match(/error in/gu)).toHaveLength(10);
  });

  it('that make the same mistake are all told', () => {
    const set = (name: string) => `    - { name: ${name}, set: { gearing.ratios.1: 11 } }\n`;
    const text = complaint(withSection(`options:\n  gearbox:\n${set('a')}${set('b')}`));
    expect(text.match(/without ratios\.2/gu)).toHaveLength(2);
  });
});
