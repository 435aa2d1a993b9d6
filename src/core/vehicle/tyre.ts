/** Rolling radius from a tyre size. */

/** Rolling circumference over overall diameter of radial tyres: less than π, as the tread is pressed flat. Common practice. */
const CIRCUMFERENCE_PER_DIAMETER = 3.05;

/**
 * Dynamic rolling radius (m) of a radial tyre: `widthM` section width, `aspect` section height over width (0.65 in
 * 215/65 R16), `rimM` rim diameter.
 */
export function tyreRadiusM(widthM: number, aspect: number, rimM: number): number {
  const diameterM = rimM + 2 * widthM * aspect;
  return (CIRCUMFERENCE_PER_DIAMETER * diameterM) / (2 * Math.PI);
}
