/** What limits a full-pedal trial where it begins and ends, against plain arithmetic. */
import { describe, expect, it } from 'vitest';
import { createPedalProbe, type PedalLimits } from '../../../src/core/evaluate/pedal-limits.ts';
import { edited, studyOf } from '../study/study-from-disk.ts';

const G = 9.80665;
/** A lossless study: every force and power by hand. Drive force at rest 200 · 10 / 0.3 = 6667 N up to 400 rad/s, 12 m/s; then 80 kW. */
const plain = `title: Plain
vehicle:
  kerbMass: 1500 kg
  dragArea: 0 m²
  rolling: { c0: 0 }
  wheelRadius: 0.3 m
  axles: { driven: all, frontShare: 50 %, centreHeight: 0 m, wheelbase: 2.5 m, adhesion: 1 }
motor: { peakTorque: 200 N·m, baseSpeed: 400 rad/s, maxSpeed: 1200 rad/s, losses: { hysteresis: 0 } }
gearing: { ratio: 10, efficiency: 100 % }
battery: { voltage: 400 V, resistance: 0 Ω, discharge: 90 kW, regenerative: 90 kW, usable: 50 kWh }
trials:
  sprint: { kind: acceleration, from: 0 km/h, to: 100 km/h }
  ramp: { kind: hill start }
  rolling: { kind: acceleration, from: 10 km/h, to: 30 km/h }
  quarter: { kind: standing distance, distance: 400 m }
`;

/** Limits of every full-pedal trial of the study's own figures, or of other inputs. */
function limits(text: string, inputs: readonly number[] = [], endSpeedMPerS = Number.NaN): Record<string, PedalLimits> {
  const probe = createPedalProbe(studyOf(text));
  return Object.fromEntries(probe.trials.map(({ name }, index) => [name, probe.limitsOf(index, Float64Array.from(inputs), endSpeedMPerS)]));
}

describe('the limits of a full-pedal trial', () => {
  it('are looked at for accelerations and standing distances, a start from rest alone', () => {
    const found = limits(plain, [], 20);
    expect(Object.keys(found)).toEqual(['sprint', 'rolling', 'quarter']);
    expect(found['sprint']).toEqual({ start: 'motor torque', end: 'motor power' });
    expect(found['rolling']).toEqual({ start: null, end: 'motor torque' });
    expect(found['quarter']).toEqual({ start: 'motor torque', end: 'motor power' });
  });

  it('change to grip where weight times adhesion falls below the drive force', () => {
    const enough = 6666.7 / (1500 * G);
    const start = (adhesion: number) => limits(edited(plain, ['adhesion: 1 ', `adhesion: ${adhesion} `]))['sprint']?.start;
    expect(start(enough * 1.0001)).toBe('motor torque');
    expect(start(enough * 0.9999)).toBe('adhesion');
  });

  it('change to the battery where peak power exceeds what it gives', () => {
    const end = (power: string) => limits(edited(plain, ['discharge: 90 kW', `discharge: ${power}`]))['sprint']?.end;
    expect(end('80.01 kW')).toBe('motor power');
    expect(end('79.99 kW')).toBe('battery power');
  });

  it('hold for what a design and the trial itself set', () => {
    const varied = `${plain}vary:\n  motor.peakTorque: { oneOf: [200 N·m, 250 N·m] }\n`;
    expect(limits(varied, [200])['sprint']?.end).toBe('motor power');
    expect(limits(varied, [250])['sprint']?.end).toBe('battery power');
    const slippery = edited(plain, ['to: 100 km/h }', 'to: 100 km/h, with: { vehicle.axles.adhesion: 0.3 } }']);
    expect(limits(slippery)['sprint']?.start).toBe('adhesion');
    expect(limits(slippery, [], 20)['quarter']?.start).toBe('motor torque');
  });

  it('are those of the gear in use', () => {
    const two = edited(plain, ['ratio: 10', 'ratios: [10, 5]'], ['efficiency: 100 %', 'efficiency: 100 %, shiftTime: 0 s'], ['to: 30 km/h', 'to: 150 km/h']);
    // 150 km/h is 1389 rad/s in the lower gear, beyond its maximum, and 694 rad/s in the higher.
    expect(limits(two)['rolling']?.end).toBe('motor power');
    expect(limits(two)['sprint']?.start).toBe('motor torque');
  });

  it('do not exist without the design or the speed', () => {
    expect(limits(plain)['quarter']).toEqual({ start: 'motor torque', end: null });
    const heavy = edited(plain, ['from: 0 km/h, to: 100 km/h', 'from: 0 km/h, to: 100 km/h, laden: 1400 kg']);
    expect(limits(heavy)['sprint']).toEqual({ start: null, end: null });
  });
});
