import { open } from 'node:fs/promises';
import { fileTypeFromBuffer } from 'file-type';
import { MediaFault } from './mediaFault';

export interface Sniffed {
  what: 'picture' | 'video' | 'svg';
  mime: string;
}

/** Bytes that tell a file's type; file-type asks for 4100. */
const headBytes = 8192;

const pictures = new Set(['image/jpeg', 'image/png', 'image/webp', 'image/gif', 'image/avif', 'image/tiff']);

const readHead = async (path: string): Promise<Buffer> => {
  const file = await open(path, 'r');
  try {
    const { bytesRead, buffer } = await file.read(Buffer.alloc(headBytes), 0, headBytes, 0);
    return buffer.subarray(0, bytesRead);
  } finally {
    await file.close();
  }
};

const looksLikeText = (head: Buffer): boolean => head.every((byte) => byte >= 9 && byte !== 127);

/** What the first bytes of a file say it is. Throws a MediaFault for what is neither picture nor video. */
export const sniffBytes = async (head: Buffer): Promise<Sniffed> => {
  if (head.length === 0) throw new MediaFault('This file is empty: upload it again.');
  const text = head.toString('utf8');
  if (/^\s*#EXTM3U|^\s*ffconcat/.test(text))
    throw new MediaFault('This is a playlist, not a video: upload the video itself.');
  const type = await fileTypeFromBuffer(head);
  if (type && pictures.has(type.mime)) return { what: 'picture', mime: type.mime };
  if (type?.mime.startsWith('video/')) return { what: 'video', mime: type.mime };
  if (/<svg[\s>]/i.test(text)) return { what: 'svg', mime: 'image/svg+xml' };
  if (type?.mime.startsWith('image/hei'))
    throw new MediaFault('This is a HEIC picture: set the phone to “most compatible”, or export it as JPEG.');
  if (type) throw new MediaFault(`Not a picture or a video: it is ${type.ext.toUpperCase()}.`);
  throw new MediaFault(
    looksLikeText(head)
      ? 'Not a picture or a video: it is text.'
      : 'Not a picture or a video that can be read here.',
  );
};

/** The same for a file on disk. */
export const sniff = async (path: string): Promise<Sniffed> => sniffBytes(await readHead(path));
