/**
 * The cycle trial once more, as a plain scalar loop over every step of the trace: slow, without anything prepared, and
 * with its own motor, battery and gearing laws. It shares records with the code under test, and nothing else.
 */
import type { LossMap } from '../../../src/core/vehicle/loss-map.ts';
import type { Vehicle } from '../../../src/core/vehicle/vehicle.ts';

export interface OracleTrace {
  timesS: readonly number[];
  speedsMPerS: readonly number[];
}

export interface OracleConditions {
  grade: number;
  road: { over: 'time' | 'distance'; at: readonly number[]; grades: readonly number[] } | null;
  capSpeedMPerS: number;
}

function interpolated(at: readonly number[], values: readonly number[], x: number, offset = 0): number {
  if (x <= at[0]) return values[offset];
  for (let i = 1; i < at.length; i++) {
    const [from, to] = [values[offset + i - 1], values[offset + i]];
    if (x <= at[i]) return from + ((x - at[i - 1]) / (at[i] - at[i - 1])) * (to - from);
  }
  return values[offset + at.length - 1];
}

function envelope({ motor }: Vehicle, w: number): number {
  if (motor.fullLoad !== null) {
    const { speedsRadPerS, torquesNm, referenceBaseSpeedRadPerS, referencePeakTorqueNm } = motor.fullLoad;
    const stretch = motor.baseSpeedRadPerS / referenceBaseSpeedRadPerS;
    if (w > motor.maxSpeedRadPerS * (1 + 1e-12)) return 0;
    return (interpolated(speedsRadPerS, torquesNm, w / stretch) * motor.peakTorqueNm) / referencePeakTorqueNm;
  }
  if (w > motor.maxSpeedRadPerS * (1 + 1e-12)) return 0;
  if (w <= motor.baseSpeedRadPerS) return motor.peakTorqueNm;
  if (w <= motor.constantPowerToRadPerS) return motor.peakPowerW / w;
  return (motor.peakPowerW * motor.constantPowerToRadPerS) / w ** 2;
}

function mapRead(map: LossMap, speed: number, torque: number): number {
  const { speedsRadPerS, torquesNm, lossesW } = map;
  const rows = speedsRadPerS.map((_, i) => interpolated(torquesNm, lossesW, torque, i * torquesNm.length));
  return interpolated(speedsRadPerS, rows, speed);
}

function mapAxes({ motor }: Vehicle, map: LossMap, t: number, w: number): [number, number] {
  const speed = (w / motor.baseSpeedRadPerS) * map.referenceBaseSpeedRadPerS;
  const torque = ((map.motoringOnly ? Math.abs(t) : t) / motor.peakTorqueNm) * map.referencePeakTorqueNm;
  return [speed, torque];
}

function lossOf(vehicle: Vehicle, t: number, w: number): number {
  const { motor } = vehicle;
  const c = motor.losses;
  const phi = w === 0 ? 0 : Math.max(0, 1 - motor.baseSpeedRadPerS / w);
  const current2 = (Math.abs(t) / motor.peakTorqueNm) ** 2 + (c.fieldWeakening * phi) ** 2;
  const inverter = motor.peakPowerW * (c.inverterFixed + c.inverterLinear * Math.sqrt(current2) + c.inverterSquare * current2);
  const map = motor.lossMap;
  if (map !== null) {
    const scale = motor.peakPowerW / (map.referencePeakTorqueNm * map.referenceBaseSpeedRadPerS);
    const [speed, torque] = mapAxes(vehicle, map, t, w);
    return scale * mapRead(map, speed, torque) + (map.motorAlone ? inverter : 0);
  }
  const iron = c.hysteresis * w + c.eddyS * w ** 2 + c.windageS2 * w ** 3;
  return motor.peakTorqueNm * (iron + c.copperWPerNm * (1 + c.acCopperS2 * w ** 2) * current2) + inverter;
}

function outsideOf(vehicle: Vehicle, t: number, w: number): boolean {
  const map = vehicle.motor.lossMap;
  if (map === null) return false;
  const [speed, torque] = mapAxes(vehicle, map, t, w);
  const within = (x: number, axis: readonly number[]) => {
    const [first, last] = [Math.min(...axis), Math.max(...axis)];
    const give = 1e-12 * (last - first);
    return x >= first - give && x <= last + give;
  };
  return !within(speed, map.speedsRadPerS) || !within(torque, map.torquesNm);
}

