import { Router } from 'express';
import { audit } from '#server/services/audit';
import { deleteBrand, editBrand, listBrands, makeBrand, readBrand } from '#server/services/shows/brands';
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
    async ({ caller, body }) => {
      const brand = await makeBrand(db, caller.crewId, body);
      await audit(db, { caller, action: 'brand.edit', object: `${brand.id} made` });
      return brand;
    },
  );
  route(router, { method: 'get', path: '/api/brands/:id', action: 'brand.read' }, ({ caller, param }) =>
    readBrand(db, caller.crewId, param('id')),
  );
  route(
    router,
    { method: 'put', path: '/api/brands/:id', action: 'brand.edit', body: editBrandSchema },
    async ({ caller, param, body }) => {
      const brand = await editBrand(db, caller.crewId, param('id'), body);
      await audit(db, { caller, action: 'brand.edit', object: brand.id });
      return brand;
    },
  );
  route(
    router,
    { method: 'delete', path: '/api/brands/:id', action: 'brand.edit' },
    async ({ caller, param }) => {
      await deleteBrand(db, caller.crewId, param('id'));
      await audit(db, { caller, action: 'brand.edit', object: `${param('id')} removed` });
    },
  );
  return router;
};
