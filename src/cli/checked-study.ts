/** A study as `check` sees it: its mistakes, or the outlook of a run. */
import { machineValue } from '../core/evaluate/result-columns.ts';
import { metricColumns } from '../core/study/catalogue/metric-columns.ts';
import type { MetricColumn } from '../core/study/catalogue/metrics.ts';
import { whatRunNeeds } from '../core/study/check-study.ts';
import type { Requirement, Study } from '../core/study/study.ts';
import { type Issue, inFileOrder, issueRecord } from '../core/study/text/issue.ts';
import type { RunEstimate } from '../run/estimate-run.ts';
import { type OpenStudy, readStudy, type WrongStudy } from './open-study.ts';

/** What a run of a study without mistakes would do, or what it still needs. */
export type Outlook = { readonly needs: NonNullable<ReturnType<typeof whatRunNeeds>> } | { readonly estimate: RunEstimate };

/** A study file after the check; the warnings are those of the study and of the designs looked at. */
export type CheckedStudy = { readonly opened: WrongStudy } | { readonly opened: OpenStudy; readonly outlook: Outlook; readonly warnings: readonly Issue[] };

/** Reads and checks a file; looks at a sample of its designs, and measures it where a run could take the study. */
export async function checkStudyFile(file: string): Promise<CheckedStudy> {
  const opened = readStudy(file);
  if (!opened.ok) return { opened };
  const needs = whatRunNeeds(opened.study);
  const [{ estimateRun }, { resultWarnings }] = await Promise.all([import('../run/estimate-run.ts'), import('../run/result-warnings.ts')]);
  const estimate = needs === null ? estimateRun(opened.study) : null;
  const told = { ...opened, studyFile: file, studyText: opened.text };
  const more = resultWarnings(told, estimate?.seen ?? { requirements: null, proposals: null });
  const outlook: Outlook = estimate === null ? { needs: needs as NonNullable<typeof needs> } : { estimate };
  return { opened, outlook, warnings: inFileOrder([...opened.warnings, ...more], file) };
}

/** The column of a required metric. */
export function requiredColumn({ metric }: Requirement, study: Study): MetricColumn {
  return metricColumns(study).find((column) => column.name === metric) as MetricColumn;
}

/** The check for programs. */
export function checkJson(checked: CheckedStudy): object {
  if (!('outlook' in checked)) {
    const { file, unreadable, issues } = checked.opened;
    return { study: file, valid: false, unreadable, issues: issues.map(issueRecord) };
  }
  const { opened, outlook, warnings } = checked;
  const { study, file } = opened;
  return {
    study: file,
    valid: true,
    warnings: warnings.map(issueRecord),
    trials: study.trials.map(({ name, kind, rating }) => ({ name, kind, rating })),
    // A range that is drawn from as a whole has no count of values.
    varied: study.axes.map(({ name, points, range }) => ({ name, values: range?.stepped === false ? null : points.length })),
    search: study.search,
    run: 'needs' in outlook ? { possible: false, ...outlook.needs } : { possible: true, ...estimateJson(outlook.estimate, study) },
  };
}

function estimateJson(estimate: RunEstimate, study: Study): object {
  const { designs, sampled, feasible, seconds, workers, bytes, failing } = estimate;
  const requirements = study.requirements.map((requirement, at) => {
    const { key, row } = requiredColumn(requirement, study);
    const limit = machineValue({ role: 'metric', quantity: row.quantity, labels: null }, requirement.limit);
    return { metric: key, [requirement.bound]: limit, implied: requirement.implied, failing: failing[at] };
  });
  return { designs, seconds, workers, bytes, sample: { designs: sampled, feasible, requirements } };
}
