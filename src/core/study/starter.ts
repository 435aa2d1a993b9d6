/** The study that `layshaft new` writes: complete, small, commented, invented. */

const text = `title: Pilot station runabout
about: Smallest motor and a ratio for the harbour pilots' car that climbs the slipway loaded, keeps up on the coast road, and wastes little in town.

# All figures are invented: replace them by yours. Every figure carries its unit; layshaft check tells everything that does not fit.
vehicle:
  kerbMass: 1160 kg            # without driver and without motor, inverter and gearing, which massAndCost adds
  dragArea: 0.69 m²            # drag coefficient times frontal area
  rolling: { c0: 0.0102, c1: 2.4e-6 s²/m² }    # rolling coefficient, and its rise with the square of speed
  tyre: 185/65 R15             # or wheelRadius: 0.301 m
  wheelInertia: 3.1 kg·m²      # all four wheels together
  axles: { driven: front, frontShare: 58 %, centreHeight: 0.58 m, wheelbase: 2.48 m, adhesion: 0.8 }
  auxiliaries: 320 W           # everything electrical that is not the drive

motor:
  peakTorque: 135 N·m          # the figures here are the reference design; vary below tries others
  baseSpeed: 3600 rpm          # up to here peak torque, beyond it constant power
  maxSpeed: 12000 rpm
  continuous: { torque: 48 %, power: 52 % }    # what it sustains, as shares of the peak figures
  inertia: { perTorque: 1.6e-4 kg·m²/(N·m) }
  losses: { hysteresis: 1.5e-3, eddy: 1.1e-6 s, windage: 3e-10 s², copper: 45 W/(N·m), acCopper: 9e-7 s², fieldWeakening: 0.22, inverterFixed: 0.0015, inverterLinear: 0.017, inverterSquare: 0.009 }

gearing:
  ratio: 9.2
  efficiency: 97 %
  dragTorque: { fixed: 0.3 N·m, perSpeed: 0.0005 N·m·s }

battery: { voltage: 350 V, resistance: 0.11 Ω, discharge: 85 kW, regenerative: 45 kW, usable: 31 kWh, chargingEfficiency: 88 % }

massAndCost:                   # optional: what a larger drive weighs and costs
  mass: { motor: { fixed: 9 kg, perTorque: 0.15 kg/(N·m) }, inverter: { fixed: 4 kg, perPower: 0.07 kg/kW }, gearing: { fixed: 7 kg, perTorque: 0.007 kg/(N·m) } }
  cost: { currency: EUR, motor: { fixed: 130, perTorque: 2.7 /(N·m) }, inverter: { fixed: 150, perPower: 5.1 /kW }, gearing: { fixed: 100, perTorque: 0.11 /(N·m) } }

air: { temperature: 12 °C, altitude: 0 m }

trials:                        # what every design is put through; the names are yours
  away:     { kind: acceleration, from: 0 km/h, to: 60 km/h, payload: 180 kg }
  slipway:  { kind: hill start, payload: 380 kg, startAcceleration: 0.2 m/s², with: { vehicle.axles.adhesion: 0.6 } }   # wet stone
  bridge:   { kind: gradeability, at: 60 km/h, payload: 380 kg }
  coast:    { kind: top speed, payload: 180 kg }
  town:     { kind: cycle, cycle: udds, payload: 180 kg }
  gale:     { kind: cycle, cycle: udds, payload: 180 kg, headWind: 8 m/s, with: { vehicle.auxiliaries: 1.4 kW, air.temperature: 2 °C } }

vary:                          # 11 × 10 × 7 = 770 designs; leave out steps to draw from whole ranges by "search: { method: sobol, designs: 2000 }"
  gearing.ratio:    { from: 6.5, to: 11.5, steps: 11 }
  motor.peakTorque: { from: 90 N·m, to: 180 N·m, steps: 10 }
  motor.baseSpeed:  { from: 3000 rpm, to: 4800 rpm, steps: 7 }

requirements:                  # a design must meet all of them; every cycle must be followed besides
  slipway.grade:    { atLeast: 18 % }
  bridge.grade:     { atLeast: 7 % }
  away.time:        { atMost: 7.5 s }
  coast.speed:      { atLeast: 115 km/h }

tradeOff:                      # of what is left, no design shown is beaten in everything by another
  minimise: [town.batteryEnergy, driveUnit.cost]
  resolution: { town.batteryEnergy: 0.2 Wh/km, driveUnit.cost: 5 }
  keep: [gale.range, town.torqueLoad]
`;

/** The commented starter study: valid, without warnings, about 800 designs. */
export function starterStudy(): string {
  return text;
}
