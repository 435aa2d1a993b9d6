import { describe, expect, it } from 'vitest';
import { commands } from '../../src/cli/commands.ts';
import { commandHelp, flags, programHelp } from '../../src/cli/help.ts';

const ready = commands.filter((command) => command.instead === undefined);

describe('help, made from the table of commands', () => {
  it('has exactly the commands that were promised', () => {
    expect(commands.map((command) => command.name).sort()).toEqual(['charts', 'check', 'compare', 'cycles', 'new', 'run', 'schema', 'sheet']);
  });

  it('fits its first screen: at most 50 lines of at most 96 characters', () => {
    const lines = programHelp(commands).split('\n');
    expect(lines.length).toBeLessThanOrEqual(50);
    expect(Math.max(...lines.map((line) => line.length))).toBeLessThanOrEqual(96);
  });

  it('lists every command on the first screen, those to come apart', () => {
    const [now, later] = programHelp(commands).split('Not available yet') as [string, string];
    for (const command of commands) expect(command.instead === undefined ? now : later).toContain(`  layshaft ${command.name} `);
  });

  it.each(commands)('gives $name an example that starts with its own command line', (command) => {
    expect(command.example).toMatch(new RegExp(`^layshaft ${command.name}( |$)`));
    expect(commandHelp(command)).toContain(`  ${command.example}`);
  });

  it.each(ready.flatMap((command) => command.options.map((option) => ({ command, option }))))(
    'explains --$option.name of $command.name and shows it in a whole command line',
    ({ command, option }) => {
      expect(option.sentence).toMatch(/^[A-Z].{10,}\.$/);
      expect(option.example).toMatch(new RegExp(`^layshaft ${command.name} .*--${option.name}( |$)`));
      expect(commandHelp(command)).toContain(flags(option));
      expect(commandHelp(command)).toContain(option.example);
    },
  );

  it.each(ready.flatMap((command) => command.arguments.map((argument) => ({ command, argument }))))(
    'explains the argument $argument.name of $command.name',
    ({ command, argument }) => {
      expect(argument.sentence.length).toBeGreaterThan(10);
      expect(commandHelp(command)).toContain(argument.sentence.split(' ').slice(0, 3).join(' '));
    },
  );
});
