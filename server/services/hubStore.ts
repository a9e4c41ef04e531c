import pg from 'pg';
import { connectionLimits, type Database } from '#server/models/database';
import { eventBodySchema, type ShowEvent } from '#shared/show/events';
import { reduce, startState } from '#shared/show/reduce';
import { type RoomKind, type ShowState, showStateSchema } from '#shared/show/state';

/** One event as the journal writes it. */
export interface EventRow extends ShowEvent {
  showId: string;
  room: RoomKind;
}

/** One drawn report as the as-run log keeps it. */
export interface DrawnRow {
  showId: string;
  room: RoomKind;
  displayId: string;
  seq: number;
  screenId: string;
  runId: string | null;
  sceneId: string | null;
  sceneVersion: number | null;
  at: number;
  lateMs: number;
}

/** What a room is when a hub takes it over. */
export interface OpenedRoom {
  /** State after all that is known, in a new epoch at revision 0. */
  state: ShowState;
  /** Ids of the last commands, so that a repeat over a restart is known. */
  commandIds: string[];
  /** The last drawn report of each display and screen. */
  wall: { displayId: string; screenId: string; runId: string | null; at: number }[];
}

/** The hub's way to the database. Everything rejects in three seconds at the latest. */
export interface HubStore {
  open: (showId: string, room: RoomKind, now: number) => Promise<OpenedRoom>;
  /**
   * Writes events in one statement, committed when it resolves; rows that are there already stay, and rows of a show
   * that is no more are left out. With no rows it only asks whether the database is there.
   */
  append: (rows: readonly EventRow[]) => Promise<void>;
  snapshot: (state: ShowState) => Promise<void>;
  drawn: (rows: readonly DrawnRow[]) => Promise<void>;
  seen: (displayId: string, raster: readonly [number, number]) => Promise<void>;
  close: () => Promise<void>;
}

const keptCommands = 4000;

/** The store of a server's hub: one connection of its own for events, the pool for the rest. */
export function makeHubStore(db: Database, databaseUrl: string): HubStore {
  const journal = dedicated(databaseUrl);
  return {
    open: (showId, room, now) => openRoom(db, showId, room, now),
    append: async (rows) => {
      const column = <T>(pick: (row: EventRow) => T): T[] => rows.map(pick);
      await journal.query('append', appendSql, [
        column((row) => row.showId),
        column((row) => row.room),
        column((row) => row.epoch),
        column((row) => row.revision),
        column((row) => row.at),
        column((row) => row.commandId),
        column((row) => row.by),
        column((row) => JSON.stringify(row.body)),
      ]);
    },
    snapshot: async (state) => {
      await db.pool.query(snapshotSql, [
        state.showId,
        state.room,
        state.epoch,
        state.revision,
        JSON.stringify(state),
      ]);
    },
    drawn: async (rows) => {
      const column = <T>(pick: (row: DrawnRow) => T): T[] => rows.map(pick);
      await db.pool.query(drawnSql, [
        column((row) => row.showId),
        column((row) => row.room),
        column((row) => row.displayId),
        column((row) => row.seq),
        column((row) => row.screenId),
        column((row) => row.runId),
        column((row) => row.sceneId),
        column((row) => row.sceneVersion),
        column((row) => row.at),
        column((row) => row.lateMs),
      ]);
    },
    seen: async (displayId, raster) => {
      await db.pool.query('update displays set last_seen_at = now(), raster = $2 where id = $1', [
        displayId,
        JSON.stringify(raster),
      ]);
    },
    close: () => journal.close(),
  };
}

const appendSql = `insert into show_events (show_id, room, epoch, revision, at, command_id, by, body)
select given.* from unnest($1::text[], $2::text[], $3::int[], $4::int[], $5::float8[], $6::text[], $7::text[], $8::jsonb[])
  as given (show_id, room, epoch, revision, at, command_id, by, body)
where exists (select 1 from shows where shows.id = given.show_id)
on conflict do nothing`;

const snapshotSql = `insert into snapshots (show_id, room, epoch, revision, state) values ($1, $2, $3, $4, $5)
on conflict do nothing`;

