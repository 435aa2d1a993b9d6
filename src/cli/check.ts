/** `layshaft check`: everything wrong with a study, or what a run of it would do. */

import { checkText } from './check-text.ts';
import { type CheckedStudy, checkJson, checkStudyFile } from './checked-study.ts';
import { type CommandRow, type ExitStatus, exitStatus, jsonOption, type OptionValues } from './command.ts';
import { sayWrong } from './open-study.ts';
import { giveJson, say } from './terminal.ts';

/** The row of `check`. */
export const checkCommand: CommandRow = {
  name: 'check',
  sentence: 'Says what is wrong with it, or what a run would do',
  about: [
    'Every mistake with its place, what was expected, what was found and what to do. For a study without mistakes: how many designs, which trials, how long a run takes here and how large its results get, which requirements remove nothing or everything, and what to keep an eye on, measured on a small sample.',
    'Nothing is written.',
  ],
  arguments: [{ name: 'STUDY', sentence: 'A study file', many: true }],
  options: [jsonOption('layshaft check my-van.yaml --json', 'one entry per study, with its issues or its outlook')],
  example: 'layshaft check my-van.yaml',
  act: checkAll,
};

async function checkAll(files: readonly string[], options: OptionValues): Promise<ExitStatus> {
  const checked: CheckedStudy[] = [];
  for (const file of files) {
    const one = await checkStudyFile(file);
    checked.push(one);
    if (!('outlook' in one)) sayWrong(one.opened);
    else if (options['json'] !== true) say(`${checkText(one)}\n`);
  }
  if (options['json'] === true) giveJson({ studies: checked.map(checkJson) });
  return checked.every(({ opened }) => opened.ok) ? exitStatus.done : exitStatus.wrong;
}
