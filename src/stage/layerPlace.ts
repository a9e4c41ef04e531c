import type { DrawItem } from '#shared/scene/drawingList';
import type { Fit } from '#shared/scene/schema';

export interface Size {
  width: number;
  height: number;
}

/** Size in screen pixels of a picture that is fitted to a screen, before its own scale. */
export const fitted = (fit: Fit, picture: Size, screen: Size): Size => {
  if (fit === 'stretch') return screen;
  const across = screen.width / picture.width;
  const down = screen.height / picture.height;
  const scale = fit === 'cover' ? Math.max(across, down) : Math.min(across, down);
  return { width: picture.width * scale, height: picture.height * scale };
};

/** The map from a screen's unit square to a layer's, as two rows, and the layer's size in screen pixels. */
export interface LayerMap {
  across: readonly [number, number, number];
  down: readonly [number, number, number];
  size: Size;
}

/** Where a layer's picture lies on its screen: fitted, scaled, turned about its middle, moved by shares of the screen. */
export const layerMap = (
  { fit, place }: Pick<DrawItem, 'fit' | 'place'>,
  picture: Size,
  screen: Size,
): LayerMap => {
  const box = fitted(fit, picture, screen);
  const size = { width: box.width * place.scale, height: box.height * place.scale };
  const [cos, sin] = [Math.cos(place.turn), Math.sin(place.turn)];
  const [cx, cy] = [(0.5 + place.x) * screen.width, (0.5 + place.y) * screen.height];
  const ax = (cos * screen.width) / size.width;
  const ay = (sin * screen.height) / size.width;
  const dx = (-sin * screen.width) / size.height;
  const dy = (cos * screen.height) / size.height;
  return {
    across: [ax, ay, 0.5 - (cos * cx + sin * cy) / size.width],
    down: [dx, dy, 0.5 - (-sin * cx + cos * cy) / size.height],
    size,
  };
};

/** Whether every point of the screen lies in the layer. */
export const coversScreen = ({ across, down }: LayerMap): boolean =>
  [across, down].every(([x, y, start]) =>
    [start, start + x, start + y, start + x + y].every((at) => at > -1e-6 && at < 1 + 1e-6),
  );

/** Whether a layer covers its screen exactly, so that its picture can stand for it. */
export const fillsScreen = ({ place }: Pick<DrawItem, 'place'>): boolean =>
  place.x === 0 && place.y === 0 && place.scale === 1 && place.turn === 0;
