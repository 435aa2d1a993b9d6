/** The section `search`: methods, counts and seeds; what each asks of the ranges; answers to what is wrong. */
import { describe, expect, it } from 'vitest';
import { createSearch } from '../../../src/core/search/search.ts';
import { searchWords } from '../../../src/core/study/catalogue/search-methods.ts';
import { checkAxes, type PlacedAxis } from '../../../src/core/study/rules/check-axes.ts';
import type { Axis, Search } from '../../../src/core/study/study.ts';
import { formatIssues, IssueList } from '../../../src/core/study/text/issue.ts';
import { check, complaint, edited, harbour, studyOf } from './study-from-disk.ts';

const GRID = 'search: { method: grid }';
const RATIO = '{ from: 7.5, to: 12.25, steps: 20 }';
const VARY = /vary:[\s\S]*?(?=search:)/u.exec(harbour)?.[0] as string;
const withSearch = (search: string, ...edits: readonly (readonly [string, string])[]) => edited(harbour, [GRID, `search: ${search}`], ...edits);

describe('the search of a study', () => {
  it('is a grid unless the study says otherwise', () => {
    expect(studyOf(harbour).search).toEqual({ method: 'grid' });
    expect(studyOf(edited(harbour, [GRID, ''])).search).toEqual({ method: 'grid' });
  });

  it('draws as many designs as asked for, with seed 1 unless another is given', () => {
    expect(studyOf(withSearch('{ method: sobol, designs: 100000, seed: 7 }')).search).toEqual({ method: 'sobol', designs: 100_000, seed: 7 });
    expect(studyOf(withSearch('{ method: random, designs: 4000000000 }')).search).toEqual({ method: 'random', designs: 4e9, seed: 1 });
    expect(studyOf(withSearch('{ seed: 0, designs: 1, method: sobol }')).search).toEqual({ method: 'sobol', designs: 1, seed: 0 });
  });

  it('is told in words', () => {
    expect(searchWords({ method: 'grid' })).toBe('every combination of what varies');
    expect(searchWords({ method: 'sobol', designs: 9, seed: 7 })).toBe("points of a Sobol' sequence, scrambled with seed 7");
    expect(searchWords({ method: 'random', designs: 9, seed: 3 })).toBe('random points, drawn with seed 3');
  });
});

describe('ranges under a method that draws designs', () => {
  it('may be without steps: any value between their ends may be drawn', () => {
    const study = studyOf(withSearch('{ method: sobol, designs: 64 }', [RATIO, '{ from: 7.5, to: 12.25 }'], ['to: 330 N·m, steps: 16', 'to: 240 lbf·ft']));
    expect(study.axes[0]).toEqual({
      name: 'gearing.ratio',
      sets: ['gearing.ratio'],
      points: [[7.5], [12.25]],
      labels: null,
      range: { from: 7.5, to: 12.25, stepped: false },
    });
    expect(study.axes[1]?.range?.to).toBeCloseTo(325.39, 1);
  });

  it('may stand beside stepped ranges, lists, pairs and options, in the order of the file', () => {
    const vary = `vary:
  motor.peakTorque: { from: 180 N·m, to: 330 N·m }
  gearing.ratios: { oneOf: [[11.2, 6.4], [12, 7]] }
  motor.baseSpeed: { from: 3200 rpm, to: 5600 rpm, step: 800 rpm }
  trials.climb.laden: { oneOf: [2500 kg, 2800 kg, 2650 kg] }
options:
  body: [ { name: low, set: { vehicle.dragArea: 1.05 m² } }, { name: high, set: { vehicle.dragArea: 1.2 m² } } ]
`;
    for (const method of ['sobol', 'random']) {
      const study = studyOf(
        edited(harbour, [VARY, vary], ['ratio: 9.5 ', 'ratios: [11.2, 6.4]\n  shiftTime: 0.25 s #'], [GRID, `search: { method: ${method}, designs: 200 }`]),
      );
      const search = createSearch(study);
      const out = new Float64Array(search.inputNames.length);
      const seen = search.inputNames.map(() => new Set<number>());
      for (let number = 1; number <= search.count; number++) {
        search.inputs(number, out, 0);
        for (const [k, value] of out.entries()) seen[k]?.add(value);
      }
      expect(search.inputNames).toEqual([
        'motor.peakTorque',
        'gearing.ratios.1',
        'gearing.ratios.2',
        'motor.baseSpeed',
        'trials.climb.laden',
        'vehicle.dragArea',
      ]);
      expect(seen.map(({ size }) => size)).toEqual([200, 2, 2, 4, 3, 2]);
      expect([...(seen[4] ?? [])].sort()).toEqual([2500, 2650, 2800]);
    }
  });

  it('still need both ends, in order, and steps or step, not both', () => {
    const text = (range: string) => complaint(withSearch('{ method: random, designs: 64 }', [RATIO, range]));
    expect(text('{ from: 7.5 }')).toContain('gearing.ratio: { from: …, to: …, steps: … }');
    expect(text('{ from: 12.25, to: 7.5 }')).toContain('Exchange the two');
    expect(text('{ from: 7.5, to: 12.25, steps: 20, step: 0.25 }')).toContain('Keep one of the two');
  });

  it('may have so many points together that no grid could take them', () => {
    const text = withSearch('{ method: sobol, designs: 1000 }', ['steps: 20', 'steps: 10000'], ['steps: 16', 'steps: 10000'], ['steps: 13', 'steps: 1000']);
    expect(createSearch(studyOf(text)).count).toBe(1000);
  });
});

