/** How the figures came about: the trials, the study's figures, the model in words, what it leaves out, the cautions, the run. */
import { givenText, ownFigures } from '../charts/figure-words.ts';
import type { ReportData } from '../charts/report-data.ts';
import { cautions, leftOut } from '../core/study/catalogue/cautions.ts';
import { findParameter, type ParameterRow, trialParameters } from '../core/study/catalogue/parameters.ts';
import { searchWords } from '../core/study/catalogue/search-methods.ts';
import { trialKindRow } from '../core/study/catalogue/trial-kinds.ts';
import type { Axis, Study, Trial } from '../core/study/study.ts';
import { formatFigure } from '../core/units/format-quantity.ts';
import { html, type Markup } from './markup.ts';
import { modelSentences } from './model-words.ts';

/** Section 6, the last. */
export function methodSection(data: ReportData): Markup {
  const { study } = data;
  return html`<section aria-labelledby="method">
<h2 id="method">How it was computed, and cautions</h2>
<div class="body">
<h3>Cautions</h3>
<ul class="cautions">${cautions.map((caution) => html`<li>${caution}</li>`)}</ul>
<h3>What every design was put through</h3>
<dl class="trials">${study.trials.map((trial) => html`<div><dt>${trial.name}</dt><dd>${trialKindRow(trial.kind).sentence} <span class="hint">${trialSettings(trial, study)}</span></dd></div>`)}</dl>
<h3>The model in words</h3>
<ul>${modelSentences(study).map((sentence) => html`<li>${sentence}</li>`)}</ul>
<h3>What the model leaves out</h3>
<dl class="left-out">${leftOut.map(({ subject, sentence }) => html`<div><dt>${subject}</dt><dd>${sentence}</dd></div>`)}</dl>
<h3>The run</h3>
${runWords(data)}
${study.axes.filter(({ labels }) => labels !== null).map((list) => html`<details><summary>${list.name}: what each option sets</summary>${optionTable(list, study)}</details>`)}
<details><summary>Every figure of the reference design</summary>${figureList(study)}</details>
<details><summary>The study as written, ${data.studyFile}</summary><pre tabindex="0">${data.studyText}</pre></details>
</div>
</section>`;
}

/** The conditions of a trial as the study states them. */
export function trialSettings(trial: Trial, study: Study): string {
  const kind = trialKindRow(trial.kind);
  const own = kind.takes.flatMap((key) => {
    const row: ParameterRow = trialParameters[key];
    const value = study.values[`trials.${trial.name}.${key}`];
    return value === undefined || value === row.default ? [] : [`${row.label} ${givenText(value, row, study)}`];
  });
  const replaced = Object.entries(trial.with).map(([name, value]) => {
    const row = findParameter(name);
    return row === undefined ? name : `${row.label} ${givenText(value, row, study)}`;
  });
  return [
    ...(trial.trace === null ? [] : [`trace ${trial.trace.name}`]),
    ...(trial.road === null ? [] : [`road ${trial.road.name}`]),
    ...own,
    ...(kind.rating === null ? [] : [`${trial.rating} rating`]),
    ...(replaced.length === 0 ? [] : [`for this trial ${replaced.join(', ')}`]),
  ].join(', ');
}

function runWords({ study, provenance, counts }: ReportData): Markup {
  const { version, node, started, seconds, digests } = provenance;
  const traces = [...new Map(study.trials.flatMap(({ trace }) => (trace === null ? [] : [[trace.name, trace] as const]))).values()];
  return html`<dl class="run">
<div><dt>Designs</dt><dd>${formatFigure(counts.designs, 0)}: ${searchWords(study.search)}</dd></div>
<div><dt>Computed</dt><dd>${timeWords(started)}, in ${formatFigure(seconds, 1)} s</dd></div>
<div><dt>Versions</dt><dd>layshaft ${version}, Node ${node}</dd></div>
${traces.map(({ name, timesS, notes }) => html`<div><dt>Speed trace ${name}</dt><dd>${formatFigure((timesS.at(-1) ?? 0) - (timesS[0] ?? 0), 0)} s. ${sentences(notes)}</dd></div>`)}
${digests.map(({ name, sha256 }) => html`<div><dt>SHA-256 of ${name}</dt><dd class="digest">${sha256}</dd></div>`)}
</dl>`;
}

/** `2026-12-01, 14:02 UTC` of an ISO date and time. */
function timeWords(started: string): string {
  return `${started.slice(0, 10)}, ${started.slice(11, 16)} UTC`;
}

/** Notes of a file, each closed by a full stop. */
function sentences(notes: readonly string[]): string {
  return notes.map((note) => (/[.!?]$/u.test(note) ? note : `${note}.`)).join(' ');
}

function figureList(study: Study): Markup {
  const rows = Object.entries(study.values).flatMap(([name, value]) => {
    const row = findParameter(name);
    return row === undefined
      ? []
      : [html`<tr><th scope="row">${name}</th><td class="figure">${givenText(value, row, study)}</td><td>${row.sentence}</td></tr>`];
  });
  return html`<div class="scroll" tabindex="0" role="region" aria-label="Every figure of the reference design"><table><thead><tr><th scope="col">Name</th><th scope="col" class="figure">Figure</th><th scope="col">What it is</th></tr></thead><tbody>${rows}</tbody></table></div>`;
}

/** A row for each option; numbers without a part to play in it are a dash. */
function optionTable({ name, sets, points, labels }: Axis, study: Study): Markup {
  const heads = sets.map((set) => html`<th scope="col" class="figure">${set}</th>`);
  const rows = (labels ?? []).map(
    (label, index) =>
      html`<tr><th scope="row">${label}</th>${sets.map((set, k) => html`<td class="figure">${settingText(set, points[index]?.[k] ?? Number.NaN, study)}</td>`)}</tr>`,
  );
  return html`<div class="scroll" tabindex="0" role="region" aria-label="${name}: what each option sets"><table class="options"><thead><tr><th scope="col">Option</th>${heads}</tr></thead><tbody>${rows}</tbody></table></div>`;
}

/** A number as the study gives it; a curve or map by its file. */
function settingText(name: string, value: number, study: Study): string {
  const files = name === 'motor.fullLoad' ? study.optionCurves : name === 'motor.map' ? study.optionMaps : null;
  const row = findParameter(name);
  if (files !== null) return files[value]?.file ?? ownFigures;
  return row === undefined || Number.isNaN(value) ? '—' : givenText(value, row, study);
}
