/** What leaves common practice or misleads is said once, with its place; what just keeps to it stays silent. */
import { describe, expect, it } from 'vitest';
import { warningPlace, warningWords } from '../../../src/core/study/text/issue.ts';
import { warningRows } from '../../../src/core/study/warn/warnings.ts';
import { check, edited, harbour } from './study-from-disk.ts';

type Edit = readonly [from: string, to: string];

const LOSSES = / {2}losses: \{.*\n/u.exec(harbour)?.[0] as string;
const INERTIA = '  inertia: { perTorque: 1.5e-4 kg·m²/(N·m) }      # or a fixed value\n';
const WHEELS = '  wheelInertia: 5.2 kg·m²      # all wheels;  or  massFactor: 1.06\n';
const BASE_SPEEDS = '  motor.baseSpeed:  { from: 3200 rpm, to: 5600 rpm, steps: 13 }\n';
const TORQUES = '{ from: 180 N·m, to: 330 N·m, steps: 16 }';
const MAP = '# covers: motor and inverter\nspeed_rpm,torque_Nm,loss_W\n0,0,1\n0,300,2000\n13000,0,900\n13000,300,9000\n';
const efficiencies = (best: string) =>
  `# covers: motor and inverter\nspeed_rpm,torque_Nm,efficiency_pct\n500,10,80\n500,300,82\n13000,10,88\n13000,300,${best}\n`;
const files = {
  'm.csv': MAP,
  'e.csv': efficiencies('99.5'),
  'good.csv': efficiencies('99'),
  'curve.csv': 'speed_rpm,torque_Nm\n0,270\n4300,270\n13000,89.3\n',
};

const calm = edited(harbour, ['  vehicle.dragArea: { oneOf: [1.05 m², 1.12 m², 1.24 m²] }\n', '']);
const drop = (text: string): Edit => [text, ''];
const withMap = (map: string, ...edits: readonly Edit[]) => edited(calm, [LOSSES, `  map: ${map}\n`], drop(BASE_SPEEDS), ...edits);
const coast = (...edits: readonly Edit[]) =>
  edited(
    calm,
    [
      '  dragArea: 1.12 m²            # drag coefficient times frontal area\n',
      '  coastDown: { f0: 180 N, f1: 0.3 N/(km/h), f2: 0.05 N/(km/h)², at: 1900 kg }\n',
    ],
    drop('  rolling: { c0: 0.0098, c1: 2.1e-6 s²/m² }      # or  coastDown: { f0: …, f1: …, f2: …, at: 1900 kg }\n'),
    ...edits,
  );
const DRAG = drop('  dragTorque: { fixed: 0.4 N·m, perSpeed: 0.0006 N·m·s }\n');
const AIR = drop('air: { temperature: 20 °C, altitude: 0 m }        # or  density: 1.2 kg/m³\n');
const cruise = (...more: readonly string[]): Edit => ['kind: top speed, laden: 2800 kg', ['kind: top speed', ...more].join(', ')];
const motors = (slowest: string) =>
  edited(calm, drop(`  motor.peakTorque: ${TORQUES}\n`), drop(BASE_SPEEDS), [
    'search:',
    `options:
  motor on offer:
    - { name: slow-wound, set: { motor.peakTorque: 310 N·m, motor.baseSpeed: 3600 rpm, motor.maxSpeed: ${slowest} } }
    - { name: fast-wound, set: { motor.peakTorque: 230 N·m, motor.baseSpeed: 5400 rpm, motor.maxSpeed: 14000 rpm } }
search:`,
  ]);

/** A study that one rule speaks of, and one that just keeps clear of it. */
interface Case {
  readonly rule: string;
  readonly case: string;
  readonly text: string;
  readonly path: string;
  readonly says: string;
  readonly nearMiss: string;
}

const cases: readonly Case[] = [
  {
    rule: 'no wheel inertia',
    case: 'wheels without inertia',
    text: edited(calm, drop(WHEELS)),
    path: 'vehicle',
    says: 'neither wheelInertia nor massFactor',
    nearMiss: edited(calm, [WHEELS, '  massFactor: 1.06\n'], drop(INERTIA)),
  },
  {
    rule: 'no rotor inertia',
    case: 'a rotor without inertia',
    text: edited(calm, drop(INERTIA)),
    path: 'motor',
    says: 'favours large ratios',
    nearMiss: edited(calm, [INERTIA, '  inertia: 0.04 kg·m²\n']),
  },
  {
    rule: 'inertia beside mass factor',
    case: 'a rotor inertia that a fixed factor leaves without effect',
    text: edited(calm, [WHEELS, '  massFactor: 1.06\n']),
    path: 'motor.inertia',
    says: 'without effect',
    nearMiss: edited(calm, [WHEELS, '  massFactor: 1.06\n'], drop(INERTIA)),
  },
  {
    rule: 'mass factor',
    case: 'a fixed factor too low',
    text: edited(calm, [WHEELS, '  massFactor: 1.005\n'], drop(INERTIA)),
    path: 'vehicle.massFactor',
    says: 'mass factor 1.005; expected about 1.01 to 1.4',
    nearMiss: edited(calm, [WHEELS, '  massFactor: 1.01\n'], drop(INERTIA)),
  },
  {
    rule: 'mass factor',
    case: 'wheels too heavy',
    text: edited(calm, ['wheelInertia: 5.2 kg·m²', 'wheelInertia: 120 kg·m²']),
    path: 'vary.gearing.ratio',
    says: 'over the designs',
    nearMiss: edited(calm, ['wheelInertia: 5.2 kg·m²', 'wheelInertia: 60 kg·m²']),
  },
  {
    rule: 'mass factor',
    case: 'a rotor that is fine at the ratio of the study, but not at the largest',
    text: edited(calm, [INERTIA, '  inertia: 0.55 kg·m²\n']),
    path: 'vary.gearing.ratio',
    says: 'mass factor 1.173 to 1.4',
    nearMiss: edited(calm, [INERTIA, '  inertia: 0.55 kg·m²\n'], ['to: 12.25, steps: 20', 'to: 11.8, steps: 20']),
  },
  {
    rule: 'efficiency',
    case: 'a gearing almost without loss',
    text: edited(calm, ['efficiency: 97 %', 'efficiency: 99.6 %']),
    path: 'gearing.efficiency',
    says: '99.6 %; expected at most 99 %',
    nearMiss: edited(calm, ['efficiency: 97 %', 'efficiency: 99 %']),
  },
  {
    rule: 'efficiency',
    case: 'a gearing varied to more than 99 %',
    text: edited(calm, [`  motor.peakTorque: ${TORQUES}`, '  gearing.efficiency: { oneOf: [96 %, 99.5 %] }']),
    path: 'vary.gearing.efficiency',
    says: '99.5 %; expected at most 99 %',
    nearMiss: edited(calm, [`  motor.peakTorque: ${TORQUES}`, '  gearing.efficiency: { oneOf: [96 %, 99 %] }']),
  },
  {
    rule: 'efficiency',
    case: 'a gearing almost without loss in one trial',
    text: edited(calm, cruise('laden: 2800 kg', 'with: { gearing.efficiency: 99.5 % }')),
    path: 'trials.cruise.with.gearing.efficiency',
    says: '99.5 %',
    nearMiss: edited(calm, cruise('laden: 2800 kg', 'with: { gearing.efficiency: 98.5 % }')),
  },
  {
    rule: 'efficiency',
    case: 'a charger without loss',
    text: edited(calm, ['chargingEfficiency: 89 %', 'chargingEfficiency: 100 %']),
    path: 'battery.chargingEfficiency',
    says: '100.0 %',
    nearMiss: edited(calm, ['chargingEfficiency: 89 %', 'chargingEfficiency: 95 %']),
  },
  { rule: 'map efficiency', case: 'a map too good', text: withMap('e.csv'), path: 'motor.map', says: '99.5 % in the map', nearMiss: withMap('good.csv') },
  {
    rule: 'motor efficiency',
    case: 'losses forgotten but for those of iron',
    text: edited(calm, [LOSSES, '  losses: { hysteresis: 1.2e-3, eddy: 8e-7 s }\n']),
    path: 'motor.losses',
    says: 'at the best point of motor and inverter together',
    nearMiss: edited(calm, [LOSSES, '  losses: { hysteresis: 1.2e-3, eddy: 8e-7 s, copper: 42 W/(N·m) }\n']),
  },
  {
    rule: 'sustained at peak',
    case: 'a top speed at peak rating',
    text: edited(calm, cruise('rating: peak', 'laden: 2800 kg')),
    path: 'trials.cruise',
    says: 'a top speed trial rated peak',
    nearMiss: edited(calm, cruise('rating: continuous', 'laden: 2800 kg')),
  },
  {
    rule: 'sustained at peak',
    case: 'a grade held at peak rating',
    text: edited(calm, ['kind: gradeability, at', 'kind: gradeability, rating: peak, at']),
    path: 'trials.climb',
    says: 'a gradeability trial rated peak',
    nearMiss: edited(calm, ['startAcceleration: 0.3 m/s²,', 'startAcceleration: 0.3 m/s², rating: peak,']),
  },
  {
    rule: 'unpriced circumstance',
    case: 'a drag area that costs nothing',
    text: harbour,
    path: 'vary.vehicle.dragArea',
    says: 'no objective prices it',
    nearMiss: edited(harbour, drop('  vehicle.dragArea: { oneOf: [1.05 m², 1.12 m², 1.24 m²] }\n'), [
      'search:',
      'options:\n  body: [ { name: sleek, set: { vehicle.dragArea: 1.05 m², massAndCost.cost.gearing.fixed: 400 } }, { name: plain, set: { vehicle.dragArea: 1.12 m², massAndCost.cost.gearing.fixed: 110 } } ]\nsearch:',
    ]),
  },
  {
    rule: 'unpriced circumstance',
    case: 'a load that no objective wants large',
    text: edited(calm, ['search:', '  trials.stops.payload: { oneOf: [200 kg, 400 kg] }\nsearch:']),
    path: 'vary.trials.stops.payload',
    says: 'no objective prices it',
    nearMiss: edited(calm, ['search:', '  trials.stops.payload: { oneOf: [200 kg, 400 kg] }\nsearch:'], ['maximise: []', 'maximise: [stops.payload]']),
  },
  {
    rule: 'motor speed',
    case: 'a top speed beyond the larger ratios',
    text: edited(calm, ['{ atLeast: 130 km/h }', '{ atLeast: 150 km/h }']),
    path: 'trials.cruise',
    says: '150 km/h wanted, beyond maximum motor speed at gearing.ratio above 10.88',
    nearMiss: edited(calm, ['{ atLeast: 130 km/h }', '{ atLeast: 133 km/h }']),
  },
  {
    rule: 'motor speed',
    case: 'a cycle beyond every ratio',
    text: edited(
      calm,
      ['maxSpeed: 13000 rpm', 'maxSpeed: 5700 rpm'],
      drop('  cruise.speed:     { atLeast: 130 km/h }\n'),
      drop('  climb.grade:      { atLeast: 6 % }\n'),
      ['  sprint.time:      { atMost: 11.5 s }\n', ''],
    ),
    path: 'trials.trunk',
    says: 'km/h wanted, beyond maximum motor speed at every gearing.ratio',
    nearMiss: edited(
      calm,
      ['maxSpeed: 13000 rpm', 'maxSpeed: 5700 rpm'],
      drop('  cruise.speed:     { atLeast: 130 km/h }\n'),
      drop('  climb.grade:      { atLeast: 6 % }\n'),
      ['  sprint.time:      { atMost: 11.5 s }\n', '  trunk.offTrace:   { atMost: 100 % }\n'],
    ),
  },
  {
    rule: 'motor speed',
    case: 'one of the motors on offer, at the ratio that follows',
    text: edited(motors('14000 rpm'), ['gearing.ratio:    { from: 7.5, to: 12.25, steps: 20 }', 'gearing.ratio:    { from: 7.5, to: 13.8, steps: 20 }']),
    path: 'trials.cruise',
    says: 'at gearing.ratio above 13.52',
    nearMiss: motors('9000 rpm'),
  },
  {
    rule: 'motor speed',
    case: 'a measured curve, which ends at its last point',
    text: edited(
      calm,
      ['  peakTorque: 270 N·m\n', ''],
      ['  baseSpeed: 4300 rpm\n', ''],
      ['  maxSpeed: 13000 rpm          # optional constantPowerTo: … rpm\n', '  fullLoad: curve.csv\n'],
      [BASE_SPEEDS, ''],
      ['{ atLeast: 130 km/h }', '{ atLeast: 140 km/h }'],
    ),
    path: 'trials.cruise',
    says: 'at gearing.ratio above 11.66',
    nearMiss: edited(
      calm,
      ['  peakTorque: 270 N·m\n', ''],
      ['  baseSpeed: 4300 rpm\n', ''],
      ['  maxSpeed: 13000 rpm          # optional constantPowerTo: … rpm\n', '  fullLoad: curve.csv\n'],
      ['{ atLeast: 130 km/h }', '{ atLeast: 140 km/h }'],
    ),
  },
  {
    rule: 'speeds out of order',
    case: 'base speeds beyond maximum speed',
    text: edited(calm, ['to: 5600 rpm, steps: 13', 'to: 15200 rpm, steps: 13']),
    path: 'vary.motor.baseSpeed',
    says: 'base speed up to 15 200 rpm and maximum speed from 13 000 rpm; expected base speed below maximum speed over the whole range. In some designs',
    nearMiss: edited(calm, ['to: 5600 rpm, steps: 13', 'to: 13000 rpm, steps: 13']),
  },
  {
    rule: 'map scale',
    case: 'a map for motors too small',
    text: withMap('m.csv', ['from: 180 N·m, to: 330 N·m', 'from: 100 N·m, to: 330 N·m']),
    path: 'vary.motor.peakTorque',
    says: 'a map used for 0.37 to 1.22 times the power it was measured at',
    nearMiss: withMap('m.csv', ['from: 180 N·m, to: 330 N·m', 'from: 135 N·m, to: 540 N·m']),
  },
  {
    rule: 'map and base speed',
    case: 'one map for several windings',
    text: edited(calm, [LOSSES, '  map: m.csv\n'], ['from: 3200 rpm', 'from: 3400 rpm']),
    path: 'vary.motor.baseSpeed',
    says: 'with a measured map',
    nearMiss: withMap('m.csv'),
  },
  {
    rule: 'speed cap',
    case: 'a van held to 80 km/h',
    text: edited(calm, ['cycle: hwfet, payload: 400 kg', 'cycle: hwfet, capSpeed: 80 km/h, payload: 400 kg']),
    path: 'trials.trunk.capSpeed',
    says: 'the cap of 80 km/h shortens hwfet from 16.51 km to 15.5',
    nearMiss: edited(calm, ['cycle: hwfet, payload: 400 kg', 'cycle: hwfet, capSpeed: 100 km/h, payload: 400 kg']),
  },
  {
    rule: 'air beside coast-down',
    case: 'a temperature without effect',
    text: coast(DRAG, [AIR[0], 'air: { temperature: 20 °C }\n']),
    path: 'air.temperature',
    says: 'without effect',
    nearMiss: edited(coast(DRAG, AIR), [', air.temperature: -7 °C', '']),
  },
  {
    rule: 'drag torque beside coast-down',
    case: 'the drag of the gearing twice',
    text: coast(AIR),
    path: 'gearing.dragTorque',
    says: 'beside coast-down',
    nearMiss: coast(AIR, DRAG),
  },
  {
    rule: 'aim against the catalogue',
    case: 'a load to be as large as possible',
    text: edited(calm, ['maximise: []', 'maximise: [trunk.lossLoad]']),
    path: 'tradeOff.maximise',
    says: 'maximise trunk.lossLoad',
    nearMiss: edited(calm, ['maximise: []', 'maximise: [climb.grade]']),
  },
  {
    rule: 'repeated designs',
    case: 'more designs than combinations',
    text: edited(calm, ['{ method: grid }', '{ method: sobol, designs: 4161 }']),
    path: 'search.designs',
    says: '4161 designs drawn from 4160 combinations',
    nearMiss: edited(calm, ['{ method: grid }', '{ method: sobol, designs: 4160 }']),
  },
  {
    rule: 'repeated designs',
    case: 'more designs than combinations beside one without end',
    text: edited(calm, ['{ method: grid }', '{ method: random, designs: 100000 }']),
    path: 'search.designs',
    says: '100 000 designs drawn from 4160 combinations',
    nearMiss: edited(calm, ['to: 12.25, steps: 20', 'to: 12.25'], ['{ method: grid }', '{ method: random, designs: 100000 }']),
  },
  {
    rule: 'discharge limit',
    case: 'more power than the pack has',
    text: edited(calm, ['discharge: 160 kW', 'discharge: 600 kW']),
    path: 'battery.discharge',
    says: '600 kW where voltage and resistance allow 423 kW',
    nearMiss: edited(calm, ['discharge: 160 kW', 'discharge: 420 kW']),
  },
  {
    rule: 'too heavy',
    case: 'less laden than empty in every design',
    text: edited(calm, cruise('laden: 1700 kg')),
    path: 'trials.cruise.laden',
    says: '1700 kg laden, below the mass of the vehicle in every design, up to 1891 kg',
    nearMiss: edited(calm, cruise('laden: 1892 kg')),
  },
  {
    rule: 'too heavy',
    case: 'less laden than empty in the heaviest designs',
    text: edited(calm, cruise('laden: 1880 kg')),
    path: 'trials.cruise.laden',
    says: 'in some designs',
    nearMiss: edited(calm, cruise('laden: 1880 kg', 'with: { vehicle.kerbMass: 1750 kg }')),
  },
  {
    rule: 'trailer without drag',
    case: 'a trailer that the wind does not see',
    text: edited(calm, cruise('trailer: { mass: 500 kg }', 'laden: 2800 kg')),
    path: 'trials.cruise.trailer',
    says: 'no air resistance',
    nearMiss: edited(calm, cruise('trailer: { mass: 500 kg, dragArea: 0.4 m² }', 'laden: 2800 kg')),
  },
];

/** Rule and sentence of every warning about a text, which must be right. */
function said(text: string): { rule: string; path: string; sentence: string }[] {
  const read = check(text, files);
  if (!read.ok) throw new Error(read.issues.map(({ line, found, expected }) => `line ${line}: ${found}; ${expected}`).join('\n'));
  return read.warnings.map((warning) => ({ rule: warning.rule, path: warning.path, sentence: warningWords(warning).replaceAll('\u202f', ' ') }));
}

describe('a warning', () => {
  it.each(cases)('$rule: of $case, and of nothing else', ({ rule, text, path, says }) => {
    expect(said(text)).toEqual([{ rule, path, sentence: expect.stringContaining(says) }]);
  });

  it.each(cases)('$rule: not of what just keeps clear of $case', ({ nearMiss }) => {
    expect(said(nearMiss)).toEqual([]);
  });

  it('is one sentence or two, with its place and what to do', () => {
    for (const { text } of cases) {
      const read = check(text, files);
      const [warning] = read.ok ? read.warnings : [];
      expect(warning?.hint).toMatch(/\S\.$/u);
      expect(warning && warningPlace(warning, 'study.yaml')).toMatch(/^line \d+, \S/u);
      expect(warning?.line).toBeGreaterThan(1);
    }
  });

  it('of every rule is shown above', () => {
    expect(new Set(cases.map(({ rule }) => rule))).toEqual(new Set(warningRows.map(({ rule }) => rule)));
  });

  it('is said once, however much is out of the ordinary', () => {
    const text = edited(
      harbour,
      ['wheelInertia: 5.2 kg·m²', 'wheelInertia: 120 kg·m²'],
      ['efficiency: 97 %', 'efficiency: 99.6 %'],
      cruise('rating: peak', 'laden: 1700 kg', 'trailer: { mass: 500 kg }'),
      ['cycle: hwfet, payload', 'cycle: hwfet, capSpeed: 80 km/h, payload'],
      ['{ atLeast: 130 km/h }', '{ atLeast: 150 km/h }'],
      ['discharge: 160 kW', 'discharge: 600 kW'],
      ['maximise: []', 'maximise: [trunk.lossLoad]'],
    );
    const sentences = said(text).map(({ path, sentence }) => `${path}: ${sentence}`);
    expect(sentences.length).toBe(10);
    expect(new Set(sentences).size).toBe(sentences.length);
  });
});
