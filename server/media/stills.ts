import { readFile } from 'node:fs/promises';
import sharp, { type Sharp } from 'sharp';
import { uploadLimits } from '#shared/api/assets';
import { MediaFault } from './mediaFault';
import { sniff } from './sniff';

/** Longest side of a served still and of a poster, px. */
const mostStill = 4096;
const mostPoster = 640;
/** A drawing without a size of its own is drawn this large, px. */
const svgSide = 2048;
const mostSvgBytes = 5 * 1024 * 1024;

export interface MadePicture {
  width: number;
  height: number;
  alpha: boolean;
  /** `webp` */
  ext: string;
}

const input = { limitInputPixels: uploadLimits.pixels, failOn: 'error' as const };

/** A vector drawing may not name other files or grow by entities. librsvg loads nothing foreign; this says why early. */
async function openSvg(path: string): Promise<Sharp> {
  const text = await readFile(path);
  if (text.length > mostSvgBytes)
    throw new MediaFault('This drawing is larger than 5 MB: export it simpler.');
  if (/<!ENTITY|<!DOCTYPE[^>]*\[/i.test(text.toString('utf8')))
    throw new MediaFault('This drawing holds entities: export it as plain SVG.');
  const { width = svgSide, height = svgSide } = await sharp(text, input).metadata();
  const density = Math.min(2400, Math.max(1, (72 * svgSide) / Math.max(width, height)));
  return sharp(text, { ...input, density });
}

async function openPicture(path: string): Promise<Sharp> {
  const { what } = await sniff(path);
  return what === 'svg' ? openSvg(path) : sharp(path, input);
}

/** What sharp complains about, in words. */
function faultOf(error: unknown): MediaFault {
  if (error instanceof MediaFault) return error;
  const text = error instanceof Error ? error.message : '';
  if (/pixel limit/i.test(text))
    return new MediaFault('This picture has more than 50 megapixels: make it smaller.');
  return new MediaFault('This picture is damaged: export it anew as PNG or JPEG.');
}

/** What a picture is like before any work is done on it. */
export interface PictureFacts {
  /** It has see-through parts. */
  alpha: boolean;
  /** It is one of several that follow each other, as in a moving GIF. */
  moves: boolean;
}

/** Looks at a picture. Throws a MediaFault. */
export async function pictureFacts(path: string): Promise<PictureFacts> {
  try {
    const picture = await openPicture(path);
    const { hasAlpha = false, pages = 1, format } = await picture.metadata();
    const moves = format === 'gif' && pages > 1;
    if (!hasAlpha) return { alpha: false, moves };
    const { isOpaque } = await picture.stats();
    return { alpha: !isOpaque, moves };
  } catch (error) {
    throw faultOf(error);
  }
}

/** Turns a picture upright, into sRGB, without the original's metadata, 4096 px at the most. Throws a MediaFault. */
export async function makeStill(from: string, to: string): Promise<MadePicture> {
  try {
    const { alpha } = await pictureFacts(from);
    const fit = { width: mostStill, height: mostStill, fit: 'inside' as const, withoutEnlargement: true };
    const { width, height } = await (await openPicture(from))
      .rotate()
      .resize(fit)
      .toColourspace('srgb')
      .webp(alpha ? { nearLossless: true, quality: 90, alphaQuality: 100 } : { quality: 90 })
      .toFile(to);
    return { width, height, alpha, ext: 'webp' };
  } catch (error) {
    throw faultOf(error);
  }
}

/** A small picture for lists. */
export async function makePoster(from: string, to: string): Promise<void> {
  try {
    await (await openPicture(from))
      .rotate()
      .resize({ width: mostPoster, height: mostPoster, fit: 'inside', withoutEnlargement: true })
      .webp({ quality: 80 })
      .toFile(to);
  } catch (error) {
    throw faultOf(error);
  }
}
