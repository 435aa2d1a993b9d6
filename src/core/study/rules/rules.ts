/** Rules between the numbers of a study, as tables: what must be there, what comes together, what says the same thing twice, what must be larger than what. */

/**
 * Two ways of saying one thing. A name that ends in `.*` stands for all below it; `trials.*` for any trial.
 * A map that covers the whole drive stands as `motor.map.wholeDrive`, one of the motor as `motor.map.motorAlone`.
 */
export interface Alternative {
  /** Where one of these stands … */
  readonly holds: readonly string[];
  /** … none of these has a part to play. */
  readonly rulesOut: readonly string[];
  readonly why: string;
  /** Ruled out in the file, yet the search and single trials may change them: the one way gives the reference figure. */
  readonly inFile?: readonly string[];
  /** What is ruled out has a figure all the same, derived from the other: the search may vary it. */
  readonly derived?: true;
}

/** Pairs that exclude each other. */
export const alternatives: readonly Alternative[] = [
  { holds: ['vehicle.tyre'], rulesOut: ['vehicle.wheelRadius'], why: 'the tyre size gives the wheel radius', derived: true },
  { holds: ['vehicle.massFactor'], rulesOut: ['vehicle.wheelInertia'], why: 'a fixed mass factor holds instead of the inertias' },
  {
    holds: ['vehicle.coastDown.*'],
    rulesOut: ['vehicle.rolling.*', 'vehicle.dragArea'],
    why: 'coast-down coefficients hold the rolling and the air resistance',
  },
  {
    holds: ['vehicle.coastDown.*'],
    rulesOut: ['trials.*.headWind', 'trials.*.trailer.dragArea'],
    why: 'coast-down coefficients know still air and no trailer; state rolling and dragArea instead to use this',
  },
  { holds: ['air.density'], rulesOut: ['air.temperature', 'air.altitude'], why: 'the air density follows from temperature and altitude' },
  { holds: ['motor.inertia.perTorque'], rulesOut: ['motor.inertia'], why: 'the rotor inertia follows from the peak torque' },
  {
    holds: ['motor.fullLoad.*'],
    rulesOut: ['motor.maxSpeed', 'motor.constantPowerTo'],
    inFile: ['motor.peakTorque', 'motor.baseSpeed'],
    why: 'the full-load curve gives all of them; to scale it, vary peak torque and base speed or set them in a trial',
  },
  {
    holds: ['gearing.ratio'],
    rulesOut: ['gearing.ratios.*', 'gearing.shiftTime', 'gearing.efficiency.1', 'gearing.efficiency.2'],
    why: 'a study has one ratio, or two with a shift',
  },
  {
    holds: ['gearing.efficiency'],
    rulesOut: ['gearing.efficiency.1', 'gearing.efficiency.2'],
    why: 'one efficiency holds for both ratios, or each has its own',
  },
  { holds: ['motor.map.wholeDrive'], rulesOut: ['motor.losses.*'], why: 'the map already holds the losses of motor and inverter' },
  {
    holds: ['motor.map.motorAlone'],
    rulesOut: ['motor.losses.hysteresis', 'motor.losses.eddy', 'motor.losses.windage', 'motor.losses.copper', 'motor.losses.acCopper'],
    why: 'the map already holds the losses of the motor; the inverter coefficients come on top',
  },
  { holds: ['battery.resistance.perEnergy'], rulesOut: ['battery.resistance'], why: 'the resistance follows from the usable energy' },
  { holds: ['trials.*.laden'], rulesOut: ['trials.*.payload'], why: 'the payload follows from the laden mass' },
  { holds: ['trials.*.road'], rulesOut: ['trials.*.grade'], why: 'the road profile gives the grade' },
];

/** Names of which all stand or none. */
export interface Group {
  readonly names: readonly string[];
  readonly why: string;
}