const drawnSql = `insert into as_run (show_id, room, display_id, seq, screen_id, run_id, scene_id, scene_version, at, late_ms)
select given.* from unnest($1::text[], $2::text[], $3::text[], $4::int[], $5::text[], $6::text[], $7::text[], $8::int[], $9::float8[], $10::float8[])
  as given (show_id, room, display_id, seq, screen_id, run_id, scene_id, scene_version, at, late_ms)
where exists (select 1 from shows where shows.id = given.show_id)
on conflict do nothing`;

/** One connection that is made when first needed and again after it broke. */
function dedicated(databaseUrl: string) {
  const { connectionTimeoutMillis, query_timeout, statement_timeout, keepAlive } = connectionLimits;
  let client: pg.Client | null = null;
  const drop = (gone: pg.Client) => {
    if (client === gone) client = null;
    gone.end().catch(() => undefined);
  };
  const connect = async (): Promise<pg.Client> => {
    if (client) return client;
    const limits = { connectionTimeoutMillis, query_timeout, statement_timeout, keepAlive };
    const made = new pg.Client({
      connectionString: databaseUrl,
      application_name: 'lampyrid journal',
      ...limits,
    });
    made.on('error', () => drop(made));
    made.on('end', () => drop(made));
    try {
      await made.connect();
    } catch (error) {
      drop(made);
      throw error;
    }
    client = made;
    return made;
  };
  const perform = async (name: string, text: string, values: unknown[]): Promise<void> => {
    const at = await connect();
    try {
      await at.query({ name, text, values });
    } catch (error) {
      drop(at);
      throw error;
    }
  };
  let last: Promise<unknown> = Promise.resolve();
  return {
    /** One at a time: a connection carries one statement, and two callers must not both make one. */
    query: (name: string, text: string, values: unknown[]): Promise<void> => {
      const next = last.then(() => perform(name, text, values));
      last = next.catch(() => undefined);
      return next;
    },
    close: async (): Promise<void> => {
      if (client) await client.end();
      client = null;
    },
  };
}

async function openRoom(db: Database, showId: string, room: RoomKind, now: number): Promise<OpenedRoom> {
  const key = [showId, room];
  const epoch = await raiseEpoch(db, key);
  const snapshot = await db.pool.query<{ state: unknown }>(
    'select state from snapshots where show_id = $1 and room = $2 order by epoch desc, revision desc limit 1',
    key,
  );
  const parsed = showStateSchema.safeParse(snapshot.rows[0]?.state);
  let state = parsed.success ? parsed.data : startState(showId, room, now);
  const events = await db.pool.query<ShowEvent>(
    `select epoch, revision, at, command_id as "commandId", by, body from show_events
     where show_id = $1 and room = $2 and (epoch, revision) > ($3, $4) order by epoch, revision`,
    [...key, state.epoch, state.revision],
  );
  for (const event of events.rows) {
    const body = eventBodySchema.safeParse(event.body);
    if (body.success) state = reduce(state, { ...event, body: body.data });
  }
  const commands = await db.pool.query<{ id: string }>(
    `select command_id as id from show_events where show_id = $1 and room = $2 and command_id is not null
     order by epoch desc, revision desc limit ${keptCommands}`,
    key,
  );
  const wall = await db.pool.query<OpenedRoom['wall'][number]>(
    `select distinct on (display_id, screen_id) display_id as "displayId", screen_id as "screenId",
       run_id as "runId", at from as_run where show_id = $1 and room = $2 order by display_id, screen_id, at desc`,
    key,
  );
  return {
    state: { ...state, epoch, revision: 0 },
    commandIds: commands.rows.map(({ id }) => id).reverse(),
    wall: room === 'live' ? wall.rows : [],
  };
}

async function raiseEpoch(db: Database, key: string[]): Promise<number> {
  const { rows } = await db.pool.query<{ epoch: number }>(
    `insert into show_epochs (show_id, room, epoch) values ($1, $2, 1)
     on conflict (show_id, room) do update set epoch = show_epochs.epoch + 1 returning epoch`,
    key,
  );
  const epoch = rows[0]?.epoch;
  if (epoch === undefined) throw new Error('The database gave no epoch.');
  return epoch;
}
