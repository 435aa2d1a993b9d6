/** A design of the search as a study of its own: its figures become the study's, so that single numbers can be set on top. */
import type { OptionChoice } from '../study/read-setting.ts';
import type { Study } from '../study/study.ts';
import { createSearch } from './search.ts';

/** The study with the figures of design `number` (0: the reference) as its own, some options chosen instead. A number outside the search throws. */
export function chooseDesign(study: Study, number: number, choices: readonly OptionChoice[] = []): Study {
  const search = createSearch(study);
  const row = new Float64Array(search.inputNames.length);
  if (number !== 0) search.inputs(number, row, 0);
  let at = 0;
  let chosen = study;
  for (const axis of study.axes) {
    const choice = choices.findLast(({ list }) => list === axis.name);
    const own = row.subarray(at, at + axis.sets.length);
    at += axis.sets.length;
    if (choice !== undefined) chosen = withNumbers(chosen, axis.sets, axis.points[choice.point] as readonly number[]);
    else if (number !== 0) chosen = withNumbers(chosen, axis.sets, own);
  }
  return chosen;
}

function withNumbers(study: Study, names: readonly string[], numbers: ArrayLike<number>): Study {
  const values = { ...study.values };
  let { fullLoad, lossMap } = study;
  for (const [k, name] of names.entries()) {
    const value = numbers[k] as number;
    if (name === 'motor.fullLoad') fullLoad = study.optionCurves[value]?.data ?? fullLoad;
    else if (name === 'motor.map') lossMap = study.optionMaps[value]?.data ?? lossMap;
    else if (Number.isNaN(value)) delete values[name];
    else values[name] = value;
  }
  return { ...study, values, fullLoad, lossMap };
}
