import type { OutputMap } from '#shared/mapping/schema';
import type { ScreenFrame } from '#shared/scene/drawingList';
import { type Drawable, drawableOf, evaluateMap } from '#shared/scene/evaluateMap';
import { drawnReporter } from '@/link/drawnReporter';
import type { ShowLink } from '@/link/types';
import { createFileStore } from '@/stage/fileStore';
import { pictureData } from '@/stage/pictureData';
import { createStage } from '@/stage/stage';
import { CanvasHealth, Stillness } from './health';
import { type Known, recall } from './lastPicture';
import { ChangeCounter } from './reports';

/** Longest side of the small pictures for the skyline, px, and how often they are made, ms. */
const small = { side: 160, everyMs: 1000 } as const;

/** What one display puts on its canvas: the show's state at the hub's time, through its output map. */
export class DisplayPicture {
  readonly files = createFileStore();
  readonly changes = new ChangeCounter();
  readonly stillness = new Stillness();
  /** True while the graphics card seems to be lost for good. */
  dark = false;
  private readonly health = new CanvasHealth();
  size: [number, number] = [16, 16];
  private readonly stage;
  private readonly reportDrawn;
  private readonly kept: Known | null;
  private drawable: Drawable | null = null;
  private revision = '';
  private draft: OutputMap | null = null;
  private lastMap: OutputMap | null = null;
  private reading = false;
  private readAt = 0;

  constructor(
    canvas: HTMLCanvasElement,
    private readonly link: ShowLink,
    private readonly displayId: string,
    private readonly onFault: (error: unknown) => void,
  ) {
    this.stage = createStage(canvas, this.files);
    this.reportDrawn = drawnReporter(link, () => displayId);
    this.kept = recall(displayId);
  }

  /** What the hub has told, or null while only what was kept over a reload is known. */
  fromHub(): Known | null {
    const { state, manifest, maps, displayNames } = this.link.getSnapshot();
    const map = maps[this.displayId];
    if (!state || !manifest || !map) return null;
    return { state, manifest, map, name: displayNames[this.displayId] ?? '' };
  }

  /** A map that is being dragged: drawn from the next frame on, until a saved one comes. */
  setDraft(map: OutputMap): void {
    this.draft = map;
  }

  private fitWindow(): void {
    const scale = window.devicePixelRatio;
    const width = Math.max(16, Math.round(window.innerWidth * scale));
    const height = Math.max(16, Math.round(window.innerHeight * scale));
    if (width === this.size[0] && height === this.size[1]) return;
    this.size = [width, height];
    this.stage.resize(width, height);
  }

  /** Draws one frame. `performanceMs` is the frame's time. */
  draw(performanceMs: number): void {
    const known = this.fromHub() ?? this.kept;
    if (!known) return;
    const { state, manifest, map, name } = known;
    if (map !== this.lastMap) {
      this.lastMap = map;
      this.draft = null;
    }
    if (!this.drawable || manifest.revision !== this.revision) {
      this.revision = manifest.revision;
      this.drawable = drawableOf(manifest);
      this.files.want(manifest.assets);
    }
    this.fitWindow();
    const shown = this.draft ?? map;
    const t = this.link.hubTimeOf(performanceMs);
    const { frames, screenSizes } = evaluateMap(this.drawable, state, shown, t);
    this.stage.draw({
      frames,
      map: shown,
      screenSizes,
      hubNow: t,
      paused: state.freeze.on,
      lineUp: state.lineUp.includes(this.displayId),
      label: (state.identify[this.displayId] ?? 0) > t ? name : null,
    });
    this.reportDrawn(frames, state, t);
    if (!this.reading && performanceMs - this.readAt > small.everyMs) {
      this.readAt = performanceMs;
      void this.readSmall(t, frames, state.lineUp.includes(this.displayId));
    }
    this.dark = this.health.frame(performanceMs, frames.length > 0);
  }

  private async readSmall(at: number, frames: readonly ScreenFrame[], lineUp: boolean): Promise<void> {
    this.reading = true;
    try {
      const pictures = await this.stage.readPictures(small.side);
      if (pictures.length > 0) this.health.good(performance.now());
      for (const one of pictures) this.changes.see(one);
      this.stillness.see(lineUp ? [] : frames);
      for (const one of pictures) {
        const data = await pictureData(one);
        if (data) this.link.reportPicture({ displayId: this.displayId, screenId: one.screenId, at, data });
      }
    } catch (error) {
      this.onFault(error);
    } finally {
      this.reading = false;
    }
  }

  dispose(): void {
    this.stage.dispose();
    this.files.dispose();
  }
}
