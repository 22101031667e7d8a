import type { Logger } from 'pino';
import { accountsRoutes } from './accounts/accounts-routes';
import { createAccountsService } from './accounts/accounts-service';
import { createPasswords } from './accounts/passwords';
import { catalogueRoutes } from './catalogue/catalogue-routes';
import { clubsRoutes } from './clubs/clubs-routes';
import { createClubsService } from './clubs/clubs-service';
import type { Config } from './config';
import type { Database } from './db/database';
import { draftsRoutes } from './drafts/drafts-routes';
import { createDraftsService } from './drafts/drafts-service';
import { healthRoutes } from './health-routes';
import type { Route } from './http/route';
import { createPhotoDecoder } from './images/photo-decoder';
import { openPhotoFolders } from './images/photo-store';
import { startJobQueue } from './jobs/job-queue';
import { noticesRoutes, tellReporter } from './notices/notices';
import { photosRoutes } from './photos/photos-routes';
import { createPhotosService } from './photos/photos-service';
import { mailLedgerRoutes } from './registry/mail-ledger-routes';
import { filingRoutes } from './reports/filing-routes';
import { createFilingService } from './reports/filing-service';
import { countReports } from './reports/report-search-queries';
import { countedAtMost, createReportSearchService } from './reports/report-search-service';
import { reportsRoutes } from './reports/reports-routes';
import { createReportsService } from './reports/reports-service';
import { createKeptTotals } from './reports/search-totals';
import { recordPublication } from './review/review-queries';
import { reviewRoutes } from './review/review-routes';
import { createReviewService } from './review/review-service';
import { watchRoutes } from './watches/watch-routes';
import { createWatchService } from './watches/watch-service';

export interface Parts {
  readonly config: Config;
  readonly database: Database;
  readonly logger: Logger;
}

export interface ComposedRoutes {
  readonly routes: Route[];
  /** Ends what the features hold open. */
  stop(): Promise<void>;
}

/** The only place that knows every feature: makes the services and hands them to the routes. */
export async function composeRoutes(
  { config, database, logger }: Parts,
): Promise<ComposedRoutes> {
  const accounts = createAccountsService(config, createPasswords(config.environment));
  const clubs = createClubsService(config);
  const folders = openPhotoFolders(config.photoDirectory);
  const decoder = createPhotoDecoder();
  const photos = createPhotosService({ database, decoder, ...folders });
  const reports = createReportsService();
  const filing = createFilingService(config, () => new Date());
  const search = createReportSearchService(createKeptTotals(Date.now));
  const queue = await startJobQueue(config.databaseUrl, logger, 'enqueue');
  const review = createReviewService({
    viewNewest: reports.viewNewest,
    tellReporter,
    announcePublication: async (trx, publication) => {
      await recordPublication(trx, publication);
      await queue.enqueue(trx, 'match-watches', publication,
        publication.notBefore ? { startAfter: publication.notBefore } : {});
    },
  });
  const watches = createWatchService({
    countMatches: async (trx, filter) => {
      const count = await countReports(trx, filter);
      return { count: Math.min(count, countedAtMost), more: count > countedAtMost };
    },
  });
  return {
    routes: [
      ...healthRoutes(database),
      ...accountsRoutes(database, accounts, config),
      ...clubsRoutes(database, clubs),
      ...catalogueRoutes(database),
      ...photosRoutes(photos, folders.incoming),
      ...draftsRoutes(database, createDraftsService()),
      ...reportsRoutes(database, reports, search),
      ...filingRoutes(database, filing, reports),
      ...reviewRoutes(database, review),
      ...watchRoutes(database, watches, config),
      ...noticesRoutes(database),
      ...mailLedgerRoutes(database),
    ],
    stop: async () => {
      decoder.close();
      await queue.stop();
    },
  };
}
