/** `layshaft new`: writes the commented starter study. */
import { writeFile } from 'node:fs/promises';
import { starterStudy } from '../core/study/starter.ts';
import { type CommandRow, type ExitStatus, exitStatus } from './command.ts';
import { complain, say, typed } from './terminal.ts';

/** The row of `new`. */
export const newCommand: CommandRow = {
  name: 'new',
  sentence: 'Writes a commented starter study',
  about: ['Writes a complete study of an invented van with a comment on every figure; replace its figures by yours. A file that exists is never overwritten.'],
  arguments: [{ name: 'FILE', sentence: 'The study file to write, for example my-van.yaml' }],
  options: [],
  example: 'layshaft new my-van.yaml',
  act: ([file]) => writeStarter(file as string),
};

async function writeStarter(file: string): Promise<ExitStatus> {
  try {
    await writeFile(file, starterStudy(), { flag: 'wx' });
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    const reason = code === undefined ? undefined : refusals[code];
    if (reason === undefined) throw error;
    complain(`${file} ${reason}`);
    return exitStatus.wrong;
  }
  say(`Wrote ${file}. Next: layshaft check ${typed(file)}`);
  return exitStatus.done;
}

const refusals: Readonly<Record<string, string>> = {
  EEXIST: 'exists already and is left as it is. Give another name.',
  ENOENT: 'lies in a folder that does not exist. Make the folder first, or give another name.',
  ENOTDIR: 'lies in something that is not a folder. Give another name.',
  EISDIR: 'is a folder. Give the name of a file.',
  EACCES: 'must not be written there. Give a place where you may write.',
};
