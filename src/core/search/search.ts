/** The methods of search, and the one way to make a search. */
import type { Study } from '../study/study.ts';
import { gridSearch } from './grid.ts';
import type { Search, SearchMethod } from './search-method.ts';

export type { Search } from './search-method.ts';

/** Every method by its name in the study file: a method is a row here and a file beside this one. */
const searchMethods: Readonly<Record<Study['search']['method'], SearchMethod>> = { grid: gridSearch };

/** The search that a study asks for. */
export function createSearch(study: Pick<Study, 'axes' | 'search'>): Search {
  return searchMethods[study.search.method](study);
}
