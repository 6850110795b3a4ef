/** Lays text out without overlaps: along one row, or on the first free one of several spots. Pure. */

export interface Wish {
  /** Where the middle should stand. */
  readonly at: number;
  readonly width: number;
  /** Where not all fit the lightest is left out, of several the last; 0 where nothing is said. */
  readonly weight?: number;
}

export interface Row {
  readonly left: number;
  readonly right: number;
  /** Least room between neighbours. */
  readonly gap: number;
  /** How far a text may stand from where it was wished; without it as far as the row goes. */
  readonly slack?: number;
}

/**
 * Middles of the texts of a row: inside it, in the order of their wishes, none nearer to the next than the gap, and as
 * little moved (least squares) as that allows. Null for a text that is left out because there is no room for it.
 */
export function place(wishes: readonly Wish[], row: Row): (number | null)[] {
  const placed: (number | null)[] = wishes.map(() => null);
  const kept = wishes
    .map((wish, index) => ({ ...wish, index, weight: wish.weight ?? 0 }))
    .filter(({ at, width }) => Number.isFinite(at) && width <= row.right - row.left)
    .sort((a, b) => a.at - b.at || a.index - b.index);
  for (;;) {
    const room = kept.reduce((sum, { width }) => sum + width, 0) + row.gap * Math.max(0, kept.length - 1);
    const middles = room > row.right - row.left ? null : closest(kept, row);
    const slack = row.slack ?? Infinity;
    const strayed = middles?.findIndex((middle, place) => Math.abs(middle - kept[place]!.at) > slack) ?? -1;
    if (middles && strayed < 0) {
      for (const [index, wish] of kept.entries()) placed[wish.index] = middles[index]!;
      return placed;
    }
    kept.splice(middles ? leastNear(kept, strayed, middles, row.gap) : leastOf(kept, 0, kept.length - 1), 1);
  }
}

/** Isotonic regression: with widths and gaps taken off, places may not fall; blocks that would are pooled at their mean. */
function closest(kept: readonly Wish[], { left, right, gap }: Row): number[] {
  const offsets: number[] = [];
  let used = 0;
  for (const { width } of kept) {
    offsets.push(used + width / 2);
    used += width + gap;
  }
  const blocks: { sum: number; count: number }[] = [];
  for (const [index, { at }] of kept.entries()) {
    let block = { sum: at - offsets[index]!, count: 1 };
    for (let last = blocks.at(-1); last && last.sum / last.count > block.sum / block.count; last = blocks.at(-1)) {
      block = { sum: block.sum + last.sum, count: block.count + last.count };
      blocks.pop();
    }
    blocks.push(block);
  }
  const starts = blocks.flatMap(({ sum, count }) => Array.from({ length: count }, () => sum / count));
  // The row's ends clip: of all places that are allowed, these stay the nearest.
  const last = right - (used - gap);
  return starts.map((start, index) => Math.min(Math.max(start, left), Math.max(left, last)) + offsets[index]!);
}

/** Which of the texts that touch a strayed one goes. */
function leastNear(
  kept: readonly { weight: number; width: number }[],
  at: number,
  middles: number[],
  gap: number,
): number {
  const touches = (index: number): boolean =>
    middles[index + 1]! - middles[index]! - (kept[index]!.width + kept[index + 1]!.width) / 2 < gap + 1e-6;
  let from = at;
  let to = at;
  while (from > 0 && touches(from - 1)) from--;
  while (to < kept.length - 1 && touches(to)) to++;
  return leastOf(kept, from, to);
}

function leastOf(kept: readonly { weight: number }[], from: number, to: number): number {
  let least = from;
  for (let index = from; index <= to; index++) if (kept[index]!.weight <= kept[least]!.weight) least = index;
  return least;
}

export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** The first of the boxes that lies inside the area and clear of all that is taken; null where none does. */
export function firstFree(boxes: readonly Box[], area: Box, taken: readonly Box[]): Box | null {
  const inside = (box: Box): boolean =>
    box.x >= area.x &&
    box.y >= area.y &&
    box.x + box.width <= area.x + area.width &&
    box.y + box.height <= area.y + area.height;
  return boxes.find((box) => inside(box) && !taken.some((other) => overlap(box, other))) ?? null;
}

/** Boxes that only touch do not overlap. */
export function overlap(a: Box, b: Box): boolean {
  return a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height;
}
