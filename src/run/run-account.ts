/** What a run learns while its designs stream by, in flat memory: requirements, front, and which designs to show. */
import type { ResultColumn } from '../core/evaluate/result-columns.ts';
import { FrontFilter } from '../core/front/front-filter.ts';
import { RequirementTally } from '../core/front/requirements.ts';
import { hashNumber } from '../core/numerics/hash.ts';
import type { Study } from '../core/study/study.ts';

/** Feasible and removed designs shown beside the front, at most, each. */
const sampleSize = 4_000;

/** Streams batches of designs; the outcome does not depend on their sizes. */
export class RunAccount {
  readonly tally: RequirementTally;
  readonly filter: FrontFilter;
  /** Per requirement: the required figure that comes closest to its good end so far, SI; NaN where no design has one. */
  readonly best: Float64Array;
  private readonly requirements: Study['requirements'];
  private readonly objectiveColumns: readonly { readonly at: number; readonly sign: number }[];
  private readonly requirementColumns: readonly number[];
  private readonly feasibleSample = new HashedSample(sampleSize);
  private readonly removedSample = new HashedSample(sampleSize);
  private feasibleCount = 0;

  constructor(study: Study, columns: readonly ResultColumn[]) {
    const at = (metric: string) => columns.findIndex((column) => column.role === 'metric' && column.name === metric);
    this.objectiveColumns = study.objectives.map(({ metric, aim }) => ({ at: at(metric), sign: aim === 'minimise' ? 1 : -1 }));
    this.requirements = study.requirements;
    this.best = new Float64Array(study.requirements.length).fill(Number.NaN);
    this.requirementColumns = study.requirements.map(({ metric }) => at(metric));
    this.tally = new RequirementTally(study.requirements, study.objectives.length);
    this.filter = new FrontFilter(study.objectives.length);
  }

  /** Designs that met every requirement so far. */
  get feasible(): number {
    return this.feasibleCount;
  }

  /** Takes designs first…first + count − 1; returns which are feasible. */
  add(first: number, count: number, columns: readonly Float64Array[]): Uint8Array {
    const numbers = new Float64Array(count);
    for (let i = 0; i < count; i++) numbers[i] = first + i;
    const objectives = this.objectivesOf(columns);
    const feasible = new Uint8Array(count);
    this.tally.add(
      count,
      numbers,
      this.requirementColumns.map((at) => columns[at]),
      objectives,
      feasible,
    );
    this.filter.add(count, numbers, objectives, feasible);
    this.takeBest(count, columns);
    for (let i = 0; i < count; i++) {
      this.feasibleCount += feasible[i];
      (feasible[i] === 1 ? this.feasibleSample : this.removedSample).offer(first + i);
    }
    return feasible;
  }

  private takeBest(count: number, columns: readonly Float64Array[]): void {
    for (const [r, { bound }] of this.requirements.entries()) {
      const figures = columns[this.requirementColumns[r]];
      for (let i = 0; i < count; i++) {
        const better = bound === 'atLeast' ? figures[i] > this.best[r] : figures[i] < this.best[r];
        if (better || Number.isNaN(this.best[r])) this.best[r] = figures[i];
      }
    }
  }

  /** Objectives of some designs, turned so that less is better. */
  objectivesOf(columns: readonly Float64Array[]): Float64Array[] {
    return this.objectiveColumns.map(({ at, sign }) => (sign === 1 ? columns[at] : columns[at].map((value) => -value)));
  }

  /** Numbers of the sampled feasible and removed designs, ascending. */
  samples(): { feasible: number[]; removed: number[] } {
    return { feasible: this.feasibleSample.numbers(), removed: this.removedSample.numbers() };
  }
}

/** Keeps the design numbers with the smallest hashes: a sample that does not depend on the order of arrival. */
class HashedSample {
  private readonly size: number;
  private kept: { readonly number: number; readonly hash: number }[] = [];
  private highest = Number.POSITIVE_INFINITY;

  constructor(size: number) {
    this.size = size;
  }

  offer(number: number): void {
    const hash = hashNumber(number);
    if (hash > this.highest) return;
    this.kept.push({ number, hash });
    // Cut down now and then, not at every design.
    if (this.kept.length >= 2 * this.size) this.cut();
  }

  numbers(): number[] {
    this.cut();
    return this.kept.map(({ number }) => number).sort((a, b) => a - b);
  }

  private cut(): void {
    this.kept.sort((a, b) => a.hash - b.hash || a.number - b.number);
    this.kept = this.kept.slice(0, this.size);
    if (this.kept.length === this.size) this.highest = this.kept[this.size - 1].hash;
  }
}
