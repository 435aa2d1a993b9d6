/** `layshaft cycles`: the built-in cycles with their totals. */
import { fromSi, machineUnit, type Quantity } from '../core/units/units.ts';
import { type BuiltInCycle, builtInCycles } from '../run/built-in-cycles.ts';
import { type CommandRow, exitStatus, jsonOption } from './command.ts';
import { count } from './figure-text.ts';
import { columns } from './table.ts';
import { giveJson, ink, say } from './terminal.ts';

/** The row of `cycles`. */
export const cyclesCommand: CommandRow = {
  name: 'cycles',
  sentence: 'Lists the built-in cycles with totals and sources',
  about: ['A cycle trial takes one of these names, or a CSV file of your own with the columns time_s and speed_kmh or speed_mph: cycle: data/our-round.csv'],
  arguments: [],
  options: [jsonOption('layshaft cycles --json', 'one entry per cycle, keys with their units')],
  example: 'layshaft cycles',
  act: async (_operands, options) => {
    const cycles = builtInCycles();
    if (options['json'] === true) giveJson({ cycles: cycles.map(cycleJson) });
    else say(cyclesText(cycles));
    return exitStatus.done;
  },
};

function cycleJson({ name, durationS, distanceM, topSpeedMPerS, meanSpeedMPerS, notes }: BuiltInCycle): Record<string, unknown> {
  return {
    name,
    duration_s: durationS,
    distance_m: distanceM,
    topSpeed_kmh: written(topSpeedMPerS, 'speed'),
    meanSpeed_kmh: written(meanSpeedMPerS, 'speed'),
    source: notes[0] ?? '',
    notes: notes.slice(1),
  };
}

function cyclesText(cycles: readonly BuiltInCycle[]): string {
  const rows = cycles.map(({ name, durationS, distanceM, topSpeedMPerS, meanSpeedMPerS, notes }) => [
    name,
    `${count(durationS)} s`,
    `${written(distanceM, 'range').toFixed(2)} km`,
    `${written(topSpeedMPerS, 'speed').toFixed(1)} km/h`,
    `${written(meanSpeedMPerS, 'speed').toFixed(1)} km/h`,
    notes[0] ?? '',
  ]);
  const head = ['cycle', 'duration', 'distance', 'top speed', 'mean speed', 'source'].map((title) => ink('bold', title));
  return columns([head, ...rows], { align: ['left', 'right', 'right', 'right', 'right', 'left'] });
}

function written(si: number, quantity: Quantity): number {
  return fromSi(si, machineUnit(quantity));
}
