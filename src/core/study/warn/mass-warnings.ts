/** Warnings about masses and what turns with them, over the designs of a study. */
import { type Budget, type BudgetTerms, budgetTotal, driveBudget } from '../../vehicle/budget.ts';
import { massFactor } from '../../vehicle/mass.ts';
import { axisPath, cornersOf, type DesignValues, extentOf } from './design-corners.ts';
import { beside, type Sight, shown, type WarningContext } from './warning-row.ts';

const MASSES = /^(?:vehicle\.kerbMass|massAndCost\.mass\.|gearing\.ratio|motor\.(?:peakTorque|baseSpeed)$|battery\.usable)/u;
const INERTIAS = /^(?:vehicle\.(?:massFactor|wheelInertia|wheelRadius)|motor\.inertia)/u;

/** Kerb mass and the masses that follow the design, kg. */
function vehicleMassKg(values: DesignValues): number {
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

function largestRatio(values: DesignValues): number {
  return values['gearing.ratio'] ?? Math.max(values['gearing.ratios.1'] as number, values['gearing.ratios.2'] as number);
}

/** The metric vehicle.massFactor: largest ratio, no payload. */
function massFactorOf(values: DesignValues): number {
  const rotor = values['motor.inertia'] ?? (values['motor.inertia.perTorque'] ?? 0) * (values['motor.peakTorque'] as number);
  const radiusM = values['vehicle.wheelRadius'] as number;
  return values['vehicle.massFactor'] ?? massFactor(values['vehicle.wheelInertia'] ?? 0, rotor, largestRatio(values), vehicleMassKg(values), radiusM);
}

/** A mass factor outside 1.01 to 1.4 in any design. */
export function seeMassFactor({ study, found }: WarningContext): Sight[] {
  const corners = cornersOf(study, (name) => MASSES.test(name) || INERTIAS.test(name));
  const extent = extentOf(corners.map(massFactorOf));
  const fixed = found.stands.has('vehicle.massFactor');
  // Without the inertia of wheels or rotor the factor is low for that reason, which has a warning of its own.
  const complete = fixed || (found.stands.has('vehicle.wheelInertia') && [...found.stands.keys()].some((name) => name.startsWith('motor.inertia')));
  if (extent === null || (extent.high <= 1.4 && (extent.low >= 1.01 || !complete))) return [];
  const ratio = study.axes.find(({ sets }) => sets.some((name) => name.startsWith('gearing.ratio')));
  const path = fixed ? 'vehicle.massFactor' : ratio !== undefined && extent.high > 1.4 ? axisPath(ratio) : 'vehicle.wheelInertia';
  const [least, most] = [beside(extent.low, 1.01, 'atLeast', 'number', 3, study), beside(extent.high, 1.4, 'atMost', 'number', 3, study)];
  const range = extent.low === extent.high ? (extent.low < 1.01 ? least : most) : `${least} to ${most} over the designs`;
  return [
    {
      path,
      found: `mass factor ${range}`,
      hint: fixed ? 'Check the factor.' : 'Check the inertia of the wheels, and of the rotor, which counts with the square of the ratio.',
    },
  ];
}

/** A laden mass below what the vehicle itself weighs, in some design or in all. */
export function seeTooHeavy({ study, trials }: WarningContext): Sight[] {
  const corners = cornersOf(study, (name) => MASSES.test(name));
  const massOf = (replaced: DesignValues) => extentOf(corners.map((values) => vehicleMassKg({ ...values, ...replaced })));
  const ownMass = massOf({});
  return trials.flatMap(({ name, with: replaced }) => {
    const path = `trials.${name}.laden`;
    const laden = extentOf(cornersOf(study, (key) => key === path).map((values) => values[path] ?? Number.NaN));
    const own = Object.fromEntries([...replaced].flatMap(([key, { value }]) => (MASSES.test(key) ? [[key, value] as const] : [])));
    const mass = Object.keys(own).length === 0 ? ownMass : massOf(own);
    if (laden === null || mass === null || laden.low >= mass.high) return [];
    const which = laden.high < mass.low ? 'every design' : 'some designs';
    return [
      {
        path,
        found: `${shown(laden.low, 'mass', 0, study)} laden, below the mass of the vehicle in ${which}, up to ${shown(mass.high, 'mass', 0, study)}`,
        hint: 'The trial then has no metrics (too heavy); raise the laden mass or check the masses.',
      },
    ];
  });
}
