/** Least change of relative luminance that counts, and the light above which the darker image never counts. */
const leastChange = 0.1;
const brightEnough = 0.8;

/** Frames at which a counted change ends: each is opposite to the one before. */
const transitions = (luminance: readonly number[]): number[] => {
  const found: number[] = [];
  let [low, high] = [luminance[0] ?? 0, luminance[0] ?? 0];
  let way: 'up' | 'down' | null = null;
  for (const [i, value] of luminance.entries()) {
    if (way !== 'up' && value - low >= leastChange && low < brightEnough) {
      found.push(i);
      way = 'up';
      high = value;
    } else if (way !== 'down' && high - value >= leastChange && value < brightEnough) {
      found.push(i);
      way = 'down';
      low = value;
    }
    if (way === 'up' && value > high) high = value;
    if (way === 'down' && value < low) low = value;
    if (way === null) [low, high] = [Math.min(low, value), Math.max(high, value)];
  }
  return found;
};

/**
 * Most flashes in any one second: pairs of opposing changes of relative luminance of 10 % or more of the maximum
 * where the darker image is below 0.80 (WCAG 2.2, definition of “general flash and red flash thresholds”).
 */
export const flashes = (luminance: readonly number[], framesASecond: number): number => {
  const ends = transitions(luminance);
  let most = 0;
  for (const [i, end] of ends.entries()) {
    let last = i;
    while ((ends[last + 1] ?? Number.POSITIVE_INFINITY) - end < framesASecond) last += 1;
    most = Math.max(most, Math.floor((last - i + 1) / 2));
  }
  return most;
};

/** Share of a picture's points that flash more than three times in some second. */
export const flashShare = (frames: readonly (readonly number[])[], framesASecond: number): number => {
  const points = frames[0]?.length ?? 0;
  let over = 0;
  for (let p = 0; p < points; p += 1)
    if (
      flashes(
        frames.map((frame) => frame[p] ?? 0),
        framesASecond,
      ) > 3
    )
      over += 1;
  return points === 0 ? 0 : over / points;
};
