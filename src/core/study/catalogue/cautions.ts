/** What every host tells its reader about the figures: the cautions, and what the model leaves out. Said once, here. */

/** The caution in one line, for the foot of a printed result. */
export const cautionLine =
  'Concept-stage estimates: not a rating, an approval or a proof of safety. Follow local codes and have licensed engineers verify the design by test.';

/** The cautions in full, one sentence or two each, in the order to show them. */
export const cautions: readonly string[] = [
  'These figures are concept-stage estimates from a simplified model. They are no better than the inputs of the study.',
  'They are not a rating, not an approval and not a proof of safety.',
  'Brakes, tyres, driveline strength, thermal limits, high voltage and functional safety are outside what is computed here.',
  'Follow the codes in force where the vehicle is built and used, and have licensed engineers verify the design by test before anyone relies on it.',
];

/** One thing that the model does not contain. */
export interface LeftOutRow {
  readonly subject: string;
  /** What is taken instead, and so what a reader has to look after. */
  readonly sentence: string;
}

/** What the model leaves out, most consequential for a choice of motor and gearing first. */
export const leftOut: readonly LeftOutRow[] = [
  {
    subject: 'Peak duration',
    sentence: 'Peak torque and power are taken as held for as long as a trial lasts; how long a motor can give them is not computed.',
  },
  {
    subject: 'Temperatures',
    sentence:
      'No temperature of motor, inverter, gearing or battery is computed, and losses and limits do not change with heat; torque load and loss load only compare a cycle with the continuous limit.',
  },
  {
    subject: 'Base speed against voltage',
    sentence: 'Torque and power limits do not fall when the pack voltage sags; the pack only limits the power drawn from it.',
  },
  {
    subject: 'State of charge',
    sentence: 'Voltage, resistance and power limits of the pack are single figures, the same full and nearly empty.',
  },
  { subject: 'Battery ageing and cold', sentence: 'Usable energy, resistance and power limits do not change with age or pack temperature.' },
  { subject: 'Strength', sentence: 'Shafts, joints, housings and mounts are not checked; axle torque is peak torque times ratio, without shock loads.' },
  {
    subject: 'Gear and bearing life',
    sentence: 'Tooth strength, bearing life and lubrication are not checked; whether a ratio can be built in the space is not known here.',
  },
  { subject: 'Gearing losses', sentence: 'One efficiency per ratio and a drag torque linear in speed, whatever the load and the oil temperature.' },
  { subject: 'Tyre slip', sentence: 'Tyres roll without slip at a fixed radius; adhesion only caps the force, and plays no part in cycles.' },
  {
    subject: 'Braking and stability',
    sentence: 'Regeneration is a share of the braking force; wheel lock, cornering, weight transfer under braking and brake heat are not computed.',
  },
  { subject: 'Noise and vibration', sentence: 'Gear whine, motor noise and driveline oscillation are not computed.' },
  { subject: 'Response', sentence: 'Full torque is there at once; its rise time, traction control and the driver are left out.' },
  {
    subject: 'Traffic and weather',
    sentence: 'Consumption is that of the trace given; rain, snow, side wind, traffic and the driver make it differ on the road.',
  },
  { subject: 'Charging', sentence: 'One charging efficiency; charging power, time and battery heating or cooling at the charger are left out.' },
  { subject: 'Scatter', sentence: 'Every figure is a single value; production scatter and measuring uncertainty are for the reader to add.' },
];
