/** Files that are no studies, or mean harm: one clear answer each, whatever they hold. Time and memory are bounded by what is read at all. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { starterStudy } from '../../../src/core/study/starter.ts';
import { formatIssues } from '../../../src/core/study/text/issue.ts';
import { check, complaint, edited } from './study-from-disk.ts';

const starter = starterStudy();

describe('a hostile file', () => {
  it.each<[string, string, string]>([
    ['nothing at all', '', 'an empty file'],
    ['white space', ' \n\n\t', 'an empty file'],
    ['comments alone', '# a study\n', 'only comments'],
    ['a list', '- a\n- b\n', 'a list'],
    ['a word', 'study', 'the text study'],
    ['colons without spaces', 'a:1\nb:2\n', 'A colon is followed by a space'],
    ['a zero byte', `${starter}\0`, 'a control character'],
    ['bytes that are no UTF-8', `title: \ufffd\n${starter}`, 'not UTF-8'],
    ['several documents', `${starter}---\n${starter}`, 'a second document'],
    ['an alias bomb', 'a: &a [x, x]\nb: &b [*a, *a]\nc: [*b, *b]\n', 'anchor'],
    ['an alias', edited(starter, ['ratio: 9.2', 'ratio: *ratio']), 'an alias, *ratio'],
    ['an anchor', edited(starter, ['ratio: 9.2', 'ratio: &ratio 9.2']), 'the anchor &ratio'],
    ['a merge key', edited(starter, ['gearing:\n', 'gearing:\n  <<: { ratio: 9 }\n']), 'the merge key <<'],
    ['a tag', edited(starter, ['ratio: 9.2', 'ratio: !!float 9.2']), 'the tag'],
    ['__proto__', `${starter}__proto__: { polluted: 1 }\n`, '__proto__'],
    ['a trial named constructor', edited(starter, ['  away:  ', '  constructor:  ']), 'constructor'],
    ['a key twice', `${starter}title: again\n`, 'title again, after line 1'],
    ['a tab as indentation', edited(starter, ['  ratio', '\tratio']), 'Indent with spaces'],
    ['brackets 20 000 deep', `a: ${'['.repeat(20_000)}`, 'sections within sections'],
    ['lists 20 000 deep on one line', '- '.repeat(20_000), 'sections within sections'],
    ['sections 20 000 deep in braces', '{a: '.repeat(20_000), 'sections within sections'],
    ['50 MB', 'a'.repeat(50_000_000), 'at most 300 kB'],
    ['a hundred thousand entries', 'a: 1\n'.repeat(50_000), 'some hundred entries'],
    ['an endless list in brackets', `a: [${'1,'.repeat(100_000)}]`, 'some hundred entries'],
    ['quotes without end', `title: "${'x\n'.repeat(1000)}`, 'without its second'],
  ])('of %s is answered clearly', (_, text, part) => {
    const answer = complaint(text);
    expect(answer).toContain(part);
    expect(answer).toMatch(/what to do {2}\S/u);
    expect(answer.length).toBeLessThan(40_000);
  });

  it('pollutes no prototype', () => {
    check(`${starter}__proto__: { polluted: 1 }\n`);
    expect(Object.hasOwn(Object.prototype, 'polluted')).toBe(false);
  });

  it('of thousands of mistakes is answered with forty and the number of the others', () => {
    const text = edited(starter, ['vary:  ', `${Array.from({ length: 3000 }, (_, k) => `zqx${k}: 1`).join('\n')}\nvary:  `]);
    const answer = complaint(text);
    expect(answer.split('\n\n')).toHaveLength(41);
    expect(answer).toMatch(/and at least 60 more$/u);
  });

  it('cannot move the cursor or hide text in what is printed', () => {
    const answer = complaint(edited(starter, ['title: Pilot', 'title: \u202egnitar\u202c Pilot'], ['ratio: 9.2', 'ratio: \u2066nine\u2069 \u200e']));
    expect(answer).toContain('gearing.ratio');
    expect(answer).not.toMatch(/[\u200e\u202a-\u202e\u2066-\u2069]/u);
  });

  it('of any text never throws and always says something', () => {
    const noise = fc.oneof(
      fc.string({ unit: 'binary', maxLength: 300 }),
      fc.string({ unit: fc.constantFrom(...'{}[]:,-?|>&*!#%@`"\'\n \tab1'), maxLength: 200 }),
    );
    fc.assert(
      fc.property(noise, (text) => {
        const read = check(text);
        expect(read.ok ? 'a study' : formatIssues(read.issues)).toContain('what to do');
      }),
      { numRuns: 400 },
    );
  });

  it('made from a right one by cutting, doubling or changing a piece never throws', () => {
    const place = fc.nat({ max: starter.length - 1 });
    fc.assert(
      fc.property(place, fc.nat({ max: 40 }), fc.constantFrom('', ':', '{', ']', '\n', '0', 'x', '- ', '"'), (at, length, piece) => {
        const read = check(starter.slice(0, at) + piece + starter.slice(at + length));
        if (!read.ok) expect(read.issues.length).toBeGreaterThan(0);
      }),
      { numRuns: 300 },
    );
  });
});
