import type { ManifestAsset } from '#shared/protocol/messages';
import type { FileSource, LoadedFile } from './types';

/** Fetches a show's files ahead and keeps them while they are wanted. */
export interface FileStore extends FileSource {
  /** The files of a show. Those no longer named are dropped; new ones are fetched in this order. */
  want(assets: readonly ManifestAsset[]): void;
  counts(): { onBoard: number; wanted: number };
  /** Frees everything and stops fetching. */
  dispose(): void;
}

/** Fetches at the same time: more would only slow each other down on a venue's network. */
const atOnce = 3;
const firstPauseMs = 500;
const longestPauseMs = 15_000;
/** Name of the browser's own store, so that a reload without a network finds the files. */
const cacheName = 'lampyrid-files';

interface Entry {
  asset: ManifestAsset;
  file: LoadedFile | null;
  state: 'waiting' | 'fetching' | 'pausing' | 'here';
  tries: number;
  stop: AbortController;
  timer: ReturnType<typeof setTimeout> | undefined;
}

/** Only secure pages have the browser's store; elsewhere files are fetched again after a reload. */
const openCache = async (): Promise<Cache | null> => {
  try {
    return 'caches' in globalThis ? await caches.open(cacheName) : null;
  } catch {
    return null;
  }
};

const fetched = async (url: string, signal: AbortSignal): Promise<Blob> => {
  const cache = await openCache();
  const kept = await cache?.match(url);
  if (kept) return kept.blob();
  const answer = await fetch(url, { signal, credentials: 'same-origin' });
  if (!answer.ok) throw new Error(`The file answers ${answer.status}.`);
  // A full disk must not keep a file from being shown.
  await cache?.put(url, answer.clone()).catch(() => undefined);
  return answer.blob();
};

const loaded = async (asset: ManifestAsset, signal: AbortSignal): Promise<LoadedFile> => {
  const blob = await fetched(asset.url, signal);
  if (asset.kind !== 'clip') {
    const bitmap = await createImageBitmap(blob, { premultiplyAlpha: 'premultiply' });
    return { kind: 'picture', bitmap, width: bitmap.width, height: bitmap.height };
  }
  return {
    kind: 'clip',
    url: URL.createObjectURL(blob),
    width: asset.width,
    height: asset.height,
    durationS: asset.durationS ?? 0,
    fps: asset.fps,
  };
};

const freed = (file: LoadedFile | null): void => {
  if (file?.kind === 'picture') file.bitmap.close();
  if (file?.kind === 'clip') URL.revokeObjectURL(file.url);
};

/** Removes files from the browser's store that no show here wants any more. */
const tidyCache = async (urls: ReadonlySet<string>): Promise<void> => {
  const cache = await openCache();
  for (const request of (await cache?.keys()) ?? [])
    if (!urls.has(new URL(request.url).pathname)) await cache?.delete(request);
};

export const createFileStore = (): FileStore => {
  const entries = new Map<string, Entry>();
  let over = false;

  const drop = (id: string, entry: Entry): void => {
    entries.delete(id);
    entry.stop.abort();
    clearTimeout(entry.timer);
    freed(entry.file);
  };

  const later = (entry: Entry): void => {
    entry.state = 'pausing';
    const pause = Math.min(longestPauseMs, firstPauseMs * 2 ** entry.tries);
    entry.tries += 1;
    entry.timer = setTimeout(() => {
      entry.state = 'waiting';
      next();
    }, pause);
  };

  const fetchOne = async (entry: Entry): Promise<void> => {
    entry.state = 'fetching';
    try {
      const file = await loaded(entry.asset, entry.stop.signal);
      if (entry.stop.signal.aborted) return freed(file);
      entry.file = file;
      entry.state = 'here';
    } catch {
      if (!entry.stop.signal.aborted) later(entry);
    }
    next();
  };

  const next = (): void => {
    if (over) return;
    const all = [...entries.values()];
    let room = atOnce - all.filter(({ state }) => state === 'fetching').length;
    for (const entry of all) {
      if (room <= 0) return;
      if (entry.state !== 'waiting') continue;
      room -= 1;
      void fetchOne(entry);
    }
  };

  return {
    want(assets) {
      if (over) return;
      const wanted = new Map(assets.map((asset) => [asset.id, asset]));
      for (const [id, entry] of entries) if (wanted.get(id)?.url !== entry.asset.url) drop(id, entry);
      for (const [id, asset] of wanted)
        if (!entries.has(id))
          entries.set(id, {
            asset,
            file: null,
            state: 'waiting',
            tries: 0,
            stop: new AbortController(),
            timer: undefined,
          });
      void tidyCache(new Set(assets.map(({ url }) => url))).catch(() => undefined);
      next();
    },
    counts: () => ({
      onBoard: [...entries.values()].filter(({ file }) => file !== null).length,
      wanted: entries.size,
    }),
    get: (assetId) => entries.get(assetId)?.file ?? null,
    dispose() {
      over = true;
      for (const [id, entry] of entries) drop(id, entry);
    },
  };
};
