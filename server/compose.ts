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

export interface Parts {
  readonly config: Config;
  readonly database: Database;
  readonly logger: Logger;
}

/** The only place that knows every feature: makes the services and hands them to the routes. */
export function composeRoutes({ config, database }: Parts): Route[] {
  const accounts = createAccountsService(config, createPasswords(config.environment));
  const clubs = createClubsService(config);
  return [
    ...healthRoutes(database),
    ...accountsRoutes(database, accounts, config),
    ...clubsRoutes(database, clubs),
  ];
}
