/** The JSON Schema of study files, for editors: made from the layout and the catalogues, so that names, units and sentences are theirs. */
import { expectedFigure } from '../units/read-quantity.ts';
import { machineUnit, type Quantity, quantities, quantityRow } from '../units/units.ts';
import { type ParameterRow, parameters } from './catalogue/parameters.ts';
import { searchMethods } from './catalogue/search-methods.ts';
import { type TrialKind, trialKindRow, trialKinds } from './catalogue/trial-kinds.ts';
import { boundsText } from './read/bounds.ts';
import { type Place, studyLayout, trialLayout } from './read/layout.ts';
import { mostDesigns, mostSeed } from './read/read-search.ts';
import { needs } from './rules/rules.ts';
import type { Search } from './study.ts';

type Schema = Record<string, unknown>;

const sentences: Readonly<Record<string, string>> = {
  vehicle: 'The vehicle, without what massAndCost adds.',
  motor: 'Traction motor with its inverter.',
  gearing: 'What stands between motor and wheels: one ratio, or two with a shift.',
  battery: 'Traction battery at its terminals; without it nothing limits the power.',
  massAndCost: 'Masses and costs that follow the design.',
  air: 'Ambient air: temperature and altitude, or density.',
  report: 'How people read the results.',
};

/** The schema as plain JSON (draft 2020-12). Checks between numbers are beyond it; `layshaft check` makes them. */
export function studyJsonSchema(): object {
  const root = sectionSchema(studyLayout, freeSchemas);
  return { $schema: 'https://json-schema.org/draft/2020-12/schema', title: 'layshaft study', ...root, $defs: definitions() };
}

/** A figure of each quantity, an axis of each, and the numbers of the study by dotted name. */
function definitions(): Schema {
  const all = Object.keys(quantities) as Quantity[];
  const byQuantity = all.flatMap((quantity) => [
    [`figure.${quantity}`, figureDefinition(quantity)],
    [`axis.${quantity}`, axisDefinition(quantity)],
  ]);
  return { ...Object.fromEntries(byQuantity), numbers: numbersByName(figureSchema) };
}

function figureDefinition(quantity: Quantity): Schema {
  const figure = '^\\s*[-+−]?(\\d|\\.\\d)';
  return quantityRow(quantity).bare === true
    ? { type: ['number', 'string'], pattern: `${figure}\\S*\\s*$` }
    : { type: 'string', pattern: `${figure}.*\\D\\s*$` };
}

function axisDefinition(quantity: Quantity): Schema {
  const figure = { $ref: `#/$defs/figure.${quantity}` };
  const range = { type: 'object', additionalProperties: false, properties: { from: figure, to: figure, steps: { type: 'integer', minimum: 2 }, step: figure } };
  return {
    anyOf: [
      { ...range, required: ['from', 'to'] },
      { type: 'object', additionalProperties: false, properties: { oneOf: { type: 'array', items: figure, minItems: 1 } }, required: ['oneOf'] },
    ],
  };
}

function placeSchema(place: Place, free: Readonly<Record<string, Schema>>): Schema {
  if (place.free !== null) return { description: place.free.sentence, ...free[place.free.name] };
  const forms: Schema[] = [];
  if (place.parameter !== null) forms.push(figureSchema(place.parameter));
  if (place.text !== null) forms.push(textSchema(place));
  if (place.children.has('1')) forms.push(pairSchema(place));
  if (place.children.get('file')?.text) forms.push(textSchema(place.children.get('file') as Place));
  if ([...place.children.keys()].some((key) => !/^[12]$/u.test(key))) forms.push(sectionSchema(place, free));
  return forms.length === 1 ? (forms[0] as Schema) : { anyOf: forms };
}

function figureSchema(row: ParameterRow): Schema {
  const unit = machineUnit(row.quantity);
  const bounds = boundsText(row, unit);
  const said =
    row.default === undefined
      ? ''
      : ` Default ${boundsText({ ...row, atLeast: row.default, above: undefined, atMost: undefined, below: undefined }, unit).replace('at least ', '')}.`;
  const description = `${row.sentence} Write ${expectedFigure(row.quantity)}${bounds === '' ? '' : `, ${bounds}`}.${said}`;
  return { description, $ref: `#/$defs/figure.${row.quantity}` };
}

function textSchema({ text }: Place): Schema {
  const { sentence = '', choices, longest } = text ?? {};
  return {
    description: sentence,
    type: 'string',
    ...(choices === undefined ? {} : { enum: choices }),
    ...(longest === undefined ? {} : { maxLength: longest }),
  };
}

function pairSchema(place: Place): Schema {
  const items = ['1', '2'].map((key) => placeSchema(place.children.get(key) as Place, {}));
  return { type: 'array', prefixItems: items, items: false, minItems: 2 };
}

function sectionSchema(place: Place, free: Readonly<Record<string, Schema>>): Schema {
  const children = [...place.children].filter(([key]) => !/^[12]$/u.test(key));
  const properties = Object.fromEntries(children.map(([key, child]) => [key, placeSchema(child, free)]));
  const required = children.map(([key]) => key).filter((key) => isRequired(place.path === '' ? key : `${place.path}.${key}`));
  const description = sentences[place.path];
  return {
    type: 'object',
    ...(description === undefined ? {} : { description }),
    properties,
    additionalProperties: false,
    ...(required.length === 0 ? {} : { required }),
  };
}

