/** What only results show is said once, with its place; what just keeps clear of it stays silent. */
import { describe, expect, it } from 'vitest';
import { createDesignEvaluator, studyColumns } from '../../src/core/search/evaluate-designs.ts';
import { checkStudy } from '../../src/core/study/check-study.ts';
import { type Issue, warningWords } from '../../src/core/study/text/issue.ts';
import { estimateRun } from '../../src/run/estimate-run.ts';
import { findingsOf } from '../../src/run/report-account.ts';
import { resultWarningRows, resultWarnings } from '../../src/run/result-warnings.ts';
import { RunAccount } from '../../src/run/run-account.ts';
import { studySources } from '../../src/run/study-files.ts';
import { edited } from '../core/study/study-from-disk.ts';
import { smallStudyText } from './small-study.ts';

const file = 'quay-shuttle.yaml';
const provenance = { version: '0.0.0', node: 'v20', started: '2026-01-01T00:00:00Z', seconds: 1, digests: [] };

/** A study that must be right, as a run is given it. */
function source(text: string) {
  const checked = checkStudy(text, file, studySources(file));
  if (!checked.ok) throw new Error(checked.issues.map(({ line, found, expected }) => `line ${line}: ${found}; ${expected}`).join('\n'));
  return { study: checked.study, studyFile: file, studyText: text, warnings: checked.warnings, provenance };
}

/** Every warning of the report of a run. */
function ofRun(text: string): readonly Issue[] {
  const given = source(text);
  const columns = studyColumns(given.study);
  const designs = createDesignEvaluator(given.study, columns);
  const account = new RunAccount(given.study, columns);
  const values = new Float64Array(designs.count * columns.length);
  for (let i = 0; i < designs.count; i++) designs.evaluate(i + 1, values, i, designs.count);
  account.add(
    1,
    designs.count,
    columns.map((_, k) => values.subarray(k * designs.count, (k + 1) * designs.count)),
  );
  return findingsOf(given, account, designs).report.warnings;
}

/** Every warning that the check tells. */
function ofCheck(text: string): Issue[] {
  const given = source(text);
  return [...given.warnings, ...resultWarnings(given, estimateRun(given.study, 1).seen)];
}

const told = (warnings: readonly Issue[]) =>
  warnings.map((warning) => ({ rule: warning.rule, path: warning.path, sentence: warningWords(warning).replaceAll('\u202f', ' ') }));

type Edit = readonly [from: string, to: string];

const AXLES = 'axles: { driven: front }';
const RAMP = 'ramp: { kind: hill start, laden: 2000 kg }';
const SPRINT = 'sprint: { kind: acceleration, from: 0 km/h, to: 60 km/h, payload: 300 kg }';
const RATIOS = 'gearing.ratio: { from: 7, to: 13, steps: 7 }';
const TORQUES = 'motor.peakTorque: { from: 140 N·m, to: 220 N·m, steps: 5 }';
const grip = (share: number) => `axles: { driven: front, frontShare: 55 %, centreHeight: 0.6 m, wheelbase: 2.7 m, adhesion: ${share} }`;
const only = (requirement: string): Edit => ['ramp.grade: { atLeast: 18 % }\n  sprint.time: { atMost: 9 s }', requirement];

/** Lists instead of ranges: a choice that ends where it ends. */
const calm = edited(
  smallStudyText(),
  [RATIOS, 'gearing.ratio: { oneOf: [7, 8, 9, 10, 11, 12, 13] }'],
  [TORQUES, 'motor.peakTorque: { oneOf: [140 N·m, 160 N·m, 180 N·m, 200 N·m, 220 N·m] }'],
);
const but = (...edits: readonly Edit[]) => edited(calm, ...edits);

/** A study that one rule speaks of, and one that just keeps clear of it. */
interface Case {
  readonly rule: string;
  readonly case: string;
  readonly text: string;
  readonly path: string;
  readonly says: string;
  readonly nearMiss: string;
}

