import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accountRoutes } from '#server/routes/accounts';
import { brandRoutes } from '#server/routes/brands';
import { displayRoutes } from '#server/routes/displays';
import { mailRoutes } from '#server/routes/mail';
import { routeList } from '#server/routes/route';
import { sceneRoutes } from '#server/routes/scenes';
import { showRoutes } from '#server/routes/shows';
import { venueRoutes } from '#server/routes/venues';
import { setUpLink } from '#server/services/accounts/setUp';
import { assetUses } from '#server/services/assetUses';
import { showManifest } from '#server/services/manifest';
import { type Phase, type ShowDetail, showDetailSchema } from '#shared/api/shows';
import { newBody, newLayer } from '#shared/scene/defaults';
import { type SceneBody, sceneSchema } from '#shared/scene/schema';
import { may, roleTable } from '#shared/show/roles';
import { type Browser, makeTestApp, type TestApp } from '#tests/make/app';
import { makeCrew, makeShow as makeForeignShow } from '#tests/make/crew';
import { makeScreen } from '#tests/make/night';

let house: TestApp;
let lead: Browser;
let crewId: string;

beforeAll(async () => {
  house = await makeTestApp([
    accountRoutes,
    mailRoutes,
    showRoutes,
    sceneRoutes,
    venueRoutes,
    brandRoutes,
    displayRoutes,
  ]);
  lead = house.browser();
  const token = await setUpLink(house.db);
  const ines = { crewName: 'Boathouse crew', name: 'Ines Varga', email: 'ines@crew.example' };
  const made = await lead.post('/api/setup', {
    token,
    ...ines,
    password: 'salt static and otters',
    demo: false,
  });
  crewId = made.body.crew.id;
});
afterAll(() => house.close());

const room = { ambientLux: 30, screens: [makeScreen('back', 0), makeScreen('left', -4)], groups: [] };
const bodyOf = (change: Partial<SceneBody> = {}): SceneBody => ({
  ...newBody(),
  layers: [newLayer('drawing', 'l1')],
  ...change,
});

async function plan(): Promise<ShowDetail> {
  const venue = await lead.post('/api/venues', { name: 'Boathouse 4', body: room }).expect(201);
  const facts = {
    name: 'Salt & Static',
    date: '2026-12-05',
    venueId: venue.body.id,
    client: 'Ottergate Cider',
  };
  const show = await lead.post('/api/shows', facts).expect(201);
  return (await lead.get(`/api/shows/${show.body.id}`).expect(200)).body;
}

const draft = (name: string, phaseId: string | null, body = bodyOf()) => ({ name, phaseId, energy: 5, body });

