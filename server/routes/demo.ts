import { Router } from 'express';
import type { RouteContext } from './context';
import { route } from './route';

/** The demo night: making it, and how far that is. */
export const demoRoutes = ({ demo }: RouteContext): Router => {
  const router = Router();
  route(router, { method: 'get', path: '/api/demo', action: 'show.read' }, ({ caller }) =>
    demo.progress(caller.crewId),
  );
  route(router, { method: 'post', path: '/api/demo', action: 'demo.make', status: 202 }, ({ caller }) =>
    demo.make(caller.crewId, caller.userId),
  );
  return router;
};
