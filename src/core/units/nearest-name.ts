/** The valid name a person most likely meant. */

/** Longer names are compared by their beginnings, and no more names than this: a hint is not worth more time. */
const LONGEST = 40;
const MOST_NAMES = 600;

/**
 * Nearest of `names` to `wanted` by edit distance (insert, delete, replace, swap of neighbours; case counts a quarter), or null
 * when none is near: at most a third of the longer name may differ. Ties go to the first.
 * Source: optimal string alignment, a restricted form of F. Damerau, Comm. ACM 7(3), 1964 (from memory).
 */
export function nearestName(wanted: string, names: Iterable<string>): string | null {
  let best: string | null = null;
  let bestDistance = Number.POSITIVE_INFINITY;
  let seen = 0;
  for (const name of names) {
    seen += 1;
    if (seen > MOST_NAMES) break;
    const allowed = Math.max(1, Math.floor(Math.max(wanted.length, name.length) / 3));
    const limit = Math.min(allowed, bestDistance);
    if (Math.abs(wanted.length - name.length) > limit) continue;
    const distance = editDistance(wanted.slice(0, LONGEST), name.slice(0, LONGEST), limit);
    if (distance <= allowed && distance < bestDistance) [best, bestDistance] = [name, distance];
  }
  return best;
}

/** The distance; any number above `limit` where it is above that. */
function editDistance(a: string, b: string, limit: number): number {
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    let least = i;
    for (let j = 1; j <= b.length; j++) {
      const cost = replaceCost(a[i - 1] as string, b[j - 1] as string);
      let distance = Math.min((last[j] as number) + 1, (row[j - 1] as number) + 1, (last[j - 1] as number) + cost);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) distance = Math.min(distance, (beforeLast[j - 2] as number) + 1);
      row.push(distance);
      least = Math.min(least, distance);
    }
    // A swap reaches back two rows and costs one: hence the room of one.
    if (least > limit + 1) return least;
    [beforeLast, last] = [last, row];
  }
  return last[b.length] as number;
}

function replaceCost(a: string, b: string): number {
  if (a === b) return 0;
  return a.toLowerCase() === b.toLowerCase() ? 0.25 : 1;
}
