/** What the drive does on every moving step of a cycle: arrays that are written anew for every design. */

/**
 * Steps driven at a time. Long loops in the first calls leave V8 with loop code that it entered half-way through a call (on-stack
 * replacement), measured three times slower and kept for good; short ones let it compile whole functions.
 */
export const STEPS_AT_A_TIME = 128;

/** One entry per moving step of a compiled cycle. */
export interface DrivenSteps {
  /** Force that the trace asks for at the wheels. */
  readonly demandN: Float64Array;
  /** Force through the gearing: what the motor delivers or takes; the drag of the gearing where the motor coasts. */
  readonly gearedN: Float64Array;
  readonly torqueNm: Float64Array;
  /** Torque times motor speed. */
  readonly shaftW: Float64Array;
  readonly lossW: Float64Array;
  /** 1: the drive cannot follow the trace. */
  readonly missed: Uint8Array;
  readonly gear: Uint8Array;
}

/** Arrays for so many moving steps. */
export function createDrivenSteps(steps: number): DrivenSteps {
  return {
    demandN: new Float64Array(steps),
    gearedN: new Float64Array(steps),
    torqueNm: new Float64Array(steps),
    shaftW: new Float64Array(steps),
    lossW: new Float64Array(steps),
    missed: new Uint8Array(steps),
    gear: new Uint8Array(steps),
  };
}
