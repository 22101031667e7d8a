import type { Database, Transaction } from '../db/database';
import { InvalidInput, NotFound } from '../errors';
import { ok, publicRoute, route, type Route } from '../http/route';
import { countReports } from '../reports/report-search-queries';
import { findCoinType, findTaxonomy, listCoinTypes } from './catalogue-queries';
import { coinTypeList, coinTypesQuery, coinTypeView, readCursor, slugParams, taxonomyView,
  type CoinTypesCursor } from './catalogue-schemas';
import type { CoinTypeView } from '#shared/catalogue/coin-type-view';

export function catalogueRoutes(database: Database): Route[] {
  return [
    route({
      method: 'get', path: '/api/coin-types', operationId: 'listCoinTypes', limit: 'read',
      summary: 'Coin types of the catalogue, by name or issuer', access: publicRoute,
      query: coinTypesQuery, answers: { 200: coinTypeList },
      handle: async ({ actor, query }) => {
        const after = getCursor(query.after);
        return ok(await database.asActor(actor, (trx) => listCoinTypes(trx, query, after)));
      },
    }),
    route({
      method: 'get', path: '/api/coin-types/:slug', operationId: 'getCoinType', limit: 'read',
      summary: 'A coin type: its standard, dates and mints, legal status, with the sources',
      access: publicRoute, params: slugParams, answers: { 200: coinTypeView }, refusals: [404],
      handle: async ({ actor, params }) =>
        ok(await database.asActor(actor, (trx) => getCoinType(trx, params.slug))),
    }),
    route({
      method: 'get', path: '/api/tells', operationId: 'getTaxonomy', limit: 'read',
      summary: 'The taxonomy of tells that the caller may know of', access: publicRoute,
      answers: { 200: taxonomyView },
      handle: async ({ actor }) => ok(await database.asActor(actor, findTaxonomy)),
    }),
  ];
}

async function getCoinType(trx: Transaction, slug: string): Promise<CoinTypeView> {
  const coinType = await findCoinType(trx, slug);
  if (!coinType) throw new NotFound();
  return { ...coinType, reportCount: await countReports(trx, { coinType: [slug] }) };
}

function getCursor(text: string | undefined): CoinTypesCursor | undefined {
  const after = text === undefined ? undefined : readCursor(text);
  if (text !== undefined && !after) throw new InvalidInput([{ field: 'after', code: 'invalid' }]);
  return after;
}
