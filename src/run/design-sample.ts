/** Which designs stand for all of a search: chosen by hash, the same for every run of a study. */
import { hashNumber } from '../core/numerics/hash.ts';

/** Distinct numbers of 1…count, ascending: all of a small search, else one hashed pick from each of `size` equal stretches. */
export function sampleNumbers(count: number, size: number): number[] {
  if (count <= size) return Array.from({ length: count }, (_, k) => k + 1);
  const stretch = count / size;
  return Array.from({ length: size }, (_, k) => {
    const first = Math.floor(k * stretch);
    const width = Math.floor((k + 1) * stretch) - first;
    return first + 1 + (hashNumber(k) % width);
  });
}
