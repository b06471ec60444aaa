import { placeListResponseSchema, placeQuerySchema } from '@/shared/contracts/places';
import { defineRoute } from './route';

export const placeRoutes = [
  defineRoute({
    method: 'get', path: '/places', tag: 'Places', summary: 'Places by the beginning of their name, from the embedded gazetteer (GeoNames, CC BY 4.0).',
    access: 'public', query: placeQuerySchema, response: placeListResponseSchema,
    handler: async ({ app, query }) => ({ places: await app.places.find(query.q, 8) }),
  }),
];
