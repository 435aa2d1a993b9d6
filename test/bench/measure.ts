/** Timing: rounds in which everything to be compared takes turns, so that a busy moment of the machine meets all of it. */

/** Middle value and the quartiles around it. */
export interface Spread {
  readonly median: number;
  readonly low: number;
  readonly high: number;
  readonly rounds: number;
}

/** CPU time of this process (s): what a core gives, also where others use the machine at the same time. */
export function cpuSeconds(): number {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1e6;
}

export function wallSeconds(): number {
  return performance.now() / 1000;
}

export function spreadOf(values: readonly number[]): Spread {
  const sorted = [...values].sort((a, b) => a - b);
  const at = (share: number) => {
    const place = share * (sorted.length - 1);
    const below = Math.floor(place);
    return sorted[below] + (sorted[Math.min(below + 1, sorted.length - 1)] - sorted[below]) * (place - below);
  };
  return { median: at(0.5), low: at(0.25), high: at(0.75), rounds: sorted.length };
}

/** Work to be timed: does it once and returns how many pieces that was. */
export type Work = () => number;

/** CPU time (s) that each work gets to warm up: the engine compiles what it finds to be used much. */
const warmUpS = 1.5;

/** Pieces per second of CPU time, one value a round, once all are warm. */
export function ratesInTurns(works: Readonly<Record<string, Work>>, rounds: number): Record<string, number[]> {
  const entries = Object.entries(works);
  const rates: Record<string, number[]> = Object.fromEntries(entries.map(([name]) => [name, []]));
  const warmUntil = cpuSeconds() + warmUpS * entries.length;
  while (cpuSeconds() < warmUntil) for (const [, work] of entries) work();
  for (let round = 0; round < rounds; round++) {
    for (const [name, work] of entries) {
      const before = cpuSeconds();
      const pieces = work();
      rates[name].push(pieces / (cpuSeconds() - before));
    }
  }
  return rates;
}

/** Round by round, one over the other. */
export function ratios(of: readonly number[], over: readonly number[]): number[] {
  return of.map((value, round) => value / over[round]);
}