/** What comes together. */
export const groups: readonly Group[] = [
  {
    names: ['vehicle.axles.adhesion', 'vehicle.axles.frontShare', 'vehicle.axles.centreHeight', 'vehicle.axles.wheelbase'],
    why: 'adhesion with load transfer needs all four; without them grip is not looked at',
  },
  {
    names: ['vehicle.coastDown.f0', 'vehicle.coastDown.f1', 'vehicle.coastDown.f2', 'vehicle.coastDown.at'],
    why: 'the coast-down road load has three coefficients and the mass they were measured at',
  },
  { names: ['motor.continuous.torque', 'motor.continuous.power'], why: 'the continuous limit has a torque and a power' },
  { names: ['gearing.ratios.1', 'gearing.ratios.2'], why: 'two ratios are a list of two' },
  { names: ['gearing.efficiency.1', 'gearing.efficiency.2'], why: 'give one efficiency per ratio, or one for both' },
];

/** What a study cannot do without: one of `names`; asked for only where `when` stands (any name below it). */
export interface Need {
  readonly names: readonly string[];
  readonly when?: string;
  /** What to write. */
  readonly hint: string;
}

/** Everything required, in the order of the file. */
export const needs: readonly Need[] = [
  { names: ['vehicle.kerbMass'], hint: 'Add kerbMass under vehicle, such as "kerbMass: 1500 kg".' },
  { names: ['vehicle.dragArea', 'vehicle.coastDown'], hint: 'Add dragArea and rolling under vehicle, such as "dragArea: 0.65 m²"; or coastDown.' },
  { names: ['vehicle.rolling.c0', 'vehicle.coastDown'], hint: 'Add rolling under vehicle, such as "rolling: { c0: 0.01 }"; or coastDown.' },
  { names: ['vehicle.wheelRadius', 'vehicle.tyre'], hint: 'Add a tyre size under vehicle, such as "tyre: 215/65 R16"; or wheelRadius.' },
  { names: ['vehicle.axles.driven'], hint: 'Add the driven axle under vehicle: "axles: { driven: front }", rear or all.' },
  { names: ['motor.peakTorque', 'motor.fullLoad'], hint: 'Add peakTorque under motor, such as "peakTorque: 250 N·m"; or fullLoad with a measured curve.' },
  { names: ['motor.baseSpeed', 'motor.fullLoad'], hint: 'Add baseSpeed under motor, such as "baseSpeed: 4000 rpm"; or fullLoad with a measured curve.' },
  { names: ['motor.maxSpeed', 'motor.fullLoad'], hint: 'Add maxSpeed under motor, such as "maxSpeed: 12000 rpm"; or fullLoad with a measured curve.' },
  {
    names: ['motor.losses', 'motor.map'],
    hint: 'Add losses under motor with their coefficients; or map with a measured map. layshaft new FILE shows an example.',
  },
  { names: ['gearing.ratio', 'gearing.ratios'], hint: 'Add ratio under gearing, such as "ratio: 9.5"; or ratios with a list of two.' },
  { names: ['gearing.efficiency', 'gearing.efficiency.1'], hint: 'Add efficiency under gearing, such as "efficiency: 97 %".' },
  { names: ['battery.voltage'], when: 'battery', hint: 'Add voltage under battery, such as "voltage: 400 V"; or leave the battery section out.' },
  {
    names: ['battery.usable'],
    when: 'battery.resistance.perEnergy',
    hint: 'Resistance per energy needs the usable energy: add "usable: 50 kWh" under battery.',
  },
  { names: ['battery.usable'], when: 'massAndCost.mass.battery', hint: 'The battery mass follows from its usable energy: add "usable: 50 kWh" under battery.' },
  { names: ['battery.usable'], when: 'massAndCost.cost.battery', hint: 'The battery cost follows from its usable energy: add "usable: 50 kWh" under battery.' },
  { names: ['trials'], hint: 'Add trials with at least one trial, such as "climb: { kind: hill start }".' },
];