/** Lowest torque from 0 up at which the pack's limit is drawn: a fine walk, then bisection; Infinity: never reached. */
function batteryTorque(vehicle: Vehicle, w: number, up: number): number {
  const { voltageV, resistanceOhm, dischargeW } = vehicle.battery;
  const limit = Math.min(dischargeW, resistanceOhm > 0 ? voltageV ** 2 / (4 * resistanceOhm) : Number.POSITIVE_INFINITY);
  const over = (t: number) => t * w + lossOf(vehicle, t, w) + vehicle.auxiliariesW - limit;
  if (over(0) > 0) return 0;
  // Losses from coefficients rise with torque; measured ones need not, so that they are searched piece by piece.
  const pieces = vehicle.motor.lossMap === null ? 1 : 128;
  for (let i = 1; i <= pieces; i++) {
    if (over((up * i) / pieces) <= 0) continue;
    let low = (up * (i - 1)) / pieces;
    let high = (up * i) / pieces;
    for (;;) {
      const middle = (low + high) / 2;
      if (middle === low || middle === high) return low;
      if (over(middle) > 0) high = middle;
      else low = middle;
    }
  }
  return Number.POSITIVE_INFINITY;
}

interface Driven {
  gear: number;
  demand: number;
  omega: number;
  torque: number;
  loss: number;
  electrical: number;
  missed: boolean;
  overspeed: boolean;
  delivered: number;
  gearing: number;
  brakes: number;
  unmet: number;
}

function driveStep(vehicle: Vehicle, gear: number, v: number, a: number, grade: number): Driven {
  const { road, gearing, motor, wheelRadiusM: r } = vehicle;
  const cos = 1 / Math.sqrt(1 + grade * grade);
  const sin = grade * cos;
  const i = gearing.ratios[gear];
  const eta = gearing.efficiencies[gear];
  const air = road.airLinearNSPerM * v + road.airSquareNS2PerM2 * v * v + road.dragNS2PerM2 * (v + road.headWindMPerS) * Math.abs(v + road.headWindMPerS);
  const rolling = cos * (road.rollingN + road.rollingPerSpeed2NS2PerM2 * v * v);
  const demand = vehicle.effectiveMassKg[gear] * a + rolling + air + road.weightN * sin;
  const omega = (v * i) / r;
  const spin = gearing.dragFixedNm + gearing.dragPerSpeedNms * omega;
  const overspeed = omega > motor.maxSpeedRadPerS * (1 + 1e-12);
  const limit = overspeed ? Number.POSITIVE_INFINITY : envelope(vehicle, omega);
  const step: Driven = {
    gear,
    demand,
    omega,
    torque: 0,
    loss: 0,
    electrical: 0,
    missed: overspeed,
    overspeed,
    delivered: demand,
    gearing: 0,
    brakes: 0,
    unmet: 0,
  };
  const onWheel = (torque: number) => (torque >= spin ? ((torque - spin) * i * eta) / r : ((torque - spin) * i) / (r * eta));

  if (demand >= 0 || (demand * r * eta) / i + spin >= 0) {
    const wanted = demand >= 0 ? (demand * r) / (i * eta) + spin : (demand * r * eta) / i + spin;
    step.torque = Math.min(wanted, limit, batteryTorque(vehicle, omega, wanted));
    if (wanted - step.torque > 1e-9 * wanted) step.missed = true;
    step.loss = lossOf(vehicle, step.torque, omega);
    step.electrical = step.torque * omega + step.loss;
    step.delivered = step.torque === wanted ? demand : onWheel(step.torque);
    step.gearing = step.torque * omega - step.delivered * v;
    step.unmet = (step.delivered - demand) * v;
    return step;
  }
  const { share, fromMPerS, fullMPerS } = vehicle.regeneration;
  let fade = 1;
  if (v < fullMPerS) fade = v <= fromMPerS ? 0 : (v - fromMPerS) / (fullMPerS - fromMPerS);
  const asked = (share * fade * demand * r * eta) / i + spin;
  const torque = Math.max(asked, -limit);
  const regenerating = torque * omega + lossOf(vehicle, torque, omega);
  const coasting = lossOf(vehicle, 0, omega);
  if (coasting < regenerating) {
    step.loss = coasting;
    step.electrical = coasting;
    step.gearing = Math.min(spin * omega, -demand * v);
    step.brakes = -demand * v - step.gearing;
    step.delivered = 0;
    return step;
  }
  step.torque = torque;
  step.loss = lossOf(vehicle, torque, omega);
  step.electrical = regenerating;
  step.delivered = ((torque - spin) * i) / (r * eta);
  step.gearing = torque * omega - step.delivered * v;
  step.brakes = Math.abs(demand - step.delivered) * v;
  return step;
}

