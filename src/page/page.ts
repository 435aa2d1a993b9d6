/** Brings the report to life: reads the data it carries, draws the chart, sorts the table, and computes designs with the core. */
import type { ReportData } from '../charts/report-data.ts';
import { createBench, type MachineSheet, machineSheet } from '../core/search/design-bench.ts';
import { readStudyJson } from '../core/study/study.ts';
import { formatFigure } from '../core/units/format-quantity.ts';
import { bindChart, standingWords } from './chart-binding.ts';
import { designInFull } from './design-section.ts';
import { firstOrder, frontTable } from './front-section.ts';
import { createState, type PageState } from './page-state.ts';
import { firstAxes } from './trade-section.ts';

declare global {
  interface Window {
    /** For reading from outside: a design as this page computes it, under the keys of \`sheet --json\`; null where there is none. */
    readonly layshaft: { evaluateDesign(number: number): MachineSheet | null };
  }
}

function element<Kind extends HTMLElement = HTMLElement>(id: string): Kind {
  const found = document.getElementById(id);
  if (found === null) throw new Error(`the page has no element ${id}`);
  return found as Kind;
}

function start(): void {
  const carried = JSON.parse(element('report-data').textContent ?? '') as ReportData;
  const data: ReportData = { ...carried, study: readStudyJson(carried.study) };
  const state = createState({ ...firstAxes(data), wide: false, pinned: null });
  for (const hidden of document.querySelectorAll<HTMLElement>('#chart-controls, #choose-design, [data-design][hidden]')) hidden.hidden = false;
  bindControls(state);
  bindDesign(data, state);
  bindChart(element('chart'), element('reading'), data, state);
  bindTable(data);
  document.addEventListener('click', (event) => {
    const button = (event.target as Element).closest<HTMLElement>('[data-design]');
    if (button === null) return;
    state.change({ pinned: Number(button.dataset['design']) });
    element('design-heading').focus();
  });
}

function bindControls(state: PageState): void {
  const across = element<HTMLSelectElement>('axis-x');
  const upwards = element<HTMLSelectElement>('axis-y');
  const wide = element<HTMLInputElement>('wide-view');
  across.addEventListener('change', () => state.change({ x: Number(across.value) }));
  upwards.addEventListener('change', () => state.change({ y: Number(upwards.value) }));
  wide.addEventListener('change', () => state.change({ wide: wide.checked }));
}

/** Computes the chosen design and shows it in full; offers the same to programs. */
function bindDesign(data: ReportData, state: PageState): void {
  const bench = createBench(data.study);
  let shown: number | null = null;
  state.onChange(({ pinned }) => {
    if (pinned === null || pinned === shown) return;
    const design = bench.compute(pinned);
    if (design === null) return;
    shown = pinned;
    element('design').innerHTML = designInFull(design, standingWords(pinned, data), data).text;
    element('status').textContent = `Design ${formatFigure(pinned, 0)} was computed in this page and stands below.`;
  });
  const asked = element<HTMLInputElement>('design-number');
  element('choose-design').addEventListener('submit', (event) => {
    event.preventDefault();
    state.change({ pinned: Number(asked.value) });
  });
  const evaluateDesign = (number: number): MachineSheet | null => {
    const design = bench.compute(number);
    return design === null ? null : machineSheet(design);
  };
  Object.defineProperty(window, 'layshaft', { value: Object.freeze({ evaluateDesign }) });
}

function bindTable(data: ReportData): void {
  const host = document.getElementById('front-table');
  if (host === null) return;
  let order = firstOrder(data);
  host.addEventListener('click', (event) => {
    const button = (event.target as Element).closest<HTMLElement>('[data-sort], [data-all]');
    if (button === null) return;
    const sort = button.dataset['sort'];
    if (sort === undefined) order = { ...order, all: true };
    else order = { ...order, column: Number(sort), descending: order.column === Number(sort) && !order.descending };
    host.innerHTML = frontTable(data, order).text;
    host.querySelector<HTMLElement>(sort === undefined ? '.head' : `[data-sort="${sort}"]`)?.focus();
  });
}

start();
