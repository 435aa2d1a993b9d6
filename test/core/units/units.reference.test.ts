/**
 * Conversions against their definitions: the international yard and pound agreement of 1959 (yard 0.9144 m, pound 0.45359237 kg, from memory),
 * standard gravity 9.80665 m/s² (3rd CGPM, 1901, from memory), horsepower as the study file states it, temperatures by definition.
 */
import { describe, expect, it } from 'vitest';
import { readQuantity } from '../../../src/core/units/read-quantity.ts';
import type { Quantity } from '../../../src/core/units/units.ts';

const defined: readonly (readonly [text: string, quantity: Quantity, si: number])[] = [
  ['1 lb', 'mass', 0.45359237],
  ['1 t', 'mass', 1000],
  ['1 ft', 'length', 0.3048],
  ['1 in', 'length', 0.0254],
  ['1 mi', 'distance', 1609.344],
  ['1 ft²', 'area', 0.09290304],
  ['36 km/h', 'speed', 10],
  ['60 mph', 'speed', 26.8224],
  ['1 lbf', 'force', 4.4482216152605],
  ['1 lbf·ft', 'torque', 4.4482216152605 * 0.3048],
  ['60 rpm', 'rotationalSpeed', 2 * Math.PI],
  ['1 lbf·ft·s', 'torquePerSpeed', 4.4482216152605 * 0.3048],
  ['1 lbf·ft/rpm', 'torquePerSpeed', (4.4482216152605 * 0.3048 * 60) / (2 * Math.PI)],
  ['1 lb/hp', 'massPerPower', 0.45359237 / 745.69987],
  ['1 hp', 'power', 745.69987],
  ['1 PS', 'power', 735.49875],
  ['1 kWh', 'energy', 3.6e6],
  ['100 Wh/km', 'energyPerDistance', 360],
  ['10 kWh/100km', 'energyPerDistance', 360],
  ['1 Wh/mi', 'energyPerDistance', 3600 / 1609.344],
  ['1 N/(km/h)', 'forcePerSpeed', 3.6],
  ['1 N/(km/h)²', 'forcePerSpeedSquared', 12.96],
  ['1 lbf/mph', 'forcePerSpeed', 4.4482216152605 / 0.44704],
  ['1 lbf/mph²', 'forcePerSpeedSquared', 4.4482216152605 / 0.44704 ** 2],
  ['20 °C', 'temperature', 293.15],
  ['32 °F', 'temperature', 273.15],
  ['212 °F', 'temperature', 373.15],
  ['0.002045 slug/ft³', 'density', 0.002045 * 515.3788183931961],
  ['97 %', 'share', 0.97],
];

describe('a unit of a study file', () => {
  it.each(defined)('%s as %s has its defined size', (text, quantity, si) => {
    const read = readQuantity(text, quantity);
    expect(read.ok).toBe(true);
    if (read.ok) expect(Math.abs(read.value - si)).toBeLessThanOrEqual(4e-15 * Math.abs(si));
  });
});
