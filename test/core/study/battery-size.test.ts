/** A battery whose size varies: mass, cost and resistance follow it where the study says so. */
import { describe, expect, it } from 'vitest';
import { compileStudy } from '../../../src/core/evaluate/compile.ts';
import { createBench, machineSheet } from '../../../src/core/search/design-bench.ts';
import { metricsOf, still } from './options.ts';
import { complaint, edited, studyOf } from './study-from-disk.ts';

/** The example with cells in parallel: resistance per energy, battery mass and cost, laden trials left to the payload. */
function pack(usable: string, extra = ''): string {
  const text = edited(
    still,
    ['resistance: 0.09 Ω', 'resistance: { perEnergy: 5.2 Ω·kWh }'],
    ['usable: 58 kWh', `usable: ${usable}`],
    ['  mass: { motor:', '  mass: { battery: { perEnergy: 6.5 kg/kWh }, motor:'],
    ['  cost: { currency: EUR,', '  cost: { currency: EUR, battery: { perEnergy: 110 /kWh },'],
  );
  return text + extra;
}

describe('a battery size that varies', () => {
  const study = studyOf(pack('58 kWh', 'vary: { battery.usable: { oneOf: [40 kWh, 80 kWh] } }\n'));
  const bench = createBench(study);
  const sheet = (number: number) => machineSheet(bench.compute(number)!).metrics as Record<string, number>;

  it('makes of each size the study that one writes by hand', () => {
    const byHand = ['58 kWh', '40 kWh', '80 kWh'].map((usable) => metricsOf(studyOf(pack(usable)))[0]);
    expect(metricsOf(study)).toEqual(byHand);
  });

  it('carries its mass and pays its price, in proportion to the usable energy', () => {
    expect(sheet(1)['battery.mass_kg']).toBeCloseTo(260, 9);
    expect(sheet(2)['battery.mass_kg']! - sheet(1)['battery.mass_kg']!).toBeCloseTo(260, 9);
    expect(sheet(2)['vehicle.mass_kg']! - sheet(1)['vehicle.mass_kg']!).toBeCloseTo(260, 9);
    expect(sheet(2)['battery.cost']).toBeCloseTo(8800, 9);
    expect(sheet(1)['sprint.payload_kg']! - sheet(2)['sprint.payload_kg']!).toBeCloseTo(260, 9);
  });

  it('has the resistance of its size: the same as a study that states it in ohms', () => {
    const ohms = (usable: string, resistance: string) => edited(pack(usable), ['{ perEnergy: 5.2 Ω·kWh }', resistance]);
    const [, small, large] = metricsOf(study) as [number[], number[], number[]];
    for (const [metrics, text] of [
      [small, ohms('40 kWh', '0.13 Ω')],
      [large, ohms('80 kWh', '0.065 Ω')],
    ] as const) {
      const stated = metricsOf(studyOf(text))[0] as number[];
      expect(metrics).toEqual(stated.map((value) => (Number.isNaN(value) ? value : expect.closeTo(value, 9))));
    }
    const lost = compileStudy(study).metrics.findIndex(({ name }) => name === 'stops.energy.battery');
    expect(small[lost]!).toBeGreaterThan(1.5 * large[lost]!);
  });

  it('may vary beside mass and cost that vary themselves', () => {
    const both = studyOf(pack('58 kWh', 'vary: { massAndCost.mass.battery.perEnergy: { oneOf: [5 kg/kWh, 8 kg/kWh] } }\n'));
    const mass = compileStudy(both).metrics.findIndex(({ name }) => name === 'battery.mass');
    expect(metricsOf(both).map((metrics) => metrics[mass])).toEqual([377, 290, 464].map((kg) => expect.closeTo(kg, 9)));
  });
});

describe('a resistance per energy', () => {
  it('is refused beside a resistance in ohms, naming both', () => {
    const twice = complaint(edited(still, ['resistance: 0.09 Ω', 'resistance: 0.09 Ω, resistance: { perEnergy: 5.2 Ω·kWh }']));
    expect(twice).toContain('each name once');
    expect(twice.match(/error in/gu)).toHaveLength(1);
    const trial = edited(pack('58 kWh'), ['cruise: { kind: top speed,', 'cruise: { kind: top speed, with: { battery.resistance: 0.1 Ω },']);
    expect(complaint(trial)).toContain('battery.resistance.perEnergy or battery.resistance, not both');
  });

  it('needs the usable energy', () => {
    expect(complaint(edited(pack('58 kWh'), ['usable: 58 kWh, ', '']))).toContain('battery.usable');
  });

  it('leaves no figure of the resistance itself to vary', () => {
    expect(complaint(pack('58 kWh', 'vary: { battery.resistance: { oneOf: [0.1 Ω, 0.2 Ω] } }\n'))).toContain(
      'plays no part beside battery.resistance.perEnergy',
    );
  });
});
