import type { Database } from '../db/database';
import { ok, publicRoute, route, type Route } from '../http/route';
import { z } from '../http/openapi-zod';
import { reportSearchAnswer, reportView, searchSuggestions } from './report-schemas';
import { searchQuery, suggestionQuery } from './report-search-schemas';
import type { ReportSearchService } from './report-search-service';
import type { ReportsService } from './reports-service';
import { suggest } from './search-words-queries';

const suggestionsShown = 8;

export const numberParams = z.object({ number: z.string().max(30) });
const versionQuery = z.strictObject({
  version: z.coerce.number().int().min(1).max(10_000).optional(),
});

/** What readers ask: search, suggestions, the page of a report. */
export function reportsRoutes(
  database: Database, reports: ReportsService, search: ReportSearchService,
): Route[] {
  return [
    route({
      method: 'get', path: '/api/reports', operationId: 'searchReports', limit: 'read',
      summary: 'Search the published reports that the caller may read', access: publicRoute,
      query: searchQuery, answers: { 200: reportSearchAnswer },
      handle: async ({ actor, query }) =>
        ok(await database.asActor(actor, (trx) => search.search(trx, query))),
    }),
    route({
      method: 'get', path: '/api/reports/suggestions', operationId: 'suggestSearches',
      summary: 'Coin types, tells and catalogue words that begin so', access: publicRoute,
      limit: 'read', query: suggestionQuery, answers: { 200: searchSuggestions },
      handle: async ({ actor, query }) => ok({ items: query.text === '' ? []
        : await database.asActor(actor, (trx) => suggest(trx, query.text, suggestionsShown)) }),
    }),
    route({
      method: 'get', path: '/api/reports/:number', operationId: 'getReport', limit: 'read',
      summary: 'A published report, or an earlier version of it', access: publicRoute,
      params: numberParams, query: versionQuery, answers: { 200: reportView }, refusals: [404],
      handle: async ({ actor, params, query }) => ok(await database.asActor(actor,
        (trx) => reports.view(trx, params.number, query.version))),
    }),
  ];
}
