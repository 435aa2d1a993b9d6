/**
 * The one table of units: what a study file may write, what a person reads, what the code computes in (SI).
 * A quantity is a kind of number (a mass, a slope); a unit belongs to one quantity and converts linearly to SI.
 */

/** One unit. SI value = (written value + offset) × factor ÷ divisor; both factors are exact or the defined conversion. */
export interface Unit {
  /** As people read it, with proper signs: `N·m`. */
  readonly symbol: string;
  /** Other accepted spellings; matching ignores white space. */
  readonly spellings: readonly string[];
  /** The same as a column suffix in machine output: `Nm`. Empty: no suffix. */
  readonly suffix: string;
  readonly factor: number;
  /** Kept apart from the factor so that decimal conversions (÷ 100, ÷ 3.6) round once. */
  readonly divisor: number;
  readonly offset: number;
}

/** One quantity: the units it may be written in; the first is the one people read, `us` where US customary readers expect another. */
export interface QuantityRow {
  readonly noun: string;
  readonly units: readonly Unit[];
  /** Symbol of the unit for `report: { units: US }`; the first unit where absent. */
  readonly us?: string;
  /** May the unit be left out? Only for pure numbers. */
  readonly bare?: boolean;
}

/** Standard pound, pound-force, foot and mile: exact by the international yard and pound agreement (1959). */
const POUND_KG = 0.45359237;
const FOOT_M = 0.3048;
const MILE_M = 1609.344;
const POUND_FORCE_N = POUND_KG * 9.80665;
const MPH_M_PER_S = 0.44704;
/** Mechanical horsepower, and the metric one (Pferdestärke, 75 kp·m/s): by the definitions of the study file. */
const HORSEPOWER_W = 745.69987;
const METRIC_HORSEPOWER_W = 735.49875;
/** One revolution per minute in rad/s is 2π/60. */
const REV_RAD = 2 * Math.PI;

function unit(symbol: string, suffix: string, factor = 1, more: Partial<Unit> = {}): Unit {
  return { symbol, suffix, factor, divisor: 1, offset: 0, spellings: [], ...more };
}

const percent = unit('%', 'pct', 1, { divisor: 100, spellings: ['percent', 'pct'] });

