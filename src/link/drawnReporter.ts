import type { ScreenFrame } from '#shared/scene/drawingList';
import { findRun } from '#shared/show/reduce';
import type { ShowState } from '#shared/show/state';
import type { ShowLink } from './types';

/**
 * Reports the first frame of each run on each screen, from what was drawn.
 * @param displayOf id of the display that speaks for a screen
 */
export function drawnReporter(link: Pick<ShowLink, 'reportDrawn'>, displayOf: (screenId: string) => string) {
  const shown = new Map<string, string | null>();
  return (frames: readonly ScreenFrame[], state: ShowState, at: number): void => {
    for (const { screenId, runId } of frames) {
      if (shown.get(screenId) === runId || (runId === null && !shown.has(screenId))) continue;
      shown.set(screenId, runId);
      const run = runId === null ? null : findRun(state, screenId, runId, at);
      link.reportDrawn({
        displayId: displayOf(screenId),
        screenId,
        runId,
        sceneId: run?.sceneId ?? null,
        sceneVersion: run?.version ?? null,
        at,
        lateMs: run ? at - run.landsAt : 0,
      });
    }
  };
}
