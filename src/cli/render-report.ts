/** The page's script and style sheet, which stand beside the built program. */
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import type { ReportData } from '../charts/report-data.ts';
import { reportDocument } from '../page/report-document.ts';

/** The report of a run as one file. */
export function renderReport(data: ReportData): string {
  const asset = (name: string) => readFileSync(new URL(`./${name}`, import.meta.url), 'utf8');
  const sha256Base64 = (text: string) => createHash('sha256').update(text, 'utf8').digest('base64');
  return reportDocument(data, { script: asset('page.js'), style: asset('style.css') }, sha256Base64);
}
