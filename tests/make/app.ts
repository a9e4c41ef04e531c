import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Express, Router } from 'express';
import request, { type Test } from 'supertest';
import { makeApp } from '#server/app';
import { readConfig } from '#server/config';
import { makeMailer } from '#server/mail/makeMailer';
import { connect, type Database } from '#server/models/database';
import type { RouteContext } from '#server/routes/context';
import { sessionMiddleware } from '#server/routes/session';
import type { HubCalls } from '#server/services/hubCalls';
import { makeLog } from '#server/services/log';
import { freshDatabase } from '#tests/make/database';

/** What was told to the hub, in order. */
export type Told = [call: keyof HubCalls, ...facts: unknown[]][];

export interface TestApp {
  app: Express;
  db: Database;
  context: RouteContext;
  told: Told;
  dataFolder: string;
  /** A browser with cookies of its own. */
  browser: () => Browser;
  close: () => Promise<void>;
}

export type Browser = Record<
  'get' | 'post' | 'put' | 'patch' | 'delete',
  (path: string, body?: object) => Test
>;

const host = '127.0.0.1:4646';

/** The real app with real PostgreSQL, mail and sessions, routes of choice, and a hub that only listens. */
export async function makeTestApp(
  make: ((context: RouteContext) => Router)[],
  parts: Partial<RouteContext> = {},
): Promise<TestApp> {
  const fresh = await freshDatabase();
  const db = connect(fresh.url);
  const dataFolder = mkdtempSync(join(tmpdir(), 'lampyrid-app-'));
  const config = readConfig({ DATABASE_URL: fresh.url, LAMPYRID_DATA: dataFolder, NODE_ENV: 'test' });
  const log = makeLog('silent');
  const mail = await makeMailer(config, log);
  const told: Told = [];
  const tell =
    (call: keyof HubCalls) =>
    (...facts: unknown[]) =>
      void told.push([call, ...facts]);
  const hub: HubCalls = {
    manifestChanged: tell('manifestChanged'),
    assetsChanged: tell('assetsChanged'),
    mapSaved: tell('mapSaved'),
    displaysChanged: tell('displaysChanged'),
    modeChanged: tell('modeChanged'),
    revoke: tell('revoke'),
  };
  const none = () => {
    throw new Error('Not part of this test.');
  };
  const context: RouteContext = {
    config,
    db,
    hub,
    mail,
    log,
    media: {
      ingest: none,
      settled: none,
      mediaFolder: join(dataFolder, 'media'),
      incomingFolder: join(dataFolder, 'incoming'),
    },
    demo: {
      make: () => ({ state: 'working', progress: 0, words: 'Starting', showId: null }),
      progress: none,
    },
    ...parts,
  };
  const app = makeApp({
    db,
    log,
    sessions: sessionMiddleware(db, 'a secret for tests only'),
    routers: make.map((one) => one(context)),
    hosts: { knows: (name) => name === host, socketOrigins: () => [] },
    pagesFolder: null,
    behindProxy: context.config.publicUrl !== null,
  });
  return {
    app,
    db,
    context,
    told,
    dataFolder,
    browser: () => browserOf(app),
    close: async () => {
      await mail.close();
      await db.close();
      await fresh.drop();
      rmSync(dataFolder, { recursive: true, force: true });
    },
  };
}

function browserOf(app: Express): Browser {
  const agent = request.agent(app).set('host', host).set('origin', `http://${host}`);
  const call =
    (method: keyof Browser) =>
    (path: string, body?: object): Test => {
      const asked = agent[method](path);
      return body === undefined ? asked : asked.send(body);
    };
  return {
    get: call('get'),
    post: call('post'),
    put: call('put'),
    patch: call('patch'),
    delete: call('delete'),
  };
}
