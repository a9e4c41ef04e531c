import { accountRoutes } from '#server/routes/accounts';
import { brandRoutes } from '#server/routes/brands';
import { displayRoutes } from '#server/routes/displays';
import { mailRoutes } from '#server/routes/mail';
import { sceneRoutes } from '#server/routes/scenes';
import { showRoutes } from '#server/routes/shows';
import { venueRoutes } from '#server/routes/venues';
import { setUpLink } from '#server/services/accounts/setUp';
import type { ShowDetail } from '#shared/api/shows';
import { newBody, newLayer } from '#shared/scene/defaults';
import type { SceneBody } from '#shared/scene/schema';
import type { Role } from '#shared/show/roles';
import { type Browser, makeTestApp, type TestApp } from '#tests/make/app';
import { makeScreen } from '#tests/make/night';

/** A server with one crew, signed in as its lead. */
export interface PlanningHouse extends TestApp {
  lead: Browser;
  crewId: string;
  /** A new show in a venue of two screens. */
  plan: () => Promise<ShowDetail>;
  /** The signed-in member has another role for the time of some work. */
  as: (role: Role, work: () => Promise<unknown>) => Promise<void>;
}

export const room = { ambientLux: 30, screens: [makeScreen('back', 0), makeScreen('left', -4)], groups: [] };

export const bodyOf = (change: Partial<SceneBody> = {}): SceneBody => ({
  ...newBody(),
  layers: [newLayer('drawing', 'l1')],
  ...change,
});

/** A scene as the pages send it. */
export const sceneDraft = (name: string, phaseId: string | null = null, body = bodyOf()) => ({
  name,
  phaseId,
  energy: 5,
  body,
});

/** Everything that plans a night, with real PostgreSQL and a real session. */
export async function makePlanningHouse(): Promise<PlanningHouse> {
  const house = await makeTestApp([
    accountRoutes,
    mailRoutes,
    showRoutes,
    sceneRoutes,
    venueRoutes,
    brandRoutes,
    displayRoutes,
  ]);
  const lead = house.browser();
  const person = { name: 'Ines Varga', email: 'ines@crew.example', password: 'salt static and otters' };
  const token = await setUpLink(house.db);
  const made = await lead.post('/api/setup', { token, crewName: 'Boathouse crew', demo: false, ...person });
  const crewId: string = made.body.crew.id;
  return {
    ...house,
    lead,
    crewId,
    plan: async () => {
      const venue = await lead.post('/api/venues', { name: 'Boathouse 4', body: room }).expect(201);
      const facts = { name: 'Salt & Static', date: '2026-12-05', client: 'Ottergate Cider' };
      const show = await lead.post('/api/shows', { ...facts, venueId: venue.body.id }).expect(201);
      return (await lead.get(`/api/shows/${show.body.id}`).expect(200)).body;
    },
    as: async (role, work) => {
      await house.db.memberships.update({ role }, { where: { crewId } });
      try {
        await work();
      } finally {
        await house.db.memberships.update({ role: 'lead' }, { where: { crewId } });
      }
    },
  };
}
