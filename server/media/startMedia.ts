import { EventEmitter, once } from 'node:events';
import { mkdir, readdir, rename, stat } from 'node:fs/promises';
import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import PgBoss from 'pg-boss';
import type { Asset } from '#server/models/asset';
import type { Database } from '#server/models/database';
import { ownerless } from '#server/services/assets';
import { Fault } from '#server/services/fault';
import type { Log } from '#server/services/log';
import type { IncomingFile, MediaCalls } from '#server/services/mediaCalls';
import { newId } from '#server/services/tokens';
import { uploadLimits } from '#shared/api/assets';
import { removeFile } from './keepFile';
import { MediaFault } from './mediaFault';
import { sniff } from './sniff';
import { pictureFacts } from './stills';
import { type Folders, workAsset } from './workAsset';

export interface MediaOptions {
  db: Database;
  databaseUrl: string;
  dataFolder: string;
  log: Log;
  /** A file of a crew is ready, or failed. */
  onChange: (crewId: string) => void;
  /** While a night is on, work takes one thread. */
  liveNow: () => Promise<boolean>;
}

const queue = 'media';
/** An upload that was broken off is removed after this, ms. */
const staleMs = 3_600_000;
/** The row learns of progress this often at the most, ms. */
const progressMs = 500;

interface Job {
  assetId: string;
}

/** Brings up the media jobs: one at a time, taken up again after a crash. */
export async function startMedia(
  options: MediaOptions,
): Promise<MediaCalls & { close: () => Promise<void> }> {
  const { db, log } = options;
  const folders = await makeFolders(options.dataFolder);
  const settledEvents = new EventEmitter().setMaxListeners(0);
  const ending = new AbortController();
  const boss = new PgBoss({
    connectionString: options.databaseUrl,
    max: 2,
    application_name: 'lampyrid media',
  });
  boss.on('error', (error) => log.warn({ err: error }, 'media jobs'));
  await boss.start();
  await boss.createQueue(queue, { name: queue, retryLimit: 2, expireInSeconds: 6 * 3600 });
  const worker = await boss.work<Job>(queue, { pollingIntervalSeconds: 2 }, async (jobs) => {
    for (const { data } of jobs) await perform(data.assetId, options, folders, ending.signal, settledEvents);
  });
  const send = async (assetId: string) => {
    await boss.send(queue, { assetId } satisfies Job);
    boss.notifyWorker(worker);
  };
  await takeUp(db, folders, boss, send);
  return {
    mediaFolder: folders.media,
    incomingFolder: folders.incoming,
    ingest: (file) => ingest(db, folders, file, send),
    settled: (assetId) => settled(db, assetId, settledEvents),
    close: async () => {
      ending.abort(new Error('The server ends.'));
      await boss.stop({ graceful: true, timeout: 4000, wait: true });
    },
  };
}

async function makeFolders(dataFolder: string): Promise<Folders> {
  const folders: Folders = {
    incoming: join(dataFolder, 'incoming'),
    originals: join(dataFolder, 'originals'),
    media: join(dataFolder, 'media'),
  };
  for (const folder of Object.values(folders)) await mkdir(folder, { recursive: true, mode: 0o700 });
  return folders;
}

/** What a crash left: stale uploads go, unfinished work starts anew, work without its upload has failed. */
async function takeUp(
  db: Database,
  folders: Folders,
  boss: PgBoss,
  send: (assetId: string) => Promise<void>,
): Promise<void> {
  for (const name of await readdir(folders.incoming)) {
    const path = join(folders.incoming, name);
    const { mtimeMs } = await stat(path);
    if (Date.now() - mtimeMs > staleMs) await removeFile(path);
  }
  await boss.purgeQueue(queue);
  const there = new Set(await readdir(folders.originals));
  for (const asset of await db.assets.findAll({ where: { state: ['waiting', 'working'] } })) {
    if (there.delete(asset.id)) await send(asset.id);
    else await asset.update({ state: 'failed', fault: 'The upload was lost in a crash: upload it again.' });
  }
  for (const nobodys of there) await removeFile(join(folders.originals, nobodys));
}

