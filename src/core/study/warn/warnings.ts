/**
 * What a study may state but should know of: it leaves common practice or misleads itself. One row per rule; the rules here need
 * the study alone. Each names the place and the reason, once.
 */
import { formatFigure } from '../../units/format-quantity.ts';
import { metricColumns } from '../catalogue/metric-columns.ts';
import { isSampled } from '../catalogue/search-methods.ts';
import { axisPath, cornersOf, extentOf } from './design-corners.ts';
import { seeMassFactor, seeTooHeavy } from './mass-warnings.ts';
import { seeMapAndBaseSpeed, seeMapScale, seeMotorEfficiency, seeMotorSpeed, seeSpeedOrder } from './motor-warnings.ts';
import { beside, type Sight, shown, type WarningContext, type WarningRow } from './warning-row.ts';

/** Every rule that the study alone can answer. */
export const warningRows: readonly WarningRow<WarningContext>[] = [
  {
    rule: 'no wheel inertia',
    expected: 'the moment of inertia of the wheels, or a mass factor',
    look: ({ found }) =>
      found.stands.has('vehicle.wheelInertia') || found.stands.has('vehicle.massFactor')
        ? []
        : [
            {
              path: 'vehicle',
              found: 'neither wheelInertia nor massFactor: the wheels turn without inertia',
              hint: 'Add wheelInertia under vehicle; 0.7 to 1.5 kg·m² for each wheel of a car is common practice.',
            },
          ],
  },
  {
    rule: 'no rotor inertia',
    expected: 'the moment of inertia of the rotor, or a mass factor',
    look: ({ found }) =>
      found.stands.has('motor.inertia') || found.stands.has('motor.inertia.perTorque') || found.stands.has('vehicle.massFactor')
        ? []
        : [
            {
              path: 'motor',
              found: 'no inertia: the rotor turns without inertia, which favours large ratios',
              hint: 'Add inertia under motor, fixed or "{ perTorque: … }".',
            },
          ],
  },
  {
    rule: 'inertia beside mass factor',
    expected: 'a mass factor, or the inertias of wheels and rotor',
    look: ({ found }) =>
      found.stands.has('vehicle.massFactor') && (found.stands.has('motor.inertia') || found.stands.has('motor.inertia.perTorque'))
        ? [{ path: 'motor.inertia', found: 'without effect: the fixed mass factor holds for every ratio', hint: 'Remove one of the two.' }]
        : [],
  },
  { rule: 'mass factor', expected: 'about 1.01 to 1.4', look: seeMassFactor },
  { rule: 'efficiency', expected: 'at most 99 %', look: seeEfficiency },
  {
    rule: 'map efficiency',
    expected: 'at most 99 %',
    look: ({ study, bestMapEfficiency }) =>
      bestMapEfficiency > 0.99
        ? [
            {
              path: 'motor.map',
              found: `an efficiency of ${beside(bestMapEfficiency, 0.99, 'atMost', 'share', 1, study)} in the map`,
              hint: 'Check the map and what it covers.',
            },
          ]
        : [],
  },
  { rule: 'motor efficiency', expected: 'losses that leave at most 99 %', look: seeMotorEfficiency },
  {
    rule: 'sustained at peak',
    expected: 'a continuous rating for what a motor must sustain',
    look: ({ trials }) =>
      trials
        .filter(({ kind, rating }) => (kind === 'top speed' || kind === 'gradeability') && rating === 'peak')
        .map(({ name, kind, at }) => ({
          path: `trials.${name}`,
          at,
          found: `a ${kind} trial rated peak`,
          hint: 'Peak torque lasts seconds; remove "rating: peak" unless that is what the trial is about.',
        })),
  },
  { rule: 'unpriced circumstance', expected: 'a choice with a price: something that an objective weighs against it', look: seeUnpriced },
  { rule: 'motor speed', expected: 'enough motor speed over the whole range of ratios', look: seeMotorSpeed },
  { rule: 'speeds out of order', expected: 'base speed below maximum speed over the whole range', look: seeSpeedOrder },
  { rule: 'map scale', expected: 'half to twice that power', look: seeMapScale },
  { rule: 'map and base speed', expected: 'a base speed as measured where losses come from a map', look: seeMapAndBaseSpeed },
  { rule: 'speed cap', expected: 'a cycle as long as its trace', look: seeSpeedCap },
  {
    rule: 'air beside coast-down',
    expected: 'no air data beside coast-down coefficients',
    look: ({ study, found }) =>
      study.values['vehicle.coastDown.f0'] === undefined
        ? []
        : ['air.temperature', 'air.altitude', 'air.density'].flatMap((path) =>
            found.stands.has(path)
              ? [{ path, found: 'without effect', hint: 'Coast-down coefficients hold for the air they were measured in; remove it.' }]
              : [],
          ),
  },
  {
    rule: 'drag torque beside coast-down',
    expected: 'the drag of the gearing counted once',
    look: ({ study, found }) =>
      study.values['vehicle.coastDown.f0'] !== undefined && found.stands.has('gearing.dragTorque')
        ? [
            {
              path: 'gearing.dragTorque',
              found: 'drag torque beside coast-down coefficients',
              hint: 'Coast-down figures normally contain the drag of the turning gearing; remove one of the two unless it was taken out.',
            },
          ]
        : [],
  },
  {
    rule: 'aim against the catalogue',
    expected: 'an objective turned the way a buyer wants it',
    look: ({ study }) => {
      const better = new Map(metricColumns(study).map(({ name, row }) => [name, row.better]));
      const odd = { minimise: 'more', maximise: 'less' } as const;
      return study.objectives
        .filter(({ metric, aim }) => better.get(metric) === odd[aim])
        .map(({ metric, aim }) => ({
          path: `tradeOff.${aim}`,
          found: `${aim} ${metric}`,
          hint: `Of ${metric} ${odd[aim]} is usually better; move it to the other list unless it is meant so.`,
        }));
    },
  },
  { rule: 'repeated designs', expected: 'at most as many designs as there are combinations', look: seeRepeats },
  { rule: 'discharge limit', expected: 'a discharge limit that the pack can deliver', look: seeDischargeLimit },
  { rule: 'too heavy', expected: 'a laden mass of at least the mass of the vehicle', look: seeTooHeavy },
  {
    rule: 'trailer without drag',
    expected: 'the drag area that a trailer adds',
    look: ({ study, trials }) =>
      study.values['vehicle.coastDown.f0'] !== undefined
        ? []
        : trials
            .filter(
              ({ name, kind, found }) =>
                kind !== 'hill start' && found.stands.has(`trials.${name}.trailer.mass`) && !found.stands.has(`trials.${name}.trailer.dragArea`),
            )
            .map(({ name }) => ({
              path: `trials.${name}.trailer`,
              found: 'a trailer without dragArea: it adds no air resistance',
              hint: 'Add dragArea to the trailer.',
            })),
  },
];

