import { Router } from 'express';
import { audit } from '#server/services/audit';
import { deleteVenue, editVenue, listVenues, makeVenue, readVenue } from '#server/services/shows/venues';
import { editVenueSchema } from '#shared/api/shows';
import type { RouteContext } from './context';
import { route } from './route';

/** Measured rooms. */
export const venueRoutes = ({ db, hub }: RouteContext): Router => {
  const router = Router();
  route(router, { method: 'get', path: '/api/venues', action: 'venue.read' }, ({ caller }) =>
    listVenues(db, caller.crewId),
  );
  route(
    router,
    { method: 'post', path: '/api/venues', action: 'venue.edit', body: editVenueSchema, status: 201 },
    async ({ caller, body }) => {
      const venue = await makeVenue(db, caller.crewId, body);
      await audit(db, { caller, action: 'venue.edit', object: `${venue.id} made` });
      return venue;
    },
  );
  route(router, { method: 'get', path: '/api/venues/:id', action: 'venue.read' }, ({ caller, param }) =>
    readVenue(db, caller.crewId, param('id')),
  );
  route(
    router,
    { method: 'put', path: '/api/venues/:id', action: 'venue.edit', body: editVenueSchema },
    async ({ caller, param, body }) => {
      const { venue, showIds } = await editVenue(db, caller.crewId, param('id'), body);
      for (const showId of showIds) hub.manifestChanged(showId);
      await audit(db, { caller, action: 'venue.edit', object: venue.id });
      return venue;
    },
  );
  route(
    router,
    { method: 'delete', path: '/api/venues/:id', action: 'venue.edit' },
    async ({ caller, param }) => {
      await deleteVenue(db, caller.crewId, param('id'));
      await audit(db, { caller, action: 'venue.edit', object: `${param('id')} removed` });
    },
  );
  return router;
};
