/** The numbers of a study in one flat array: a name is looked up once, a design then costs array reads only. */

/** Where each number stands. A name the study does not state reads the last cell, which is always NaN. */
export interface FigureCells {
  readonly size: number;
  cell(name: string): number;
}

/** Lays out the numbers of `values` and of `more` names (SI, NaN where a name has no figure). */
export function layOutFigures(values: Readonly<Record<string, number>>, more: readonly string[]): { cells: FigureCells; figures: Float64Array } {
  const names = [...new Set([...Object.keys(values), ...more])];
  const cellOf = new Map(names.map((name, index) => [name, index]));
  const figures = new Float64Array(names.length + 1).fill(Number.NaN);
  for (const [name, value] of Object.entries(values)) figures[cellOf.get(name) as number] = value;
  return { cells: { size: figures.length, cell: (name) => cellOf.get(name) ?? names.length }, figures };
}
