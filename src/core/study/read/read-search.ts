/** Reads `search`: a method, and for methods that draw designs how many and from which seed. */
import { formatFigure } from '../../units/format-quantity.ts';
import { methodsToCome, searchMethods } from '../catalogue/search-methods.ts';
import type { Search } from '../study.ts';
import { clip, type IssueList } from '../text/issue.ts';
import type { Located, LocatedMap } from '../text/located-text.ts';

/** A design's number must fit an unsigned 32-bit integer. */
export const mostDesigns = 4e9;
/** The largest whole number that is surely held. */
export const mostSeed = Number.MAX_SAFE_INTEGER;

const METHODS = Object.keys(searchMethods);
const METHOD_WORDS = 'grid, sobol or random';
const SAMPLING_KEYS = ['designs', 'seed'];

/** The search that a study asks for, a grid without the section; null with its issues. */
export function readSearch(part: Located | undefined, issues: IssueList): Search | null {
  if (part === undefined) return { method: 'grid' };
  if (part.kind !== 'map') {
    issues.error(part.at, 'search', {
      expected: 'a method',
      found: part.kind === 'text' ? clip(part.text) || 'nothing' : 'a list',
      hint: 'Write "search: { method: grid }", or remove search.',
    });
    return null;
  }
  const before = issues.errorCount;
  const method = readMethod(part, issues);
  const search = method === null ? null : method === 'grid' ? ({ method } as const) : readSampling(method, part, issues);
  checkKeys(part, method, issues);
  return issues.errorCount === before ? search : null;
}

function readMethod(part: LocatedMap, issues: IssueList): Search['method'] | null {
  const method = part.entries.find(({ key }) => key === 'method')?.value;
  const text = method?.kind === 'text' ? method.text.trim() : '';
  if (METHODS.includes(text)) return text as Search['method'];
  const at = method?.at ?? part.at;
  if (methodsToCome.includes(text)) {
    issues.error(at, 'search.method', { expected: METHOD_WORDS, found: `${text}, which is not available yet`, hint: `Use ${METHOD_WORDS} for now.` });
    return null;
  }
  const near = issues.nearest(text, [...METHODS, ...methodsToCome]);
  const hint = near === null ? 'Write "method: grid" for every combination, or "method: sobol, designs: 10000" for a sample.' : `Did you mean ${near}?`;
  issues.error(at, 'search.method', { expected: METHOD_WORDS, found: clip(text) || 'no method', hint });
  return null;
}

/** Keys that have no place, those of the methods that draw designs beside a grid among them. */
function checkKeys(part: LocatedMap, method: Search['method'] | null, issues: IssueList): void {
  for (const { key, at } of part.entries) {
    const sampling = SAMPLING_KEYS.includes(key);
    if (key === 'method' || (sampling && method !== 'grid')) continue;
    const near = issues.nearest(key, ['method', ...SAMPLING_KEYS]);
    const remove = near === null ? 'Remove it.' : `Did you mean ${near}?`;
    const hint = sampling ? `Remove it: a grid evaluates every combination. Methods sobol and random take ${key}.` : remove;
    issues.error(at, `search.${key}`, { expected: method === 'grid' ? 'method alone' : 'method, designs, seed', found: clip(key), hint });
  }
}

function readSampling(method: 'sobol' | 'random', part: LocatedMap, issues: IssueList): Search | null {
  const [designsPart, seedPart] = SAMPLING_KEYS.map((wanted) => part.entries.find(({ key }) => key === wanted)?.value);
  if (designsPart === undefined) {
    issues.error(part.at, 'search', {
      expected: 'designs: how many to draw',
      found: `${method} without designs`,
      hint: `Write "search: { method: ${method}, designs: 10000 }".`,
    });
  }
  const designs = designsPart === undefined ? null : readWhole(designsPart, 'designs', [1, mostDesigns], issues);
  const seed = seedPart === undefined ? 1 : readWhole(seedPart, 'seed', [0, mostSeed], issues);
  return designs === null || seed === null ? null : { method, designs, seed };
}

function readWhole(value: Located, key: string, [least, most]: readonly [number, number], issues: IssueList): number | null {
  const text = value.kind === 'text' ? value.text.trim() : '';
  const number = /^\d{1,16}$/u.test(text) ? Number(text) : Number.NaN;
  if (number >= least && number <= most) return number;
  const found = value.kind === 'text' ? clip(text) || 'nothing' : value.kind === 'list' ? 'a list' : 'a section';
  const hint = Number.isNaN(number) ? `Write digits alone, such as "${key}: ${key === 'seed' ? 7 : 10000}".` : '';
  issues.error(value.at, `search.${key}`, { expected: `a whole number from ${formatFigure(least, 0)} to ${formatFigure(most, 0)}`, found, hint });
  return null;
}
