import type { StagePicture } from './types';

/** Most bytes of a small picture on its way to the hub. */
const mostBytes = 30_000;
const qualities = [0.7, 0.45, 0.2] as const;

const blobOf = (canvas: HTMLCanvasElement, quality: number): Promise<Blob | null> =>
  new Promise((resolve) => canvas.toBlob(resolve, 'image/webp', quality));

const base64 = async (blob: Blob): Promise<string> => {
  const bytes = new Uint8Array(await blob.arrayBuffer());
  let text = '';
  for (const byte of bytes) text += String.fromCharCode(byte);
  return btoa(text);
};

/** A picture as base64 of a WebP file of at most 30 kB; null when the browser can't make one that small. */
export const pictureData = async ({ width, height, pixels }: StagePicture): Promise<string | null> => {
  const canvas = document.createElement('canvas');
  canvas.width = width;
  canvas.height = height;
  const context = canvas.getContext('2d');
  if (!context) return null;
  context.putImageData(new ImageData(new Uint8ClampedArray(pixels), width, height), 0, 0);
  for (const quality of qualities) {
    const blob = await blobOf(canvas, quality);
    if (blob?.type === 'image/webp' && blob.size <= mostBytes) return base64(blob);
  }
  return null;
};
