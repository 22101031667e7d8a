import { visitor, type Database } from './db/database';
import { z } from './http/openapi-zod';
import { ok, publicRoute, route, type Route } from './http/route';

export function healthRoutes(database: Database): Route[] {
  return [
    route({
      method: 'get', path: '/api/health', operationId: 'getHealth', limit: 'read',
      summary: 'Whether the registry can answer', access: publicRoute,
      answers: { 200: z.strictObject({ status: z.literal('ok') }) },
      handle: async () => {
        await database.asActor(visitor, (trx) => trx.raw('select 1'));
        return ok({ status: 'ok' });
      },
    }),
  ];
}
