import type { FromHub } from '#shared/protocol/messages';
import type { ShowEvent } from '#shared/show/events';
import { reduce } from '#shared/show/reduce';
import type { LinkSnapshot } from './types';

/** A page that waits for a welcome or a resume. */
export const joiningSnapshot: LinkSnapshot = {
  status: 'joining',
  awaySince: null,
  refusedWhy: null,
  principal: null,
  displayId: null,
  state: null,
  manifest: null,
  maps: {},
  displayNames: {},
  displays: [],
  wall: [],
  pictures: {},
  mode: null,
  durable: 'database',
  linkMs: null,
  clockErrorMs: null,
};

/** Whether an event follows the state without a hole. */
const follows = (snapshot: LinkSnapshot, event: ShowEvent): boolean =>
  snapshot.state !== null &&
  snapshot.state.epoch === event.epoch &&
  event.revision <= snapshot.state.revision + 1;

const withEvent = (snapshot: LinkSnapshot, event: ShowEvent): LinkSnapshot => {
  if (!snapshot.state) return snapshot;
  const state = reduce(snapshot.state, event);
  if (state === snapshot.state) return snapshot;
  const { body } = event;
  if (body.kind !== 'map.saved') return { ...snapshot, state };
  return { ...snapshot, state, maps: { ...snapshot.maps, [body.displayId]: body.map } };
};

/**
 * The page's knowledge after a message that is about the show. `hole`: an event is missing and the page must ask anew.
 * Pure.
 */
export function takeMessage(
  snapshot: LinkSnapshot,
  message: FromHub,
): { snapshot: LinkSnapshot; hole: boolean } {
  const to = (change: Partial<LinkSnapshot>) => ({ snapshot: { ...snapshot, ...change }, hole: false });
  switch (message.type) {
    case 'welcome': {
      const { state, manifest, maps, displayNames, displays, wall, mode, durable, principal, displayId } =
        message;
      // An older epoch is a hub that does not know it has been replaced.
      if (snapshot.state && state.epoch < snapshot.state.epoch) return { snapshot, hole: false };
      const known = {
        state,
        manifest,
        maps,
        displayNames,
        displays,
        wall,
        mode,
        durable,
        principal,
        displayId,
      };
      return to({ ...known, status: 'on', awaySince: null, refusedWhy: null });
    }
    case 'resume': {
      const all = message.events.reduce(withEvent, snapshot);
      return { snapshot: { ...all, status: 'on', awaySince: null, refusedWhy: null }, hole: false };
    }
    case 'event':
      return follows(snapshot, message.event)
        ? { snapshot: withEvent(snapshot, message.event), hole: false }
        : { snapshot, hole: snapshot.state !== null && message.event.epoch >= snapshot.state.epoch };
    case 'manifest':
      return to({ manifest: message.manifest });
    case 'displays':
      return to({ displays: message.displays, displayNames: message.names });
    case 'wall':
      return to({ wall: message.wall });
    case 'picture': {
      const { picture } = message;
      return to({
        pictures: { ...snapshot.pictures, [`${picture.displayId}/${picture.screenId}`]: picture },
      });
    }
    case 'mode':
      return to({ mode: message.mode });
    case 'durable':
      return to({ durable: message.durable });
    default:
      return { snapshot, hole: false };
  }
}
