/** The model in words, as far as a study uses it. */
import type { Study } from '../core/study/study.ts';

/** One sentence per law, each for a reader who will judge whether it fits the case. */
export function modelSentences(study: Study): string[] {
  // With options several ways may stand side by side: each has its sentence.
  const used = (name: string) => study.values[name] !== undefined || study.axes.some(({ sets }) => sets.includes(name));
  const adhesion = used('vehicle.axles.adhesion');
  const budget = [...Object.keys(study.values), ...study.axes.flatMap(({ sets }) => sets)].some((name) => name.startsWith('massAndCost.'));
  const cycle = study.trials.some(({ kind }) => kind === 'cycle');
  const maps = [...(study.lossMap === null ? [] : [study.lossMap]), ...study.optionMaps.map(({ data }) => data)];
  const drag = ['gearing.dragTorque.fixed', 'gearing.dragTorque.perSpeed'].some(
    (name) => (study.values[name] ?? 0) > 0 || study.axes.some(({ sets }) => sets.includes(name)),
  );
  const sentence = (says: boolean, words: string) => (says ? [words] : []);
  return [
    ...sentence(
      used('vehicle.coastDown.f0'),
      'Road load: a constant, a linear and a square term in speed from a coast-down, scaled with mass, and the weight along the slope.',
    ),
    ...sentence(
      used('vehicle.rolling.c0'),
      'Road load: rolling resistance per weight with a rise by the square of speed, air drag with any head wind, and the weight along the slope.',
    ),
    ...sentence(used('vehicle.massFactor'), 'Turning parts are counted by one fixed mass factor.'),
    ...sentence(
      used('vehicle.wheelInertia'),
      'Turning parts are counted by a mass factor from the inertia of the wheels and, by the square of the ratio, of the rotor.',
    ),
    ...sentence(
      study.fullLoad === null,
      'Motor: peak torque up to base speed, then constant power, then power falling with speed where the study says so; nothing above maximum speed.',
    ),
    ...sentence(
      study.fullLoad !== null || study.optionCurves.length > 0,
      'Motor: the measured full-load curve, its axes scaled with peak torque and base speed where they are varied.',
    ),
    ...sentence(
      study.lossMap === null,
      'Losses of motor and inverter: iron, winding, field weakening and inverter terms that grow with the size of the motor.',
    ),
    ...sentence(maps.length > 0, 'Losses of motor and inverter: interpolated from a measured map, scaled with the motor’s peak power.'),
    ...sentence(
      maps.some(({ motoringOnly }) => motoringOnly),
      'Where a map has motoring figures alone, generating has the losses of motoring at the same torque and speed.',
    ),
    drag
      ? 'Gearing: one efficiency per ratio and a drag torque that rises with speed.'
      : 'Gearing: one efficiency per ratio, without a drag torque of its own.',
    ...sentence(
      used('gearing.ratios.1'),
      'Two ratios: at full pedal the shift comes where the higher gear pulls more, or at maximum motor speed, and its time passes without force; on a cycle each step takes the ratio that draws less from the battery.',
    ),
    `At full pedal the force is the least of what motor, battery${adhesion ? ' and the adhesion of the driven axle, with load transfer,' : ''} allow.`,
    'Times and distances are integrated over speed; top speed, gradeability and hill start are solved for directly.',
    ...(cycle
      ? [
          'Cycles are followed step by step from the speed trace back to the battery, with a share of the braking force regenerated; what the drive cannot follow is counted as off-trace time.',
        ]
      : []),
    ...(budget
      ? [
          'Mass and cost of motor, inverter, gearing and battery follow the design by the linear terms of the study; the mass they add is carried in every trial.',
        ]
      : []),
    'A design is on the front when no other that meets every requirement is at least as good in all objectives and better in one.',
    'The balanced design has the least sum of objectives, each scaled from its best to its worst on the front.',
  ];
}