async function ingest(
  db: Database,
  folders: Folders,
  file: IncomingFile,
  send: (assetId: string) => Promise<void>,
): Promise<Asset> {
  try {
    const kind = await kindOf(file);
    const id = newId();
    await rename(file.path, join(folders.originals, id));
    const asset = await db.assets.create({
      id,
      crewId: file.crewId,
      name: nameOf(file.originalName),
      originalName: file.originalName.slice(0, 255),
      kind: file.kind ?? kind,
      state: 'waiting',
      hash: file.hash,
      bytes: file.bytes,
      addedBy: file.addedBy,
    });
    await send(id);
    return asset;
  } catch (error) {
    await removeFile(file.path);
    if (!(error instanceof MediaFault)) throw error;
    const mend = 'Pictures: PNG, JPEG, WebP, AVIF, SVG. Video: MP4, MOV, WebM and most others.';
    throw new Fault(415, error.message, mend);
  }
}

async function kindOf(file: IncomingFile): Promise<Asset['kind']> {
  const { what } = await sniff(file.path);
  if (what === 'video') return 'clip';
  if (file.bytes > uploadLimits.image)
    throw new MediaFault('This picture is larger than 25 MB: export it smaller.');
  const { alpha, moves } = await pictureFacts(file.path);
  if (moves) return 'clip';
  // What has see-through parts is a mark, as a rule; the Library can say otherwise.
  return alpha ? 'mark' : 'still';
}

/** The file's name without folder and ending, as people read it. */
const nameOf = (originalName: string): string => {
  const base = originalName.split(/[\\/]/).pop() ?? '';
  const name = base
    .replace(/\.[A-Za-z0-9]{1,5}$/, '')
    .replace(/\p{C}/gu, '')
    .trim();
  return name.slice(0, 120) || 'Untitled';
};

async function perform(
  assetId: string,
  { db, log, onChange, liveNow }: MediaOptions,
  folders: Folders,
  signal: AbortSignal,
  settledEvents: EventEmitter,
): Promise<void> {
  const asset = await db.assets.findByPk(assetId);
  const original = join(folders.originals, assetId);
  if (!asset) {
    // Removed from the Library before its turn came.
    await removeFile(original);
    settledEvents.emit(assetId);
    return;
  }
  if (asset.state === 'ready' || asset.state === 'failed') return;
  await asset.update({ state: 'working', progress: 0 });
  let told = 0;
  const onProgress = (share: number) => {
    const now = performance.now();
    if (now - told < progressMs) return;
    told = now;
    db.assets
      .update({ progress: share }, { where: { id: assetId, state: 'working' } })
      .catch((error: unknown) => log.debug({ err: error }, 'progress was not written'));
  };
  const threads = (await liveNow()) ? 1 : Math.min(4, availableParallelism());
  try {
    const made = await workAsset(asset, folders, { threads, signal, onProgress });
    const ready = { ...made, state: 'ready' as const, progress: 1, fault: null };
    const [kept] = await db.assets.update(ready, { where: { id: assetId } });
    // Removed from the Library while it was worked on: then its files have no owner.
    if (kept === 0) await dropFiles(db, folders, [made.file, made.posterFile]);
  } catch (error) {
    if (signal.aborted) throw error;
    const known = error instanceof MediaFault;
    if (!known) log.error({ err: error, assetId }, 'media work failed');
    const fault = known ? error.message : 'Something broke while this file was converted: upload it again.';
    await asset.update({ state: 'failed', fault });
  }
  await removeFile(original);
  onChange(asset.crewId);
  settledEvents.emit(assetId);
}

async function dropFiles(db: Database, folders: Folders, names: (string | null)[]): Promise<void> {
  for (const name of await ownerless(db, names)) await removeFile(join(folders.media, name));
}

async function settled(db: Database, assetId: string, events: EventEmitter): Promise<Asset> {
  for (;;) {
    const change = once(events, assetId);
    const asset = await db.assets.findByPk(assetId);
    if (!asset) throw new Error('The file was removed.');
    if (asset.state === 'ready' || asset.state === 'failed') return asset;
    await change;
  }
}
