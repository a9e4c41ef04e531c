import { drawingFacts } from './drawingFacts';
import type { SceneBody } from './schema';

/** The calm look: slow, dim, without any flash. The same on every screen, whatever the show holds. */
export const calmBody: SceneBody = {
  ground: '#000000',
  layers: [
    {
      id: 'tide',
      name: 'Tide',
      on: true,
      source: { kind: 'drawing', drawing: 'tide', seed: 1, ...drawingFacts.tide.defaults },
      opacity: 0.6,
      blend: 'normal',
      fit: 'cover',
      place: { x: 0, y: 0, scale: 1, turn: 0 },
      pulse: null,
      dial: null,
    },
  ],
  dials: [],
  transition: { kind: 'crossfade', beats: 4 },
};
