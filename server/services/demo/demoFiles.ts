import { createHash, randomBytes } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Database } from '#server/models/database';
import type { MediaCalls } from '../mediaCalls';
import { boathouseSvg, boughSvg, markSvg, oarsSvg } from './pictures';
import type { DemoClip, DemoTools } from './tools';

/** Files of the demo night by what they show. Pictures first: they are quick. */
export const demoPictures = ['mark', 'boathouse', 'oars', 'bough'] as const;
export const demoClips = ['water', 'salt', 'static', 'pour'] as const;
export type DemoFile = (typeof demoPictures)[number] | (typeof demoClips)[number];
/** Asset of each file; null while it is not there. */
export type DemoFileIds = Record<DemoFile, string | null>;

interface Recipe {
  name: string;
  kind: 'clip' | 'still' | 'mark';
  /** What it is drawn from: a clip's name or an SVG. */
  from: { clip: DemoClip } | { svg: string };
}

/** What each file is called in the Library and how it is made. */
export const demoRecipes: Record<DemoFile, Recipe> = {
  mark: { name: 'Ottergate mark', kind: 'mark', from: { svg: markSvg } },
  boathouse: { name: 'Boathouse at dusk', kind: 'still', from: { svg: boathouseSvg } },
  oars: { name: 'Oars', kind: 'still', from: { svg: oarsSvg } },
  bough: { name: 'Apple bough', kind: 'still', from: { svg: boughSvg } },
  water: { name: 'Water light', kind: 'clip', from: { clip: 'water light' } },
  salt: { name: 'Salt crystals', kind: 'clip', from: { clip: 'salt crystals' } },
  static: { name: 'Slow static', kind: 'clip', from: { clip: 'slow static' } },
  pour: { name: 'Cider pour', kind: 'clip', from: { clip: 'cider pour' } },
};

export interface FileParts {
  db: Database;
  media: MediaCalls;
  tools: DemoTools;
}

/**
 * Draws one file and gives it to the Library; one that an earlier try has left is taken.
 * @returns id of its asset, which may still be worked on
 */
export async function makeDemoFile(
  { db, media, tools }: FileParts,
  who: { crewId: string; userId: string | null },
  file: DemoFile,
): Promise<string> {
  const { name, kind, from } = demoRecipes[file];
  const originalName = `${name}.${kind === 'clip' ? 'mp4' : 'png'}`;
  const found = await db.assets.findAll({ where: { crewId: who.crewId, originalName, kind } });
  const usable = found.find(({ state }) => state !== 'failed');
  if (usable) return usable.id;
  const path = join(media.incomingFolder, randomBytes(9).toString('base64url'));
  if ('clip' in from) await tools.clip(from.clip, path);
  else await tools.picture(from.svg, path);
  const bytes = await readFile(path);
  const hash = createHash('sha256').update(bytes).digest('hex');
  const { id } = await media.ingest({
    crewId: who.crewId,
    path,
    originalName,
    hash,
    bytes: bytes.length,
    addedBy: who.userId,
    kind,
  });
  // Until now it lay in the Library as an upload that had failed.
  for (const failed of found) await failed.destroy();
  return id;
}
