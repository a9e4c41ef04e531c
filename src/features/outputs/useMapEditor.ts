import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { isConvex } from '#shared/mapping/homography';
import type { OutputMap, PixelPoint, Region } from '#shared/mapping/schema';
import type { ShowLink } from '@/link/types';
import { createDraftSender } from './draftSender';
import type { Choice } from './MapCanvas';
import { change, isUnsaved, type MapHistory, markSaved, redo, startHistory, undo } from './mapHistory';
import { moved, withCorner, withRegion } from './regionEdits';

const convex = (map: OutputMap): boolean => map.regions.every((region) => isConvex(region.corners));

/**
 * The map of one display under the hand: history, choice, and drafts that go to the display as they happen.
 * @param displayId a new id starts anew
 * @param saved the newest saved map
 * @param linked the hub is there: what was moved while it was away goes to the display then
 */
export const useMapEditor = (displayId: string, saved: OutputMap, link: ShowLink | null, linked: boolean) => {
  const [history, setHistory] = useState<MapHistory>(() => startHistory(saved));
  const [choice, setChoice] = useState<Choice | null>(null);
  const [refusal, setRefusal] = useState<string | null>(null);
  const drafts = useMemo(
    () => createDraftSender((map) => void link?.send({ kind: 'map.draft', displayId, map })),
    [link, displayId],
  );
  useEffect(() => () => drafts.stop(), [drafts]);

  // What somebody else saved is taken over unless there is unsaved work here.
  const known = useRef(saved);
  useEffect(() => {
    if (JSON.stringify(known.current) === JSON.stringify(saved)) return;
    known.current = saved;
    setHistory((old) => (isUnsaved(old) ? old : startHistory(saved)));
  }, [saved]);

  // The newest history, for handlers that run several times before the next render.
  const newest = useRef(history);
  newest.current = history;
  const put = useCallback(
    (next: (old: MapHistory) => MapHistory) => {
      const now = next(newest.current);
      if (now.present !== newest.current.present) {
        if (!convex(now.present)) {
          setRefusal('A corner may not cross the others.');
          return;
        }
        setRefusal(null);
        drafts.push(now.present);
      }
      newest.current = now;
      setHistory(now);
    },
    [drafts],
  );

  useEffect(() => {
    if (linked && isUnsaved(newest.current)) drafts.push(newest.current.present);
  }, [linked, drafts]);
  useEffect(
    () => () => {
      // Left without saving: the display goes back to what is saved.
      if (isUnsaved(newest.current)) void link?.send({ kind: 'map.draft', displayId, map: known.current });
    },
    [link, displayId],
  );

  const edit = useCallback(
    (make: (map: OutputMap) => OutputMap, grip: string | null = null) =>
      put((old) => change(old, make(old.present), grip)),
    [put],
  );
  const editRegion = useCallback(
    (id: string, make: (region: Region) => Region, grip: string | null = null) =>
      edit((map) => {
        const region = map.regions.find((one) => one.id === id);
        return region ? withRegion(map, make(region)) : map;
      }, grip),
    [edit],
  );
  const dragCorner = useCallback(
    (id: string, corner: number, to: PixelPoint, grip: string) =>
      editRegion(id, (region) => withCorner(region, corner, to), grip),
    [editRegion],
  );
  const dragRegion = useCallback(
    (id: string, dx: number, dy: number, grip: string) =>
      editRegion(id, (region) => moved(region, dx, dy), grip),
    [editRegion],
  );
  const nudge = useCallback(
    (dx: number, dy: number) => {
      if (!choice) return;
      const { regionId, corner } = choice;
      editRegion(
        regionId,
        (region) => {
          const old = corner === null ? null : region.corners[corner];
          return corner === null || !old
            ? moved(region, dx, dy)
            : withCorner(region, corner, [old[0] + dx, old[1] + dy]);
        },
        `nudge ${regionId} ${corner}`,
      );
    },
    [choice, editRegion],
  );

  return {
    map: history.present,
    choice,
    setChoice,
    refusal,
    edit,
    editRegion,
    dragCorner,
    dragRegion,
    nudge,
    canUndo: history.past.length > 0,
    canRedo: history.future.length > 0,
    unsaved: isUnsaved(history),
    undo: useCallback(() => put(undo), [put]),
    redo: useCallback(() => put(redo), [put]),
    markSaved: useCallback((map: OutputMap) => setHistory((old) => markSaved(old, map)), []),
  };
};
export type MapEditor = ReturnType<typeof useMapEditor>;
