import { join } from 'node:path';
import type { Asset } from '#server/models/asset';
import { keepFile, removeFile, sizeOf } from './keepFile';
import { makePoster, makeStill } from './stills';
import { clipPoster, transcode } from './transcode';

export interface Folders {
  /** Uploads while they come in. */
  incoming: string;
  /** Uploads that wait for their work; removed once it is done, only the served file stays. */
  originals: string;
  /** Served files, named after their content. */
  media: string;
}

export interface WorkOptions {
  threads: number;
  signal: AbortSignal;
  onProgress: (share: number) => void;
}

/** What a finished work writes into the row. */
export type Made = Pick<Asset, 'file' | 'posterFile' | 'bytes' | 'width' | 'height' | 'durationS' | 'fps'>;

/** Makes the served file and the poster of one upload. Throws a MediaFault with a plain sentence. */
export async function workAsset(asset: Asset, folders: Folders, options: WorkOptions): Promise<Made> {
  const original = join(folders.originals, asset.id);
  const out = join(folders.incoming, `${asset.id}.out`);
  const frame = join(folders.incoming, `${asset.id}.png`);
  const poster = join(folders.incoming, `${asset.id}.poster`);
  try {
    if (asset.kind === 'clip') {
      const facts = await transcode(original, out, options);
      await clipPoster(out, frame, facts, options.signal);
      await makePoster(frame, poster);
      const { width, height, durationS, fps } = facts;
      return await keep(folders, out, poster, 'mp4', { width, height, durationS, fps });
    }
    const { width, height, ext } = await makeStill(original, out);
    options.onProgress(0.7);
    await makePoster(out, poster);
    return await keep(folders, out, poster, ext, { width, height, durationS: null, fps: null });
  } finally {
    await Promise.all([out, frame, poster].map(removeFile));
  }
}

async function keep(
  folders: Folders,
  out: string,
  poster: string,
  ext: string,
  facts: Pick<Made, 'width' | 'height' | 'durationS' | 'fps'>,
): Promise<Made> {
  const bytes = await sizeOf(out);
  const file = await keepFile(out, folders.media, ext);
  const posterFile = await keepFile(poster, folders.media, 'webp');
  return { ...facts, bytes, file, posterFile };
}
