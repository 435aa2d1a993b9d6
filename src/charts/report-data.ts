/** What the report holds: everything the page shows without asking anyone. Plain JSON; missing values are null. */
import type { ResultColumn } from '../core/evaluate/result-columns.ts';
import type { Study } from '../core/study/study.ts';
import type { Issue } from '../core/study/text/issue.ts';

/** What a design is to the study. */
export type DesignStanding = 'reference' | 'front' | 'feasible' | 'removed';

/** One embedded design: values in SI, one per result column; null where a metric does not exist. */
export interface ReportDesign {
  readonly number: number;
  readonly standing: DesignStanding;
  readonly values: readonly (number | null)[];
}

/** One requirement over all designs of the run. Values in SI. */
export interface RequirementCount {
  readonly metric: string;
  readonly bound: 'atLeast' | 'atMost';
  readonly limit: number;
  readonly implied: boolean;
  /** Designs that miss it, and those that miss it alone. */
  readonly failing: number;
  readonly failingAlone: number;
  /** The limit at which the first more design would pass with the others kept; null: no limit on this metric alone lets one pass. */
  readonly relaxedTo: number | null;
  /** Per objective: the best that designs failing this alone would bring (the metric's own value, not turned), where it beats every feasible design; its design, and the limit it needs; null where none. */
  readonly relaxedBest: readonly ({ readonly number: number; readonly objective: number; readonly limit: number } | null)[];
}

/** A design put forward, and the rule that chose it. */
export interface Proposal {
  readonly number: number;
  /** Metric it is best in, or 'balanced'. One design may carry several rules. */
  readonly rules: readonly string[];
}

/** How the figures came about; between two runs of the same study only the date and the duration differ. */
export interface Provenance {
  readonly version: string;
  readonly node: string;
  readonly started: string;
  readonly seconds: number;
  /** SHA-256 of every input file, hexadecimal. */
  readonly digests: readonly { readonly name: string; readonly sha256: string }[];
}

/** Everything in the report. */
export interface ReportData {
  readonly study: Study;
  readonly studyFile: string;
  readonly studyText: string;
  readonly columns: readonly ResultColumn[];
  readonly counts: { readonly designs: number; readonly feasible: number; readonly front: number; readonly shownFront: number };
  /** Reference (number 0) first, then the front (after resolution), then a sample of feasible and removed designs chosen by hashed number. */
  readonly designs: readonly ReportDesign[];
  readonly requirements: readonly RequirementCount[];
  readonly proposals: readonly Proposal[];
  /** When nothing is feasible: the design that comes closest, by fewest requirements missed, then least sum of relative shortfalls. */
  readonly closest: { readonly number: number; readonly missed: readonly string[] } | null;
  /** What to keep an eye on, from study and results, in the order of the study file. */
  readonly warnings: readonly Issue[];
  readonly provenance: Provenance;
}
