import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';

/**
 * Lays a gzipped copy beside each script and style of the built pages, so that a phone on a crowded network gets a third
 * of the bytes. Gzip and not Brotli: browsers offer Brotli on secure pages only, and a venue's network is plain.
 * @param {string} folder of the built files
 */
export function squeeze(folder) {
  for (const name of readdirSync(folder).filter((one) => /\.(js|css)$/.test(one))) {
    const path = join(folder, name);
    writeFileSync(`${path}.gz`, gzipSync(readFileSync(path), { level: 9 }));
  }
}
