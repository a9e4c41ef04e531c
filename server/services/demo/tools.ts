/** Clips that the demo night makes for itself. */
export const demoClipNames = ['water light', 'salt crystals', 'slow static', 'cider pour'] as const;
export type DemoClip = (typeof demoClipNames)[number];

/** What the demo night asks of the media side: files drawn on the spot, none of them shipped. */
export interface DemoTools {
  /**
   * Makes a clip at a path. Seconds of one core.
   * @throws DrawingFault when it cannot be drawn, for example without ffmpeg
   */
  clip: (name: DemoClip, path: string) => Promise<void>;
  /** Draws an SVG as PNG at a path. */
  picture: (svg: string, path: string) => Promise<void>;
}

/** A file of the demo night that could not be drawn; the message is a sentence for the crew. */
export class DrawingFault extends Error {
  override readonly name = 'DrawingFault';
}
