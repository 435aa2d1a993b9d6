/** Help, made from the table of commands. */
import { cautionLine } from '../core/study/catalogue/cautions.ts';
import { type CommandRow, type OptionRow, statusSentences } from './command.ts';
import { columns } from './table.ts';

const width = 96;

/** The first screen: what layshaft does, how to start, which commands there are. */
export function programHelp(commands: readonly CommandRow[]): string {
  const ready = commands.filter((command) => command.instead === undefined);
  const later = commands.filter((command) => command.instead !== undefined);
  return paragraphs([
    'layshaft: from one study file to the trade-off front of motor and gearing choices.',
    wrapped(
      'A study file (YAML) states a vehicle, its electric drive, the trials it must pass, what may vary and what the design must meet. ' +
        'layshaft puts every design through the trials, drops those that miss a requirement, and shows which of the rest cannot be bettered.',
    ),
    section('Commands, in the order of first use', ready.map(commandLine)),
    section(
      'Not available yet',
      later.map((command) => [`layshaft ${command.name}`, command.sentence]),
    ),
    section('Options', [
      ['--help', 'This text; after a command, its arguments and options with an example of each'],
      ['--version', 'The version of layshaft'],
    ]),
    exitSection(),
    wrapped(cautionLine),
  ]);
}

/** The help of one command: usage, what it does, arguments, options with an example each. */
export function commandHelp(command: CommandRow): string {
  return paragraphs([
    `Usage: ${usage(command)}`,
    `${command.sentence}.`,
    ...(command.instead === undefined ? [] : [wrapped(`Not available yet. ${command.instead}`)]),
    ...command.about.map(wrapped),
    section(
      'Arguments',
      command.arguments.map((argument) => [argument.name + (argument.many ? '…' : ''), argument.sentence]),
    ),
    section('Options', [...command.options.map((option) => [flags(option), option.sentence]), ['--help', 'This text']]),
    examples(command),
    exitSection(),
  ]);
}

/** The usage line of a command. */
export function usage(command: CommandRow): string {
  const operands = command.arguments.map((argument) => argument.name + (argument.many ? '…' : ''));
  const options = command.options.map((option) => `[${flags(option)}]${option.many ? '…' : ''}`);
  return ['layshaft', command.name, ...operands, ...options].join(' ');
}

/** An option as it is typed: `--set NAME=VALUE`. */
export function flags(option: OptionRow): string {
  return option.value === undefined ? `--${option.name}` : `--${option.name} ${option.value}`;
}

function commandLine(command: CommandRow): string[] {
  return [command.example, command.sentence];
}

function examples(command: CommandRow): string {
  const lines = new Set([command.example, ...command.options.map((option) => option.example)]);
  return ['Examples', ...[...lines].map((line) => `  ${line}`)].join('\n');
}

function exitSection(): string {
  return section(
    'Exit status',
    statusSentences.map(({ status, sentence }) => [String(status), sentence]),
  );
}

function section(title: string, rows: readonly (readonly string[])[]): string {
  return rows.length === 0 ? '' : `${title}\n${columns(rows, { indent: 2, width })}`;
}

function paragraphs(parts: readonly string[]): string {
  return `${parts.filter((part) => part !== '').join('\n\n')}\n`;
}

function wrapped(text: string): string {
  return columns([[text]], { width });
}
