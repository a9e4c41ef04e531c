import type { SkylineItem } from '#shared/venue/skyline';

/** Distance from a point to a rectangle, 0 inside. Metres, y up. */
const distance = (item: SkylineItem, x: number, y: number): number => {
  const dx = Math.max(item.x - x, 0, x - item.x - item.width);
  const dy = Math.max(item.y - y, 0, y - item.y - item.height);
  return Math.hypot(dx, dy);
};

/**
 * The screen that a thumb at (x, y) metres means: the nearest within `reach`, the smaller one of two that are equally
 * near. A true-to-scale strip has screens far smaller than a thumb, so the whole neighbourhood counts.
 */
export const nearestScreen = (
  items: readonly SkylineItem[],
  x: number,
  y: number,
  reach: number,
): string | null => {
  const near = items
    .map((item) => ({ item, far: distance(item, x, y) }))
    .filter(({ far }) => far <= reach)
    .sort((a, b) => a.far - b.far || a.item.width * a.item.height - b.item.width * b.item.height);
  return near[0]?.item.screenId ?? null;
};
