/**
 * 300 random drives of the worked parcel van, every trial against slow plain calculations: full pedal against time stepping with a
 * general-purpose ODE solver, grades and top speed against the balance of forces put back, cycles against a scalar loop.
 */
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';
import { createAssembler } from '../../src/core/evaluate/assemble.ts';
import { compileStudy } from '../../src/core/evaluate/compile.ts';
import { layOutFigures } from '../../src/core/evaluate/figures.ts';
import { hashNumber } from '../../src/core/numerics/hash.ts';
import { createSearch } from '../../src/core/search/search.ts';
import { checkStudy } from '../../src/core/study/check-study.ts';
import type { Trial } from '../../src/core/study/study.ts';
import { resistanceN, slopeOf } from '../../src/core/vehicle/road-load.ts';
import { tractiveForceN } from '../../src/core/vehicle/traction.ts';
import type { Vehicle } from '../../src/core/vehicle/vehicle.ts';
import { studySources } from '../../src/run/study-files.ts';
import { oracleCycle } from '../core/trials/cycle-oracle.ts';
import { oracleDrive } from '../core/trials/pedal-oracle.ts';
import { compare } from '../reference-table.ts';

const path = fileURLToPath(new URL('../../studies/harbour-parcel-van.yaml', import.meta.url));
const level = slopeOf(0);

function parcelVan() {
  const checked = checkStudy(readFileSync(path, 'utf8'), path, studySources(path));
  if (!checked.ok) throw new Error(JSON.stringify(checked.issues));
  return checked.study;
}

/** What a trial's figure is and what the oracle makes of it; the expected one NaN where the oracle finds none either. */
type Oracle = (trial: Trial, vehicle: Vehicle, number: (key: string) => number) => Record<string, number>;

const oracles: Partial<Record<Trial['kind'], Oracle>> = {
  acceleration: (_, vehicle, number) => {
    const start = { timeS: 0, speedMPerS: number('from'), distanceM: 0 };
    const end = oracleDrive(vehicle, { slope: level, rating: 'peak' }, start, ({ speedMPerS }) => speedMPerS >= number('to'));
    return { time: end?.timeS ?? Number.NaN, distance: end?.distanceM ?? Number.NaN };
  },
  'standing distance': (_, vehicle, number) => {
    const end = oracleDrive(
      vehicle,
      { slope: level, rating: 'peak' },
      { timeS: 0, speedMPerS: 0, distanceM: 0 },
      ({ distanceM }) => distanceM >= number('distance'),
    );
    return { time: end?.timeS ?? Number.NaN, endSpeed: end?.speedMPerS ?? Number.NaN };
  },
  cycle: (trial, vehicle) => {
    const { batteryEnergyJPerM, offTrace } = oracleCycle(vehicle, trial.trace!, { grade: 0, road: null, capSpeedMPerS: Number.NaN });
    return { batteryEnergy: batteryEnergyJPerM, offTrace };
  },
};

test('300 random designs of the parcel van agree with slow plain calculations in every trial', () => {
  const study = parcelVan();
  const evaluator = compileStudy(study);
  const search = createSearch(study);
  const { cells, figures } = layOutFigures(study.values, evaluator.inputs);
  const assembler = createAssembler(study, cells);
  const inputs = new Float64Array(evaluator.inputs.length);
  const metrics = new Float64Array(evaluator.metrics.length);
  const worst = new Map<string, { expected: number; got: number; off: number; design: number }>();

  for (let k = 0; k < 300; k++) {
    const design = 1 + (hashNumber(k) % search.count);
    search.inputs(design, inputs, 0);
    evaluator.evaluate(inputs, 0, metrics, 0);
    for (const trial of study.trials) {
      const own = Float64Array.from(figures);
      evaluator.inputs.forEach((name, at) => {
        own[cells.cell(name)] = inputs[at];
      });
      for (const [name, value] of Object.entries(trial.with)) own[cells.cell(name)] = value;
      assembler.fillDrive(own);
      assembler.fillLoad(own, trial.name);
      const figureOf = (name: string) => metrics[evaluator.metrics.findIndex((column) => column.trial === trial.name && column.row.name === name)];
      const expected = oracles[trial.kind]?.(trial, assembler.vehicle, (key) => own[cells.cell(`trials.${trial.name}.${key}`)]) ?? {};
      for (const [name, value] of Object.entries(expected)) note(`${trial.name}: ${name}`, design, value, figureOf(name));
      checkBalance(trial, assembler.vehicle, figureOf, (key) => own[cells.cell(`trials.${trial.name}.${key}`)]);
    }
  }
  expect(worst.size).toBe(2 + 2 + 2 + 3 * 2);
  for (const [check, { expected, got, design, off }] of worst) {
    const cycle = check.includes('batteryEnergy') || check.includes('offTrace');
    const source = cycle ? 'scalar loop over the trace' : 'time stepping with odex';
    compare({
      check: `parcel van, worst of 300 designs (${design}), ${check}`,
      source,
      expected,
      got,
      within: cycle ? 1e-9 : 1e-6,
      scale: off === 0 ? 1 : Math.abs(expected),
    });
  }

  function note(name: string, design: number, expected: number, got: number): void {
    expect(Number.isNaN(got), `${name} of design ${design}`).toBe(Number.isNaN(expected));
    if (Number.isNaN(expected)) return;
    const off = expected === got ? 0 : Math.abs(got - expected) / Math.abs(expected);
    if (off >= (worst.get(name)?.off ?? 0)) worst.set(name, { expected, got, off, design });
  }
});

/** A grade put back as a slope, and a top speed put back as a speed, leave no force to spare and none missing. */
function checkBalance(trial: Trial, vehicle: Vehicle, figureOf: (name: string) => number, number: (key: string) => number): void {
  const spareN = (speedMPerS: number, grade: number, rating: 'peak' | 'continuous' | 'standstill', accelerationMPerS2: number) =>
    tractiveForceN(vehicle, 0, speedMPerS, rating, slopeOf(grade)) -
    resistanceN(vehicle.road, speedMPerS, slopeOf(grade)) -
    vehicle.effectiveMassKg[0] * accelerationMPerS2;
  if (trial.kind === 'hill start')
    expect(Math.abs(spareN(0, figureOf('grade'), 'standstill', number('startAcceleration')))).toBeLessThan(1e-6 * vehicle.road.weightN);
  if (trial.kind === 'gradeability' && !Number.isNaN(figureOf('grade')))
    expect(Math.abs(spareN(number('at'), figureOf('grade'), 'continuous', 0))).toBeLessThan(1e-6 * vehicle.road.weightN);
  if (trial.kind === 'top speed') {
    const speed = figureOf('speed');
    expect(spareN(speed * (1 - 1e-9), 0, 'continuous', 0)).toBeGreaterThan(0);
    const top = (vehicle.motor.maxSpeedRadPerS * vehicle.wheelRadiusM) / vehicle.gearing.ratios[0];
    if (speed < top * (1 - 1e-12)) expect(spareN(speed * (1 + 1e-9), 0, 'continuous', 0)).toBeLessThan(0);
  }
}
