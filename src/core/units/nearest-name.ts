/** The valid name a person most likely meant. */

/**
 * Nearest of `names` to `wanted` by edit distance (insert, delete, replace, swap of neighbours; case counts half), or null
 * when none is near: at most a third of the longer name may differ. Ties go to the first. Names and text are cut at 60 characters.
 * Source: optimal string alignment, a restricted form of F. Damerau, Comm. ACM 7(3), 1964 (from memory).
 */
export function nearestName(wanted: string, names: Iterable<string>): string | null {
  let best: string | null = null;
  let bestDistance = Number.POSITIVE_INFINITY;
  for (const name of names) {
    const allowed = Math.max(1, Math.floor(Math.max(wanted.length, name.length) / 3));
    const distance = editDistance(wanted.slice(0, 60), name.slice(0, 60));
    if (distance <= allowed && distance < bestDistance) [best, bestDistance] = [name, distance];
  }
  return best;
}

function editDistance(a: string, b: string): number {
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const step = Math.min((last[j] as number) + 1, (row[j - 1] as number) + 1, (last[j - 1] as number) + replaceCost(a[i - 1] as string, b[j - 1] as string));
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      row.push(swapped ? Math.min(step, (beforeLast[j - 2] as number) + 1) : step);
    }
    [beforeLast, last] = [last, row];
  }
  return last[b.length] as number;
}

function replaceCost(a: string, b: string): number {
  if (a === b) return 0;
  return a.toLowerCase() === b.toLowerCase() ? 0.5 : 1;
}