const lessGrip = (trial: string, share: number): Edit => [trial, trial.replace(' }', `, with: { vehicle.axles.adhesion: ${share} } }`)];
const withClimb = (discharge: string): string =>
  but(
    ['discharge: 100 kW', `discharge: ${discharge}`],
    ['maxSpeed: 12000 rpm', 'maxSpeed: 12000 rpm\n  continuous: { torque: 80 %, power: 100 % }'],
    ['to: 60 km/h', 'to: 10 km/h'],
    [RAMP, `${RAMP}\n  climb: { kind: gradeability, at: 50 km/h, payload: 300 kg }`],
    only('ramp.grade: { atLeast: 18 % }'),
  );
const mile = (more: string) => but([RAMP, `${RAMP}\n  mile: { kind: standing distance, distance: ${more}, payload: 300 kg }`]);
const gapsInSprint = (requirements: string) =>
  but([SPRINT, 'sprint: { kind: acceleration, from: 0 km/h, to: 10 km/h, grade: 25 %, payload: 300 kg }'], only(requirements), [
    '[round.batteryEnergy, driveUnit.cost]',
    '[sprint.time, driveUnit.cost]',
  ]);

const drawn = (torques: string) =>
  edited(
    calm,
    ['motor.peakTorque: { oneOf: [140 N·m, 160 N·m, 180 N·m, 200 N·m, 220 N·m] }', torques],
    ['requirements:', 'search: { method: sobol, designs: 300 }\nrequirements:'],
  );