function chosen(vehicle: Vehicle, v: number, a: number, grade: number, most: number): Driven {
  const low = driveStep(vehicle, 0, v, a, grade);
  if (vehicle.gearing.ratioCount === 1) return low;
  const high = driveStep(vehicle, 1, v, a, grade);
  const follows = (step: Driven) => !step.missed && step.electrical + vehicle.auxiliariesW <= most;
  if (follows(low) && follows(high)) return high.electrical < low.electrical ? high : low;
  if (follows(low)) return low;
  if (follows(high)) return high;
  if (low.overspeed && high.overspeed) return high;
  if (low.overspeed) return high;
  if (high.overspeed) return low;
  return high.delivered > low.delivered ? high : low;
}

export type OracleResult = Record<
  | 'batteryEnergyJPerM'
  | 'gridEnergyJPerM'
  | 'rangeM'
  | 'wheelDemandJPerM'
  | 'wheelBrakingJPerM'
  | 'rmsTorqueNm'
  | 'torqueLoad'
  | 'lossLoad'
  | 'worstLossLoad'
  | 'offTrace'
  | 'recovered'
  | 'outsideMap'
  | 'rollingJPerM'
  | 'airJPerM'
  | 'gradeJPerM'
  | 'inertiaJPerM'
  | 'gearingJPerM'
  | 'motorJPerM'
  | 'batteryJPerM'
  | 'auxiliariesJPerM'
  | 'brakesJPerM'
  | 'unmetJPerM',
  number
>;

