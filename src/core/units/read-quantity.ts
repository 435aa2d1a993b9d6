/** Text of a study file -> number in SI: one figure with its unit, in every usual spelling; anything else is answered with what to write instead. */
import { nearestName } from './nearest-name.ts';
import { type Quantity, quantities, quantityRow, toSi, type Unit } from './units.ts';

/** A figure as read. */
export interface ReadFigure {
  readonly ok: true;
  /** SI. */
  readonly value: number;
  /** As written, in `unit`. */
  readonly written: number;
  readonly unit: Unit;
}

/** Why a text is no figure of its quantity: noun phrases for 'expected' and 'found', and a sentence that says what to do (may be empty). */
export interface FigureProblem {
  readonly ok: false;
  readonly expected: string;
  readonly found: string;
  readonly hint: string;
}

const THIN_SPACES = '\\u2009\\u202f\\u00a0';
/** Digits, with thin or no-break spaces between groups of three as this program prints them, a decimal point, an exponent. */
const FIGURE = new RegExp(`^([+\\-\\u2212]?)(\\d+(?:[${THIN_SPACES}]\\d{3}(?!\\d))*(?:\\.\\d*)?|\\.\\d+)((?:[eE][+\\-\\u2212]?\\d+)?)(.*)$`, 'su');

/** One spelling per unit: white space gone, products without a sign, `^2` and `2` as `²`, ohm, degree and minus signs as one. */
export function foldUnit(text: string): string {
  return text
    .normalize('NFC')
    .replace(/\s/gu, '')
    .replace(/\u2212/gu, '-')
    .replace(/[º˚]/gu, '°')
    .replace(/℃/gu, '°C')
    .replace(/℉/gu, '°F')
    .replace(/\u207b\u00b9/gu, '^-1')
    .replace(/(?<=[\p{L}°])[-.](?=\p{L})/gu, '·')
    .replace(/\*\*/gu, '^')
    .replace(/(?<=[\p{L})])\^?2(?!\d)/gu, '²')
    .replace(/(?<=[\p{L})])\^?3(?!\d)/gu, '³')
    .replace(/[*×⋅∙•·]/gu, '')
    .replace(/\((\p{L}+)\)/gu, '$1');
}

const foldedUnits = new Map<Quantity, ReadonlyMap<string, Unit>>(
  (Object.keys(quantities) as Quantity[]).map((quantity) => [quantity, foldedUnitsOf(quantityRow(quantity).units)]),
);

function foldedUnitsOf(units: readonly Unit[]): ReadonlyMap<string, Unit> {
  return new Map(units.flatMap((unit) => [unit.symbol, ...unit.spellings].map((spelling): [string, Unit] => [foldUnit(spelling), unit])));
}

/**
 * Reads one figure: `1780 kg`, `270 N*m`, `2.1e-6 s²/m²`, `−7 °C`. Only pure numbers and money go without a unit.
 * Errors come back as `ok: false`; nothing is guessed (no decimal comma, no separators but thin or no-break spaces, no other case of letters).
 */
export function readQuantity(text: string, quantity: Quantity): ReadFigure | FigureProblem {
  const trimmed = text.trim();
  const parts = FIGURE.exec(trimmed);
  if (parts === null) return noFigure(trimmed, quantity);
  const [, sign, digits, exponent, rest] = parts as unknown as [string, string, string, string, string];
  const written = Number(`${sign}${digits}${exponent}`.replace(/\s/gu, '').replaceAll('\u2212', '-'));
  const unit = foldedUnits.get(quantity)?.get(foldUnit(rest));
  if (unit === undefined) return wrongUnit(trimmed, `${sign}${digits}${exponent}`, rest.trim(), quantity);
  const value = toSi(written, unit);
  if (!Number.isFinite(value)) return problem(quantity, `${trimmed}, which is beyond every number`, '');
  return { ok: true, value, written, unit };
}

function problem(quantity: Quantity, found: string, hint: string): FigureProblem {
  return { ok: false, expected: expectedFigure(quantity), found, hint };
}

/** What a study file must write for a quantity: `a mass in kg, t or lb`. */
export function expectedFigure(quantity: Quantity): string {
  const { noun, units } = quantityRow(quantity);
  const article = /^[aeiou]/u.test(noun) ? 'an' : 'a';
  if (units[0]?.symbol === '') return quantity === 'money' ? 'a plain number: money carries no unit' : 'a plain number';
  const symbols = units.map((unit) => unit.symbol);
  const last = symbols.pop() as string;
  return `${article} ${noun} in ${symbols.length === 0 ? last : `${symbols.join(', ')} or ${last}`}`;
}

function example(number: string, quantity: Quantity): string {
  const symbol = quantityRow(quantity).units[0]?.symbol ?? '';
  return symbol === '' ? number : `${number} ${symbol}`;
}

/** Texts that do not start with a number. */
function noFigure(text: string, quantity: Quantity): FigureProblem {
  if (text === '') return problem(quantity, 'nothing', 'Write the figure after the colon, or remove the line.');
  if (/^(yes|no|true|false|on|off|null|none|~)$/iu.test(text)) return problem(quantity, `the word ${text}`, 'Write a number, or remove the line.');
  if (/^[+-]?\.?(inf|infinity|nan)$/iu.test(text)) return problem(quantity, text, 'Write a finite number.');
  if (/^[<>≤≥~≈]/u.test(text)) return problem(quantity, clip(text), `Write the number alone, without ${text[0]}.`);
  if (/^[€$£]/u.test(text)) return problem(quantity, clip(text), 'Leave the currency sign out; massAndCost.cost.currency names the currency once.');
  return problem(quantity, clip(text), `Write a number first, such as ${example('1', quantity)}.`);
}