const cases: readonly Case[] = [
  {
    rule: 'grip at the start',
    case: 'a slippery ramp',
    text: but([AXLES, grip(1)], lessGrip(RAMP, 0.2), only('sprint.time: { atMost: 7 s }')),
    path: 'trials.ramp',
    says: 'grip, not the drive, limits the start in all 105 designs; expected a start that motor and ratio decide.',
    nearMiss: but([AXLES, grip(1)], lessGrip(RAMP, 0.5), only('sprint.time: { atMost: 7 s }')),
  },
  {
    rule: 'grip at the start',
    case: 'a sprint on ice',
    text: but([AXLES, grip(1)], lessGrip(SPRINT, 0.25), only('ramp.grade: { atLeast: 18 % }')),
    path: 'trials.sprint',
    says: 'does not help at low speed in this trial',
    nearMiss: but([AXLES, grip(1)], lessGrip(SPRINT, 0.25), ['from: 0 km/h', 'from: 1 km/h'], only('ramp.grade: { atLeast: 18 % }')),
  },
  {
    rule: 'battery limit',
    case: 'a pack too weak for the end of a sprint',
    text: but(['discharge: 100 kW', 'discharge: 70 kW']),
    path: 'battery.discharge',
    says: 'battery power, not the motor, limits 70 % of the designs at the end of sprint; expected a pack',
    nearMiss: but(['discharge: 100 kW', 'discharge: 80 kW']),
  },
  {
    rule: 'battery limit',
    case: 'a pack too weak for a grade',
    text: withClimb('55 kW'),
    path: 'battery.discharge',
    says: '% of the designs in climb',
    nearMiss: withClimb('75 kW'),
  },
  {
    rule: 'battery limit',
    case: 'a pack whose resistance clips a cycle',
    text: but(
      ['resistance: 0.1 Ω, discharge: 100 kW', 'resistance: 2 Ω'],
      ['to: 60 km/h', 'to: 10 km/h'],
      only('ramp.grade: { atLeast: 18 % }\n  round.offTrace: { atMost: 4.5 % }'),
    ),
    path: 'battery.resistance',
    says: '100 % of the designs in steps of round',
    nearMiss: but(['resistance: 0.1 Ω, discharge: 100 kW', 'resistance: 0.8 Ω'], ['to: 60 km/h', 'to: 10 km/h'], only('ramp.grade: { atLeast: 18 % }')),
  },
  {
    rule: 'long at peak',
    case: 'a mile at full pedal',
    text: mile('1609 m'),
    path: 'trials.mile',
    says: 'full pedal at peak rating for more than 30 s in 100 % of the designs that meet every requirement, up to 63 s; expected at most about 30 s at peak torque',
    nearMiss: mile('402 m'),
  },
  {
    rule: 'long at peak',
    case: 'a mile at full pedal, where nothing passes',
    text: edited(mile('1609 m'), only('ramp.grade: { atLeast: 44 % }\n  driveUnit.axleTorque: { atMost: 1500 N·m }')),
    path: 'trials.mile',
    says: 'for more than 30 s in 100 % of the designs, up to',
    nearMiss: edited(
      mile('1609 m'),
      ['distance: 1609 m', 'distance: 1609 m, rating: continuous'],
      ['maxSpeed: 12000 rpm', 'maxSpeed: 12000 rpm\n  continuous: { torque: 50 %, power: 50 % }'],
    ),
  },
  {
    rule: 'range edge',
    case: 'the cheapest design at the least torque',
    text: edited(smallStudyText(), [RATIOS, 'gearing.ratio: { oneOf: [7, 8, 9, 10, 11, 12, 13] }']),
    path: 'vary.motor.peakTorque',
    says: '140 N·m, the lowest searched, in the design put forward as least drive unit cost; expected the best designs inside the range.',
    nearMiss: edited(
      smallStudyText(),
      [RATIOS, 'gearing.ratio: { oneOf: [7, 8, 9, 10, 11, 12, 13] }'],
      [TORQUES, 'motor.peakTorque: { from: 100 N·m, to: 220 N·m, steps: 7 }'],
    ),
  },
  {
    rule: 'range edge',
    case: 'the cheapest design close to the least torque of a range drawn from',
    text: drawn(`motor.peakTorque: { from: 140 N·m, to: 220 N·m }`),
    path: 'vary.motor.peakTorque',
    says: 'less than 1 % of the range from 140 N·m, the lowest searched, in the design',
    nearMiss: drawn('motor.peakTorque: { from: 100 N·m, to: 220 N·m }'),
  },
  {
    rule: 'idle requirement',
    case: 'a sprint that every design manages',
    text: but(only('ramp.grade: { atLeast: 18 % }\n  sprint.time: { atMost: 10 s }')),
    path: 'requirements.sprint.time',
    says: 'time at most 10 s, met by all 105 designs; expected a requirement that tells designs apart. It removes nothing',
    nearMiss: but(only('ramp.grade: { atLeast: 18 % }\n  sprint.time: { atMost: 9.9 s }')),
  },
  {
    rule: 'requirement out of reach',
    case: 'a ramp too steep for all',
    text: but(only('ramp.grade: { atLeast: 53 % }')),
    path: 'requirements.ramp.grade',
    says: 'grade at least 53 %, missed by all 105 designs, the best with 52.2 %; expected a requirement that some design meets. It removes everything',
    nearMiss: but(only('ramp.grade: { atLeast: 52 % }')),
  },
  {
    rule: 'requirement out of reach',
    case: 'a cycle that no design follows',
    text: but(['cycle: nycc, payload: 300 kg', 'cycle: nycc, payload: 4000 kg'], only('ramp.grade: { atLeast: 18 % }')),
    path: 'trials.round',
    says: 'off-trace share at most 0 %, missed by all 105 designs, the best with',
    nearMiss: but(['cycle: nycc, payload: 300 kg', 'cycle: nycc, payload: 1000 kg'], only('ramp.grade: { atLeast: 18 % }')),
  },
  {
    rule: 'missing objective',
    case: 'a sprint uphill that some designs do not end',
    text: gapsInSprint('ramp.grade: { atLeast: 18 % }\n  round.offTrace: { atMost: 1 % }'),
    path: 'tradeOff',
    says: 'that meet every requirement but have no value for an objective',
    nearMiss: gapsInSprint('sprint.time: { atMost: 8 s }'),
  },
];

