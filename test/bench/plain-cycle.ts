/**
 * The energy drawn and the time missed on a cycle once more, as one writes it first: one loop over the steps of the trace in their order,
 * over typed arrays, with every law and limit where it is needed. One ratio, losses by coefficients, level road, no wind. What depends on the trace alone
 * (mean speed, acceleration, duration) is worked out once, and so are a design's constants.
 */
import type { SpeedTraceLike } from '../../src/core/trials/moving-steps.ts';
import type { Vehicle } from '../../src/core/vehicle/vehicle.ts';

export interface PlainTrace {
  readonly speedMPerS: Float64Array;
  readonly accelerationMPerS2: Float64Array;
  readonly durationS: Float64Array;
}

export interface PlainSums {
  drawnJ: number;
  missedS: number;
}

/** The steps of a trace, standing ones included. */
export function plainTrace({ timesS, speedsMPerS }: SpeedTraceLike): PlainTrace {
  const steps = timesS.length - 1;
  const [speedMPerS, accelerationMPerS2, durationS] = [new Float64Array(steps), new Float64Array(steps), new Float64Array(steps)];
  for (let k = 0; k < steps; k++) {
    durationS[k] = timesS[k + 1] - timesS[k];
    speedMPerS[k] = (speedsMPerS[k] + speedsMPerS[k + 1]) / 2;
    accelerationMPerS2[k] = (speedsMPerS[k + 1] - speedsMPerS[k]) / durationS[k];
  }
  return { speedMPerS, accelerationMPerS2, durationS };
}

/** Drives the trace. */
export function drivePlainly(vehicle: Vehicle, { speedMPerS, accelerationMPerS2, durationS }: PlainTrace, sums: PlainSums): void {
  const { motor, gearing, battery, regeneration, road, auxiliariesW } = vehicle;
  const { peakTorqueNm, peakPowerW, baseSpeedRadPerS, constantPowerToRadPerS, maxSpeedRadPerS } = motor;
  const { hysteresis, eddyS, windageS2, copperWPerNm, acCopperS2, fieldWeakening, inverterFixed, inverterLinear, inverterSquare } = motor.losses;
  const { dragFixedNm, dragPerSpeedNms } = gearing;
  const { voltageV, resistanceOhm, chargeW } = battery;
  const { share, fromMPerS, fullMPerS } = regeneration;
  const massKg = vehicle.effectiveMassKg[0];
  const turns = gearing.ratios[0] / vehicle.wheelRadiusM;
  const pullingLever = 1 / (turns * gearing.efficiencies[0]);
  const brakingLever = gearing.efficiencies[0] / turns;
  const { rollingN, airLinearNSPerM } = road;
  const square = road.rollingPerSpeed2NS2PerM2 + road.airSquareNS2PerM2 + road.dragNS2PerM2;
  const mostW = (voltageV * voltageV) / (4 * resistanceOhm);
  const allowedW = Math.min(battery.dischargeW, mostW) - auxiliariesW;
  const copper = peakTorqueNm * copperWPerNm;
  const perPeakTorque = 1 / peakTorqueNm;
  const overspeed = maxSpeedRadPerS * (1 + 1e-12);
  let drawnJ = 0;
  let missedS = 0;
  for (let k = 0; k < speedMPerS.length; k++) {
    const v = speedMPerS[k];
    let electrical = 0;
    let missed = false;
    if (v > 0) {
      const force = massKg * accelerationMPerS2[k] + rollingN + v * airLinearNSPerM + v * v * square;
      const speed = v * turns;
      const drag = dragFixedNm + dragPerSpeedNms * speed;
      let limit = peakTorqueNm;
      let field = 0;
      if (speed > baseSpeedRadPerS) {
        field = fieldWeakening * (1 - baseSpeedRadPerS / speed);
        limit = speed <= constantPowerToRadPerS ? peakPowerW / speed : (peakPowerW * constantPowerToRadPerS) / (speed * speed);
        if (speed > overspeed) {
          limit = Number.POSITIVE_INFINITY;
          missed = true;
        }
      }
      const iron = peakTorqueNm * speed * (hysteresis + speed * (eddyS + speed * windageS2));
      const winding = copper * (1 + acCopperS2 * speed * speed);
      const asked = force * (force >= 0 ? pullingLever : brakingLever) + drag;
      if (force >= 0 || asked >= 0) {
        let torque = Math.min(asked, limit);
        const current2 = torque * perPeakTorque * (torque * perPeakTorque) + field * field;
        electrical =
          torque * speed + iron + winding * current2 + peakPowerW * (inverterFixed + inverterLinear * Math.sqrt(current2) + inverterSquare * current2);
        if (electrical > allowedW) {
          torque = batteryTorqueNm(vehicle, torque, speed, field, iron, winding, allowedW);
          electrical =
            torque > 0 ? allowedW : iron + winding * field * field + peakPowerW * (inverterFixed + inverterLinear * field + inverterSquare * field * field);
        }
        if (asked - torque > 1e-9 * asked) missed = true;
      } else {
        const fade = v >= fullMPerS ? 1 : v <= fromMPerS ? 0 : (v - fromMPerS) / (fullMPerS - fromMPerS);
        const torque = Math.max(share * fade * force * brakingLever + drag, -limit);
        const current2 = torque * perPeakTorque * (torque * perPeakTorque) + field * field;
        const braking =
          torque * speed + iron + winding * current2 + peakPowerW * (inverterFixed + inverterLinear * Math.sqrt(current2) + inverterSquare * current2);
        const coasting = iron + winding * field * field + peakPowerW * (inverterFixed + inverterLinear * field + inverterSquare * field * field);
        electrical = Math.min(braking, coasting);
      }
    }
    let terminal = Math.max(electrical + auxiliariesW, -chargeW);
    if (terminal > mostW) {
      terminal = mostW;
      missed = true;
    }
    const current = (voltageV - Math.sqrt(voltageV * voltageV - 4 * resistanceOhm * terminal)) / (2 * resistanceOhm);
    drawnJ += voltageV * current * durationS[k];
    if (missed) missedS += durationS[k];
  }
  sums.drawnJ = drawnJ;
  sums.missedS = missedS;
}

/** The torque at which the power allowed is drawn, by bisection; seldom asked for. */
function batteryTorqueNm({ motor }: Vehicle, fromNm: number, speed: number, field: number, iron: number, winding: number, allowedW: number): number {
  const { inverterFixed, inverterLinear, inverterSquare } = motor.losses;
  let [low, high] = [0, fromNm];
  for (let round = 0; round < 60; round++) {
    const middle = (low + high) / 2;
    const current2 = (middle / motor.peakTorqueNm) ** 2 + field * field;
    const inverter = motor.peakPowerW * (inverterFixed + inverterLinear * Math.sqrt(current2) + inverterSquare * current2);
    if (middle * speed + iron + winding * current2 + inverter > allowedW) high = middle;
    else low = middle;
  }
  return low;
}
