import { Router } from 'express';
import { deleteBrand, editBrand, listBrands, makeBrand } from '#server/services/shows/brands';
import { editBrandSchema } from '#shared/api/shows';
import type { RouteContext } from './context';
import { route } from './route';

/** Clients' names, colours and marks. */
export const brandRoutes = ({ db }: RouteContext): Router => {
  const router = Router();
  route(router, { method: 'get', path: '/api/brands', action: 'brand.read' }, ({ caller }) =>
    listBrands(db, caller.crewId),
  );
  route(
    router,
    { method: 'post', path: '/api/brands', action: 'brand.edit', body: editBrandSchema, status: 201 },
    ({ caller, body }) => makeBrand(db, caller.crewId, body),
  );
  route(
    router,
    { method: 'put', path: '/api/brands/:id', action: 'brand.edit', body: editBrandSchema },
    ({ caller, param, body }) => editBrand(db, caller.crewId, param('id'), body),
  );
  route(router, { method: 'delete', path: '/api/brands/:id', action: 'brand.edit' }, ({ caller, param }) =>
    deleteBrand(db, caller.crewId, param('id')),
  );
  return router;
};
