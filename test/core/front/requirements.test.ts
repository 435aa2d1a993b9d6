import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type RequirementLimit, type RequirementResult, RequirementTally } from '../../../src/core/front/requirements.ts';
import { columnsOf } from './oracles.ts';

interface Design {
  readonly number: number;
  readonly metrics: readonly number[];
  readonly objectives: readonly number[];
}

interface Setting {
  readonly requirements: readonly RequirementLimit[];
  readonly objectiveCount: number;
  readonly designs: readonly Design[];
}

function tally({ requirements, objectiveCount, designs }: Setting, batch = Math.max(1, designs.length)): { result: RequirementResult; feasible: number[] } {
  const counter = new RequirementTally(requirements, objectiveCount);
  const feasible: number[] = [];
  for (let from = 0; from < designs.length; from += batch) {
    const part = designs.slice(from, from + batch);
    const marks = new Uint8Array(part.length).fill(9);
    const metrics = part.map((design) => design.metrics);
    const objectives = part.map((design) => design.objectives);
    counter.add(
      part.length,
      Float64Array.from(part, (d) => d.number),
      columnsOf(metrics, requirements.length),
      columnsOf(objectives, objectiveCount),
      marks,
    );
    for (const mark of marks) expect([0, 1]).toContain(mark);
    feasible.push(...part.filter((_, k) => marks[k] === 1).map((design) => design.number));
  }
  return { result: counter.result(), feasible: feasible.sort((a, b) => a - b) };
}

const meets = ({ bound, limit }: RequirementLimit, value: number): boolean => (bound === 'atLeast' ? value >= limit : value <= limit);
const isComplete = (design: Design): boolean => !design.objectives.some(Number.isNaN);
const isFeasible = (requirements: readonly RequirementLimit[], design: Design): boolean =>
  isComplete(design) && requirements.every((requirement, r) => meets(requirement, design.metrics[r]!));

/** Word by word: try every metric value on offer as the new limit and see which designs that lets in. */
function plainRelaxation({ requirements, objectiveCount, designs }: Setting, r: number) {
  const { bound, limit } = requirements[r]!;
  const before = designs.filter((design) => isFeasible(requirements, design));
  const admitted = (to: number): Design[] => {
    const relaxed = requirements.map((requirement, k) => (k === r ? { bound, limit: to } : requirement));
    return designs.filter((design) => isFeasible(relaxed, design) && !before.includes(design));
  };
  const giveWay = (to: number): number => (bound === 'atLeast' ? limit - to : to - limit);
  const limits = designs.map((design) => design.metrics[r]!).filter((value) => Number.isFinite(value) && giveWay(value) > 0);
  limits.sort((a, b) => giveWay(a) - giveWay(b));
  const relaxedTo = limits.find((to) => admitted(to).length > 0) ?? Number.NaN;
  const everyone = limits.length === 0 ? [] : admitted(limits.at(-1)!);
  const relaxedBest = [...Array(objectiveCount).keys()].map((j) => {
    const beaten = Math.min(Number.POSITIVE_INFINITY, ...before.map((design) => design.objectives[j]!));
    const better = everyone.filter((design) => design.objectives[j]! < beaten);
    better.sort((a, b) => a.objectives[j]! - b.objectives[j]! || giveWay(a.metrics[r]!) - giveWay(b.metrics[r]!) || a.number - b.number);
    const best = better[0];
    return best === undefined ? null : { number: best.number, objective: best.objectives[j]!, limit: best.metrics[r]! };
  });
  return { relaxedTo, relaxedBest };
}

function plainClosest({ requirements, designs }: Setting): RequirementResult['closest'] {
  if (designs.some((design) => isFeasible(requirements, design))) return null;
  const ranked = designs.map(({ number, metrics, objectives }) => {
    const missed = [...requirements.keys()].filter((r) => !meets(requirements[r]!, metrics[r]!));
    const withoutObjectives = [...objectives.keys()].filter((j) => Number.isNaN(objectives[j]));
    const existing = missed.filter((r) => !Number.isNaN(metrics[r]));
    const shortfall = existing.reduce((sum, r) => sum + Math.abs(metrics[r]! - requirements[r]!.limit) / Math.abs(requirements[r]!.limit || 1), 0);
    const absent = missed.length - existing.length + withoutObjectives.length;
    return { rank: [missed.length + withoutObjectives.length, absent, shortfall, number], closest: { number, missed, withoutObjectives } };
  });
  ranked.sort((a, b) => a.rank.map((value, k) => value - b.rank[k]!).find((difference) => difference !== 0) ?? 0);
  return ranked[0]?.closest ?? null;
}

