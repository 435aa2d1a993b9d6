/** The two streams: people's text and progress to stderr, machine output to stdout; colour only where stderr is a terminal. */
import { styleText } from 'node:util';
import { count } from './figure-text.ts';

/** Colours and weights in use. Meaning never rests on them alone. */
export type Ink = 'bold' | 'dim' | 'red' | 'green' | 'yellow';

/** Text in a colour or weight, where stderr is a terminal and NO_COLOR is not set; plain elsewhere. */
export function ink(style: Ink, text: string): string {
  return styleText(style, text, { stream: process.stderr });
}

/** A line, or lines, for people. */
export function say(text = ''): void {
  process.stderr.write(`${text}\n`);
}

/** A mistake of the person, in words that say what to do. */
export function complain(message: string): void {
  say(`${ink('red', 'error:')} ${message}`);
}

/** Machine output, as it stands. */
export function give(text: string): void {
  process.stdout.write(text);
}

/** Machine output as JSON, two spaces deep, one trailing newline. Numbers that do not exist must already be null. */
export function giveJson(value: unknown): void {
  give(`${JSON.stringify(value, null, 2)}\n`);
}

/** May progress move on one line? */
export function movingAllowed(): boolean {
  return process.stderr.isTTY === true && process.env['TERM'] !== 'dumb';
}

/** Columns of the terminal; 80 where it does not say. */
export function terminalWidth(): number {
  return process.stderr.columns || 80;
}

/** A reader that closed its end (`| head`) is no failure: what it does not want is dropped in silence. Other errors of the streams stay errors. */
export function tolerateClosedStreams(): void {
  for (const stream of [process.stdout, process.stderr]) {
    stream.on('error', (error: NodeJS.ErrnoException) => {
      if (error.code !== 'EPIPE') throw error;
    });
  }
}

/** The first `limit` lines, and how many more there are. */
export function capped(lines: readonly string[], limit: number, noun: string): string[] {
  if (lines.length <= limit) return [...lines];
  return [...lines.slice(0, limit), `… and ${count(lines.length - limit)} more ${noun}`];
}

/** A file name as it is typed into a shell: in quotes where it holds a space or a sign that a shell would take for its own. */
export function typed(path: string): string {
  if (/^[\p{L}\p{M}\p{N}_./\\:@%+,=-]+$/u.test(path)) return path;
  return /["$`\\!]/u.test(path) ? `'${path.replaceAll("'", "'\\''")}'` : `"${path}"`;
}
