import { createHash, randomBytes } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { statfs, unlink } from 'node:fs/promises';
import { join } from 'node:path';
import { Transform } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { type Request, Router } from 'express';
import { deleteAsset, editAsset, listAssets, readAsset } from '#server/services/assets';
import { audit } from '#server/services/audit';
import { Fault } from '#server/services/fault';
import { editAssetSchema, uploadLimits } from '#shared/api/assets';
import type { RouteContext } from './context';
import { route } from './route';

/** Files of the Library. An upload is the raw body; its name is in the header x-file-name, percent-encoded. */
export const assetRoutes = ({ db, hub, media, log }: RouteContext): Router => {
  const router = Router();
  route(router, { method: 'get', path: '/api/assets', action: 'asset.read' }, ({ caller }) =>
    listAssets(db, caller.crewId),
  );
  route(
    router,
    { method: 'post', path: '/api/assets', action: 'asset.upload', status: 201 },
    async ({ caller, request }) => {
      const originalName = nameIn(request);
      const received = await receive(request, media.incomingFolder);
      const { crewId, userId } = caller;
      const asset = await media.ingest({ crewId, originalName, addedBy: userId, ...received });
      await audit(db, { caller, action: 'asset.upload', object: asset.id });
      return readAsset(db, crewId, asset.id);
    },
  );
  route(router, { method: 'get', path: '/api/assets/:id', action: 'asset.read' }, ({ caller, param }) =>
    readAsset(db, caller.crewId, param('id')),
  );
  route(
    router,
    { method: 'patch', path: '/api/assets/:id', action: 'asset.edit', body: editAssetSchema },
    async ({ caller, param, body }) => {
      const asset = await editAsset(db, caller.crewId, param('id'), body);
      hub.assetsChanged(caller.crewId);
      return asset;
    },
  );
  route(
    router,
    { method: 'delete', path: '/api/assets/:id', action: 'asset.edit' },
    async ({ caller, param }) => {
      const free = await deleteAsset(db, caller.crewId, param('id'));
      for (const name of free)
        await unlink(join(media.mediaFolder, name)).catch((error: unknown) =>
          log.warn({ err: error, name }, 'a file without an owner stays on disk'),
        );
      await audit(db, { caller, action: 'asset.edit', object: `${param('id')} removed` });
    },
  );
  return router;
};

function nameIn(request: Request): string {
  const given = request.get('x-file-name');
  if (!given) throw new Fault(400, 'The upload has no name.', 'Send the name in the header x-file-name.');
  try {
    return decodeURIComponent(given);
  } catch {
    throw new Fault(400, 'The name of the upload is not readable.', 'Rename the file and try again.');
  }
}

const tooLarge = (): Fault =>
  new Fault(413, 'This file is larger than 2 GB.', 'Cut the video, or export it smaller.');

/** Streams the body to disk and hashes it on the way. A broken-off upload leaves nothing. */
async function receive(
  request: Request,
  folder: string,
): Promise<{ path: string; hash: string; bytes: number }> {
  const announced = Number(request.get('content-length') ?? 0);
  if (announced > uploadLimits.video) throw tooLarge();
  const { bavail, bsize } = await statfs(folder);
  if (bavail * bsize < announced * 2 + 200_000_000)
    throw new Fault(507, 'The disk of the server is nearly full.', 'Free some space, then upload again.');
  const path = join(folder, randomBytes(9).toString('base64url'));
  const hash = createHash('sha256');
  let bytes = 0;
  const meter = new Transform({
    transform: (part: Buffer, _encoding, done) => {
      bytes += part.length;
      hash.update(part);
      done(bytes > uploadLimits.video ? tooLarge() : null, part);
    },
  });
  try {
    await pipeline(request, meter, createWriteStream(path, { flags: 'wx', mode: 0o600 }));
  } catch (error) {
    await unlink(path).catch(() => undefined);
    if (error instanceof Fault) throw error;
    throw new Fault(400, 'The upload was broken off.', 'Upload the file again.');
  }
  return { path, hash: hash.digest('hex'), bytes };
}