/** Drives the trace step by step and adds up; `seen` gets every moving step's branch for counting what was exercised. */
export function oracleCycle(vehicle: Vehicle, trace: OracleTrace, conditions: OracleConditions, seen: Map<string, number> = new Map()): OracleResult {
  const { voltageV: V, resistanceOhm: R, chargeW, usableJ, chargingEfficiency } = vehicle.battery;
  const { timesS } = trace;
  const cap = Number.isNaN(conditions.capSpeedMPerS) ? Number.POSITIVE_INFINITY : conditions.capSpeedMPerS;
  const speeds = trace.speedsMPerS.map((speed) => Math.min(speed, cap));
  const most = R > 0 ? V ** 2 / (4 * R) : Number.POSITIVE_INFINITY;
  const note = (what: string) => seen.set(what, (seen.get(what) ?? 0) + 1);
  const sum = { drawn: 0, demand: 0, braking: 0, torque2: 0, missed: 0, recovered: 0, outside: 0 };
  const sink = { rolling: 0, air: 0, grade: 0, inertia: 0, gearing: 0, motor: 0, battery: 0, auxiliaries: 0, brakes: 0, unmet: 0 };
  const losses: number[] = [];
  let distance = 0;

  for (let k = 0; k + 1 < timesS.length; k++) {
    const dt = timesS[k + 1] - timesS[k];
    const v = (speeds[k] + speeds[k + 1]) / 2;
    const a = (speeds[k + 1] - speeds[k]) / dt;
    let grade = conditions.grade;
    if (conditions.road !== null) {
      const here = conditions.road.over === 'time' ? (timesS[k] + timesS[k + 1]) / 2 : distance + (v * dt) / 2;
      grade = interpolated(conditions.road.at, conditions.road.grades, here);
    }
    distance += v * dt;
    let terminal = vehicle.auxiliariesW;
    let missed = false;
    let demand = 0;
    let loss = 0;
    if (v > 0) {
      const step = chosen(vehicle, v, a, grade, most);
      demand = step.demand;
      loss = step.loss;
      missed = step.missed;
      terminal += step.electrical;
      sum.torque2 += step.torque ** 2 * dt;
      if (outsideOf(vehicle, step.torque, step.omega)) sum.outside += dt;
      const cos = 1 / Math.sqrt(1 + grade * grade);
      const { road } = vehicle;
      sink.rolling += (road.rollingN + road.rollingPerSpeed2NS2PerM2 * v * v) * cos * v * dt;
      const wind = v + road.headWindMPerS;
      sink.air += (road.airLinearNSPerM * v + road.airSquareNS2PerM2 * v * v + road.dragNS2PerM2 * wind * Math.abs(wind)) * v * dt;
      sink.grade += road.weightN * grade * cos * v * dt;
      sink.inertia += vehicle.effectiveMassKg[step.gear] * a * v * dt;
      sink.gearing += step.gearing * dt;
      sink.motor += step.loss * dt;
      sink.brakes += step.brakes * dt;
      sink.unmet += step.unmet * dt;
      note(`gear ${step.gear}`);
      if (step.overspeed) note('overspeed');
      else if (step.missed) note('clipped');
      if (demand >= 0 && step.torque < step.loss / 1e9) note('no torque left');
      if (demand < 0) note(step.torque === 0 ? 'coasting' : step.torque > 0 ? 'pulling while slowing' : 'regenerating');
    } else note('standing');
    if (terminal < -chargeW) {
      note('charge limit');
      sink.brakes += (-chargeW - terminal) * dt;
      terminal = -chargeW;
    }
    const toPack = terminal - vehicle.auxiliariesW;
    if (terminal > most * (1 - 1e-6)) note('at V²/4R');
    if (terminal > most) {
      note('beyond V²/4R');
      missed = true;
      sink.unmet -= (terminal - most) * dt;
      terminal = most;
    }
    const current = R === 0 ? terminal / V : (V - Math.sqrt(Math.max(0, V * V - 4 * R * terminal))) / (2 * R);
    sum.drawn += V * current * dt;
    sink.battery += current * current * R * dt;
    sink.auxiliaries += vehicle.auxiliariesW * dt;
    losses.push(loss * dt);
    if (missed) sum.missed += dt;
    if (demand > 0) sum.demand += demand * v * dt;
    if (demand < 0) {
      sum.braking += -demand * v * dt;
      sum.recovered += Math.max(0, -toPack) * dt;
    }
  }

  const total = (timesS.at(-1) as number) - timesS[0];
  const corner = cornerLoss(vehicle);
  const perM = (energy: number) => (distance > 0 ? energy / distance : Number.NaN);
  const battery = perM(sum.drawn);
  const rms = Math.sqrt(sum.torque2 / total);
  return {
    batteryEnergyJPerM: battery,
    gridEnergyJPerM: battery > 0 ? battery / chargingEfficiency : Number.NaN,
    rangeM: battery > 0 ? usableJ / battery : Number.NaN,
    wheelDemandJPerM: perM(sum.demand),
    wheelBrakingJPerM: perM(sum.braking),
    rmsTorqueNm: rms,
    torqueLoad: rms / (vehicle.motor.continuousTorqueShare * vehicle.motor.peakTorqueNm),
    lossLoad: losses.reduce((s, x) => s + x, 0) / total / corner,
    worstLossLoad: worstMean(losses, timesS) / corner,
    offTrace: sum.missed / total,
    recovered: sum.braking > 0 ? sum.recovered / sum.braking : Number.NaN,
    outsideMap: vehicle.motor.lossMap === null ? Number.NaN : sum.outside / total,
    rollingJPerM: perM(sink.rolling),
    airJPerM: perM(sink.air),
    gradeJPerM: perM(sink.grade),
    inertiaJPerM: perM(sink.inertia),
    gearingJPerM: perM(sink.gearing),
    motorJPerM: perM(sink.motor),
    batteryJPerM: perM(sink.battery),
    auxiliariesJPerM: perM(sink.auxiliaries),
    brakesJPerM: perM(sink.brakes),
    unmetJPerM: perM(sink.unmet),
  };
}

function cornerLoss(vehicle: Vehicle): number {
  const { continuousTorqueShare: kT, continuousPowerShare: kP, peakTorqueNm, baseSpeedRadPerS, maxSpeedRadPerS } = vehicle.motor;
  return lossOf(vehicle, kT * peakTorqueNm, Math.min((baseSpeedRadPerS * kP) / kT, maxSpeedRadPerS));
}

function worstMean(lossJ: readonly number[], timesS: readonly number[]): number {
  let worst = Number.NEGATIVE_INFINITY;
  for (let start = 0; start < lossJ.length; start++) {
    let sum = 0;
    for (let k = start; k < lossJ.length; k++) {
      sum += lossJ[k];
      const span = timesS[k + 1] - timesS[start];
      if (span >= 600 * (1 - 1e-9)) {
        worst = Math.max(worst, sum / span);
        break;
      }
    }
  }
  return Number.isFinite(worst) ? worst : lossJ.reduce((s, x) => s + x, 0) / ((timesS.at(-1) as number) - timesS[0]);
}
