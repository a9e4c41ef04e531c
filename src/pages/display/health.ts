import type { ScreenFrame } from '#shared/scene/drawingList';
import { call } from './call';

/** Times of the display's own recovery, ms. */
export const healthTimes = {
  /** No picture could be read back for this long although there is one to draw: the graphics card does not come back. */
  dark: 12_000,
  /** Between two reloads for that reason. */
  reload: 60_000,
  /** A gap between frames this long means that the page was hidden, not that the card is lost. */
  hidden: 2000,
} as const;

/** Tells a canvas that draws from one whose graphics card is lost for good. */
export class CanvasHealth {
  private goodAt = 0;
  private lastAt = Number.NEGATIVE_INFINITY;

  /** Pixels could be read back. */
  good(performanceMs: number): void {
    this.goodAt = performanceMs;
  }

  /** @returns true while nothing has come back from the canvas for too long */
  frame(performanceMs: number, somethingToDraw: boolean): boolean {
    if (!somethingToDraw || performanceMs - this.lastAt > healthTimes.hidden) this.goodAt = performanceMs;
    this.lastAt = performanceMs;
    return performanceMs - this.goodAt > healthTimes.dark;
  }
}

/** Whether what is to be drawn stands still, from one read-back to the next. */
export class Stillness {
  /** True while the picture may stand still because the show does. */
  still = false;
  private before = '';
  private moved = 0;

  /** Told the frames of each read-back. Movement counts from the second on, so that its pixels can have changed. */
  see(frames: readonly ScreenFrame[]): void {
    const now = JSON.stringify(frames.map((frame) => (frame.level > 0 ? frame : frame.screenId)));
    this.moved = now === this.before ? 0 : this.moved + 1;
    this.before = now;
    this.still = this.moved < 2;
  }
}

const key = 'lampyrid.recovered';

const lately = (): boolean => {
  try {
    return Date.now() - Number(sessionStorage.getItem(key) ?? 0) < healthTimes.reload;
  } catch {
    // Without a memory it might reload for ever.
    return true;
  }
};

/** Loads the page anew, at most once a minute and only while the server is there to answer. */
export async function recover(): Promise<void> {
  if (lately() || (await call('GET', '/healthz')).status !== 200) return;
  sessionStorage.setItem(key, String(Date.now()));
  window.location.reload();
}
