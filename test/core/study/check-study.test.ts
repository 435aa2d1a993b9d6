/** A right study becomes SI numbers by dotted name, trials, axes, requirements and objectives. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { metricColumns } from '../../../src/core/study/catalogue/metric-columns.ts';
import { checkStudy, whatRunNeeds } from '../../../src/core/study/check-study.ts';
import { formatIssues } from '../../../src/core/study/text/issue.ts';
import { complaint, edited, harbour, sourcesWith, studyOf, warningsOf } from './study-from-disk.ts';

const cases = new URL('../../data/cases/', import.meta.url);
const vary = /vary:[\s\S]*?(?=search:)/u.exec(harbour)?.[0] as string;
const withoutVary = edited(harbour, [vary, '']);
const rpm = (2 * Math.PI) / 60;

describe('the harbour parcel van', () => {
  const study = studyOf(harbour);

  it('has its figures in SI by dotted name', () => {
    expect(study.values).toMatchObject({
      'vehicle.kerbMass': 1780,
      'vehicle.dragArea': 1.12,
      'vehicle.rolling.c1': 2.1e-6,
      'vehicle.axles.frontShare': 0.57,
      'vehicle.regeneration.share': 0.7,
      'motor.peakTorque': 270,
      'motor.inertia.perTorque': 1.5e-4,
      'gearing.efficiency': 0.97,
      'battery.usable': 58 * 3.6e6,
      'massAndCost.mass.inverter.perPower': 0.06 / 1000,
      'air.temperature': 293.15,
      'trials.sprint.laden': 2800,
      'trials.stops.payload': 400,
      'trials.ramp.startAcceleration': 0.3,
    });
    expect(study.values['motor.baseSpeed']).toBeCloseTo(4300 * rpm, 10);
    expect(study).toMatchObject({
      title: 'Harbour parcel van',
      driven: 'front',
      tyre: '215/65 R16',
      currency: 'EUR',
      search: { method: 'grid' },
      report: { units: 'SI' },
    });
  });

  it('has the wheel radius of its tyre: 3.05 diameters around', () => {
    const diameter = 16 * 0.0254 + 2 * 0.215 * 0.65;
    expect(study.values['vehicle.wheelRadius']).toBeCloseTo((3.05 * diameter) / (2 * Math.PI), 12);
  });

  it('has its trials in the order of the file, with what they replace for themselves', () => {
    expect(study.trials.map(({ name, kind, rating }) => [name, kind, rating])).toEqual([
      ['sprint', 'acceleration', 'peak'],
      ['overtake', 'acceleration', 'peak'],
      ['from rest 400 m', 'standing distance', 'peak'],
      ['ramp', 'hill start', 'peak'],
      ['wet ramp', 'hill start', 'peak'],
      ['climb', 'gradeability', 'continuous'],
      ['cruise', 'top speed', 'continuous'],
      ['stops', 'cycle', 'peak'],
      ['trunk', 'cycle', 'peak'],
      ['winter', 'cycle', 'peak'],
    ]);
    expect(study.trials[9]?.with).toEqual({ 'vehicle.auxiliaries': 2500, 'air.temperature': 273.15 - 7 });
    expect(study.trials[8]?.trace?.timesS).toHaveLength(766);
  });

  it('has an axis for every varied number: 12 480 designs', () => {
    expect(study.axes.map(({ name, points }) => [name, points.length])).toEqual([
      ['gearing.ratio', 20],
      ['motor.peakTorque', 16],
      ['motor.baseSpeed', 13],
      ['vehicle.dragArea', 3],
    ]);
    expect(study.axes[0]?.range).toEqual({ from: 7.5, to: 12.25, stepped: true });
    expect(study.axes[3]).toMatchObject({ points: [[1.05], [1.12], [1.24]], range: null, labels: null });
  });

  it('has its requirements, and one for every cycle that it be followed', () => {
    expect(study.requirements).toContainEqual({ metric: 'ramp.grade', bound: 'atLeast', limit: 0.2, implied: false });
    expect(study.requirements.filter(({ implied }) => implied)).toEqual(
      ['stops', 'trunk', 'winter'].map((name) => ({ metric: `${name}.offTrace`, bound: 'atMost', limit: 0, implied: true })),
    );
  });

  it('has its objectives in the order of the file', () => {
    expect(study.objectives).toEqual([
      { metric: 'stops.batteryEnergy', aim: 'minimise', resolution: 7.2 },
      { metric: 'trunk.batteryEnergy', aim: 'minimise', resolution: 3.6 },
      { metric: 'driveUnit.cost', aim: 'minimise', resolution: 25 },
    ]);
    expect(whatRunNeeds(study)).toBeNull();
  });

  it('is warned that nothing prices its drag area, and of nothing else', () => {
    expect(warningsOf(harbour).match(/: warning in .*/gu)).toEqual([': warning in vary.vehicle.dragArea']);
  });

  it('lists its metrics: trials in the order of the file, then the whole design', () => {
    const names = metricColumns(study).map(({ key }) => key);
    expect(names.slice(0, 3)).toEqual(['sprint.payload_kg', 'sprint.time_s', 'sprint.distance_m']);
    expect(names.at(-1)).toBe('vehicle.massFactor');
    expect(new Set(names).size).toBe(names.length);
    expect(names).toContain('winter.energy.brakes_Wh_per_km');
  });
});

