/** The schema for editors knows every name of the catalogue, and accepts what the check accepts. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { parameters } from '../../../src/core/study/catalogue/parameters.ts';
import { studyJsonSchema } from '../../../src/core/study/schema.ts';
import { starterStudy } from '../../../src/core/study/starter.ts';
import { edited, harbour } from './study-from-disk.ts';

type Json = null | boolean | number | string | Json[] | { [key: string]: Json };
type Schema = { [key: string]: Json };

const worked = new URL('../../../studies/', import.meta.url);

const schema = JSON.parse(JSON.stringify(studyJsonSchema())) as Schema;

/** A plain validator of the keywords that the schema uses; throws on a keyword it does not know, so that none is passed over. */
function problems(value: Json, at: Schema, path: string): string[] {
  return Object.entries(at).flatMap(([keyword, wanted]) => {
    const rule = rules[keyword];
    if (rule === undefined) throw new Error(`keyword ${keyword}`);
    return rule(value, wanted as never, path, at);
  });
}

const isObject = (value: Json): value is { [key: string]: Json } => typeof value === 'object' && value !== null && !Array.isArray(value);
const typeOf = (value: Json) => (Array.isArray(value) ? 'array' : isObject(value) ? 'object' : Number.isInteger(value) ? 'integer' : typeof value);
const fails = (failed: boolean, message: string) => (failed ? [message] : []);
const silent = () => [];

const rules: Record<string, (value: Json, wanted: never, path: string, at: Schema) => string[]> = {
  $schema: silent,
  $defs: silent,
  title: silent,
  description: silent,
  $ref: (value, wanted: string, path) => problems(value, (schema['$defs'] as Schema)[wanted.replace('#/$defs/', '')] as Schema, path),
  type: (value, wanted: string | string[], path) => {
    const types = [wanted].flat();
    return fails(!types.includes(typeOf(value)) && !(typeOf(value) === 'integer' && types.includes('number')), `${path}: ${typeOf(value)}, not ${types}`);
  },
  properties: (value, wanted: Schema, path) =>
    isObject(value)
      ? Object.entries(value).flatMap(([key, inner]) => (Object.hasOwn(wanted, key) ? problems(inner, wanted[key] as Schema, `${path}.${key}`) : []))
      : [],
  patternProperties: silent,
  additionalProperties: (value, wanted: boolean | Schema, path, at) => {
    if (!isObject(value)) return [];
    const patterns = Object.keys((at['patternProperties'] ?? {}) as Schema).map((text) => new RegExp(text, 'u'));
    const others = Object.keys(value).filter(
      (key) => !Object.hasOwn((at['properties'] ?? {}) as Schema, key) && !patterns.some((pattern) => pattern.test(key)),
    );
    return others.flatMap((key) =>
      wanted === false ? [`${path}.${key}: unknown`] : wanted === true ? [] : problems(value[key] as Json, wanted, `${path}.${key}`),
    );
  },
  propertyNames: (value, wanted: Schema, path) => (isObject(value) ? Object.keys(value).flatMap((key) => problems(key, wanted, path)) : []),
  required: (value, wanted: string[], path) =>
    isObject(value) ? wanted.filter((key) => !Object.hasOwn(value, key)).map((key) => `${path}.${key}: missing`) : [],
  minProperties: (value, wanted: number, path) => fails(isObject(value) && Object.keys(value).length < wanted, `${path}: too few`),
  anyOf: (value, wanted: Schema[], path) => fails(!wanted.some((one) => problems(value, one, path).length === 0), `${path}: no alternative fits`),
  not: (value, wanted: Schema, path) => fails(problems(value, wanted, path).length === 0, `${path}: excluded`),
  enum: (value, wanted: Json[], path) => fails(!wanted.includes(value), `${path}: ${String(value)}`),
  const: (value, wanted: Json, path) => fails(value !== wanted, `${path}: ${String(value)}`),
  pattern: (value, wanted: string, path) => fails(typeof value === 'string' && !new RegExp(wanted, 'u').test(value), `${path}: ${String(value)}`),
  maxLength: (value, wanted: number, path) => fails(typeof value === 'string' && value.length > wanted, `${path}: too long`),
  minimum: (value, wanted: number, path) => fails(typeof value === 'number' && value < wanted, `${path}: too small`),
  maximum: (value, wanted: number, path) => fails(typeof value === 'number' && value > wanted, `${path}: too large`),
  minItems: (value, wanted: number, path) => fails(Array.isArray(value) && value.length < wanted, `${path}: too short`),
  items: (value, wanted: false | Schema, path, at) => {
    const first = ((at['prefixItems'] ?? []) as Json[]).length;
    const others = Array.isArray(value) ? value.slice(first) : [];
    return others.flatMap((item) => (wanted === false ? [`${path}: too long`] : problems(item, wanted, path)));
  },
  prefixItems: (value, wanted: Schema[], path) =>
    Array.isArray(value) ? wanted.flatMap((one, index) => (index < value.length ? problems(value[index] as Json, one, path) : [])) : [],
};

