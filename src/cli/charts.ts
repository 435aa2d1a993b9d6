/** `layshaft charts`: announced, not available yet. */
import type { CommandRow } from './command.ts';
import { answerNotYet } from './not-yet.ts';

const instead = 'Use the charts folder that every run writes; layshaft run STUDY draws them anew.';

/** The row of `charts`. */
export const chartsCommand: CommandRow = {
  name: 'charts',
  sentence: 'Redraws the charts of a run from its stored results',
  about: [],
  arguments: [{ name: 'RUN', sentence: 'A run folder' }],
  options: [],
  example: 'layshaft charts out/my-van',
  instead,
  act: () => answerNotYet('charts', instead),
};
