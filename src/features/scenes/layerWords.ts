import type { Asset } from '#shared/api/assets';
import { drawingFacts } from '#shared/scene/drawingFacts';
import type { Source, SourceKind } from '#shared/scene/schema';
import { count } from '@/lib/words';

/** What each kind of source is, for choosing one. */
export const kindWords: Record<SourceKind, { title: string; text: string }> = {
  drawing: { title: 'Drawing', text: 'Made by formula: needs no file, never ends.' },
  clip: { title: 'Clip', text: 'A video from the library, in time with the beat if you like.' },
  stills: { title: 'Stills', text: 'Pictures one after the other, changing on the beat.' },
  mark: { title: 'Mark', text: 'The client’s logo, given a motion.' },
  words: { title: 'Words', text: 'Type: a name, a line, a thank-you.' },
};

type Sayers = {
  [K in SourceKind]: (source: Extract<Source, { kind: K }>, name: (id: string) => string) => string;
};

const sayers: Sayers = {
  clip: ({ assetId, fitBars, rate }, name) =>
    `${assetId ? name(assetId) : 'no clip chosen'} · ${fitBars ? count(fitBars, 'bar') : `speed ${rate}`}`,
  stills: ({ assetIds, everyBeats }) =>
    `${count(assetIds.length, 'still')}, one each ${count(everyBeats, 'beat')}`,
  mark: ({ assetId, take }, name) => `${assetId ? name(assetId) : 'no mark chosen'} · take: ${take}`,
  words: ({ text }) => (text ? `“${text.slice(0, 40)}”` : 'no words yet'),
  drawing: ({ drawing, seed }) => `${drawingFacts[drawing].title}, drawn by formula · seed ${seed}`,
};

/** What a source is, in a line. */
export const sourceWords = (source: Source, assets: ReadonlyMap<string, Asset>): string => {
  const say = sayers[source.kind] as (source: Source, name: (id: string) => string) => string;
  return say(source, (id) => assets.get(id)?.name ?? 'file is gone');
};
