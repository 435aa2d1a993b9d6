/** `layshaft compare`: announced, not available yet. */
import type { CommandRow } from './command.ts';
import { answerNotYet } from './not-yet.ts';

const instead = 'Use the front.csv of the two run folders side by side in a spreadsheet.';

/** The row of `compare`. */
export const compareCommand: CommandRow = {
  name: 'compare',
  sentence: "Lays two runs' fronts over each other",
  about: [],
  arguments: [
    { name: 'RUN', sentence: 'A run folder' },
    { name: 'OTHER', sentence: 'The run folder to lay over it' },
  ],
  options: [],
  example: 'layshaft compare out/my-van out/my-van-two-speed',
  instead,
  act: () => answerNotYet('compare', instead),
};
