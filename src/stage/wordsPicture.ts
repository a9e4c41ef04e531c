import { ImageSource } from 'pixi.js';
import type { DrawSource } from '#shared/scene/drawingList';
import { fontFamily } from './fonts';
import type { Size } from './layerPlace';
import { lineHeight, linesFor, trial } from './wordsLines';

export type Words = Extract<DrawSource, { kind: 'words' }>;

/** Draws words on a canvas just large enough, in the shipped fonts. `side` is the longest side, pixels. */
export const drawWords = (words: Words, aspect: number, side: number): HTMLCanvasElement => {
  const canvas = document.createElement('canvas');
  const context = canvas.getContext('2d');
  if (!context) return canvas;
  const font = (px: number): string => `${words.weight} ${px}px ${fontFamily(words.mono)}`;
  context.font = font(trial);
  const width = (text: string): number => context.measureText(text).width;
  const lines = linesFor(words.text, aspect, width);
  const natural = {
    width: Math.max(1, ...lines.map(width)) + trial * 0.12,
    height: lines.length * lineHeight * trial,
  };
  const scale = side / Math.max(natural.width, natural.height);
  canvas.width = Math.max(1, Math.ceil(natural.width * scale));
  canvas.height = Math.max(1, Math.ceil(natural.height * scale));
  context.font = font(trial * scale);
  context.textAlign = 'center';
  context.textBaseline = 'middle';
  context.fillStyle = words.colour;
  for (const [i, line] of lines.entries())
    context.fillText(line, canvas.width / 2, (i + 0.54) * lineHeight * trial * scale);
  return canvas;
};

/** A picture of a canvas that stays as it is. */
export const sourceOf = (canvas: HTMLCanvasElement): ImageSource =>
  new ImageSource({ resource: canvas, alphaMode: 'premultiply-alpha-on-upload', autoGenerateMipmaps: true });

export interface WordsPicture {
  source: ImageSource;
  size: Size;
}

/** Steps of the longest side, so that words that breathe aren't drawn anew at each frame. */
const sides = [256, 512, 1024, 2048] as const;
export const wordsSide = (need: number): number => sides.find((side) => side >= need) ?? 2048;

export const wordsPicture = (words: Words, aspect: number, side: number): WordsPicture => {
  const canvas = drawWords(words, aspect, side);
  return { source: sourceOf(canvas), size: { width: canvas.width, height: canvas.height } };
};
