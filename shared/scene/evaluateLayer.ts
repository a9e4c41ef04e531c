import { beatsPerBar, rateForBars } from '../time/beatClock';
import { rgbOf } from './colour';
import type { DrawItem, DrawSource } from './drawingList';
import { chance, shuffled } from './noise';
import type { Layer, Source } from './schema';
import { takePose } from './takes';

/** When a layer is asked for: all relative to the landing of its run. */
export interface LayerMoment {
  /** Stable name of the run, the head of every key. */
  runKey: string;
  beat: number;
  timeS: number;
  bpm: number;
  dials: readonly number[];
  /** Length of a clip in seconds; null when it is not known. */
  durationOf: (assetId: string) => number | null;
}

type Item = Omit<DrawItem, 'key' | 'blend' | 'fit'> & { part: string };
type Kinds = {
  [K in Source['kind']]: (source: Extract<Source, { kind: K }>, layer: Layer, moment: LayerMoment) => Item[];
};

const tau = Math.PI * 2;
const positive = (value: number, period: number): number => ((value % period) + period) % period;

/** Share of a still's time in which the next one comes up. */
const stillFade = 0.25;
/** How much a still grows while it stands. */
const stillDrift = 0.06;

const placed = (layer: Layer, source: DrawSource, part = ''): Item => ({
  part,
  source,
  opacity: layer.opacity,
  place: { ...layer.place, turn: (layer.place.turn * Math.PI) / 180 },
});

const clip: Kinds['clip'] = (source, layer, { beat, timeS, bpm, durationOf }) => {
  if (!source.assetId) return [];
  const length = durationOf(source.assetId);
  if (!length) return [];
  const { fitBars } = source;
  const rate = fitBars === null ? source.rate : rateForBars(length, fitBars, bpm);
  // Fitted clips turn with the beat clock, so that a change of tempo bends their speed and not their place.
  const along = fitBars === null ? timeS * source.rate : (beat / (fitBars * beatsPerBar)) * length;
  return [placed(layer, { kind: 'clip', assetId: source.assetId, positionS: positive(along, length), rate })];
};

const stills: Kinds['stills'] = (source, layer, { beat }) => {
  const n = source.assetIds.length;
  if (n === 0) return [];
  const slot = Math.max(0, Math.floor(beat / source.everyBeats));
  const along = Math.max(0, beat / source.everyBeats) - slot;
  const at = (k: number, grown: number, opacity: number): Item[] => {
    const order = shuffled(n, source.seed, Math.floor(k / n));
    const assetId = source.assetIds[order[k % n] ?? 0];
    if (!assetId) return [];
    const item = placed(layer, { kind: 'picture', assetId }, `${k % 2}`);
    return [
      { ...item, opacity: item.opacity * opacity, place: { ...item.place, scale: item.place.scale * grown } },
    ];
  };
  const drift = (k: number): number => 1 + stillDrift * (slot - k + along);
  const fade = n > 1 && slot > 0 && layer.blend === 'normal' ? Math.min(1, along / stillFade) : 1;
  return fade < 1
    ? [...at(slot - 1, drift(slot - 1), 1), ...at(slot, drift(slot), fade)]
    : at(slot, drift(slot), 1);
};

const mark: Kinds['mark'] = (source, layer, { beat }) => {
  if (!source.assetId) return [];
  const pose = takePose(source.take, beat, source.amount, source.seed);
  const item = placed(layer, { kind: 'picture', assetId: source.assetId });
  const { x, y, scale, turn } = item.place;
  return [
    {
      ...item,
      place: {
        x: x + pose.x * scale,
        y: y + pose.y * scale,
        scale: scale * pose.scale,
        turn: turn + pose.turn,
      },
    },
  ];
};

const words: Kinds['words'] = ({ text, weight, colour, mono }, layer) =>
  text.trim() === '' ? [] : [placed(layer, { kind: 'words', text, weight, colour, mono })];

const drawing: Kinds['drawing'] = (source, layer, { beat, timeS }) => [
  placed(layer, {
    kind: 'drawing',
    drawing: source.drawing,
    seed: chance(source.seed) * 100,
    palette: source.palette.map(rgbOf),
    a: source.a,
    b: source.b,
    beat,
    timeS,
  }),
];

const kinds: Kinds = { clip, stills, mark, words, drawing };

/** A soft beat: 1 on each period's start, 0 half way. */
const swell = (beat: number, beats: number): number => 0.5 + 0.5 * Math.cos((tau * beat) / beats);

const pulsed = (item: Item, layer: Layer, beat: number): Item => {
  if (!layer.pulse) return item;
  const { of, amount, beats } = layer.pulse;
  const lift = swell(beat, beats);
  return of === 'opacity'
    ? { ...item, opacity: item.opacity * (1 - amount * (1 - lift)) }
    : { ...item, place: { ...item.place, scale: item.place.scale * (1 + 0.25 * amount * lift) } };
};

/** What one layer draws at a moment: nothing, one thing, or two while stills change. Pure. */
export const evaluateLayer = (layer: Layer, moment: LayerMoment): DrawItem[] => {
  if (!layer.on) return [];
  const kind = kinds[layer.source.kind] as (source: Source, layer: Layer, moment: LayerMoment) => Item[];
  const dial = layer.dial === null ? 1 : (moment.dials[layer.dial] ?? 1);
  return kind(layer.source, layer, moment)
    .map((item) => pulsed(item, layer, moment.beat))
    .map(({ part, ...item }) => ({
      ...item,
      opacity: item.opacity * dial,
      key: `${moment.runKey}/${layer.id}${part && `/${part}`}`,
      blend: layer.blend,
      fit: layer.fit,
    }));
};