const value = fc.oneof({ weight: 9, arbitrary: fc.integer({ min: -3, max: 3 }) }, { weight: 1, arbitrary: fc.constant(Number.NaN) });
const settings: fc.Arbitrary<Setting> = fc.tuple(fc.integer({ min: 0, max: 4 }), fc.integer({ min: 1, max: 3 })).chain(([requirementCount, objectiveCount]) =>
  fc
    .record({
      requirements: fc.array(fc.record({ bound: fc.constantFrom('atLeast' as const, 'atMost' as const), limit: fc.integer({ min: -2, max: 2 }) }), {
        minLength: requirementCount,
        maxLength: requirementCount,
      }),
      rows: fc.array(
        fc.record({
          metrics: fc.array(value, { minLength: requirementCount, maxLength: requirementCount }),
          objectives: fc.array(value, { minLength: objectiveCount, maxLength: objectiveCount }),
        }),
        { maxLength: 40 },
      ),
    })
    .map(({ requirements, rows }) => ({ requirements, objectiveCount, designs: rows.map((row, i) => ({ number: i + 1, ...row })) })),
);

/** As plain numbers: a zero has no sign that matters. */
const plain = (result: unknown): unknown => JSON.parse(JSON.stringify(result, (_, entry) => (Number.isNaN(entry) ? 'none' : entry)));

describe('RequirementTally against the definitions', () => {
  test('counts designs, feasible ones and those each requirement fails', () => {
    fc.assert(
      fc.property(settings, (setting) => {
        const { requirements, designs } = setting;
        const { result, feasible } = tally(setting);
        expect(feasible).toEqual(designs.filter((design) => isFeasible(requirements, design)).map((design) => design.number));
        expect([result.designs, result.feasible]).toEqual([designs.length, feasible.length]);
        const meeting = designs.filter((design) => requirements.every((requirement, r) => meets(requirement, design.metrics[r]!)));
        expect(result.withoutObjectives).toBe(meeting.length - feasible.length);
        for (const [r, requirement] of requirements.entries()) {
          const failing = designs.filter((design) => !meets(requirement, design.metrics[r]!));
          const alone = failing.filter((design) => requirements.every((other, k) => k === r || meets(other, design.metrics[k]!)));
          expect([result.requirements[r]!.failing, result.requirements[r]!.failingAlone]).toEqual([failing.length, alone.length]);
        }
      }),
      { numRuns: 500 },
    );
  });

  test('finds what each limit would have to be relaxed to', () => {
    fc.assert(
      fc.property(settings, (setting) => {
        const { result } = tally(setting);
        for (const [r, { relaxedTo, relaxedBest }] of result.requirements.entries()) {
          expect(plain({ relaxedTo, relaxedBest })).toEqual(plain(plainRelaxation(setting, r)));
        }
      }),
      { numRuns: 1000 },
    );
  });

  test('finds the closest design when none is feasible', () => {
    fc.assert(
      fc.property(settings, (setting) => {
        expect(tally(setting).result.closest).toEqual(plainClosest(setting));
      }),
      { numRuns: 1000 },
    );
  });

  test('says the same in any order and any batches', () => {
    const shuffled = settings.chain((setting) =>
      fc.record({
        setting: fc.constant(setting),
        designs: fc.shuffledSubarray([...setting.designs], { minLength: setting.designs.length }),
        batch: fc.integer({ min: 1, max: 10 }),
      }),
    );
    fc.assert(
      fc.property(shuffled, ({ setting, designs, batch }) => {
        expect(plain(tally({ ...setting, designs }, batch))).toEqual(plain(tally(setting)));
      }),
      { numRuns: 500 },
    );
  });
});

