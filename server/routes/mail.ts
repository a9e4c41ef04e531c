import { type Request, Router } from 'express';
import { Fault } from '#server/services/fault';
import type { RouteContext } from './context';
import { route } from './route';

const loopback = /^(::1|127\.|::ffff:127\.)/;

/** Whether a request surely comes from this machine and not through a proxy on it, which would also be loopback. */
const fromHere = (request: Request): boolean =>
  loopback.test(request.socket.remoteAddress ?? '') &&
  request.headers['x-forwarded-for'] === undefined &&
  request.headers.forwarded === undefined;

/** The mail that is kept on this machine. */
export const mailRoutes = ({ mail, config }: RouteContext): Router => {
  const router = Router();
  route(router, { method: 'get', path: '/api/mail', action: 'mail.read' }, ({ request, who }) => {
    const kept = mail.kept();
    if (!kept)
      throw new Fault(404, 'No mail is kept here: it leaves by a mail server.', 'Look into your mailbox.');
    // The letters hold links that make accounts: over the network, or by a public address, only the lead reads them.
    const open = config.publicUrl === null && fromHere(request);
    if (!open && who.caller?.role !== 'lead')
      throw new Fault(
        403,
        'Kept mail is read on the machine that runs Lampyrid.',
        'Open it there, or ask your lead.',
      );
    return kept;
  });
  return router;
};
