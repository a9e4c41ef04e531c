import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { open, rename, stat, unlink } from 'node:fs/promises';
import { join } from 'node:path';
import { pipeline } from 'node:stream/promises';

/** sha256 of a file, hex. */
export async function hashFile(path: string): Promise<string> {
  const hash = createHash('sha256');
  await pipeline(createReadStream(path), hash);
  return hash.digest('hex');
}

/** Waits until a file, or the names in a folder, are on the disk. */
async function sync(path: string): Promise<void> {
  const file = await open(path, 'r');
  await file.sync().finally(() => file.close());
}

/**
 * Moves a finished file to where it is served from, named after its content: the same content twice is one file. On
 * disk before it has its name, so that a power cut never leaves half a file under a whole name.
 * @param ext such as `mp4`
 * @returns the name in the folder
 */
export async function keepFile(path: string, folder: string, ext: string): Promise<string> {
  const name = `${await hashFile(path)}.${ext}`;
  await sync(path);
  await rename(path, join(folder, name));
  await sync(folder);
  return name;
}

/** Removes a file that may not be there. */
export async function removeFile(path: string): Promise<void> {
  await unlink(path).catch((error: NodeJS.ErrnoException) => {
    if (error.code !== 'ENOENT') throw error;
  });
}

/** Size in bytes. */
export const sizeOf = async (path: string): Promise<number> => (await stat(path)).size;
