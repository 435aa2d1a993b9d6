/** The methods of search, and the one way to make a search. */
import type { Study } from '../study/study.ts';
import { gridSearch } from './grid.ts';
import { randomSearch, sobolSearch } from './sampled.ts';
import type { Search } from './search-method.ts';

export type { Search } from './search-method.ts';

/** The search that a study asks for: a method is a case here and a file beside this one. */
export function createSearch({ axes, search }: Pick<Study, 'axes' | 'search'>): Search {
  switch (search.method) {
    case 'grid':
      return gridSearch({ axes, search });
    case 'sobol':
      return sobolSearch({ axes, search });
    case 'random':
      return randomSearch({ axes, search });
  }
}
