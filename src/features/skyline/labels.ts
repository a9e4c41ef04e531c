import type { SkylineItem } from '#shared/venue/skyline';

/** Where a name goes under the floor line. */
export interface Label {
  screenId: string;
  /** Centre, CSS pixels from the left. */
  x: number;
  row: 0 | 1;
}

/** Mean advance of the type at 1 px, measured on our names in Atkinson Hyperlegible Next; generous on purpose. */
const advance = 0.56;
const gapPx = 6;

/**
 * Names under the screens in at most two rows, none over another; a name that fits in neither row is left out (the
 * chips carry every name at full size).
 * @param scale CSS pixels a metre
 * @param fontPx size of the type
 */
export const placeLabels = (
  items: readonly SkylineItem[],
  names: Readonly<Record<string, string>>,
  scale: number,
  widthPx: number,
  fontPx: number,
): Label[] => {
  const ends: [number, number] = [-Infinity, -Infinity];
  const placed: Label[] = [];
  const centreOf = (item: SkylineItem) => (item.x + item.width / 2) * scale;
  for (const item of [...items].sort((a, b) => centreOf(a) - centreOf(b))) {
    const half = ((names[item.screenId] ?? '').length * advance * fontPx) / 2;
    const x = Math.min(Math.max(centreOf(item), half), Math.max(half, widthPx - half));
    const row = ([0, 1] as const).find((candidate) => x - half >= ends[candidate] + gapPx);
    if (row === undefined) continue;
    ends[row] = x + half;
    placed.push({ screenId: item.screenId, x, row });
  }
  return placed;
};
