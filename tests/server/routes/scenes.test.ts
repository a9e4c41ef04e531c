import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newBody, newLayer } from '#shared/scene/defaults';
import { sceneSchema } from '#shared/scene/schema';
import type { Browser } from '#tests/make/app';
import { makeCrew, makeShow as makeForeignShow } from '#tests/make/crew';
import { bodyOf, sceneDraft as draft, makePlanningHouse, type PlanningHouse } from '#tests/make/planning';

let house: PlanningHouse;
let lead: Browser;
let plan: PlanningHouse['plan'];

beforeAll(async () => {
  house = await makePlanningHouse();
  ({ lead, plan } = house);
});
afterAll(() => house.close());

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

  it('of another crew is not there, nor can one be made in its show', async () => {
    const other = await makeCrew(house.db);
    const showId = await makeForeignShow(house.db, other.crewId, []);
    const facts = { id: 'foreign-scene', showId, name: 'Theirs', energy: 3, position: 0, version: 1 };
    const { id } = await house.db.scenes.create(facts);
    await house.db.sceneVersions.create({ sceneId: id, version: 1, body: bodyOf() });
    for (const path of ['', '/versions', '/versions/1'])
      await lead.get(`/api/scenes/${id}${path}`).expect(404);
    await lead.put(`/api/scenes/${id}`, { ...draft('Mine'), expectedVersion: 1 }).expect(404);
    await lead.delete(`/api/scenes/${id}`).expect(404);
    for (const act of ['restore', 'duplicate']) await lead.post(`/api/scenes/${id}/${act}`).expect(404);
    await lead.post(`/api/shows/${showId}/scenes`, draft('Mine')).expect(404);
  });

  it('takes no file of another crew', async () => {
    const show = await plan();
    const other = await makeCrew(house.db);
    const file = { crewId: other.crewId, kind: 'clip' as const, name: 'theirs', state: 'ready' as const };
    await house.db.assets.create({ ...file, id: 'foreign-clip' });
    const source = { kind: 'clip' as const, assetId: 'foreign-clip', rate: 1, fitBars: null };
    const body = bodyOf({ layers: [{ ...newLayer('clip', 'l1'), source }] });
    await lead.post(`/api/shows/${show.id}/scenes`, draft('X', null, body)).expect(422);
  });

  it('takes no phase of another show', async () => {
    const [one, other] = [await plan(), await plan()];
    const answer = await lead.post(`/api/shows/${one.id}/scenes`, draft('X', other.phases[0]?.id ?? null));
    expect([answer.status, answer.body.fields[0].path]).toEqual([422, 'phaseId']);
  });

  it('is not the operator’s to change', async () => {
    const show = await plan();
    const { body: made } = await lead.post(`/api/shows/${show.id}/scenes`, draft('Tide')).expect(201);
    await house.as('operator', async () => {
      await lead.get(`/api/scenes/${made.id}`).expect(200);
      await lead.put(`/api/scenes/${made.id}`, { ...draft('X'), expectedVersion: 1 }).expect(403);
      await lead.delete(`/api/scenes/${made.id}`).expect(403);
    });
  });

  it('is copied to the end of the list at version 1', async () => {
    const show = await plan();
    const { body: first } = await lead.post(`/api/shows/${show.id}/scenes`, draft('Tide')).expect(201);
    await lead.post(`/api/shows/${show.id}/scenes`, draft('Lanterns')).expect(201);
    await lead.post(`/api/scenes/${first.id}/duplicate`).expect(201);
    const list = (await lead.get(`/api/shows/${show.id}/scenes`)).body;
    expect(list.map((one: { name: string; version: number }) => [one.name, one.version])).toEqual([
      ['Tide', 1],
      ['Lanterns', 1],
      ['Tide (copy)', 1],
    ]);
  });

  it('tells the hub and writes down who changed it, each time', async () => {
    const show = await plan();
    const { body: made } = await lead.post(`/api/shows/${show.id}/scenes`, draft('Tide')).expect(201);
    const from = house.told.length - 1;
    await lead.put(`/api/scenes/${made.id}`, { ...draft('Tide'), expectedVersion: 1 }).expect(200);
    await lead.delete(`/api/scenes/${made.id}`).expect(204);
    await lead.post(`/api/scenes/${made.id}/restore`).expect(200);
    expect(house.told.slice(from)).toEqual(Array(4).fill(['manifestChanged', show.id]));
    const where = { action: 'scene.edit', crewId: house.crewId };
    const entries = await house.db.auditEntries.findAll({ where, order: [['id', 'ASC']] });
    const said = entries.map(({ object }) => object ?? '').filter((object) => object.startsWith(made.id));
    expect(said).toEqual(['made', 'version 2', 'removed', 'restored'].map((what) => `${made.id} ${what}`));
  });

  it('without such a version says so', async () => {
    const show = await plan();
    const { body: made } = await lead.post(`/api/shows/${show.id}/scenes`, draft('Tide')).expect(201);
    await lead.get(`/api/scenes/${made.id}/versions/9`).expect(404);
    await lead.get(`/api/scenes/${made.id}/versions/first`).expect(422);
  });
});
