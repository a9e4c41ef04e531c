import type { Rgb } from './drawingList';

/** #rrggbb as sRGB shares 0..1. */
export const rgbOf = (colour: string): Rgb => {
  const value = Number.parseInt(colour.slice(1), 16);
  return [(value >> 16) / 255, ((value >> 8) & 255) / 255, (value & 255) / 255];
};
