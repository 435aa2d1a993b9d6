import axe from 'axe-core';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ReportData } from '../../src/charts/report-data.ts';
import { createBench, type MachineSheet, machineSheet } from '../../src/core/search/design-bench.ts';
import { openBrowser } from '../browser.ts';
import { inventedReport, inventedWarning } from '../charts/invented-report.ts';
import { inventedStudy } from '../charts/invented-study.ts';
import { emptyFolder } from './built-program.ts';
import { openReport, writeReport } from './report-page.ts';

const data = inventedReport();
const folder = emptyFolder();
const nasty = `</script><script>window.struck=1</script><img src=x onerror="window.struck=1"><!-- "'&\u202e\u2028 🚚`;
let browser: Browser;
let address: string;

// On a fresh machine the browser is unpacked first.
beforeAll(async () => {
  browser = await openBrowser();
  address = writeReport(data, folder.path);
}, 120_000);
afterAll(async () => {
  await browser?.close();
  folder.remove();
});

async function text(page: Page, selector: string): Promise<string> {
  return ((await page.textContent(selector)) ?? '').replace(/[\u202f\s]+/gu, ' ').trim();
}

/** Texts in the chart. */
function chartTexts(page: Page): Promise<string[]> {
  return page.locator('#chart text').allTextContents();
}

/** Where a design put forward lies on the screen; the first such mark is that of the key. */
async function proposalPlace(page: Page, index: number): Promise<{ x: number; y: number }> {
  await page.locator('#chart').scrollIntoViewIfNeeded();
  const box = await page
    .locator('#chart circle[r="6"]')
    .nth(index + 1)
    .boundingBox();
  if (box === null) throw new Error(`no mark ${index}`);
  return { x: box.x + box.width / 2, y: box.y + box.height / 2 };
}

