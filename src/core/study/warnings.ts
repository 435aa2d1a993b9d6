/**
 * What a study may state but should know of: it leaves common practice or misleads itself. One row per rule; the rules here need
 * the study alone. Each names the place and the reason, once.
 */
import { formatQuantity } from '../units/format-quantity.ts';
import type { Quantity } from '../units/units.ts';
import { type Budget, type BudgetTerms, budgetTotal, driveBudget } from '../vehicle/budget.ts';
import { massFactor } from '../vehicle/mass.ts';
import type { IssueList } from './issue.ts';
import { metricColumns } from './metric-columns.ts';
import type { Found } from './read-places.ts';
import type { TrialFound } from './read-trials.ts';
import type { Study } from './study.ts';

/** What the rules look at. */
export interface WarningContext {
  readonly study: Study;
  readonly found: Found;
  readonly trials: readonly TrialFound[];
  /** Largest efficiency in an efficiency map; NaN without one. */
  readonly bestMapEfficiency: number;
  readonly issues: IssueList;
}

/** One thing seen: where (a dotted name that stands, or an offset), what was found, and what to do if it is not meant. */
interface Sight {
  readonly path: string;
  readonly at?: number;
  readonly found: string;
  readonly hint: string;
}

/** One rule. */
export interface WarningRow {
  readonly rule: string;
  /** What would be common practice. */
  readonly expected: string;
  look(context: WarningContext): Sight[];
}

/** Every rule that the study alone can answer. */
export const warningRows: readonly WarningRow[] = [
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
        ? [{ path: 'motor.inertia', found: 'motor.inertia without effect: the fixed mass factor holds for every ratio', hint: 'Remove one of the two.' }]
        : [],
  },
  { rule: 'mass factor', expected: 'a mass factor of about 1.01 to 1.4', look: seeMassFactor },
  {
    rule: 'gearing efficiency',
    expected: 'a gearing efficiency of at most 99 %',
    look: ({ study, found }) =>
      ['gearing.efficiency', 'gearing.efficiency.1', 'gearing.efficiency.2'].flatMap((path) =>
        (study.values[path] ?? 0) > 0.99 && found.stands.has(path)
          ? [{ path, found: shown(study.values[path] as number, 'share', 1), hint: 'One pair of gears loses about 1 to 2 %; check the figure.' }]
          : [],
      ),
  },
  {
    rule: 'map efficiency',
    expected: 'an efficiency of at most 99 % in a map',
    look: ({ bestMapEfficiency }) =>
      bestMapEfficiency > 0.99 ? [{ path: 'motor.map', found: shown(bestMapEfficiency, 'share', 1), hint: 'Check the map and what it covers.' }] : [],
  },
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
  { rule: 'map scale', expected: 'a map used within half to twice the power it was measured at', look: seeMapScale },
  {
    rule: 'map and base speed',
    expected: 'a base speed as measured where losses come from a map',
    look: ({ study }) =>
      study.lossMap !== null && study.axes.some(({ sets }) => sets.includes('motor.baseSpeed'))
        ? [
            {
              path: 'vary.motor.baseSpeed',
              found: 'base speed varied with a measured map',
              hint: 'A rewound motor keeps its losses at a given torque and speed; the scaled map does not. Read small differences with care.',
            },
          ]
        : [],
  },
  {
    rule: 'air beside coast-down',
    expected: 'no air data beside coast-down coefficients',
    look: ({ study, found }) =>
      study.values['vehicle.coastDown.f0'] === undefined
        ? []
        : ['air.temperature', 'air.altitude', 'air.density'].flatMap((path) =>
            found.stands.has(path)
              ? [{ path, found: `${path} without effect`, hint: 'Coast-down coefficients hold for the air they were measured in; remove it.' }]
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
              found: 'dragTorque beside coast-down coefficients',
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
  {
    rule: 'discharge limit',
    expected: 'a discharge limit that the pack can deliver',
    look: ({ study: { values } }) => {
      const voltage = values['battery.voltage'] ?? Number.NaN;
      const most = (voltage * voltage) / (4 * (values['battery.resistance'] ?? 0));
      return (values['battery.discharge'] ?? 0) > most
        ? [
            {
              path: 'battery.discharge',
              found: `${shown(values['battery.discharge'] as number, 'power', 0)} where voltage and resistance allow ${shown(most, 'power', 0)}`,
              hint: 'The pack never gives more than V²/(4 R); check voltage and resistance.',
            },
          ]
        : [];
    },
  },
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
      context.issues.warn(at ?? offsetOf(path, context), path, { expected: row.expected, found, hint });
  }
}

