import { ImageSource } from 'pixi.js';
import type { DrawSource } from '#shared/scene/drawingList';
import { fontFamily } from './fonts';
import type { Size } from './layerPlace';

export type Words = Extract<DrawSource, { kind: 'words' }>;

const lineHeight = 1.12;
/** Size words are measured at before their true size is known, pixels. */
const trial = 100;

/** Breaks one line of words into `count` lines of about the same width. */
const broken = (text: string, count: number, width: (text: string) => number): string[] => {
  const words = text.split(/\s+/).filter(Boolean);
  const goal = width(text) / count;
  const lines: string[] = [];
  let line = '';
  for (const word of words) {
    const longer = line ? `${line} ${word}` : word;
    const over = width(longer) - goal;
    const tooLong = line !== '' && lines.length < count - 1 && over > 0 && over > goal - width(line);
    if (tooLong) lines.push(line);
    line = tooLong ? word : longer;
  }
  return line ? [...lines, line] : lines;
};

/** The lines that let the words stand largest in a box of this shape. Line breaks of the writer stay. */
export const linesFor = (text: string, aspect: number, width: (text: string) => number): string[] => {
  const given = text.split('\n').map((line) => line.trim());
  const size = (lines: string[]): number => {
    const widest = Math.max(1e-6, ...lines.map(width));
    return Math.min(aspect / widest, 1 / (lines.length * lineHeight * trial));
  };
  if (given.length > 1) return given;
  let best = given;
  for (let count = 2; count <= 6; count += 1) {
    const lines = broken(given[0] ?? '', count, width);
    if (size(lines) > size(best)) best = lines;
  }
  return best;
};

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
