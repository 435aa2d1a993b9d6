/** One design in full: every metric of every trial with what limits it, as the page computed it. */
import { capitalised, figureText, neededDecimals } from '../charts/figure-words.ts';
import type { ReportData, RequirementCount } from '../charts/report-data.ts';
import type { LimitWord } from '../core/evaluate/evaluator.ts';
import { findParameter } from '../core/study/parameters.ts';
import { formatFigure } from '../core/units/format-quantity.ts';
import type { ComputedDesign } from './design-bench.ts';
import { html, type Markup, type Piece } from './markup.ts';
import { trialSettings } from './method-section.ts';
import { boundWords, meets, metricColumn, valueAgainst } from './wording.ts';

/** The design under its own heading, which can take the focus. */
export function designInFull(design: ComputedDesign, name: string, data: ReportData): Markup {
  const { study } = data;
  const trials = study.trials.map(
    (trial) =>
      html`<section class="trial"><h4>${trial.name}</h4><p class="hint">${capitalised(trial.kind)}, ${trialSettings(trial, study)}</p>${metricList(design, trial.name, data)}</section>`,
  );
  return html`<h3 id="design-heading" tabindex="-1">Design ${formatFigure(design.number, 0)}${name !== '' && `, ${name}`}: all figures</h3>
<dl class="inputs row">${inputRows(design, data)}</dl>
<div class="trial-grid">${trials}<section class="trial"><h4>Drive unit and vehicle</h4>${metricList(design, null, data)}</section></div>`;
}

function inputRows(design: ComputedDesign, { study }: ReportData): Piece[] {
  return design.inputs.flatMap(({ name, value }) => {
    const row = findParameter(name);
    if (row === undefined) return [];
    const label = name.startsWith('trials.') ? name.slice('trials.'.length) : row.label;
    const decimals = neededDecimals(value, row, study);
    return [html`<div><dt>${label}</dt><dd>${figureText(value, { quantity: row.quantity, decimals }, study)}</dd></div>`];
  });
}

function metricList(design: ComputedDesign, trial: string | null, data: ReportData): Markup {
  const own = design.metrics.filter(({ column, value }) => column.trial === trial && (trial !== null || !Number.isNaN(value)));
  return html`<dl>${own.map(({ column, value, limit }) => {
    const asked = data.requirements.filter(({ metric }) => metric === column.name);
    return html`<div><dt>${column.row.label}</dt><dd>${shownValue(value, column.row, asked[0], data)}${limitPiece(limit, !Number.isNaN(value), column.row.limited === true)}${asked.map((requirement) => verdict(value, requirement, data))}</dd></div>`;
  })}</dl>`;
}

function shownValue(value: number, row: Parameters<typeof figureText>[1], asked: RequirementCount | undefined, data: ReportData): string {
  if (asked === undefined || Number.isNaN(value)) return figureText(value, row, data.study);
  return valueAgainst(value, asked, metricColumn(data, asked.metric).column, data.study);
}

function limitPiece(limit: LimitWord, exists: boolean, limited: boolean): Piece {
  if (limit === '') return exists || limited ? null : html` <small>does not exist here</small>`;
  return html` <small>${exists && limit !== 'beyond 45°' ? `limited by ${limit}` : limit}</small>`;
}

function verdict(value: number, requirement: RequirementCount, data: ReportData): Markup {
  const bound = boundWords(requirement, metricColumn(data, requirement.metric).column, data.study);
  const met = meets(Number.isNaN(value) ? null : value, requirement);
  return met ? html` <small>met: ${bound}</small>` : html` <small class="missed">missed: ${bound}</small>`;
}
