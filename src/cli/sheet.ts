/** `layshaft sheet`: one design, every trial. */
import { chooseDesign } from '../core/search/choose-design.ts';
import { createBench, machineSheet, type Setting } from '../core/search/design-bench.ts';
import { createSearch } from '../core/search/search.ts';
import { type OptionChoice, readChoice, readSetting } from '../core/study/read-setting.ts';
import type { Study } from '../core/study/study.ts';
import { type CommandRow, type ExitStatus, exitStatus, jsonOption, type OptionValues, wholeNumber } from './command.ts';
import { openStudy, warningSentence } from './open-study.ts';
import { sheetText } from './sheet-text.ts';
import { complain, giveJson, say } from './terminal.ts';

/** The row of `sheet`. */
export const sheetCommand: CommandRow = {
  name: 'sheet',
  sentence: 'Evaluates one design: trials, limits, requirements',
  about: [
    "Without options this is the study's own figures, the reference design. It needs neither vary nor requirements nor tradeOff.",
    'With --json the keys carry their units, and a metric that does not exist is null. inputs holds the varied and the set numbers, or every number of a study that varies none.',
  ],
  arguments: [{ name: 'STUDY', sentence: 'A study file' }],
  options: [
    {
      name: 'set',
      value: 'NAME=VALUE',
      many: true,
      sentence: 'Replaces a number of the study by its dotted name, with its unit, or chooses an option by the name of its list; may be given several times.',
      example: "layshaft sheet my-van.yaml --set gearing.ratio=10.2 --set 'motor on offer=slow-wound'",
    },
    {
      name: 'design',
      value: 'N',
      sentence: 'Takes the design of this number, as in front.csv and the report; 0 is the reference.',
      example: 'layshaft sheet my-van.yaml --design 17',
      read: wholeNumber(0),
    },
    jsonOption('layshaft sheet my-van.yaml --json > sheet.json', 'inputs, metrics and limits'),
  ],
  example: 'layshaft sheet my-van.yaml',
  act: async ([file], options) => printSheet(file as string, options),
};

async function printSheet(file: string, options: OptionValues): Promise<ExitStatus> {
  const opened = openStudy(file);
  if (opened === null) return exitStatus.wrong;
  const number = (options['design'] ?? 0) as number;
  if (!hasDesign(opened.study, number)) return exitStatus.wrong;
  const settled = applySettings(opened.study, number, (options['set'] ?? []) as readonly string[]);
  if (settled === null) return exitStatus.wrong;
  const design = createBench(settled.study).compute(number, settled.settings, settled.choices);
  if (design === null) throw new Error(`there is no design ${number}`);
  const warnings = opened.warnings.map((warning) => warningSentence(warning, opened));
  if (options['json'] === true) giveJson(machineSheet(design));
  else say(sheetText({ ...design, ...settled }, warnings));
  return exitStatus.done;
}

/** A design as a study of its own, with every setting in it. */
interface Settled {
  readonly study: Study;
  readonly settings: readonly Setting[];
  readonly choices: readonly OptionChoice[];
}

/**
 * The design with options chosen and figures set, or null after saying all that is wrong with them. Options come first, figures on
 * top; the last of two for one name holds.
 */
function applySettings(study: Study, number: number, texts: readonly string[]): Settled | null {
  const read = texts.map((text) => ({ text, chosen: readChoice(study, text) }));
  const choices = read.flatMap(({ chosen }) => (chosen?.ok === true ? chosen.choice : []));
  const problems = read.flatMap(({ chosen }) => (chosen?.ok === false ? chosen.message : []));
  const settings = new Map<string, Setting>();
  let settled = chooseDesign(study, number, choices);
  for (const { text, chosen } of read) {
    if (chosen !== null) continue;
    const figure = readSetting(settled, text);
    if (!figure.ok) problems.push(figure.message);
    else {
      settled = figure.study;
      settings.set(figure.name, { name: figure.name, value: figure.value });
    }
  }
  for (const problem of problems) complain(`--set ${problem}`);
  return problems.length > 0 ? null : { study: settled, settings: [...settings.values()], choices };
}

/** Says which numbers there are where there is no such design. */
function hasDesign(study: Study, number: number): boolean {
  const designs = createSearch(study).count;
  if (number <= designs) return true;
  const range =
    designs === 0 ? 'Nothing varies in this study: it has design 0 only' : `The search of this study has designs 1 to ${designs}; 0 is the reference`;
  complain(`there is no design ${number}. ${range}.`);
  return false;
}
