/** Studies with options for the tests: the example study without its search, lists of options, motor data. */
import { compileStudy } from '../../../src/core/evaluate/compile.ts';
import { createSearch } from '../../../src/core/search/search.ts';
import type { Study } from '../../../src/core/study/study.ts';
import { edited, harbour } from './study-from-disk.ts';

/** The example study up to its trials, which are few and quick here. */
export const still = `${harbour.slice(0, harbour.indexOf('\ntrials:'))}
trials:
  sprint: { kind: acceleration, from: 0 km/h, to: 80 km/h, laden: 2800 kg }
  ramp:   { kind: hill start, laden: 2800 kg }
  cruise: { kind: top speed, payload: 400 kg }
  stops:  { kind: cycle, cycle: nycc, payload: 400 kg }
`;

/** The example study with passages replaced and a section behind it. */
export function withSection(section: string, ...edits: readonly (readonly [from: string, to: string])[]): string {
  return `${edited(still, ...edits)}${section}`;
}

/** Every metric of every design of the search, the reference first; NaN where there is none. */
export function metricsOf(study: Study): number[][] {
  const evaluator = compileStudy(study);
  const search = createSearch(study);
  return Array.from({ length: search.count + 1 }, (_, number) => {
    const row = Float64Array.from(evaluator.reference);
    if (number > 0) search.inputs(number, row, 0);
    const metrics = new Float64Array(evaluator.metrics.length);
    evaluator.evaluate(row, 0, metrics, 0);
    return [...metrics];
  });
}

/** A measured curve of 300 N·m up to about 3800 rpm. */
export const curve = 'speed_rpm,torque_Nm\n0,300\n3800,300\n6000,190\n12000,80\n';

/** A measured map of a whole drive, in W. */
export const map = `# covers: motor and inverter
speed_rpm,torque_Nm,loss_W
0,0,40
0,150,900
0,300,3400
4000,0,350
4000,150,1500
4000,300,4600
14000,0,1500
14000,150,3600
14000,300,9800
`;

/** The same map as that of a motor alone. */
export const motorMap = map.replace('motor and inverter', 'motor');
