/** The whole report as one file: readable without script, alive with it, and closed to everything else. */
import type { ReportData } from '../charts/report-data.ts';
import { answerSection } from './answer-section.ts';
import { frontSection } from './front-section.ts';
import { embeddedJson, html, Markup } from './markup.ts';
import { methodSection } from './method-section.ts';
import { questionSection } from './question-section.ts';
import { requirementSection } from './requirement-section.ts';
import { tradeSection } from './trade-section.ts';
import { watchSection } from './watch-section.ts';

/** The built script and style sheet of the page (dist/page.js, dist/style.css). */
export interface PageAssets {
  readonly script: string;
  readonly style: string;
}

/** Element that holds the data. */
export const dataElement = 'report-data';

/**
 * The report. `sha256Base64` gives the SHA-256 of a text (UTF-8) in base64; the content policy lets in exactly this script
 * and this style sheet, nothing from anywhere else. The same data give the same text.
 */
export function reportDocument(data: ReportData, assets: PageAssets, sha256Base64: (text: string) => string): string {
  const script = endSafe(assets.script, 'script');
  const style = endSafe(assets.style, 'style');
  const policy = [
    "default-src 'none'",
    `script-src 'sha256-${sha256Base64(script)}'`,
    `style-src 'sha256-${sha256Base64(style)}'`,
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
  return html`<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${new Markup(policy)}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<meta name="referrer" content="no-referrer">
<title>${data.study.title} – trade-off</title>
<style>${new Markup(style)}</style>
</head>
<body>
<main>
<header class="title">
<h1>${data.study.title}</h1>
<p class="about">${data.study.about}</p>
</header>
${questionSection(data)}
${answerSection(data)}
${watchSection(data)}
${tradeSection(data)}
${requirementSection(data)}
${frontSection(data)}
${methodSection(data)}
</main>
<script type="application/json" id="${dataElement}">${new Markup(embeddedJson(data))}</script>
<script>${new Markup(script)}</script>
</body>
</html>
`.text;
}

/** Our own files never hold the end tag of their element; a bundle that does would cut the page short, so say so. */
function endSafe(text: string, element: string): string {
  if (text.toLowerCase().includes(`</${element}`) || text.includes('<!--')) throw new Error(`the page's ${element} holds markup that would end it`);
  return text;
}
