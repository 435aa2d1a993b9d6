import { JSDOM } from 'jsdom';
import { describe, expect, it } from 'vitest';
import { chartFiles, renderTradeOffSvg } from '../../src/charts/chart-files.ts';
import type { ReportData } from '../../src/charts/report-data.ts';
import { cautionLine } from '../../src/core/study/catalogue/cautions.ts';
import { inventedReport } from './invented-report.ts';
import { inventedStudy } from './invented-study.ts';

const { window } = new JSDOM('');
const data = inventedReport();
const at = (name: string) => data.columns.findIndex((column) => column.name === name);
const [stops, trunk, cost] = [at('stops.batteryEnergy'), at('trunk.batteryEnergy'), at('driveUnit.cost')] as [number, number, number];

/** The file as an XML reader sees it; a file that is not well-formed throws. */
function read(svg: string): Document {
  const parsed = new window.DOMParser().parseFromString(svg, 'image/svg+xml');
  expect(parsed.querySelector('parsererror')).toBeNull();
  return parsed;
}

function texts(svg: string): string[] {
  return [...read(svg).querySelectorAll('text')].map((element) => element.textContent ?? '');
}

describe('the charts of a run as files', () => {
  it('draws every pair of objectives once', () => {
    expect(chartFiles(data, window.document).map(({ name }) => name)).toEqual([
      'trunk.batteryEnergy-over-stops.batteryEnergy.svg',
      'driveUnit.cost-over-stops.batteryEnergy.svg',
      'driveUnit.cost-over-trunk.batteryEnergy.svg',
    ]);
  });

  it('draws a single objective over each varied input', () => {
    const single: ReportData = { ...data, study: { ...data.study, objectives: data.study.objectives.slice(2) } };
    const one = { ...single, proposals: [{ number: data.proposals[0]!.number, rules: ['driveUnit.cost', 'balanced'] }] };
    expect(chartFiles(one, window.document).map(({ name }) => name)).toEqual([
      'driveUnit.cost-over-gearing.ratio.svg',
      'driveUnit.cost-over-motor.peakTorque.svg',
      'driveUnit.cost-over-motor.baseSpeed.svg',
    ]);
  });

  it('gives the same bytes each time, from a document used before or a fresh one', () => {
    const first = chartFiles(data, window.document);
    expect(chartFiles(data, window.document)).toEqual(first);
    expect(chartFiles(inventedReport(), new JSDOM('<p>other</p>').window.document)).toEqual(first);
  });

  it('names both axes with their units and says which end is better', () => {
    const words = texts(renderTradeOffSvg(data, stops, cost, window.document));
    expect(words).toContain('Battery energy in stops, Wh/km (less is better)');
    expect(words).toContain('Drive unit cost, EUR (less is better)');
  });

  it('shows US customary units where the study asks for them', () => {
    const us: ReportData = { ...data, study: { ...data.study, report: { units: 'US' } } };
    expect(texts(renderTradeOffSvg(us, stops, cost, window.document))).toContain('Battery energy in stops, Wh/mi (less is better)');
  });

  it('says whose estimate it is not, and letters every design put forward', () => {
    const svg = renderTradeOffSvg(data, stops, trunk, window.document);
    const words = texts(svg);
    expect(words.join(' ')).toContain(cautionLine.slice(0, 60));
    for (const [index, proposal] of data.proposals.entries()) {
      const letter = 'ABCDEFGH'[index] as string;
      expect(words).toContain(letter);
      expect(words.some((line) => line.startsWith(`${letter}: `) && line.includes(`design ${proposal.number}`))).toBe(true);
    }
    expect(words).toContain('reference');
    expect(read(svg).querySelector('title')?.textContent).toBe('Battery energy in trunk over battery energy in stops');
    expect(read(svg).querySelector('desc')?.textContent).toContain(cautionLine);
  });

  it('stands alone: white ground, colours and typefaces as attributes, nothing from elsewhere', () => {
    const drawing = read(renderTradeOffSvg(data, stops, trunk, window.document));
    expect(drawing.querySelector('rect')?.getAttribute('fill')).toBe('#ffffff');
    expect(drawing.querySelectorAll('[class], [style], style, script, image, use')).toHaveLength(0);
    const outside = [...drawing.querySelectorAll('*')]
      .flatMap((element) => [...element.attributes])
      .filter(({ name, value }) => name !== 'xmlns' && /url\(|https?:|var\(/u.test(value));
    expect(outside).toEqual([]);
  });

  it('rounds coordinates to a hundredth and never writes a number that is none', () => {
    for (const { svg } of chartFiles(data, window.document)) {
      const values = [...read(svg).querySelectorAll('*')].flatMap((element) => [...element.attributes].map(({ value }) => value));
      expect(values.filter((value) => /NaN|Infinity|undefined|null/u.test(value))).toEqual([]);
      expect(values.filter((value) => /\d\.\d{3,}/u.test(value))).toEqual([]);
    }
  });

  it('draws as many marks on the front as there are designs on it', () => {
    const drawing = read(renderTradeOffSvg(data, stops, trunk, window.document));
    const marks = [...drawing.querySelectorAll('g circle')];
    expect(marks).toHaveLength(data.counts.shownFront - data.proposals.length);
  });

  it('leaves out designs whose figures do not exist', () => {
    const front = data.designs.filter(({ standing }) => standing === 'front');
    const plain = front.find(({ number }) => !data.proposals.some((proposal) => proposal.number === number))!;
    const without: ReportData = {
      ...data,
      designs: data.designs.map((design) =>
        design === plain ? { ...design, values: design.values.map((value, index) => (index === stops ? null : value)) } : design,
      ),
    };
    expect(read(renderTradeOffSvg(without, stops, trunk, window.document)).querySelectorAll('g circle')).toHaveLength(front.length - data.proposals.length - 1);
    expect(read(renderTradeOffSvg(without, cost, trunk, window.document)).querySelectorAll('g circle')).toHaveLength(front.length - data.proposals.length);
  });

  it('draws what there is when no design passes, and marks the closest', () => {
    const none = inventedReport({ harder: 0.3 });
    expect(none.counts.feasible).toBe(0);
    const words = texts(renderTradeOffSvg(none, stops, cost, window.document));
    expect(words).toContain('closest');
    expect(words.join(' ')).toContain('none of 1980 designs meets every requirement');
  });

  it('draws options at their names', () => {
    const columns = data.columns.map((column, index) =>
      index === 0 ? { ...column, role: 'option' as const, name: 'motor on offer', label: 'motor on offer', labels: ['slow-wound', 'fast-wound'] } : column,
    );
    const designs = data.designs.map((design) => ({ ...design, values: design.values.map((value, index) => (index === 0 ? design.number % 2 : value)) }));
    const words = texts(renderTradeOffSvg({ ...data, columns, designs }, 0, cost, window.document));
    expect(words).toContain('slow-wound');
    expect(words).toContain('fast-wound');
    expect(words).toContain('Motor on offer');
  });

  it('takes hostile names as text, in the drawing and in the name of the file', () => {
    const rampName = '../</text><script>alert(1)</script>&"\u202e\u0000';
    const study = inventedStudy({ title: '</svg><script>alert(2)</script>', rampName });
    const hostile = inventedReport({
      study: { ...study, objectives: [{ metric: `${rampName}.grade`, aim: 'maximise', resolution: 0 }, ...study.objectives.slice(2)] },
    });
    const [file] = chartFiles(hostile, window.document);
    expect(file?.name).toMatch(/^[A-Za-z0-9][A-Za-z0-9.-]*\.svg$/u);
    const drawing = read(file?.svg ?? '');
    expect(drawing.querySelectorAll('script')).toHaveLength(0);
    const words = [...drawing.querySelectorAll('text')].map((element) => element.textContent).join('\n');
    expect(words).toContain('</svg><script>alert(2)</script>');
    expect(words).toContain('</text><script>');
    expect(file?.svg).not.toContain('\u202e');
    expect(file?.svg).not.toContain('\u0000');
    expect(words).toContain('(more is better)');
  });
});
