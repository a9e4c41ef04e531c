import type { Vitals } from '#shared/protocol/messages';
import type { StagePicture } from '@/stage/types';

/** Counts frames and the longest gap between two of them. */
export class FrameMeter {
  private drawn = 0;
  private longest = 0;
  private last: number | null = null;
  private from = performance.now();

  frame(performanceMs: number): void {
    this.drawn += 1;
    if (this.last !== null) this.longest = Math.max(this.longest, performanceMs - this.last);
    this.last = performanceMs;
  }

  /** Rate and longest gap since the last reading; a gap that still goes on counts. */
  read(): Pick<Vitals, 'fps' | 'longestMs'> {
    const now = performance.now();
    const span = Math.max(1, now - this.from);
    const open = this.last === null ? span : now - this.last;
    const reading = {
      fps: Math.min(1000, Math.round((this.drawn * 10_000) / span) / 10),
      longestMs: Math.max(this.longest, open),
    };
    this.drawn = 0;
    this.longest = 0;
    this.from = now;
    return reading;
  }
}

/** Counts up whenever the pixels that were read back differ from those before: the proof that a picture moves. */
export class ChangeCounter {
  count = 0;
  private readonly prints = new Map<string, number>();

  see({ screenId, pixels }: StagePicture): void {
    // FNV-1a over every pixel: cheap, and any change of one shows.
    let print = 0x811c9dc5;
    for (const byte of pixels) print = Math.imul(print ^ byte, 0x01000193);
    if (this.prints.has(screenId) && this.prints.get(screenId) !== print) this.count += 1;
    this.prints.set(screenId, print);
  }
}
