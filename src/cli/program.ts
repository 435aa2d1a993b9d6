/** The command line itself: commander set up from the table of commands, its mistakes turned into status 2. */
import { Command, CommanderError, InvalidArgumentError, Option } from 'commander';
import { type CommandRow, type ExitStatus, exitStatus, type OptionRow, type OptionValues } from './command.ts';
import { commandHelp, programHelp } from './help.ts';
import { give, ink, say } from './terminal.ts';
import { version } from './version.ts';

/** Reads the arguments (without node and script), does the command, and gives its exit status. Faults of the program are thrown. */
export async function runProgram(commands: readonly CommandRow[], args: readonly string[]): Promise<ExitStatus> {
  let status: ExitStatus = exitStatus.done;
  const program = new Command('layshaft');
  quietly(program, () => programHelp(commands)).version(version, '--version');
  for (const row of commands) {
    program.addCommand(
      commandOf(row, async (operands, options) => {
        status = await row.act(operands, options);
      }),
    );
  }
  if (args.length === 0) {
    say(programHelp(commands).trimEnd());
    return exitStatus.wrong;
  }
  try {
    await program.parseAsync([...args], { from: 'user' });
  } catch (error) {
    if (!(error instanceof CommanderError)) throw error;
    return error.exitCode === 0 ? exitStatus.done : exitStatus.wrong;
  }
  return status;
}

function commandOf(row: CommandRow, act: (operands: string[], options: OptionValues) => Promise<void>): Command {
  const command = quietly(new Command(row.name), () => commandHelp(row));
  if (row.instead !== undefined) command.allowUnknownOption().allowExcessArguments();
  for (const argument of row.arguments) {
    const name = argument.many ? `${argument.name}...` : argument.name;
    command.argument(row.instead === undefined ? `<${name}>` : `[${name}]`);
  }
  for (const option of row.options) command.addOption(commanderOption(option));
  return command.action(async () => act(command.args, command.opts<OptionValues>()));
}

function commanderOption(row: OptionRow): Option {
  const option = new Option(row.value === undefined ? `--${row.name}` : `--${row.name} <${row.value}>`);
  if (row.value === undefined) return option;
  return option.argParser((text: string, before: unknown) => {
    const value = readValue(row, text);
    return row.many ? [...((before as unknown[] | undefined) ?? []), value] : value;
  });
}

function readValue(row: OptionRow, text: string): unknown {
  try {
    return row.read === undefined ? text : row.read(text);
  } catch (error) {
    if (error instanceof RangeError) throw new InvalidArgumentError(error.message);
    throw error;
  }
}

/** Our own help text, errors to stderr with the way out, and no exit from within. */
function quietly(command: Command, help: () => string): Command {
  const path = command.name() === 'layshaft' ? 'layshaft' : `layshaft ${command.name()}`;
  return command
    .exitOverride()
    .helpOption('-h, --help')
    .helpCommand(command.name() === 'layshaft')
    .configureHelp({ formatHelp: help })
    .configureOutput({
      writeOut: give,
      writeErr: (text) => say(text.trimEnd()),
      outputError: (text, write) => write(`${ink('red', text.trimEnd())}\n${path} --help shows what is possible.`),
    });
}
