/** Applies the rules between numbers to what a study states, or to the study that a trial's `with` makes. */
import { clip, type IssueList } from './issue.ts';
import type { Figure } from './read-places.ts';
import { type Alternative, alternatives, fileAlternatives, groups, matches, nameInFile, needs, orders } from './rules.ts';

/** What is stated, by dotted name, and the offset at which each name stands. */
export interface Stated {
  readonly figures: ReadonlyMap<string, Figure>;
  readonly stands: ReadonlyMap<string, number>;
}

/** What a check of rules looks at. */
export interface RuleCheck {
  readonly stated: Stated;
  readonly issues: IssueList;
  /** Names whose order against others is left to each design. */
  readonly varied: ReadonlySet<string>;
  /** Only rules that involve one of these names are told; null: all. */
  readonly only: ReadonlySet<string> | null;
  /** Where a name stands, as messages say it: a name in a trial's `with` has that in front. */
  readonly pathOf: (name: string) => string;
}

/** Everything missing, said twice, incomplete or out of order. */
export function checkRules(check: RuleCheck): void {
  const all = check.only === null ? [...alternatives, ...fileAlternatives] : alternatives;
  for (const alternative of all) checkAlternative(alternative, check);
  checkGroups(check);
  checkNeeds(check);
  checkOrders(check);
}

function concerns({ only }: RuleCheck, names: readonly string[]): boolean {
  return only === null || names.some((name) => only.has(name));
}

function checkAlternative({ holds, rulesOut, why }: Alternative, check: RuleCheck): void {
  const { stated, issues, pathOf } = check;
  const under = (patterns: readonly string[]) => [...stated.stands].filter(([name]) => patterns.some((pattern) => matches(pattern, name)));
  for (const [held, heldAt] of under(holds).slice(0, 1)) {
    for (const [out, outAt] of under(rulesOut)) {
      if (!concerns(check, [held, out])) continue;
      const pair = [
        { name: nameInFile(held), at: heldAt },
        { name: nameInFile(out), at: outAt },
      ];
      const [earlier, later] = pair.sort((a, b) => a.at - b.at) as [(typeof pair)[0], (typeof pair)[0]];
      const found = `${later.name} here and ${earlier.name} on line ${issues.lineOf(earlier.at)}`;
      issues.error(later.at, pathOf(later.name), {
        expected: `${earlier.name} or ${later.name}, not both`,
        found,
        hint: `Keep one of the two lines: ${why}.`,
      });
      break;
    }
  }
}

function checkGroups(check: RuleCheck): void {
  const { stated, issues, pathOf } = check;
  for (const { names, why } of groups) {
    const there = names.filter((name) => stated.stands.has(name));
    if (there.length === 0 || there.length === names.length || !concerns(check, there)) continue;
    const missing = names.filter((name) => !stated.stands.has(name));
    const first = there[0] as string;
    const found = `${there.map(last).join(', ')} without ${missing.map(last).join(', ')}`;
    issues.error(stated.stands.get(first) as number, pathOf(first), {
      expected: `${names.map(last).join(', ')} together`,
      found,
      hint: `Add ${missing.map(last).join(', ')}: ${why}.`,
    });
  }
}

function checkNeeds(check: RuleCheck): void {
  const { stated, issues, only } = check;
  for (const { names, when, hint } of needs) {
    const asked = when === undefined ? only === null : [...stated.stands.keys()].some((name) => name === when || name.startsWith(`${when}.`));
    if (!asked || names.some((name) => stated.stands.has(name))) continue;
    if (only !== null && ![...only].some((name) => name === when || name.startsWith(`${when}.`))) continue;
    const path = names[0] as string;
    issues.error(nearestSection(path, stated), path, { expected: names.join(' or '), found: names.length > 1 ? 'neither' : 'nothing', hint });
  }
}

/** Where something missing would stand: its section, or the start of the file. */
function nearestSection(path: string, stated: Stated): number {
  const section = path.split('.').slice(0, -1).join('.');
  if (section === '') return 0;
  return stated.stands.get(section) ?? nearestSection(section, stated);
}

function checkOrders(check: RuleCheck): void {
  const { stated, varied } = check;
  for (const order of orders) {
    for (const less of [...stated.figures.keys()].filter((name) => matches(order.less, name))) {
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
  return clip(/[12]$/u.test(name) ? name.split('.').slice(-2).join('.') : (name.split('.').pop() as string));
}
