import type { DrawingName } from './schema';

export interface DrawingFact {
  title: string;
  /** What the two parameters do. */
  a: string;
  b: string;
  defaults: { a: number; b: number; palette: [string, string, string, string] };
  /** Energy it suits, 1..10. */
  energy: number;
}

/** Our drawings, and what their numbers mean. Palette: ground, deep, main, bright. */
export const drawingFacts: Record<DrawingName, DrawingFact> = {
  meadow: {
    title: 'Meadow',
    a: 'how many fireflies',
    b: 'how much they flash in step',
    defaults: { a: 0.5, b: 0.5, palette: ['#020806', '#0d3324', '#2c7a4b', '#d3f84b'] },
    energy: 4,
  },
  searchlights: {
    title: 'Searchlights',
    a: 'how many beams',
    b: 'how wide they sweep',
    defaults: { a: 0.5, b: 0.5, palette: ['#03040d', '#101a4a', '#3158d8', '#cfe0ff'] },
    energy: 7,
  },
  awning: {
    title: 'Awning',
    a: 'width of the stripes',
    b: 'depth of the folds',
    defaults: { a: 0.4, b: 0.5, palette: ['#1a0716', '#5c1d4a', '#e58aa6', '#ffd9c7'] },
    energy: 6,
  },
  ripple: {
    title: 'Ripple',
    a: 'how many drops',
    b: 'how sharp the rings',
    defaults: { a: 0.4, b: 0.5, palette: ['#01090a', '#06393c', '#1f9a8e', '#c9fff0'] },
    energy: 6,
  },
  slats: {
    title: 'Slats',
    a: 'how many slats',
    b: 'how far they turn',
    defaults: { a: 0.45, b: 0.6, palette: ['#0a0908', '#2b2723', '#b8a78c', '#fff6e2'] },
    energy: 8,
  },
  tide: {
    title: 'Tide',
    a: 'height of the swell',
    b: 'how much light on it',
    defaults: { a: 0.5, b: 0.4, palette: ['#010508', '#04202d', '#0d4a5a', '#4f9aa0'] },
    energy: 2,
  },
  lanterns: {
    title: 'Lanterns',
    a: 'how many lanterns',
    b: 'how far they sway',
    defaults: { a: 0.5, b: 0.5, palette: ['#070409', '#2a1226', '#c9622f', '#ffd08a'] },
    energy: 3,
  },
  weave: {
    title: 'Weave',
    a: 'how fine the threads',
    b: 'how far it bends',
    defaults: { a: 0.5, b: 0.5, palette: ['#05060c', '#1b2350', '#7d6bd6', '#f0e9ff'] },
    energy: 5,
  },
};