/** Adds a warning for everything the rules see. */
export function addWarnings(context: WarningContext): void {
  for (const row of warningRows) {
    for (const { path, at, found, hint } of row.look(context))
      context.issues.warn(at ?? offsetOf(path, context), path, { rule: row.rule, expected: row.expected, found, hint });
  }
}

/** Where a dotted path stands: a name of the study or of a trial, an entry of vary or options, or the nearest section above it. */
function offsetOf(path: string, context: WarningContext): number {
  const { found, trials } = context;
  const own =
    found.stands.get(path) ?? trials.map((trial) => (path === `trials.${trial.name}` ? trial.at : trial.found.stands.get(path))).find((at) => at !== undefined);
  if (own !== undefined) return own;
  for (const [name, part] of found.parts) {
    if (!path.startsWith(`${name}.`) || part.value.kind !== 'map') continue;
    const entry = part.value.entries.find(({ key }) => key === path.slice(name.length + 1));
    if (entry !== undefined) return entry.at;
  }
  const above = path.split('.').slice(0, -1).join('.');
  return above === '' ? 0 : offsetOf(above, context);
}

const EFFICIENCIES: readonly string[] = ['gearing.efficiency', 'gearing.efficiency.1', 'gearing.efficiency.2', 'battery.chargingEfficiency'];

/** An efficiency of gearing or charging above 99 %, in the study, in what varies or in a trial's `with`. */
function seeEfficiency({ study, found, trials }: WarningContext): Sight[] {
  return EFFICIENCIES.flatMap((name): Sight[] => {
    const axis = study.axes.find(({ sets }) => sets.includes(name));
    const inStudy = found.stands.has(name) || axis !== undefined ? cornersOf(study, (each) => each === name).map((values) => values[name] ?? Number.NaN) : [];
    const said = [
      { path: axis === undefined ? name : axisPath(axis), high: extentOf(inStudy)?.high },
      ...trials.map((trial) => ({ path: `trials.${trial.name}.with.${name}`, high: trial.with.get(name)?.value })),
    ];
    return said.flatMap(({ path, high }) =>
      high !== undefined && high > 0.99
        ? [
            {
              path,
              found: beside(high, 0.99, 'atMost', 'share', 1, study),
              hint: name.startsWith('gearing')
                ? 'One pair of gears loses about 1 to 2 %; check the figure.'
                : 'Chargers lose about 5 to 15 %; check the figure.',
            },
          ]
        : [],
    );
  });
}

