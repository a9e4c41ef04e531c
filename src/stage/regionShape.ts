import { homographyTo, isConvex } from '#shared/mapping/homography';
import type { Corners, OutputMap, Region } from '#shared/mapping/schema';
import type { Size } from './layerPlace';
import type { Columns } from './pass';

/** A region's corners in the pixels of the canvas, which may differ from the raster the map was made in. */
export const cornersOn = (region: Region, [rasterW, rasterH]: OutputMap['raster'], canvas: Size): Corners =>
  region.corners.map(([x, y]) => [
    (x * canvas.width) / rasterW,
    (y * canvas.height) / rasterH,
  ]) as unknown as Corners;

/** Unit square onto the corners in clip space of the canvas; null when the four make no picture. */
export const columnsTo = (corners: Corners, canvas: Size): Columns | null => {
  if (!isConvex(corners)) return null;
  const [a, b, c, d, e, f, g, h, i] = homographyTo(corners);
  // Pixels to clip space, with w kept: x' = 2x/width − w, y' = w − 2y/height.
  const row = (p: number, q: number, r: number, span: number, sign: 1 | -1): [number, number, number] => [
    sign * ((2 * p) / span - g),
    sign * ((2 * q) / span - h),
    sign * ((2 * r) / span - i),
  ];
  const [x0, x1, x2] = row(a, b, c, canvas.width, 1);
  const [y0, y1, y2] = row(d, e, f, canvas.height, -1);
  return [x0, y0, g, x1, y1, h, x2, y2, i];
};

const far = ([ax, ay]: readonly [number, number], [bx, by]: readonly [number, number]): number =>
  Math.hypot(bx - ax, by - ay);

/** Longest side a screen's picture is drawn with, pixels. */
const longest = 1920;
/** Sizes go in steps, so that corners on the move don't ask for new pictures at each frame. */
const step = 32;

/** Pixels a screen's picture needs so that no region shows fewer than it covers, in the screen's own shape. */
export const pictureSize = (
  regions: readonly { corners: Corners; source: Region['source'] }[],
  aspect: number,
): Size => {
  let height = 16;
  for (const { corners, source } of regions) {
    const [a, b, c, d] = corners;
    const across = Math.max(far(a, b), far(d, c)) / source.w;
    const down = Math.max(far(a, d), far(b, c)) / source.h;
    height = Math.max(height, across / aspect, down);
  }
  const side = Math.min(longest, Math.ceil((Math.max(height, height * aspect) - 0.01) / step) * step);
  return aspect >= 1
    ? { width: side, height: Math.max(1, Math.round(side / aspect)) }
    : { width: Math.max(1, Math.round(side * aspect)), height: side };
};
