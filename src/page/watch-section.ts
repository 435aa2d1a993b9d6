/** What study and results give cause to keep an eye on, before the answer is relied upon. */
import { capitalised } from '../charts/figure-words.ts';
import type { ReportData } from '../charts/report-data.ts';
import { warningPlace, warningWords } from '../core/study/text/issue.ts';
import { html, type Markup } from './markup.ts';

/** One entry per warning: its rule, where in the study it belongs, and its sentence; null where there is none. */
export function watchSection({ warnings, studyFile }: ReportData): Markup | null {
  if (warnings.length === 0) return null;
  return html`<section aria-labelledby="watch">
<h2 id="watch">What to keep an eye on</h2>
<div class="body">
<dl class="watch">${warnings.map(
    (warning) =>
      html`<div><dt>${capitalised(warning.rule)} <small>${warningPlace(warning, studyFile)}</small></dt><dd>${capitalised(warningWords(warning))}</dd></div>`,
  )}</dl>
</div>
</section>`;
}
