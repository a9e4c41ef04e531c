import { rectangle } from '#shared/mapping/rectangle';
import type { Corners, OutputMap, PixelPoint, Region } from '#shared/mapping/schema';
import type { Screen } from '#shared/venue/schema';

/** Names of the corners in their order, as the audience sees the picture. */
export const cornerNames = ['top left', 'top right', 'bottom right', 'bottom left'] as const;

/** The largest rectangle of a screen's shape, centred, on `share` of the raster. */
export const inShape = (
  [width, height]: OutputMap['raster'],
  screen: Pick<Screen, 'width' | 'height'>,
  share = 0.8,
): Corners => {
  const scale = share * Math.min(width / screen.width, height / screen.height);
  const [w, h] = [screen.width * scale, screen.height * scale];
  return rectangle((width - w) / 2, (height - h) / 2, w, h);
};

/** A first region for a screen: its true shape in the middle of the raster. */
export const newRegion = (id: string, screen: Screen, raster: OutputMap['raster']): Region => ({
  id,
  screenId: screen.id,
  name: screen.name,
  source: { x: 0, y: 0, w: 1, h: 1 },
  corners: inShape(raster, screen),
  brightness: 1,
});

/** The map with one region replaced. */
export const withRegion = (map: OutputMap, region: Region): OutputMap => ({
  ...map,
  regions: map.regions.map((old) => (old.id === region.id ? region : old)),
});

const hundredths = (value: number): number => Math.round(value * 100) / 100;

/** The region with one corner moved; kept to hundredths of a pixel. */
export const withCorner = (region: Region, index: number, point: PixelPoint): Region => ({
  ...region,
  corners: region.corners.map((old, i) =>
    i === index ? [hundredths(point[0]), hundredths(point[1])] : old,
  ) as unknown as Corners,
});

/** The region moved as a whole. Pixels. */
export const moved = (region: Region, dx: number, dy: number): Region => ({
  ...region,
  corners: region.corners.map(([x, y]) => [hundredths(x + dx), hundredths(y + dy)]) as unknown as Corners,
});
