/** The methods of search by their names in the study file. */
import type { SampledSearch, Search } from '../study.ts';

interface MethodRow {
  /** For editors: which designs it makes. */
  readonly sentence: string;
}

/** Every method that a study may ask for. */
export const searchMethods: Readonly<Record<Search['method'], MethodRow>> = {
  grid: { sentence: 'Every combination of the points of vary and options.' },
  sobol: { sentence: "Points of a Sobol' sequence, scrambled by seed: they fill the ranges evenly, however many numbers vary." },
  random: { sentence: 'Random points, drawn by seed, each apart from the others.' },
};

/** Methods that have a name already but cannot be asked for yet. */
export const methodsToCome: readonly string[] = ['latin hypercube', 'genetic'];

/** Whether designs are drawn, as many as the study says, from ranges as well as from points. */
export function isSampled(search: Search): search is SampledSearch {
  return search.method !== 'grid';
}

/** How the designs were chosen, for people: stands after their number. */
export function searchWords(search: Search): string {
  if (!isSampled(search)) return 'every combination of what varies';
  return search.method === 'sobol' ? `points of a Sobol' sequence, scrambled with seed ${search.seed}` : `random points, drawn with seed ${search.seed}`;
}