describe('a range without steps under a grid', () => {
  it('is answered with the two ways out', () => {
    const answer = complaint(edited(harbour, [RATIO, '{ from: 7.5, to: 12.25 }']));
    expect(answer).toContain('add "steps: 11"');
    expect(answer).toContain('search: { method: sobol, designs: 10000 }');
  });

  it('is no second mistake where the method itself is one', () => {
    const read = check(withSearch('{ method: sobl, designs: 100 }', [RATIO, '{ from: 7.5, to: 12.25 }']));
    expect(read.ok ? [] : read.issues.map(({ path }) => path)).toEqual(['search.method']);
  });
});

describe('a mistake in search is answered with one message', () => {
  it.each<[string, string, string[]]>([
    ['a sample of unknown size', '{ method: sobol }', ['designs: how many to draw', 'sobol without designs', 'method: sobol, designs: 10000']],
    ['a grid with a size', '{ method: grid, designs: 500 }', ['in search.designs', 'a grid evaluates every combination', 'sobol and random take designs']],
    ['a grid with a seed', '{ method: grid, seed: 5 }', ['in search.seed', 'Remove it']],
    ['a size without a method', '{ designs: 500 }', ['in search.method', 'grid, sobol or random', 'no method']],
    ['no designs', '{ method: random, designs: 0 }', ['a whole number from 1 to 4 000 000 000', 'found       0']],
    ['more designs than numbers', '{ method: sobol, designs: 4000000001 }', ['a whole number from 1 to 4 000 000 000']],
    ['half a design', '{ method: sobol, designs: 2.5 }', ['Write digits alone, such as "designs: 10000"']],
    ['a grouped count', '{ method: sobol, designs: 100_000 }', ['Write digits alone']],
    ['a list of counts', '{ method: sobol, designs: [1, 2] }', ['found       a list']],
    ['a negative seed', '{ method: sobol, designs: 9, seed: -1 }', ['in search.seed', 'a whole number from 0 to 9 007 199 254 740 991', '"seed: 7"']],
    ['a seed in words', '{ method: random, designs: 9, seed: lucky }', ['in search.seed', 'found       lucky']],
    ['a seed beyond whole numbers', '{ method: random, designs: 9, seed: 9007199254740993 }', ['in search.seed']],
    ['a slip in a key', '{ method: random, design: 9, designs: 9 }', ['in search.design\n', 'Did you mean designs?']],
    ['a slip in the method', '{ method: sobel, designs: 9 }', ['in search.method', 'Did you mean sobol?']],
    ['a capital', '{ method: Random, designs: 9 }', ['Did you mean random?']],
    ['a method to come', '{ method: latin hypercube, designs: 500, seed: 2 }', ['latin hypercube, which is not available yet', 'Use grid, sobol or random']],
    ['another method to come', '{ method: genetic, designs: 500 }', ['genetic, which is not available yet']],
    ['a method alone', 'sobol', ['a method', 'found       sobol']],
  ])('%s', (_, search, parts) => {
    const answer = complaint(withSearch(search));
    expect(answer.match(/error in/gu)).toHaveLength(1);
    for (const part of parts) expect(answer).toContain(part);
  });
});

describe("more axes than a Sobol' sequence has dimensions", () => {
  const axes = Array.from({ length: 65 }, (_, k): PlacedAxis => {
    const axis: Axis = { name: `list ${k}`, sets: [`number ${k}`], points: [[k]], labels: ['own'], range: null };
    return { axis, path: `options.list ${k}`, at: k, states: new Map() };
  });
  const answer = (count: number, search: Search) => {
    const issues = new IssueList('study.yaml', ' '.repeat(100));
    checkAxes(axes.slice(0, count), search, issues);
    return formatIssues(issues.list('error'));
  };

  it('are refused at the first of them', () => {
    const text = answer(65, { method: 'sobol', designs: 9, seed: 1 });
    for (const part of ['1:65', 'in options.list 64', 'at most 64 axes under method sobol', '65 under vary and options', 'method: random'])
      expect(text).toContain(part);
    expect(answer(64, { method: 'sobol', designs: 9, seed: 1 })).toBe('');
  });

  it('are welcome to the other methods', () => {
    expect(answer(65, { method: 'random', designs: 9, seed: 1 })).toBe('');
    expect(answer(65, { method: 'grid' })).toBe('');
  });
});
