/** Which designs meet every requirement, and what each requirement costs: counted while the designs stream by. */

/** One requirement: a metric at least or at most at a finite limit, inclusive. */
export interface RequirementLimit {
  readonly bound: 'atLeast' | 'atMost';
  readonly limit: number;
}

/** The best that relaxing one requirement brings to one objective (less is better): the design, and the limit it needs. */
export interface RelaxedBest {
  readonly number: number;
  readonly objective: number;
  readonly limit: number;
}

/** One requirement over all designs added. */
export interface RequirementOutcome {
  /** Designs that miss it. */
  readonly failing: number;
  /** Designs that miss it and no other requirement; 0: it removes nothing that the others would let pass. */
  readonly failingAlone: number;
  /** The limit at which one more design is feasible, the others kept; NaN where no limit on this metric lets one in. */
  readonly relaxedTo: number;
  /** Per objective: the best among designs kept out by this requirement alone, where it beats every feasible design; else null. */
  readonly relaxedBest: readonly (RelaxedBest | null)[];
}

/** The infeasible design that comes closest: requirements it misses and objectives it lacks, as indices. */
export interface ClosestDesign {
  readonly number: number;
  readonly missed: readonly number[];
  readonly withoutObjectives: readonly number[];
}

/** The tally over all designs added. */
export interface RequirementResult {
  readonly designs: number;
  readonly feasible: number;
  /** Designs that meet every requirement but lack an objective, so that they are not feasible. */
  readonly withoutObjectives: number;
  readonly requirements: readonly RequirementOutcome[];
  /** Null when a design is feasible, or none was added. */
  readonly closest: ClosestDesign | null;
}

/** How far a design is from being feasible; compared field by field, less is closer. */
interface Distance {
  /** Requirements missed; a missing objective counts as one more. */
  readonly missed: number;
  /** Those of them that no limit lets in, because the metric or objective does not exist. */
  readonly absent: number;
  readonly shortfall: number;
  readonly number: number;
}

/**
 * Counts requirements. A metric that does not exist (NaN) misses its requirement, and no limit lets it in; a design
 * without one of its objectives cannot enter the front and is not feasible, whatever requirements it meets. What the
 * tally says does not depend on the order of the designs or the sizes of the batches.
 */
export class RequirementTally {
  private readonly requirements: readonly RequirementLimit[];
  private readonly objectiveCount: number;
  private designs = 0;
  private feasible = 0;
  private withoutObjectives = 0;
  private readonly failing: number[];
  private readonly failingAlone: number[];
  private readonly relaxedTo: number[];
  private readonly relaxedBest: (RelaxedBest | null)[][];
  private readonly bestFeasible: number[];
  private closest: (ClosestDesign & { readonly distance: Distance }) | null = null;

  constructor(requirements: readonly RequirementLimit[], objectiveCount: number) {
    this.requirements = requirements;
    this.objectiveCount = objectiveCount;
    this.failing = requirements.map(() => 0);
    this.failingAlone = requirements.map(() => 0);
    this.relaxedTo = requirements.map(() => Number.NaN);
    this.relaxedBest = requirements.map(() => new Array<RelaxedBest | null>(objectiveCount).fill(null));
    this.bestFeasible = new Array<number>(objectiveCount).fill(Number.POSITIVE_INFINITY);
  }

  /**
   * Takes the first `count` designs of a batch: their numbers, one metric column per requirement (NaN: does not exist)
   * and one column per objective (less is better; NaN: does not exist). Writes 1 or 0 per design to `feasibleOut`.
   */
  add(count: number, numbers: Float64Array, metrics: readonly Float64Array[], objectives: readonly Float64Array[], feasibleOut: Uint8Array): void {
    for (let i = 0; i < count; i++) {
      const { missed, lastMissed } = this.countMissed(metrics, i);
      const complete = this.hasObjectives(objectives, i);
      const feasible = missed === 0 && complete;
      feasibleOut[i] = feasible ? 1 : 0;
      if (feasible) this.takeFeasible(objectives, i);
      else if (this.feasible === 0) this.takeClosest(numbers[i]!, metrics, objectives, i);
      if (missed === 0 && !complete) this.withoutObjectives++;
      if (missed !== 1) continue;
      this.failingAlone[lastMissed]!++;
      if (complete) this.takeRelaxed(lastMissed, numbers[i]!, metrics[lastMissed]![i]!, objectives, i);
    }
    this.designs += count;
  }

