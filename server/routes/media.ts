import { Router } from 'express';
import { crewHasFile } from '#server/services/assets';
import { notFound } from '#server/services/fault';
import type { RouteContext } from './context';
import { route } from './route';

/** Names that we give: sha256 of the content and a fixed ending, which alone says the type. */
const names = /^[a-f0-9]{64}\.(mp4|webp|png|jpg)$/;

/** Served files, by the crew and by displays of its shows; kept for good, as the name changes with the content. */
export const mediaRoutes = ({ db, media }: RouteContext): Router => {
  const router = Router();
  route(
    router,
    { method: 'get', path: '/media/:file', action: 'media.read' },
    async ({ who, param, response }) => {
      const name = param('file');
      const crewIds = [who.caller?.crewId, who.display?.crewId].flatMap((id) => id ?? []);
      const mine = names.test(name) && (await anyHas(crewIds, (crewId) => crewHasFile(db, crewId, name)));
      if (!mine) throw notFound('file');
      response.setHeader('etag', `"${name.slice(0, 64)}"`);
      response.setHeader('cache-control', 'private, max-age=31536000, immutable');
      response.setHeader('content-security-policy', "default-src 'none'; sandbox");
      await new Promise<void>((resolve, reject) => {
        response.sendFile(
          name,
          { root: media.mediaFolder, acceptRanges: true, lastModified: false },
          (error) => {
            // A player that has heard enough hangs up: that is no fault.
            if (error && !response.headersSent) reject(notFound('file'));
            else resolve();
          },
        );
      });
    },
  );
  return router;
};

async function anyHas(
  crewIds: readonly string[],
  has: (crewId: string) => Promise<boolean>,
): Promise<boolean> {
  for (const crewId of crewIds) if (await has(crewId)) return true;
  return false;
}
