import { createHash } from 'node:crypto';
import { JSDOM } from 'jsdom';
import { describe, expect, it } from 'vitest';
import type { ReportData } from '../../src/charts/report-data.ts';
import { cautionLine, cautions } from '../../src/core/study/catalogue/cautions.ts';
import { reportDocument } from '../../src/page/report-document.ts';
import { inventedReport, inventedWarning } from '../charts/invented-report.ts';
import { inventedStudy } from '../charts/invented-study.ts';

const sha256 = (text: string) => createHash('sha256').update(text, 'utf8').digest('base64');
const assets = { script: 'void 0;', style: 'body{margin:0}' };
const data = inventedReport();

/** The page as a browser reads it, without running its script. */
function read(report: ReportData): Document {
  return new JSDOM(reportDocument(report, assets, sha256)).window.document;
}

/** Text of an element, with plain spaces. */
function words(page: Document, selector: string): string {
  return (page.querySelector(selector)?.textContent ?? '').replace(/[\u202f\s]+/gu, ' ').trim();
}

describe('the report without script', () => {
  const page = read(data);

  it('asks the question in a sentence', () => {
    expect(words(page, '.question')).toBe(
      'Of 1980 designs with ratio from 7.50 to 12.25, peak torque from 180 N·m to 330 N·m and base speed from 3200 rpm to 5600 rpm, which ones ' +
        'start on 20 % or steeper laden to 2800 kg (ramp), climb 6 % at 80 km/h laden to 2800 kg (climb), go from 0 km/h to 80 km/h within 11.5 s laden to ' +
        '2800 kg (sprint), hold 130 km/h laden to 2800 kg (cruise), have at most 2900 N·m axle torque and follow the trace of stops throughout – and of ' +
        'these, what is the best trade between least battery energy in stops, least battery energy in trunk and least drive unit cost?',
    );
  });

  it('answers with counts and a card for each proposal and the reference', () => {
    expect(words(page, '.headline')).toContain(`${data.counts.feasible} of 1980 designs`);
    const cards = [...page.querySelectorAll('.card')];
    expect(cards).toHaveLength(data.proposals.length + 1);
    expect(cards.map((card) => card.querySelector('.letter')?.textContent ?? 'reference')).toEqual(['A', 'B', 'C', 'D', 'reference']);
    expect(words(page, '.cards')).toMatch(/Gives up: .+ Wh\/km more battery energy in trunk than B and .+ EUR dearer than C\./u);
  });

  it('marks inputs that lie at the edge of what was tried', () => {
    const lowest = data.proposals.find(
      ({ number }) => data.designs.find((design) => design.number === number)?.values[2] === data.study.axes[2]?.points[0]?.[0],
    );
    expect(lowest).toBeDefined();
    expect(words(page, '.cards')).toContain('3200 rpm lowest tried');
  });

  it('marks inputs next to the end of a range that any value is drawn from', () => {
    const cardsWith = (beyond: number) => {
      const axes = data.study.axes.map((axis) => {
        if (axis.name !== 'motor.baseSpeed' || axis.range === null) return axis;
        const { from, to } = axis.range;
        const range = { from: from - beyond * (to - from), to, stepped: false };
        return { ...axis, range, points: [[range.from], [to]] };
      });
      return words(read({ ...data, study: { ...data.study, axes } }), '.cards');
    };
    expect(cardsWith(0.005)).toContain('3200 rpm next to the lowest tried');
    expect(cardsWith(0.02)).not.toContain('lowest tried');
  });

  it('tells how the designs were chosen', () => {
    expect(words(page, '#method + .body')).toContain('Designs1980: every combination of what varies');
    const drawn = read({ ...data, study: { ...data.study, search: { method: 'sobol', designs: 1980, seed: 7 } } });
    expect(words(drawn, '#method + .body')).toContain("Designs1980: points of a Sobol' sequence, scrambled with seed 7");
  });

  it('shows the margin of each design to each requirement and never prints a missed one as met', () => {
    const rows = [...page.querySelectorAll('.margins tbody tr')];
    expect(rows).toHaveLength(data.requirements.filter(({ implied }) => !implied).length);
    const missing: ReportData = {
      ...data,
      designs: data.designs.map((design) =>
        design.number === 0 ? { ...design, values: design.values.map((value, at) => (data.columns[at]?.name === 'ramp.grade' ? 0.19999999 : value)) } : design,
      ),
    };
    const cell = read(missing).querySelector('.margins tbody tr td:last-child');
    expect(cell?.className).toBe('missed');
    expect(cell?.textContent).not.toMatch(/^20\.0/u);
  });

  it('says how many designs each requirement removes, alone and together, and what easing brings', () => {
    const items = [...page.querySelectorAll('.requirements > li')].map((item) => (item.textContent ?? '').replace(/[\u202f\s]+/gu, ' '));
    expect(items).toHaveLength(data.requirements.length);
    const [ramp] = data.requirements;
    expect(items[0]).toContain(`${ramp?.failing} miss it`);
    expect(items[0]).toContain(`${ramp?.failingAlone} miss no other`);
    expect(items[0]).toMatch(/One more design passes at 19\.97 %/u);
    expect(items[0]).toMatch(/At [\d.]+ %: [\d.]+ (Wh\/km less battery energy in (stops than A|trunk than B)|EUR cheaper than C) \(design \d+\)/u);
    expect(items.find((item) => item.includes('time in sprint'))).toContain('Removes nothing that the others would let pass.');
    expect(items.at(-1)).toContain('Removes nothing.');
  });

  it('rounds an eased limit to the side where the design still passes', () => {
    const [ramp] = data.requirements;
    const shown = /passes at ([\d.]+)/u.exec(words(page, '.requirements > li'))?.[1];
    expect(Number(shown) / 100).toBeLessThanOrEqual(ramp?.relaxedTo as number);
  });

  it('has the cautions in short under the answer and in full at the end, and what the model leaves out', () => {
    expect(words(page, '.caution')).toBe(cautionLine);
    for (const caution of cautions) expect(words(page, '.cautions')).toContain(caution);
    expect(words(page, '.left-out')).toContain('Peak duration');
  });

  it('says what to keep an eye on once, in a section of its own after the answer, with rule, reason and place', () => {
    const heads = [...page.querySelectorAll('h2')].map(({ id }) => id);
    expect(heads.slice(0, 4)).toEqual(['question', 'answer', 'watch', 'trade']);
    expect([...page.querySelectorAll('.watch dt')].map((term) => term.textContent)).toEqual(['Invented figures line 2, about']);
    expect(words(page, '.watch dd')).toBe('The figures of this study are invented; expected measured ones. Measure them.');
    expect(words(page, 'main').split('figures of this study are invented')).toHaveLength(2);
    expect(read({ ...data, warnings: [] }).getElementById('watch')).toBeNull();
  });

  it('tells versions, digests, traces, settings and the study as written', () => {
    const method = words(page, 'main > section:last-of-type');
    for (const part of [
      'layshaft 0.1.0',
      'Node v20.20.2',
      data.provenance.digests[0]?.sha256 as string,
      'quay round',
      'for this trial front axle share 44 %',
      'title: Harbour parcel van',
    ]) {
      expect(method).toContain(part);
    }
  });

  it('lists the front sorted by the first objective', () => {
    const head = page.querySelector('.front [aria-sort="ascending"]');
    expect(head?.textContent).toContain('Battery energy in stops');
    expect(page.querySelectorAll('.front tbody tr')).toHaveLength(Math.min(25, data.counts.shownFront));
  });

  it('is the same text for the same data', () => {
    expect(reportDocument(inventedReport(), assets, sha256)).toBe(reportDocument(data, assets, sha256));
  });

  it('lets in exactly its own script and style sheet', () => {
    const policy = page.querySelector('meta[http-equiv="Content-Security-Policy"]')?.getAttribute('content');
    expect(policy).toBe(
      `default-src 'none'; script-src 'sha256-${sha256(assets.script)}'; style-src 'sha256-${sha256(assets.style)}'; base-uri 'none'; form-action 'none'`,
    );
    expect(page.querySelectorAll('[style], [src], link, img, iframe, object')).toHaveLength(0);
  });

  it('refuses a bundle that would end its own element', () => {
    expect(() => reportDocument(data, { ...assets, script: 'x="</script>"' }, sha256)).toThrow('script');
  });
});

