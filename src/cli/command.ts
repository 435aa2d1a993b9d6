/** What a command is: a row of the table from which the program, its help and the completeness tests are made. */

/** Exit statuses of every command. */
export const exitStatus = { done: 0, failed: 1, wrong: 2, nothingFeasible: 3, interrupted: 130 } as const;
/** One of the exit statuses. */
export type ExitStatus = (typeof exitStatus)[keyof typeof exitStatus];

/** What each status says; shown in the help. */
export const statusSentences: readonly { readonly status: ExitStatus; readonly sentence: string }[] = [
  { status: exitStatus.done, sentence: 'done; after a run, a front exists' },
  { status: exitStatus.failed, sentence: 'failed, for example for want of disk space' },
  { status: exitStatus.wrong, sentence: 'the study or the command line is wrong' },
  { status: exitStatus.nothingFeasible, sentence: 'done, but no design meets every requirement' },
  { status: exitStatus.interrupted, sentence: 'interrupted; the same command starts the run again' },
];

/** The most serious of several statuses: interrupted, failed, wrong, nothing feasible, done. */
export function worstStatus(statuses: readonly ExitStatus[]): ExitStatus {
  const order: readonly ExitStatus[] = [exitStatus.interrupted, exitStatus.failed, exitStatus.wrong, exitStatus.nothingFeasible];
  return order.find((status) => statuses.includes(status)) ?? exitStatus.done;
}

/** An argument of a command. */
export interface ArgumentRow {
  /** As the usage line shows it; three dots: one or more. */
  readonly name: string;
  readonly sentence: string;
  readonly many?: boolean;
}

/** An option of a command. */
export interface OptionRow {
  /** Long flag without dashes: `set`. */
  readonly name: string;
  /** Name of its value; absent for a switch. */
  readonly value?: string;
  /** May it be given several times? Its value is then always a list. */
  readonly many?: boolean;
  readonly sentence: string;
  /** A whole command line that uses it. */
  readonly example: string;
  /** Turns the text into the value; throws a RangeError whose message says what to give. */
  readonly read?: (text: string) => unknown;
}

/** Options as read: by name, only those given. */
export type OptionValues = Readonly<Record<string, unknown>>;

/** One command. */
export interface CommandRow {
  readonly name: string;
  readonly sentence: string;
  /** More for its own help: what it reads, what it writes, how to read the outcome. */
  readonly about: readonly string[];
  readonly arguments: readonly ArgumentRow[];
  readonly options: readonly OptionRow[];
  /** A whole command line, the first thing to try. */
  readonly example: string;
  /** Set while a command only says that it is not available yet: what to use instead. */
  readonly instead?: string;
  /** Does the work; throws for faults of the program only. */
  act(operands: readonly string[], options: OptionValues): Promise<ExitStatus>;
}

/** The option that every command with machine output has. */
export function jsonOption(example: string, what: string): OptionRow {
  return { name: 'json', sentence: `Machine output on stdout: ${what}.`, example };
}

/** Reads a whole number of at least `least`, for options such as --workers. */
export function wholeNumber(least: number): (text: string) => number {
  return (text) => {
    // Thin spaces between thousands, as this program prints them, are no mistake.
    const digits = text.replace(/\s/gu, '');
    const value = /^\d{1,15}$/.test(digits) ? Number(digits) : Number.NaN;
    if (!(value >= least)) throw new RangeError(`Give a whole number, at least ${least}.`);
    return value;
  };
}