/** Every quantity of the study file and of the metrics. Torque accepts `N·m`, `Nm`, `N*m`; the text reader folds those signs. */
export const quantities = {
  number: { noun: 'number', bare: true, units: [unit('', '')] },
  share: { noun: 'share', bare: false, units: [percent] },
  grade: { noun: 'grade', units: [percent] },
  mass: { noun: 'mass', us: 'lb', units: [unit('kg', 'kg'), unit('t', 't', 1000), unit('lb', 'lb', POUND_KG, { spellings: ['lbs', 'lbm'] })] },
  length: {
    noun: 'length',
    us: 'in',
    units: [
      unit('m', 'm'),
      unit('mm', 'mm', 1, { divisor: 1000 }),
      unit('cm', 'cm', 1, { divisor: 100 }),
      unit('ft', 'ft', FOOT_M),
      unit('in', 'in', 0.0254, { spellings: ['inch'] }),
    ],
  },
  distance: {
    noun: 'distance',
    us: 'ft',
    units: [unit('m', 'm'), unit('km', 'km', 1000), unit('ft', 'ft', FOOT_M), unit('mi', 'mi', MILE_M, { spellings: ['mile', 'miles'] })],
  },
  range: { noun: 'distance', us: 'mi', units: [unit('km', 'km', 1000), unit('mi', 'mi', MILE_M, { spellings: ['mile', 'miles'] }), unit('m', 'm')] },
  area: { noun: 'area', us: 'ft²', units: [unit('m²', 'm2'), unit('ft²', 'ft2', FOOT_M * FOOT_M)] },
  speed: {
    noun: 'speed',
    us: 'mph',
    units: [
      unit('km/h', 'kmh', 1, { divisor: 3.6, spellings: ['kmh', 'kph'] }),
      unit('mph', 'mph', MPH_M_PER_S, { spellings: ['mi/h'] }),
      unit('m/s', 'm_per_s'),
    ],
  },
  acceleration: { noun: 'acceleration', us: 'ft/s²', units: [unit('m/s²', 'm_per_s2'), unit('ft/s²', 'ft_per_s2', FOOT_M)] },
  rotationalSpeed: {
    noun: 'rotational speed',
    units: [unit('rpm', 'rpm', REV_RAD, { divisor: 60, spellings: ['1/min', 'min^-1', 'r/min', 'rev/min'] }), unit('rad/s', 'rad_per_s')],
  },
  torque: {
    noun: 'torque',
    us: 'lbf·ft',
    units: [unit('N·m', 'Nm'), unit('lbf·ft', 'lbf_ft', POUND_FORCE_N * FOOT_M, { spellings: ['lb·ft', 'ft·lbf', 'ft·lb'] })],
  },
  force: { noun: 'force', us: 'lbf', units: [unit('N', 'N'), unit('kN', 'kN', 1000), unit('lbf', 'lbf', POUND_FORCE_N)] },
  forcePerSpeed: {
    noun: 'force per speed',
    us: 'lbf/mph',
    units: [
      unit('N/(km/h)', 'N_per_kmh', 3.6, { spellings: ['N/kmh', 'N/kph'] }),
      unit('N/(m/s)', 'N_per_m_per_s', 1, { spellings: ['N·s/m'] }),
      unit('lbf/mph', 'lbf_per_mph', POUND_FORCE_N / MPH_M_PER_S),
    ],
  },
  forcePerSpeedSquared: {
    noun: 'force per speed squared',
    us: 'lbf/mph²',
    units: [
      unit('N/(km/h)²', 'N_per_kmh2', 12.96, { spellings: ['N/kmh²', 'N/kph²'] }),
      unit('N/(m/s)²', 'N_per_m_per_s2', 1, { spellings: ['N·s²/m²'] }),
      unit('lbf/mph²', 'lbf_per_mph2', POUND_FORCE_N / (MPH_M_PER_S * MPH_M_PER_S)),
    ],
  },
  power: {
    noun: 'power',
    us: 'hp',
    units: [unit('kW', 'kW', 1000), unit('W', 'W'), unit('hp', 'hp', HORSEPOWER_W, { spellings: ['bhp'] }), unit('PS', 'PS', METRIC_HORSEPOWER_W)],
  },
  /** Electrical power is read in kW and W on both sides of the Atlantic. */
  batteryPower: {
    noun: 'power',
    units: [unit('kW', 'kW', 1000), unit('W', 'W'), unit('hp', 'hp', HORSEPOWER_W, { spellings: ['bhp'] }), unit('PS', 'PS', METRIC_HORSEPOWER_W)],
  },
  auxiliaryPower: {
    noun: 'power',
    units: [unit('W', 'W'), unit('kW', 'kW', 1000), unit('hp', 'hp', HORSEPOWER_W, { spellings: ['bhp'] }), unit('PS', 'PS', METRIC_HORSEPOWER_W)],
  },
  energy: { noun: 'energy', units: [unit('kWh', 'kWh', 3_600_000), unit('Wh', 'Wh', 3600), unit('MJ', 'MJ', 1e6), unit('kJ', 'kJ', 1000), unit('J', 'J')] },
  energyPerDistance: {
    noun: 'energy per distance',
    us: 'Wh/mi',
    units: [
      unit('Wh/km', 'Wh_per_km', 3.6),
      unit('kWh/100km', 'kWh_per_100km', 36),
      unit('Wh/mi', 'Wh_per_mi', 3600, { divisor: MILE_M, spellings: ['Wh/mile'] }),
      unit('kWh/km', 'kWh_per_km', 3600),
    ],
  },
  time: { noun: 'time', units: [unit('s', 's', 1, { spellings: ['sec'] }), unit('ms', 'ms', 1, { divisor: 1000 }), unit('min', 'min', 60)] },
  timeSquared: { noun: 'time squared', units: [unit('s²', 's2')] },
  perSpeedSquared: {
    noun: 'rise per speed squared',
    us: '1/mph²',
    units: [
      unit('s²/m²', 's2_per_m2', 1, { spellings: ['1/(m/s)²'] }),
      unit('1/(km/h)²', 'per_kmh2', 12.96, { spellings: ['h²/km²', '1/kmh²'] }),
      unit('1/mph²', 'per_mph2', 1 / (MPH_M_PER_S * MPH_M_PER_S), { spellings: ['h²/mi²'] }),
    ],
  },
  temperature: {
    noun: 'temperature',
    us: '°F',
    units: [
      unit('°C', 'C', 1, { offset: 273.15, spellings: ['C', 'degC'] }),
      unit('°F', 'F', 5, { divisor: 9, offset: 459.67, spellings: ['F', 'degF'] }),
      unit('K', 'K'),
    ],
  },
  density: {
    noun: 'density',
    us: 'lb/ft³',
    units: [
      unit('kg/m³', 'kg_per_m3'),
      unit('lb/ft³', 'lb_per_ft3', POUND_KG / (FOOT_M * FOOT_M * FOOT_M)),
      unit('slug/ft³', 'slug_per_ft3', POUND_FORCE_N / FOOT_M / (FOOT_M * FOOT_M * FOOT_M)),
    ],
  },
  inertia: {
    noun: 'moment of inertia',
    us: 'lb·ft²',
    units: [
      unit('kg·m²', 'kg_m2'),
      unit('g·m²', 'g_m2', 1, { divisor: 1000 }),
      unit('kg·cm²', 'kg_cm2', 1, { divisor: 10_000 }),
      unit('lb·ft²', 'lb_ft2', POUND_KG * FOOT_M * FOOT_M),
    ],
  },
  inertiaPerTorque: {
    noun: 'inertia per torque',
    us: 'lb·ft²/(lbf·ft)',
    units: [
      unit('kg·m²/(N·m)', 'kg_m2_per_Nm'),
      unit('g·m²/(N·m)', 'g_m2_per_Nm', 1, { divisor: 1000 }),
      unit('lb·ft²/(lbf·ft)', 'lb_ft2_per_lbf_ft', (POUND_KG * FOOT_M) / POUND_FORCE_N, { spellings: ['lb·ft²/(lb·ft)'] }),
    ],
  },
  lossPerTorque: {
    noun: 'loss per torque',
    us: 'W/(lbf·ft)',
    units: [unit('W/(N·m)', 'W_per_Nm'), unit('W/(lbf·ft)', 'W_per_lbf_ft', 1 / (POUND_FORCE_N * FOOT_M), { spellings: ['W/(lb·ft)'] })],
  },
  torquePerSpeed: {
    noun: 'torque per rotational speed',
    us: 'lbf·ft·s',
    units: [
      unit('N·m·s', 'Nms', 1, { spellings: ['N·m/(rad/s)', 'N·m·s/rad'] }),
      unit('N·m/rpm', 'Nm_per_rpm', 60, { divisor: REV_RAD }),
      unit('lbf·ft·s', 'lbf_ft_s', POUND_FORCE_N * FOOT_M, { spellings: ['lb·ft·s', 'lbf·ft/(rad/s)', 'lbf·ft·s/rad'] }),
      unit('lbf·ft/rpm', 'lbf_ft_per_rpm', 60 * POUND_FORCE_N * FOOT_M, { divisor: REV_RAD, spellings: ['lb·ft/rpm'] }),
    ],
  },
  voltage: { noun: 'voltage', units: [unit('V', 'V')] },
  resistance: {
    noun: 'resistance',
    units: [unit('Ω', 'Ohm', 1, { spellings: ['ohm', 'Ohm', 'ohms'] }), unit('mΩ', 'mOhm', 1, { divisor: 1000, spellings: ['mohm', 'mOhm'] })],
  },
  resistanceEnergy: { noun: 'resistance times energy', units: [unit('Ω·kWh', 'Ohm_kWh', 3_600_000, { spellings: ['ohm·kWh', 'Ohm·kWh'] })] },
  massPerTorque: {
    noun: 'mass per torque',
    us: 'lb/(lbf·ft)',
    units: [unit('kg/(N·m)', 'kg_per_Nm'), unit('lb/(lbf·ft)', 'lb_per_lbf_ft', POUND_KG / (POUND_FORCE_N * FOOT_M), { spellings: ['lb/(lb·ft)'] })],
  },
  massPerPower: {
    noun: 'mass per power',
    us: 'lb/hp',
    units: [unit('kg/kW', 'kg_per_kW', 1, { divisor: 1000 }), unit('lb/hp', 'lb_per_hp', POUND_KG / HORSEPOWER_W)],
  },
  massPerEnergy: {
    noun: 'mass per energy',
    us: 'lb/kWh',
    units: [unit('kg/kWh', 'kg_per_kWh', 1, { divisor: 3_600_000 }), unit('lb/kWh', 'lb_per_kWh', POUND_KG / 3_600_000)],
  },
  money: { noun: 'cost', bare: true, units: [unit('', '')] },
  moneyPerTorque: {
    noun: 'cost per torque',
    us: '/(lbf·ft)',
    units: [unit('/(N·m)', 'per_Nm'), unit('/(lbf·ft)', 'per_lbf_ft', 1 / (POUND_FORCE_N * FOOT_M), { spellings: ['/(lb·ft)'] })],
  },
  moneyPerPower: { noun: 'cost per power', us: '/hp', units: [unit('/kW', 'per_kW', 1, { divisor: 1000 }), unit('/hp', 'per_hp', 1 / HORSEPOWER_W)] },
  moneyPerEnergy: { noun: 'cost per energy', units: [unit('/kWh', 'per_kWh', 1, { divisor: 3_600_000 })] },
} as const satisfies Record<string, QuantityRow>;

/** A kind of number: a row of the table of quantities. */
export type Quantity = keyof typeof quantities;

/** The row of a quantity. */
export function quantityRow(quantity: Quantity): QuantityRow {
  return quantities[quantity];
}

/** The unit in which machine output gives a quantity, and people read it unless US units are asked for. */
export function machineUnit(quantity: Quantity): Unit {
  return quantityRow(quantity).units[0] as Unit;
}

/** The unit people read: `us` picks the US customary one where the trade there has another. */
export function readingUnit(quantity: Quantity, system: 'SI' | 'US'): Unit {
  const row = quantityRow(quantity);
  const wanted = system === 'US' && row.us !== undefined ? row.units.find((candidate) => candidate.symbol === row.us) : undefined;
  return wanted ?? (row.units[0] as Unit);
}

/** A number written in `unit`, in SI. */
export function toSi(written: number, unit: Unit): number {
  return ((written + unit.offset) * unit.factor) / unit.divisor;
}

/** An SI number, written in `unit`. */
export function fromSi(si: number, unit: Unit): number {
  return (si * unit.divisor) / unit.factor - unit.offset;
}