describe('RequirementTally', () => {
  const grade: RequirementLimit = { bound: 'atLeast', limit: 20 };
  const time: RequirementLimit = { bound: 'atMost', limit: 12 };
  const design = (number: number, metrics: readonly number[], objectives: readonly number[] = [number]): Design => ({ number, metrics, objectives });
  const of = (designs: readonly Design[], requirements = [grade, time]) => tally({ requirements, objectiveCount: 1, designs }).result;

  test('takes limits as inclusive', () => {
    expect(of([design(1, [20, 12])]).feasible).toBe(1);
    expect(of([design(1, [19.999999999999996, 12]), design(2, [20, 12.000000000000002])]).feasible).toBe(0);
  });

  test('relaxes to the nearest design that misses this limit alone, not to one that misses another too', () => {
    const { requirements } = of([design(1, [15, 10]), design(2, [18, 11]), design(3, [19, 13]), design(4, [25, 14])]);
    expect(requirements.map((requirement) => requirement.relaxedTo)).toEqual([18, 14]);
    expect(requirements.map(({ failing, failingAlone }) => [failing, failingAlone])).toEqual([
      [3, 2],
      [2, 1],
    ]);
  });

  test('shows a requirement that removes nothing as failing nobody, with no limit to relax to', () => {
    expect(of([design(1, [30, 13])]).requirements[0]).toEqual({ failing: 0, failingAlone: 0, relaxedTo: Number.NaN, relaxedBest: [null] });
  });

  test('lets no limit admit a metric that does not exist', () => {
    const { requirements } = of([design(1, [Number.NaN, 10])]);
    expect(requirements[0]).toEqual({ failing: 1, failingAlone: 1, relaxedTo: Number.NaN, relaxedBest: [null] });
  });

  test('lets no limit admit an infinite metric either', () => {
    expect(of([design(1, [20, Number.POSITIVE_INFINITY])]).requirements[1]!.relaxedTo).toBeNaN();
  });

  test('does not call a design feasible that lacks an objective', () => {
    const result = of([design(1, [30, 10], [Number.NaN])]);
    expect(result).toMatchObject({ designs: 1, feasible: 0, withoutObjectives: 1, closest: { number: 1, missed: [], withoutObjectives: [0] } });
  });

  test('shows a relaxation only where it beats every feasible design', () => {
    const worse = [design(1, [30, 10], [5]), design(2, [10, 10], [5])];
    expect(of(worse).requirements[0]!.relaxedBest).toEqual([null]);
    const better = [...worse, design(3, [12, 10], [4])];
    expect(of(better).requirements[0]!.relaxedBest).toEqual([{ number: 3, objective: 4, limit: 12 }]);
  });

  test('with equal objectives prefers the limit that gives way less', () => {
    const designs = [design(1, [10, 10], [4]), design(2, [14, 10], [4]), design(3, [14, 10], [4])];
    expect(of(designs).requirements[0]!.relaxedBest).toEqual([{ number: 2, objective: 4, limit: 14 }]);
  });

  test('measures closeness as a share of each limit, and by itself where the limit is zero', () => {
    // Shortfalls 0.1 and 0.25 of the limit; then 0.1 of 20 against 0.05 off a limit of zero.
    expect(of([design(1, [18, 10]), design(2, [25, 15])]).closest?.number).toBe(1);
    const share: RequirementLimit = { bound: 'atMost', limit: 0 };
    expect(of([design(1, [18, 0]), design(2, [25, 0.05])], [grade, share]).closest?.number).toBe(2);
  });

  test('takes more requirements than a machine word has bits', () => {
    const many = [...Array(70)].map(() => grade);
    const result = of([design(1, [...Array(69).fill(20), 19])], many);
    expect(result.requirements.map(({ failingAlone }) => failingAlone)).toEqual([...Array(69).fill(0), 1]);
  });

  test('makes every complete design feasible when nothing is required, and knows no closest one before any came', () => {
    expect(of([design(1, [])], [])).toEqual({ designs: 1, feasible: 1, withoutObjectives: 0, requirements: [], closest: null });
    expect(of([]).closest).toBeNull();
  });
});
