import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { columnPhrase, columnWords, differenceText, givenText, neededDecimals, valueText } from '../../src/charts/figure-words.ts';
import type { ResultColumn } from '../../src/core/evaluate/result-columns.ts';
import { inventedReport } from './invented-report.ts';

const { study, columns } = inventedReport();
const column = (name: string) => columns.find((candidate) => candidate.name === name) as ResultColumn;
const plain = (text: string) => text.replaceAll('\u202f', ' ');

describe('columns in words', () => {
  it('name the trial after the measure', () => {
    expect(columnPhrase(column('stops.batteryEnergy'), study)).toBe('battery energy in stops');
    expect(columnPhrase(column('driveUnit.cost'), study)).toBe('drive unit cost');
    expect(columnPhrase(column('gearing.ratio'), study)).toBe('ratio');
  });

  it('know a varied figure of a trial', () => {
    const laden: ResultColumn = { ...column('gearing.ratio'), name: 'trials.ramp.laden', key: 'trials.ramp.laden_kg', label: 'ramp.laden', quantity: 'mass' };
    expect(columnWords(laden, study)).toEqual({ measure: 'laden', trial: 'ramp' });
  });
});

describe('figures in words', () => {
  it('give inputs in no more decimals than they need, metrics in theirs', () => {
    expect(plain(valueText(9.5, column('gearing.ratio'), study))).toBe('9.5');
    expect(plain(valueText((4300 * 2 * Math.PI) / 60, column('motor.baseSpeed'), study))).toBe('4300 rpm');
    expect(plain(valueText(3.6 * 185, column('stops.batteryEnergy'), study))).toBe('185.0 Wh/km');
    expect(plain(valueText(1804.4, column('driveUnit.cost'), study))).toBe('1804 EUR');
    expect(valueText(null, column('driveUnit.cost'), study)).toBe('—');
  });

  it('name the currency of money, and of money per something', () => {
    expect(plain(givenText(2.4, { quantity: 'moneyPerTorque', decimals: 2 }, study))).toBe('2.4 EUR/(N·m)');
    expect(plain(givenText(4.6e-3, { quantity: 'moneyPerPower', decimals: 2 }, study))).toBe('4.6 EUR/kW');
    expect(plain(givenText(4.6e-3, { quantity: 'moneyPerPower', decimals: 2 }, { ...study, currency: null }))).toBe('4.6 /kW');
  });

  it('never show a difference as none', () => {
    expect(plain(differenceText(0.00004, column('sprint.time'), study))).toBe('0.00004 s');
    expect(plain(differenceText(-0.021, column('ramp.grade'), study))).toBe('2.1 %-points');
    fc.assert(
      fc.property(fc.double({ min: 1e-9, max: 1e6, noNaN: true }), (difference) => {
        expect(differenceText(difference, column('sprint.time'), study)).toMatch(/[1-9]/u);
      }),
    );
  });

  it('need at most the usual decimals', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 1e5, noNaN: true }), (value) => {
        expect(neededDecimals(value, column('gearing.ratio'), study)).toBeLessThanOrEqual(3);
      }),
    );
  });

  it('stand in US customary units where the study asks for them, in decimals that tell as much', () => {
    const us = { ...study, report: { units: 'US' } } as const;
    expect(plain(valueText(3.6 * 185, column('stops.batteryEnergy'), us))).toBe('297.7 Wh/mi');
    expect(plain(valueText(270, column('motor.peakTorque'), us))).toBe('199 lbf·ft');
    expect(plain(valueText((4300 * 2 * Math.PI) / 60, column('motor.baseSpeed'), us))).toBe('4300 rpm');
    expect(plain(differenceText(3.6 * 2, column('stops.batteryEnergy'), us))).toBe('3.2 Wh/mi');
    expect(plain(givenText(0.85, { quantity: 'area', decimals: 3 }, us))).toBe('9.149 ft²');
    expect(plain(givenText(60 * 0.44704, { quantity: 'speed', decimals: 0 }, us))).toBe('60 mph');
  });
});