/** Texts that start with a number but do not go on with a unit of the quantity. */
function wrongUnit(text: string, number: string, rest: string, quantity: Quantity): FigureProblem {
  const hint = separatorHint(text, number, rest);
  if (hint !== null) return problem(quantity, clip(text), hint);
  if (rest === '') return problem(quantity, `${number} without a unit`, missingUnitHint(number, quantity));
  if (quantityRow(quantity).units[0]?.symbol === '') return problem(quantity, clip(text), unitOnPlainNumber(number, rest, quantity));
  const owner = ownerOf(rest);
  if (owner !== null)
    return problem(quantity, `${clip(text)}: ${clip(rest)} is a unit of ${owner}`, `Check which figure belongs here; write it in ${unitList(quantity)}.`);
  return problem(quantity, `${clip(text)}: ${clip(rest)} is no unit known here`, unknownUnitHint(number, rest, quantity));
}

function unknownUnitHint(number: string, rest: string, quantity: Quantity): string {
  if (quantity === 'grade' && /^(°|deg)/u.test(rest)) return 'Write the rise over the run in percent: 100 % is 45°.';
  const perUnit = /^[^/\d\s]{1,4}\s*(\/.+)$/u.exec(rest)?.[1] ?? '';
  const rate = foldedUnits.get(quantity)?.get(foldUnit(perUnit));
  if (quantity.startsWith('money') && rate !== undefined) return `Write ${number} ${rate.symbol}; massAndCost.cost.currency names the currency once.`;
  const near = unitMeant(rest, quantity);
  return near === null ? `Write it in ${unitList(quantity)}.` : `Did you mean ${number} ${near}?`;
}

/** The unit most likely misspelt. Not one that another prefix makes (kV for V) nor one for a single letter: the figure would be another. */
function unitMeant(rest: string, quantity: Quantity): string | null {
  const near = nearestName(
    rest,
    quantityRow(quantity).units.flatMap((unit) => [unit.symbol, ...unit.spellings]),
  );
  if (near === null || near.toLowerCase() === rest.toLowerCase()) return near;
  const bare = (unit: string) => unit.replace(/^[µumcdhkMG](?=.)/u, '');
  const sameBut = [rest, bare(rest)].some((unit) => unit === near || unit === bare(near));
  return rest.length === 1 || sameBut ? null : near;
}

function missingUnitHint(number: string, quantity: Quantity): string {
  const value = Number(number.replaceAll('\u2212', '-'));
  if (quantity === 'share' && value > 0 && value <= 1) return `A share is written in percent: write ${Number((value * 100).toPrecision(12))} %.`;
  return `Add the unit, such as ${example(number, quantity)}.`;
}

function unitOnPlainNumber(number: string, rest: string, quantity: Quantity): string {
  if (quantity === 'money') return `Leave ${clip(rest)} out; massAndCost.cost.currency names the currency once.`;
  if (rest === '%') return `Write the plain number: ${Number((Number(number) / 100).toPrecision(12))}.`;
  return `Leave ${clip(rest)} out: write ${number}.`;
}

/** The slips of notation that leave a number cut off in the middle. */
function separatorHint(text: string, number: string, rest: string): string | null {
  const groups = /^[+-]?\d{1,3}(?:[,'_’ ]\d{3})+(?!\d)/u.exec(text)?.[0];
  if (groups !== undefined) {
    const plain = text.replace(groups, groups.replace(/[,'_’ ]/gu, ''));
    const decimal = groups.includes(',') && !text.includes('.') ? `; if the comma is a decimal sign, write ${text.replace(',', '.')}` : '';
    return `Numbers go without separators between thousands: write ${plain}${decimal}.`;
  }
  if (/^,\d/u.test(rest) && number.includes('.'))
    return `The decimal sign is a point, and nothing separates thousands: write ${text.replaceAll('.', '').replace(',', '.')}.`;
  if (/^,\d/u.test(rest)) return `The decimal sign is a point: write ${text.replace(',', '.')}.`;
  if (/^['_’]\d/u.test(rest)) return `Numbers go without separators: write ${text.replace(/['_’]/gu, '')}.`;
  if (/^[·*×x]\s*10\s*(\^|\*\*|⁻|[¹²³⁴-⁹])?/u.test(rest) && /10/u.test(rest)) return `Powers of ten are written with an e, such as ${number}e-4.`;
  if (/^[-/.:]\d+([-/.:]\d+)+/u.test(rest)) return 'This reads as a date or a time; write one number with its unit.';
  if (/^\d/u.test(rest)) return 'Write one number here; several to try stand under vary, as oneOf: [ … ].';
  if (/^(-|–|\.\.|to\s)\s*\d/u.test(rest)) return 'Write one number here; a range stands under vary, with from and to.';
  if (/^\/\s*\d/u.test(rest) && !/^\/100/u.test(rest)) return 'Write the fraction as a decimal number.';
  return null;
}

function unitList(quantity: Quantity): string {
  return expectedFigure(quantity).replace(/^.* in /u, '');
}

/** Noun of the first other quantity that has this unit. */
function ownerOf(unitText: string): string | null {
  const folded = foldUnit(unitText);
  if (folded === '') return null;
  for (const [quantity, units] of foldedUnits) if (units.has(folded)) return quantityRow(quantity).noun;
  return null;
}

function clip(text: string): string {
  return text.length <= 40 ? text : `${text.slice(0, 39)}…`;
}