/** What axe finds that matters. */
async function barriers(page: Page): Promise<string[]> {
  await page.evaluate(axe.source);
  const found = await page.evaluate(() => (globalThis as unknown as { axe: typeof axe }).axe.run({ resultTypes: ['violations'] }));
  return found.violations.filter(({ impact }) => impact === 'serious' || impact === 'critical').map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`);
}

describe('the report in a browser', () => {
  it('opens without a word on the console and asks nothing of the network', async () => {
    const { page, said, asked } = await openReport(browser, address);
    expect(await page.title()).toBe('Harbour parcel van – trade-off');
    expect(await chartTexts(page)).toEqual(expect.arrayContaining(['A', 'B', 'C', 'D', 'reference', 'Battery energy in trunk, Wh/km (less is better)']));
    expect(said).toEqual([]);
    expect(asked).toEqual([]);
    await page.context().close();
  });

  it('runs no other script, takes no other style and fetches nothing', async () => {
    const { page } = await openReport(browser, address);
    const outcome = await page.evaluate(async () => {
      const broken: string[] = [];
      document.addEventListener('securitypolicyviolation', (event) => broken.push(event.effectiveDirective));
      const script = document.createElement('script');
      script.textContent = 'window.struck = 1';
      const style = document.createElement('style');
      style.textContent = 'h1 { display: none }';
      document.body.append(script, style);
      const fetched = await fetch('https://example.invalid/').then(
        () => 'fetched',
        () => 'refused',
      );
      await new Promise((resolve) => setTimeout(resolve, 100));
      return { broken, fetched, struck: 'struck' in window, head: getComputedStyle(document.querySelector('h1') as Element).display };
    });
    expect(outcome.broken).toEqual(expect.arrayContaining(['script-src-elem', 'style-src-elem', 'connect-src']));
    expect(outcome).toMatchObject({ fetched: 'refused', struck: false, head: 'block' });
    await page.context().close();
  });

  it('draws any two columns on the axes', async () => {
    const { page, said } = await openReport(browser, address);
    await page.selectOption('#axis-x', { label: 'Ratio' });
    await page.selectOption('#axis-y', { label: 'Top speed in cruise' });
    const words = await chartTexts(page);
    expect(words).toContain('Ratio');
    expect(words).toContain('Top speed in cruise, km/h (more is better)');
    await page.check('#wide-view');
    expect(await chartTexts(page)).toContain('removed (sample)');
    expect(said).toEqual([]);
    await page.context().close();
  });

  it('tells which design is pointed at', async () => {
    const { page } = await openReport(browser, address);
    const place = await proposalPlace(page, 0);
    await page.mouse.move(place.x, place.y);
    expect(await text(page, '#reading')).toContain(`Design ${data.proposals[0]?.number}, A, on the front`);
    await page.mouse.move(5, 5);
    expect(await text(page, '#reading')).toContain('Point at a design');
    await page.context().close();
  });

  it('computes a clicked design in the page and shows all its figures with what limits them', async () => {
    const { page, said } = await openReport(browser, address);
    const place = await proposalPlace(page, 1);
    await page.mouse.click(place.x, place.y);
    expect(await text(page, '#design-heading')).toBe(`Design ${data.proposals[1]?.number}, B, on the front: all figures`);
    const design = await text(page, '#design');
    expect(design).toMatch(/limited by motor (torque|power)/u);
    expect(design).toContain('Where the battery energy goes');
    expect(design).toMatch(/met: at least 20 %/u);
    expect(said).toEqual([]);
    await page.context().close();
  });

  it('computes designs by number, from a card and from the table, and moves the focus there', async () => {
    const { page } = await openReport(browser, address);
    await page.fill('#design-number', '7');
    await page.press('#design-number', 'Enter');
    expect(await text(page, '#design-heading')).toContain('Design 7');
    await page.locator('.card button').last().click();
    expect(await text(page, '#design-heading')).toContain('Design 0, the reference');
    await page.locator('.front tbody button').first().click();
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('design-heading');
    await page.context().close();
  });

  it('gives the same bits as the core outside the page', async () => {
    const { page } = await openReport(browser, address);
    const bench = createBench(data.study);
    const numbers = Array.from({ length: 60 }, (_, index) => (index * 331) % (bench.last + 1));
    const inPage = await page.evaluate((asked) => asked.map((number) => window.layshaft.evaluateDesign(number)), numbers);
    const here = numbers.map((number): MachineSheet => {
      const design = bench.compute(number);
      if (design === null) throw new Error(`no design ${number}`);
      return machineSheet(design);
    });
    expect(inPage).toStrictEqual(here);
    expect(await page.evaluate((number) => window.layshaft.evaluateDesign(number), bench.last + 1)).toBeNull();
    await page.context().close();
  });

  it('walks along the front with the keyboard and chooses a design with Enter', async () => {
    const { page } = await openReport(browser, address);
    await page.focus('#wide-view');
    await page.keyboard.press('Tab');
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('chart');
    const first = await text(page, '#reading');
    await page.keyboard.press('ArrowRight');
    const second = await text(page, '#reading');
    expect(second).not.toBe(first);
    expect((await page.getAttribute('#chart', 'aria-valuetext'))?.replace(/[\u202f\s]+/gu, ' ')).toBe(second);
    await page.keyboard.press('End');
    await page.keyboard.press('Enter');
    const number = /Design ([\d ]+),/u.exec(await text(page, '#reading'))?.[1];
    expect(await text(page, '#design-heading')).toContain(`Design ${number},`);
    await page.context().close();
  });

  it('sorts the front by any column, by keyboard too, and says so', async () => {
    const { page } = await openReport(browser, address);
    const costs = async () => (await page.locator('.front tbody tr td:nth-child(7)').allTextContents()).map(Number);
    const head = page.locator('.front th button', { hasText: 'Drive unit cost' });
    await head.focus();
    await page.keyboard.press('Enter');
    expect(await page.locator('.front th[aria-sort="ascending"]').textContent()).toContain('Drive unit cost');
    expect(await costs()).toEqual([...(await costs())].sort((a, b) => a - b));
    await page.keyboard.press('Enter');
    expect(await page.locator('.front th[aria-sort="descending"]').textContent()).toContain('Drive unit cost');
    expect(await costs()).toEqual([...(await costs())].sort((a, b) => b - a));
    await page.click('[data-all]');
    expect(await costs()).toHaveLength(data.counts.shownFront);
    await page.context().close();
  });

  it('fits 320 px without sideways scrolling, with a design in full as well', async () => {
    const { page } = await openReport(browser, address, { viewport: { width: 320, height: 700 } });
    await page.locator('.card button').first().click();
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(320);
    const wide = await page.evaluate(() => (document.querySelector('#chart svg') as Element).getBoundingClientRect().right);
    expect(wide).toBeLessThanOrEqual(320);
    await page.context().close();
  });

  it.each(['light', 'dark'] as const)('has no serious barrier in the %s scheme', async (colorScheme) => {
    const { page } = await openReport(browser, address, { colorScheme });
    await page.locator('.card button').first().click();
    for (const summary of await page.locator('summary').all()) await summary.click();
    expect(await barriers(page)).toEqual([]);
    await page.context().close();
  });

  it('follows the scheme of its reader, and prints on light ground', async () => {
    const { page } = await openReport(browser, address, { colorScheme: 'dark' });
    const ground = () => page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
    const mark = () => page.evaluate(() => getComputedStyle(document.querySelector('#chart g circle') as Element).fill);
    const [dark, darkMark] = [await ground(), await mark()];
    await page.emulateMedia({ colorScheme: 'light' });
    expect(await ground()).not.toBe(dark);
    expect(await mark()).not.toBe(darkMark);
    await page.emulateMedia({ colorScheme: 'dark', media: 'print' });
    expect(await ground()).toBe('rgb(255, 255, 255)');
    await page.context().close();
  });

  it.each(['A4', 'Letter'])('prints on at most six pages of %s', async (format) => {
    const { page } = await openReport(browser, address);
    const pdf = await page.pdf({ format, landscape: true });
    const pages = pdf.toString('latin1').match(/\/Type \/Page\b(?!s)/gu) ?? [];
    expect(pages.length).toBeGreaterThan(1);
    expect(pages.length).toBeLessThanOrEqual(6);
    await page.context().close();
  });

  it('can be read without script', async () => {
    const { page } = await openReport(browser, address, { javaScriptEnabled: false });
    await expect(page.locator('.card').count()).resolves.toBe(5);
    expect(await page.locator('.note', { hasText: 'need scripts to be allowed' }).isVisible()).toBe(true);
    expect(await page.locator('#chart-controls').isVisible()).toBe(false);
    await page.context().close();
  });
});

describe('hostile text in a browser', () => {
  it('is harmless everywhere it is shown', async () => {
    const study = inventedStudy({ title: nasty, rampName: `ra${nasty}`.replaceAll('.', '') });
    const report: ReportData = { ...inventedReport({ study }), studyText: nasty.repeat(200), studyFile: nasty, warnings: [inventedWarning(nasty)] };
    const { page, said, asked } = await openReport(browser, writeReport(report, folder.path, 'hostile.html'));
    await page.selectOption('#axis-x', '6');
    await page.locator('.card button').first().click();
    expect(await page.evaluate(() => 'struck' in window)).toBe(false);
    expect(await page.locator('img').count()).toBe(0);
    expect(await text(page, 'h1')).toContain('</script><script>window.struck=1</script>');
    expect(said).toEqual([]);
    expect(asked).toEqual([]);
    await page.context().close();
  });

  it('of ten thousand characters does not widen the page', async () => {
    const study = inventedStudy({ title: 'x'.repeat(10_000), rampName: 'y'.repeat(10_000) });
    const { page, said } = await openReport(browser, writeReport(inventedReport({ study }), folder.path, 'long.html'), {
      viewport: { width: 400, height: 700 },
    });
    await page.locator('.card button').first().click();
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(400);
    expect(said).toEqual([]);
    await page.context().close();
  });
});

describe('the report when no design passes, in a browser', () => {
  it('shows what there is and still computes any design', async () => {
    const none = inventedReport({ harder: 0.3 });
    const { page, said } = await openReport(browser, writeReport(none, folder.path, 'none.html'));
    expect(await text(page, '.headline')).toContain('No design meets every requirement.');
    expect(await chartTexts(page)).toEqual(expect.arrayContaining(['closest', 'reference']));
    await page.locator('.card button').first().click();
    expect(await text(page, '#design')).toContain('missed: at least 50 %');
    expect(await barriers(page)).toEqual([]);
    expect(said).toEqual([]);
    await page.context().close();
  });
});