describe('a warning from results', () => {
  it.each(cases)('$rule: of $case, and of nothing else', ({ rule, text, path, says }) => {
    expect(told(ofRun(text))).toEqual([{ rule, path, sentence: expect.stringContaining(says) }]);
  });

  it.each(cases)('$rule: not of what just keeps clear of $case', ({ nearMiss }) => {
    expect(told(ofRun(nearMiss))).toEqual([]);
  });

  it('of every rule is shown above', () => {
    expect(new Set(cases.map(({ rule }) => rule))).toEqual(new Set(resultWarningRows.map(({ rule }) => rule)));
  });

  it('has its line in the study and says what to do', () => {
    for (const { text, path } of cases) {
      const [warning] = ofRun(text);
      expect(warning?.hint).toMatch(/\S\.$/u);
      const line = text.split('\n')[(warning?.line ?? 0) - 1] ?? '';
      const places: Record<string, string> = { 'battery.discharge': 'battery:', 'battery.resistance': 'battery:', tradeOff: 'tradeOff:' };
      expect(line.trim()).toContain(places[path] ?? `${path.slice(path.indexOf('.') + 1)}: {`);
    }
  });

  it('is the same from a check that looked at every design', () => {
    for (const { text, rule } of cases) expect({ rule, told: told(ofCheck(text)) }).toEqual({ rule, told: told(ofRun(text)) });
  });

  it('of a check that looked at a sample says so, and nothing of designs put forward', () => {
    const large = edited(smallStudyText('ramp.grade: { atLeast: 0.5 % }\n  sprint.time: { atMost: 1 s }'), [
      TORQUES,
      'motor.peakTorque: { from: 140 N·m, to: 220 N·m, steps: 80 }',
    ]);
    expect(told(ofCheck(large)).map(({ sentence }) => sentence)).toEqual([
      expect.stringContaining('grade at least 0.5 %, met by all 400 designs of a sample;'),
      expect.stringContaining('time at most 1 s, missed by all 400 designs of a sample, the best with 3.'),
    ]);
    expect(told(ofRun(large)).map(({ sentence }) => sentence)).toEqual([
      expect.stringContaining('grade at least 0.5 %, met by all 1680 designs;'),
      expect.stringContaining('time at most 1 s, missed by all 1680 designs, the best with 3.'),
    ]);
  });

  it('does not say again what the study alone gave cause to say', () => {
    const unpriced = but(['gearing.ratio: {', 'vehicle.dragArea: { from: 0.7 m², to: 0.9 m², steps: 3 }\n  gearing.ratio: {']);
    expect(told(ofRun(unpriced)).map(({ rule }) => rule)).toEqual(['unpriced circumstance']);
    const tooFast = but(['to: 60 km/h', 'to: 260 km/h'], ['sprint.time: { atMost: 9 s }', 'sprint.time: { atMost: 90 s }']);
    expect(told(ofRun(tooFast)).map(({ rule }) => rule)).toEqual(['motor speed']);
    const tooHeavy = but(['laden: 2000 kg', 'laden: 1000 kg']);
    expect(told(ofRun(tooHeavy)).map(({ rule }) => rule)).toEqual(['too heavy']);
  });

  it('of a study in which nothing varies is given where one design is enough to see it', () => {
    const text = mile('1609 m');
    const still = `${text.slice(0, text.indexOf('vary:'))}`;
    const given = source(still);
    const seen = { requirements: null, proposals: null };
    expect(told(resultWarnings(given, seen))).toEqual([
      { rule: 'long at peak', path: 'trials.mile', sentence: expect.stringContaining('full pedal at peak rating for more than 30 s, up to') },
    ]);
  });

  it('is said once, however much the results show', () => {
    const much = edited(
      smallStudyText('ramp.grade: { atLeast: 0.5 % }\n  sprint.time: { atMost: 40 s }'),
      [AXLES, grip(0.2)],
      ['discharge: 100 kW', 'discharge: 40 kW'],
      [RAMP, `${RAMP}\n  mile: { kind: standing distance, distance: 1609 m, payload: 300 kg }`],
      ['  gearing.ratio: {', '  vehicle.dragArea: { from: 0.7 m², to: 0.9 m², steps: 3 }\n  gearing.ratio: {'],
    );
    const sentences = told(ofRun(much)).map(({ path, sentence }) => `${path}: ${sentence}`);
    expect(new Set(told(ofRun(much)).map(({ rule }) => rule))).toEqual(
      new Set(['unpriced circumstance', 'grip at the start', 'battery limit', 'long at peak', 'range edge', 'idle requirement']),
    );
    expect(new Set(sentences).size).toBe(sentences.length);
  });
});
