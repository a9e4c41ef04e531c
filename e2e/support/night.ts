import type { Show, ShowDetail } from '../../shared/api/shows';
import { wholeMap } from '../../shared/mapping/rectangle';
import { drawingSource, newBody, newLayer } from '../../shared/scene/defaults';
import type { Scene, SceneBody } from '../../shared/scene/schema';
import type { Screen } from '../../shared/venue/schema';

/** Sends a JSON request as the lead; fails when it is refused. */
export type Call = <T>(
  method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE',
  path: string,
  data?: unknown,
) => Promise<T>;

const screen = (id: string, name: string, x: number, width: number, height: number): Screen => ({
  id,
  name,
  kind: 'projection',
  width,
  height,
  gain: 1,
  centre: [x, 2.5, 0],
  yaw: 0,
  tilt: 0,
  roll: 0,
});

/** Two screens of a room: a wide wall, and a small one beside it. */
export const twoScreens = [screen('wall', 'Back wall', 0, 4, 2.25), screen('sail', 'Sail', 5, 4, 2.25)];

/** A venue with two screens and a show in it, made as the pages make them. */
export async function makeNight(call: Call): Promise<ShowDetail> {
  const body = { ambientLux: 20, screens: twoScreens, groups: [] };
  const venue = await call<{ id: string }>('POST', '/api/venues', { name: 'Boathouse 4', body });
  const made = { name: 'Salt & Static', date: '2026-12-05', venueId: venue.id, client: 'Ottergate Cider' };
  const show = await call<Show>('POST', '/api/shows', made);
  return call<ShowDetail>('GET', `/api/shows/${show.id}`);
}

/** A body of one drawing. */
export const drawingBody = (name: Parameters<typeof drawingSource>[0]): SceneBody => {
  const layer = { ...newLayer('drawing', 'l1'), source: drawingSource(name) };
  return { ...newBody(), layers: [layer], transition: { kind: 'cut', beats: 0 } };
};

/** A scene of a show, in its first phase. */
export function makeScene(call: Call, show: ShowDetail, name: string, body: SceneBody): Promise<Scene> {
  const phaseId = show.phases[0]?.id ?? null;
  return call<Scene>('POST', `/api/shows/${show.id}/scenes`, { name, phaseId, energy: 5, body });
}

/** Puts the first screen over the whole raster of a display. */
export function mapWhole(call: Call, displayId: string, raster: [number, number]): Promise<unknown> {
  const map = wholeMap(twoScreens[0]?.id ?? '', raster);
  return call('POST', `/api/displays/${displayId}/maps`, { map, note: 'whole' });
}
