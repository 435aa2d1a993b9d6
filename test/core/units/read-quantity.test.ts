/** Figures from text: every usual spelling is read, everything else is answered with what to write. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readQuantity } from '../../../src/core/units/read-quantity.ts';
import type { Quantity } from '../../../src/core/units/units.ts';

function si(text: string, quantity: Quantity): number {
  const read = readQuantity(text, quantity);
  return read.ok ? read.value : Number.NaN;
}

function hint(text: string, quantity: Quantity): string {
  const read = readQuantity(text, quantity);
  return read.ok ? 'read' : `${read.found} | ${read.hint}`;
}

describe('a figure', () => {
  it.each(['270 N·m', '270 N*m', '270 Nm', '270 N.m', '270 N⋅m', '270N·m', ' 270\u202fN·m ', '270\u00a0N m', '+270 N-m', '2.7e2 N·m', '0.27E+3 Nm'])(
    'reads %j as 270 newton metres',
    (text) => {
      expect(si(text, 'torque')).toBe(270);
    },
  );

  it.each<[string, Quantity, number]>([
    ['1.12 m^2', 'area', 1.12],
    ['1.12 m2', 'area', 1.12],
    ['1.12 m**2', 'area', 1.12],
    ['2.1e-6 s^2/m^2', 'perSpeedSquared', 2.1e-6],
    ['0.03 N/(km/h)^2', 'forcePerSpeedSquared', 0.03 * 12.96],
    ['0.03 N/(km/h)2', 'forcePerSpeedSquared', 0.03 * 12.96],
    ['0.14 kg/(N*m)', 'massPerTorque', 0.14],
    ['0.14 kg/Nm', 'massPerTorque', 0.14],
    ['2.4 /(N·m)', 'moneyPerTorque', 2.4],
    ['2.4/Nm', 'moneyPerTorque', 2.4],
    ['5 kg·m²', 'inertia', 5],
    ['1.5e-4 kg*m^2/(N*m)', 'inertiaPerTorque', 1.5e-4],
    ['0.09 Ω', 'resistance', 0.09],
    ['0.09 \u2126', 'resistance', 0.09],
    ['0.09 Ohm', 'resistance', 0.09],
    ['\u22127 °C', 'temperature', 266.15],
    ['-7 degC', 'temperature', 266.15],
    ['20 ℃', 'temperature', 293.15],
    ['250 ft-lb', 'torque', 250 * 4.4482216152605 * 0.3048],
    ['12\u202f400\u202frpm', 'rotationalSpeed', (12400 * 2 * Math.PI) / 60],
    ['100 min⁻¹', 'rotationalSpeed', (100 * 2 * Math.PI) / 60],
    ['0.0098', 'number', 0.0098],
    ['.5', 'number', 0.5],
    ['150', 'money', 150],
  ])('reads %j as %s', (text, quantity, value) => {
    expect(si(text, quantity)).toBeCloseTo(value, 12);
  });

  it.each<[string, Quantity, string]>([
    ['17,8 kg', 'mass', 'write 17.8 kg'],
    ['1,780 kg', 'mass', 'write 1780 kg'],
    ["1'780 kg", 'mass', 'write 1780 kg'],
    ['1_780 kg', 'mass', 'write 1780 kg'],
    ['12 000 kg', 'mass', 'write 12000 kg'],
    ['1780', 'mass', 'such as 1780 kg'],
    ['0.97', 'share', 'write 97 %'],
    ['0.98 %', 'number', 'plain number: 0.0098'],
    ['150 EUR', 'money', 'Leave EUR out'],
    ['€150', 'money', 'currency'],
    ['1780 KG', 'mass', 'Did you mean 1780 kg?'],
    ['60 MPH', 'speed', 'Did you mean 60 mph?'],
    ['1780 kW', 'mass', 'a unit of power'],
    ['1.5×10^-4', 'number', '1.5e-4'],
    ['2026-01-02', 'mass', 'a date'],
    ['10-20 kg', 'mass', 'range stands under vary'],
    ['1/3', 'number', 'decimal number'],
    ['yes', 'mass', 'the word yes'],
    ['.inf', 'mass', 'finite'],
    ['~', 'mass', 'the word ~'],
    ['about 5 kg', 'mass', 'number first'],
    ['< 5 kg', 'mass', 'without <'],
    ['', 'mass', 'nothing'],
    ['1e400 kg', 'mass', 'beyond every number'],
    ['1.2.3 kg', 'mass', 'kg, t or lb'],
    ['1.450,5 kg', 'mass', 'write 1450.5 kg'],
    ['9.2 9.4', 'number', 'one number here'],
    ['10°', 'grade', 'in percent'],
    ['2.4 EUR/Nm', 'moneyPerTorque', 'Write 2.4 /(N·m)'],
    ['4.6 €/kW', 'moneyPerPower', 'Write 4.6 /kW'],
  ])('answers %j as %s with what to write', (text, quantity, part) => {
    expect(hint(text, quantity)).toContain(part);
  });

  it.each<[string, Quantity]>([
    ['0.36 kV', 'voltage'],
    ['0.19 kN·m', 'torque'],
    ['12 krpm', 'rotationalSpeed'],
    ['0.11 MW', 'power'],
    ['8200 cm²', 'area'],
    ['1450000 g', 'mass'],
  ])('offers no other power of ten for %j as %s', (text, quantity) => {
    expect(hint(text, quantity)).toMatch(/\| Write it in /u);
  });

  it('never takes the milliohm for the megaohm or joule for kilojoule: letters keep their case', () => {
    expect(hint('5 MΩ', 'resistance')).not.toBe('read');
    expect(hint('5 mJ', 'energy')).not.toBe('read');
  });

  it('is never read from a text without digits, and never throws', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), (text) => {
        const read = readQuantity(text, 'mass');
        if (!/\d/u.test(text)) expect(read.ok).toBe(false);
        if (read.ok) expect(Number.isFinite(read.value)).toBe(true);
        else expect(read.found.length).toBeLessThan(160);
      }),
    );
  });

  it('comes back with the bits it was written with', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e12, max: 1e12 }), (value) => {
        expect(si(`${value} kg`, 'mass') === value).toBe(true);
      }),
    );
  });
});