describe('a show', () => {
  it('starts with a night of phases that flash three times a second at most', async () => {
    const show = showDetailSchema.parse(await plan());
    expect(show.phases.length).toBeGreaterThan(3);
    expect(show.phases.every((phase) => phase.flashes <= 3)).toBe(true);
    expect(show).toMatchObject({ mode: 'plan', venueName: 'Boathouse 4', sceneCount: 0, displayCount: 0 });
  });

  it('of another crew is not there', async () => {
    const other = await makeCrew(house.db);
    const id = await makeForeignShow(house.db, other.crewId, []);
    for (const path of ['', '/scenes', '/displays', '/as-run', '/manifest'])
      await lead.get(`/api/shows/${id}${path}`).expect(404);
    await lead.patch(`/api/shows/${id}`, { name: 'Mine now' }).expect(404);
  });

  it('with a bad date is refused, naming the field', async () => {
    const answer = await lead.post('/api/shows', { name: 'X', date: 'tomorrow', venueId: null });
    expect(answer.status).toBe(422);
    expect(answer.body.fields[0]).toEqual({ path: 'date', message: 'A date as YYYY-MM-DD.' });
  });

  it('opens with a venue only, closes once it is open, and then is a record', async () => {
    const bare = await lead.post('/api/shows', { name: 'Bare', date: '2026-12-06', venueId: null });
    const refused = await lead.post(`/api/shows/${bare.body.id}/open`);
    expect([refused.status, refused.body.detail]).toEqual([409, 'This show has no venue.']);
    const { id } = await plan();
    await lead.post(`/api/shows/${id}/close`).expect(409);
    expect((await lead.post(`/api/shows/${id}/open`).expect(200)).body.mode).toBe('live');
    await lead.delete(`/api/shows/${id}`).expect(409);
    expect((await lead.post(`/api/shows/${id}/close`).expect(200)).body.mode).toBe('closed');
    await lead.patch(`/api/shows/${id}`, { name: 'Other' }).expect(409);
    expect(house.told).toContainEqual(['modeChanged', id, 'closed']);
  });

  it('keeps scenes with the phases that stay', async () => {
    const show = await plan();
    const [first, second] = show.phases as [Phase, Phase];
    const kept = await lead.post(`/api/shows/${show.id}/scenes`, draft('Kept', first.id)).expect(201);
    const lost = await lead.post(`/api/shows/${show.id}/scenes`, draft('Lost', second.id)).expect(201);
    await lead.put(`/api/shows/${show.id}/phases`, [{ ...first, name: 'Early' }]).expect(200);
    const { body } = await lead.get(`/api/shows/${show.id}/scenes`);
    const phaseOf = (id: string) => body.find((scene: { id: string }) => scene.id === id).phaseId;
    expect([phaseOf(kept.body.id), phaseOf(lost.body.id)]).toEqual([first.id, null]);
  });

  it('is copied with its scenes and phases, not its displays', async () => {
    const show = await plan();
    await lead
      .post(`/api/shows/${show.id}/scenes`, draft('Low tide', show.phases[0]?.id ?? null))
      .expect(201);
    const copy = await lead
      .post(`/api/shows/${show.id}/clone`, { name: 'Again', date: '2026-12-12' })
      .expect(201);
    const scenes = (await lead.get(`/api/shows/${copy.body.id}/scenes`)).body;
    const detail: ShowDetail = (await lead.get(`/api/shows/${copy.body.id}`)).body;
    expect(scenes.map((scene: { name: string }) => scene.name)).toEqual(['Low tide']);
    expect(scenes[0].phaseId).toBe(detail.phases[0]?.id);
    expect(detail.phases[0]?.id).not.toBe(show.phases[0]?.id);
  });
});

