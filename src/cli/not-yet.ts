/** The answer of a command that is announced but not there yet. */
import { type ExitStatus, exitStatus } from './command.ts';
import { say } from './terminal.ts';

/** Says so, and what to use instead; status 2. */
export async function answerNotYet(name: string, instead: string): Promise<ExitStatus> {
  say(`layshaft ${name} is not available yet. ${instead}`);
  return exitStatus.wrong;
}
