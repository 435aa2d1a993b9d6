/** Opens a report in the browser from a file, as its reader does, and keeps account of everything it says and asks for. */
import { createHash } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import type { ReportData } from '../../src/charts/report-data.ts';
import { reportDocument } from '../../src/page/report-document.ts';

/** A page with what it said and asked for. */
export interface OpenReport {
  readonly page: Page;
  /** Console messages and errors. */
  readonly said: string[];
  /** Addresses asked for beside the file itself. */
  readonly asked: string[];
}

/** The built script and style sheet; `npm run build` makes them. */
function builtAsset(name: string): string {
  return readFileSync(fileURLToPath(new URL(`../../dist/${name}`, import.meta.url)), 'utf8');
}

/** Writes the report into a folder; gives its address. */
export function writeReport(data: ReportData, folder: string, name = 'report.html'): string {
  const assets = { script: builtAsset('page.js'), style: builtAsset('style.css') };
  const file = join(folder, name);
  writeFileSync(
    file,
    reportDocument(data, assets, (text) => createHash('sha256').update(text, 'utf8').digest('base64')),
  );
  return pathToFileURL(file).href;
}

/** Opens an address in a fresh context. The caller closes the page's context. */
export async function openReport(browser: Browser, address: string, options: BrowserContextOptions = {}): Promise<OpenReport> {
  const context = await browser.newContext({ viewport: { width: 1400, height: 900 }, ...options });
  const page = await context.newPage();
  const said: string[] = [];
  const asked: string[] = [];
  page.on('console', (message) => said.push(message.text()));
  page.on('pageerror', (error) => said.push(error.message));
  page.on('request', (request) => {
    if (request.url() !== address) asked.push(request.url());
  });
  await page.goto(address);
  return { page, said, asked };
}