describe('a study', () => {
  it.each(readdirSync(cases).filter((name) => name.endsWith('.yaml')))('%s is accepted as it stands', (name) => {
    const sources = { ...sourcesWith(), file: (path: string) => ({ text: readFileSync(new URL(path, cases), 'utf8') }) };
    const read = checkStudy(readFileSync(new URL(name, cases), 'utf8'), name, sources);
    expect(read.ok ? '' : formatIssues(read.issues)).toBe('');
  });

  it('is complete for a sheet without vary, search, requirements and tradeOff, and says what a run would need', () => {
    const bare = studyOf(edited(harbour.slice(0, harbour.indexOf('requirements:')), [vary, ''], ['search: { method: grid }', '']));
    expect(bare).toMatchObject({ axes: [], objectives: [], keep: [] });
    expect(whatRunNeeds(bare)?.expected).toContain('vary');
    expect(whatRunNeeds({ axes: studyOf(harbour).axes, objectives: [] })?.expected).toContain('tradeOff');
  });

  it('may have objectives although nothing varies', () => {
    expect(studyOf(withoutVary).objectives).toHaveLength(3);
  });

  it('takes its name from the file where it has no title', () => {
    expect(studyOf(edited(harbour, ['title: Harbour parcel van\n', ''])).title).toBe('study');
  });

  it('recovers by default what its driven axle may take', () => {
    const section = '  regeneration: { share: 70 %, from: 5 km/h, full: 15 km/h }';
    for (const [driven, share] of [
      ['front', 0.7],
      ['rear', 0.5],
      ['all', 1],
    ] as const) {
      expect(studyOf(edited(harbour, [section, ''], ['driven: front', `driven: ${driven}`])).values['vehicle.regeneration.share']).toBe(share);
    }
  });

  it('does without a battery: then no limit and no resistance stands', () => {
    const line = /battery: \{ voltage.*\n/u.exec(harbour)?.[0] as string;
    expect(Object.keys(studyOf(edited(harbour, [line, ''])).values).filter((name) => name.startsWith('battery.'))).toEqual([]);
    expect(complaint(edited(harbour, ['voltage: 390 V, ', '']))).toContain('Add voltage under battery');
  });

  it('limits the off-trace share itself where it says so', () => {
    const { requirements } = studyOf(edited(harbour, ['cruise.speed: ', 'trunk.offTrace: { atMost: 2 % }\n  cruise.speed: ']));
    expect(requirements.filter(({ metric }) => metric === 'trunk.offTrace')).toEqual([
      { metric: 'trunk.offTrace', bound: 'atMost', limit: 0.02, implied: false },
    ]);
  });

  it('has two ratios with one efficiency or one for each', () => {
    const two = edited(withoutVary, ['ratio: 9.5 ', 'ratios: [11.2, 6.4]\n  shiftTime: 250 ms ']);
    expect(studyOf(two).values).toMatchObject({ 'gearing.ratios.1': 11.2, 'gearing.ratios.2': 6.4, 'gearing.shiftTime': 0.25, 'gearing.efficiency': 0.97 });
    const apart = studyOf(edited(two, ['efficiency: 97 %', 'efficiency: [97 %, 98 %]'])).values;
    expect(apart).toMatchObject({ 'gearing.efficiency.1': 0.97, 'gearing.efficiency.2': 0.98 });
    expect(apart['gearing.efficiency']).toBeUndefined();
  });

  it('takes coast-down coefficients in the units of both sides of the Atlantic', () => {
    const coast = edited(
      withoutVary,
      [
        '  dragArea: 1.12 m²            # drag coefficient times frontal area\n',
        '  coastDown: { f0: 40 lbf, f1: 0.1 lbf/mph, f2: 0.02 lbf/mph^2, at: 4200 lb }\n',
      ],
      ['  rolling: { c0: 0.0098, c1: 2.1e-6 s²/m² }      # or  coastDown: { f0: …, f1: …, f2: …, at: 1900 kg }\n', ''],
    );
    const { values } = studyOf(coast);
    expect(values['vehicle.coastDown.f0']).toBeCloseTo(40 * 4.4482216152605, 9);
    expect(values['vehicle.coastDown.f2']).toBeCloseTo((0.02 * 4.4482216152605) / 0.44704 ** 2, 9);
    expect(values['vehicle.rolling.c1']).toBeUndefined();
    expect(warningsOf(coast)).toContain('drag torque beside coast-down coefficients');
    expect(warningsOf(coast)).toContain('warning in air.temperature');
  });

  it('reads a full-load curve, whose motor becomes the reference design, and lets the search scale it', () => {
    const lines = ['  peakTorque: 270 N·m\n', '  baseSpeed: 4300 rpm\n', / {2}maxSpeed: .*\n/u.exec(harbour)?.[0] as string];
    const [first, ...others] = lines as [string, string, string];
    const text = edited(harbour, [first, '  fullLoad: { file: c.csv, baseSpeed: 4000 rpm }\n'], ...others.map((line): [string, string] => [line, '']));
    const study = studyOf(text, { 'c.csv': '# measured\nspeed_rpm,torque_Nm\n0,280\n4000,270\n12000,90\n' });
    expect(study.values['motor.peakTorque']).toBe(280);
    expect(study.values['motor.baseSpeed']).toBeCloseTo(4000 * rpm, 10);
    expect(study.values['motor.maxSpeed']).toBeUndefined();
    expect(study.fullLoad?.torquesNm).toEqual([280, 270, 90]);
    expect(study.axes.map(({ name }) => name)).toContain('motor.peakTorque');
  });

  it('gives a map the motor of the study before anything is varied, unless the map states its own', () => {
    const losses = / {2}losses: \{.*\n/u.exec(harbour)?.[0] as string;
    const csv = 'speed_rpm,torque_Nm,loss_kW\n0,0,0.1\n0,300,2\n13000,0,1\n13000,300,9\n';
    const plain = studyOf(edited(harbour, [losses, '  map: m.csv\n']), { 'm.csv': csv }).lossMap;
    expect(plain).toMatchObject({ motorAlone: false, motoringOnly: true, referencePeakTorqueNm: 270, lossesW: [100, 2000, 1000, 9000] });
    const stated = edited(harbour, [
      losses,
      '  map: { file: m.csv, covers: motor, peakTorque: 300 N·m }\n  losses: { inverterFixed: 0.001, inverterLinear: 0.02 }\n',
    ]);
    expect(studyOf(stated, { 'm.csv': csv }).lossMap).toMatchObject({ motorAlone: true, referencePeakTorqueNm: 300 });
    expect(warningsOf(edited(harbour, [losses, '  map: m.csv\n']), { 'm.csv': csv })).toContain('taken as those of motor and inverter together');
    expect(warningsOf(edited(harbour, [losses, '  map: m.csv\n']), { 'm.csv': `# covers: motor and inverter\n${csv}` })).not.toContain('no word of it');
  });

  it('keeps the bits of its figures whatever else the file says', () => {
    const more = edited(harbour, ['kerbMass: 1780 kg', 'kerbMass: 1.78 t'], ['auxiliaries: 420 W', 'auxiliaries: 0.42 kW']);
    expect(studyOf(more).values).toEqual(studyOf(harbour).values);
  });

  it('reads the same with a byte order mark and with the line ends of another system', () => {
    expect(studyOf(`\ufeff${harbour.replaceAll('\n', '\r\n')}`)).toEqual(studyOf(harbour));
  });
});

describe('a trial that replaces numbers of the study', () => {
  const replace = (text: string) => complaint(edited(harbour, ['with: { vehicle.axles.frontShare: 44 % } }', `with: { ${text} } }`]));

  it('is checked like the study it makes', () => {
    expect(complaint(edited(withoutVary, ['with: { vehicle.axles.frontShare: 44 % } }', 'with: { motor.maxSpeed: 4000 rpm } }']))).toContain(
      'maxSpeed at least motor.baseSpeed',
    );
    expect(replace('gearing.efficiency: 130 %')).toContain('at most 100 %');
    expect(replace('vehicle.massFactor: 1.05')).toContain('vehicle.wheelInertia on line 8');
    expect(replace('trials.sprint.laden: 2000 kg')).toContain('in the trial itself');
    expect(replace('vehicle.tyre: 205/55 R16')).toContain('wheelRadius under vehicle');
    expect(replace('vehicle: { auxiliaries: 2 kW }')).toContain('vehicle.auxiliaries');
  });

  it('may bring the continuous limit that it is rated by', () => {
    const none = edited(harbour, ['  continuous: { torque: 52 %, power: 58 % }\n', ''], ['kind: top speed, laden', 'kind: top speed, rating: peak, laden']);
    expect(complaint(none)).toContain('trials.climb.rating');
    const own = edited(none, [
      'kind: gradeability, at: 80 km/h,',
      'kind: gradeability, at: 80 km/h, with: { motor.continuous.torque: 50 %, motor.continuous.power: 50 % },',
    ]);
    expect(complaint(own)).toBe('');
  });
});
