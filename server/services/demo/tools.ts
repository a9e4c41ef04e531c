/** Clips that the demo night makes for itself. */
export type DemoClip = 'water light' | 'salt glints' | 'cider pour';

/** What the demo night asks of the media side: files drawn on the spot, none of them shipped. */
export interface DemoTools {
  /** Makes a clip at a path. Seconds of one core. */
  clip: (name: DemoClip, path: string) => Promise<void>;
  /** Draws an SVG as PNG at a path. */
  picture: (svg: string, path: string) => Promise<void>;
}
