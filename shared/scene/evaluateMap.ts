import type { OutputMap } from '../mapping/schema';
import type { Manifest } from '../protocol/messages';
import type { ShowState } from '../show/state';
import type { Screen } from '../venue/schema';
import type { ScreenFrame } from './drawingList';
import { type EvaluateInput, evaluateScreen, sceneBodies } from './evaluate';

/** A manifest made ready for many frames: looked up once, not at each. */
export interface Drawable extends Pick<EvaluateInput, 'bodies' | 'assets'> {
  screens: readonly Screen[];
}

/** What a manifest gives to every frame. */
export const drawableOf = (manifest: Manifest): Drawable => ({
  bodies: sceneBodies(manifest),
  assets: new Map(manifest.assets.map((asset) => [asset.id, asset])),
  screens: manifest.screens,
});

export interface MapFrames {
  frames: ScreenFrame[];
  /** Sizes of the screens that the map's regions name, metres. */
  screenSizes: Record<string, Screen>;
}

/** What each screen of an output map shows at hub time `t` (ms): one frame a screen, however many regions take it. */
export function evaluateMap(drawable: Drawable, state: ShowState, map: OutputMap, t: number): MapFrames {
  const { bodies, assets } = drawable;
  const screens = drawable.screens.filter(({ id }) => map.regions.some(({ screenId }) => screenId === id));
  return {
    frames: screens.map(({ id: screenId, width, height }) =>
      evaluateScreen({ state, screenId, aspect: width / height, bodies, assets, t }),
    ),
    screenSizes: Object.fromEntries(screens.map((screen) => [screen.id, screen])),
  };
}