/** Where a dotted path stands: a name of the study or of a trial, a number under vary, or the nearest section above it. */
function offsetOf(path: string, context: WarningContext): number {
  const { found, trials } = context;
  const own = found.stands.get(path) ?? trials.map((trial) => trial.found.stands.get(path)).find((at) => at !== undefined);
  if (own !== undefined) return own;
  for (const [name, part] of found.parts) {
    if (!path.startsWith(`${name}.`) || part.value.kind !== 'map') continue;
    const entry = part.value.entries.find(({ key }) => key === path.slice(name.length + 1));
    if (entry !== undefined) return entry.at;
  }
  const above = path.split('.').slice(0, -1).join('.');
  return above === '' ? 0 : offsetOf(above, context);
}

function shown(value: number, quantity: Quantity, decimals: number): string {
  return formatQuantity(value, quantity, { decimals });
}

/** Smallest and largest value of a number over the search; the reference where it does not vary; undefined where there is none. */
function extent({ axes, values }: Study, name: string): { low: number; high: number } | undefined {
  const axis = axes.find(({ sets }) => sets.includes(name));
  const column = axis?.sets.indexOf(name) ?? 0;
  const all = axis?.points.map((point) => point[column] as number) ?? (values[name] === undefined ? [] : [values[name]]);
  if (all.length === 0) return undefined;
  return { low: all.reduce((a, b) => Math.min(a, b)), high: all.reduce((a, b) => Math.max(a, b)) };
}

/** Kerb mass and the masses that follow the reference design, kg. */
function referenceMassKg({ values }: Study): number {
  const own = (key: string) => values[`massAndCost.mass.${key}`] ?? Number.NaN;
  const terms: BudgetTerms = {
    motorFixed: own('motor.fixed'),
    motorPerNm: own('motor.perTorque'),
    inverterFixed: own('inverter.fixed'),
    inverterPerW: own('inverter.perPower'),
    gearingFixed: own('gearing.fixed'),
    gearingPerNm: own('gearing.perTorque'),
    gearingPerExtraRatio: own('gearing.perExtraRatio'),
    batteryPerJ: own('battery.perEnergy'),
  };
  const peakTorqueNm = values['motor.peakTorque'] as number;
  const peakPowerW = peakTorqueNm * (values['motor.baseSpeed'] as number);
  const ratioCount = values['gearing.ratio'] === undefined ? 2 : 1;
  const budget: Budget = driveBudget(terms, {
    peakTorqueNm,
    peakPowerW,
    largestRatio: largestRatio(values),
    ratioCount,
    usableJ: values['battery.usable'] ?? Number.NaN,
  });
  return (values['vehicle.kerbMass'] as number) + budgetTotal(budget);
}

function largestRatio(values: Study['values']): number {
  return (values['gearing.ratio'] ?? values['gearing.ratios.1']) as number;
}

function seeMassFactor({ study, found }: WarningContext): Sight[] {
  const { values } = study;
  const given = values['vehicle.massFactor'];
  const rotor = values['motor.inertia'] ?? (values['motor.inertia.perTorque'] ?? 0) * (values['motor.peakTorque'] as number);
  const factor =
    given ?? massFactor(values['vehicle.wheelInertia'] ?? 0, rotor, largestRatio(values), referenceMassKg(study), values['vehicle.wheelRadius'] as number);
  const nothingGiven = given === undefined && !found.stands.has('vehicle.wheelInertia');
  if ((factor >= 1.01 && factor <= 1.4) || nothingGiven) return [];
  const path = given === undefined ? 'vehicle.wheelInertia' : 'vehicle.massFactor';
  return [
    {
      path,
      found: `${shown(factor, 'number', 3)}${given === undefined ? ' for the reference design' : ''}`,
      hint: 'Check the inertias of wheels and rotor, or the factor.',
    },
  ];
}

/** Circumstances are not the maker's to choose, or cost something the study does not know: the search takes the easy end. */
const CIRCUMSTANCES = /^(?:vehicle\.(?:kerbMass|dragArea|rolling\.|coastDown\.|auxiliaries|axles\.adhesion)|air\.|trials\.)/u;

function seeUnpriced({ study }: WarningContext): Sight[] {
  if (study.objectives.length === 0) return [];
  return study.axes
    .filter(({ name }) => CIRCUMSTANCES.test(name))
    .map(({ name }) => ({
      path: `vary.${name}`,
      found: `${name} varied, though no objective prices it`,
      hint: 'The front will lie at its easy end; read it as what the figure is worth, or put it in trials of its own by "with".',
    }));
}