describe('a scene', () => {
  it('is saved as versions, and an old one can be read again', async () => {
    const show = await plan();
    const { body: made } = await lead.post(`/api/shows/${show.id}/scenes`, draft('Tide', null)).expect(201);
    sceneSchema.parse(made);
    const red = { ...draft('Tide in red', null, bodyOf({ ground: '#ff0000' })), expectedVersion: 1 };
    expect((await lead.put(`/api/scenes/${made.id}`, red).expect(200)).body.version).toBe(2);
    expect((await lead.get(`/api/scenes/${made.id}`)).body.body.ground).toBe('#ff0000');
    expect((await lead.get(`/api/scenes/${made.id}/versions/1`)).body.body.ground).toBe('#000000');
    const versions = (await lead.get(`/api/scenes/${made.id}/versions`)).body;
    expect(versions.map((one: { version: number; by: string }) => [one.version, one.by])).toEqual([
      [2, 'Ines Varga'],
      [1, 'Ines Varga'],
    ]);
  });

  it('that somebody else has saved is not overwritten', async () => {
    const show = await plan();
    const { body: made } = await lead.post(`/api/shows/${show.id}/scenes`, draft('Tide', null)).expect(201);
    const save = { ...draft('Tide', null), expectedVersion: 1 };
    const both = await Promise.all([1, 2].map(() => lead.put(`/api/scenes/${made.id}`, save)));
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  it('comes back after it was removed', async () => {
    const show = await plan();
    const { body: made } = await lead.post(`/api/shows/${show.id}/scenes`, draft('Tide', null)).expect(201);
    await lead.delete(`/api/scenes/${made.id}`).expect(204);
    await lead.get(`/api/scenes/${made.id}`).expect(404);
    await lead.post(`/api/scenes/${made.id}/restore`).expect(200);
    await lead.get(`/api/scenes/${made.id}`).expect(200);
  });

  it('names the field that is out of range', async () => {
    const show = await plan();
    const layer = { ...newLayer('drawing', 'l1'), opacity: 7 };
    const answer = await lead.post(
      `/api/shows/${show.id}/scenes`,
      draft('X', null, bodyOf({ layers: [layer] })),
    );
    expect(answer.status).toBe(422);
    expect(answer.body.fields[0].path).toBe('body.layers.0.opacity');
  });

  it('uses files of the Library only', async () => {
    const show = await plan();
    const layer = {
      ...newLayer('clip', 'l1'),
      source: { kind: 'clip', assetId: 'nowhere', rate: 1, fitBars: null },
    };
    const answer = await lead.post(`/api/shows/${show.id}/scenes`, {
      ...draft('X', null),
      body: { ...newBody(), layers: [layer] },
    });
    expect(answer.body.fields).toEqual([{ path: 'body.layers.0.source', message: 'Not in the Library.' }]);
  });
});

describe('the manifest', () => {
  it('has screens, newest scenes and ready files, and the same revision for the same content', async () => {
    const show = await plan();
    const file = {
      crewId,
      kind: 'clip' as const,
      name: 'clip',
      file: `${'a'.repeat(64)}.mp4`,
      width: 640,
      height: 360,
    };
    await house.db.assets.create({
      ...file,
      id: 'ready-1',
      state: 'ready',
      bytes: 10,
      durationS: 2,
      fps: 25,
    });
    await house.db.assets.create({ ...file, id: 'waiting-1', state: 'waiting' });
    const layers = ['ready-1', 'waiting-1'].map((assetId) => ({
      ...newLayer('clip', assetId),
      source: { kind: 'clip' as const, assetId, rate: 1, fitBars: null },
    }));
    await lead.post(`/api/shows/${show.id}/scenes`, draft('Clip', null, bodyOf({ layers }))).expect(201);
    const first = await showManifest(house.db, show.id);
    expect(first?.manifest.screens.map(({ id }) => id)).toEqual(['back', 'left']);
    expect(first?.manifest.assets).toMatchObject([{ id: 'ready-1', url: `/media/${'a'.repeat(64)}.mp4` }]);
    expect((await showManifest(house.db, show.id))?.manifest.revision).toBe(first?.manifest.revision);
    await house.db.assets.update({ state: 'ready' }, { where: { id: 'waiting-1' } });
    expect((await showManifest(house.db, show.id))?.manifest.revision).not.toBe(first?.manifest.revision);
    expect((await assetUses(house.db, crewId)).get('ready-1')).toMatchObject([
      { sceneName: 'Clip', showId: show.id },
    ]);
  });
});

describe('a venue', () => {
  it('in use is not deleted, and says by which show', async () => {
    const show = await plan();
    const answer = await lead.delete(`/api/venues/${show.venueId}`);
    expect([answer.status, answer.body.detail]).toEqual([409, '“Salt & Static” is in this venue.']);
  });

  it('refuses a group of screens that it does not have', async () => {
    const groups = [{ id: 'g', name: 'Sails', screenIds: ['moon'] }];
    const answer = await lead.post('/api/venues', { name: 'X', body: { ...room, groups } });
    expect(answer.body.fields[0].path).toBe('body.groups.0.screenIds');
  });
});

describe('every route', () => {
  it('names a row of the role table', () => {
    expect(routeList.length).toBeGreaterThan(40);
    expect(routeList.filter(({ action }) => !(action in roleTable))).toEqual([]);
  });

  it('that is the crew’s refuses a stranger', async () => {
    const stranger = house.browser();
    const closed = routeList.filter(({ action }) => !may('anyone', action));
    for (const { method, path } of closed) {
      const answer = await stranger[method as 'get'](
        path.replace(/:\w+/g, '1'),
        method === 'get' ? undefined : {},
      );
      expect([method, path, answer.status]).toEqual([method, path, 401]);
    }
  });
});