describe('the report when no design passes', () => {
  const none = inventedReport({ harder: 0.3 });
  const page = read(none);

  it('says so first, with the closest design and the account of each requirement', () => {
    const answer = words(page, '.headline');
    expect(answer.startsWith('No design meets every requirement.')).toBe(true);
    expect(answer).toMatch(/comes closest; it misses grade in ramp \([\d.]+ % where at least 50 % is asked\)/u);
    const items = [...page.querySelectorAll('.requirements > li')].map((item) => (item.textContent ?? '').replace(/[\u202f\s]+/gu, ' '));
    expect(items[0]).toContain('1980 miss it');
    expect(items[0]).toContain('A first design passes at');
    expect(items[0]).toMatch(/miss no other [\d.]+ %/u);
    expect(items[0]).toMatch(/At [\d.]+ %: least battery energy in stops then [\d.]+ Wh\/km \(design \d+\)/u);
    expect(items[1]).toContain('Removes nothing that the others would let pass.');
  });

  it('has no table of a front that is not there', () => {
    expect(page.querySelector('.front')).toBeNull();
    expect([...page.querySelectorAll('.card h3')].map((head) => head.textContent)).toEqual(['closest to passing', "reference: the study's own figures"]);
  });
});

describe('hostile text', () => {
  const nasty = `</script><script>alert(1)</script><!-- "'&\u202e\u2028 🚚`;
  const study = inventedStudy({ title: nasty, rampName: `ra${nasty}`.replaceAll('.', '') });
  const report: ReportData = { ...inventedReport({ study }), studyText: nasty.repeat(50), studyFile: nasty, warnings: [inventedWarning(nasty)] };

  it('stays text wherever it is shown', () => {
    const page = read(report);
    expect(page.querySelectorAll('script')).toHaveLength(2);
    expect(words(page, 'h1')).toContain('</script><script>alert(1)</script><!--');
    expect(page.querySelector('pre')?.textContent).toContain('[U+202E]');
    expect(page.querySelectorAll('main > section')).toHaveLength(7);
  });

  it('survives the way into the data and back unchanged', () => {
    const text = reportDocument(report, assets, sha256);
    expect(text).not.toMatch(/[\u202e\u2028]/u);
    const carried = JSON.parse(read(report).getElementById('report-data')?.textContent ?? '') as ReportData;
    expect(carried).toEqual(JSON.parse(JSON.stringify(report)));
    expect(carried.study.title).toBe(nasty);
  });
});
