import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { routeList } from '#server/routes/route';
import { type Phase, type ShowDetail, showDetailSchema } from '#shared/api/shows';
import { may, roleTable } from '#shared/show/roles';
import type { Browser } from '#tests/make/app';
import { makeCrew, makeShow as makeForeignShow } from '#tests/make/crew';
import { sceneDraft as draft, makePlanningHouse, type PlanningHouse, room } from '#tests/make/planning';

let house: PlanningHouse;
let lead: Browser;
let plan: PlanningHouse['plan'];

beforeAll(async () => {
  house = await makePlanningHouse();
  ({ lead, plan } = house);
});
afterAll(() => house.close());

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
    const again = (await lead.post(`/api/shows/${id}/open`).expect(200)).body;
    expect([again.mode, again.closedAt]).toEqual(['live', null]);
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

  it('keeps client and brand when only its venue is given', async () => {
    const show = await plan();
    const brand = await lead.post('/api/brands', { name: 'Ottergate', palette: [], markAssetId: null });
    await lead.patch(`/api/shows/${show.id}`, { brandId: brand.body.id }).expect(200);
    const { body } = await lead.patch(`/api/shows/${show.id}`, { venueId: show.venueId }).expect(200);
    expect([body.client, body.brandName]).toEqual(['Ottergate Cider', 'Ottergate']);
  });

  it('keeps its venue while it is on', async () => {
    const { id } = await plan();
    await lead.post(`/api/shows/${id}/open`).expect(200);
    const answer = await lead.patch(`/api/shows/${id}`, { venueId: null });
    expect([answer.status, answer.body.fields[0]?.path]).toEqual([409, 'venueId']);
    await lead.patch(`/api/shows/${id}`, { name: 'Louder' }).expect(200);
  });

  it('keeps its phases once it is closed', async () => {
    const { id, phases } = await plan();
    for (const act of ['open', 'close']) await lead.post(`/api/shows/${id}/${act}`).expect(200);
    const answer = await lead.put(`/api/shows/${id}/phases`, phases.slice(0, 1));
    expect([answer.status, answer.body.detail]).toEqual([409, 'This night is closed.']);
  });

  it('is not the assistant’s to change, nor a VJ’s to delete', async () => {
    const { id } = await plan();
    await house.as('assistant', async () => {
      await lead.get(`/api/shows/${id}`).expect(200);
      await lead.patch(`/api/shows/${id}`, { name: 'X' }).expect(403);
    });
    await house.as('vj', () => lead.delete(`/api/shows/${id}`).expect(403));
    await lead.delete(`/api/shows/${id}`).expect(204);
  });

  it('takes no phases of another show', async () => {
    const [one, other] = [await plan(), await plan()];
    const answer = await lead.put(`/api/shows/${one.id}/phases`, other.phases);
    expect([answer.status, answer.body.detail]).toEqual([422, 'A phase belongs to another show.']);
  });

  it('writes down who changed it', async () => {
    const { id, phases, venueId } = await plan();
    await lead.patch(`/api/shows/${id}`, { name: 'Louder' }).expect(200);
    await lead.put(`/api/shows/${id}/phases`, phases).expect(200);
    const copy = await lead.post(`/api/shows/${id}/clone`, { name: 'Again', date: '2026-12-12' });
    await lead.put(`/api/venues/${venueId}`, { name: 'Boathouse', body: room }).expect(200);
    const entries = await house.db.auditEntries.findAll({ order: [['id', 'ASC']] });
    const said = entries.map(({ action, object }) => `${action} ${object}`);
    expect(said).toEqual(
      expect.arrayContaining([
        `show.make ${id}`,
        `show.edit ${id}`,
        `show.edit ${id} phases`,
        `show.make ${copy.body.id} from ${id}`,
        `venue.edit ${venueId}`,
      ]),
    );
  });
});

