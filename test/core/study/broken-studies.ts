/** Studies with one mistake each, and what the answer must say. The base is the harbour parcel van. */
import { edited, harbour } from './study-from-disk.ts';

/** One broken study. */
export interface BrokenStudy {
  readonly mistake: string;
  readonly text: string;
  /** Parts of the one message, in any order; the first is where: `line:column`. */
  readonly says: readonly string[];
  readonly files?: Readonly<Record<string, string>>;
}

function broken(mistake: string, edits: readonly (readonly [string, string])[], says: readonly string[], files?: BrokenStudy['files']): BrokenStudy {
  return { mistake, text: edited(harbour, ...edits), says, ...(files === undefined ? {} : { files }) };
}

const LOSSES =
  '  losses: { hysteresis: 1.2e-3, eddy: 8e-7 s, windage: 2e-10 s², copper: 42 W/(N·m), acCopper: 1e-6 s², fieldWeakening: 0.20, inverterFixed: 0.0014, inverterLinear: 0.018, inverterSquare: 0.010 }';

/** The table. */
export const brokenStudies: readonly BrokenStudy[] = [
  broken(
    'a unit is missing',
    [['kerbMass: 1780 kg ', 'kerbMass: 1780 ']],
    ['4:13', 'vehicle.kerbMass', 'a mass in kg, t or lb', '1780 without a unit', '1780 kg'],
  ),
  broken('a unit of another quantity', [['peakTorque: 270 N·m\n', 'peakTorque: 270 kW\n']], ['13:15', 'a torque in N·m', 'kW is a unit of power']),
  broken('a misspelt unit', [['baseSpeed: 4300 rpm', 'baseSpeed: 4300 RPM']], ['14:14', 'RPM is no unit known here', 'Did you mean 4300 rpm?']),
  broken('a decimal comma', [['auxiliaries: 420 W', 'auxiliaries: 0,42 kW']], ['11:16', 'point', 'write 0.42 kW']),
  broken('a separator between thousands', [['baseSpeed: 4300 rpm', 'baseSpeed: 4,300 rpm']], ['14:14', 'without separators', 'write 4300 rpm']),
  broken('an underscore between thousands', [['baseSpeed: 4300 rpm', 'baseSpeed: 4_300 rpm']], ['14:14', 'without separators', 'write 4300 rpm']),
  broken('a share as a fraction', [['efficiency: 97 %', 'efficiency: 0.97']], ['23:15', 'a share in %', 'write 97 %']),
  broken('a word instead of a figure', [['auxiliaries: 420 W', 'auxiliaries: yes']], ['11:16', 'the word yes', 'Write a number']),
  broken('a negative mass', [['kerbMass: 1780 kg', 'kerbMass: -1780 kg']], ['4:13', 'kerb mass, above 0 kg', '-1780 kg']),
  broken('an efficiency of 130 %', [['efficiency: 97 %', 'efficiency: 130 %']], ['23:15', 'at most 100 %', '130 %']),
  broken('a misspelt name', [['kerbMass:', 'kerbmass:']], ['4:3', 'Did you mean kerbMass?']),
  broken('a name in the wrong section', [['efficiency: 97 %', 'efficiency: 97 %\n  usable: 58 kWh']], ['24:3', 'usable stands under battery']),
  broken('a name twice', [['  auxiliaries: 420 W', '  auxiliaries: 420 W\n  auxiliaries: 500 W']], ['12:3', 'each name once', 'after line 11']),
  broken(
    'base speed above maximum speed',
    [
      ['maxSpeed: 13000 rpm', 'maxSpeed: 4000 rpm'],
      ['  motor.baseSpeed:  { from: 3200 rpm, to: 5600 rpm, steps: 13 }\n', ''],
    ],
    ['15:13', 'maxSpeed at least motor.baseSpeed (4300 rpm, line 14)', '4000 rpm'],
  ),
  broken(
    'a required figure is missing',
    [['  kerbMass: 1780 kg            # without driver, motor, inverter and gearing: massAndCost adds those\n', '']],
    ['3:1', 'vehicle.kerbMass', 'Add kerbMass under vehicle'],
  ),
  broken(
    'neither tyre nor wheel radius',
    [['  tyre: 215/65 R16             # or  wheelRadius: 0.333 m\n', '']],
    ['3:1', 'vehicle.wheelRadius or vehicle.tyre', 'tyre: 215/65 R16'],
  ),
  broken('a tyre size that is none', [['tyre: 215/65 R16', 'tyre: 215-65-16']], ['7:9', '215/65 R16', 'wheelRadius']),
  broken('tyre and wheel radius', [['  auxiliaries: 420 W', '  auxiliaries: 420 W\n  wheelRadius: 0.333 m']], ['12:3', 'not both', 'vehicle.tyre on line 7']),
  broken(
    'mass factor and wheel inertia',
    [['  auxiliaries: 420 W', '  auxiliaries: 420 W\n  massFactor: 1.06']],
    ['12:3', 'vehicle.wheelInertia on line 8', 'Keep one'],
  ),
  broken('half of the axle data', [['centreHeight: 0.71 m, ', '']], ['9:64', 'together', 'Add centreHeight']),
  broken('a list where a figure stands', [['ratio: 9.5', 'ratio: [9.5, 11]']], ['22:10', 'one figure', 'gearing.ratio: { oneOf']),
  broken(
    'three ratios',
    [
      ['ratio: 9.5', 'ratios: [12, 9, 6]'],
      ['  gearing.ratio:    { from: 7.5, to: 12.25, steps: 20 }\n', ''],
    ],
    ['22:11', 'a list of two', 'a list of 3'],
  ),
  broken(
    'ratios in the wrong order',
    [
      ['ratio: 9.5', 'ratios: [6.4, 11.2]'],
      ['  gearing.ratio:    { from: 7.5, to: 12.25, steps: 20 }\n', ''],
    ],
    ['22:17', 'below gearing.ratios.1 (6.4', '11.2'],
  ),
  broken(
    'an unknown kind of trial',
    [['kind: hill start, laden: 2800 kg, startAcceleration', 'kind: hillstart, laden: 2800 kg, startAcceleration']],
    ['35:22', 'trials.ramp.kind', 'Did you mean hill start?'],
  ),
  broken(
    'a number that the kind does not take',
    [['kind: gradeability, at: 80 km/h,', 'kind: gradeability, at: 80 km/h, grade: 3 %,']],
    ['37:49', 'the grade is what a gradeability trial finds'],
  ),
  broken(
    'a trial without its numbers',
    [['kind: acceleration, from: 0 km/h, to: 80 km/h,', 'kind: acceleration, from: 0 km/h,']],
    ['32:3', 'trials.sprint.to', 'Add "to: … km/h"'],
  ),
  broken(
    'an acceleration that slows down',
    [['from: 60 km/h, to: 100 km/h', 'from: 100 km/h, to: 60 km/h']],
    ['33:56', 'to above trials.overtake.from (100 km/h', '60 km/h'],
  ),
  broken(
    'payload and laden mass',
    [['kind: top speed, laden: 2800 kg', 'kind: top speed, laden: 2800 kg, payload: 300 kg']],
    ['38:49', 'trials.cruise.laden', 'not both'],
  ),
  broken(
    'a dot in the name of a trial',
    [
      ['  cruise:    {', '  cruise.1:  {'],
      ['  cruise.speed:     { atLeast: 130 km/h }\n', ''],
    ],
    ['38:3', 'without a dot', 'cruise 1'],
  ),
  broken('a reserved name of a trial', [['  overtake:  {', '  battery:   {']], ['33:3', 'a trial name other than', 'battery']),
  broken('a cycle that does not exist', [['cycle: hwfet', 'cycle: hwefet']], ['40:36', 'Did you mean hwfet?']),
  broken('a cycle file with time running backwards', [['cycle: hwfet', 'cycle: trunk.csv']], ['trunk.csv:4:1', 'time_s rising', 'runs backwards'], {
    'trunk.csv': 'time_s,speed_kmh\n0,0\n2,5\n1,8\n3,9\n',
  }),
  broken('gradeability at 0 km/h', [['at: 80 km/h', 'at: 0 km/h']], ['37:40', 'at, above 0 km/h', '0 km/h', 'hill start']),
  broken(
    'a continuous trial without a continuous limit',
    [
      ['  continuous: { torque: 52 %, power: 58 % }\n', ''],
      ['  cruise:    { kind: top speed, laden: 2800 kg }', '  cruise:    { kind: top speed, laden: 2800 kg, rating: peak }'],
    ],
    ['36:3', 'trials.climb.rating', 'rating: peak', 'continuous: { torque: 50 %, power: 50 % }'],
  ),
  broken(
    'a name under with that is none',
    [['with: { vehicle.auxiliaries: 2.5 kW,', 'with: { vehicle.auxiliary: 2.5 kW,']],
    ['41:67', 'Did you mean vehicle.auxiliaries?'],
  ),
  broken(
    'with that says a thing the other way',
    [['air.temperature: -7 °C', 'air.density: 1.3 kg/m³']],
    ['41:96', 'trials.winter.with.air.density', 'air.temperature on line 29'],
  ),
  broken('a range that ends below its start', [['from: 180 N·m, to: 330 N·m', 'from: 330 N·m, to: 180 N·m']], ['45:42', 'above from (330 N·m)', '180 N·m']),
  broken('a range without steps', [['to: 12.25, steps: 20', 'to: 12.25']], ['44:21', 'gearing.ratio', 'steps: 11']),
  broken('a step that misses the end', [['to: 12.25, steps: 20', 'to: 12.25, step: 0.3']], ['44:51', 'leads from 7.5 to 12.25', '12 or 12.3']),
  broken(
    'a varied number without a figure',
    [
      [
        '  vehicle.dragArea: {',
        '  vehicle.wheelRadius: { from: 0.3 m, to: 0.35 m, steps: 3 }\n  motor.constantPowerTo: { from: 9000 rpm, to: 12000 rpm, steps: 3 }\n  vehicle.dragArea: {',
      ],
    ],
    ['48:3', 'motor.constantPowerTo without a figure', 'State motor.constantPowerTo'],
  ),
  broken('a varied name that is none', [['  motor.baseSpeed:  {', '  motor.basespeed:  {']], ['46:3', 'Did you mean motor.baseSpeed?']),
  broken('an unknown metric in the requirements', [['climb.grade:  ', 'climb.slope:  ']], ['51:3', 'climb gives payload, grade']),
  broken('a metric with its unit in the name', [['ramp.grade:  ', 'ramp.grade_pct:  ']], ['50:3', 'Write ramp.grade']),
  broken(
    'an unknown metric in the trade-off',
    [['minimise: [stops.batteryEnergy', 'minimise: [stops.batteryenergy']],
    ['56:14', 'Did you mean stops.batteryEnergy?'],
  ),
  broken(
    'a limit whose unit does not fit',
    [['sprint.time:      { atMost: 11.5 s }', 'sprint.time:      { atMost: 11.5 km/h }']],
    ['52:31', 'a time in s', 'km/h is a unit of speed'],
  ),
  broken('a limit without atLeast or atMost', [['ramp.grade:       { atLeast: 20 % }', 'ramp.grade:       20 %']], ['50:21', 'ramp.grade: { atLeast: 20 % }']),
  broken('limits with nothing between them', [['{ atLeast: 130 km/h }', '{ atLeast: 130 km/h, atMost: 120 km/h }']], ['53:21', 'nothing between']),
  broken(
    'a metric that no design has',
    [['driveUnit.axleTorque: { atMost: 2900 N·m }', 'battery.cost: { atMost: 9000 }']],
    ['54:3', 'battery.cost, which no design has', 'massAndCost.cost.battery'],
  ),
  broken('a metric minimised and maximised', [['maximise: []', 'maximise: [driveUnit.cost]']], ['57:14', 'driveUnit.cost', 'line 56']),
  broken('a resolution of something that is no objective', [['driveUnit.cost: 25 }', 'driveUnit.mass: 2 kg }']], ['58:77', 'driveUnit.mass', 'an objective']),
  broken('another spelling of minimise', [['minimise:', 'minimize:']], ['56:3', 'Did you mean minimise?']),
  broken(
    'a method that is to come',
    [['search: { method: grid }', 'search: { method: genetic, designs: 500 }']],
    ['48:19', 'genetic, which is not available yet'],
  ),
  broken('a sample without its size', [['search: { method: grid }', 'search: { method: sobol }']], ['48:9', 'sobol without designs', 'designs: 10000']),
  broken('a grid with a seed', [['search: { method: grid }', 'search: { method: grid, seed: 3 }']], ['48:25', 'Remove it']),
  broken('a tab as indentation', [['  kerbMass', '\tkerbMass']], ['4:1', 'a tab as indentation', 'spaces']),
  broken('a bracket that stays open', [['efficiency: 97 %\n', 'efficiency: [97 %\n']], ['23:15', 'a [ without its ]', 'Close it']),
  broken('two entries on one line', [['title: Harbour parcel van', 'title: Harbour parcel van: the second']], ['1:8', 'a second colon', 'goes in quotes']),
  broken('a brace that stays open', [['chargingEfficiency: 89 % }', 'chargingEfficiency: 89 %']], ['25:10', 'a { without its }', 'Close it']),
  broken('quotes that stay open', [['title: Harbour', 'title: "Harbour']], ['1:8', 'a " without its second', 'Close the quotes']),
  broken('a line indented too far', [['  baseSpeed:', '   baseSpeed:']], ['14:4', 'indented below one that holds a value', 'same column']),
  broken('a line indented too little', [['  auxiliaries:', ' auxiliaries:']], ['11:2', 'another column', 'same column']),
  broken('no space after a colon', [['  auxiliaries: 420 W', '  auxiliaries:420 W']], ['11:3', 'no space after the colon']),
  broken('no comma between two entries', [['driven: front,', 'driven: front']], ['9:20', 'before the next comma', 'a comma stands between entries']),
  broken('a brace too many', [['chargingEfficiency: 89 % }', 'chargingEfficiency: 89 % }}']], ['25:130', 'a } that closes nothing']),
  broken('a limit with a sign, unquoted', [['{ atLeast: 20 % }', '>= 20 %']], ['50:21', 'starts with >', 'atLeast']),
  broken('quotes around half a text', [['title: Harbour', 'title: "Harbour"']], ['1:18', 'more text after a value', 'the whole text in quotes']),
  broken(
    'a map of the motor alone without inverter losses',
    [[LOSSES, '  map: { file: m.csv, covers: motor }']],
    ['19:16', 'inverterFixed, inverterLinear, inverterSquare', 'none'],
    {
      'm.csv': 'speed_rpm,torque_Nm,loss_W\n0,0,1\n0,9,2\n9000,0,3\n9000,9,4\n',
    },
  ),
  broken('an efficiency map that does not say what it covers', [[LOSSES, '  map: m.csv']], ['19:8', 'motor, or motor and inverter', 'covers:'], {
    'm.csv': 'speed_rpm,torque_Nm,efficiency_pct\n500,10,80\n500,90,82\n9000,10,88\n9000,90,93\n',
  }),
  broken('a map with a gap', [[LOSSES, '  map: m.csv']], ['m.csv:1:1', 'none at speed 9000, torque 9', 'full grid'], {
    'm.csv': 'speed_rpm,torque_Nm,loss_W\n0,0,1\n0,9,2\n9000,0,3\n',
  }),
  broken('losses beside a map', [['  standstill: 90 % ', '  map: m.csv\n  standstill: 90 % ']], ['20:13', 'motor.map on line 17', 'not both'], {
    'm.csv': '# covers: motor and inverter\nspeed_rpm,torque_Nm,loss_W\n0,0,1\n0,9,2\n9000,0,3\n9000,9,4\n',
  }),
  broken('a full-load curve beside peak torque', [['  standstill: 90 % ', '  fullLoad: c.csv\n  standstill: 90 % ']], ['17:13', 'motor.fullLoad', 'not both'], {
    'c.csv': 'speed_rpm,torque_Nm\n0,270\n4300,270\n13000,80\n',
  }),
  broken(
    'head wind beside coast-down coefficients',
    [
      [
        '  dragArea: 1.12 m²            # drag coefficient times frontal area\n',
        '  coastDown: { f0: 180 N, f1: 0.3 N/(km/h), f2: 0.05 N/(km/h)^2, at: 1900 kg }\n',
      ],
      ['  rolling: { c0: 0.0098, c1: 2.1e-6 s²/m² }      # or  coastDown: { f0: …, f1: …, f2: …, at: 1900 kg }\n', ''],
      ['  vehicle.dragArea: { oneOf: [1.05 m², 1.12 m², 1.24 m²] }\n', ''],
      ['cycle: hwfet, payload: 400 kg', 'cycle: hwfet, payload: 400 kg, headWind: 5 m/s'],
    ],
    ['39:60', 'trials.trunk.headWind', 'line 5', 'still air'],
  ),
  broken(
    'a whole section is missing',
    [[/\ngearing:[\s\S]*?(?=\nbattery:)/u.exec(harbour)?.[0] as string, '']],
    ['1:1', 'the section gearing', 'ratio or ratios, efficiency'],
  ),
  broken('a section under another name', [['vehicle:\n', 'vehicles:\n']], ['3:1', 'vehicles', 'Did you mean vehicle?']),
  broken('a colon is missing', [['  auxiliaries: 420 W', '  auxiliaries 420 W']], ['11:3', 'A colon is missing']),
  broken('a comma within braces', [['wheelbase: 3.06 m,', 'wheelbase: 3,06 m,']], ['9:80', '06 m', 'numbers go without commas']),
  broken(
    'trials as a list',
    [[/trials:[\s\S]*?(?=vary:)/u.exec(harbour)?.[0] as string, 'trials: [sprint, ramp]\n']],
    ['31:9', 'trials', 'climb: { kind: hill start }'],
  ),
  broken('a text in brackets', [['title: Harbour parcel van', 'title: [Harbour parcel van]']], ['1:8', 'a text', 'without brackets']),
];
