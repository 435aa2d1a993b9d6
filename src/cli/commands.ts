/** Every command of layshaft, in the order of the help. */
import { chartsCommand } from './charts.ts';
import { checkCommand } from './check.ts';
import type { CommandRow } from './command.ts';
import { compareCommand } from './compare.ts';
import { cyclesCommand } from './cycles.ts';
import { newCommand } from './new.ts';
import { runCommand } from './run.ts';
import { schemaCommand } from './schema.ts';
import { sheetCommand } from './sheet.ts';

/** The table of commands. */
export const commands: readonly CommandRow[] = [
  newCommand,
  checkCommand,
  runCommand,
  sheetCommand,
  cyclesCommand,
  schemaCommand,
  chartsCommand,
  compareCommand,
];
