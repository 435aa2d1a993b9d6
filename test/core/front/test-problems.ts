/**
 * Test problems with known fronts. ZDT: Zitzler, Deb, Thiele, Comparison of multiobjective evolutionary algorithms:
 * empirical results, Evolutionary Computation 8(2), 2000. DTLZ2: Deb, Thiele, Laumanns, Zitzler, Scalable
 * multi-objective optimization test problems, CEC 2002. Formulas from memory. `x` is the first variable and `g` what
 * the others give: 1 on the front (0 for DTLZ2), more off it.
 */

/** ZDT1: convex. */
export function zdt1(x: number, g: number): number[] {
  return [x, g * (1 - Math.sqrt(x / g))];
}

/** ZDT2: concave. */
export function zdt2(x: number, g: number): number[] {
  return [x, g * (1 - (x / g) ** 2)];
}

/** ZDT3: in five pieces. */
export function zdt3(x: number, g: number): number[] {
  return [x, g * (1 - Math.sqrt(x / g) - (x / g) * Math.sin(10 * Math.PI * x))];
}

/** ZDT6: concave and unevenly dense. */
export function zdt6(x: number, g: number): number[] {
  const first = 1 - Math.exp(-4 * x) * Math.sin(6 * Math.PI * x) ** 6;
  return [first, g * (1 - (first / g) ** 2)];
}

/** From 0 to 1 in n steps. */
export function steps(n: number): number[] {
  return [...Array(n + 1).keys()].map((i) => i / n);
}

/** DTLZ2, three objectives: n by n directions in the middles of equal angles, each a row of objectives for any g. */
export function dtlz2Angles(n: number): { row: (g: number) => number[] }[] {
  const angles = [...Array(n).keys()].map((i) => ((i + 0.5) / n) * (Math.PI / 2));
  return angles.flatMap((a) =>
    angles.map((b) => ({ row: (g: number) => [(1 + g) * Math.cos(a) * Math.cos(b), (1 + g) * Math.cos(a) * Math.sin(b), (1 + g) * Math.sin(a)] })),
  );
}
