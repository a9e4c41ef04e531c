import { createHash, randomBytes } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Database } from '#server/models/database';
import type { DemoProgress } from '#shared/api/demo';
import type { DemoCalls } from '../demoCalls';
import type { HubCalls } from '../hubCalls';
import type { Log } from '../log';
import type { MediaCalls } from '../mediaCalls';
import { makeBrand } from '../shows/brands';
import { makeScene } from '../shows/scenes';
import { makeShow } from '../shows/shows';
import { makeVenue } from '../shows/venues';
import { newId } from '../tokens';
import { type DemoFile, demoFiles, demoNames, demoPalette, demoPhases, demoScenes, demoVenue } from './night';
import { boathouseSvg, bottleSvg, markSvg, oarsSvg } from './pictures';
import type { DemoClip, DemoTools } from './tools';

export interface DemoParts {
  db: Database;
  media: MediaCalls;
  hub: HubCalls;
  log: Log;
  tools: DemoTools;
}

interface Recipe {
  name: string;
  kind: 'clip' | 'still' | 'mark';
  clip?: DemoClip;
  svg?: string;
}

const recipes: Record<DemoFile, Recipe> = {
  mark: { name: 'Ottergate mark', kind: 'mark', svg: markSvg },
  boathouse: { name: 'Boathouse at dusk', kind: 'still', svg: boathouseSvg },
  oars: { name: 'Oars', kind: 'still', svg: oarsSvg },
  bottle: { name: 'Bottle', kind: 'still', svg: bottleSvg },
  water: { name: 'Water light', kind: 'clip', clip: 'water light' },
  salt: { name: 'Salt glints', kind: 'clip', clip: 'salt glints' },
  pour: { name: 'Cider pour', kind: 'clip', clip: 'cider pour' },
};

/** Pictures first: they are quick, and the clips are then converted while the next is drawn. */
const order: readonly DemoFile[] = ['mark', 'boathouse', 'oars', 'bottle', 'water', 'salt', 'pour'];

const none: DemoProgress = { state: 'none', progress: 0, words: 'Not made yet.', showId: null };

/** The night that a show on this moment belongs to: until six in the morning it is still yesterday's. */
export const nightOf = (at: Date): string => {
  const night = new Date(at.getTime() - 6 * 3_600_000);
  return [night.getFullYear(), night.getMonth() + 1, night.getDate()]
    .map((part) => String(part).padStart(2, '0'))
    .join('-');
};

/** Makes the demo night of a crew, once; what an interrupted making left is used. */
export function demoCalls(parts: DemoParts): DemoCalls {
  const now = new Map<string, DemoProgress>();
  const made = async (crewId: string): Promise<DemoProgress> => {
    const show = await parts.db.shows.findOne({ where: { crewId, name: demoNames.show } });
    const scenes = show ? await parts.db.scenes.count({ where: { showId: show.id } }) : 0;
    return show && scenes > 0
      ? { state: 'ready', progress: 1, words: 'The night is ready.', showId: show.id }
      : none;
  };
  return {
    progress: async (crewId) => now.get(crewId) ?? made(crewId),
    make: (crewId, userId) => {
      const going = now.get(crewId);
      if (going && going.state !== 'failed') return going;
      const tell = (progress: number, words: string) =>
        now.set(crewId, { state: 'working', progress, words, showId: null });
      tell(0, 'Opening the boathouse');
      made(crewId)
        .then((found) => (found.showId ? found.showId : makeNight(parts, crewId, userId, tell)))
        .then((showId) =>
          now.set(crewId, { state: 'ready', progress: 1, words: 'The night is ready.', showId }),
        )
        .catch((error: unknown) => {
          parts.log.error({ err: error }, 'the demo night was not made');
          const words = 'The demo night could not be made. Try again; the log says more.';
          now.set(crewId, { state: 'failed', progress: 0, words, showId: null });
        });
      return now.get(crewId) ?? none;
    },
  };
}

type Tell = (progress: number, words: string) => void;

async function makeNight(
  parts: DemoParts,
  crewId: string,
  userId: string | null,
  tell: Tell,
): Promise<string> {
  const { db, hub } = parts;
  const ids = {} as Record<DemoFile, string>;
  for (const [at, file] of order.entries()) {
    const { name } = recipes[file];
    tell(0.05 + (0.6 * at) / demoFiles.length, `Drawing “${name}”`);
    ids[file] = await makeFile(parts, crewId, userId, file);
  }
  tell(0.7, 'Hanging six screens');
  const venue =
    (await db.venues.findOne({ where: { crewId, name: demoNames.venue } })) ??
    (await makeVenue(db, crewId, { name: demoNames.venue, body: demoVenue }));
  const brand =
    (await db.brands.findOne({ where: { crewId, name: demoNames.client } })) ??
    (await makeBrand(db, crewId, { name: demoNames.client, palette: demoPalette, markAssetId: ids.mark }));
  for (const [at, file] of order.entries()) {
    tell(0.72 + (0.2 * at) / order.length, `Converting “${recipes[file].name}”`);
    const { state, fault } = await parts.media.settled(ids[file]);
    if (state !== 'ready') throw new Error(`${recipes[file].name}: ${fault}`);
  }
  tell(0.94, 'Writing twelve scenes');
  const phases = demoPhases.map((phase, position) => ({ ...phase, id: newId(), position }));
  const facts = { venueId: venue.id, brandId: brand.id, client: demoNames.client };
  const show = await makeShow(
    db,
    crewId,
    { name: demoNames.show, date: nightOf(new Date()), ...facts },
    phases,
  );
  for (const { name, phase, energy, body } of demoScenes(ids))
    await makeScene(db, { crewId, userId }, show.id, {
      name,
      energy,
      body,
      phaseId: phases[phase]?.id ?? null,
    });
  hub.manifestChanged(show.id);
  return show.id;
}

/** Draws one file and gives it to the Library; one that an earlier try has left is taken. */
async function makeFile(
  parts: DemoParts,
  crewId: string,
  userId: string | null,
  file: DemoFile,
): Promise<string> {
  const { name, kind, clip, svg } = recipes[file];
  const found = await parts.db.assets.findOne({ where: { crewId, name, kind } });
  if (found && found.state !== 'failed') return found.id;
  const path = join(parts.media.incomingFolder, randomBytes(9).toString('base64url'));
  if (clip) await parts.tools.clip(clip, path);
  else if (svg) await parts.tools.picture(svg, path);
  const bytes = await readFile(path);
  const asset = await parts.media.ingest({
    crewId,
    path,
    originalName: `${name}.${clip ? 'mp4' : 'png'}`,
    hash: createHash('sha256').update(bytes).digest('hex'),
    bytes: bytes.length,
    addedBy: userId,
    kind,
  });
  return asset.id;
}
