import { drawingFacts } from './drawingFacts';
import type { DrawingName, Layer, SceneBody, Source, SourceKind } from './schema';

const sources: Record<SourceKind, () => Source> = {
  clip: () => ({ kind: 'clip', assetId: null, rate: 1, fitBars: null }),
  stills: () => ({ kind: 'stills', assetIds: [], everyBeats: 8, seed: 1 }),
  mark: () => ({ kind: 'mark', assetId: null, take: 'breathe', amount: 0.5, seed: 1 }),
  words: () => ({ kind: 'words', text: 'Words', weight: 700, colour: '#ffffff', mono: false }),
  drawing: () => drawingSource('meadow'),
};

/** A drawing with its own palette and parameters. */
export const drawingSource = (drawing: DrawingName, seed = 1): Source => ({
  kind: 'drawing',
  drawing,
  seed,
  ...drawingFacts[drawing].defaults,
});

const names: Record<SourceKind, string> = {
  clip: 'Clip',
  stills: 'Stills',
  mark: 'Mark',
  words: 'Words',
  drawing: 'Drawing',
};

/** A new layer of a kind, ready to be seen. */
export const newLayer = (kind: SourceKind, id: string): Layer => ({
  id,
  name: names[kind],
  on: true,
  source: sources[kind](),
  opacity: 1,
  blend: 'normal',
  fit: kind === 'mark' || kind === 'words' ? 'contain' : 'cover',
  place: { x: 0, y: 0, scale: kind === 'mark' || kind === 'words' ? 0.6 : 1, turn: 0 },
  pulse: null,
  dial: null,
});

/** An empty scene body. */
export const newBody = (): SceneBody => ({
  ground: '#000000',
  layers: [],
  dials: [],
  transition: { kind: 'crossfade', beats: 2 },
});
