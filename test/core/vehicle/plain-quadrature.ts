/** Gauss-Legendre quadrature for the tests of this room: nodes by Newton's method, nothing shared with the code under test. */

/** The rule of `points` points, as a function that integrates f over [from, to]. */
export function gaussLegendre(points: number): (f: (x: number) => number, from: number, to: number) => number {
  const nodes: number[] = [];
  const weights: number[] = [];
  for (let k = 0; k < points; k++) {
    let x = Math.cos((Math.PI * (k + 0.75)) / (points + 0.5));
    let slope = 1;
    for (let round = 0; round < 50; round++) {
      let [before, value] = [1, x];
      for (let n = 2; n <= points; n++) [before, value] = [value, ((2 * n - 1) * x * value - (n - 1) * before) / n];
      slope = (points * (x * value - before)) / (x * x - 1);
      x -= value / slope;
    }
    nodes.push(x);
    weights.push(2 / ((1 - x * x) * slope * slope));
  }
  return (f, from, to) => {
    const half = 0.5 * (to - from);
    return half * nodes.reduce((sum, node, k) => sum + weights[k] * f(from + half * (1 + node)), 0);
  };
}