function answer(text: string): string[] {
  return problems(parse(text) as Json, schema, 'study');
}

describe('the schema of study files', () => {
  it('accepts the starter study and the harbour parcel van', () => {
    expect(answer(starterStudy())).toEqual([]);
    expect(answer(harbour)).toEqual([]);
    expect(answer(edited(harbour, ['ratio: 9.5', 'ratios: [11.2, 6.4]'], ['efficiency: 97 %', 'efficiency: [97 %, 98 %]']))).toEqual([]);
  });

  it.each(readdirSync(worked).filter((name) => name.endsWith('.yaml')))('accepts the worked study %s', (name) => {
    expect(answer(readFileSync(new URL(name, worked), 'utf8'))).toEqual([]);
  });

  it('accepts searches that draw designs, from whole ranges too', () => {
    expect(answer(edited(harbour, ['to: 12.25, steps: 20', 'to: 12.25'], ['{ method: grid }', '{ method: sobol, designs: 5000 }']))).toEqual([]);
    expect(answer(edited(harbour, ['{ method: grid }', '{ method: random, designs: 5000, seed: 12 }']))).toEqual([]);
  });

  it.each<[string, [string, string]]>([
    ['an unknown name', ['kerbMass:', 'kerbmass:']],
    ['a unit that is missing', ['kerbMass: 1780 kg', 'kerbMass: 1780']],
    ['an unknown kind', ['kind: top speed', 'kind: topspeed']],
    ['a grade on a hill start', ['kind: hill start, laden', 'kind: hill start, grade: 3 %, laden']],
    ['a missing motor', ['motor:\n', 'engine:\n']],
    ['a range without its end', ['to: 12.25, steps: 20', 'steps: 20']],
    ['a sample without its size', ['{ method: grid }', '{ method: sobol }']],
    ['a grid with a size', ['{ method: grid }', '{ method: grid, designs: 100 }']],
    ['more designs than there are numbers', ['{ method: grid }', '{ method: random, designs: 4000000001 }']],
    ['a method that is to come', ['{ method: grid }', '{ method: genetic, designs: 100 }']],
    ['a word for the driven axle', ['driven: front', 'driven: fore']],
    ['three ratios', ['ratio: 9.5', 'ratios: [12, 9, 6]']],
  ])('flags %s', (_, edit) => {
    expect(answer(edited(harbour, edit))).not.toEqual([]);
  });

  const offer = `options:
  motor on offer:
    - { name: slow-wound, set: { motor.peakTorque: 310 N·m, motor.map: { file: map.csv, peakTorque: 310 N·m } } }
    - { name: 7, set: { trials.ramp.laden: 2600 kg, gearing.ratios: [11.2, 6.4], vehicle.tyre: 205/65 R16 } }
    - { name: as drawn }
  inverter: inverters.csv
  body: { file: bodies.csv }
`;

  it('accepts options and pairs of ratios', () => {
    expect(answer(harbour + offer)).toEqual([]);
    const pair = edited(harbour, ['gearing.ratio:    { from: 7.5, to: 12.25, steps: 20 }', 'gearing.ratios: { oneOf: [[11.2, 6.4], [12, 7]] }']);
    expect(answer(pair)).toEqual([]);
  });

  it.each<[string, [string, string]]>([
    ['a figure without its unit', ['310 N·m, motor.map', '310, motor.map']],
    ['an unknown name', ['motor.peakTorque', 'motor.peekTorque']],
    ['an option without a name', ['{ name: as drawn }', '{ set: {} }']],
    ['an unknown key', ['{ name: as drawn }', '{ name: as drawn, sets: {} }']],
    ['a list name with a dot', ['motor on offer:', 'motor.offer:']],
  ])('flags in options %s', (_, edit) => {
    expect(answer(harbour + edited(offer, edit))).not.toEqual([]);
  });

  it('describes every number of the catalogue, with its unit', () => {
    const text = JSON.stringify(schema);
    for (const row of parameters) expect(text).toContain(row.sentence.replaceAll('"', '\\"'));
    expect(text).toContain('a mass in kg, t or lb');
  });
});
