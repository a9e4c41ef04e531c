import type { BlendMode, DrawingName, Fit, TransitionKind } from './schema';

/** sRGB, each 0..1. */
export type Rgb = readonly [number, number, number];

/** What one layer shows at one moment, with every number worked out. */
export type DrawSource =
  | {
      kind: 'clip';
      assetId: string /** Seconds into the clip. */;
      positionS: number /** Wanted playing speed. */;
      rate: number;
    }
  | { kind: 'picture'; assetId: string }
  | { kind: 'words'; text: string; weight: number; colour: string; mono: boolean }
  | {
      kind: 'drawing';
      drawing: DrawingName;
      seed: number;
      palette: readonly Rgb[];
      a: number;
      b: number;
      /** Beats since the scene landed; drawings move by this. */
      beat: number;
      /** Seconds since the scene landed; for slow motion that must not follow the tempo. */
      timeS: number;
    };

export interface DrawItem {
  /** Stable across frames: run id and layer id, so that the stage keeps textures and players. */
  key: string;
  source: DrawSource;
  /** 0..1 */
  opacity: number;
  blend: BlendMode;
  fit: Fit;
  /** Centre offset as a share of the screen (x right, y down); uniform scale; turn in radians clockwise. */
  place: { x: number; y: number; scale: number; turn: number };
}

/** One scene at one moment, back to front over a ground. */
export interface DrawList {
  ground: Rgb;
  items: DrawItem[];
}

/** What one screen shows at one moment. */
export interface ScreenFrame {
  screenId: string;
  /** The scene that is leaving, while a transition runs. */
  under: DrawList | null;
  over: DrawList;
  /** progress 0..1 from under to over; null when nothing is leaving. */
  transition: { kind: TransitionKind; progress: number } | null;
  /** Run whose scene is `over`, or null for an empty screen; reported as drawn. */
  runId: string | null;
  /** Light left after dimmer, calm and blackout: 0..1, a factor on the drawn code values. */
  level: number;
}
