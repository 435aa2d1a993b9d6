/** A small study for the tests of a run: 3 × 7 × 5 drives of an invented quay shuttle. */
import { fileURLToPath } from 'node:url';
import { checkStudy } from '../../src/core/study/check-study.ts';
import type { Study } from '../../src/core/study/study.ts';
import type { RunOptions } from '../../src/run/run-study.ts';
import { studySources } from '../../src/run/study-files.ts';

/** Its text; `extra` replaces the requirements. */
export function smallStudyText(requirements = 'ramp.grade: { atLeast: 18 % }\n  sprint.time: { atMost: 9 s }'): string {
  return `title: Quay shuttle
about: A small question for the tests.
vehicle:
  kerbMass: 1400 kg
  dragArea: 0.8 m²
  rolling: { c0: 0.01 }
  wheelRadius: 0.3 m
  wheelInertia: 3 kg·m²
  axles: { driven: front }
motor:
  peakTorque: 180 N·m
  baseSpeed: 4000 rpm
  maxSpeed: 12000 rpm
  inertia: { perTorque: 1.4e-4 kg·m²/(N·m) }
  losses: { hysteresis: 1.5e-3, copper: 40 W/(N·m), fieldWeakening: 0.2, inverterFixed: 0.0015, inverterLinear: 0.015 }
gearing: { ratio: 9.1, efficiency: 97 % }
battery: { voltage: 360 V, resistance: 0.1 Ω, discharge: 100 kW, regenerative: 60 kW, usable: 40 kWh }
massAndCost: { cost: { currency: EUR, motor: { fixed: 150, perTorque: 2.5 /(N·m) } } }
trials:
  sprint: { kind: acceleration, from: 0 km/h, to: 60 km/h, payload: 300 kg }
  ramp: { kind: hill start, laden: 2000 kg }
  round: { kind: cycle, cycle: nycc, payload: 300 kg }
vary:
  motor.baseSpeed: { oneOf: [3300 rpm, 4000 rpm, 4700 rpm] }
  gearing.ratio: { from: 7, to: 13, steps: 7 }
  motor.peakTorque: { from: 140 N·m, to: 220 N·m, steps: 5 }
requirements:
  ${requirements}
tradeOff:
  minimise: [round.batteryEnergy, driveUnit.cost]
  keep: [ramp.grade, sprint.distance]
`;
}

/** The study of a text. Throws what is wrong with it. */
export function studyOf(text: string): Study {
  const checked = checkStudy(text, 'quay-shuttle.yaml', studySources('quay-shuttle.yaml'));
  if (!checked.ok) throw new Error(JSON.stringify(checked.issues, null, 1));
  return checked.study;
}

/** Options of a run of a text into a folder, with the built thread. */
export function runOptions(text: string, outFolder: string, workers: number): RunOptions {
  return {
    study: studyOf(text),
    studyFile: 'quay-shuttle.yaml',
    studyText: text,
    digests: [],
    warnings: [],
    outFolder,
    workers,
    version: '0.0.0',
    threadUrl: new URL('../../dist/thread.js', import.meta.url),
    renderReport: (data) => JSON.stringify(data),
  };
}

/** Path of the built thread, which `npm test` makes first. */
export const builtThread = fileURLToPath(new URL('../../dist/thread.js', import.meta.url));
