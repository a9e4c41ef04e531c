import type { OutputMap } from '#shared/mapping/schema';
import type { ScreenFrame } from '#shared/scene/drawingList';

/** A file that has been fetched and can be drawn. */
export type LoadedFile =
  | { kind: 'picture'; bitmap: ImageBitmap; width: number; height: number }
  | {
      kind: 'clip' /** blob: or path. */;
      url: string;
      width: number;
      height: number;
      durationS: number;
      fps: number | null;
    };

/** Where the stage gets files from. null: not on board (yet); the layer is then left out. */
export interface FileSource {
  get(assetId: string): LoadedFile | null;
}

export interface StageInput {
  /** One for each screen that the map's regions name. */
  frames: readonly ScreenFrame[];
  map: OutputMap;
  /** Width and height of each screen in metres: the shape its picture is drawn in. */
  screenSizes: Readonly<Record<string, { width: number; height: number }>>;
  /** Hub time of this frame, ms; clips are held to it. */
  hubNow: number;
  /** True while frozen: clips pause. */
  paused: boolean;
  /** Line-up grid over each region instead of its picture. */
  lineUp: boolean;
  /** Large name over everything (identify), or null. */
  label: string | null;
}

/** What the display shows of one screen, un-warped from drawn pixels. */
export interface StagePicture {
  screenId: string;
  width: number;
  height: number;
  /** RGBA, top row first. */
  pixels: Uint8Array;
}

export interface Stage {
  /** Raster in pixels. */
  resize(width: number, height: number): void;
  draw(input: StageInput): void;
  /** Small true pictures of each screen in the last drawn map, ready some frames later. */
  readPictures(maxSide: number): Promise<StagePicture[]>;
  /** Frees GPU memory and players of runs that are gone; dispose frees everything. */
  dispose(): void;
}
