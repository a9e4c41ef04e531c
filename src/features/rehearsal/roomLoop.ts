import type { OutputMap } from '#shared/mapping/schema';
import { type Drawable, drawableOf, evaluateMap } from '#shared/scene/evaluateMap';
import type { ShowLink } from '@/link/types';
import { createFileStore } from '@/stage/fileStore';
import { pictureData } from '@/stage/pictureData';
import { createStage } from '@/stage/stage';
import { createSimulatedDisplays } from './simulatedDisplays';

/** Longest side of the small pictures that go to the skyline, pixels. */
const pictureSide = 128;
const picturePeriodMs = 1000;

/**
 * Draws the room on a canvas with the renderer that displays use, and speaks for one simulated display a screen.
 * @param view newest output map of the eye; asked at each frame
 * @returns stops it and frees what it held
 */
export const startRoom = (canvas: HTMLCanvasElement, link: ShowLink, view: () => OutputMap): (() => void) => {
  const files = createFileStore();
  const stage = createStage(canvas, files);
  const displays = createSimulatedDisplays(link);
  let manifestRevision = '';
  let drawable: Drawable | null = null;
  let size = '';
  let lastPictures = 0;
  let reading = false;

  const takePictures = async (at: number): Promise<void> => {
    reading = true;
    try {
      for (const picture of await stage.readPictures(pictureSide)) {
        const data = await pictureData(picture);
        if (data) displays.picture(picture.screenId, at, data);
      }
    } finally {
      reading = false;
    }
  };

  const draw = (performanceMs: number): void => {
    handle = requestAnimationFrame(draw);
    const { state, manifest } = link.getSnapshot();
    if (!state || !manifest) return;
    if (!drawable || manifest.revision !== manifestRevision) {
      manifestRevision = manifest.revision;
      drawable = drawableOf(manifest);
      files.want(manifest.assets);
    }
    const map = view();
    if (size !== map.raster.join('×')) {
      size = map.raster.join('×');
      stage.resize(...map.raster);
    }
    const at = link.hubTimeOf(performanceMs);
    const { frames, screenSizes } = evaluateMap(drawable, state, map, at);
    stage.draw({
      frames,
      map,
      screenSizes,
      hubNow: at,
      paused: state.freeze.on,
      lineUp: false,
      label: null,
    });
    const counts = files.counts();
    displays.frame({
      frames,
      state,
      at,
      performanceMs,
      raster: map.raster,
      filesOnBoard: counts.onBoard,
      filesWanted: counts.wanted,
    });
    if (!reading && performanceMs - lastPictures > picturePeriodMs) {
      lastPictures = performanceMs;
      void takePictures(at);
    }
  };
  let handle = requestAnimationFrame(draw);
  return () => {
    cancelAnimationFrame(handle);
    stage.dispose();
    files.dispose();
  };
};