describe('the as-run log', () => {
  it('is read newest first, so many at most, and after a moment', async () => {
    const { id } = await plan();
    const { body: scene } = await lead.post(`/api/shows/${id}/scenes`, draft('Low tide')).expect(201);
    const facts = { showId: id, room: 'live' as const, displayId: 'gone', screenId: 'back', lateMs: 3 };
    for (const seq of [1, 2, 3])
      await house.db.asRun.create({ ...facts, seq, at: seq * 1000, sceneId: scene.id, sceneVersion: 1 });
    await house.db.asRun.create({ ...facts, room: 'rehearsal', seq: 4, at: 4000 });
    const times = async (query: string) =>
      (await lead.get(`/api/shows/${id}/as-run${query}`).expect(200)).body.map(
        ({ at }: { at: number }) => at,
      );
    expect(await times('')).toEqual([3000, 2000, 1000]);
    expect(await times('?limit=1')).toEqual([3000]);
    expect(await times('?after=1000')).toEqual([3000, 2000]);
    expect(await times('?limit=many&after=then')).toEqual([3000, 2000, 1000]);
    const [newest] = (await lead.get(`/api/shows/${id}/as-run`)).body;
    expect(newest).toMatchObject({ sceneName: 'Low tide', displayName: 'a display that was forgotten' });
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

  it('of another crew can be neither read, changed, removed nor chosen', async () => {
    const other = await makeCrew(house.db);
    const { id } = await house.db.venues.create({
      id: 'foreign-venue',
      crewId: other.crewId,
      name: 'X',
      body: room,
    });
    await lead.get(`/api/venues/${id}`).expect(404);
    await lead.put(`/api/venues/${id}`, { name: 'Mine', body: room }).expect(404);
    await lead.delete(`/api/venues/${id}`).expect(404);
    const answer = await lead.post('/api/shows', { name: 'X', date: '2026-12-05', venueId: id });
    expect([answer.status, answer.body.fields[0].path]).toEqual([422, 'venueId']);
  });

  it('tells its shows when it changes', async () => {
    const show = await plan();
    await lead.put(`/api/venues/${show.venueId}`, { name: 'Boathouse 4', body: room }).expect(200);
    expect(house.told.at(-1)).toEqual(['manifestChanged', show.id]);
  });
});

describe('a brand', () => {
  const facts = { name: 'Ottergate', palette: ['#d3f84b'], markAssetId: null };

  it('is made, read, changed and removed', async () => {
    const { body: made } = await lead.post('/api/brands', facts).expect(201);
    await lead.put(`/api/brands/${made.id}`, { ...facts, name: 'Ottergate Cider' }).expect(200);
    expect((await lead.get(`/api/brands/${made.id}`)).body.name).toBe('Ottergate Cider');
    await lead.delete(`/api/brands/${made.id}`).expect(204);
    await lead.get(`/api/brands/${made.id}`).expect(404);
  });

  it('in use is not deleted and tells its show', async () => {
    const show = await plan();
    const { body: made } = await lead.post('/api/brands', facts).expect(201);
    await lead.patch(`/api/shows/${show.id}`, { brandId: made.id }).expect(200);
    const answer = await lead.delete(`/api/brands/${made.id}`);
    expect([answer.status, answer.body.detail]).toEqual([409, '“Salt & Static” has this brand.']);
  });

  it('of another crew is not there either', async () => {
    const other = await makeCrew(house.db);
    const { id } = await house.db.brands.create({
      id: 'foreign-brand',
      crewId: other.crewId,
      name: 'Theirs',
      palette: [],
    });
    await lead.get(`/api/brands/${id}`).expect(404);
    await lead.put(`/api/brands/${id}`, facts).expect(404);
    await lead.delete(`/api/brands/${id}`).expect(404);
  });

  it('has a mark of the Library only', async () => {
    const answer = await lead.post('/api/brands', { ...facts, markAssetId: 'nowhere' });
    expect([answer.status, answer.body.fields[0].path]).toEqual([422, 'markAssetId']);
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
