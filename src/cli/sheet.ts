/** `layshaft sheet`: one design, every trial. */
import { type ComputedDesign, createBench, machineSheet, type Setting } from '../core/search/design-bench.ts';
import { readSetting } from '../core/study/read-setting.ts';
import type { Study } from '../core/study/study.ts';
import { type CommandRow, type ExitStatus, exitStatus, jsonOption, type OptionValues, wholeNumber } from './command.ts';
import { count } from './figure-text.ts';
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
      sentence: 'Replaces a number of the study by its dotted name, with its unit; may be given several times.',
      example: "layshaft sheet my-van.yaml --set gearing.ratio=10.2 --set 'motor.peakTorque=240 N·m'",
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
  const settled = applySettings(opened.study, (options['set'] ?? []) as readonly string[]);
  if (settled === null) return exitStatus.wrong;
  const number = (options['design'] ?? 0) as number;
  const design = computeDesign(settled.study, number, settled.settings);
  if (design === null) return exitStatus.wrong;
  const warnings = opened.warnings.map((warning) => warningSentence(warning, opened));
  if (options['json'] === true) giveJson(machineSheet(design));
  else say(sheetText({ ...design, ...settled }, warnings));
  return exitStatus.done;
}

/** The study with every setting in it, or null after saying all that is wrong with them. The last of two for one name holds. */
function applySettings(study: Study, texts: readonly string[]): { study: Study; settings: Setting[] } | null {
  const settings = new Map<string, Setting>();
  const problems: string[] = [];
  let settled = study;
  for (const text of texts) {
    const read = readSetting(settled, text);
    if (!read.ok) problems.push(read.message);
    else {
      settled = read.study;
      settings.set(read.name, { name: read.name, value: read.value });
    }
  }
  for (const problem of problems) complain(`--set ${problem}`);
  return problems.length > 0 ? null : { study: settled, settings: [...settings.values()] };
}

/** The design of a number; null after saying which numbers there are. */
function computeDesign(study: Study, number: number, settings: readonly Setting[]): ComputedDesign | null {
  const bench = createBench(study);
  const design = bench.compute(number, settings);
  if (design !== null) return design;
  const range =
    bench.last === 0
      ? 'Nothing varies in this study: it has design 0 only'
      : `The search of this study has designs 1 to ${count(bench.last)}; 0 is the reference`;
  complain(`there is no design ${count(number)}. ${range}.`);
  return null;
}