/** `less` stays below `more`. */
export interface Order {
  readonly less: string;
  readonly more: string;
  /** May they be equal? */
  readonly equal: boolean;
  readonly why: string;
}

/** Orders between two numbers; checked where neither is varied. */
export const orders: readonly Order[] = [
  { less: 'motor.baseSpeed', more: 'motor.constantPowerTo', equal: true, why: 'constant power starts at base speed' },
  { less: 'motor.constantPowerTo', more: 'motor.maxSpeed', equal: true, why: 'constant power ends at maximum speed at the latest' },
  { less: 'motor.baseSpeed', more: 'motor.maxSpeed', equal: true, why: 'the motor cannot reach its base speed otherwise' },
  { less: 'gearing.ratios.2', more: 'gearing.ratios.1', equal: false, why: 'the first ratio is the larger one, the lower gear' },
  { less: 'vehicle.regeneration.from', more: 'vehicle.regeneration.full', equal: false, why: 'regeneration fades in from the lower speed to the higher' },
  { less: 'trials.*.from', more: 'trials.*.to', equal: false, why: 'an acceleration ends at the higher speed' },
];

/** Whether a name falls under a pattern of these tables. */
export function matches(pattern: string, name: string): boolean {
  const anyTrial = pattern.startsWith('trials.*.') && name.startsWith('trials.') ? `trials.*.${name.slice(name.indexOf('.', 'trials.'.length) + 1)}` : name;
  return pattern.endsWith('.*') ? anyTrial.startsWith(pattern.slice(0, -1)) : anyTrial === pattern;
}

/** Names among those that stand (with their offsets) that fall under one of some patterns, in the order of the file. */
export function standing(patterns: readonly string[], stands: ReadonlyMap<string, number>): [name: string, at: number][] {
  const found = patterns.flatMap((pattern): [string, number][] => {
    if (pattern.includes('*')) return [...stands].filter(([name]) => matches(pattern, name));
    const at = stands.get(pattern);
    return at === undefined ? [] : [[pattern, at]];
  });
  return found.sort((a, b) => a[1] - b[1]);
}

/**
 * The alternative that leaves `name` without a part to play, where `stands` lists what the study states; undefined where none does.
 * Alternatives of a trial concern that trial alone.
 */
export function ruledOutBy(name: string, stands: Iterable<string>): { alternative: Alternative; by: string } | undefined {
  const candidates = alternatives.filter(({ rulesOut, derived }) => derived === undefined && rulesOut.some((pattern) => matches(pattern, name)));
  if (candidates.length === 0) return undefined;
  const trial = /^trials\.[^.]*\./u.exec(name)?.[0];
  for (const by of stands) {
    if (by.startsWith('trials.') && (trial === undefined || !by.startsWith(trial))) continue;
    const alternative = candidates.find(({ holds }) => holds.some((pattern) => matches(pattern, by)));
    if (alternative !== undefined) return { alternative, by };
  }
  return undefined;
}

/** The alternative by which two names cannot both have a part to play, whichever of them holds; undefined where they can. */
export function exclusion(name: string, other: string): Alternative | undefined {
  const trials = [name, other].map((each) => /^trials\.[^.]*\./u.exec(each)?.[0]);
  if (trials[0] !== undefined && trials[1] !== undefined && trials[0] !== trials[1]) return undefined;
  const under = (patterns: readonly string[], each: string) => patterns.some((pattern) => matches(pattern, each));
  return alternatives.find(({ holds, rulesOut }) => (under(holds, name) && under(rulesOut, other)) || (under(holds, other) && under(rulesOut, name)));
}

/** A name of these tables as the study file has it. */
export function nameInFile(name: string): string {
  return name
    .replace(/^(motor\.map)\.(?:wholeDrive|motorAlone)$/u, '$1')
    .replace(/^(motor\.(?:map|fullLoad))\.file$/u, '$1')
    .replace(/\.([12])$/u, (_, gear) => `[${gear}]`);
}