/** Circumstances are not the maker's to choose, or cost something the study does not know: the search takes the easy end. */
const CIRCUMSTANCE = /^(?:vehicle\.(?:kerbMass|dragArea|rolling\.|coastDown\.|auxiliaries|axles\.adhesion)|air\.|trials\.)/u;

function seeUnpriced({ study }: WarningContext): Sight[] {
  if (study.objectives.length === 0) return [];
  // A varied load is priced where the payload it carries is itself an objective.
  const priced = (name: string) => {
    const load = /^trials\.([^.]*)\.(?:payload|laden)$/u.exec(name);
    return load !== null && study.objectives.some(({ metric, aim }) => metric === `${load[1]}.payload` && aim === 'maximise');
  };
  return study.axes
    .filter(({ sets }) => sets.every((name) => CIRCUMSTANCE.test(name) && !priced(name)))
    .map((axis) => ({
      path: axisPath(axis),
      found: 'varied, though no objective prices it',
      hint: 'The front will lie at its easy end; read it as what the figure is worth, or put it in trials of its own by "with".',
    }));
}

/** More designs than there are combinations to draw from. */
function seeRepeats({ study: { axes, search } }: WarningContext): Sight[] {
  if (!isSampled(search) || axes.length === 0 || axes.some(({ range }) => range?.stepped === false)) return [];
  const combinations = axes.reduce((product, { points }) => product * points.length, 1);
  if (search.designs <= combinations) return [];
  return [
    {
      path: 'search.designs',
      found: `${formatFigure(search.designs, 0)} designs drawn from ${combinations === 1 ? '1 combination' : `${formatFigure(combinations, 0)} combinations`}`,
      hint: 'Many designs will be the same: take method grid, or leave out steps, so that whole ranges are drawn from.',
    },
  ];
}

/** A cap that takes distance from a cycle: the energies per distance are then those of a slower, shorter trip in the same time. */
function seeSpeedCap({ study }: WarningContext): Sight[] {
  return study.trials.flatMap(({ name, trace }): Sight[] => {
    const path = `trials.${name}.capSpeed`;
    const caps = extentOf(cornersOf(study, (each) => each === path).map((values) => values[path] ?? Number.NaN));
    if (trace === null || caps === null) return [];
    const [whole, left] = [Number.POSITIVE_INFINITY, caps.low].map((cap) => distanceM(trace.timesS, trace.speedsMPerS, cap)) as [number, number];
    if (!(left < whole)) return [];
    const length = (value: number) => shown(value, 'range', 2, study);
    return [
      {
        path,
        found: `the cap of ${shown(caps.low, 'speed', 0, study)} shortens ${trace.name} from ${length(whole)} to ${length(left)} in the same time`,
        hint: 'Energies and range are those of the slower trip: do not compare them with those of the whole trace.',
      },
    ];
  });
}

function distanceM(timesS: readonly number[], speedsMPerS: readonly number[], cap: number): number {
  let distance = 0;
  for (let k = 1; k < timesS.length; k++) {
    const mean = (Math.min(speedsMPerS[k - 1] as number, cap) + Math.min(speedsMPerS[k] as number, cap)) / 2;
    distance += mean * ((timesS[k] as number) - (timesS[k - 1] as number));
  }
  return distance;
}

function seeDischargeLimit({ study }: WarningContext): Sight[] {
  const { values } = study;
  const voltage = values['battery.voltage'] ?? Number.NaN;
  const resistance = values['battery.resistance'] ?? (values['battery.resistance.perEnergy'] ?? 0) / (values['battery.usable'] ?? Number.NaN);
  const most = (voltage * voltage) / (4 * resistance);
  const discharge = values['battery.discharge'] ?? 0;
  if (!(discharge > most)) return [];
  return [
    {
      path: 'battery.discharge',
      found: `${shown(discharge, 'batteryPower', 0, study)} where voltage and resistance allow ${shown(most, 'batteryPower', 0, study)}`,
      hint: 'The pack never gives more than V²/(4 R); check voltage and resistance.',
    },
  ];
}
