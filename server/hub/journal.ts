import { mkdir, open, readdir, readFile, rm } from 'node:fs/promises';
import { join } from 'node:path';
import type { EventRow, HubStore } from '#server/services/hubStore';
import type { Log } from '#server/services/log';

/** Where events are safe: in PostgreSQL, in the spill file while it is away, or nowhere. */
export type Durable = 'database' | 'spill' | 'none';

export interface Journal {
  /** Resolves true once the event survives a crash, false when it does not. */
  append: (row: EventRow) => Promise<boolean>;
  durable: () => Durable;
  /** Brings what is in spill files into the database. True when nothing is left. */
  replay: () => Promise<boolean>;
  /** Resolves when all that was given is settled. */
  flush: () => Promise<void>;
  close: () => Promise<void>;
}

interface Waiting {
  row: EventRow;
  settle: (kept: boolean) => void;
}

const retryMs = 1000;

/**
 * Writes events as they come, in natural batches: the next batch is all that came while the last was on its way. A
 * lone trigger waits for nothing, a burst shares one commit. While the database is away, events go to a file of lines,
 * synced to the disk, and from there into the database when it is back.
 * @param onDurable called when the answer to “where are events safe” changes
 */
export function makeJournal(
  store: Pick<HubStore, 'append'>,
  folder: string,
  log: Log,
  onDurable: (durable: Durable) => void,
): Journal {
  let waiting: Waiting[] = [];
  let running: Promise<void> | null = null;
  let state: Durable = 'database';
  let retry: ReturnType<typeof setTimeout> | null = null;
  let closed = false;

  const become = (next: Durable) => {
    if (next === state) return;
    state = next;
    log.warn({ durable: next }, 'where events are safe has changed');
    onDurable(next);
  };
  /** @returns the rows that the database will never take, or null while it is away */
  const toDatabase = async (batch: readonly Waiting[]): Promise<ReadonlySet<EventRow> | null> => {
    try {
      const rows = batch.map(({ row }) => row);
      return new Set(await write(store, rows, log));
    } catch (error) {
      log.warn({ err: error }, 'events did not reach the database');
      return null;
    }
  };
  const toSpill = async (batch: readonly Waiting[]): Promise<boolean> => {
    try {
      await spill(
        folder,
        batch.map(({ row }) => row),
      );
      return true;
    } catch (error) {
      log.error({ err: error }, 'events did not reach the spill file');
      return false;
    }
  };
  const keep = async (batch: readonly Waiting[]): Promise<void> => {
    const never = state === 'database' ? await toDatabase(batch) : null;
    if (never) {
      for (const { row, settle } of batch) settle(!never.has(row));
      return;
    }
    const kept = await toSpill(batch);
    become(kept ? 'spill' : 'none');
    again();
    for (const { settle } of batch) settle(kept);
  };
  const work = async (): Promise<void> => {
    while (waiting.length > 0) {
      const batch = waiting;
      waiting = [];
      await keep(batch);
    }
  };
  const run = (job: () => Promise<void>): Promise<void> => {
    const next = (running ?? Promise.resolve()).then(job).finally(() => {
      if (running === next) running = null;
    });
    running = next;
    return next;
  };
  const replay = async (): Promise<boolean> => {
    // Asked beside the queue: a database that hangs must not hold up what goes to the file meanwhile.
    if (state !== 'database' && !(await answers(store))) return false;
    let done = true;
    await run(async () => {
      done = await unspill(folder, store, log);
      if (done && state !== 'database') become('database');
    });
    return done;
  };
  const again = () => {
    if (retry || closed) return;
    retry = setTimeout(async () => {
      retry = null;
      if (!(await replay())) again();
    }, retryMs);
  };
  return {
    durable: () => state,
    append: (row) =>
      new Promise((settle) => {
        waiting.push({ row, settle });
        if (waiting.length === 1) void run(work);
      }),
    replay,
    flush: () => run(work),
    close: async () => {
      closed = true;
      if (retry) clearTimeout(retry);
      await run(work);
      if (state !== 'database') await unspill(folder, store, log);
    },
  };
}

const answers = (store: Pick<HubStore, 'append'>): Promise<boolean> =>
  store.append([]).then(
    () => true,
    () => false,
  );

/** Whether PostgreSQL objects to the data itself (SQLSTATE classes 22 and 23): sent again, it would object again. */
const isDataFault = (error: unknown): boolean =>
  error instanceof Error && 'code' in error && /^2[23]...$/.test(String(error.code));

/**
 * Writes rows, and when one of them is objected to, all the others.
 * @returns the rows that the database will never take
 * @throws when the database is away
 */
async function write(
  store: Pick<HubStore, 'append'>,
  rows: readonly EventRow[],
  log: Log,
): Promise<EventRow[]> {
  try {
    await store.append(rows);
    return [];
  } catch (error) {
    if (!isDataFault(error)) throw error;
    const [only] = rows;
    if (rows.length === 1 && only) {
      log.error({ err: error, row: only }, 'the database will never take this event');
      return [only];
    }
    const half = Math.ceil(rows.length / 2);
    return [
      ...(await write(store, rows.slice(0, half), log)),
      ...(await write(store, rows.slice(half), log)),
    ];
  }
}

const spillName = (row: EventRow): string => `${row.showId}.${row.room}.jsonl`;

/** Appends rows to their rooms' spill files and syncs them to the disk. */
async function spill(folder: string, rows: readonly EventRow[]): Promise<void> {
  await mkdir(folder, { recursive: true, mode: 0o700 });
  const byFile = new Map<string, EventRow[]>();
  for (const row of rows) byFile.set(spillName(row), [...(byFile.get(spillName(row)) ?? []), row]);
  for (const [name, list] of byFile) {
    const file = await open(join(folder, name), 'a', 0o600);
    try {
      const isNew = (await file.stat()).size === 0;
      // The leading line end keeps a line that a full disk has broken off apart from what comes after it.
      await file.writeFile(`\n${list.map((row) => `${JSON.stringify(row)}\n`).join('')}`);
      await file.datasync();
      if (isNew) await syncFolder(folder);
    } finally {
      await file.close();
    }
  }
}

/** Without this a power cut may take the name of a new file, however well its content was synced. fsync(2). */
async function syncFolder(folder: string): Promise<void> {
  const handle = await open(folder, 'r');
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}

/** Rows of a spill file. A line that was broken off is left out: it was never said to be kept. */
function rowsOf(text: string): EventRow[] {
  return text.split('\n').flatMap((line) => {
    try {
      return line ? [JSON.parse(line) as EventRow] : [];
    } catch {
      return [];
    }
  });
}

const mostRows = 500;

/** Brings all spill files into the database. A row that is there already stays as it is. */
async function unspill(folder: string, store: Pick<HubStore, 'append'>, log: Log): Promise<boolean> {
  const names = await readdir(folder).catch(() => []);
  for (const name of names) {
    const path = join(folder, name);
    try {
      const rows = rowsOf(await readFile(path, 'utf8'));
      for (let at = 0; at < rows.length; at += mostRows)
        await write(store, rows.slice(at, at + mostRows), log);
      await rm(path);
    } catch (error) {
      log.warn({ err: error, name }, 'a spill file waits');
      return false;
    }
  }
  return true;
}
