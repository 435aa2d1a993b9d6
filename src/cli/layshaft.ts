/** The command `layshaft`: arguments in, exit status out; a fault of the program says that it is one. */
import { exitStatus } from './command.ts';
import { commands } from './commands.ts';
import { runProgram } from './program.ts';
import { complain, ink, say, tolerateClosedStreams } from './terminal.ts';
import { version } from './version.ts';

tolerateClosedStreams();
process.on('uncaughtException', (error) => {
  fail(error);
  process.exit();
});
try {
  process.exitCode = await runProgram(commands, process.argv.slice(2));
} catch (error) {
  fail(error);
}

/** A refusal of the system (disk full, no permission) is said in its words; anything else is a fault of layshaft. */
function fail(error: unknown): void {
  process.exitCode = exitStatus.failed;
  if (error instanceof Error && 'syscall' in error) {
    complain(`the system refused: ${error.message}`);
    return;
  }
  say(`${ink('red', 'This is a fault in layshaft')}, not in your study. Please report it with the command and the lines below.`);
  say(`layshaft ${version}, Node ${process.version}, ${process.platform} ${process.arch}`);
  say(error instanceof Error ? (error.stack ?? error.message) : String(error));
}