/** A name without which no study is complete, or a section that holds one. */
function isRequired(name: string): boolean {
  return needs.some(({ names, when }) => when === undefined && names.every((needed) => needed === name || needed.startsWith(`${name}.`)));
}

function trialSchema(kind: TrialKind): Schema {
  const { properties, ...rest } = sectionSchema(trialLayout(kind), { with: { $ref: '#/$defs/numbers' } }) as { properties: Schema };
  const required = [
    'kind',
    ...trialKindRow(kind).takes.filter((key) => ['from', 'to', 'distance', 'at'].includes(key)),
    ...(kind === 'cycle' ? ['cycle'] : []),
  ];
  const { sentence } = trialKindRow(kind);
  return { ...rest, description: sentence, properties: { ...properties, kind: { const: kind, description: sentence } }, required };
}

function numbersByName(schemaOf: (row: ParameterRow) => Schema, more: Schema = {}): Schema {
  return { type: 'object', properties: Object.fromEntries(parameters.map((row) => [row.name, schemaOf(row)])), additionalProperties: false, ...more };
}

function methodSchema(method: Search['method']): Schema {
  const { sentence } = searchMethods[method];
  const of = (more: Schema, required: readonly string[]): Schema => ({
    type: 'object',
    description: sentence,
    properties: { method: { const: method, description: sentence }, ...more },
    required,
    additionalProperties: false,
  });
  if (method === 'grid') return of({}, ['method']);
  const designs = {
    type: 'integer',
    minimum: 1,
    maximum: mostDesigns,
    description: 'How many designs to draw. More of them later leave those before as they are.',
  };
  const seed = { type: 'integer', minimum: 0, maximum: mostSeed, description: 'Another seed draws other designs. Default 1.' };
  return of({ designs, seed }, ['method', 'designs']);
}

const metricName: Schema = { type: 'string', description: 'A metric: <trial>.<metric>, or one of the whole design.' };
const limit: Schema = { type: ['number', 'string'], description: 'A figure with the unit of the metric.' };

/** Names of which the file takes a list of two. */
const pairs: readonly string[] = parameters.flatMap(({ name }) => (name.endsWith('.1') ? [name.slice(0, -2)] : []));
const optionFile: Schema = { type: 'string', description: 'A CSV file with a row for each option: name,motor.peakTorque_Nm,motor.map' };

function objectOf(properties: Schema): Schema {
  return { type: 'object', properties, additionalProperties: false };
}

function withMore(schema: Schema, more: readonly (readonly [string, Schema])[]): Schema {
  return { ...schema, properties: { ...(schema['properties'] as Schema), ...Object.fromEntries(more) } };
}

/** Two numbers that vary together, or the one number that may stand for both. */
function pairAxisSchema(name: string): Schema {
  const together = { ...objectOf({ oneOf: { type: 'array', items: pairSchema(placeAt(name)), minItems: 1 } }), required: ['oneOf'] };
  const { parameter } = placeAt(name);
  return parameter === null ? together : { anyOf: [{ $ref: `#/$defs/axis.${parameter.quantity}` }, together] };
}

/** One option: any number by its dotted name, pairs as lists, and what is named by a file or a text. */
function optionSchema(): Schema {
  const own = [...pairs, 'motor.fullLoad', 'motor.map', 'vehicle.tyre'].map((name): [string, Schema] => [name, placeSchema(placeAt(name), {})]);
  const set = withMore({ ...numbersByName(figureSchema), patternProperties: { '^trials\\.': { type: ['string', 'number'] } } }, own);
  const name = { type: ['string', 'number'], description: 'What results call the option.' };
  return { ...objectOf({ name, set: { description: 'What it sets; the rest is as in the study.', ...set } }), required: ['name'] };
}

function placeAt(name: string): Place {
  return name.split('.').reduce((place, key) => place.children.get(key) as Place, studyLayout);
}

const freeSchemas: Readonly<Record<string, Schema>> = {
  trials: {
    type: 'object',
    minProperties: 1,
    propertyNames: { pattern: '^[^.]+$' },
    additionalProperties: { anyOf: (Object.keys(trialKinds) as TrialKind[]).map(trialSchema) },
  },
  vary: withMore(
    numbersByName((row) => ({ description: row.sentence, $ref: `#/$defs/axis.${row.quantity}` }), { patternProperties: { '^trials\\.': { type: 'object' } } }),
    pairs.map((name): [string, Schema] => [name, pairAxisSchema(name)]),
  ),
  options: {
    type: 'object',
    minProperties: 1,
    propertyNames: { pattern: '^[^.=]+$' },
    additionalProperties: {
      anyOf: [optionFile, { ...objectOf({ file: optionFile }), required: ['file'] }, { type: 'array', items: optionSchema(), minItems: 1 }],
    },
  },
  search: { anyOf: (Object.keys(searchMethods) as Search['method'][]).map(methodSchema) },
  requirements: {
    type: 'object',
    additionalProperties: { type: 'object', properties: { atLeast: limit, atMost: limit }, additionalProperties: false, minProperties: 1 },
  },
  tradeOff: {
    type: 'object',
    properties: {
      minimise: { type: 'array', items: metricName, description: 'Metrics of which less is better.' },
      maximise: { type: 'array', items: metricName, description: 'Metrics of which more is better.' },
      resolution: { type: 'object', additionalProperties: limit, description: 'Sizes of the boxes in which people see one design, by objective.' },
      keep: { type: 'array', items: metricName, description: 'Further metrics to store with every design.' },
    },
    additionalProperties: false,
  },
};
