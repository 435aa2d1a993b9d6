/** Requirements in the words of the question: which trial, under which load, and what is asked. */
import { describe, expect, it } from 'vitest';
import type { ReportData, RequirementCount } from '../../src/charts/report-data.ts';
import type { ResultColumn } from '../../src/core/evaluate/result-columns.ts';
import type { Study } from '../../src/core/study/study.ts';
import { easedLimit, requirementClause } from '../../src/page/wording.ts';
import { inventedReport } from '../charts/invented-report.ts';

const data = inventedReport();
const required = (metric: string) => data.requirements.find((each) => each.metric === metric) as RequirementCount;

function clause(requirement: RequirementCount, report: ReportData = data): string {
  const { before, limit, after } = requirementClause(requirement, report);
  return `${before}${limit}${after}`.replaceAll('\u202f', ' ');
}

function withFigures(figures: Readonly<Record<string, number>>, units: 'SI' | 'US' = 'SI'): ReportData {
  const study: Study = { ...data.study, values: { ...data.study.values, ...figures }, report: { units } };
  return { ...data, study };
}

describe('a requirement in words', () => {
  it('names the trailer beside the load', () => {
    expect(clause(required('ramp.grade'), withFigures({ 'trials.ramp.trailer.mass': 1500 }))).toBe(
      'start on 20 % or steeper laden to 2800 kg with a trailer of 1500 kg (ramp)',
    );
    const { 'trials.ramp.laden': _, ...values } = data.study.values;
    const unladen = { ...data, study: { ...data.study, values: { ...values, 'trials.ramp.payload': 300, 'trials.ramp.trailer.mass': 1500 } } };
    expect(clause(required('ramp.grade'), unladen)).toBe('start on 20 % or steeper with 300 kg on board and a trailer of 1500 kg (ramp)');
  });

  it('speaks the units of the study', () => {
    expect(clause(required('sprint.time'), withFigures({}, 'US'))).toBe('go from 0 mph to 49.7 mph within 11.5 s laden to 6172.9 lb (sprint)');
  });

  it('does not take the payload of a hill start for its grade', () => {
    const payload: ResultColumn = {
      ...(data.columns.find(({ name }) => name === 'ramp.grade') as ResultColumn),
      key: 'ramp.payload_kg',
      name: 'ramp.payload',
      quantity: 'mass',
      decimals: 0,
      label: 'ramp: payload',
    };
    const asked = { ...required('ramp.grade'), metric: 'ramp.payload', limit: 900 };
    expect(clause(asked, { ...data, columns: [...data.columns, payload] })).toBe('have at least 900 kg payload in ramp');
  });
});

describe('an eased limit', () => {
  const shown = (value: number, bound: 'atLeast' | 'atMost', metric: string) =>
    easedLimit(value, { bound }, data.columns.find(({ name }) => name === metric) as ResultColumn, data.study).replaceAll('\u202f', ' ');

  it('is written with a decimal more where it needs one, rounded so that it lets the design pass', () => {
    expect(shown(0.199_67, 'atLeast', 'ramp.grade')).toBe('19.96 %');
    expect(shown(11.5031, 'atMost', 'sprint.time')).toBe('11.504 s');
  });

  it('has no decimals that say nothing', () => {
    expect(shown(0.25, 'atLeast', 'ramp.grade')).toBe('25.0 %');
    expect(shown(7.5, 'atMost', 'sprint.time')).toBe('7.50 s');
  });
});
