/** Applies the rules between numbers to what a study states, or to the study that a trial's `with` makes. */

import type { Figure } from '../read/read-places.ts';
import { clip, type IssueList } from '../text/issue.ts';
import { type Alternative, alternatives, groups, matches, nameInFile, needs, orders, standing } from './rules.ts';

/** What is stated, by dotted name, and the offset at which each name stands. */
export interface Stated {
  readonly figures: ReadonlyMap<string, Figure>;
  readonly stands: ReadonlyMap<string, number>;
  /** Names that stand or most likely stand misspelt. */
  readonly tried: ReadonlySet<string>;
}

/** What a check of rules looks at. */
export interface RuleCheck {
  readonly stated: Stated;
  readonly issues: IssueList;
  /** Names whose order against others is left to each design. */
  readonly varied: ReadonlySet<string>;
  /** Only rules that involve one of these names are told; null: all. */
  readonly only: ReadonlySet<string> | null;
  /** What stands without the trial's `with`; null where the study itself is checked. */
  readonly base: ReadonlyMap<string, number> | null;
  /** Where a name stands, as messages say it: a name in a trial's `with` has that in front. */
  readonly pathOf: (name: string) => string;
  /** Set for the study that an option makes: where what is missing is told. */
  readonly option?: { readonly at: number; readonly path: string };
}

/** Everything missing, said twice, incomplete or out of order. */
export function checkRules(check: RuleCheck): void {
  for (const alternative of alternatives) checkAlternative(alternative, check);
  checkGroups(check);
  checkNeeds(check);
  checkOrders(check);
}

function concerns({ only }: RuleCheck, names: readonly string[]): boolean {
  return only === null || names.some((name) => only.has(name));
}

/** One message per alternative, where the later of the two ways begins. */
function checkAlternative({ holds, rulesOut, inFile, why }: Alternative, check: RuleCheck): void {
  const { stated, issues, only, pathOf, option } = check;
  const held = standing(holds, stated.stands)[0];
  if (held === undefined) return;
  const ruledOut = only === null && option === undefined ? [...rulesOut, ...(inFile ?? [])] : rulesOut;
  const out = standing(ruledOut, stated.stands).filter(([name]) => concerns(check, [held[0], name]));
  const first = out[0];
  if (first === undefined) return;
  const names = out.map(([name]) => nameInFile(name));
  const other = names.length > 4 ? `${names.slice(0, 3).join(', ')} and so on` : names.join(', ');
  const later = first[1] > held[1] ? first : held;
  const lines = [held, ...out].filter((entry) => entry !== later).map(([name, at]) => `${nameInFile(name)} on line ${issues.lineOf(at)}`);
  const found = `${nameInFile(later[0])} here and ${lines.slice(0, 4).join(', ')}`;
  issues.error(later[1], pathOf(nameInFile(later[0])), {
    expected: `${nameInFile(held[0])} or ${other}, not both`,
    found,
    hint: `Keep one of the two: ${why}.`,
  });
}

function checkGroups(check: RuleCheck): void {
  const { stated, issues, pathOf } = check;
  for (const { names, why } of groups) {
    const there = names.filter((name) => stated.stands.has(name));
    const missing = names.filter((name) => !stated.stands.has(name) && !stated.tried.has(name));
    const toldAlready = check.base !== null && names.some((name) => check.base?.has(name));
    const first = there[0];
    if (first === undefined || missing.length === 0 || toldAlready || misspeltSection(first, stated) || !concerns(check, there)) continue;
    const found = `${there.map(last).join(', ')} without ${missing.map(last).join(', ')}`;
    issues.error(stated.stands.get(first) as number, pathOf(first), {
      expected: `${names.map(last).join(', ')} together`,
      found,
      hint: `Add ${missing.map(last).join(', ')}: ${why}.`,
    });
  }
}

function checkNeeds(check: RuleCheck): void {
  const { stated, issues, only, option } = check;
  const told = new Set<string>();
  for (const { names, when, hint } of needs) {
    const asked = when === undefined ? only === null : [...stated.stands.keys()].some((name) => name === when || name.startsWith(`${when}.`));
    if (!asked || names.some((name) => stated.stands.has(name) || stated.tried.has(name))) continue;
    if (only !== null && ![...only].some((name) => name === when || name.startsWith(`${when}.`))) continue;
    const path = names[0] as string;
    if (misspeltSection(path, stated) || tellMissingSection(path, check, told)) continue;
    const place = option ?? { at: nearestSection(path, stated), path };
    issues.error(place.at, place.path, { expected: names.join(' or '), found: names.length > 1 ? 'neither' : 'nothing', hint });
  }
}

/** A section under another name is told already; what belongs in it is not missing besides. */
function misspeltSection(path: string, { stands, tried }: Stated): boolean {
  const section = path.split('.')[0] as string;
  return !stands.has(section) && tried.has(section);
}

/** A section that is missing as a whole is told once, instead of everything in it. */
function tellMissingSection(path: string, { stated, issues }: RuleCheck, told: Set<string>): boolean {
  const section = path.split('.')[0] as string;
  if (section === path || stated.stands.has(section)) return false;
  const asked = needs.filter(({ names, when }) => when === undefined && names[0]?.startsWith(`${section}.`));
  const ways = asked.map(({ names }) => [...new Set(names.map((name) => name.split('.')[1]))].join(' or '));
  const hint = `Add ${section}, and indented below it ${[...new Set(ways)].join(', ')}; layshaft new FILE writes a commented example.`;
  if (!told.has(section)) issues.error(0, section, { expected: `the section ${section}`, found: 'none', hint });
  told.add(section);
  return true;
}

/** Where something missing would stand: its section, or the start of the file. */
function nearestSection(path: string, stated: Stated): number {
  const section = path.split('.').slice(0, -1).join('.');
  if (section === '') return 0;
  return stated.stands.get(section) ?? nearestSection(section, stated);
}

/** Everything out of order. */
export function checkOrders(check: RuleCheck): void {
  const { stated, varied } = check;
  for (const order of orders) {
    const named = order.less.includes('*') ? [...stated.figures.keys()].filter((name) => matches(order.less, name)) : [order.less];
    for (const less of named) {
      const more = order.more.replace('trials.*.', /^trials\.[^.]*\./u.exec(less)?.[0] ?? '');
      if (!concerns(check, [less, more]) || varied.has(less) || varied.has(more)) continue;
      checkOrder(order, less, more, check);
    }
  }
}

function checkOrder(order: { equal: boolean; why: string }, less: string, more: string, { stated, issues, pathOf }: RuleCheck): void {
  const [low, high] = [stated.figures.get(less), stated.figures.get(more)];
  if (low === undefined || high === undefined || low.value < high.value || (order.equal && low.value === high.value)) return;
  const [name, figure, other, otherName, word] = low.at > high.at ? [less, low, high, more, 'at most'] : [more, high, low, less, 'at least'];
  const bound = order.equal ? word : word === 'at most' ? 'below' : 'above';
  const expected = `${last(name)} ${bound} ${otherName} (${asWritten(other)}, line ${issues.lineOf(other.at)})`;
  issues.error(figure.at, pathOf(name), { expected, found: asWritten(figure), hint: `Correct one of the two: ${order.why}.` });
}

/** A figure as the file has it, spelled the usual way. */
export function asWritten({ written, unit }: Pick<Figure, 'written' | 'unit'>): string {
  return unit.symbol === '' ? String(written) : `${written} ${unit.symbol}`;
}

function last(name: string): string {
  return clip(/\.[12]$/u.test(name) ? name.split('.').slice(-2).join('.') : (name.split('.').pop() as string));
}