/** Speeds that requirements and cycles ask for, against what the motor speed allows at the smallest ratio in use. */
function seeMotorSpeed({ study, trials }: WarningContext): Sight[] {
  const { values } = study;
  const ratioName = values['gearing.ratio'] === undefined ? 'gearing.ratios.2' : 'gearing.ratio';
  const ratio = extent(study, ratioName);
  const top = study.fullLoad === null ? extent(study, 'motor.maxSpeed')?.high : study.fullLoad.speedsRadPerS.at(-1);
  const radius = extent(study, 'vehicle.wheelRadius')?.high;
  if (ratio === undefined || top === undefined || radius === undefined) return [];
  return trials.flatMap(({ name, kind, trace, found, at }): Sight[] => {
    const wanted = speedWanted(study, name, kind, trace, found);
    const most = (top * radius) / wanted;
    if (!(wanted > 0) || ratio.high <= most * (1 + 1e-12)) return [];
    const where = ratio.low === ratio.high ? 'the ratio of the study' : ratio.low > most ? 'every ratio' : `ratios above ${shown(most, 'number', 2)}`;
    return [
      {
        path: `trials.${name}`,
        at,
        found: `${shown(wanted, 'speed', 1)} wanted, beyond maximum motor speed at ${where}`,
        hint: 'Those designs cannot meet it; raise motor.maxSpeed, lower the ratios, or cap the speed of the cycle.',
      },
    ];
  });
}

function speedWanted(study: Study, name: string, kind: TrialFound['kind'], trace: TrialFound['trace'], found: Found): number {
  if (kind === 'cycle' && trace !== null) {
    const follows = study.requirements.some(({ metric, limit }) => metric === `${name}.offTrace` && limit === 0);
    const highest = trace.speedsMPerS.reduce((a, b) => Math.max(a, b));
    return follows ? Math.min(highest, study.values[`trials.${name}.capSpeed`] ?? highest) : 0;
  }
  const required = study.requirements.filter(({ metric }) => metric.startsWith(`${name}.`));
  if (kind === 'top speed') return required.find(({ bound, metric }) => bound === 'atLeast' && metric.endsWith('.speed'))?.limit ?? 0;
  const figure = (key: string) => found.figures.get(`trials.${name}.${key}`)?.value ?? 0;
  return required.length === 0 ? 0 : kind === 'acceleration' ? figure('to') : kind === 'gradeability' ? figure('at') : 0;
}

function seeSpeedOrder({ study }: WarningContext): Sight[] {
  const base = extent(study, 'motor.baseSpeed');
  const top = extent(study, 'motor.maxSpeed');
  const varied = study.axes.find(({ sets }) => sets.includes('motor.baseSpeed') || sets.includes('motor.maxSpeed'));
  if (base === undefined || top === undefined || varied === undefined || base.high <= top.low) return [];
  const all = base.low > top.high ? 'every design' : 'some designs';
  return [
    {
      path: `vary.${varied.name}`,
      found: `base speed up to ${shown(base.high, 'rotationalSpeed', 0)} and maximum speed from ${shown(top.low, 'rotationalSpeed', 0)}`,
      hint: `In ${all} the base speed lies above the maximum speed: they have no metrics and are not feasible.`,
    },
  ];
}

function seeMapScale({ study }: WarningContext): Sight[] {
  const [torque, base] = [extent(study, 'motor.peakTorque'), extent(study, 'motor.baseSpeed')];
  if (study.lossMap === null || torque === undefined || base === undefined) return [];
  const measured = study.lossMap.referencePeakTorqueNm * study.lossMap.referenceBaseSpeedRadPerS;
  const [least, most] = [(torque.low * base.low) / measured, (torque.high * base.high) / measured];
  if (least >= 0.5 && most <= 2) return [];
  const path = study.axes.some(({ sets }) => sets.includes('motor.peakTorque')) ? 'vary.motor.peakTorque' : 'motor.map';
  return [
    {
      path,
      found: `${shown(least, 'number', 2)} to ${shown(most, 'number', 2)} times that power`,
      hint: 'Losses are scaled with peak power; beyond that range measure or compute another map.',
    },
  ];
}

function seeTooHeavy({ study, trials }: WarningContext): Sight[] {
  const mass = referenceMassKg(study);
  return trials.flatMap(({ name, with: replaced }) => {
    const laden = study.values[`trials.${name}.laden`];
    const own = replaced.has('vehicle.kerbMass') ? Number.NaN : mass;
    return laden !== undefined && laden < own
      ? [
          {
            path: `trials.${name}.laden`,
            found: `${shown(laden, 'mass', 0)} laden, below the reference design's own ${shown(own, 'mass', 0)}`,
            hint: 'The trial then has no metrics (too heavy); raise the laden mass or check the masses.',
          },
        ]
      : [];
  });
}
