import type { Picture } from '#shared/protocol/messages';
import type { ScreenFrame } from '#shared/scene/drawingList';
import type { ShowState } from '#shared/show/state';
import { drawnReporter } from '@/link/drawnReporter';
import type { ShowLink } from '@/link/types';

/** A simulated display for each screen: the rehearsal room takes ids that begin so. */
export const simulatedId = (screenId: string): string => `sim-${screenId}`.slice(0, 64);

export interface FrameFacts {
  frames: readonly ScreenFrame[];
  state: ShowState;
  /** Hub time of the frame, ms. */
  at: number;
  /** `performance.now()` of the frame. */
  performanceMs: number;
  raster: [number, number];
  filesOnBoard: number;
  filesWanted: number;
}

const second = 1000;

/** Speaks for the simulated displays as joined ones do: first frames of runs at once, vitals each second. */
export const createSimulatedDisplays = (link: ShowLink) => {
  const started = performance.now();
  let changes = 0;
  let windowStart = started;
  let drawn = 0;
  let last = started;
  let longest = 0;

  const reportRuns = drawnReporter(link, simulatedId);

  const reportVitals = (facts: FrameFacts): void => {
    const span = facts.performanceMs - windowStart;
    if (span < second) return;
    const { linkMs, clockErrorMs } = link.getSnapshot();
    for (const { screenId } of facts.frames)
      link.reportVitals({
        displayId: simulatedId(screenId),
        fps: Math.round((drawn * second) / span),
        longestMs: longest,
        clockErrorMs,
        linkMs,
        filesOnBoard: facts.filesOnBoard,
        filesWanted: facts.filesWanted,
        raster: facts.raster,
        visible: !document.hidden,
        fullscreen: document.fullscreenElement !== null,
        awake: false,
        still: facts.state.freeze.on || facts.state.blackout.on,
        changes,
        upS: Math.round((facts.performanceMs - started) / second),
        trouble: null,
      });
    windowStart = facts.performanceMs;
    drawn = 0;
    longest = 0;
  };

  return {
    frame(facts: FrameFacts): void {
      drawn += 1;
      longest = Math.max(longest, facts.performanceMs - last);
      last = facts.performanceMs;
      reportRuns(facts.frames, facts.state, facts.at);
      reportVitals(facts);
    },
    picture(screenId: string, at: number, data: string): void {
      changes += 1;
      const picture: Picture = { displayId: simulatedId(screenId), screenId, at, data };
      link.reportPicture(picture);
    },
  };
};
