/** Mass factor: what turning parts add to the mass that is accelerated. */

/**
 * Effective over actual mass, 1 + (J_w + J_m i²) / (m r²): `wheelInertiaKgM2` of all wheels of the vehicle, `rotorInertiaKgM2` of
 * the rotor and all that turns with it, at ratio i, moved mass m and rolling radius r.
 * Source: Wong, Theory of Ground Vehicles, ch. 3 (from memory).
 */
export function massFactor(wheelInertiaKgM2: number, rotorInertiaKgM2: number, ratio: number, movedMassKg: number, wheelRadiusM: number): number {
  return 1 + (wheelInertiaKgM2 + rotorInertiaKgM2 * ratio * ratio) / (movedMassKg * wheelRadiusM * wheelRadiusM);
}
