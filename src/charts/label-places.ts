/** Finds places for labels beside their marks so that no label lies on another label or on another mark. */

/** A rectangle in pixels. */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** A mark that wants a label of a given size. */
export interface LabelWish {
  readonly markX: number;
  readonly markY: number;
  readonly width: number;
  readonly height: number;
}

/** Distances from mark to label at which places are tried, nearest first, px. */
const reaches = [11, 20, 32, 46, 64, 86, 112];
/** Directions in the order of liking: up right first, then round; unit vectors by sixteenths of a turn. */
const directions = [-2, -6, 2, 6, -1, -3, -5, -7, 1, 3, 5, 7, 0, 8, -4, 4].map((sixteenth) => {
  const angle = (sixteenth * Math.PI) / 8;
  return { x: Math.cos(angle), y: Math.sin(angle) };
});
/** Half the side of a mark that must stay visible, px. */
const markReach = 7;

/**
 * One box per wish, in order, inside `frame`: the nearest free place; among places equally near the one that covers the
 * fewest of `crowd`. The first wish is served first. Where every place is taken, the one that overlaps least.
 */
export function placeLabels(wishes: readonly LabelWish[], crowd: readonly { readonly x: number; readonly y: number }[], frame: Box): Box[] {
  const placed: Box[] = [];
  for (const wish of wishes) {
    let best: Box | null = null;
    let least = Number.POSITIVE_INFINITY;
    for (const candidate of candidates(wish)) {
      if (!within(candidate.box, frame)) continue;
      const cost = candidate.reach + 2 * covered(candidate.box, crowd) + 1000 * (overlaps(candidate.box, placed) + coversMarks(candidate.box, wishes));
      if (cost >= least) continue;
      least = cost;
      best = candidate.box;
    }
    placed.push(best ?? centred(wish, wish.markX, wish.markY));
  }
  return placed;
}

function* candidates(wish: LabelWish): Generator<{ box: Box; reach: number }> {
  for (const reach of reaches) {
    for (const direction of directions) {
      const x = wish.markX + direction.x * (reach + wish.width / 2);
      const y = wish.markY + direction.y * (reach + wish.height / 2);
      yield { box: centred(wish, x, y), reach };
    }
  }
}

function centred(wish: LabelWish, x: number, y: number): Box {
  return { x: x - wish.width / 2, y: y - wish.height / 2, width: wish.width, height: wish.height };
}

function within(box: Box, frame: Box): boolean {
  return box.x >= frame.x && box.y >= frame.y && box.x + box.width <= frame.x + frame.width && box.y + box.height <= frame.y + frame.height;
}

function overlaps(box: Box, others: readonly Box[]): number {
  const gap = 2;
  return others.filter(
    (other) =>
      box.x < other.x + other.width + gap && other.x < box.x + box.width + gap && box.y < other.y + other.height + gap && other.y < box.y + box.height + gap,
  ).length;
}

function coversMarks(box: Box, wishes: readonly LabelWish[]): number {
  return wishes.filter(({ markX, markY }) => covers(box, markX, markY, markReach)).length;
}

function covered(box: Box, crowd: readonly { readonly x: number; readonly y: number }[]): number {
  return crowd.filter(({ x, y }) => covers(box, x, y, 3)).length;
}

function covers(box: Box, x: number, y: number, reach: number): boolean {
  return x > box.x - reach && x < box.x + box.width + reach && y > box.y - reach && y < box.y + box.height + reach;
}
