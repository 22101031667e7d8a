import type { Logger } from 'pino';
import { accountsRoutes } from './accounts/accounts-routes';
import { createAccountsService } from './accounts/accounts-service';
import { createPasswords } from './accounts/passwords';
import { clubsRoutes } from './clubs/clubs-routes';
import { createClubsService } from './clubs/clubs-service';
import type { Config } from './config';
import type { Database } from './db/database';
import { healthRoutes } from './health-routes';
import type { Route } from './http/route';
import { startJobQueue } from './jobs/job-queue';
import { noticesRoutes } from './notices/notices';
import { mailLedgerRoutes } from './registry/mail-ledger-routes';

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
  const queue = await startJobQueue(config.databaseUrl, logger, 'enqueue');
  return {
    routes: [
      ...healthRoutes(database),
      ...accountsRoutes(database, accounts, config),
      ...clubsRoutes(database, clubs),
      ...noticesRoutes(database),
      ...mailLedgerRoutes(database),
    ],
    stop: () => queue.stop(),
  };
}