  /** The tally so far; more may be added afterwards. */
  result(): RequirementResult {
    const { designs, feasible, withoutObjectives, closest } = this;
    const beating = (best: RelaxedBest | null, j: number): RelaxedBest | null => (best !== null && best.objective < this.bestFeasible[j]! ? best : null);
    const requirements = this.requirements.map((_, r) => ({
      failing: this.failing[r]!,
      failingAlone: this.failingAlone[r]!,
      relaxedTo: this.relaxedTo[r]!,
      relaxedBest: this.relaxedBest[r]!.map(beating),
    }));
    const nearest = feasible > 0 || closest === null ? null : { number: closest.number, missed: closest.missed, withoutObjectives: closest.withoutObjectives };
    return { designs, feasible, withoutObjectives, requirements, closest: nearest };
  }

  private countMissed(metrics: readonly Float64Array[], i: number): { missed: number; lastMissed: number } {
    let missed = 0;
    let lastMissed = -1;
    for (let r = 0; r < this.requirements.length; r++) {
      if (meets(this.requirements[r]!, metrics[r]![i]!)) continue;
      this.failing[r]!++;
      missed++;
      lastMissed = r;
    }
    return { missed, lastMissed };
  }

  private hasObjectives(objectives: readonly Float64Array[], i: number): boolean {
    for (let j = 0; j < this.objectiveCount; j++) if (Number.isNaN(objectives[j]![i]!)) return false;
    return true;
  }

  private takeFeasible(objectives: readonly Float64Array[], i: number): void {
    this.feasible++;
    for (let j = 0; j < this.objectiveCount; j++) {
      if (objectives[j]![i]! < this.bestFeasible[j]!) this.bestFeasible[j] = objectives[j]![i]!;
    }
  }

  /** A design that misses requirement r alone, by `value`. */
  private takeRelaxed(r: number, number: number, value: number, objectives: readonly Float64Array[], i: number): void {
    if (!Number.isFinite(value)) return;
    const { bound } = this.requirements[r]!;
    if (Number.isNaN(this.relaxedTo[r]!) || compareRelaxation(bound, value, this.relaxedTo[r]!) < 0) this.relaxedTo[r] = value;
    for (let j = 0; j < this.objectiveCount; j++) {
      const offered = { number, objective: objectives[j]![i]!, limit: value };
      const best = this.relaxedBest[r]![j]!;
      if (best === null || compareRelaxed(bound, offered, best) < 0) this.relaxedBest[r]![j] = offered;
    }
  }

  private takeClosest(number: number, metrics: readonly Float64Array[], objectives: readonly Float64Array[], i: number): void {
    const distance = this.distanceOf(number, metrics, objectives, i);
    if (this.closest !== null && compareDistance(distance, this.closest.distance) >= 0) return;
    const missed = [...this.requirements.keys()].filter((r) => !meets(this.requirements[r]!, metrics[r]![i]!));
    const withoutObjectives = [...objectives.keys()].filter((j) => Number.isNaN(objectives[j]![i]!));
    this.closest = { number, missed, withoutObjectives, distance };
  }

  private distanceOf(number: number, metrics: readonly Float64Array[], objectives: readonly Float64Array[], i: number): Distance {
    let missed = 0;
    let absent = 0;
    let shortfall = 0;
    for (let r = 0; r < this.requirements.length; r++) {
      const value = metrics[r]![i]!;
      if (meets(this.requirements[r]!, value)) continue;
      missed++;
      if (Number.isNaN(value)) absent++;
      else shortfall += relativeShortfall(this.requirements[r]!.limit, value);
    }
    for (let j = 0; j < this.objectiveCount; j++) {
      if (!Number.isNaN(objectives[j]![i]!)) continue;
      missed++;
      absent++;
    }
    return { missed, absent, shortfall, number };
  }
}

function meets(requirement: RequirementLimit, value: number): boolean {
  return requirement.bound === 'atLeast' ? value >= requirement.limit : value <= requirement.limit;
}

/** Distance to the limit as a share of the limit; of 1 where the limit is 0, which has no size of its own. */
function relativeShortfall(limit: number, value: number): number {
  return Math.abs(value - limit) / (limit === 0 ? 1 : Math.abs(limit));
}

/** Negative when limit `a` gives way less than limit `b`. */
function compareRelaxation(bound: RequirementLimit['bound'], a: number, b: number): number {
  return bound === 'atLeast' ? b - a : a - b;
}

/** Better objective first, then the limit that gives way less, then the lower number. */
function compareRelaxed(bound: RequirementLimit['bound'], a: RelaxedBest, b: RelaxedBest): number {
  if (a.objective !== b.objective) return a.objective < b.objective ? -1 : 1;
  return compareRelaxation(bound, a.limit, b.limit) || a.number - b.number;
}

function compareDistance(a: Distance, b: Distance): number {
  return a.missed - b.missed || a.absent - b.absent || a.shortfall - b.shortfall || a.number - b.number;
}
