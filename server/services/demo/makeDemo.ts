import type { DemoProgress } from '#shared/api/demo';
import type { DemoCalls } from '../demoCalls';
import { Fault } from '../fault';
import type { HubCalls } from '../hubCalls';
import type { Log } from '../log';
import {
  type DemoFile,
  type DemoFileIds,
  demoClips,
  demoPictures,
  demoRecipes,
  type FileParts,
  makeDemoFile,
} from './demoFiles';
import { findDemoShow, makeDemoScenes, makeDemoShow, markDemoMade, putClip } from './demoShow';
import { DrawingFault } from './tools';

export interface DemoParts extends FileParts {
  hub: HubCalls;
  log: Log;
}

interface Who {
  crewId: string;
  userId: string | null;
}

/** Told of each step: share done, words, and the show once it can be opened. */
type Tell = (progress: number, words: string, showId?: string) => void;

const none: DemoProgress = { state: 'none', progress: 0, words: 'Not made yet.', showId: null };
const ready = (showId: string): DemoProgress => ({
  state: 'ready',
  progress: 1,
  words: 'The night is ready.',
  showId,
});
const stopped = 'The server was stopped while the demo night was being made.';

/** Makes the demo night of a crew, once; what an interrupted try has left is used. */
export function demoCalls(parts: DemoParts): DemoCalls {
  const now = new Map<string, DemoProgress>();
  const told = async (crewId: string): Promise<DemoProgress> => {
    const show = await findDemoShow(parts.db, crewId);
    if (!show) return none;
    return show.whole ? ready(show.id) : { state: 'failed', progress: 0.5, words: stopped, showId: show.id };
  };
  return {
    progress: async (crewId) => now.get(crewId) ?? told(crewId),
    make: (crewId, userId) => {
      const going = now.get(crewId);
      if (going?.state === 'working') return going;
      const tell: Tell = (progress, words, showId) =>
        now.set(crewId, { state: 'working', progress, words, showId: showId ?? null });
      tell(0, 'Opening the boathouse …');
      makeNight(parts, { crewId, userId }, tell).then(
        // From here on the database knows.
        () => now.delete(crewId),
        (error: unknown) => {
          parts.log.error({ err: error }, 'the demo night was not made');
          const before = now.get(crewId) ?? none;
          now.set(crewId, { ...before, state: 'failed', words: sentenceOf(error) });
        },
      );
      return now.get(crewId) ?? none;
    },
  };
}

const sentenceOf = (error: unknown): string =>
  error instanceof DrawingFault || error instanceof Fault
    ? `The demo night is not whole. ${error.message}`
    : 'Something broke on our side while the demo night was being made.';

/** Show and scenes come as soon as there are pictures; clips join their scenes one by one. */
async function makeNight(parts: DemoParts, who: Who, tell: Tell): Promise<void> {
  const { db, hub, media } = parts;
  if ((await findDemoShow(db, who.crewId))?.whole) return;
  const ids: DemoFileIds = {
    ...{ mark: null, boathouse: null, oars: null, bough: null },
    ...{ water: null, salt: null, static: null, pour: null },
  };
  tell(0.03, 'Drawing the mark and three pictures …');
  for (const file of demoPictures) ids[file] = await makeDemoFile(parts, who, file);
  tell(0.1, 'Hanging six screens and writing twelve scenes …');
  const showId = await makeDemoShow(db, who, ids.mark);
  await makeDemoScenes(db, who, showId, ids);
  hub.manifestChanged(showId);
  for (const [at, file] of demoClips.entries()) {
    tell(
      0.15 + at * 0.18,
      `Drawing clip ${at + 1} of ${demoClips.length}: ${demoRecipes[file].name} …`,
      showId,
    );
    ids[file] = await makeDemoFile(parts, who, file);
    await putClip(db, who, showId, file, ids[file]);
    hub.manifestChanged(showId);
  }
  tell(0.9, 'Making the clips ready to play …', showId);
  for (const file of [...demoPictures, ...demoClips]) await settle(media, file, ids[file]);
  await markDemoMade(db, who, showId);
  hub.manifestChanged(showId);
}

async function settle(media: FileParts['media'], file: DemoFile, assetId: string | null): Promise<void> {
  if (assetId === null) return;
  const { state, fault } = await media.settled(assetId);
  if (state !== 'ready') throw new DrawingFault(`“${demoRecipes[file].name}” was not made ready: ${fault}`);
}
