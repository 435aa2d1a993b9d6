/** One design in full: every metric of every trial with what limits it, as the page computed it. */
import { capitalised, figureText, inputText, type Measured, ownFigures } from '../charts/figure-words.ts';
import type { ReportData, RequirementCount } from '../charts/report-data.ts';
import { chooseDesign } from '../core/search/choose-design.ts';
import type { ComputedDesign, DesignMetric } from '../core/search/design-bench.ts';
import { type MetricColumn, type MetricRow, trialMetrics } from '../core/study/catalogue/metrics.ts';
import type { Trial } from '../core/study/study.ts';
import { formatFigure } from '../core/units/format-quantity.ts';
import { html, type Markup, type Piece } from './markup.ts';
import { trialSettings } from './method-section.ts';
import { boundWords, meets, metricColumn, valueAgainst } from './wording.ts';

/** The design under its own heading, which can take the focus. */
export function designInFull(design: ComputedDesign, name: string, data: ReportData): Markup {
  const { study } = data;
  const own = chooseDesign(study, design.number);
  const trials = study.trials.map(
    (trial) =>
      html`<section class="trial"><h4>${trial.name}</h4><p class="hint">${capitalised(trial.kind)}, ${trialSettings(trial, own)}</p>${metricList(design, trial, data)}</section>`,
  );
  return html`<h3 id="design-heading" tabindex="-1">Design ${formatFigure(design.number, 0)}${name !== '' && `, ${name}`}: all figures</h3>
<dl class="inputs row">${inputRows(design, data)}</dl>
<div class="trial-grid">${trials}<section class="trial"><h4>Drive unit and vehicle</h4>${metricList(design, null, data)}</section></div>`;
}

/** Files that options bring. */
const fileLabels: Readonly<Record<string, string>> = { 'motor.fullLoad': 'full-load curve', 'motor.map': 'measured map' };

function inputRows(design: ComputedDesign, { study }: ReportData): Piece[] {
  return design.inputs.map((input) => {
    const { name, row } = input;
    if (row === null) return html`<div><dt>${fileLabels[name] ?? name}</dt><dd>${input.option ?? ownFigures}</dd></div>`;
    const label = name.startsWith('trials.') ? name.slice('trials.'.length) : row.label;
    return html`<div><dt>${label}</dt><dd>${inputText(input.value, row, study)}</dd></div>`;
  });
}

/** Metrics of one trial, or of the whole design (null); those the study has no figures for are left out, energy by sink stands apart. */
function metricList(design: ComputedDesign, trial: Trial | null, data: ReportData): Markup {
  const own = design.metrics.filter(({ column, value }) => column.trial === (trial?.name ?? null) && isOfUse(column, value));
  const sinks = own.filter(({ column }) => column.row.name.startsWith('energy.'));
  const others = own.filter((metric) => !sinks.includes(metric));
  const list = (metrics: readonly DesignMetric[]) => html`<dl>${metrics.map((metric) => metricRow(metric, trial, data))}</dl>`;
  return sinks.length === 0 ? list(others) : html`${list(others)}<p class="sinks">Where the battery energy goes</p>${list(sinks)}`;
}

function metricRow(metric: DesignMetric, trial: Trial | null, data: ReportData): Markup {
  const { column, value } = metric;
  const asked = data.requirements.filter((requirement) => requirement.metric === column.name);
  const notes = [limitNote(metric, trial), ...asked.map((requirement) => verdict(value, requirement, data))];
  return html`<div><dt>${column.row.label}</dt><dd>${shownValue(value, column.row, asked[0], data)}${notes}</dd></div>`;
}

function isOfUse({ trial, row }: MetricColumn, value: number): boolean {
  if (!Number.isNaN(value)) return true;
  return trial !== null && row !== trialMetrics.outsideMap;
}

function shownValue(value: number, row: Measured, asked: RequirementCount | undefined, data: ReportData): string {
  if (asked === undefined || Number.isNaN(value)) return figureText(value, row, data.study);
  return valueAgainst(value, asked, metricColumn(data, asked.metric).column, data.study);
}

function absentWords({ absent = 'not reached' }: MetricRow): string {
  return absent;
}

/** What limits a result, or why there is none. */
function limitNote({ value, limit, column }: DesignMetric, trial: Trial | null): Markup | null {
  const exists = !Number.isNaN(value);
  if (limit === '') return exists || trial === null || trial.kind === 'cycle' ? null : html`<small>${absentWords(column.row)}</small>`;
  return html`<small>${exists && limit !== 'beyond 45°' ? `limited by ${limit}` : limit}</small>`;
}

function verdict(value: number, requirement: RequirementCount, data: ReportData): Markup {
  const bound = boundWords(requirement, metricColumn(data, requirement.metric).column, data.study);
  const met = meets(Number.isNaN(value) ? null : value, requirement);
  return met ? html`<small>met: ${bound}</small>` : html`<small class="missed">missed: ${bound}</small>`;
}
